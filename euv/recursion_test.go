package euv

import (
	"math"
	"math/cmplx"
	"math/rand/v2"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// recursion is the slow oracle of the reflectivity: L. G. Parratt's recursion
// (Phys. Rev. 95, 359, 1954), one interface after the other, on the standard
// library's complex functions, with nothing shared.
func recursion(t testing.TB, s Stack, wavelength units.Length, angle units.Angle, pol Polarization) float64 {
	t.Helper()
	switch pol {
	case PolarizationS, PolarizationP:
		r := recursionAmplitude(t, s, wavelength, angle, pol)
		return real(r)*real(r) + imag(r)*imag(r)
	}
	return (recursion(t, s, wavelength, angle, PolarizationS) + recursion(t, s, wavelength, angle, PolarizationP)) / 2
}

func recursionAmplitude(t testing.TB, s Stack, wavelength units.Length, angle units.Angle, pol Polarization) complex128 {
	t.Helper()
	type slab struct {
		n         complex128
		thickness float64
		roughness float64
	}
	slabs := []slab{{n: 1}}
	add := func(m Medium, thickness, roughness units.Length) {
		n, err := m.Index(wavelength)
		if err != nil {
			t.Fatal(err)
		}
		slabs = append(slabs, slab{complex(1-n.Delta, -n.Beta), float64(thickness), float64(roughness)})
	}
	for _, r := range s.Repeats {
		for range r.Times {
			for _, l := range r.Layers {
				add(l.Medium, l.Thickness, l.Roughness)
			}
		}
	}
	if s.Substrate == nil {
		s.Substrate = Index{}
	}
	add(s.Substrate, 0, s.BottomRoughness)

	k := complex(2*math.Pi/float64(wavelength), 0)
	sin := complex(math.Sin(float64(angle)), 0)
	normal := func(n complex128) complex128 {
		g := cmplx.Sqrt(n*n - sin*sin)
		if imag(g) > 0 {
			g = -g
		}
		return k * g
	}
	var up complex128
	for i := len(slabs) - 2; i >= 0; i-- {
		a, b := slabs[i], slabs[i+1]
		g, h := normal(a.n), normal(b.n)
		var r complex128
		if a.n != b.n {
			if pol == PolarizationP {
				r = (a.n*a.n*h - b.n*b.n*g) / (a.n*a.n*h + b.n*b.n*g)
			} else {
				r = (g - h) / (g + h)
			}
			sigma := complex(b.roughness, 0)
			r *= cmplx.Exp(-2 * g * h * sigma * sigma)
		}
		up *= cmplx.Exp(-2i * h * complex(b.thickness, 0))
		up = (r + up) / (1 + r*up)
	}
	return up
}

const nm = units.Length(1e-9)

func degrees(x float64) units.Angle { return units.Angle(x * math.Pi / 180) }

func solid(t testing.TB, symbol string) Material {
	t.Helper()
	m, err := SolidElement(symbol)
	if err != nil {
		t.Fatal(err)
	}
	return m
}

// mirror is the mirror of most tests: Si first, Γ = 0.4.
func mirror(t testing.TB, bilayers int, period units.Length, cap units.Length) Stack {
	si, mo := solid(t, "Si"), solid(t, "Mo")
	s := Stack{Substrate: si}
	if cap > 0 {
		s.Repeats = append(s.Repeats, Once(Layer{Medium: solid(t, "Ru"), Thickness: cap}))
	}
	s.Repeats = append(s.Repeats, Periods(bilayers,
		Layer{Medium: si, Thickness: 0.6 * period}, Layer{Medium: mo, Thickness: 0.4 * period}))
	return s
}

func TestReflectivityAgreesWithRecursion(t *testing.T) {
	worst := 0.0
	for _, s := range []Stack{
		mirror(t, 50, 6.95*nm, 2.5*nm),
		mirror(t, 50, 6.95*nm, 2.5*nm).WithRoughness(0.7 * nm),
		mirror(t, 1, 6.95*nm, 0),
		mirror(t, 2, 6.95*nm, 0).WithRoughness(0.3 * nm),
		mirror(t, 3, 6.95*nm, 0),
		mirror(t, 1000, 6.95*nm, 1*nm),
	} {
		for _, pol := range []Polarization{PolarizationS, PolarizationP, Unpolarised} {
			for _, angle := range []float64{0, 6, 20, 42.5, 60, 80, 89} {
				for l := 12.5 * nm; l < 14.5*nm; l += 0.0371 * nm {
					got := sure(Reflectivity(s, l, degrees(angle), pol, 0)).Value
					want := recursion(t, s, l, degrees(angle), pol)
					near.Abs(t, "R", float64(got), want, 1e-12)
					worst = math.Max(worst, math.Abs(float64(got)-want))
				}
			}
		}
	}
	t.Logf("largest difference %.2g", worst)
}

// randomStack draws a stack of one to four sequences.
func randomStack(rng *rand.Rand, lossless bool) Stack {
	index := func() Index {
		n := Index{Delta: 0.25*rng.Float64() - 0.02}
		if !lossless {
			n.Beta = 0.1 * rng.Float64() * rng.Float64()
		}
		return n
	}
	var s Stack
	for range 1 + rng.IntN(4) {
		r := Repeat{Times: 1}
		if rng.IntN(2) == 0 {
			r.Times = 1 + rng.IntN(60)
		}
		for range 1 + rng.IntN(4) {
			r.Layers = append(r.Layers, Layer{Medium: index(), Thickness: nm * units.Length(0.2+8*rng.Float64())})
		}
		s.Repeats = append(s.Repeats, r)
	}
	return s
}

func TestRandomStacksAgreeWithRecursion(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	worst := 0.0
	for range 3000 {
		s := randomStack(rng, false)
		if rng.IntN(2) == 0 {
			s.Substrate = Index{0.1 * rng.Float64(), 0.05 * rng.Float64()}
		}
		if rng.IntN(2) == 0 {
			s = s.WithRoughness(nm * units.Length(rng.Float64()))
		}
		angle := degrees(70 * rng.Float64())
		pol := Polarization(rng.IntN(3))
		got := sure(Reflectivity(s, 13.5*nm, angle, pol, 0)).Value
		want := recursion(t, s, 13.5*nm, angle, pol)
		near.Abs(t, "R", float64(got), want, 1e-12)
		worst = math.Max(worst, math.Abs(float64(got)-want))
	}
	t.Logf("largest difference %.2g", worst)
}

func TestLosslessAgreesWithRecursion(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	worst := 0.0
	for range 3000 {
		s := randomStack(rng, true)
		angle := degrees(70 * rng.Float64())
		pol := Polarization(rng.IntN(3))
		got := sure(Reflectivity(s, 13.5*nm, angle, pol, 0)).Value
		want := recursion(t, s, 13.5*nm, angle, pol)
		near.Abs(t, "R", float64(got), want, 1e-12)
		worst = math.Max(worst, math.Abs(float64(got)-want))
	}
	t.Logf("largest difference %.2g", worst)
}
