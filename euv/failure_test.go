package euv

import (
	"fmt"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func TestMissingAndMergingAgainstExactSums(t *testing.T) {
	for _, mean := range []float64{0.5, 12, 90, 200, 1500, 5000} {
		for percent := 0; percent <= 200; percent += 10 {
			threshold := units.Ratio(float64(percent) / 100)
			// the count in whole numbers: mean is a whole number of halves
			product := int(2*mean) * percent
			below, above := product/200, (product+199)/200
			what := fmt.Sprintf("mean %g, %d %%", mean, percent)

			atMost, _ := bigPoisson(below, mean)
			checkTail(t, "missing, "+what, logMissing(mean, float64(threshold)), atMost)
			near.Abs(t, "log10 missing, "+what, float64(good(Log10MissingProbability(units.Count(mean), threshold))),
				bigLog10(atMost), 1e-13*math.Max(1, -bigLog10(atMost)))

			_, atLeast := bigPoisson(above, mean)
			checkTail(t, "merging, "+what, logMerging(mean, float64(threshold)), atLeast)
			near.Abs(t, "log10 merging, "+what, float64(good(Log10MergingProbability(units.Count(mean), threshold))),
				bigLog10(atLeast), 1e-13*math.Max(1, -bigLog10(atLeast)))
		}
	}
}

// 0.7 × 90 is 62.99999999999999 in float64, 1.1 × 90 is 99.00000000000001, and
// the same for many others: every pair of percents and counts is right.
func TestProductsAreGuarded(t *testing.T) {
	if p := 0.7 * float64(units.Count(90)); wholeBelow(p) != 63 {
		t.Errorf("0.7 of 90 is %g", wholeBelow(p))
	}
	wrong := 0
	for mean := 1; mean <= 3000; mean++ {
		for percent := 1; percent < 300; percent++ {
			product := float64(percent) / 100 * float64(mean)
			if got, want := wholeBelow(product), mean*percent/100; got != float64(want) {
				t.Errorf("%d %% of %d, below: %g", percent, mean, got)
			}
			if got, want := wholeAbove(product), (mean*percent+99)/100; got != float64(want) {
				t.Errorf("%d %% of %d, above: %g", percent, mean, got)
			}
			if math.Floor(product) != float64(mean*percent/100) {
				wrong++
			}
		}
	}
	if wrong == 0 {
		t.Error("the guard was never needed: the test tests nothing")
	}
	near.Rel(t, "missing, 0.7 of 90", float64(good(MissingProbability(90, 0.7)).Value),
		float64(good(PoissonAtMost(63, 90)).Value), 0)
	near.Rel(t, "merging, 1.1 of 90", float64(good(MergingProbability(90, 1.1)).Value),
		float64(good(PoissonAtLeast(99, 90)).Value), 0)
}

// Where the probability leaves float64 the plain form warns and the logarithm
// goes on.
func TestBelowFloat64(t *testing.T) {
	p := good(MissingProbability(1e5, 0.5))
	if p.Value != 0 || len(p.Warnings) != 1 {
		t.Errorf("got %v, want 0 and a warning", p)
	}
	atMost, _ := bigPoisson(50000, 1e5)
	near.Rel(t, "log10", float64(good(Log10MissingProbability(1e5, 0.5))), bigLog10(atMost), 1e-13)
	if p := good(MissingProbability(0, 0.5)); p.Value != 1 {
		t.Errorf("nothing expected: %v", p)
	}
	if p := good(MergingProbability(0, 2)); p.Value != 1 || len(p.Warnings) != 0 {
		t.Errorf("nothing expected, none asked for: %v", p)
	}
}

// Check 19. Source: exact sums (the scan below).
func TestMeanForFailureStaircase(t *testing.T) {
	if n := good(MeanForFailure(0.5, 1e-10)); n != 135 {
		t.Errorf("got %g, want 135", n)
	}
	for n, holds := range map[units.Count]bool{133: true, 134: false, 135: true} {
		if p := good(MissingProbability(n, 0.5)).Value; (p <= 1e-10) != holds {
			t.Errorf("mean %g: probability %g", n, p)
		}
	}
}

func TestMeanForFailureAgainstScan(t *testing.T) {
	cases := 0
	for thousandths := 0; thousandths <= 960; thousandths += 20 {
		for _, p := range []float64{0.9, 0.5, 0.1, 1e-3, 1e-7, 1e-10, 1e-13, 1e-30, 1e-200} {
			threshold := float64(thousandths) / 1000
			got := int(good(MeanForFailure(units.Ratio(threshold), units.Ratio(p))))
			if got > 30000 {
				continue // the scan would be long
			}
			cases++
			last := 0 // the last mean that fails; 0 does, with probability 1
			for n := 1; n <= 2*got+200; n++ {
				if poissonAtMost(float64(n*thousandths/1000), float64(n)) > math.Log(p) {
					last = n
				}
			}
			if got != last+1 {
				t.Errorf("threshold %g, probability %g: got %d, the scan says %d", threshold, p, got, last+1)
			}
		}
	}
	if cases < 400 {
		t.Errorf("only %d cases scanned", cases)
	}
	t.Logf("%d cases scanned", cases)
}

// With no photon allowed the answer is −ln p, rounded up.
func TestMeanForFailureEdges(t *testing.T) {
	for _, c := range []struct {
		threshold, probability units.Ratio
		want                   units.Count
	}{{0, 1e-10, 24}, {1e-300, 1e-10, 24}, {0, 0.9, 1}, {0, 5e-324, 745}} {
		if got := good(MeanForFailure(c.threshold, c.probability)); got != c.want {
			t.Errorf("threshold %g, probability %g: got %g, want %g", c.threshold, c.probability, got, c.want)
		}
	}
	n := good(MeanForFailure(0.999, 1e-300))
	for _, m := range []units.Count{n, n + 1, n + 2, n + 10000} {
		if log := good(Log10MissingProbability(m, 0.999)); log > -300 {
			t.Errorf("mean %g: log10 of the probability is %g", m, log)
		}
	}
	if log := good(Log10MissingProbability(n-1, 0.999)); log <= -300 {
		t.Errorf("mean %g holds too: %g", n-1, log)
	}
}

func TestFailuresAndYield(t *testing.T) {
	near.Rel(t, "failures", float64(good(Failures(1e-10, 5e9))), 0.5, 1e-15)
	// twin: (1 − p)^n in its Poisson limit, right to n p²/2
	near.Rel(t, "no failure", float64(good(NoFailure(1e-10, 5e9))), math.Exp(5e9*math.Log1p(-1e-10)), 1e-10)
	// 0.1/cm² on 0.8 cm²
	near.Rel(t, "yield", float64(good(YieldOf(1e3, 0.8e-4))), 0.92311634638663576, 1e-15)
}

func BenchmarkMissingProbability(b *testing.B) {
	for b.Loop() {
		if _, err := MissingProbability(1e6, 0.995); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkMeanForFailure(b *testing.B) {
	for _, threshold := range []units.Ratio{0.5, 0.9, 0.999} {
		b.Run(fmt.Sprintf("threshold=%g", threshold), func(b *testing.B) {
			for b.Loop() {
				if _, err := MeanForFailure(threshold, 1e-10); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
