package repl

import "testing"

func TestCases(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, line3...)
	spoken(t, s, "case strong : P = 300 W  # the new source", "case slow : dose = 45 mJ/cm^2, overhead = 12 s/wafer",
		"case warm : T = 295.15 K", "half = 1/2", "case both : P = 300 W at IF, dose = 45 mJ/cm^2 * half * 2")
	prints(t, s, "compare P_wafer, wph : base, strong", `
case    P_wafer / W  to base  wph / (wafer/h)  to base
base    2            1        161.04           1
strong  2.4000       1.2000   177.37           1.1015`)
	// base is first and always there, cases stand in the order of the statement
	prints(t, s, "compare P_wafer [mW] : slow, strong, base", `
case    P_wafer / mW  to base
base    2000          1
slow    2000          1
strong  2400          1.2000`)
	prints(t, s, "compare T : warm", `
case  T / °C  to base
base  22
warm  22`)
	prints(t, s, "compare wph - wph, P/P : strong", `
case    wph - wph / (wafer/h)  to base  P/P  to base
base    0                               1    1
strong  0                               1    1`)
	prints(t, s, "P", "250 W at IF")
	// A case is a formula that lives: it follows the session.
	before := resultOf[*Table](t, s, "compare wph : both").Rows[1][1].Number
	spoken(t, s, "half = 1/4")
	if after := resultOf[*Table](t, s, "compare wph : both").Rows[1][1].Number; !(after > before) {
		t.Errorf("half the dose gives %v, the whole %v", after, before)
	}
	for _, c := range [][3]string{
		{"case strong : P = 300 W at WAFER", "P is power (W) at IF, not power (W) at WAFER", "a case keeps the dimension and plane of each name"},
		{"case strong : P = 300 nm", "P is power (W) at IF, not length (m)", "a case keeps the dimension and plane of each name"},
		{"case cold : dT = 20 degC", "dT is temperature (K), not a temperature point", "a case keeps the dimension and plane of each name"},
		{"case base : P = 300 W", "base is the session as it stands", "choose another name for the case"},
		{"case a : nosuch = 3", "nosuch is no single value that a case could set", "a case sets names that are defined"},
		{"case a : P = 1 W, P = 2 W", "P is set twice", "set each name once"},
		{"case a : P = P_wafer / T_line", "P would rest on itself in this case", "write the value without what rests on P"},
		{"case a : P = 2*P", "P would rest on itself in this case", "write the value without what rests on P"},
		{"case a : dose = qqqq", "qqqq is no name that is known here", "define it first: qqqq = …"},
		{"compare wph : nosuch", "nosuch is no case", "define it: case nosuch : x = …; base is the session as it stands"},
		{"compare {1, 2} : strong", "this has no single value", "take one of it, such as mean(…)"},
		{"compare 1/(P - P) : strong", "division by zero", "the divisor must differ from zero: see its value with why"},
		{"compare wph [nm] : strong", "throughput (wafer/h) is not stated in nm, which is length (m): they differ by length·time/wafer", "state it in wafer/h, or change the formula"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
	// One case may break where base does not.
	spoken(t, s, "x = 2", "y = 3", "case zero : x = y - 3")
	refused(t, s, "compare 1/x : zero", "in case zero: division by zero", "set other values in this case")
}

// Cases are checked against the session as it stands when they are compared:
// no value of another dimension, and no circle, comes in by a redefinition.
func TestCasesFollowTheSession(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "x = 3 W", "case more : x = 4 W", "x = 3 nm")
	refused(t, s, "compare x : more", "case more does not fit the session any more: x is length (m), not power (W)", "define the case again")
	spoken(t, s, "u = 1", "v = 2", "case other : u = v")
	prints(t, s, "compare u : other", "case   u  to base\nbase   1  1\nother  2  2")
	spoken(t, s, "v = 2*u")
	refused(t, s, "compare u : other", "case other does not fit the session any more: u would rest on itself in this case", "define the case again")
	refused(t, s, "case both : u = v, v = u", "u would rest on itself in this case", "write the value without what rests on u")
	spoken(t, s, "v = 2", "a = 1", "b = 1")
	refused(t, s, "case ring : a = b, b = v, v = a", "a would rest on itself in this case", "write the value without what rests on a")
	spoken(t, s, "case swap : a = v, b = 7")
	prints(t, s, "compare a, a + b : swap", "case  a  to base  a + b  to base\nbase  1  1        2      1\nswap  2  2        9      4.5000")
	spoken(t, s, "forget v")
	refused(t, s, "compare a : swap", "case swap does not fit the session any more: v is no name that is known here", "define the case again")
}
