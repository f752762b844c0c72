package repl

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// Every way to write an uncertain value.
func TestUncertainLiterals(t *testing.T) {
	s := NewSession(Config{})
	for literal, want := range map[string]string{
		"13.50(2) nm":                                "13.500(20) nm",
		"13.50(0.02) nm":                             "13.500(20) nm",
		"13.50 nm ± 0.02 nm":                         "13.500(20) nm",
		"13.50 nm ± 20 pm":                           "13.500(20) nm",
		"13.50 nm +/- 20 pm":                         "13.500(20) nm",
		"13.50nm±20pm":                               "13.500(20) nm",
		"(13.50 ± 0.02) nm":                          "13.500(20) nm",
		"(13.50 +/- 0.02) nm":                        "13.500(20) nm",
		"normal(13.50 nm, 0.02 nm)":                  "13.500(20) nm",
		"30 mJ/cm^2 ± 2 %":                           "30.00(60) mJ/cm²",
		"30 mJ/cm^2 ± 0.6 mJ/cm^2":                   "30.00(60) mJ/cm²",
		"30 mJ/cm^2 ± 6 J/m^2":                       "30.00(60) mJ/cm²",
		"(30 ± 0.6) mJ/cm^2":                         "30.00(60) mJ/cm²",
		"30 mJ/cm^2 ± 2 % at WAFER":                  "30.00(60) mJ/cm² at WAFER",
		"(30 ± 0.6) mJ/cm^2 at WAFER":                "30.00(60) mJ/cm² at WAFER",
		"30.0(6) mJ/cm^2 at WAFER":                   "30.00(60) mJ/cm² at WAFER",
		"30 mJ/cm^2 ± 4 % (k=2)":                     "30.00(60) mJ/cm²",
		"30 mJ/cm^2 ± 4 % (k = 2) at WAFER":          "30.00(60) mJ/cm² at WAFER",
		"30.0(12) mJ/cm^2 (k=2)":                     "30.00(60) mJ/cm²",
		"(30 ± 1.2) mJ/cm^2 (k=2, nu=9)":             "30.00(60) mJ/cm²",
		"(30 ± 1.17598) mJ/cm^2 (p=95 %)":            "30.00(60) mJ/cm²", // 1.959964 standard deviations of a normal, any table
		"(30 ± 1.66587) mJ/cm^2 (p=95 %, nu=4)":      "30.00(60) mJ/cm²", // t_95(4) = 2.77645, JCGM 100:2008, table G.2
		"(30 ± 1.66587) mJ/cm^2 (nu=4, p=0.95)":      "30.00(60) mJ/cm²",
		"(66.0 ± 0.5) %":                             "0.6600(50)",
		"66.0(5) %":                                  "0.6600(50)",
		"0.66 ± 0.5 %":                               "0.6600(33)",
		"22 degC ± 0.5 K":                            "22.00(50) °C",
		"22.0(5) °C":                                 "22.00(50) °C",
		"-5.0(5) degC":                               "-5.00(50) °C",
		"(22 ± 0.5) degC":                            "22.00(50) °C",
		"0 W ± 2 W":                                  "0.0(20) W",
		"0 W ± 2 %":                                  "0(0) W",
		"(0 ± 3) nm":                                 "0.0(30) nm",
		"5 ± 0":                                      "5(0)",
		"rectangular(1 nm, 2 nm)":                    "1.50(29) nm",
		"triangular(1 nm, 2 nm)":                     "1.50(20) nm",
		"rectangular(20 degC, 22 degC)":              "21.00(58) °C",
		"normal(22 degC, 0.5 K)":                     "22.00(50) °C",
		"normal(250 W, 5 W) at IF":                   "250.0(50) W at IF",
		"-3.0(1) W":                                  "-3.00(10) W",
		"3.0(1) W * 2":                               "6.00(20) W",
		"13.50(2)e-9 m":                              "13.500(20) nm",
		"100 wafer/h ± 5 %":                          "100.0(50) wafer/h",
		"13.500(20) nm + 1.0(1) nm [pm]":             "14500(100) pm",
		"30.00(60) mJ/cm² at WAFER":                  "30.00(60) mJ/cm² at WAFER",
		"2 ± 10 % + 1":                               "3.00(20)",
		"(2 ± 0.2 + 1) * 1 nm":                       "3.00(20) nm",
		"photon_energy(13.50(2) nm)":                 "91.84(14) eV",
		"photon_energy(wavelength = 13.50 nm ± 1 %)": "91.84(92) eV",
	} {
		if got := printed(spoken(t, s, literal)); got != want {
			t.Errorf("%s prints %s, want %s", literal, got, want)
		}
	}
}

