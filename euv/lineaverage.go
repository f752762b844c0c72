package euv

import (
	"math"

	"example.com/dosewright/units"
)

// LineAverage is the standard deviation of the mean of a width (or an edge)
// along a line of some length, when sigma is that of a single place and the
// deviations fade from each other as exp(−|y|/correlation_length).
//
//	σ² of the mean = sigma² · 2 (x − 1 + e^(−x))/x²,   x = length/correlation_length
//
// sigma is in m, 0 or greater; correlationLength and length are in m, greater
// than 0. The result has the same multiple of sigma. Errors: *ArgumentError.
// Source: the double integral of the exponential autocorrelation over the line.
func LineAverage(sigma, correlationLength, length units.Length) (units.Length, error) {
	err := first(notNegative("sigma", sigma), positive("correlation_length", correlationLength), positive("length", length))
	if err != nil {
		return 0, err
	}
	x := float64(length) / float64(correlationLength)
	return units.Length(float64(sigma) * math.Sqrt(averaging(x))), nil
}

// averaging is 2 (x − 1 + e^(−x))/x²; below 0.1 by its series, since the
// difference would lose digits.
func averaging(x float64) float64 {
	if x < 0.1 {
		return 1 - x/3*(1-x/4*(1-x/5*(1-x/6*(1-x/7*(1-x/8*(1-x/9*(1-x/10)))))))
	}
	return 2 * (1 + math.Expm1(-x)/x) / x
}
