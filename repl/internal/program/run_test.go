package program

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl/internal/syntax"
)

func TestRunRefusals(t *testing.T) {
	holds(t, newDesk(), `
# division by zero
1/0 ! at 1/0: division by zero
1 m / (2 s - 2 s) ! at 1 m / (2 s - 2 s): division by zero
0^-1 ! at 0^-1: division by zero
0^-65 ! at 0^-65: division by zero
0^(-1/2) ! at 0^(-1/2): division by zero
x = 0
x^x => 1
0^(x-1) ! at 0^(x-1): division by zero
0^0 => 1
5 + 2*(1/(x*3)) ! at 1/(x*3): division by zero
# what leaves the range, wherever it hides
1e300*1e300 ! at 1e300*1e300: the result leaves the range of floating point, about 1e308: the result is not a finite number
1e300^2 ! at 1e300^2: the result leaves the range of floating point, about 1e308: the result is not a finite number
1/(1e300*1e300) ! at 1/(1e300*1e300): the result is not a finite number
(1e300*1e300)^-1 ! at (1e300*1e300)^-1: the result is not a finite number
(1e300*1e300)^-65 ! at (1e300*1e300)^-65: the result is not a finite number
(1e300*1e300)^(-1/2) ! at (1e300*1e300)^(-1/2): the result is not a finite number
(1e300*1e300)^0 ! at (1e300*1e300)^0: the result is not a finite number
2^(-1e300*1e300) ! at 2^(-1e300*1e300): the result is not a finite number
0*(1e300*1e300) ! at 0*(1e300*1e300): the result leaves the range of floating point, about 1e308: the result is not a finite number
1e300*1e300 - 1e300*1e300 ! at 1e300*1e300 - 1e300*1e300: the result leaves the range of floating point, about 1e308: the result is not a finite number
if(1e300*1e300 > 1, 1, 2) ! at 1e300*1e300 > 1: the result is not a finite number
if(1 < 1e300*1e300, 1, 2) ! at 1 < 1e300*1e300: the result is not a finite number
max(1, 1e300*1e300) ! at max(1, 1e300*1e300): the result is not a finite number
max({1, -1e300*1e300}) ! at max({1, -1e300*1e300}): the result is not a finite number
ln(0) ! at ln(0): the result is not a finite number
ln(-1) ! at ln(-1): the result is not a finite number
(-4)^0.5 ! at (-4)^0.5: the result is not a finite number
(-4)^(1/6) ! at (-4)^(1/6): the result is not a finite number
(-4)^pi ! at (-4)^pi: the result is not a finite number
(0*1e300)^0 => 1
capped(1e300*1e300) ! at capped(1e300*1e300): the result is not a finite number
# what is in the range is no overflow
if(1.7e308 > -1.7e308, 1, 2) => 1
1e200^-1 => 1.00000e-200
1e-160^-2 ! at 1e-160^-2: the result leaves the range of floating point, about 1e308: the result is not a finite number
1e160^-2 => 9.99989e-321
1e300^-2 => 0
1e-300^2 => 0
1e300^1 => 1.00000e300
(1e-300*1e-300)^0 => 1
`)
}

// What stands in a branch that is not taken is not computed.
func TestBranches(t *testing.T) {
	d := newDesk()
	holds(t, d, `
x = 0
if(x > 0, 1/x, 7) => 7
if(x >= 0, 7, 1/x) => 7
if(x < 0, 1, if(x <= 0, 2, 3)) => 2
if(x > 0, 1/x, 0) + if(x < 0, 1/x, 0) => 0
f(a) = if(a > 0, 1/a, 0)
f(x) => 0
f(2) => 0.500000
pick(c) = if(c, 1, 2) + if(c, 10, 20)
pick(x < 1) => 11
pick(x > 1) => 22
if(x, 1, 2) ! x: the first argument of if is a condition; write if(a < b, x, y)
if(x > 0, 1) ! if(x > 0, 1): if takes a condition and two values; write if(a < b, x, y)
if(x > 0, a = 1, 2) ! if(x > 0, a = 1, 2): if takes a condition and two values; write if(a < b, x, y)
if(1 < 2, "a", 2) ! "a": a text is no value to calculate with; texts name files and labels only
if ! if: if is no name that is known here; define it first: if = …
pick(2) ! pick(2): in pick: the first argument of if is a condition; write if(a < b, x, y)
f(x < 1) ! f(x < 1): in f: a condition is no value to calculate with; if(a < b, x, y) takes one
`)
	d.calls = map[string]int{}
	for _, text := range []string{"if(1 < 2, 3, ln(5))", "if(2 < 1, ln(5), 3)"} {
		if _, err := d.say(text); err != nil {
			t.Fatal(err)
		}
	}
	if d.calls["ln"] != 0 {
		t.Errorf("ln ran %d times in branches that were not taken", d.calls["ln"])
	}
}

