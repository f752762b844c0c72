package euv

import (
	"math"

	"example.com/dosewright/units"
)

// DebyeWaller is the factor by which roughness lowers the specular intensity of
// a mirror, when all of it scatters as at one surface.
//
//	factor = exp(−(4π roughness cos(angle) / wavelength)²)
//
// roughness is rms, in m, 0 or greater; wavelength is in m, greater than 0;
// angle is taken from the normal, 0° or greater and less than 90°. Errors:
// *ArgumentError. Source: the factor of Debye and Waller for a height with a
// Gaussian distribution; exp(−2 k²σ²) on the amplitude in Névot & Croce, Rev.
// Phys. Appl. 15, 761 (1980), without refraction.
func DebyeWaller(roughness, wavelength units.Length, angle units.Angle) (units.Ratio, error) {
	err := first(notNegative("roughness", roughness), positive("wavelength", wavelength), checkAngle(angle))
	if err != nil {
		return 0, err
	}
	phase := 4 * math.Pi * float64(roughness) / float64(wavelength) * math.Cos(float64(angle))
	return units.Ratio(math.Exp(-phase * phase)), nil
}

// Scatter is the share of the light that a train of mirrors scatters out of the
// specular beam at near-normal incidence.
//
//	share = 1 − exp(−mirrors (4π roughness / wavelength)²)
//
// roughness is rms within the band of spatial frequencies that scatter out of
// the beam, in m, 0 or greater; wavelength is in m, greater than 0; mirrors is
// a whole number, 0 or greater. Errors: *ArgumentError. Source: J. E. Harvey et
// al., Opt. Eng. 51, 013402 (2012), total integrated scatter (from memory).
func Scatter(roughness, wavelength units.Length, mirrors units.Count) (units.Ratio, error) {
	err := first(notNegative("roughness", roughness), positive("wavelength", wavelength), whole("mirrors", mirrors))
	if err != nil {
		return 0, err
	}
	phase := 4 * math.Pi * float64(roughness) / float64(wavelength)
	lost, err := answer("scatter", units.Ratio(float64(mirrors)*(phase*phase)))
	return units.Ratio(-math.Expm1(-float64(lost))), err
}
