package euv

import (
	"math"

	"example.com/dosewright/units"
)

// Failures is the mean number of failures among many features that fail with
// one probability each.
//
//	failures = probability · features
//
// probability lies between 0 and 1; features is 0 or greater. Errors:
// *ArgumentError. Source: the mean of a binomial count.
func Failures(probability units.Ratio, features units.Count) (units.Count, error) {
	if err := first(fraction("probability", probability), notNegative("features", features)); err != nil {
		return 0, err
	}
	return units.Count(float64(probability) * float64(features)), nil
}

// NoFailure is the probability that none of many features fails.
//
//	P = exp(−probability · features)
//
// probability lies between 0 and 1 and is meant to be small; features is 0 or
// greater. Errors: *ArgumentError. Source: the Poisson limit of
// (1 − probability)^features.
func NoFailure(probability units.Ratio, features units.Count) (units.Ratio, error) {
	failures, err := Failures(probability, features)
	if err != nil {
		return 0, err
	}
	return units.Ratio(math.Exp(-float64(failures))), nil
}

// YieldOf is the fraction of dies without a killing defect, when defects are
// strewn without order.
//
//	yield = exp(−defect_density · area)
//
// defectDensity is in 1/m², area in m², both 0 or greater. Errors:
// *ArgumentError. Source: the Poisson probability of no event.
func YieldOf(defectDensity units.ArealDensity, area units.Area) (units.Ratio, error) {
	if err := first(notNegative("defect_density", defectDensity), notNegative("area", area)); err != nil {
		return 0, err
	}
	return units.Ratio(math.Exp(-float64(defectDensity) * float64(area))), nil
}