// Each line says how often a function runs in one run of a formula.
func TestSharedPartsRunOnce(t *testing.T) {
	for text, want := range map[string]int{
		"ln(2) + ln(2)":                                   2, // written twice
		"twice(ln(2))":                                    1,
		"twice(twice(ln(2)))":                             1,
		"a + a*a":                                         1,
		"b + a":                                           1,
		"if(1 < 2, a, 1)":                                 1,
		"if(1 < 2, a + a, 1)":                             1,
		"if(2 < 1, a + a, 1)":                             0,
		"if(2 < 1, a, 1) + if(2 < 1, a, 1)":               0,
		"if(1 < 2, a, 1) + if(1 < 2, a, 1)":               1,
		"if(1 < 2, a, 1) + a":                             1,
		"at_plane(ln(2) * 1 W)/(1 W at IF)":               1,
		"same(ln(2)) * 2 + 1":                             1,
		"both(ln(2))":                                     1,
		"sum({a, a, b})":                                  1,
		"if(a < b, a, b)":                                 1,
		"unused(ln(2))":                                   0,
		"if(2 < 1, twice(ln(2)), twice(3))":               0,
		"if(1 < 2, twice(ln(2)) + twice(ln(2)), 0)":       2,
		"twice(if(1 < 2, ln(2), ln(3)))":                  1,
		"if(1 < 2, if(1 < 2, a, 0) + a, 0) + if(2<1,a,0)": 1,
	} {
		d := newDesk()
		holds(t, d, `
a = ln(2)
b = 2*a
twice(x) = x + x
same(x) = x
both(x) = same(x) + x + twice(x)
at_plane(P [W at IF]) = P + P
unused(x) = 3
`)
		if _, err := d.say(text); err != nil {
			t.Errorf("%s: %s", text, d.refusal(text, err))
		} else if d.calls["ln"] != want {
			t.Errorf("%s: ln ran %d times, want %d", text, d.calls["ln"], want)
		}
	}
}

// A frame serves any number of runs; what was computed on demand in one run is
// computed anew in the next.
func TestFrameRunsAgain(t *testing.T) {
	d := newDesk()
	holds(t, d, "x = 1\nsquare(y) = y*y")
	n := checked(t, d, "if(x > 0, square(1 + x), 0) - if(x > 0, 1/x, 1)")
	p, err := Compile(n, d.resolve, "x")
	if err != nil {
		t.Fatal(err)
	}
	f := p.NewFrame()
	for _, x := range []float64{1, 2, -1, 0, 3} {
		want := -1.0
		if x > 0 {
			want = (1+x)*(1+x) - 1/x
		}
		got, err := p.Run(f, x)
		if err != nil {
			t.Fatal(err)
		}
		near.Rel(t, fmt.Sprint("x = ", x), got, want, 1e-15)
	}
	if _, err := p.Run(f, math.Inf(1)); err == nil {
		t.Error("an infinite input gave a value")
	}
	if got, err := p.Run(f, 1); err != nil || got != 3 {
		t.Errorf("after a refused run: %v, %v", got, err)
	}
}

// Whole powers are products: the same as repeated multiplication to a few
// units in the last place, and one over it below zero.
func TestWholePowers(t *testing.T) {
	d := newDesk()
	holds(t, d, "x = 1")
	for k := -64; k <= 64; k++ {
		text := fmt.Sprintf("x^%d", k)
		n := checked(t, d, text)
		p, err := Compile(n, d.resolve, "x")
		if err != nil {
			t.Fatal(err)
		}
		for _, x := range []float64{0.65, 1.7, -0.9, 3, 1e-3} {
			want := 1.0
			for range max(k, -k) {
				want *= x
			}
			if k < 0 {
				want = 1 / want
			}
			got, err := p.Run(p.NewFrame(), x)
			if err != nil {
				t.Fatal(text, x, err)
			}
			near.Rel(t, fmt.Sprint(text, " at ", x), got, want, 64*3e-16)
		}
	}
}

