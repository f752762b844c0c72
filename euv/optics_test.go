package euv

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

const perMicrometre = 1e6 // m⁻¹

// α of two resist polymers from the tables of B. L. Henke, E. M. Gullikson, J.
// C. Davis (1993), by an independent computation.
func TestResistAttenuation(t *testing.T) {
	for _, c := range []struct {
		formula string
		density units.Density
		want    float64
	}{{"C5H8O2", 1190, 5.241}, {"C8H8O", 1170, 4.085}} {
		m := sure(NewMaterial(c.formula, c.density))
		near.Abs(t, c.formula, float64(sure(Attenuation(m, 13.5*nm)))/perMicrometre, c.want, 0.0005)
	}
}

// δ at 13.5 nm from the same tables, densities of the solid.
func TestMirrorDelta(t *testing.T) {
	for symbol, want := range map[string]float64{"Mo": 0.0762084, "Si": 0.000999981, "Ru": 0.1136455} {
		near.Rel(t, symbol, float64(sure(Delta(solid(t, symbol), 13.5*nm))), want, 1e-6)
	}
}

// The mirror of 50 bilayers of 6.95 nm, 0.4 of it molybdenum, on silicon, by an
// independent computation from the same tables. Measured mirrors have 0.69 to
// 0.70 and about 0.5 nm (S. Bajt et al., Opt. Eng. 41, 1797 (2002), from
// memory).
func TestMirrorPeaks(t *testing.T) {
	s := mirror(t, 50, 6.95*nm, 0)
	for _, c := range []struct {
		what        string
		s           Stack
		r, at, fwhm float64
	}{
		{"smooth", s, 0.73598, 13.577, 0.609},
		{"rough", s.WithRoughness(0.7 * nm), 0.68017, 13.546, 0.514},
	} {
		near.Abs(t, c.what+" peak", float64(sure(PeakReflectivity(c.s, 0, 13.5*nm)).Value), c.r, 5e-6)
		near.Abs(t, c.what+" place", nanometres(sure(PeakWavelength(c.s, 0, 13.5*nm)).Value), c.at, 5e-4)
		near.Abs(t, c.what+" width", nanometres(sure(Bandwidth(c.s, 0, 13.5*nm)).Value), c.fwhm, 5e-4)
	}
	slices.Reverse(s.Repeats[0].Layers)
	near.Abs(t, "Mo first", float64(sure(PeakReflectivity(s, 0, 13.5*nm)).Value), 0.74898, 5e-6)
}

// Widths of R¹⁰ and R¹¹ of the rough mirror, by the same computation.
func TestTrainWidth(t *testing.T) {
	one := ReflectivityOf(mirror(t, 50, 6.95*nm, 0).WithRoughness(0.7*nm), 0, PolarizationS)
	for m, want := range map[float64]float64{10: 0.246, 11: 0.237} {
		p := sure(FindPeak(func(dst, l []float64) error {
			err := one(dst, l)
			for i := range dst {
				dst[i] = math.Pow(dst[i], m)
			}
			return err
		}, 12.6*nm, 14.4*nm, 0.1*nm))
		near.Abs(t, "width", nanometres(sure(p.Bandwidth())), want, 5e-4)
	}
}

// Without loss, all light is reflected or passes.
func TestEnergyIsKept(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	worst := 0.0
	for range 3000 {
		s := randomStack(rng, true)
		angle, pol := degrees(70*rng.Float64()), Polarization(rng.IntN(3))
		sum := sure(Reflectivity(s, 13.5*nm, angle, pol, 0)).Value + sure(Transmittance(s, 13.5*nm, angle, pol)).Value
		near.Abs(t, "R + T", float64(sum), 1, 1e-12)
		worst = max(worst, math.Abs(float64(sum)-1))
	}
	t.Logf("largest |R + T − 1| %.2g", worst)
}

