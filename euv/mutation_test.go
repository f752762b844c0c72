package euv

import (
	"errors"
	"math"
	"math/cmplx"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// The checks of this file were found missing by small changes of the code that
// no other test noticed; docs/mutations.md lists them.

// refusedFor says whether an error is the refusal of this argument.
func refusedFor(err error, argument string) bool {
	var bad *ArgumentError
	return errors.As(err, &bad) && bad.Argument == argument
}

// Where there is no light there are no photons: zero is in the range.
func TestNoLightNoPhotons(t *testing.T) {
	near.Rel(t, "per area", float64(sure(PhotonDensity(0, 13.5*nm))), 0, 0)
	near.Rel(t, "in an area", float64(sure(PhotonCount(0, 1e-16, 13.5*nm))), 0, 0)
	near.Rel(t, "per time", float64(sure(PhotonRate(0, 13.5*nm))), 0, 0)
	near.Rel(t, "dose of none", float64(sure(DoseOf(0, 13.5*nm))), 0, 0)
}

// Light along the layers meets no period, whatever they are made of.
func TestBraggAlongTheLayers(t *testing.T) {
	for _, delta := range []units.Ratio{0, -0.1} {
		if p, err := BraggPeriod(13.5*nm, math.Pi/2, 1, delta); !refusedFor(err, "angle") {
			t.Errorf("delta %g: period %g, %v", delta, p, err)
		}
		if l, err := BraggWavelength(7*nm, math.Pi/2, 1, delta); !refusedFor(err, "angle") {
			t.Errorf("delta %g: wavelength %g, %v", delta, l, err)
		}
	}
}

// The last pulse of the linear model leaves nothing, and no pulse follows it.
func TestLinearWearEnds(t *testing.T) {
	const rate = 1e-10
	near.Rel(t, "loss at the end", float64(sure(CollectorLoss(rate, 1e10, Linear))), 1, 1e-15)
	near.Rel(t, "life average", float64(sure(CollectorLifeAverage(rate, 1e10, Linear))), 0.5, 1e-15)
	if loss, err := CollectorLoss(rate, 1e10*(1+1e-6), Linear); !refusedFor(err, "pulses") {
		t.Errorf("a millionth of a life later: %g, %v", loss, err)
	}
}

// A mirror made for 12.8 nm has its peak on the long side of silicon's L edge at
// 12.4 nm; near a wavelength on the short side that peak is not found.
func TestPeakStopsAtAnEdge(t *testing.T) {
	s := mirror(t, 50, 6.52*nm, 0)
	long := sure(s.Peak(0, Unpolarised, 12.9*nm))
	near.Rel(t, "peak of the mirror", float64(long.Wavelength), 12.8e-9, 0.01)
	if short, err := s.Peak(0, Unpolarised, 12.2*nm); err == nil && short.Wavelength > 12.45*nm {
		t.Errorf("near 12.2 nm the peak is at %g m, across the edge", short.Wavelength)
	}
}

// δ grows with the density; where it would reach 1 the material is refused, by
// its index and by a mirror alike.
func TestDensityWithoutAnIndex(t *testing.T) {
	const l = 40 * nm
	light := sure(NewMaterial("C", 100))
	most := 100 / sure(Delta(light, l)) // at which δ is 1
	for _, c := range []struct {
		part float64
		ok   bool
	}{{0.99, true}, {1.01, false}, {1.5, false}} {
		m := Material{light.Formula, units.Density(c.part * float64(most))}
		if m.Density > maxDensity {
			t.Fatalf("%g kg/m³ is refused anyway", m.Density)
		}
		n, err := m.Index(l)
		if c.ok {
			near.Rel(t, "δ", n.Delta, c.part, 1e-12)
		}
		if (err == nil) != c.ok || !c.ok && !refusedFor(err, "density") {
			t.Errorf("δ of %g: %v, %v", c.part, n, err)
		}
		if r, err := Reflectivity(Surface{Medium: m}, l, 0, Unpolarised, 0); (err == nil) != c.ok {
			t.Errorf("a surface with δ of %g reflects %g, %v", c.part, r.Value, err)
		}
	}
}

// The usual density of a compound adds the volumes of its atoms: of MoSi2
// 95.95 g/mol / 10.22 g/cm³ + 2 · 28.085 g/mol / 2.33 g/cm³ = 33.5 cm³/mol for
// 152.12 g/mol, 4.54 g/cm³ (weights and densities of the elements from memory).
// Doubt begins at half and at twice of it.
func TestDoubtfulDensities(t *testing.T) {
	for _, c := range []struct {
		formula string
		usual   units.Density
	}{{"Mo", 10220}, {"Si", 2330}, {"MoSi2", 4540}} {
		for part, doubts := range map[units.Density]int{0.1: 1, 0.48: 1, 0.52: 0, 1: 0, 1.95: 0, 2.05: 1, 2.9: 1} {
			if w := (Film{Material: sure(NewMaterial(c.formula, part*c.usual))}).Warnings(); len(w) != doubts {
				t.Errorf("%s at %g of its usual density: %q", c.formula, part, w)
			}
		}
	}
}

// The ends of a range are no kinks within it, also where they are points of the
// tables and were rounded on the way between energy and wavelength.
func TestKinksLieInside(t *testing.T) {
	s := mirror(t, 1, 7*nm, 2*nm)
	all := s.Kinks(5*nm, 25*nm)
	if len(all) < 50 || !slices.IsSorted(all) {
		t.Fatalf("kinks %v", all)
	}
	for i := 2; i < len(all); i++ {
		if inside := s.Kinks(all[i-2], all[i]); !slices.Equal(inside, all[i-1:i]) {
			t.Errorf("between %g and %g: %g", all[i-2], all[i], inside)
		}
	}
}

// A mirror of many strong reflections written out layer by layer is that of as
// many periods, and a lossless one reflects all light in its stop band.
func TestWrittenOutAndPeriods(t *testing.T) {
	const pairs = 4000
	high, low := Layer{Medium: Index{}, Thickness: 13.5 * nm / 4}, Layer{Medium: Index{Delta: 0.5}, Thickness: 13.5 * nm / 2}
	var written []Layer
	for range pairs {
		written = append(written, low, high)
	}
	for _, l := range []units.Length{13.5 * nm, 13.6 * nm, 15 * nm} {
		one := sure(Stack{Repeats: []Repeat{Once(written...)}}.ReflectedAmplitude(l, 0, PolarizationS))
		many := sure(Stack{Repeats: []Repeat{Periods(pairs, low, high)}}.ReflectedAmplitude(l, 0, PolarizationS))
		near.Abs(t, "amplitude", cmplx.Abs(one-many), 0, 1e-9)
		near.Rel(t, "reflectivity", cmplx.Abs(one), 1, 1e-12)
	}
}

// The root is the principal one of the standard library.
func TestSquareRootIsPrincipal(t *testing.T) {
	for _, z := range []complex128{0, 1, -1, 4i, -4i, 3 + 4i, 3 - 4i, -3 + 4i, -3 - 4i, 1e-9 - 2i, -1e9 + 1e-3i, -1e9 - 1e-3i} {
		got, want := squareRoot(z), cmplx.Sqrt(z)
		near.Rel(t, "real part", real(got), real(want), 1e-12)
		near.Rel(t, "imaginary part", imag(got), imag(want), 1e-12)
	}
}

func TestWavelengthsInRange(t *testing.T) {
	var e Evaluator
	for l, ok := range map[units.Length]bool{0: false, 0.9e-12: false, 1e-12: true, 13.5e-9: true, 1: true, 1.1: false} {
		if err := e.Aim([]units.Length{l}, 0, Unpolarised); (err == nil) != ok {
			t.Errorf("%g m: %v", l, err)
		}
	}
}

// Roughness beyond its model makes more light than comes. Where the plain
// recursion says so the stack is refused; no other answer is changed.
func TestNoMoreLightThanComes(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	refused := 0
	for range 2000 {
		s := randomStack(rng, false).WithRoughness(nm * units.Length(8*rng.Float64()))
		angle := degrees(90 * math.Sqrt(rng.Float64()))
		want := recursion(t, s, 13.5*nm, angle, PolarizationS)
		got, err := Reflectivity(s, 13.5*nm, angle, PolarizationS, 0)
		switch {
		case want > 1.00001:
			refused++
			if !refusedFor(err, "reflectivity") {
				t.Errorf("R of %g at %g° is given as %g, %v", want, angle*180/math.Pi, got.Value, err)
			}
		case want < 1:
			near.Abs(t, "R", float64(got.Value), want, 1e-9)
		}
	}
	if refused < 10 {
		t.Errorf("only %d stacks made light", refused)
	}
}

// A stack counts its layers as light meets them, and doubts a roughness that is
// more than the layer below it is thick.
func TestStackSaysWhatItIs(t *testing.T) {
	s := mirror(t, 50, 7*nm, 2*nm)
	if text := s.String(); !strings.Contains(text, "101 layers on Si") {
		t.Errorf("%q", text)
	}
	for sigma, doubts := range map[units.Length]int{1.9 * nm: 0, 2.1 * nm: 1, 2.7 * nm: 1, 2.9 * nm: 2, 4.3 * nm: 3} {
		if w := s.WithRoughness(sigma).Warnings(); len(w) != doubts {
			t.Errorf("roughness %g: %q", sigma, w)
		}
	}
}

// Of two fringes of like width the higher one is the peak, also where a place
// of the first search lies on top of the lower and none on top of the higher.
func TestPeakBetweenPlaces(t *testing.T) {
	const from, to, fringe = 13e-9, 14e-9, 0.04e-9 // 400 places, 2.5 pm apart
	const step = (to - from) / 400
	lower, higher := from+100*step, from+300.5*step
	hump := func(l, at, height float64) float64 {
		if x := (l - at) / fringe; math.Abs(x) < 0.5 {
			return height * math.Pow(math.Cos(math.Pi*x), 2)
		}
		return 0
	}
	p := sure(FindPeak(func(dst, wavelengths []float64) error {
		for i, l := range wavelengths {
			dst[i] = hump(l, lower, 1) + hump(l, higher, 1.005)
		}
		return nil
	}, from, to, fringe))
	near.Rel(t, "place", float64(p.Wavelength), higher, 1e-8)
	near.Rel(t, "height", p.Value, 1.005, 1e-10)
	near.Rel(t, "width at half height", float64(sure(p.Bandwidth())), fringe/2, 1e-6)
}

// The fringes of a thick clear film are λ²/2nd apart, and as wide at half height
// as half of that, where its faces reflect little: R is 4r² sin²(2πnd/λ).
func TestFringesOfAThickFilm(t *testing.T) {
	const n, d = 0.98, 20e-6
	s := Stack{Repeats: []Repeat{Once(Layer{Medium: Index{Delta: 1 - n}, Thickness: d})}}
	p := sure(s.Peak(0, Unpolarised, 13.5*nm))
	r := (1 - n) / (1 + n)
	near.Rel(t, "height", p.Value, 4*r*r, 1e-3)
	l := float64(p.Wavelength)
	near.Rel(t, "width at half height", float64(sure(p.Bandwidth())), l*l/(4*n*d), 1e-2)
}

// Where float64 ends the fast form hands over before it fails.
func TestExponentialsAtTheEnds(t *testing.T) {
	for _, x := range []float64{-700.5, -705, -708, -709.5, -715, -719, 700.5, 705, 708, 709} {
		z := []complex128{complex(x, 1)}
		exponentials(z)
		want := cmplx.Exp(complex(x, 1))
		least := 0x1p-1074 // one unit of a number below the normal ones
		near.Abs(t, "real part", real(z[0]), real(want), 1e-15*cmplx.Abs(want)+least)
		near.Abs(t, "imaginary part", imag(z[0]), imag(want), 1e-15*cmplx.Abs(want)+least)
	}
}

// The warning of lost digits begins at 1e-300: e^−mean of no event passes it
// between a mean of 690 and one of 691.
func TestWarningOfLostDigits(t *testing.T) {
	for mean, warnings := range map[units.Count]int{100: 0, 690: 0, 691: 1, 700: 1, 740: 1} {
		p := sure(PoissonAtMost(0, mean))
		near.Rel(t, "e^−mean", float64(p.Value), math.Exp(-float64(mean)), 1e-12)
		if len(p.Warnings) != warnings {
			t.Errorf("mean %g: %q", float64(mean), p.Warnings)
		}
	}
}

// A count beyond 2⁵³ is none that float64 counts one by one.
func TestThresholdsOfCountableEvents(t *testing.T) {
	for threshold, ok := range map[units.Ratio]bool{0.5: true, 1: true, 1.000001: false, 1.9: false, 3: false} {
		if _, err := MissingProbability(countable, threshold); (err == nil) != ok || !ok && !refusedFor(err, "threshold") {
			t.Errorf("missing, %g of 2⁵³: %v", threshold, err)
		}
		if _, err := MergingProbability(countable, threshold); (err == nil) != ok {
			t.Errorf("merging, %g of 2⁵³: %v", threshold, err)
		}
	}
}
