package euv

import (
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func TestCurve(t *testing.T) {
	xs := []units.Length{13.2 * nm, 13.4 * nm, 13.5 * nm, 13.9 * nm}
	ys := []units.Ratio{0.1, 0.6, 0.7, 0.05}
	for i, x := range xs {
		if y := sure(Curve(xs, ys, x)); y != ys[i] {
			t.Errorf("at a point: %g, want %g", y, ys[i])
		}
	}
	near.Rel(t, "between", float64(sure(Curve(xs, ys, 13.45*nm))), 0.65, 1e-12)
	falling := sure(NewMeasured([]units.Length{3, 2, 1}, []units.Ratio{30, 20, 10}))
	near.Rel(t, "falling", float64(sure(falling.At(1.25))), 12.5, 1e-15)
	near.Rel(t, "wide", float64(sure(Curve([]units.Ratio{-math.MaxFloat64, math.MaxFloat64}, []units.Ratio{-math.MaxFloat64, math.MaxFloat64}, 0))+1), 1, 0)
}

// Bad tables and places outside are refused with a typed error.
func TestCurveRefused(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	for _, c := range []struct {
		xs, ys   []units.Ratio
		x        float64
		argument string
	}{
		{nil, nil, 1, "number of xs"},
		{[]units.Ratio{1}, []units.Ratio{1}, 1, "number of xs"},
		{[]units.Ratio{1, 2}, []units.Ratio{1}, 1, "number of ys"},
		{[]units.Ratio{1, 2, 2}, []units.Ratio{1, 2, 3}, 1, "xs"},
		{[]units.Ratio{1, 3, 2}, []units.Ratio{1, 2, 3}, 1, "xs"},
		{[]units.Ratio{1, units.Ratio(nan)}, []units.Ratio{1, 2}, 1, "xs"},
		{[]units.Ratio{1, 2}, []units.Ratio{1, units.Ratio(inf)}, 1, "ys"},
		{[]units.Ratio{1, 2}, []units.Ratio{1, 2}, 0.999, "x"},
		{[]units.Ratio{1, 2}, []units.Ratio{1, 2}, 2.001, "x"},
		{[]units.Ratio{1, 2}, []units.Ratio{1, 2}, nan, "x"},
	} {
		_, err := Curve(c.xs, c.ys, units.Ratio(c.x))
		var refused *ArgumentError
		if !errors.As(err, &refused) || refused.Argument != c.argument {
			t.Errorf("%v: %v, want %s refused", c, err, c.argument)
		}
	}
	if _, err := (Measured[units.Length, units.Ratio]{}).At(1); err == nil {
		t.Error("the zero table has values")
	}
}