// A film that is cut in two is the same film; the other way round, a stack
// passes the same light, and without loss it reflects the same.
func TestCutAndTurned(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	for i := range 1000 {
		lossless := i%2 == 0
		s := randomStack(rng, lossless)
		cut := Stack{}
		for _, r := range s.Repeats {
			var layers []Layer
			for _, l := range r.Layers {
				part := units.Length(rng.Float64())
				if part == 0 {
					continue
				}
				layers = append(layers, Layer{Medium: l.Medium, Thickness: part * l.Thickness}, Layer{Medium: l.Medium, Thickness: (1 - part) * l.Thickness})
			}
			cut.Repeats = append(cut.Repeats, Periods(r.Times, layers...))
		}
		turned := Stack{Repeats: slices.Clone(s.Repeats)}
		slices.Reverse(turned.Repeats)
		for i := range turned.Repeats {
			turned.Repeats[i].Layers = slices.Clone(turned.Repeats[i].Layers)
			slices.Reverse(turned.Repeats[i].Layers)
		}
		angle, pol := degrees(70*rng.Float64()), Polarization(rng.IntN(3))
		r := func(s Stack) float64 { return float64(sure(Reflectivity(s, 13.5*nm, angle, pol, 0)).Value) }
		passes := func(s Stack) float64 { return float64(sure(Transmittance(s, 13.5*nm, angle, pol)).Value) }
		near.Abs(t, "R of the cut stack", r(cut), r(s), 1e-12)
		near.Abs(t, "T of the cut stack", passes(cut), passes(s), 1e-12)
		near.Abs(t, "T of the turned stack", passes(turned), passes(s), 1e-12)
		if lossless {
			near.Abs(t, "R of the turned stack", r(turned), r(s), 1e-12)
		}
	}
}

// A millimetre of tin is a half space of tin, at every angle; nothing passes.
func TestThickAbsorber(t *testing.T) {
	sn := solid(t, "Sn")
	thick := Stack{Repeats: []Repeat{Periods(1000, Layer{Medium: sn, Thickness: 1e-6})}}
	mixed := Stack{Repeats: []Repeat{Periods(1000, Layer{Medium: sn, Thickness: 1e-6}, Layer{Medium: solid(t, "Mo"), Thickness: 1e-6})}}
	for _, angle := range []float64{0, 6, 45, 80, 89, 89.99} {
		for _, pol := range []Polarization{PolarizationS, PolarizationP, Unpolarised} {
			half := float64(sure(Reflectivity(Surface{Medium: sn}, 13.5*nm, degrees(angle), pol, 0)).Value)
			for _, s := range []Stack{thick, mixed} {
				near.Rel(t, "R", float64(sure(Reflectivity(s, 13.5*nm, degrees(angle), pol, 0)).Value), half, 1e-12)
				near.Abs(t, "T", float64(sure(Transmittance(s, 13.5*nm, degrees(angle), pol)).Value), 0, 0)
			}
		}
	}
}

// Near 90° every surface reflects all light; unpolarised is the mean of s and p.
func TestGrazing(t *testing.T) {
	ru := Surface{Medium: solid(t, "Ru")}
	near.Abs(t, "R at 89.9999°", float64(sure(Reflectivity(ru, 13.5*nm, degrees(89.9999), Unpolarised, 0)).Value), 1, 1e-4)
	s := sure(Reflectivity(ru, 13.5*nm, degrees(75), PolarizationS, 0.5*nm)).Value
	p := sure(Reflectivity(ru, 13.5*nm, degrees(75), PolarizationP, 0.5*nm)).Value
	near.Rel(t, "mean", float64(sure(Reflectivity(ru, 13.5*nm, degrees(75), Unpolarised, 0.5*nm)).Value), float64(s+p)/2, 1e-15)
	ru.Roughness = 0.5 * nm
	near.Rel(t, "roughness of its own", float64(sure(Reflectivity(ru, 13.5*nm, degrees(75), PolarizationS, 0)).Value), float64(s), 0)
}

// A faint surface loses by Névot and Croce what it loses by Debye and Waller;
// and that is the scatter of one mirror.
func TestRoughnessFactors(t *testing.T) {
	faint := Index{Delta: 1e-7}
	for _, angle := range []float64{0, 6, 30, 60} {
		smooth := sure(Reflectivity(Surface{Medium: faint}, 13.5*nm, degrees(angle), PolarizationS, 0)).Value
		rough := sure(Reflectivity(Surface{Medium: faint}, 13.5*nm, degrees(angle), PolarizationS, 1*nm)).Value
		near.Rel(t, "factor", float64(sure(DebyeWaller(1*nm, 13.5*nm, degrees(angle)))), float64(rough/smooth), 1e-6)
	}
	one := float64(sure(DebyeWaller(0.15*nm, 13.5*nm, 0)))
	near.Rel(t, "scatter of one", float64(sure(Scatter(0.15*nm, 13.5*nm, 1))), 1-one, 1e-13)
	near.Rel(t, "scatter of eleven", float64(sure(Scatter(0.15*nm, 13.5*nm, 11))), 1-math.Pow(one, 11), 1e-13)
	near.Rel(t, "scatter of hardly any roughness", float64(sure(Scatter(1e-9*nm, 13.5*nm, 1))), math.Pow(4*math.Pi*1e-9/13.5, 2), 1e-12)
}

