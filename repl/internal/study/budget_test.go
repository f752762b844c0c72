package study

import (
	"context"
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

func budget(t *testing.T, f Eval, s *Sources) *Budget {
	t.Helper()
	b, err := FirstOrder(context.Background(), f, s)
	if err != nil {
		t.Fatal(err)
	}
	return b
}

// TestEndGauge is JCGM 100:2008, H.1, from the inputs as they are printed there.
func TestEndGauge(t *testing.T) {
	s := sources(t, []Input{
		{Value: 50000623, U: 25, DoF: 18}, // l_S/nm
		{Value: 215, U: 9.7, DoF: 25.6},   // d/nm
		{Value: 0, U: 5.8e-7, DoF: 50},    // δα·°C
		{Value: -0.1, U: 0.41},            // θ/°C
		{Value: 1.15e-5, U: 1.2e-6},       // α_S·°C
		{Value: 0, U: 0.029, DoF: 2},      // δθ/°C
	})
	b := budget(t, eval(func(x []float64) float64 { return x[0] + x[1] - x[0]*(x[2]*x[3]+x[4]*x[5]) }), s)
	t.Logf("l %.9g, u %.17g, nu %.4g, second order %+v", b.Value, b.U, b.DoF, b.Second)
	check := func(what string, got float64) {
		t.Helper()
		f := gum(t, "GUM-H.1", what)
		near.Abs(t, what, got, f.published[0], f.tolerance)
	}
	check("l / nm", b.Value)
	check("u_c first order / nm", b.U)
	check("u_c first order from the rounded inputs / nm", b.U)
	check("u_c with second-order terms / nm", b.Second.U)
	check("u_c with second-order terms, rounded inputs / nm", b.Second.U)
	near.Rel(t, "u, full digits", b.U, gum(t, "GUM-H.1", "u_c first order from the rounded inputs / nm").recomputed[0], 1e-9)
	near.Rel(t, "u to second order, full digits", b.Second.U, gum(t, "GUM-H.1", "u_c with second-order terms, rounded inputs / nm").recomputed[0], 1e-9)
	check("nu_eff", b.DoF)
	if !b.Second.Matters {
		t.Error("the second order adds 2.2 nm to 31.7 nm and must be pointed out")
	}
	k, err := CoverageFactor(0.99, 16)
	if err != nil {
		t.Fatal(err)
	}
	check("t_0.99(16)", k)
	u, _, err := b.Expanded(0.99)
	if err != nil {
		t.Fatal(err)
	}
	if !(u > 91.5 && u < 93.5) { // 92 unrounded, 93 from the rounded 32 nm
		t.Errorf("expanded uncertainty %g nm", u)
	}
	shares := 0.0
	for _, row := range b.Rows {
		shares += row.Share
	}
	near.Rel(t, "sum of shares", shares, 1, 1e-14)
	near.Rel(t, "share of l_S", b.Rows[0].Share, 25*25/(b.U*b.U), 1e-9)
}

// TestImpedance is JCGM 100:2008, H.2, from the five observations.
func TestImpedance(t *testing.T) {
	v := []float64{5.007, 4.994, 5.005, 4.990, 4.999}
	i := []float64{19.663e-3, 19.639e-3, 19.640e-3, 19.685e-3, 19.678e-3}
	phi := []float64{1.0456, 1.0438, 1.0468, 1.0428, 1.0433}
	rows := [][]float64{v, i, phi}
	var inputs []Input
	for _, row := range rows {
		m := momentsOf(row)
		inputs = append(inputs, Input{Value: m.mean, U: m.sd() / math.Sqrt(5), DoF: 4})
	}
	r := func(a, b int) Correlation {
		var sum float64
		for k := range v {
			sum += (rows[a][k] - inputs[a].Value) * (rows[b][k] - inputs[b].Value)
		}
		return Correlation{a, b, sum / 20 / (inputs[a].U * inputs[b].U)}
	}
	s := sources(t, inputs, r(0, 1), r(0, 2), r(1, 2))
	compare := func(what string, got ...float64) {
		t.Helper()
		f := gum(t, "GUM-H.2", what)
		for k := range got {
			near.Abs(t, what, got[k], f.published[k], f.tolerance)
			near.Rel(t, what+", full digits", got[k], f.recomputed[k], 1e-7)
		}
	}
	compare("r(V,I), r(V,phi), r(I,phi)", s.R(0, 1), s.R(0, 2), s.R(1, 2))

	resistance := eval(func(x []float64) float64 { return x[0] / x[1] * math.Cos(x[2]) })
	reactance := eval(func(x []float64) float64 { return x[0] / x[1] * math.Sin(x[2]) })
	impedance := eval(func(x []float64) float64 { return x[0] / x[1] })
	three := func(s *Sources) (a, b, c *Budget) {
		return budget(t, resistance, s), budget(t, reactance, s), budget(t, impedance, s)
	}
	a, b, c := three(s)
	corr := func(s *Sources, a, b *Budget) float64 { return s.Covariance(a, b) / (a.U * b.U) }
	compare("R, X, Z / ohm", a.Value, b.Value, c.Value)
	compare("u_c(R), u_c(X), u_c(Z) / ohm", a.U, b.U, c.U)
	compare("r(R,X), r(R,Z), r(X,Z)", corr(s, a, b), corr(s, a, c), corr(s, b, c))
	near.Rel(t, "degrees of freedom", a.DoF, 4, 1e-12)
	t.Logf("u(R, X, Z) = %.5g %.5g %.5g ohm", a.U, b.U, c.U)

	free := sources(t, inputs)
	a, b, c = three(free)
	compare("if correlations are (wrongly) ignored: u(R),u(X),u(Z)", a.U, b.U, c.U)
	compare("and then r(R,X), r(R,Z), r(X,Z)", corr(free, a, b), corr(free, a, c), corr(free, b, c))

	zero := budget(t, eval(func(x []float64) float64 {
		z := x[0] / x[1]
		return z - math.Hypot(z*math.Cos(x[2]), z*math.Sin(x[2]))
	}), s)
	near.Abs(t, "u of Z less its own parts / ohm", zero.U, 0, 1e-9)
}

// TestProductDegreesOfFreedom is the example of JCGM 100:2008, G.4.1.
func TestProductDegreesOfFreedom(t *testing.T) {
	s := sources(t, []Input{
		{Value: 1, U: 0.0025, DoF: 9}, {Value: 1, U: 0.0057, DoF: 4}, {Value: 1, U: 0.0082, DoF: 14},
	})
	b := budget(t, eval(func(x []float64) float64 { return 7 * x[0] * x[1] * x[2] }), s)
	u, k, err := b.Expanded(0.95)
	if err != nil {
		t.Fatal(err)
	}
	for what, got := range map[string]float64{
		"u_c(y)/y / %": b.U / b.Value * 100, "nu_eff": b.DoF, "t_95(19)": k, "U_95 / %": u / b.Value * 100,
	} {
		f := gum(t, "GUM-G.4.1", what)
		near.Abs(t, what, got, f.published[0], f.tolerance)
	}
	near.Rel(t, "nu_eff, full digits", b.DoF, gum(t, "GUM-G.4.1", "nu_eff").recomputed[0], 1e-9)
}

// TestMirrors: eleven mirrors of 0.70 ± 0.005, one shared error or eleven
// (JCGM 100:2008, 5.1.6 and F.1.2.4).
func TestMirrors(t *testing.T) {
	shared := budget(t, eval(func(x []float64) float64 { return math.Pow(x[0], 11) }), sources(t, []Input{{Value: 0.7, U: 0.005}}))
	near.Rel(t, "shared", shared.U/shared.Value, 11*0.005/0.7, 1e-6)
	near.Abs(t, "shared / %", 100*shared.U/shared.Value, 7.9, 0.05)
	eleven := make([]Input, 11)
	for i := range eleven {
		eleven[i] = Input{Value: 0.7, U: 0.005}
	}
	product := eval(func(x []float64) float64 {
		p := 1.0
		for _, r := range x {
			p *= r
		}
		return p
	})
	apart := budget(t, product, sources(t, eleven))
	near.Rel(t, "independent", apart.U/apart.Value, math.Sqrt(11)*0.005/0.7, 1e-9)
	near.Abs(t, "independent / %", 100*apart.U/apart.Value, 2.4, 0.05)
	var pairs []Correlation
	for i := range 11 {
		for j := range i {
			pairs = append(pairs, Correlation{i, j, 1})
		}
	}
	one := budget(t, product, sources(t, eleven, pairs...))
	near.Rel(t, "eleven with correlation 1", one.U/one.Value, 11*0.005/0.7, 1e-9)
	near.Rel(t, "second order of them is that of the power", one.Second.U, shared.Second.U, 1e-6)
	t.Logf("shared %.4g %%, independent %.4g %%", 100*shared.U/shared.Value, 100*apart.U/apart.Value)
}

func TestLinearIsExact(t *testing.T) {
	c := []float64{3, -1e-9, 4e12, 0.25}
	s := sources(t, []Input{{Value: 13.5e-9, U: 1e-18}, {Value: 295.15, U: 0.01}, {Value: 0, U: 1e-15}, {Value: -1e5, U: 1e-7}})
	b := budget(t, eval(func(x []float64) float64 {
		return c[0]*x[0] + c[1]*x[1]
	}), s)
	for i, row := range b.Rows[:2] {
		near.Rel(t, "sensitivity", row.C, c[i], 1e-9)
	}
	b = budget(t, eval(func(x []float64) float64 { return c[2]*x[2] + c[3]*x[3]/1e8 }), s)
	near.Rel(t, "sensitivity at 0", b.Rows[2].C, c[2], 1e-9)
	near.Rel(t, "sensitivity beside it", b.Rows[3].C, c[3]/1e8, 1e-9)
	same := budget(t, eval(func(x []float64) float64 { return x[1] - x[1] }), s)
	if same.U != 0 || same.Second.Matters {
		t.Errorf("x - x has the uncertainty %g", same.U)
	}
}

// TestSlopeTwin compares with closed forms.
func TestSlopeTwin(t *testing.T) {
	for _, c := range []struct {
		what       string
		f          func(float64) float64
		x, u, want float64
		tol        float64
	}{
		{"exponential", math.Exp, 1, 0.01, math.E, 1e-9},
		{"attenuation", func(x float64) float64 { return math.Exp(-5e6 * x) }, 30e-9, 0.3e-9, -5e6 * math.Exp(-0.15), 1e-9},
		{"power", func(x float64) float64 { return math.Pow(x, 11) }, 0.7, 0.005, 11 * math.Pow(0.7, 10), 1e-5},
		{"sine", math.Sin, 100, 1e-9, math.Cos(100), 1e-9},
	} {
		c0, oneSided, err := eval(func(x []float64) float64 { return c.f(x[0]) }).slope([]float64{c.x}, 0, c.u)
		if err != nil || oneSided {
			t.Errorf("%s: %v, one-sided %t", c.what, err, oneSided)
		}
		near.Rel(t, c.what, c0, c.want, c.tol)
	}
}

var errDomain = errors.New("out of range")

// below1 has values up to 1 only.
func below1(x []float64) (float64, error) {
	if x[0] > 1 {
		return 0, errDomain
	}
	return x[0] * x[0], nil
}

func TestSlopeAtTheEdge(t *testing.T) {
	b := budget(t, below1, sources(t, []Input{{Value: 1, U: 0.01}}))
	near.Rel(t, "slope on one side", b.Rows[0].C, 2, 1e-9)
	if !b.Rows[0].OneSided || !b.Second.Unknown {
		t.Errorf("one-sided %t, second order unknown %t", b.Rows[0].OneSided, b.Second.Unknown)
	}
	b = budget(t, below1, sources(t, []Input{{Value: 0.995, U: 0.01}}))
	near.Rel(t, "slope near the edge", b.Rows[0].C, 1.99, 1e-9)
	if b.Rows[0].OneSided {
		t.Error("there is room on both sides")
	}
	if _, err := FirstOrder(context.Background(), below1, sources(t, []Input{{Value: 2, U: 0.01}})); !errors.Is(err, errDomain) {
		t.Errorf("outside: %v", err)
	}
}

// TestCurvatureAtZero is JCGM 101:2008, 9.4: first order says 0 ± 0.
func TestCurvatureAtZero(t *testing.T) {
	f := eval(func(x []float64) float64 { return x[0]*x[0] + x[1]*x[1] })
	for _, c := range []struct {
		x, r, u, second, shift float64
		matters                bool
	}{
		{0, 0, 0, 50e-6, 50e-6, true},
		{0.01, 0, 100e-6, 111.8033988749895e-6, 50e-6, true},
		{0.05, 0, 500e-6, 502.4937810560445e-6, 50e-6, true},
		{0.5, 0, 5000e-6, 5000.249993750312e-6, 50e-6, false},
		{0, 0.9, 0, 67.26812023536856e-6, 50e-6, true},
		{0.05, 0.9, 500e-6, 504.5047076093543e-6, 50e-6, true},
	} {
		b := budget(t, f, sources(t, []Input{{Value: c.x, U: 0.005}, {U: 0.005}}, Correlation{0, 1, c.r}))
		near.Abs(t, "u", b.U, c.u, 1e-12)
		near.Rel(t, "u to second order, exact here", b.Second.U, c.second, 1e-8)
		near.Rel(t, "shift of the mean", b.Second.Shift, c.shift, 1e-8)
		if b.Second.Matters != c.matters {
			t.Errorf("x1 = %g, r = %g: matters %t", c.x, c.r, b.Second.Matters)
		}
	}
}

func TestCoverageFactor(t *testing.T) {
	// JCGM 100:2008, table G.2 (from memory).
	for _, c := range []struct{ p, nu, k float64 }{
		{0.6827, 1, 1.84}, {0.95, 1, 12.71}, {0.95, 4, 2.78}, {0.9545, 10, 2.28}, {0.99, 20, 2.85}, {0.9973, 50, 3.16},
	} {
		k, err := CoverageFactor(c.p, c.nu)
		if err != nil {
			t.Fatal(err)
		}
		near.Abs(t, "k", k, c.k, 0.006)
	}
	k, _ := CoverageFactor(0.95, 0)
	near.Rel(t, "normal", k, 1.959963984540054, 1e-14) // any table of the normal distribution
	far, _ := CoverageFactor(0.95, 1e7)
	near.Rel(t, "very many degrees of freedom", far, k, 1e-6)
	for _, bad := range [][2]float64{{0, 1}, {1, 1}, {math.NaN(), 1}, {0.95, -1}, {0.95, math.NaN()}} {
		if _, err := CoverageFactor(bad[0], bad[1]); !errors.Is(err, ErrRange) {
			t.Errorf("p = %g, nu = %g: %v", bad[0], bad[1], err)
		}
	}
}

func TestSourcesRefused(t *testing.T) {
	x := Input{Value: 1, U: 0.1}
	for _, c := range []struct {
		what   string
		inputs []Input
		pairs  []Correlation
		cause  error
	}{
		{"negative uncertainty", []Input{{U: -1}}, nil, ErrInput},
		{"not a number", []Input{{Value: math.NaN()}}, nil, ErrInput},
		{"endless uncertainty", []Input{{U: math.Inf(1)}}, nil, ErrInput},
		{"ends reversed", []Input{{Shape: Rectangular, Low: 2, High: 1}}, nil, ErrInput},
		{"unknown shape", []Input{{Shape: 7}}, nil, ErrInput},
		{"degrees of freedom", []Input{{U: 1, DoF: -2}}, nil, ErrInput},
		{"above 1", []Input{x, x}, []Correlation{{0, 1, 1.01}}, ErrCorrelation},
		{"with itself", []Input{x, x}, []Correlation{{1, 1, 0.5}}, ErrCorrelation},
		{"twice", []Input{x, x}, []Correlation{{0, 1, 0.5}, {1, 0, 0.4}}, ErrCorrelation},
		{"exact", []Input{x, Exact(1)}, []Correlation{{0, 1, 0.5}}, ErrCorrelation},
		{"no such input", []Input{x, x}, []Correlation{{0, 2, 0.5}}, ErrCorrelation},
		{"contradiction", []Input{x, x, x}, []Correlation{{0, 1, 0.9}, {1, 2, 0.9}, {0, 2, -0.9}}, ErrCorrelation},
		{"contradiction of ones", []Input{x, x, x}, []Correlation{{0, 1, 1}, {1, 2, 1}, {0, 2, 0.5}}, ErrCorrelation},
	} {
		if _, err := NewSources(c.inputs, c.pairs...); !errors.Is(err, c.cause) {
			t.Errorf("%s: %v", c.what, err)
		}
	}
	r := math.Sqrt(0.5) // singular: input 2 is the sum of the others
	sources(t, []Input{x, x, x}, Correlation{0, 2, r}, Correlation{1, 2, r})
}
