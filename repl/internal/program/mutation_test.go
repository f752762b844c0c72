package program

import (
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl/internal/syntax"
)

// The checks of this file were found missing by small changes of the code that
// no other test of the package noticed; docs/mutations.md lists them.

// checkedIn checks an expression in a scope.
func checkedIn(t testing.TB, scope Scope, text string) *Node {
	t.Helper()
	st, bad := syntax.Parse(text)
	if bad != nil {
		t.Fatal(bad)
	}
	n, err := (&Checker{Scope: scope, Source: text}).Check(st.Do.(*syntax.Show).X)
	if err != nil {
		t.Fatal(err)
	}
	return n
}

func TestWhatStandsAndWhatRoots(t *testing.T) {
	holds(t, newDesk(), `
# photons per area stand at a plane, as dose does
1e18 photon/m^2 at WAFER => 1.00000e18 m⁻² at WAFER
# the cube root of a negative number is real, and so are its powers
(-8)^(1/3) => -2
(-8)^(-1/3) => -0.500000
(-8)^(2/3) => 4
(-8)^(-2/3) => 0.250000
# a ratio stands between the planes beside it, not the last ones
chain steps
  at IF
  optics: 0.5 at MASK/IF
  at MASK
  rest: 0.4 at WAFER/MASK
  at WAFER
end
transmission(steps, IF, WAFER) => 0.200000 at WAFER/IF
`)
}

// Elements with errors of their own multiply as often as light crosses them,
// each with a source of error.
func TestIndependentCrossings(t *testing.T) {
	d := newDesk()
	holds(t, d, `
chain apart
  at IF
  mirror x3 independent: (50 ± 1) %
  at WAFER
end
transmission(apart, IF, WAFER) => 0.125000 at WAFER/IF
`)
	p, err := CompileAll([]*Node{checked(t, d, "transmission(apart, IF, WAFER)")}, d.resolve, Opening{Sources: true})
	if err != nil {
		t.Fatal(err)
	}
	if len(p.Sources) != 3 {
		t.Fatalf("%d sources", len(p.Sources))
	}
	got, err := p.Run(p.NewFrame(), 0.5, 0.6, 0.7)
	if err != nil {
		t.Fatal(err)
	}
	near.Rel(t, "three crossings", got, 0.5*0.6*0.7, 1e-15)
}

// A product of many factors takes them all, in lanes as in single runs.
func TestLongProductsInLanes(t *testing.T) {
	for _, text := range []string{
		"a*b*c*d", "a*b*c*d*a", "a*b*c*d*a*b", "a*b*c*d*a*b*c", "a*b*c*d*a*b*c*d", "a*b + c", "d + a*b", "a*b*c + d", "a*b + c*d",
	} {
		d := newDesk()
		holds(t, d, "a = 1\nb = 1\nc = 1\nd = 1")
		p, err := Compile(checked(t, d, text), d.resolve, "a", "b", "c", "d")
		if err != nil {
			t.Fatal(err)
		}
		in, out := [][]float64{{2, 3}, {5, 7}, {11, 13}, {17, 19}}, [][]float64{{0, 0}}
		if n, err := p.Block()(in, out); n != 2 || err != nil {
			t.Fatalf("%s: %d lanes, %v", text, n, err)
		}
		f := p.NewFrame()
		for lane, got := range out[0] {
			want, err := p.Run(f, in[0][lane], in[1][lane], in[2][lane], in[3][lane])
			if err != nil {
				t.Fatal(err)
			}
			near.Rel(t, text, got, want, 1e-15)
		}
	}
	a, err := newDesk().say("2*3*5*7*11*13*17*19")
	if err != nil {
		t.Fatal(err)
	}
	near.Rel(t, "the first eight primes", a.value, 9699690, 0)
}

// JCGM 100:2008, 4.3.7 and 4.3.9: the standard uncertainty between two limits
// is half of the width over √3, of a triangle half of the width over √6.
func TestUncertaintyBetweenLimits(t *testing.T) {
	d := newDesk()
	for name, shape := range map[string]Shape{"rectangular": Rectangular, "triangular": Triangular} {
		d.add(Function{
			Name: name, Params: []Param{{Name: "low", Any: true}, {Name: "high", Any: true}},
			Build: func(c *Checker, k *Call) (*Node, error) { return c.Distribution(shape, k) },
		})
	}
	for text, want := range map[string]float64{
		"rectangular(2 nm, 6 nm)": 2e-9 / math.Sqrt(3),
		"triangular(2 nm, 6 nm)":  2e-9 / math.Sqrt(6),
	} {
		n := checked(t, d, text)
		near.Rel(t, text, n.Value(), 4e-9, 1e-15)
		near.Rel(t, text+": uncertainty", n.Spread().U, want, 1e-15)
	}
}
