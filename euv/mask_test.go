package euv

import (
	"fmt"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

const degree = math.Pi / 180

func TestMaskErrors(t *testing.T) {
	// 2 nm on a 4x mask with MEEF 1.6 are 0.8 nm on the wafer
	near.Rel(t, "on the wafer", float64(good(WaferErrorOfMask(2e-9, 1.6, 4))), 0.8e-9, 1e-15)
	near.Rel(t, "and back", float64(good(MaskErrorFor(0.8e-9, 1.6, 4))), 2e-9, 1e-15)
	near.Rel(t, "of the other sign", float64(good(WaferErrorOfMask(-2e-9, 1.6, 4))), -0.8e-9, 1e-15)
}

// Twin: the paths of the rays that graze the absorber's upper edges, as lines.
func TestShadowAgainstRays(t *testing.T) {
	const thickness, reduction = 60e-9, 4
	for _, ray := range []float64{0, 5.355, 6, 12} {
		sideways, down := math.Sin(ray*degree), math.Cos(ray*degree)
		length := thickness / down // of the ray, from the edge to the mirror
		reach := 2 * length * sideways
		near.Rel(t, fmt.Sprintf("chief ray %g°", ray),
			float64(good(Shadow(thickness, units.Angle(ray*degree), reduction, 2))), reach/reduction, 1e-12)
		near.Rel(t, "one pass is half", 2*float64(good(Shadow(thickness, units.Angle(ray*degree), reduction, 1))),
			float64(good(Shadow(thickness, units.Angle(ray*degree), reduction, 2))), 1e-15)
	}
}

// Twin: the sine condition. A ray that meets the wafer at the edge of the pupil
// leaves the mask at an angle whose sine is smaller by the reduction.
func TestMaskAngles(t *testing.T) {
	for _, c := range []struct{ na, reduction, ray float64 }{{0.33, 4, 6}, {0.55, 8, 5.355}, {0.55, 4, 5.355}, {0.25, 4, 0}} {
		na, m, ray := units.Ratio(c.na), units.Ratio(c.reduction), units.Angle(c.ray*degree)
		low, high := float64(good(MaskAngleLow(na, m, ray))), float64(good(MaskAngleHigh(na, m, ray)))
		what := fmt.Sprintf("NA %g, reduction %g", c.na, c.reduction)
		near.Abs(t, what+", middle", (low+high)/2, c.ray*degree, 1e-15)
		near.Rel(t, what+", half", math.Sin((high-low)/2)*c.reduction, c.na, 1e-14)
	}
	// At 4x the cone of NA 0.55 reaches over the normal: its light would meet
	// the light that comes in.
	if low := good(MaskAngleLow(0.55, 4, 5.355*degree)); low >= 0 {
		t.Errorf("low is %g", low)
	}
	if low := good(MaskAngleLow(0.55, 8, 5.355*degree)); low <= 0 {
		t.Errorf("low is %g", low)
	}
}

func BenchmarkMaskAngleHigh(b *testing.B) {
	for b.Loop() {
		if _, err := MaskAngleHigh(0.33, 4, 6*degree); err != nil {
			b.Fatal(err)
		}
	}
}
