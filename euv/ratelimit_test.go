package euv

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/mathext"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// Check 18, and rows of the tables. Source: N. Gehrels, Astrophys. J. 303, 336
// (1986): the equations in closed form for no event; one sigma (0.8413)
// and 0.95 limits of one event from tables 1 and 2 (from memory).
func TestRateLimitsPublished(t *testing.T) {
	for _, c := range []struct {
		events     units.Count
		confidence units.Ratio
		sides      units.Count
		low, high  float64
		tol        float64
	}{
		{0, 0.95, 2, 0, 3.6889, 0.5e-4},
		{0, 0.95, 1, 0, 2.9957, 0.5e-4},
		{0, 0.8413447, 1, 0, 1.841, 0.5e-3},
		{1, 0.8413447, 1, 0.173, 3.300, 0.5e-3},
		{1, 0.95, 1, 0.0513, 4.744, 0.5e-3},
	} {
		const trials = 1e6
		what := fmt.Sprintf("%g events, confidence %g, sides %g", c.events, c.confidence, c.sides)
		near.Abs(t, what+", low", trials*float64(good(RateLimitLow(c.events, trials, c.confidence, c.sides))), c.low, c.tol)
		near.Abs(t, what+", high", trials*float64(good(RateLimitHigh(c.events, trials, c.confidence, c.sides))), c.high, c.tol)
	}
	near.Rel(t, "one trial", float64(good(RateLimitHigh(0, 1, 0.95, 2))), -math.Log(0.025), 1e-14)
}

// The definition: with the limit as mean, exact sums give the probability that
// was asked for.
func TestRateLimitsAgainstExactSums(t *testing.T) {
	for _, events := range []int{0, 1, 2, 5, 20, 100, 101, 700, 3000} {
		for _, confidence := range []float64{1e-200, 1e-6, 0.05, 0.5, 0.6827, 0.95, 0.99, 1 - 1e-9} {
			for _, sides := range []float64{1, 2} {
				n, c, s := units.Count(events), units.Ratio(confidence), units.Count(sides)
				outside := (1 - confidence) / sides
				what := fmt.Sprintf("%d events, confidence %g, sides %g", events, confidence, sides)
				const trials = 1e7
				low := trials * float64(good(RateLimitLow(n, trials, c, s)))
				high := trials * float64(good(RateLimitHigh(n, trials, c, s)))

				// a last digit of the limit moves the probability by this much
				tol := 1e-14 * (10 + math.Abs(math.Log(outside))) * (1 + math.Sqrt(float64(events)))
				p, _ := bigPoisson(events, high)
				got, _ := p.Float64()
				near.Rel(t, what+", high", got, outside, tol)
				if events == 0 {
					if low != 0 {
						t.Errorf("%s: low is %g", what, low)
					}
					continue
				}
				_, p = bigPoisson(events, low)
				got, _ = p.Float64()
				near.Rel(t, what+", low", got, outside, tol)
				if sides == 2 && low > high {
					t.Errorf("%s: low %g, high %g", what, low, high)
				}
			}
		}
	}
}

// The chi-square form: ½ χ² is the inverse of the regularised incomplete gamma
// function.
func TestRateLimitsAreChiSquare(t *testing.T) {
	for _, events := range []float64{1, 3, 12, 60, 400} {
		const trials, tail = 1000, 0.025
		what := fmt.Sprintf("%g events", events)
		near.Rel(t, what+", low", trials*float64(good(RateLimitLow(units.Count(events), trials, 0.95, 2))),
			mathext.GammaIncRegCompInv(events, 1-tail), 1e-10)
		near.Rel(t, what+", high", trials*float64(good(RateLimitHigh(units.Count(events), trials, 0.95, 2))),
			mathext.GammaIncRegCompInv(events+1, tail), 1e-10)
	}
}

// Extremes of confidence and counts still give limits in order.
func TestRateLimitsExtremes(t *testing.T) {
	for _, events := range []units.Count{0, 1, 50, 1e6, 1e12, 9e15} {
		for _, confidence := range []units.Ratio{5e-324, 1e-17, 0.5, 1 - 0x1p-53} {
			for _, sides := range []units.Count{1, 2} {
				low, err := RateLimitLow(events, 9e15, confidence, sides)
				high, err2 := RateLimitHigh(events, 9e15, confidence, sides)
				if err != nil || err2 != nil {
					t.Errorf("%g events, confidence %g, sides %g: %v, %v", events, confidence, sides, err, err2)
				}
				rate := events / 9e15
				if sides == 2 && !(float64(low) <= float64(rate)*1.000001 && float64(high) >= float64(rate)*0.999999) {
					t.Errorf("%g events, confidence %g: %g to %g", events, confidence, low, high)
				}
			}
		}
	}
}

func BenchmarkRateLimitHigh(b *testing.B) {
	for b.Loop() {
		if _, err := RateLimitHigh(12, 1e9, 0.95, 2); err != nil {
			b.Fatal(err)
		}
	}
}