// What is not said clearly is refused, with the way to say it.
func TestUncertainRefusals(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "x = 3 W ± 2 %", "y = 2 * x")
	for _, c := range [][3]string{
		{"66 % ± 0.5 %", "± 0.5 % can be meant of the value or in points of %", "write (66 ± 0.5) % for points, or 0.66 ± 0.5 % for a part of the value"},
		{"22 degC ± 2 %", "a percentage of a temperature point has no meaning", "write the uncertainty in K: 22 degC ± 0.5 K"},
		{"30 mJ/cm^2 ± 0.6", "the uncertainty has no unit", "write 30 mJ/cm^2 ± 0.6 mJ/cm^2, or (30 ± 0.6) mJ/cm^2"},
		{"30 mJ/cm^2 ± 0.6 nm", "the uncertainty is length (m), the value fluence (mJ/cm²)", "write it in mJ/cm^2, or as a percentage of the value"},
		{"30 ± 0.6 nm", "the uncertainty is length (m), the value a pure number", "write it as a plain number, or as a percentage of the value"},
		{"30.0(6) nm ± 2 %", "the uncertainty stands twice", "write 13.50(2) nm or 13.50 nm ± 0.02 nm"},
		{"30 nm ± 2.0(1) nm", "this uncertainty: this is no decimal number", "choose a unit that brings the number closer to one"},
		{"30 nm (k=2)", "no uncertainty stands here of which this could be said", "write it behind ±: 30 nm ± 2 % (k=2)"},
		{"30 (nu=5)", "no uncertainty stands here of which this could be said", "write it behind ±: 30 ± 2 % (nu=5)"},
		{"30 nm ± 2 % (k=2, p=95 %)", "k and p both say how far the uncertainty is expanded", "give one of them"},
		{"30 nm ± 2 % (k=0)", "k = 0 says nothing here", "k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once"},
		{"30 nm ± 2 % (p=120 %)", "p = 120 % says nothing here", "k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once"},
		{"30 nm ± 2 % (nu=0.1)", "nu = 0.1 says nothing here", "k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once"},
		{"30 nm ± 2 % (k=2 m)", "k is a pure number", "write (k=2), (p=95 %) or (nu=4)"},
		{"30 nm ± 2 % (p=99.99999999999999999 %)", "p = 99.99999999999999999 % says nothing here", "k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once"},
		{"x = 3 W ± 2 % (nu=0.1)", "nu = 0.1 says nothing here", "k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once"},
		{"x = 3 nm ± 2 %", "y rests on x and would break: y would be length (m) instead of power (W)", "nothing has changed; redefine y first, or use another name here"},
		{"f(a) = a * 3.0(1)", "an uncertain value inside a function would be a new source of error at each call", "give it a name of its own and use the name"},
		{"f(a) = a * (3 ± 1) W", "an uncertain value inside a function would be a new source of error at each call", "give it a name of its own and use the name"},
		{"f(a) = a * normal(3, 1)", "an uncertain value inside a function would be a new source of error at each call", "give it a name of its own and use the name"},
		{"rectangular(2 nm, 1 nm)", "the lower limit is not below the upper one", "write rectangular(1 nm, 2 nm)"},
		{"rectangular(1 nm, 2 s)", "length (m) and time (s) do not stand side by side in rectangular: they differ by time/length", "length * time / length is a time"},
		{"rectangular(x, 2 W)", "the arguments of rectangular are numbers with units, not names or formulas", "write rectangular(1 nm, 2 nm)"},
		{"normal(3 W, 0 W - 1 W)", "the arguments of normal are numbers with units, not names or formulas", "write normal(3 W, 0.1 W)"},
		{"normal(3 W, -1 W)", "a standard uncertainty is not negative", "write normal(3 W, 0.1 W)"},
		{"propagate y : trials = 10", "10 trials are too few for a coverage of 0.95: take 2000 or more", "options stand behind a colon, as in propagate x : trials = 1e5, coverage = 95 %"},
		{"propagate y : trials = 1e9", "trials cannot be this", "options are trials, a whole number up to 100000000, seed, a whole number, and coverage, such as 95 %"},
		{"propagate y : trials = 1 W", "trials cannot be this", "options are trials, a whole number up to 100000000, seed, a whole number, and coverage, such as 95 %"},
		{"propagate y : seed = 1.5", "seed cannot be this", "options are trials, a whole number up to 100000000, seed, a whole number, and coverage, such as 95 %"},
		{"propagate y : seed = 1, seed = 2", "seed is set twice", "set it once"},
		{"propagate y : bins = 7", "bins cannot be this", "options are trials, a whole number up to 100000000, seed, a whole number, and coverage, such as 95 %"},
		{"propagate 3 W", "no uncertain input takes part in this", "give an input its uncertainty, as in 3.0 W ± 2 %"},
		{"budget {1, 2}", "this has no single value", "take one of it, such as mean(…)"},
		{"budget 1/(x - x)", "division by zero", "the divisor must differ from zero: see its value with why"},
		{"correlation x, y = 0.5", "y is no name of one uncertain input", "a correlation joins two names such as y = 3.0(1) W"},
		{"correlation x, x = 0.5", "an input is correlated with itself already", "name two inputs"},
		{"correlation x, z = 0.5", "z is no name of one uncertain input", "a correlation joins two names such as z = 3.0(1) W"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
}

// What gum.json asks of the algebra: covariance lives in the names.
func TestOneNameIsOneError(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "x = 5.0(2)", "x2 = 5.0(2)", "y = 1.0(1)", "z = 3.0(3)", "t = 10(1)", "w = 10(1)", "k = 1.00(5)", "a = k * 2", "b = k * 3", "L = 13.50(2) nm")
	for statement, want := range map[string]string{
		"x - x":                        "0(0)",
		"x / x":                        "1(0)",
		"x - x2":                       "0.00(28)",
		"(z + y) - (z - y)":            "2.00(20)",
		"t*t":                          "100(20)",
		"t^2":                          "100(20)",
		"t*w":                          "100(14)",
		"a/b":                          "0.66667(0)",
		"a*2/(b*3)":                    "0.44444(0)",
		"(a + 1e6) - (b + 1e6) + k":    "0(0)",
		"L/(1 angstrom) - 10*L/(1 nm)": "0(0)",
		"L - L/(1 angstrom) * 0.1 nm":  "0(0) m",
		"10*x":                         "50.0(20)",
		"x+x+x+x+x+x+x+x+x+x":          "50.0(20)",
		"5.0(2) - 5.0(2)":              "0.00(28)", // two literals are two errors
		"if(x > 1, x - x, 7)":          "0(0)",
		"max(x, y) - x":                "0(0)",
		"floor(x + 0.5) + y":           "6.00(10)",
		"1e9*(x - x) + y":              "1.00(10)",
		"mean(x, x2)":                  "5.00(14)",
		"mean(x, x)":                   "5.00(20)",
	} {
		r := spoken(t, s, statement)
		if got := printed(r); got != want {
			t.Errorf("%s prints %s, want %s", statement, got, want)
		}
	}
	// A formula that is defined, and a function of the session.
	spoken(t, s, "d = x - x2", "f(p, q) = p/q - p/q + p")
	prints(t, s, "d + x2", "5.00(20)")
	prints(t, s, "d - d", "0(0)")
	prints(t, s, "f(x, y)", "5.00(20)")
	// An input that changes is still one error.
	spoken(t, s, "x = 6.0(3)")
	prints(t, s, "d + x2", "6.00(30)")
	spoken(t, s, "x = 6")
	prints(t, s, "d + x2", "6(0)")
	prints(t, s, "x", "6")
}

