package euv

import (
	"math"

	"example.com/dosewright/units"
)

// BinomialAtLeast is the probability of count events or more in a number of
// independent trials that each succeed with probability p.
//
//	P = Σ C(trials, j) p^j (1−p)^(trials−j)   for j = count … trials
//
// count and trials are whole numbers, 0 or greater, count at most trials;
// p lies between 0 and 1. At least ten digits hold down to 1e-300; below that
// a warning says that digits are lost. Errors: *ArgumentError. Source: the
// definition of the distribution; computed from its first term after Loader
// (2000) and an exact integral.
func BinomialAtLeast(count, trials units.Count, p units.Ratio) (Warned[units.Ratio], error) {
	err := first(whole("count", count), whole("trials", trials), fraction("p", p))
	if err == nil && count > trials {
		err = outside("count", count, "at most the number of trials")
	}
	if err != nil {
		return Warned[units.Ratio]{}, err
	}
	return tailOf(binomialAtLeast(float64(count), float64(trials), float64(p), float64(1-p))), nil
}

// binomialAtLeast is ln P(X ≥ k) in n trials with p and q = 1 − p.
func binomialAtLeast(k, n, p, q float64) float64 {
	switch {
	case k == 0 || q == 0:
		return 0
	case p == 0:
		return math.Inf(-1)
	case k <= n*p:
		// fewer than k events are more than n−k failures
		return logBelowOne(binomialAtLeast(n-k+1, n, q, p))
	}
	odds := p / q
	// relative to term k: 1 + odds (n−k)/(k+1) + …; the slope is
	// k − 1 − (n−k)·odds without its cancellation
	t := tail{scale: k, down: k - 1, up: n - k, rise: odds, slope: -(beyond(k, n, p, q) + q) / q, fewest: min(k, n-k)}
	return binomialTerm(k, n, p, q) + math.Log(t.sum(func(j float64) float64 {
		return odds * (n - k - j) / (k + 1 + j)
	}))
}

// binomialTerm is ln P(X = k) for k > 0.
func binomialTerm(k, n, p, q float64) float64 {
	if k == n {
		return n * logOfComplement(p, q)
	}
	over := beyond(k, n, p, q)
	m := n - k
	return stirling(n) - stirling(k) - stirling(m) -
		deviance(k, n*p, over) - deviance(m, n*q, -over) - 0.5*math.Log(2*math.Pi*k*(m/n))
}

// beyond is n·p − k from the smaller of p and q, which has not been rounded
// against one: with a billion trials the rounding of the other would tell.
func beyond(k, n, p, q float64) float64 {
	if q < p {
		return -math.FMA(n, q, k-n)
	}
	return math.FMA(n, p, -k)
}

// logOfComplement is ln p, from the smaller of p and q = 1 − p.
func logOfComplement(p, q float64) float64 {
	if q < p {
		return math.Log1p(-q)
	}
	return ln(p)
}
