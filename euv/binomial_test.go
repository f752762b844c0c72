package euv

import (
	"fmt"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func TestBinomialTailsAgainstExactSums(t *testing.T) {
	cases, worst := 0, 0.0
	for _, n := range []int{1, 2, 7, 40, 99, 100, 101, 250, 1000, 4000} {
		for _, p := range []float64{1e-12, 1e-5, 0.003, 0.1, 0.3, 0.5, 0.7, 0.95, 0.9999, 1 - 0x1p-40} {
			s := math.Sqrt(float64(n) * p * (1 - p))
			seen := map[int]bool{}
			for _, z := range []float64{-38, -20, -8, -3, -1, -0.2, 0, 0.2, 1, 3, 8, 20, 30, 38} {
				seen[int(float64(n)*p+z*s)] = true
			}
			for k := range 4 {
				seen[k], seen[n-k] = true, true
			}
			for k := range seen {
				if k < 0 || k > n {
					continue
				}
				cases++
				what := fmt.Sprintf("P(X ≥ %d), %d trials of %g", k, n, p)
				worst = max(worst, checkTail(t, what,
					binomialAtLeast(float64(k), float64(n), p, 1-p), bigBinomial(k, n, p)))
			}
		}
	}
	t.Logf("%d tails, worst relative error %.2g", cases, worst)
}

// A billion trials of a rare event are a Poisson count but for p itself
// (J. L. Hodges and L. Le Cam, 1960: the tails differ by less than p).
func TestBinomialOfRareEvents(t *testing.T) {
	for _, mean := range []float64{0.1, 3, 40} {
		for _, k := range []float64{1, 2, 5, 30, 90} {
			const n = 1e9
			p := mean / n
			want := float64(good(PoissonAtLeast(units.Count(k), units.Count(mean))).Value)
			got := float64(good(BinomialAtLeast(units.Count(k), n, units.Ratio(p))).Value)
			near.Abs(t, fmt.Sprintf("P(X ≥ %g), mean %g", k, mean), got, want, p)
			// term by term they differ by a factor of about exp(−(k−mean)²/2n)
			near.Rel(t, fmt.Sprintf("P(X ≥ %g), mean %g", k, mean), got, want, k*k/n)
		}
	}
}

func TestBinomialEdges(t *testing.T) {
	for _, c := range []struct {
		count, trials units.Count
		p             units.Ratio
		want          units.Ratio
	}{{0, 0, 0.5, 1}, {0, 9, 0, 1}, {1, 9, 0, 0}, {9, 9, 1, 1}, {1, 1, 0.25, 0.25}, {2, 2, 0.5, 0.25}} {
		got := good(BinomialAtLeast(c.count, c.trials, c.p))
		near.Rel(t, fmt.Sprint(c), float64(got.Value), float64(c.want), 1e-15)
		if len(got.Warnings) > 0 {
			t.Errorf("%v: %v", c, got.Warnings)
		}
	}
}

func BenchmarkBinomialAtLeast(b *testing.B) {
	for b.Loop() {
		if _, err := BinomialAtLeast(5200, 1e6, 0.005); err != nil {
			b.Fatal(err)
		}
	}
}