// Five correlated readings of gum.json, the limits of correlation, and matrices
// that no quantities have.
func TestCorrelations(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "a = 3(1)", "b = 4(1)", "c = 1(1)", "d = 2(1)", "n = -(3 ± 1)")
	spoken(t, s, "correlation a, b = -1")
	prints(t, s, "a + b", "7(0)")
	spoken(t, s, "correlation b, a = 1")
	prints(t, s, "a + b", "7.0(20)")
	prints(t, s, "b - a", "1(0)")
	prints(t, s, "a - b", "-1(0)")
	refused(t, s, "correlation a, b = 1.5", "a correlation coefficient is a number from -1 to 1", "write correlation a, b = 0.8")
	refused(t, s, "correlation a, b = 1 W", "a correlation coefficient is a number from -1 to 1", "write correlation a, b = 0.8")
	prints(t, s, "b - a", "1(0)")

	spoken(t, s, "correlation a, b = -0.7", "correlation a, c = -0.7")
	before := printed(spoken(t, s, "a + b + c"))
	refused(t, s, "correlation b, c = -0.7", "this does not go with the other correlations of b and c: together they leave a variance below zero",
		"the coefficients of all pairs must allow one another; nothing has changed")
	prints(t, s, "a + b + c", before)

	spoken(t, s, "correlation a, b = 0", "correlation a, c = 0")
	for _, pair := range []string{"a, b", "a, c", "a, d", "b, c", "b, d", "c, d"} {
		spoken(t, s, "correlation "+pair+" = 0.5")
	}
	near.Rel(t, "u of the mean of four", valued(t, s, "mean(a, b, c, d)").U, math.Sqrt((1+3*0.5)/4), 1e-9)

	// A name that is minus an input is correlated as the name says.
	spoken(t, s, "correlation n, a = 0", "correlation n, d = 0")
	s = NewSession(Config{})
	spoken(t, s, "a = 3(1)", "n = -(3 ± 1)", "correlation n, a = 1")
	prints(t, s, "n - a", "-6(0)")
	prints(t, s, "n + a", "0.0(20)")
	b := resultOf[*Budget](t, s, "budget n + 2*a")
	for _, r := range b.Rows {
		if r.Input == "n" && (r.X != -3 || math.Abs(r.C-1) > 1e-9) {
			t.Errorf("the row of n has x %v and c %v", r.X, r.C)
		}
	}

	// An input that loses its uncertainty goes with nothing; one that is forgotten
	// and made again is another.
	spoken(t, s, "n = -3")
	prints(t, s, "n + a", "0.0(10)")
	spoken(t, s, "n = 3(0)")
	prints(t, s, "n + a", "6.0(10)")
	spoken(t, s, "n = 3(1)")
	prints(t, s, "n + a", "6.0(20)")
	spoken(t, s, "forget n", "n = 3(1)")
	prints(t, s, "n + a", "6.0(14)")

	// To first order shapes do not count; drawn together are normal ones alone.
	spoken(t, s, "r = rectangular(0, 1)", "correlation r, a = 0.5", "m = 1 ± 1 (nu=5)", "correlation m, n = 0.5", "q = r + a")
	near.Rel(t, "u of r + a", valued(t, s, "q").U, math.Sqrt(1+1.0/12+2*0.5*math.Sqrt(1.0/12)), 1e-9)
	refused(t, s, "propagate q", "r and a are correlated and not both normal: no distribution of the two together is known", "budget takes the correlation to first order")
	refused(t, s, "propagate m + n", "m and n are correlated and differ in their degrees of freedom: no distribution of the two together is known", "give both the same nu, or see budget")
}

