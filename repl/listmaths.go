package repl

import (
	"errors"
	"math"
	"slices"

	"gonum.org/v1/gonum/stat"
)

// total adds with a running compensation (Neumaier 1974), so that a list of
// large values with small differences keeps its digits.
func total(x []float64) float64 {
	sum, lost := 0.0, 0.0
	for _, v := range x {
		t := sum + v
		if math.Abs(sum) >= math.Abs(v) {
			lost += sum - t + v
		} else {
			lost += v - t + sum
		}
		sum = t
	}
	return sum + lost
}

// mean takes two passes, the second over what the first left.
func mean(x []float64) float64 {
	m := total(x) / float64(len(x))
	rest := 0.0
	for _, v := range x {
		rest += v - m
	}
	return m + rest/float64(len(x))
}

func deviation(x []float64) (float64, []string, error) {
	if len(x) < 2 {
		return 0, nil, errors.New("a standard deviation needs at least two values")
	}
	m := mean(x)
	sum := 0.0
	for _, v := range x {
		sum += (v - m) * (v - m)
	}
	return math.Sqrt(sum / float64(len(x)-1)), nil, nil
}

func median(x []float64) float64 {
	sorted := slices.Clone(x)
	slices.Sort(sorted)
	n := len(sorted)
	if n%2 == 0 {
		return sorted[n/2-1]/2 + sorted[n/2]/2
	}
	return sorted[n/2]
}

func rss(x []float64) float64 {
	largest := 0.0
	for _, v := range x {
		largest = max(largest, math.Abs(v))
	}
	if largest == 0 {
		return 0
	}
	sum := 0.0
	for _, v := range x {
		sum += v / largest * (v / largest)
	}
	return largest * math.Sqrt(sum)
}

// quantile is the smallest value that at least the fraction p of the list does
// not exceed: the inverse of the empirical distribution.
func quantile(x []float64) (float64, []string, error) {
	values, p := slices.Clone(x[:len(x)-1]), x[len(x)-1]
	if !(p >= 0 && p <= 1) {
		return 0, nil, errors.New("the fraction of a quantile lies between 0 and 1")
	}
	slices.Sort(values)
	return stat.Quantile(p, stat.Empirical, values, nil), nil, nil
}
