package euv

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// Check 15. Source: arithmetic on exact SI constants.
func TestAbsorptionOfAResist(t *testing.T) {
	near.Abs(t, "fraction", float64(good(AbsorbedFraction(5e6, 30e-9))), 0.13929, 0.5e-5)
	near.Abs(t, "absorbed/nm²", float64(good(AbsorbedPhotons(300, 5e6, 30e-9, 1e-18, 13.5e-9))), 2.840, 0.5e-3)
	// 300 J/m² at 5 /µm: 1.5e9 J/m³, 9.3623 eV/nm³
	near.Rel(t, "J/m³", float64(good(AbsorbedEnergyDensity(300, 5e6))), 1.5e9, 1e-15)
}

// Twin: what is absorbed in the depth adds up to the fraction, and its density
// at the top is the derivative there.
func TestAbsorptionAgainstQuadrature(t *testing.T) {
	for _, depth := range []float64{1e-15, 1e-9, 30e-9, 400e-9, 5e-6} {
		const alpha = 5e6
		sum := quad.Fixed(func(x float64) float64 { return alpha * math.Exp(-alpha*x) }, 0, depth, 40, nil, 0)
		near.Rel(t, fmt.Sprintf("fraction in %g m", depth), float64(good(AbsorbedFraction(alpha, units.Length(depth)))), sum, 1e-13)
	}
	thin := float64(good(AbsorbedFraction(5e6, 1e-18))) * 300 / 1e-18
	near.Rel(t, "top", float64(good(AbsorbedEnergyDensity(300, 5e6))), thin, 1e-11)
}

func TestShotNoiseIsThatOfACount(t *testing.T) {
	near.Rel(t, "400 photons", float64(good(ShotNoise(400))), 0.05, 1e-15)
	// twin: the spread of the Poisson distribution itself
	const mean = 30
	var square, below float64
	for k := range 200 {
		atMost := float64(good(PoissonAtMost(units.Count(k), mean)).Value)
		square += (atMost - below) * (float64(k) - mean) * (float64(k) - mean)
		below = atMost
	}
	near.Rel(t, "by the distribution", float64(good(ShotNoise(mean))), math.Sqrt(square)/mean, 1e-12)
}

// Twin: a photon makes 0, 1 or 3 events with probability 0.2, 0.5 and 0.3; the
// distribution of the total, added up photon by photon and weighed by the
// Poisson distribution of their number, has the spread of the formula.
func TestYieldNoiseAgainstDistribution(t *testing.T) {
	const photons = 12
	chance := map[int]float64{0: 0.2, 1: 0.5, 3: 0.3}
	mean := 0.5 + 3*0.3
	variance := 0.5 + 9*0.3 - mean*mean
	total, of := make([]float64, 400), make([]float64, 400)
	of[0] = 1
	weight := math.Exp(-photons)
	for n := 1; n < 100; n++ {
		for i, p := range of {
			total[i] += weight * p
		}
		weight *= photons / float64(n)
		next := make([]float64, len(of))
		for i, p := range of {
			for events, c := range chance {
				if i+events < len(next) {
					next[i+events] += p * c
				}
			}
		}
		of = next
	}
	var first, second float64
	for i, p := range total {
		first += p * float64(i)
		second += p * float64(i) * float64(i)
	}
	near.Rel(t, "mean", first, photons*mean, 1e-12)
	near.Rel(t, "noise", float64(good(YieldNoise(photons, units.Count(mean), units.Count(variance)))),
		math.Sqrt(second-first*first)/first, 1e-11)
	near.Rel(t, "always one event", float64(good(YieldNoise(photons, 1, 0))), float64(good(ShotNoise(photons))), 1e-15)
}

// Twin: an edge sits where the dose reaches a threshold; doses that are off by
// one sigma of the count move it by one sigma of the roughness.
func TestEdgeRoughnessMovesAnEdge(t *testing.T) {
	const cd, nils, count = 16e-9, 2.4, 1e8 // so many that the slope is straight
	edge := func(dose float64) float64 { return -math.Log(dose) / (nils / cd) }
	sigma := 1 / math.Sqrt(count)
	want := (edge(1-sigma) - edge(1+sigma)) / 2
	got := good(EdgeRoughness(cd, nils, count))
	near.Rel(t, "roughness", float64(got.Value), want, 1e-7)
	if len(got.Warnings) != 1 || !strings.Contains(got.Warnings[0], "model") {
		t.Errorf("warnings %q", got.Warnings)
	}
}

// Twin: the variance of the difference of two edges, and of their way back.
func TestWidthAndEdgeRoughness(t *testing.T) {
	for _, c := range []float64{-1, -0.3, 0, 0.5, 0.99} {
		const ler = 1.8e-9
		variance := ler*ler + ler*ler - 2*c*ler*ler
		lwr := good(LWROfLER(ler, units.Ratio(c)))
		near.Rel(t, fmt.Sprintf("LWR, correlation %g", c), float64(lwr), math.Sqrt(variance), 1e-14)
		near.Rel(t, "and back", float64(good(LEROfLWR(lwr, units.Ratio(c)))), ler, 1e-15)
	}
	if w := good(LWROfLER(1.8e-9, 1)); w != 0 {
		t.Errorf("a line that only wiggles has a width roughness of %g", w)
	}
}

