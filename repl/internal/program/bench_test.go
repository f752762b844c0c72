package program

import (
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl/internal/syntax"
)

// formula is an estimate of throughput: eight variables, a tenth power and a
// quotient of sums.
const formula = "p*t1*t2*r^10*a/(d*s+b)"

// inputs of the formula: power, two transmissions, reflectivity, area, dose,
// settling per dose, offset.
var formulaNames = []string{"p", "t1", "t2", "r", "a", "d", "s", "b"}

func formulaValues() []float64 {
	return []float64{250, 0.9, 0.85, 0.65, 0.0707, 340, 1.3, 20}
}

// byHand is the formula as a programmer would write it.
//
//go:noinline
func byHand(p, t1, t2, r, a, d, s, b float64) float64 {
	r2 := r * r
	r4 := r2 * r2
	return p * t1 * t2 * (r4 * r4 * r2) * a / (d*s + b)
}

// compiled compiles the formula over open inputs.
func compiled(t testing.TB) *Program {
	t.Helper()
	d := newDesk()
	for _, name := range formulaNames {
		if _, err := d.say(name + " = 1"); err != nil {
			t.Fatal(err)
		}
	}
	n := checked(t, d, formula)
	p, err := Compile(n, d.resolve, formulaNames...)
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func checked(t testing.TB, d *desk, text string) *Node {
	t.Helper()
	st, bad := syntax.Parse(text)
	if bad != nil {
		t.Fatal(bad)
	}
	n, err := (&Checker{Scope: d, Source: text}).Check(st.Do.(*syntax.Show).X)
	if err != nil {
		t.Fatal(err)
	}
	return n
}

func TestFormulaByHand(t *testing.T) {
	p, v := compiled(t), formulaValues()
	got, err := p.Run(p.NewFrame(), v...)
	if err != nil {
		t.Fatal(err)
	}
	near.Rel(t, formula, got, byHand(v[0], v[1], v[2], v[3], v[4], v[5], v[6], v[7]), 1e-15)
}

func TestRunAllocatesNothing(t *testing.T) {
	p, v := compiled(t), formulaValues()
	f := p.NewFrame()
	if n := testing.AllocsPerRun(1000, func() {
		if _, err := p.Run(f, v...); err != nil {
			t.Fatal(err)
		}
	}); n != 0 {
		t.Errorf("a run of %s allocates %v times", formula, n)
	}
}

func BenchmarkRun(b *testing.B) {
	p, v := compiled(b), formulaValues()
	f := p.NewFrame()
	b.ReportAllocs()
	for b.Loop() {
		if _, err := p.Run(f, v...); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkByHand(b *testing.B) {
	v := formulaValues()
	sum := 0.0
	for b.Loop() {
		sum += byHand(v[0], v[1], v[2], v[3], v[4], v[5], v[6], v[7])
	}
	if !(sum > 0) {
		b.Fatal(sum)
	}
}

func BenchmarkCheckAndCompile(b *testing.B) {
	d := newDesk()
	for _, name := range formulaNames {
		if _, err := d.say(name + " = 1"); err != nil {
			b.Fatal(err)
		}
	}
	st, bad := syntax.Parse(formula)
	if bad != nil {
		b.Fatal(bad)
	}
	x := st.Do.(*syntax.Show).X
	b.ReportAllocs()
	for b.Loop() {
		n, err := (&Checker{Scope: d, Source: formula}).Check(x)
		if err != nil {
			b.Fatal(err)
		}
		if _, err := Compile(n, d.resolve, formulaNames...); err != nil {
			b.Fatal(err)
		}
	}
}
