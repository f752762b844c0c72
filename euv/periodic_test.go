package euv

import (
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// The reflection coefficient at the edge of the stop band of a mirror without
// absorption, where the eigenvalues of a period meet: wavelengths crowd towards
// it, so that both formulas of power and the seam between them are met.
func TestEdgeOfTheStopBand(t *testing.T) {
	high, low := Index{Delta: 0.001}, Index{Delta: 0.076}
	const first, second = 4.15 * nm, 2.85 * nm
	s := Stack{Substrate: high, Repeats: []Repeat{Periods(40, Layer{Medium: high, Thickness: first}, Layer{Medium: low, Thickness: second})}}
	// trace/2 of a period of two films (from memory)
	cosine := func(l float64) float64 {
		n, m := 1-high.Delta, 1-low.Delta
		a, b := 2*math.Pi/l*n*float64(first), 2*math.Pi/l*m*float64(second)
		return math.Cos(a)*math.Cos(b) - 0.5*(n/m+m/n)*math.Sin(a)*math.Sin(b)
	}
	inside, outside := 13.5e-9, 14.5e-9 // |cosine| > 1 and < 1
	if !(math.Abs(cosine(inside)) > 1 && math.Abs(cosine(outside)) < 1) {
		t.Fatalf("the stop band is elsewhere: %g, %g", cosine(inside), cosine(outside))
	}
	for range 60 {
		if m := (inside + outside) / 2; math.Abs(cosine(m)) > 1 {
			inside = m
		} else {
			outside = m
		}
	}
	worst := 0.0
	for _, side := range []float64{-1, 1} {
		for off := 1e-17; off < 1e-9; off *= 1.5 {
			l := units.Length(inside + side*off)
			got := float64(sure(Reflectivity(s, l, 0, Unpolarised, 0)).Value)
			want := recursion(t, s, l, 0, PolarizationS)
			near.Abs(t, "R", got, want, 1e-12)
			worst = math.Max(worst, math.Abs(got-want))
		}
	}
	t.Logf("largest difference %.2g", worst)
}

func TestPowersOfANumber(t *testing.T) {
	x := complex(0.6, -0.7)
	power, sum := x, complex128(1)
	for n := 1; n < 200; n++ {
		near.Abs(t, "real part of a power", real(raised(x, n)), real(power), 1e-14)
		near.Abs(t, "imaginary part of a power", imag(raised(x, n)), imag(power), 1e-14)
		near.Abs(t, "real part of a sum", real(geometric(x, n)), real(sum), 1e-14)
		near.Abs(t, "imaginary part of a sum", imag(geometric(x, n)), imag(sum), 1e-14)
		sum += power
		power *= x
	}
}
