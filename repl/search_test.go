package repl

import (
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

func TestSolve(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, line3...)
	for statement, want := range map[string]string{
		"solve x^2 = 4 for x in -5 .. 5": `
x   x^2  wanted
-2  4    4
2   4    4`,
		// at an end of the range
		"solve x^2 = 25 for x in 0 .. 5": `
x  x^2  wanted
5  25   25`,
		// a tangent
		"solve (x - 1)^2 = 0 for x in -4 .. 5": `
x  (x - 1)^2  wanted
1  0          0
at 1 the sides touch and do not cross`,
		// a jump and a pole are no roots
		"solve if(x < 1, 0, 2) = 1 for x in 0 .. 3": `
no x from 0 to 3 solves it
at 0: 0 against 1
at 3: 2 against 1
nearest at 0: 0 against 1
at 1 the sides change places without meeting: a jump or a pole, no root`,
		"solve 1/x = 0 for x in -1 .. 1": `
no x from -1 to 1 solves it
at -1: -1 against 0
at 1: 1 against 0
nearest at -1: -1 against 0
at 0 the sides change places without meeting: a jump or a pole, no root`,
		"solve x^2 = -1 for x in 1 .. 3": `
no x from 1 to 3 solves it
at 1: 1 against -1
at 3: 9 against -1
nearest at 1: 1 against -1`,
		"solve max(x, 1) = 1 for x in 0 .. 3": `
x  max(x, 1)  wanted
0  1          1
every x from 0 to 1 solves it`,
		"solve sqrt(x) = 2 for x in -5 .. 5": `
x  sqrt(x)  wanted
4  2        2
parts of the range have no value: sqrt has no finite value at -5: the result is not a finite number`,
		// units and planes: the name keeps its own, the sides theirs
		"solve P_wafer = 1.6 W for P in 100 W .. 400 W": `
P / W  P_wafer / W  wanted / W
200    1.6000       1.6000`,
	} {
		prints(t, s, statement, want)
	}
	prints(t, s, "solve P_wafer = T_line * 200 W at IF for P in 100 W .. 400 W", "P / W  P_wafer / W  T_line * 200 W at IF / W\n200    1.6000       1.6000")
	prints(t, s, "P", "250 W at IF")
	// Every root that is found solves.
	found := resultOf[*Found](t, s, "solve sin(x) = 0.3 for x in 0 .. 20")
	if len(found.Rows) != 7 {
		t.Errorf("%d roots", len(found.Rows))
	}
	for _, row := range numbersOf(found.Rows) {
		near.Abs(t, "sin at the root", math.Sin(row[0]), 0.3, 1e-12)
	}
	// The dose that holds a throughput, and back.
	d := numbersOf(resultOf[*Found](t, s, "solve wph = 120 wafer/h for dose in 1 mJ/cm^2 .. 300 mJ/cm^2").Rows)[0][0]
	spoken(t, s, "dose = "+literalOf(&Value{SI: d * 10}, valued(t, s, "dose").Unit)+" at WAFER")
	near.Rel(t, "throughput at the dose found", valued(t, s, "wph").Number(), 120, 1e-10)

	for _, c := range [][3]string{
		{"solve x * 1 nm = 1 s for x in 0 .. 3", "length (m) and time (s) do not compare: they differ by time/length", "length * time / length is a time"},
		{"solve P_wafer = 1 W at IF for P in 1 W .. 2 W", "power (W) at WAFER and power (W) at IF do not compare: they stand at different planes", "carry(1 W at IF, CHAIN, WAFER) takes the second to the plane of the first"},
		{"solve x = 1 for x in 2 .. 2", "the two ends of this range are one place", "write two ends that differ, as in 1 nm .. 2 nm"},
		{"solve P_wafer = 1 W for P in 1 nm .. 2 nm", "P is power (W) at IF; this range is length (m)", "give the range the dimension and plane of P, or use a new name"},
		{"solve ln(-x) = 1 for x in 1 .. 2", "the result is not a finite number", "look at the range of each input, and at roots and logarithms of what is negative"},
		{"solve {1, 2} = 1 for x in 1 .. 2", "this has no single value", "take one of it, such as mean(…)"},
		{"maximise {1, 2} for x in 1 .. 2", "this has no single value", "take one of it, such as mean(…)"},
		{"maximise x for x in 1 nm .. 2 s", "length (m) and time (s) do not compare: they differ by time/length", "length * time / length is a time"},
		{"minimise 1/(x - x) for x in 1 .. 2", "division by zero", "the divisor must differ from zero: see its value with why"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
}

func TestOptima(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, line3...)
	for statement, want := range map[string]string{
		"maximise x*(3-x) for x in 0 .. 3": `
x       x*(3-x)  where
1.5000  2.2500   inside`,
		"minimise x*(3-x) for x in 0 .. 3": `
x  x*(3-x)  where
0  0        at the lower end of the range
3  0        at the upper end of the range`,
		"maximise x for x in 3 nm .. 1 nm": `
x / nm  x / nm  where
3       3       at the upper end of the range`,
		"maximise 1 for x in 0 .. 3": `
x  1  where
0  1  at the lower end of the range
the same from 0 to 3`,
		"maximise sqrt(2 - x) for x in 0 .. 3": `
x  sqrt(2 - x)  where
0  1.4142       at the lower end of the range
parts of the range have no value: sqrt has no finite value at -0.0020040: the result is not a finite number`,
	} {
		prints(t, s, statement, want)
	}
	best := resultOf[*Found](t, s, "maximise wph for dose in 20 mJ/cm^2 .. 40 mJ/cm^2")
	if row := best.Rows[0]; row[0].Number != 20 || row[2].Text != "at the lower end of the range" || best.Columns[0].Unit != "mJ/cm²" {
		t.Errorf("the best dose is %v in %v", row, best.Columns)
	}
	prints(t, s, "dose", "30 mJ/cm² at WAFER")
}
