package study

import (
	"context"
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

func fit(t *testing.T, f *Fitting, left, right Eval) *Fit {
	t.Helper()
	r, err := f.Run(context.Background(), program(left, right))
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// line is y = a + b x, with slots a, b, x, y.
func line(x []float64) (float64, error) { return x[0] + x[1]*x[2], nil }

func slotOf(i int) Eval { return eval(func(x []float64) float64 { return x[i] }) }

// TestNorris compares with certified values (NIST StRD, linear regression).
func TestNorris(t *testing.T) {
	var file struct {
		Linear []struct {
			Name      string
			Certified map[string]decimal
			Y         []decimal `json:"data_y"`
			X         []decimal `json:"data_x"`
		}
	}
	published(t, "statistics.json", &file)
	set := file.Linear[0]
	var x, y []float64
	for i := range set.X {
		x, y = append(x, float64(set.X[i])), append(y, float64(set.Y[i]))
	}
	for _, start := range [][]float64{{0, 0}, {1, 1}, {-1e6, 1e6}} {
		f := &Fitting{Slots: append(start, 0, 0), Parameters: []int{0, 1}, Columns: []Column{{2, x}, {3, y}}}
		r := fit(t, f, slotOf(3), line)
		t.Logf("%d steps, b0 %.15g, b1 %.15g", r.Steps, r.Values[0], r.Values[1])
		near.Rel(t, "B0", r.Values[0], float64(set.Certified["B0"]), 1e-9)
		near.Rel(t, "B1", r.Values[1], float64(set.Certified["B1"]), 1e-11)
		near.Rel(t, "u(B0)", r.U[0], float64(set.Certified["u_B0"]), 1e-9)
		near.Rel(t, "u(B1)", r.U[1], float64(set.Certified["u_B1"]), 1e-9)
		near.Rel(t, "residual", r.Residual, float64(set.Certified["residual_sd"]), 1e-11)
		near.Rel(t, "r(B0, B1)", r.Correlation[0][1], -0.7738280820878582, 1e-9) // recomputed from the same data
		if r.DoF != 34 {
			t.Errorf("%d degrees of freedom", r.DoF)
		}
	}
}

// TestOverhead: five settings of dose/(mJ/cm²) and their wafers per hour; time per
// wafer = overhead + slope·dose (computed in closed form).
func TestOverhead(t *testing.T) {
	f := &Fitting{Slots: []float64{0, 0, 0, 0}, Parameters: []int{0, 1}, Columns: []Column{
		{2, []float64{20, 25, 30, 40, 50}}, {3, []float64{172, 151, 137, 113, 97}},
	}}
	r := fit(t, f, eval(func(x []float64) float64 { return 3600 / x[3] }), line)
	near.Abs(t, "overhead / s", r.Values[0], 10.24, 0.005)
	near.Abs(t, "slope / (s per mJ/cm²)", r.Values[1], 0.538, 0.0005)
	t.Logf("%.5g ± %.2g s, %.5g ± %.2g s/(mJ/cm²), residual %.3g s, r %.3f", r.Values[0], r.U[0], r.Values[1], r.U[1], r.Residual, r.Correlation[0][1])
}

// TestDecay fits a·exp(−b x) + c to values with known scatter, in units whose
// parameters differ by sixteen decades, and compares with the solution of the
// linear problem at the answer.
func TestDecay(t *testing.T) {
	var x, y []float64
	s := newStream()
	s.begin(11, 0)
	for i := range 2000 {
		d := 1e-9 * float64(i) / 10
		x = append(x, d)
		y = append(y, 300*math.Exp(-2e7*d)+40+0.5*s.NormFloat64())
	}
	f := &Fitting{Slots: []float64{100, 5e7, 0, 0, 0}, Parameters: []int{0, 1, 2}, Columns: []Column{{3, x}, {4, y}}}
	model := eval(func(x []float64) float64 { return x[0]*math.Exp(-x[1]*x[3]) + x[2] })
	r := fit(t, f, slotOf(4), model)
	for i, want := range []float64{300, 2e7, 40} {
		near.Abs(t, "parameter", r.Values[i], want, 4*r.U[i])
	}
	near.Rel(t, "residual", r.Residual, 0.5, 0.06)
	// The gradient of the sum of squares vanishes: exact derivatives here.
	var gradient, length [3]float64
	for i, d := range x {
		e := math.Exp(-r.Values[1] * d)
		residual := y[i] - r.Values[0]*e - r.Values[2]
		for k, g := range []float64{e, -r.Values[0] * d * e, 1} {
			gradient[k] += g * residual
			length[k] += g * g
		}
	}
	for k := range gradient {
		near.Abs(t, "gradient, in standard uncertainties", gradient[k]/math.Sqrt(length[k])/r.Residual, 0, 1e-7)
	}
	t.Logf("%d steps, %.6g ± %.2g", r.Steps, r.Values, r.U)
	exact := make([]float64, len(x))
	for i, d := range x {
		exact[i] = 300*math.Exp(-2e7*d) + 40
	}
	f.Columns[1].Values = exact
	r = fit(t, f, slotOf(4), model)
	near.Rel(t, "without scatter", r.Values[1], 2e7, 1e-9)
	near.Abs(t, "no residual", r.Residual, 0, 1e-9)
}

// TestFitAsMany: as many rows as parameters give values, but no uncertainty.
func TestFitAsMany(t *testing.T) {
	f := &Fitting{Slots: []float64{0, 0, 0, 0}, Parameters: []int{0, 1}, Columns: []Column{{2, []float64{1, 3}}, {3, []float64{5, 9}}}}
	r := fit(t, f, slotOf(3), line)
	near.Rel(t, "a", r.Values[0], 3, 1e-9)
	near.Rel(t, "b", r.Values[1], 2, 1e-9)
	if r.DoF != 0 || r.U != nil || r.Correlation != nil {
		t.Errorf("%+v", r)
	}
}

func TestFitRefused(t *testing.T) {
	x, y := []float64{1, 2, 3, 4}, []float64{1, 4, 9, 17}
	columns := []Column{{2, x}, {3, y}}
	both := eval(func(x []float64) float64 { return (x[0] + x[1]) * x[2] })
	none := eval(func(x []float64) float64 { return x[0] * x[2] })
	for _, c := range []struct {
		what  string
		f     Fitting
		right Eval
		cause error
	}{
		{"no parameter", Fitting{Slots: make([]float64, 4), Columns: columns}, line, ErrRange},
		{"no data", Fitting{Slots: make([]float64, 4), Parameters: []int{0}}, line, ErrRange},
		{"one slot twice", Fitting{Slots: make([]float64, 4), Parameters: []int{0, 2}, Columns: columns}, line, ErrRange},
		{"no such slot", Fitting{Slots: make([]float64, 4), Parameters: []int{4}, Columns: columns}, line, ErrRange},
		{"uneven columns", Fitting{Slots: make([]float64, 4), Parameters: []int{0}, Columns: []Column{{2, x}, {3, y[:3]}}}, line, ErrRange},
		{"too few rows", Fitting{Slots: make([]float64, 4), Parameters: []int{0, 1}, Columns: []Column{{2, x[:1]}, {3, y[:1]}}}, line, ErrUndetermined},
		{"only their sum counts", Fitting{Slots: []float64{1, 1, 0, 0}, Parameters: []int{0, 1}, Columns: columns}, both, ErrUndetermined},
		{"no influence", Fitting{Slots: []float64{1, 1, 0, 0}, Parameters: []int{0, 1}, Columns: columns}, none, ErrUndetermined},
		{"no influence at 0", Fitting{Slots: make([]float64, 4), Parameters: []int{0, 1}, Columns: columns}, none, ErrUndetermined},
		{"no value", Fitting{Slots: []float64{2, 0, 0, 0}, Parameters: []int{0}, Columns: columns}, below1, errDomain},
	} {
		r, err := c.f.Run(context.Background(), program(slotOf(3), c.right))
		if !errors.Is(err, c.cause) {
			t.Errorf("%s: %+v, %v", c.what, r, err)
		}
		t.Log(err)
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	f := Fitting{Slots: make([]float64, 4), Parameters: []int{0}, Columns: columns}
	if _, err := f.Run(ctx, program(slotOf(3), line)); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
}