// Check 26: eleven mirrors of 0.70 ± 0.005 are known to 7.9 % when the error is
// shared and to 2.4 % when each has its own (JCGM 100).
func TestElevenMirrors(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "R = 0.700(5)", "chain shared\n at IF\n mirrors x11: R\n at WAFER\nend", "chain own\n at IF\n mirrors x11 independent: 0.700(5)\n at WAFER\nend",
		"chain literal\n at IF\n mirrors x11: 0.700(5)\n at WAFER\nend")
	for what, want := range map[string]float64{"R^11": 7.857, "transmission(shared, IF, WAFER)": 7.857, "transmission(literal, IF, WAFER)": 7.857, "transmission(own, IF, WAFER)": 2.369} {
		v := valued(t, s, what)
		near.Abs(t, what, 100*v.U/v.SI, want, 0.002)
		near.Rel(t, what, v.SI, math.Pow(0.7, 11), 1e-13)
	}
	if b := resultOf[*Budget](t, s, "budget transmission(own, IF, WAFER)"); len(b.Rows) != 11 {
		t.Errorf("independent crossings have %d rows", len(b.Rows))
	}
	if b := resultOf[*Budget](t, s, "budget transmission(literal, IF, WAFER)"); len(b.Rows) != 1 || b.Rows[0].Input != "literal" {
		t.Errorf("one shared error has the rows %v", b.Rows)
	}
	// A named input in two chains is one error: their ratio does not scatter.
	spoken(t, s, "chain twin\n at IF\n mirrors x11: R\n at WAFER\nend")
	prints(t, s, "transmission(twin, IF, WAFER) / transmission(shared, IF, WAFER)", "1(0)")
}

