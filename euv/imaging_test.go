package euv

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// derivative of f at x by the central difference of fourth order.
func derivative(f func(float64) float64, x, h float64) float64 {
	return (8*(f(x+h)-f(x-h)) - (f(x+2*h) - f(x-2*h))) / (12 * h)
}

func TestHalfPitchAndBack(t *testing.T) {
	hp := good(HalfPitch(0.4, 0.33, 13.5e-9))
	near.Rel(t, "half pitch", float64(hp), 0.4*13.5e-9/0.33, 1e-15)
	near.Rel(t, "k1", float64(good(K1(hp, 0.33, 13.5e-9))), 0.4, 1e-15)
	// twin: at k1 = 1/4 the first orders of pitch 2·hp leave at twice the angle
	// whose sine is NA: λ/pitch = 2 NA
	hp = good(HalfPitch(0.25, 0.33, 13.5e-9))
	near.Rel(t, "two beams from edge to edge", 13.5e-9/(2*float64(hp)), 2*0.33, 1e-15)
}

// Check 13. Source: B. J. Lin, J. Microlith. Microfab. Microsyst. 1, 7 (2002)
// (from memory).
func TestDepthOfFocus(t *testing.T) {
	near.Abs(t, "paraxial", float64(good(DepthOfFocus(0.33, 1, 13.5e-9))), 123.97e-9, 0.005e-9)
	near.Abs(t, "exact", float64(good(DepthOfFocusExact(0.33, 0.25, 13.5e-9))), 120.49e-9, 0.005e-9)
}

// Twin: out of focus by z, the path at the edge of the pupil differs from that
// on the axis by z(1 − cos θ); the total depth is twice the z at which that is
// a quarter wave. The phase over the pupil is integrated from its derivative
// z·sin θ. The paraxial form takes z·θ instead, with NA for θ.
func TestDepthOfFocusAgainstPathDifference(t *testing.T) {
	const wavelength = 13.5e-9
	for _, na := range []float64{0.1, 0.33, 0.55, 0.75, 0.95} {
		path := quad.Fixed(math.Sin, 0, math.Asin(na), 30, nil, 0)
		near.Rel(t, fmt.Sprintf("exact, NA %g", na), float64(good(DepthOfFocusExact(units.Ratio(na), 0.25, wavelength))),
			2*wavelength/4/path, 1e-13)
		flat := quad.Fixed(func(u float64) float64 { return u }, 0, na, 5, nil, 0)
		near.Rel(t, fmt.Sprintf("paraxial, NA %g", na), float64(good(DepthOfFocus(units.Ratio(na), 1, wavelength))),
			2*wavelength/4/flat, 1e-13)
	}
	small := units.Ratio(1e-4)
	near.Rel(t, "both agree for a small NA", float64(good(DepthOfFocusExact(small, 0.25, wavelength))),
		float64(good(DepthOfFocus(small, 1, wavelength))), 1e-8)
}

// Twin: the logarithm of the image of two beams, differentiated at its edge.
func TestNILSAgainstDerivative(t *testing.T) {
	const pitch = 32e-9
	for _, contrast := range []float64{0.05, 0.5, 0.8, 1} {
		log := func(x float64) float64 { return math.Log(1 + contrast*math.Cos(2*math.Pi*x/pitch)) }
		slope := -derivative(log, pitch/4, pitch*1e-3)
		nils := float64(good(NILS(units.AttenuationCoefficient(slope), pitch/2)))
		near.Rel(t, fmt.Sprintf("contrast %g", contrast), float64(good(TwoBeamNILS(units.Ratio(contrast)))), nils, 1e-8)
	}
}

// widthAt is the width of the bright line of a two-beam image at a threshold, as
// a fraction of the pitch: 1 + V cos 2πx = threshold at x = ± width/2.
func widthAt(threshold, contrast float64) float64 {
	return math.Acos((threshold-1)/contrast) / math.Pi
}

// Twin: the width of a bright line against the dose, differentiated.
func TestCDShiftAgainstDerivative(t *testing.T) {
	const contrast = 0.7
	width := func(dose float64) float64 { return widthAt(1/dose, contrast) }
	nils := good(TwoBeamNILS(contrast))
	got := float64(good(CDShift(units.Length(width(1)), nils, 0.01))) / 0.01
	near.Rel(t, "width per dose", got, derivative(width, 1, 1e-3), 1e-9)
	if got <= 0 {
		t.Error("more light, a smaller bright feature")
	}
	// Twin: the latitude is the range of dose between the widths of ±1 %.
	const tolerance = 0.01
	between := 2 * tolerance * width(1) / derivative(width, 1, 1e-3)
	near.Rel(t, "latitude", float64(good(ExposureLatitude(nils, tolerance))), between, 1e-9)
	// and the shift at either end of it is the tolerance
	el := good(ExposureLatitude(nils, 0.1))
	near.Rel(t, "shift at the end of the range", float64(good(CDShift(16e-9, nils, el/2))), 1.6e-9, 1e-14)
}

// Twin: the width of a bright line against flare, differentiated at none.
func TestFlareShiftAgainstDerivative(t *testing.T) {
	const contrast, clear = 0.7, 1.9 // the image's unit in a clear field
	for _, density := range []float64{0, 0.2, 0.5, 1 / clear, 1} {
		// (1−F)·I + F·density·clear = 1 at the edge
		width := func(flare float64) float64 { return widthAt((1-flare*density*clear)/(1-flare), contrast) }
		nils := good(TwoBeamNILS(contrast))
		const flare = 0.01
		got := float64(good(FlareShift(0.5, nils, flare, units.Ratio(density), 1/clear)))
		near.Abs(t, fmt.Sprintf("density %g", density), got/flare, derivative(width, 0, 1e-3), 1e-9)
	}
}

// Twin: a cosine blurred with a Gaussian by quadrature.
func TestBlurContrastAgainstQuadrature(t *testing.T) {
	for _, over := range []float64{0.01, 0.1, 0.15, 0.3, 0.5} {
		blurred := 0.0
		for i := -40; i < 40; i++ {
			a := float64(i) / 4
			blurred += quad.Fixed(func(u float64) float64 {
				return math.Cos(2*math.Pi*over*u) * math.Exp(-u*u/2) / math.Sqrt(2*math.Pi)
			}, a, a+0.25, 12, nil, 0)
		}
		got := float64(good(BlurContrast(units.Length(over*32e-9), 32e-9)))
		near.Rel(t, fmt.Sprintf("sigma over pitch %g", over), got, blurred, 1e-12)
	}
}

func TestWidthOfAGaussian(t *testing.T) {
	fwhm := good(FWHMOfSigma(3e-9))
	near.Rel(t, "half height", math.Exp(-math.Pow(float64(fwhm)/2/3e-9, 2)/2), 0.5, 1e-15)
	near.Rel(t, "and back", float64(good(SigmaOfFWHM(fwhm))), 3e-9, 1e-15)
	near.Rel(t, "√(8 ln 2)", widthOfSigma, math.Sqrt(8*math.Ln2), 1e-15)
}

func BenchmarkDepthOfFocusExact(b *testing.B) {
	for b.Loop() {
		if _, err := DepthOfFocusExact(0.33, 0.25, 13.5e-9); err != nil {
			b.Fatal(err)
		}
	}
}