func TestTooManyParts(t *testing.T) {
	d := newDesk()
	if _, err := d.say("f0(x) = x"); err != nil {
		t.Fatal(err)
	}
	for i := 1; i <= 39; i++ {
		if _, err := d.say(fmt.Sprintf("f%d(x) = f%d(x) + f%d(x)", i, i-1, i-1)); err != nil {
			t.Fatal(err)
		}
	}
	if a, err := d.say("f10(1)"); err != nil || a.value != 1024 {
		t.Errorf("f10(1): %v, %v", a, err)
	}
	if _, err := d.say("f39(1)"); !errors.Is(err, ErrSize) || !strings.HasPrefix(d.refusal("f39(1)", err), "f39(1): in f") {
		t.Errorf("f39(1): %v", err)
	}
	// One formula within bounds, two too large together.
	var terms strings.Builder
	for range 16_000 {
		terms.WriteString("+y")
	}
	holds(t, d, "y = 1\nz = 0"+terms.String())
	for i := range 14 {
		holds(t, d, fmt.Sprintf("w%d = %s", i, "0"+terms.String()))
	}
	sum := "w0"
	for i := 1; i < 14; i++ {
		sum += fmt.Sprintf("+w%d", i)
	}
	if _, err := d.say(sum); !errors.Is(err, ErrSize) {
		t.Errorf("%s: %v", sum, err)
	}
}

func TestSessionFunctions(t *testing.T) {
	holds(t, newDesk(), `
k = 3
double(x) = 2*x
double(3 m) => 6 m
double(k) => 6
double(x = k) => 6
energy(P [W at IF], t [s]) = P * t
energy(250 W at IF, 2 s) => 500 kg·m²·s⁻² at IF
energy(250 W, 2 s) => 500 kg·m²·s⁻² at IF
energy(t = 2 s, P = 250 W) => 500 kg·m²·s⁻² at IF
energy(250 W at WAFER, 2 s) ! 250 W at WAFER: P of energy stands at IF, and 250 W at WAFER stands at WAFER; carry(250 W at WAFER, CHAIN, IF) takes it there
energy(250 W) ! energy(250 W): energy needs its argument t; energy(P [W at IF], t [s])
energy(250 J, 2 s) ! 250 J: P of energy is power (W), not energy (J): they differ by 1/time; give it in W
energy(250 W, 2 s, 3) ! energy(250 W, 2 s, 3): energy takes 2 arguments; energy(P [W at IF], t [s])
energy(250 W, 2 s, P = 3 W) ! 3 W: energy has its argument P twice; energy(P [W at IF], t [s])
energy(250 W, 2 s, u = 3 W) ! energy(250 W, 2 s, u = 3 W): energy takes 2 arguments; energy(P [W at IF], t [s])
warm(T [degC]) = T + 5 K
warm(20 degC) => 25 °C
warm(293.15 K) => 298.150 K
rise(T [K]) = 2*T
rise(5 K) => 10 K
rise(22 degC) ! 22 degC: T of rise is a temperature difference, not a point; write a difference in K, such as 2 K, or subtract two points
stated(x) [m] = 2*x
stated(3 m) => 6 m
stated(3 s) ! stated(3 s): in stated: time (s) is not stated in m, which is length (m): they differ by length/time; state it in s, or change the formula
long(L [nm at IF]) = L
long(3 nm) ! 3 nm: in long: length (m) does not stand at a plane; declare L [nm]
far(P [W at HERE]) = P
far(3 W) ! 3 W: in far: HERE is no plane that is known here; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
odd(P [mW/]) = P
odd(3 W) ! 3 W: in odd: the unit breaks off here; write the symbol that follows
bad(x) = x + 2 m
bad(3) ! bad(3): in bad: a pure number and length (m) do not add: they differ by length; a pure number stands beside pure numbers only: write its unit behind it, or divide the other side by a reference value
bad(1 m) + 1 s ! bad(1 m) | 1 s: length (m) and time (s) do not add: they differ by time/length; length * time / length is a time
worse(x) = 3 * bad(x)
worse(3 s) ! worse(3 s): in bad: time (s) and length (m) do not add: they differ by length/time; x * length / time is a length
zero(x) = 1 + 5/x
3 + zero(k - 3) ! at zero(k - 3): division by zero
deep(x) = zero(x)
3 + deep(k - 3) ! at deep(k - 3): division by zero
3 + double(1/(k - 3)) ! at 1/(k - 3): division by zero
fact(n) = n * fact(n - 1)
fact(3) ! fact(3): in fact: fact calls itself; a function of the session has no recursion; write the steps as names
ping(n) = pong(n)
pong(n) = ping(n)
ping(3) ! ping(3): in pong: ping calls itself; a function of the session has no recursion; write the steps as names
shade(k) = k + 1
shade(5) => 6
count(30 mJ/cm^2, double(200 nm^2)) => 8155.27
dark(x) = count(x, 400 nm^2, 0 nm)
dark(30 mJ/cm^2) ! at dark(30 mJ/cm^2): wavelength must be greater than 0
none() = 5
none() => 5
none(1) ! none(1): none takes 0 arguments; none()
double ! double: double is a function; it takes its arguments in parentheses; see: help double
texts(x) = x
texts("a") ! texts("a"): in texts: a text is no value to calculate with; texts name files and labels only
items(x) = sum(x)
items({1 m, 2 m}) => 3 m
chain pair
  at IF
  mirror x2: 50 %
  at WAFER
end
through(c) = transmission(c, IF, WAFER)
through(pair) => 0.250000 at WAFER/IF
`)
}