// The columns of JCGM 100, table H.1, with units, the largest share first.
func TestBudgetTable(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "P [W] = 250 W ± 2 % (k=2, nu=8) at IF", "t = 10 s ± 1 %", "E [J] = P * t")
	prints(t, s, "E", "2500(35) J at IF")
	prints(t, s, "budget E [kJ]", `
2.500(35) kJ at IF
input  x    u(x)     unit  c         unit of c  |c| u(x) / kJ  share of u²
P      250  2.5000   W     0.010000  kJ/W       0.025000       0.50000
t      10   0.10000  s     0.25000   kJ/s       0.025000       0.50000
expanded: (2.500 ± 0.072) kJ (k=2.04), 95 % with 32 effective degrees of freedom`)
	prints(t, s, "budget E / E", `
1(0)
input  x    u(x)     unit  c  unit of c  |c| u(x)  share of u²
P      250  2.5000   W     0  W⁻¹        0         0
t      10   0.10000  s     0  s⁻¹        0         0
the inputs leave no uncertainty`)
	prints(t, s, "budget 3 W", "3 W\nno uncertain input takes part")
	prints(t, s, "budget 3.0(1) W + 2.0(2) W", `
5.00(22) W
input     x  u(x)     unit  c  unit of c  |c| u(x) / W  share of u²
2.0(2) W  2  0.20000  W     1  1          0.20000       0.80000
3.0(1) W  3  0.10000  W     1  1          0.10000       0.20000
expanded: (5.00 ± 0.44) W (k=1.96), 95 % with infinitely many effective degrees of freedom`)
	spoken(t, s, "T = 22 degC ± 0.5 K", "two = 1.0(1) + 2.0(1)")
	prints(t, s, "budget T - 20 degC", `
2.00(50) K
input  x   u(x)     unit  c  unit of c  |c| u(x) / K  share of u²
T      22  0.50000  °C    1  1          0.50000       1
expanded: (2.00 ± 0.98) K (k=1.96), 95 % with infinitely many effective degrees of freedom`)
	spoken(t, s, "many = 1 ± 0.1 (nu=1e9)", "wide = 1 ± 10")
	near.Abs(t, "k of very many degrees of freedom", resultOf[*Budget](t, s, "budget many + wide").K, 1.95996, 1e-5) // of a normal distribution, any table
	if b := resultOf[*Budget](t, s, "budget two"); b.Rows[0].Input != "two: 1.0(1)" || b.Rows[1].Input != "two: 2.0(1)" {
		t.Errorf("the literals of one name are told apart as %q and %q", b.Rows[0].Input, b.Rows[1].Input)
	}
}

