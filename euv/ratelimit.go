package euv

import (
	"math"

	"example.com/dosewright/internal/num"
	"example.com/dosewright/units"
)

// RateLimitLow is the lower confidence limit of the number of events per
// trial, from a count of events. No event gives 0.
//
//	P(X ≥ events) = (1 − confidence)/sides,   X Poisson with mean limit · trials,
//
// which is limit · trials = ½ χ² at (1 − confidence)/sides with 2 events
// degrees of freedom. events and trials are whole numbers, trials greater than
// 0, events at most trials; confidence is greater than 0 and less than 1;
// sides is 1 for a limit on one side, 2 for one of the two ends of an interval
// that holds confidence between them. Events count as rare: when they are many
// per trial the limits lie wider than those of a binomial count, and may pass
// 1. Errors: *ArgumentError. Source: N. Gehrels, Astrophys. J. 303, 336
// (1986), equations 1 and 2.
func RateLimitLow(events, trials units.Count, confidence units.Ratio, sides units.Count) (units.Ratio, error) {
	if err := observed(events, trials, confidence, sides); err != nil || events == 0 {
		return 0, err
	}
	outside, inside := split(confidence, sides)
	mean, err := meanWith(float64(events-1), inside, outside)
	return units.Ratio(mean / float64(trials)), err
}

// RateLimitHigh is the upper confidence limit of the number of events per
// trial, from a count of events, which may be 0.
//
//	P(X ≤ events) = (1 − confidence)/sides,   X Poisson with mean limit · trials,
//
// which is limit · trials = ½ χ² at 1 − (1 − confidence)/sides with
// 2 events + 2 degrees of freedom. Arguments, errors and source are those of
// RateLimitLow.
func RateLimitHigh(events, trials units.Count, confidence units.Ratio, sides units.Count) (units.Ratio, error) {
	if err := observed(events, trials, confidence, sides); err != nil {
		return 0, err
	}
	outside, inside := split(confidence, sides)
	mean, err := meanWith(float64(events), outside, inside)
	return units.Ratio(mean / float64(trials)), err
}

func observed(events, trials units.Count, confidence units.Ratio, sides units.Count) error {
	err := first(whole("events", events), whole("trials", trials), positive("trials", trials),
		within("confidence", confidence), either("sides", sides, 1, 2))
	if err == nil && events > trials {
		err = outside("events", events, "at most the number of trials")
	}
	return err
}

// split returns the probability outside one limit and what is left, each with
// its digits.
func split(confidence units.Ratio, sides units.Count) (outside, inside float64) {
	c, s := float64(confidence), float64(sides)
	return (1 - c) / s, (s - 1 + c) / s
}

// meanWith is the mean of a Poisson count with P(X ≤ k) = p and P(X > k) = q,
// where p + q is 1.
func meanWith(k, p, q float64) (float64, error) {
	logP, logQ := logOfComplement(p, q), logOfComplement(q, p)
	if k == 0 {
		return -logP, nil
	}
	f := func(mean float64) float64 { return poissonAtMost(k, mean) - logP }
	if q < p {
		f = func(mean float64) float64 { return logQ - poissonAtLeast(k+1, mean) }
	}
	// P(X > k) is at most mean^(k+1)/(k+1)!, and P(X ≤ k) at most
	// exp(−(√mean − √k)²); a little more room holds the rounding
	factorial, _ := math.Lgamma(k + 2)
	least := math.Exp((factorial + logQ) / (k + 1))
	most := math.Sqrt(k) + math.Sqrt(-logP)
	return num.Root(f, least*(1-1e-6), most*most*(1+1e-6), 0)
}
