package euv

import (
	"math"

	"example.com/dosewright/units"
)

// BlurContrast is the factor by which a Gaussian blur lowers the contrast of a
// sinusoidal image.
//
//	factor = exp(−2π² sigma²/pitch²)
//
// sigma is the standard deviation of the blur along one direction (not its full
// width), in m, 0 or greater; pitch is in m, greater than 0. Errors:
// *ArgumentError. Source: the Fourier transform of the Gaussian.
func BlurContrast(sigma, pitch units.Length) (units.Ratio, error) {
	if err := first(notNegative("sigma", sigma), positive("pitch", pitch)); err != nil {
		return 0, err
	}
	cycles := math.Pi * float64(sigma) / float64(pitch)
	return units.Ratio(math.Exp(-2 * cycles * cycles)), nil
}

// widthOfSigma is the full width at half maximum of a Gaussian over its
// standard deviation, √(8 ln 2); math.Sqrt would make it a variable.
const widthOfSigma = 2.35482004503094938202313865291939928

// SigmaOfFWHM is the standard deviation of a Gaussian with a full width at half
// maximum.
//
//	sigma = FWHM/√(8 ln 2)
//
// x is the full width, in m, 0 or greater. Errors: *ArgumentError. Source: the
// definition of the Gaussian.
func SigmaOfFWHM(x units.Length) (units.Length, error) {
	if err := notNegative("x", x); err != nil {
		return 0, err
	}
	return x / widthOfSigma, nil
}

// FWHMOfSigma is the full width at half maximum of a Gaussian with a standard
// deviation; the inverse of SigmaOfFWHM. x is the standard deviation, in m, 0
// or greater. Errors: *ArgumentError.
func FWHMOfSigma(x units.Length) (units.Length, error) {
	if err := notNegative("x", x); err != nil {
		return 0, err
	}
	return answer("fwhm_of_sigma", x*widthOfSigma)
}