func TestNapierianDecadic(t *testing.T) {
	for _, a := range []float64{0, 1e-3, 1, 4.2e6} {
		alpha := sure(Napierian(units.AttenuationCoefficient(a)))
		near.Rel(t, "transmission", math.Exp(-float64(alpha)*1e-7), math.Pow(10, -a*1e-7), 1e-14)
		near.Rel(t, "back", float64(sure(Decadic(alpha))), a, 1e-15)
	}
	// A factor of e instead of 10 is 2.3026: ln 10.
	near.Rel(t, "factor", float64(sure(Napierian(1))), 2.302585092994046, 1e-15)
}

// Light in a film goes the straight path: 1/cos longer at an angle.
func TestFilmAtAngle(t *testing.T) {
	f := Film{solid(t, "Si"), 50 * nm}
	straight := math.Log(float64(sure(Transmittance(f, 13.5*nm, 0, Unpolarised)).Value))
	slanted := math.Log(float64(sure(Transmittance(f, 13.5*nm, degrees(60), Unpolarised)).Value))
	near.Rel(t, "length", slanted/straight, 2, 1e-12)
	// β is enough: at 43 nm silicon has no δ.
	if passes := sure(Transmittance(f, 43*nm, 0, Unpolarised)).Value; !(passes > 0 && passes < 1) {
		t.Errorf("at 43 nm %g passes", passes)
	}
}

func TestBodiesRefuse(t *testing.T) {
	si := solid(t, "Si")
	smooth := Stack{Repeats: []Repeat{Once(Layer{Medium: si, Thickness: 10 * nm})}}
	h2 := GasColumn{Formula: sure(ParseFormula("H2")), Pressure: 5, Path: 1, Temperature: 293.15}
	onSilicon := smooth
	onSilicon.Substrate = si
	const r, pass = "reflectivity", "transmittance"
	for _, c := range []struct {
		body        Body
		asked, want string
		angle       float64
	}{
		{smooth.WithRoughness(0.5 * nm), pass, "smooth stack", 0},
		{onSilicon, pass, "leave the substrate out", 0},
		{Surface{Medium: si}, pass, "half space", 0},
		{Surface{}, r, "give a material", 0},
		{Surface{Medium: si, Roughness: -1}, r, "roughness", 0},
		{Film{si, 1 * nm}, r, "absorbs only", 0},
		{Film{si, -1 * nm}, pass, "thickness", 0},
		{Film{Material{}, 1 * nm}, pass, "formula", 0},
		{h2, r, "gas does not reflect", 0},
		{h2, pass, "path of a gas column", 6},
		{GasColumn{Formula: h2.Formula, Pressure: -1, Path: 1, Temperature: 293}, pass, "pressure", 0},
		{GasColumn{Formula: h2.Formula, Pressure: 1, Path: 1}, pass, "temperature", 0},
		{GasColumn{Pressure: 1, Path: 1, Temperature: 293}, pass, "formula", 0},
		{Stack{}, r, "layers", 0},
		{Stack{Repeats: []Repeat{Periods(0, Layer{Medium: si, Thickness: nm})}}, r, "times", 0},
		{Stack{Repeats: []Repeat{Periods(1<<40, Layer{Medium: si, Thickness: nm})}}, r, "repeated at most", 0},
		{Stack{Repeats: []Repeat{Once(Layer{Medium: si})}}, r, "thickness", 0},
		{Stack{Repeats: []Repeat{Once(Layer{Thickness: nm})}}, r, "medium", 0},
		{Stack{Repeats: []Repeat{Once(Layer{Medium: Index{Beta: -0.1}, Thickness: nm})}}, r, "beta", 0},
		{Stack{Repeats: []Repeat{Once(Layer{Medium: Index{Delta: 1}, Thickness: nm})}}, r, "delta", 0},
		{smooth, r, "angle", 90},
		{smooth, r, "angle", -1},
		{nil, r, "no body", 0},
	} {
		var v Warned[units.Ratio]
		var err error
		if c.asked == r {
			v, err = Reflectivity(c.body, 13.5*nm, degrees(c.angle), Unpolarised, 0)
		} else {
			v, err = Transmittance(c.body, 13.5*nm, degrees(c.angle), Unpolarised)
		}
		var asBody *BodyError
		var asArgument *ArgumentError
		var asFormula *FormulaError
		switch {
		case !errors.As(err, &asBody) && !errors.As(err, &asArgument) && !errors.As(err, &asFormula):
			t.Errorf("%v: %v, %v", c.body, v, err)
		case !strings.Contains(err.Error(), c.want):
			t.Errorf("%v: %q, want %q", c.body, err, c.want)
		}
	}
	if _, err := Reflectivity(smooth, 13.5*nm, 0, Unpolarised, 1*nm); err == nil {
		t.Error("a stack takes a roughness as an argument")
	}
	if _, err := smooth.ReflectedAmplitude(13.5*nm, degrees(6), Unpolarised); err == nil {
		t.Error("unpolarised light has an amplitude")
	}
	if _, err := smooth.WithRoughness(1*nm).TransmittedAmplitude(13.5*nm, 0, PolarizationS); err == nil {
		t.Error("a rough stack has a transmitted amplitude")
	}
}