// A printed uncertain value reads back as the same value and uncertainty, to the
// two digits of it that are printed.
func TestPrintedUncertainReadsBack(t *testing.T) {
	random := rand.New(rand.NewPCG(11, 12))
	s := NewSession(Config{})
	for range 20000 {
		v := (random.Float64() - 0.5) * math.Pow(10, float64(random.IntN(40)-20))
		u := math.Abs(v) * random.Float64() * math.Pow(10, float64(random.IntN(16)-12))
		if random.IntN(30) == 0 {
			v, u = 0, math.Abs(v)
		}
		if u == 0 {
			continue
		}
		text := units.FormatUncertain(v, u, 5)
		value, spread, ok := units.SplitConcise(text)
		if !ok {
			t.Fatalf("%v ± %v prints %s, which is no concise form", v, u, text)
		}
		x, y := parsed(t, strings.TrimPrefix(value, "+")), parsed(t, trimZeros(spread))
		near.Rel(t, text+": u", y, u, 0.0501)
		near.Abs(t, text+": value", x, v, 0.0501*u+4e-16*math.Abs(v))
		if v < 0 {
			continue // a minus is an operator before the literal
		}
		read := valued(t, s, text)
		near.Rel(t, text+" read: u", read.U, y, 1e-11) // a slope at 6e-5 of the value costs four digits
		near.Abs(t, text+" read: value", read.SI, x, 1e-12*u+4e-16*math.Abs(v))
		if again := units.FormatUncertain(read.SI, read.U, 5); again != text && x != 0 {
			t.Errorf("%s reads back as %s", text, again)
		}
	}
}

// trimZeros makes 00.02 a number for JSON.
func trimZeros(text string) string {
	for len(text) > 1 && text[0] == '0' && text[1] != '.' && text[1] != 'e' {
		text = text[1:]
	}
	return text
}

// The expanded form reads back too.
func TestPrintedExpandedReadsBack(t *testing.T) {
	random := rand.New(rand.NewPCG(13, 14))
	s := NewSession(Config{})
	for range 5000 {
		v := random.Float64() * math.Pow(10, float64(random.IntN(24)-12))
		u := v * math.Pow(10, -6*random.Float64())
		if random.IntN(4) == 0 {
			u = v * (1 + 50*random.Float64())
		}
		text := units.FormatExpanded(v, u) + " (k=2)"
		read := valued(t, s, text)
		near.Rel(t, text+": u", 2*read.U, u, 0.0501)
		near.Abs(t, text+": value", read.SI, v, 0.0501*u)
	}
}

// Answers in every unit that the trade uses read back.
func TestPrintedAnswersReadBack(t *testing.T) {
	s := NewSession(Config{})
	for _, statement := range []string{
		"30 mJ/cm^2 ± 2 % at WAFER", "13.5 nm ± 0.1 nm", "91.84(12) eV", "22 degC ± 0.5 K", "(66.0 ± 0.5) %", "157(3) wafer/h", "250.0(5) W at IF",
		"0.11 %/Gpulse ± 10 %", "5.0(1) /um", "1.6(2)e-27 kg", "50.0(1) kpulse/s", "0.7894(12) % at WAFER/IF", "5.0(1) ppb/K",
	} {
		v := valued(t, s, statement)
		again := valued(t, s, v.Text(DefaultDigits))
		near.Rel(t, statement, again.SI, v.SI, 0.05*v.U/v.SI+1e-12)
		near.Rel(t, "u of "+statement, again.U, v.U, 0.0501)
		if again.Plane != v.Plane || again.Unit.Dimension() != v.Unit.Dimension() || again.Text(5) != v.Text(5) {
			t.Errorf("%s prints %s and reads back as %s", statement, v.Text(5), again.Text(5))
		}
	}
}
