package euv

import (
	"math"

	"example.com/dosewright/units"
)

// PoissonAtMost is the probability of count events or fewer, P(X ≤ count),
// where mean are expected and the events are independent (Poisson).
//
//	P = Σ e^(−mean) mean^j / j!   for j = 0 … count
//
// count is a whole number, 0 or greater; mean lies between 0 and 9e15. At
// least ten digits hold down to 1e-300; below that a warning says that digits
// are lost.
// Errors: *ArgumentError. Source: the definition of the distribution;
// computed from its last term after Loader (2000) and an exact integral.
func PoissonAtMost(count, mean units.Count) (Warned[units.Ratio], error) {
	if err := first(whole("count", count), expected("mean", mean)); err != nil {
		return Warned[units.Ratio]{}, err
	}
	return tailOf(poissonAtMost(float64(count), float64(mean))), nil
}

// PoissonAtLeast is the probability of count events or more, P(X ≥ count),
// where mean are expected and the events are independent (Poisson).
//
//	P = Σ e^(−mean) mean^j / j!   for j = count …
//
// Arguments, digits, errors and source are those of PoissonAtMost.
func PoissonAtLeast(count, mean units.Count) (Warned[units.Ratio], error) {
	if err := first(whole("count", count), expected("mean", mean)); err != nil {
		return Warned[units.Ratio]{}, err
	}
	return tailOf(poissonAtLeast(float64(count), float64(mean))), nil
}

// tailOf turns the logarithm of a probability into the probability.
func tailOf(log float64) Warned[units.Ratio] {
	if math.IsInf(log, -1) {
		return Warned[units.Ratio]{} // impossible, which is exact
	}
	return warnTiny(math.Exp(log))
}

// warnTiny adds a warning where float64 is about to lose the digits of p.
func warnTiny(p float64) Warned[units.Ratio] {
	w := Warned[units.Ratio]{Value: units.Ratio(p)}
	if p < 1e-300 {
		w.Warnings = []string{"the probability is below 1e-300, where its digits are lost"}
	}
	return w
}

// poissonAtMost is ln P(X ≤ k). The far side is one minus the near one.
func poissonAtMost(k, mean float64) float64 {
	switch {
	case mean == 0:
		return 0
	case k >= mean:
		return logBelowOne(poissonAtLeast(k+1, mean))
	}
	// relative to term k: 1 + k/mean + k(k−1)/mean² + …
	t := tail{scale: mean, up: k, rise: 1, slope: mean - k, fewest: k}
	return poissonTerm(k, mean) + math.Log(t.sum(func(j float64) float64 { return (k - j) / mean }))
}

// poissonAtLeast is ln P(X ≥ k).
func poissonAtLeast(k, mean float64) float64 {
	switch {
	case k == 0:
		return 0
	case mean == 0:
		return math.Inf(-1)
	case k <= mean:
		return logBelowOne(poissonAtMost(k-1, mean))
	}
	// relative to term k: 1 + mean/(k+1) + mean²/((k+1)(k+2)) + …
	t := tail{scale: k, down: k - 1, slope: k - 1 - mean, fewest: k}
	return poissonTerm(k, mean) + math.Log(t.sum(func(j float64) float64 { return mean / (k + 1 + j) }))
}

// poissonTerm is ln P(X = k).
func poissonTerm(k, mean float64) float64 {
	if k == 0 {
		return -mean
	}
	return -deviance(k, mean, mean-k) - stirling(k) - 0.5*math.Log(2*math.Pi*k)
}