// Session functions may call one another forty deep.
func TestSessionFunctionDepth(t *testing.T) {
	d := newDesk()
	holds(t, d, "g0(x) = 1/x")
	for i := 1; i <= 50; i++ {
		holds(t, d, fmt.Sprintf("g%d(x) = g%d(x)", i, i-1))
	}
	one(t, d, "g39(2) => 0.500000")
	one(t, d, "g39(0) ! at g39(0): division by zero")
	one(t, d, "g50(2) ! g50(2): in g11: session functions call one another deeper than 40; write the steps as names")
}

// A call remembers the names in its arguments, so that a live definition
// follows them.
func TestUses(t *testing.T) {
	d := newDesk()
	holds(t, d, `
a = 1
b = 2
c = 22 degC
f(x) = x + b
g(x) = f(x) * f(a)
`)
	for text, want := range map[string]string{
		"f(a)":               "f a b",
		"g(a) + a":           "g a f b",
		"a + a*b":            "a b",
		"f(f(a))":            "f a b",
		"if(a < b, a, f(1))": "a b f",
		"pi":                 "",
		"{a, b}":             "a b",
	} {
		st, bad := syntax.Parse(text)
		if bad != nil {
			t.Fatal(bad)
		}
		c := &Checker{Scope: d, Source: text}
		if _, err := c.Check(st.Do.(*syntax.Show).X); err != nil {
			t.Fatal(err)
		}
		if got := strings.Join(c.Uses, " "); got != want {
			t.Errorf("%s uses %s, want %s", text, got, want)
		}
	}
	a, err := d.say("f(c*2/(1 K)) + 5 b*0")
	if err == nil || a != nil {
		t.Errorf("a unit b: %v", err)
	}
	holds(t, d, "h(x) = x*c/(1 K)")
	if a, err = d.say("h(c/(1 K))"); err != nil || len(a.c.Warnings) != 2 {
		t.Errorf("warnings of argument and body: %v, %v", a, err)
	}
}

func TestWarnings(t *testing.T) {
	d := newDesk()
	holds(t, d, "m = 3")
	for text, want := range map[string]string{
		"5 m":                         "m is read as the unit here; the name is written with a sign and blanks: 5 * m",
		"5 * m":                       "",
		"capped(5, 2)":                "the limit holds",
		"capped(5, 2) + capped(6, 2)": "the limit holds",
		"2 * 22 degC":                 "a temperature point beside * counts as its value in kelvin",
	} {
		a, err := d.say(text)
		if err != nil {
			t.Fatal(err)
		}
		if got := strings.Join(a.c.Warnings, "|"); got != want {
			t.Errorf("%s: warnings %q, want %q", text, got, want)
		}
	}
}

func TestCauses(t *testing.T) {
	d := newDesk()
	for text, want := range map[string]error{
		"1/0": ErrDivision, "1e300*1e300": ErrNotFinite, "1 W at IF + 1 W at MASK": ErrPlane,
		"1 W at IF at MASK": ErrPlane, "nobody": ErrUnknown, "nobody(1)": ErrUnknown,
	} {
		if _, err := d.say(text); !errors.Is(err, want) {
			t.Errorf("%s: %v is not %v", text, err, want)
		}
	}
}
