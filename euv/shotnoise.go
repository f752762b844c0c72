package euv

import (
	"math"

	"example.com/dosewright/units"
)

// ShotNoise is the relative standard deviation of a photon count, one sigma.
//
//	noise = 1/√count
//
// count is the mean number of absorbed photons, greater than 0. Errors:
// *ArgumentError. Source: the variance of a Poisson count is its mean.
func ShotNoise(count units.Count) (units.Ratio, error) {
	if err := positive("count", count); err != nil {
		return 0, err
	}
	return units.Ratio(1 / math.Sqrt(float64(count))), nil
}

// YieldNoise is the relative standard deviation, one sigma, of the number of
// events when each absorbed photon makes a random number of them.
//
//	noise = √((1 + variance/mean²)/count)
//
// count is the mean number of absorbed photons, greater than 0; mean and
// variance are those of the number of events per photon (electrons, acids),
// mean greater than 0, variance 0 or greater. Errors: *ArgumentError. Source:
// the variance of a random sum (Burgess; see A. van der Ziel, Noise in
// Measurements, 1976; from memory).
func YieldNoise(count, mean, variance units.Count) (units.Ratio, error) {
	err := first(positive("count", count), positive("mean", mean), notNegative("variance", variance))
	if err != nil {
		return 0, err
	}
	spread := math.Sqrt(float64(variance)) / float64(mean)
	return answer("yield_noise", units.Ratio(math.Hypot(1, spread)/math.Sqrt(float64(count))))
}
