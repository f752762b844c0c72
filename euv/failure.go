package euv

import (
	"math"

	"example.com/dosewright/units"
)

// MissingProbability is the probability that a feature stays closed because
// too few photons (or acids, electrons) were counted in it: at most threshold
// times their mean.
//
//	P = P(X ≤ ⌊threshold · mean⌋),   X Poisson with that mean
//
// mean lies between 0 and 9e15, threshold is 0 or greater, as a fraction of
// the mean. A product that rounding left just below a whole number counts as
// that number: 0.7 of 90 is 63. Digits as in PoissonAtMost; a warning below
// 1e-300, where Log10MissingProbability goes on. Errors: *ArgumentError.
// Source: the definition of the distribution.
func MissingProbability(mean units.Count, threshold units.Ratio) (Warned[units.Ratio], error) {
	if err := counted(mean, threshold, expected); err != nil {
		return Warned[units.Ratio]{}, err
	}
	return tailOf(logMissing(float64(mean), float64(threshold))), nil
}

// Log10MissingProbability is the decimal logarithm of MissingProbability,
// which also holds where that is too small for a float64. mean is greater than
// 0 and at most 9e15; the rest is as there.
func Log10MissingProbability(mean units.Count, threshold units.Ratio) (units.Ratio, error) {
	if err := counted(mean, threshold, positive); err != nil {
		return 0, err
	}
	return answer("log10_missing_probability", units.Ratio(logMissing(float64(mean), float64(threshold))/math.Ln10))
}

// MergingProbability is the probability that a feature which should stay shut
// opens because too many photons (or acids, electrons) were counted in it: at
// least threshold times their mean.
//
//	P = P(X ≥ ⌈threshold · mean⌉),   X Poisson with that mean
//
// Arguments, digits, warning and errors are those of MissingProbability; a
// product that rounding left just above a whole number counts as that number.
func MergingProbability(mean units.Count, threshold units.Ratio) (Warned[units.Ratio], error) {
	if err := counted(mean, threshold, expected); err != nil {
		return Warned[units.Ratio]{}, err
	}
	return tailOf(logMerging(float64(mean), float64(threshold))), nil
}

// Log10MergingProbability is the decimal logarithm of MergingProbability,
// which also holds where that is too small for a float64. mean is greater than
// 0 and at most 9e15; the rest is as there.
func Log10MergingProbability(mean units.Count, threshold units.Ratio) (units.Ratio, error) {
	if err := counted(mean, threshold, positive); err != nil {
		return 0, err
	}
	return answer("log10_merging_probability", units.Ratio(logMerging(float64(mean), float64(threshold))/math.Ln10))
}

// counted checks a mean, a threshold and the count that they make.
func counted(mean units.Count, threshold units.Ratio, of func(string, units.Count) error) error {
	err := first(of("mean", mean), expected("mean", mean), notNegative("threshold", threshold))
	if err == nil && float64(mean)*float64(threshold) > countable {
		err = outside("threshold", threshold, "0 or greater, and at most 9e15 divided by the mean")
	}
	return err
}

func logMissing(mean, threshold float64) float64 {
	return poissonAtMost(wholeBelow(threshold*mean), mean)
}

func logMerging(mean, threshold float64) float64 {
	return poissonAtLeast(wholeAbove(threshold*mean), mean)
}

// slack is the relative error that a product of two rounded numbers may have,
// and some more for a mean that was itself computed.
const slack = 0x1p-50

// wholeBelow is ⌊x⌋ and wholeAbove ⌈x⌉ of an x that carries rounding errors.
func wholeBelow(x float64) float64 { return math.Floor(x * (1 + slack)) }
func wholeAbove(x float64) float64 { return math.Ceil(x * (1 - slack)) }