// What does not fall to half its height, or has no maximum, is said so.
func TestPeakRefused(t *testing.T) {
	s := mirror(t, 50, 6.95*nm, 0)
	if _, err := PeakReflectivity(s, 0, 17*nm); err == nil {
		t.Error("a peak far from the mirror's")
	}
	flat := mirror(t, 2, 6.95*nm, 0)
	if p, err := flat.Peak(0, Unpolarised, 13.5*nm); err == nil {
		if _, err := p.Bandwidth(); err == nil {
			t.Errorf("two bilayers have a bandwidth near 13.5 nm: %v", p)
		}
	}
	if _, err := PeakReflectivity(Stack{}, 0, 13.5*nm); err == nil {
		t.Error("the zero stack has a peak")
	}
	for _, c := range [][3]units.Length{{14 * nm, 13 * nm, nm}, {13 * nm, 14 * nm, 0}, {0, 1, 1}, {13 * nm, units.Length(math.NaN()), nm}} {
		if _, err := FindPeak(ReflectivityOf(s, 0, PolarizationS), c[0], c[1], c[2]); err == nil {
			t.Errorf("FindPeak takes %v", c)
		}
	}
}

// After the first question the evaluator allocates nothing, also when
// thicknesses and densities change.
func TestEvaluatorAllocatesNothing(t *testing.T) {
	s := mirror(t, 50, 6.95*nm, 2.5*nm)
	si := solid(t, "Si")
	s.Substrate = &si // a pointer: putting a Material there anew would allocate
	film := Film{si, 50 * nm}
	var e Evaluator
	if err := e.Aim(grid(200), degrees(6), Unpolarised); err != nil {
		t.Fatal(err)
	}
	dst := make([]units.Ratio, 200)
	var mirror, foil Body = &s, &film
	allocs := testing.AllocsPerRun(100, func() {
		s.Repeats[0].Layers[0].Thickness += 1e-15
		si.Density++
		film.Thickness += 1e-15
		if err := errors.Join(e.Reflectivity(dst, mirror), e.Transmittance(dst, foil)); err != nil {
			t.Fatal(err)
		}
	})
	if allocs != 0 {
		t.Errorf("%g allocations", allocs)
	}
	want := sure(Reflectivity(s, grid(200)[77], degrees(6), Unpolarised, 0)).Value
	if err := e.Reflectivity(dst, mirror); err != nil {
		t.Fatal(err)
	}
	near.Rel(t, "one by one", float64(dst[77]), float64(want), 1e-13)
	if err := e.Reflectivity(dst[1:], mirror); err == nil {
		t.Error("a short dst is taken")
	}
}
