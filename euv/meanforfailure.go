package euv

import (
	"math"
	"sort"

	"example.com/dosewright/units"
)

// MeanForFailure is the smallest whole mean N from which on MissingProbability
// is at most probability: for N itself and for every larger whole mean. The
// tail is a staircase in N, so that single smaller means may pass too.
//
//	P(X ≤ ⌊threshold · N'⌋) ≤ probability   for every whole N' ≥ N
//
// threshold lies between 0 and 0.999 (nearer to 1 the answer passes 1e9),
// probability is greater than 0 and less than 1. Errors: *ArgumentError.
// Source: the definition of the distribution; a test scans all means.
func MeanForFailure(threshold, probability units.Ratio) (units.Count, error) {
	if !(threshold >= 0 && threshold <= 0.999) {
		return 0, outside("threshold", threshold, "between 0 and 0.999")
	}
	if err := within("probability", probability); err != nil {
		return 0, err
	}
	s := staircase{float64(threshold), ln(float64(probability))}
	k := s.last()
	// on this step the means below edge fail, and on none behind it does one
	edge, err := meanWith(k, float64(probability), 1-float64(probability))
	if err != nil {
		return 0, err
	}
	next := s.start(k + 1)
	mean := math.Min(math.Max(s.start(k), math.Floor(edge)-1), next)
	for mean < next && s.fails(k, mean) {
		mean++
	}
	return units.Count(mean), nil
}

// staircase is the tail P(X ≤ ⌊t·N⌋) over the whole means N, held against the
// logarithm of a probability. On step k, where ⌊t·N⌋ = k, it falls with N.
type staircase struct{ t, limit float64 }

func (s staircase) fails(k, mean float64) bool { return poissonAtMost(k, mean) > s.limit }

// start is the first mean of step k.
func (s staircase) start(k float64) float64 {
	if k == 0 {
		return 0
	}
	mean := math.Ceil(k / (s.t * (1 + slack)))
	if wholeBelow(s.t*mean) < k {
		mean++
	}
	return mean
}

// last is the last step on which a mean fails. Each step is highest at its
// start, which lies at or above k/t, and the tail at k/t itself falls with k:
// from the first k on where that holds, all steps hold. Of those below it some
// hold too, since their start lies above k/t.
func (s staircase) last() float64 {
	holds := func(k int) bool { return k > 0 && !s.fails(float64(k), math.Min(float64(k)/s.t, countable)) }
	all := 1
	for !holds(all) {
		all *= 2
	}
	k := float64(sort.Search(all, holds) - 1)
	for !s.fails(k, s.start(k)) {
		k--
	}
	return k
}
