package euv

import (
	"fmt"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func TestPoissonTailsAgainstExactSums(t *testing.T) {
	cases, worst := 0, 0.0
	check := func(k, mean float64) {
		cases++
		atMost, atLeast := bigPoisson(int(k), mean)
		worst = max(worst,
			checkTail(t, fmt.Sprintf("P(X ≤ %g), mean %g", k, mean), poissonAtMost(k, mean), atMost),
			checkTail(t, fmt.Sprintf("P(X ≥ %g), mean %g", k, mean), poissonAtLeast(k, mean), atLeast))
	}
	for _, mean := range []float64{1e-9, 0.01, 0.5, 1, 2.75, 5, 17.3, 60, 90, 109.5, 200, 690.7, 900, 1000.25, 4000, 20000} {
		for _, z := range []float64{-39, -37, -33, -25, -18, -12, -6, -3, -1, -0.1, 0, 0.1, 1, 3, 6, 12, 18, 25, 33, 37, 39} {
			if k := math.Floor(mean + z*math.Sqrt(mean)); k >= 0 {
				check(k, mean)
			}
		}
		for k := range 12 {
			check(float64(k), mean)
		}
		for k := 97; k < 105; k++ { // where the method changes
			check(float64(k), mean)
		}
	}
	t.Logf("%d pairs of tails, worst relative error %.2g", cases, worst)
}

// The tails of 1e-250 keep ten digits.
func TestPoissonDigitsFarOut(t *testing.T) {
	for _, mean := range []float64{600, 1000, 5000} {
		for k := math.Floor(mean); ; k-- {
			if log := poissonAtMost(k, mean); log < -575 {
				atMost, _ := bigPoisson(int(k), mean)
				w, _ := atMost.Float64()
				near.Rel(t, fmt.Sprintf("P(X ≤ %g), mean %g", k, mean), float64(good(PoissonAtMost(units.Count(k), units.Count(mean))).Value), w, 1e-11)
				break
			}
		}
	}
}

// Far tails: an exact sum at a million, and one below what float64 holds.
func TestPoissonAtAMillion(t *testing.T) {
	if testing.Short() {
		t.Skip("adds a million big terms")
	}
	for _, k := range []float64{970000, 999000} {
		atMost, _ := bigPoisson(int(k), 1e6)
		checkTail(t, fmt.Sprintf("P(X ≤ %g), mean 1e6", k), poissonAtMost(k, 1e6), atMost)
	}
}

// Check 16. Source: any table of the Poisson distribution, mean 5.
func TestPoissonTable(t *testing.T) {
	below := 0.0
	for k, want := range []float64{0.0067, 0.0337, 0.0842, 0.1404} {
		p := float64(good(PoissonAtMost(units.Count(k), 5)).Value)
		near.Abs(t, fmt.Sprintf("P(X = %d)", k), p-below, want, 0.5e-4)
		below = p
	}
}

// Check 17. Source: exact sums; the normal tail of the same deviation is wrong
// both ways.
func TestPoissonIsNoGaussian(t *testing.T) {
	near.Rel(t, "P(X ≤ 100), mean 200", float64(good(PoissonAtMost(100, 200)).Value), 3.72e-15, 2e-3)
	near.Rel(t, "P(X ≥ 300), mean 200", float64(good(PoissonAtLeast(300, 200)).Value), 2.71e-11, 2e-3)
	near.Rel(t, "normal", float64(good(NormalAbove(units.Ratio(100/math.Sqrt(200)))).Value), 7.69e-13, 2e-3)
}

func TestPoissonEdges(t *testing.T) {
	for _, c := range []struct {
		what string
		got  Warned[units.Ratio]
		want units.Ratio
		warn int
	}{
		{"none at most, none expected", good(PoissonAtMost(0, 0)), 1, 0},
		{"seven at most, none expected", good(PoissonAtMost(7, 0)), 1, 0},
		{"none at least", good(PoissonAtLeast(0, 8)), 1, 0},
		{"none at least, none expected", good(PoissonAtLeast(0, 0)), 1, 0},
		{"one at least, none expected", good(PoissonAtLeast(1, 0)), 0, 0},
		{"below float64", good(PoissonAtMost(0, 5000)), 0, 1},
	} {
		if c.got.Value != c.want || len(c.got.Warnings) != c.warn {
			t.Errorf("%s: got %v", c.what, c.got)
		}
	}
	// Huge counts stay finite and in order.
	for _, mean := range []float64{1e9, 1e12, 9e15} {
		z := 3.0
		k := math.Floor(mean - z*math.Sqrt(mean))
		p := float64(good(PoissonAtMost(units.Count(k), units.Count(mean))).Value)
		// the normal tail with the first term of its skewness:
		// Φ(−x) + (x²−1)φ(x)/(6√mean), x at half a count above k (Edgeworth)
		x := (mean - k - 0.5) / math.Sqrt(mean)
		density := math.Exp(-x*x/2) / math.Sqrt(2*math.Pi)
		want := 0.5*math.Erfc(x/math.Sqrt2) - (x*x-1)*density/(6*math.Sqrt(mean))
		near.Rel(t, fmt.Sprintf("three sigma below %g", mean), p, want, 1e-7)
	}
}

func BenchmarkPoissonAtMost(b *testing.B) {
	for _, c := range []struct {
		name        string
		count, mean units.Count
	}{{"mean=20", 10, 20}, {"mean=200", 100, 200}, {"mean=1e6", 995000, 1e6}, {"mean=1e6,near", 999990, 1e6}} {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := PoissonAtMost(c.count, c.mean); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
