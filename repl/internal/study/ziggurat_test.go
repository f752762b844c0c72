package study

import (
	"math"
	"slices"
	"testing"

	"example.com/dosewright/internal/near"
)

// The first numbers of xoshiro256++ from the state 1, 2, 3, 4; from memory, the
// first two also by hand.
func TestGenerator(t *testing.T) {
	g := generator{1, 2, 3, 4}
	for i, want := range []uint64{41943041, 58720359, 3588806011781223, 3591011842654386, 9228616714210784205} {
		if got := g.Uint64(); got != want {
			t.Errorf("number %d is %d, want %d", i, got, want)
		}
	}
}

// The layers have one area each and close at the top of the density.
func TestZigguratLayers(t *testing.T) {
	z := newZiggurat()
	area := z.edge[0] * z.height[1]
	for i := 1; i < layers; i++ {
		near.Rel(t, "area of a layer", z.edge[i]*(z.height[i+1]-z.height[i]), area, 1e-12)
	}
	if z.edge[layers] != 0 || z.height[layers] != 1 {
		t.Errorf("the top is at %v, %v", z.edge[layers], z.height[layers])
	}
	if covered := math.Sqrt(math.Pi/2) / (layers * area); covered < 0.99 || covered >= 1 {
		t.Errorf("the density fills %v of the layers", covered)
	}
}

// Twenty million deviates against the normal distribution: moments, the largest
// distance of the distribution functions, and the counts beyond each edge and in
// the tail, all within five standard deviations.
func TestNormals(t *testing.T) {
	const n = 20_000_000
	s := newStream()
	s.begin(3, 4)
	row := make([]float64, n)
	s.normals(row)
	m := momentsOf(row)
	near.Abs(t, "mean", m.mean, 0, 5/math.Sqrt(n))
	near.Abs(t, "standard deviation", m.sd(), 1, 5/math.Sqrt(2*n))
	near.Abs(t, "skewness", m.skewness(), 0, 5*math.Sqrt(6.0/n))
	fourth := 0.0
	for _, x := range row {
		fourth += x * x * x * x
	}
	near.Abs(t, "fourth moment", fourth/n, 3, 5*math.Sqrt(96.0/n))
	slices.Sort(row)
	below := func(x float64) float64 { return math.Erfc(-x/math.Sqrt2) / 2 }
	worst := 0.0
	for i, x := range row {
		worst = math.Max(worst, math.Abs(below(x)-(float64(i)+0.5)/n))
	}
	if worst > 1.95/math.Sqrt(n) { // Kolmogorov's distribution, 0.1 %
		t.Errorf("the distribution functions are %v apart", worst)
	}
	for _, x := range append(newZiggurat().edge[1:layers:layers], 4, 4.5, 5) {
		for _, side := range []float64{1, -1} {
			p := below(-x)
			at, _ := slices.BinarySearch(row, side*x)
			count := float64(n - at)
			if side < 0 {
				count = float64(at)
			}
			if math.Abs(count-p*n) > 5*math.Sqrt(p*n) {
				t.Errorf("%v deviates beyond %v, want %v", count, side*x, p*n)
			}
		}
	}
}

// Streams of neighbouring chunks and seeds have nothing in common.
func TestStreamsDiffer(t *testing.T) {
	a, b := newStream(), newStream()
	for _, pair := range [][4]uint64{{0, 0, 0, 1}, {0, 0, 1, 0}, {1, 2, 2, 1}, {7, 1 << 40, 7, 1<<40 + 1}} {
		a.begin(pair[0], pair[1])
		b.begin(pair[2], pair[3])
		x, y := make([]float64, 10_000), make([]float64, 10_000)
		a.normals(x)
		b.normals(y)
		sum := 0.0
		for i := range x {
			sum += x[i] * y[i]
		}
		near.Abs(t, "correlation of two streams", sum/10_000, 0, 0.05)
	}
}

// Rounding of parts that cancel is no uncertainty, and what is left of the
// curvature is none either; a jump at the estimate is not taken for rounding.
func TestNoise(t *testing.T) {
	ctx := t.Context()
	for what, c := range map[string]struct {
		f      func(x []float64) float64
		inputs []Input
		u      float64
		second bool
	}{
		"a common factor":       {func(x []float64) float64 { return x[0] * 2 / (x[0] * 3) }, []Input{{Value: 1, U: 0.05}}, 0, false},
		"units":                 {func(x []float64) float64 { return x[0]/1e-10 - 10*(x[0]/1e-9) }, []Input{{Value: 13.5e-9, U: 2e-11}}, 0, false},
		"large terms":           {func(x []float64) float64 { return (2*x[0] + 1e6) - (3*x[0] + 1e6) + x[0] }, []Input{{Value: 1, U: 0.05}}, 0, false},
		"small beside large":    {func(x []float64) float64 { return x[0] + x[1] }, []Input{{Value: 1e6, U: 1}, {Value: 1e-6, U: 1e-7}}, math.Hypot(1, 1e-7), false},
		"nine digits":           {func(x []float64) float64 { return 2 * x[0] }, []Input{{Value: 1, U: 1e-9}}, 2e-9, false},
		"a square at zero":      {func(x []float64) float64 { return x[0] * x[0] }, []Input{{U: 0.005}}, 0, true},
		"a corner":              {func(x []float64) float64 { return math.Abs(x[0]) + x[1] }, []Input{{U: 1}, {Value: 3, U: 0.5}}, 0.5, true},
		"a jump beside a slope": {func(x []float64) float64 { return math.Floor(x[0]) + x[1] }, []Input{{Value: 3, U: 1e-3}, {U: 40}}, math.Hypot(40, 7.0/6), true},
	} {
		b, err := FirstOrder(ctx, eval(c.f), sources(t, c.inputs))
		if err != nil {
			t.Fatal(err)
		}
		if c.u == 0 && b.U != 0 || c.u > 0 && !near.Within(b.U, c.u, 1e-3) || b.Second.Matters != c.second {
			t.Errorf("%s: u is %v, want %v; the second order matters: %v", what, b.U, c.u, b.Second.Matters)
		}
	}
}

// With very many degrees of freedom the t-distribution is the normal one.
func TestCoverageOfManyDegrees(t *testing.T) {
	for _, p := range []float64{0.5, 0.95, 0.9973} {
		normal, err := CoverageFactor(p, 0)
		if err != nil {
			t.Fatal(err)
		}
		before := 0.0
		for _, dof := range []float64{1e18, 1e15, 1e12, 1e9, 1.001e6, 0.999e6, 1e5, 1e4} { // k grows as they fall
			k, err := CoverageFactor(p, dof)
			if err != nil {
				t.Fatal(err)
			}
			near.Rel(t, "k against its expansion", k, normal+(normal*normal*normal+normal)/(4*dof), 1e-7)
			if k < before {
				t.Errorf("k of %v degrees of freedom is %v, below %v for more of them", dof, k, before)
			}
			before = k
		}
	}
}
