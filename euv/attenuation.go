package euv

import (
	"math"

	"example.com/dosewright/units"
)

// Attenuation is the Napierian attenuation coefficient of a material: the
// intensity falls as exp(−αx).
//
//	α = 4πβ / wavelength
//
// wavelength is that in vacuum, in m; the result is in m⁻¹. Errors and source
// are those of Beta; of the formula: IUPAC Gold Book, Napierian attenuation
// coefficient.
func Attenuation(m Material, wavelength units.Length) (units.AttenuationCoefficient, error) {
	beta, err := Beta(m, wavelength)
	if err != nil {
		return 0, err
	}
	return answer("attenuation", units.AttenuationCoefficient(4*math.Pi*float64(beta)/float64(wavelength)))
}

// PenetrationDepth is the depth at which the intensity has fallen to 1/e at
// normal incidence.
//
//	depth = 1 / α
//
// α, the arguments and the errors are those of Attenuation; the result is in m.
func PenetrationDepth(m Material, wavelength units.Length) (units.Length, error) {
	a, err := Attenuation(m, wavelength)
	if err != nil {
		return 0, err
	}
	return answer("penetration_depth", units.Length(1/float64(a)))
}

// Napierian turns a decadic attenuation coefficient, intensity as 10^(−ax),
// into the Napierian one, intensity as exp(−αx).
//
//	α = a ln 10
//
// decadic is in m⁻¹, 0 or greater. Errors: *ArgumentError. Source: IUPAC Gold
// Book, attenuation coefficient.
func Napierian(decadic units.AttenuationCoefficient) (units.AttenuationCoefficient, error) {
	if err := notNegative("decadic", decadic); err != nil {
		return 0, err
	}
	return answer("napierian", decadic*math.Ln10)
}

// Decadic turns a Napierian attenuation coefficient into the decadic one; the
// inverse of Napierian, with its errors and source.
func Decadic(napierian units.AttenuationCoefficient) (units.AttenuationCoefficient, error) {
	if err := notNegative("napierian", napierian); err != nil {
		return 0, err
	}
	return napierian / math.Ln10, nil
}
