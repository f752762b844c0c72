package euv_test

import (
	"math"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// polygon is the area of a polygon of many corners on an ellipse of full axes
// a and b, by the sum over its sides.
func polygon(a, b float64) float64 {
	const n = 100000
	sum := 0.0
	corner := func(i int) (x, y float64) {
		s, c := math.Sincos(2 * math.Pi * float64(i) / n)
		return a / 2 * c, b / 2 * s
	}
	for i := range n {
		x, y := corner(i)
		u, v := corner(i + 1)
		sum += (x*v - u*y) / 2
	}
	return sum
}

func TestShapesAgainstPolygons(t *testing.T) {
	for _, c := range []struct{ a, b float64 }{{20e-9, 20e-9}, {20e-9, 30e-9}, {0.3, 0.001}, {1e-9, 1e3}} {
		a, b := units.Length(c.a), units.Length(c.b)
		const tol = 1e-9 // the polygon is smaller by (2π/n)²/6
		near.Rel(t, "ellipse", sound[units.Area](t)(euv.EllipseArea(a, b)), polygon(c.a, c.b), tol)
		near.Rel(t, "hole", sound[units.Area](t)(euv.HoleArea(a)), polygon(c.a, c.a), tol)
	}
	// a field of 26 mm by 33 mm has 8.58 cm² (arithmetic)
	near.Rel(t, "field", sound[units.Area](t)(euv.RectangleArea(26*millimetre, 33*millimetre)), 8.58*squareCm, 1e-15)
}
