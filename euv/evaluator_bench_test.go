package euv

import (
	"math"
	"math/cmplx"
	"testing"

	"example.com/dosewright/units"
)

// grid is n wavelengths from 12.5 nm to 14.5 nm.
func grid(n int) []units.Length {
	out := make([]units.Length, n)
	for i := range out {
		out[i] = nm * units.Length(12.5+2*float64(i)/float64(n-1))
	}
	return out
}

// plainRecursion is what one writes by hand for one capped mirror at normal
// incidence: coefficients once, then one interface after the other.
func plainRecursion(wavelength float64, bilayers int, thickness [3]float64, index [3]Index) float64 {
	var n, phase [3]complex128 // cap, then the two films of the bilayer
	for i, x := range index {
		n[i] = complex(1-x.Delta, -x.Beta)
		phase[i] = cmplx.Exp(complex(0, -4*math.Pi*thickness[i]/wavelength) * n[i])
	}
	face := func(a, b complex128) complex128 { return (a - b) / (a + b) }
	top, first, down, up := face(1, n[0]), face(n[0], n[1]), face(n[1], n[2]), face(n[2], n[1])
	r := up // the substrate is as the first film
	for i := range bilayers {
		if i > 0 {
			r *= phase[1]
			r = (up + r) / (1 + up*r)
		}
		r *= phase[2]
		r = (down + r) / (1 + down*r)
	}
	r *= phase[1]
	r = (first + r) / (1 + first*r)
	r *= phase[0]
	r = (top + r) / (1 + top*r)
	return real(r)*real(r) + imag(r)*imag(r)
}

// The spectrum of a mirror of 50 bilayers with a cap, 101 layers on a
// substrate, over 2,000 wavelengths. The recursion by hand gets its indices for
// nothing; so does the evaluator after the first round.
func BenchmarkSpectrum(b *testing.B) {
	const points, layers = 2000, 101
	wavelengths := grid(points)
	dst := make([]units.Ratio, points)
	per := func(name string, f func()) {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				f()
			}
			each := float64(b.Elapsed().Nanoseconds()) / float64(b.N) / points
			b.ReportMetric(each, "ns/wavelength")
			b.ReportMetric(each/layers, "ns/wavelength/layer")
		})
	}
	s := mirror(b, 50, 6.95*nm, 2.5*nm)
	var index [points][3]Index
	for i, l := range wavelengths {
		index[i] = [3]Index{sure(solid(b, "Ru").Index(l)), sure(solid(b, "Si").Index(l)), sure(solid(b, "Mo").Index(l))}
	}
	sum := 0.0
	per("by hand", func() {
		for i, l := range wavelengths {
			sum += plainRecursion(float64(l), 50, [3]float64{2.5e-9, 0.6 * 6.95e-9, 0.4 * 6.95e-9}, index[i])
		}
	})
	var e Evaluator
	aim := func(angle units.Angle, pol Polarization) {
		if err := e.Aim(wavelengths, angle, pol); err != nil {
			b.Fatal(err)
		}
	}
	reflect := func(body Body) func() {
		return func() {
			if err := e.Reflectivity(dst, body); err != nil {
				b.Fatal(err)
			}
		}
	}
	aim(0, Unpolarised)
	per("normal", reflect(s))
	per("normal, rough", reflect(s.WithRoughness(0.4*nm)))
	s.Substrate = nil
	per("normal, transmitted", func() {
		if err := e.Transmittance(dst, s); err != nil {
			b.Fatal(err)
		}
	})
	s.Substrate = solid(b, "Si")
	per("normal, aimed each time", func() { aim(0, Unpolarised); reflect(s)() })
	aim(degrees(6), PolarizationS)
	per("6°, s", reflect(s))
	aim(degrees(6), Unpolarised)
	per("6°, unpolarised, rough", reflect(s.WithRoughness(0.4*nm)))
	if !(sum > 0) {
		b.Fatal("the recursion reflects nothing")
	}
}

// One mirror after the other at one wavelength, as in a sweep of a thickness.
func BenchmarkOneWavelength(b *testing.B) {
	s := mirror(b, 50, 6.95*nm, 2.5*nm)
	var e Evaluator
	if err := e.Aim([]units.Length{13.5 * nm}, 0, Unpolarised); err != nil {
		b.Fatal(err)
	}
	var dst [1]units.Ratio
	var body Body = &s
	b.ReportAllocs()
	for b.Loop() {
		s.Repeats[0].Layers[0].Thickness += 1e-15
		if err := e.Reflectivity(dst[:], body); err != nil {
			b.Fatal(err)
		}
	}
}

func TestPlainRecursionAgrees(t *testing.T) {
	s := mirror(t, 50, 6.95*nm, 2.5*nm)
	for _, l := range grid(50) {
		index := [3]Index{sure(solid(t, "Ru").Index(l)), sure(solid(t, "Si").Index(l)), sure(solid(t, "Mo").Index(l))}
		got := plainRecursion(float64(l), 50, [3]float64{2.5e-9, 0.6 * 6.95e-9, 0.4 * 6.95e-9}, index)
		want := recursion(t, s, l, 0, PolarizationS)
		if math.Abs(got-want) > 1e-12 {
			t.Errorf("by hand %g, oracle %g", got, want)
		}
	}
}