func TestDoseForRoughnessWarns(t *testing.T) {
	for _, c := range []struct {
		now, target units.Length
		dose        units.Fluence
		warnings    int
	}{
		{2e-9, 1.6e-9, 468.75, 0},
		{2e-9, 2e-9 / math.Sqrt2, 600, 0}, // twice is not past 2x
		{2e-9, 1e-9, 1200, 1},
		{1e-9, 2e-9, 75, 1},
		{1.6e-9, 2e-9, 192, 0},
	} {
		got := good(DoseForRoughness(c.now, c.target, 300))
		near.Rel(t, "dose", float64(got.Value), float64(c.dose), 1e-14)
		if len(got.Warnings) != c.warnings {
			t.Errorf("from %g to %g: warnings %q", c.now, c.target, got.Warnings)
		}
	}
	// twin: the shot noise at the new dose is that of the target
	const now, target = 2e-9, 1.7e-9
	dose := float64(good(DoseForRoughness(now, target, 300)).Value)
	at := func(dose float64) float64 {
		return float64(good(EdgeRoughness(16e-9, 2, units.Count(dose))).Value)
	}
	near.Rel(t, "roughness at the new dose", at(dose)/at(300), target/now, 1e-14)
}

func TestZFactorSaysOfWhat(t *testing.T) {
	got := good(ZFactor(16e-9, 3.3e-9, 300, LWR, 3))
	near.Rel(t, "Z", float64(got.Value), math.Pow(16e-9, 3)*math.Pow(3.3e-9, 2)*300, 1e-14)
	if w := fmt.Sprint(got.Warnings); !strings.Contains(w, "LWR at 3 sigma") {
		t.Errorf("warnings %s", w)
	}
	if w := fmt.Sprint(good(ZFactor(16e-9, 1.5e-9, 300, LER, 1)).Warnings); !strings.Contains(w, "LER at 1 sigma") {
		t.Errorf("warnings %s", w)
	}
}

// Check 20. Source: closed form of the exponential autocorrelation.
func TestLineAverage(t *testing.T) {
	near.Abs(t, "σ 2.5 nm, ξ 35 nm, L 500 nm", float64(good(LineAverage(2.5e-9, 35e-9, 500e-9))), 0.9021e-9, 0.5e-13)
}

// Twin: the variance of the mean is the mean of the autocorrelation over all
// pairs of places, 2/L² ∫ (L − y) exp(−y/ξ) dy.
func TestLineAverageAgainstQuadrature(t *testing.T) {
	for _, x := range []float64{1e-9, 1e-3, 0.05, 0.09999, 0.1, 0.5, 3, 14.3, 80} {
		pieces, sum := 20, 0.0
		for i := range pieces {
			a, b := x*float64(i)/float64(pieces), x*float64(i+1)/float64(pieces)
			sum += quad.Fixed(func(y float64) float64 { return (x - y) * math.Exp(-y) }, a, b, 20, nil, 0)
		}
		near.Rel(t, fmt.Sprintf("length over correlation length %g", x), float64(good(LineAverage(1, 1, units.Length(x)))),
			math.Sqrt(2*sum)/x, 1e-14)
	}
	// a long line averages as 2 correlation lengths per independent place
	near.Rel(t, "long", float64(good(LineAverage(1, 1, 1e12))), math.Sqrt(2e-12), 1e-12)
}

// Check 21. Source: IUPAC Gold Book, term 09460.
func TestResistContrast(t *testing.T) {
	near.Abs(t, "positive", float64(good(ResistContrast(80, 120, Positive))), 2.8394, 0.5e-4)
	near.Abs(t, "negative", float64(good(ResistContrast(120, 80, Negative))), 2.8394, 0.5e-4)
}

// Twin: the contrast is the slope of the remaining thickness over the decimal
// logarithm of the dose, for a curve that is straight there.
func TestResistContrastIsASlope(t *testing.T) {
	for _, slope := range []float64{0.7, 3, 25, 4000} {
		const half, step = 80.0, 1e-4
		left := func(dose float64) float64 { return 0.5 - slope*math.Log10(dose/half) }
		clear := half * math.Pow(10, 0.5/slope)
		derivative := (left(half*math.Pow(10, step)) - left(half*math.Pow(10, -step))) / (2 * step)
		near.Rel(t, fmt.Sprintf("slope %g", slope), float64(good(ResistContrast(half, units.Fluence(clear), Positive))), -derivative, 1e-8)
		starts := half / math.Pow(10, 0.5/slope)
		near.Rel(t, fmt.Sprintf("slope %g, negative", slope), float64(good(ResistContrast(half, units.Fluence(starts), Negative))), -derivative, 1e-8)
	}
}

func TestWords(t *testing.T) {
	for _, c := range []struct {
		got  fmt.Stringer
		want string
	}{{LER, "LER"}, {LWR, "LWR"}, {RoughnessOf(7), "RoughnessOf(7)"}, {Positive, "positive"}, {Negative, "negative"}, {Tone(-1), "Tone(-1)"}} {
		if c.got.String() != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}

func BenchmarkAbsorbedPhotons(b *testing.B) {
	for b.Loop() {
		if _, err := AbsorbedPhotons(300, 5e6, 30e-9, 4e-16, 13.5e-9); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkLineAverage(b *testing.B) {
	for b.Loop() {
		if _, err := LineAverage(2.5e-9, 35e-9, 500e-9); err != nil {
			b.Fatal(err)
		}
	}
}
