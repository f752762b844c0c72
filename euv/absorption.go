package euv

import (
	"math"

	"example.com/dosewright/units"
)

// AbsorbedFraction is the part of the incident light that a film takes up in
// one crossing, without reflection at its faces.
//
//	fraction = 1 − exp(−attenuation · thickness)
//
// attenuation is Napierian, in 1/m, 0 or greater; thickness is in m, 0 or
// greater. Errors: *ArgumentError. Source: the law of Beer and Lambert (IUPAC
// Gold Book, Napierian attenuation coefficient).
func AbsorbedFraction(attenuation units.AttenuationCoefficient, thickness units.Length) (units.Ratio, error) {
	if err := first(notNegative("attenuation", attenuation), notNegative("thickness", thickness)); err != nil {
		return 0, err
	}
	return units.Ratio(-math.Expm1(-float64(attenuation) * float64(thickness))), nil
}

// AbsorbedPhotons is the mean number of photons that a patch of resist absorbs
// in its whole thickness.
//
//	photons = dose · area · wavelength / (h c) · (1 − exp(−attenuation · thickness))
//
// dose is the incident fluence, in J/m², 0 or greater; attenuation is
// Napierian, in 1/m, 0 or greater; thickness in m, 0 or greater; area
// in m² and wavelength in m, greater than 0. Errors: *ArgumentError. Source:
// photon energy h c/wavelength and the law of Beer and Lambert.
func AbsorbedPhotons(dose units.Fluence, attenuation units.AttenuationCoefficient, thickness units.Length, area units.Area, wavelength units.Length) (units.Count, error) {
	fraction, err := AbsorbedFraction(attenuation, thickness)
	if err != nil {
		return 0, err
	}
	incident, err := PhotonCount(dose, area, wavelength)
	if err != nil {
		return 0, err
	}
	return units.Count(float64(incident) * float64(fraction)), nil
}

// AbsorbedEnergyDensity is the energy that resist absorbs per volume at its
// top, where the light is not yet weakened.
//
//	energy per volume = dose · attenuation
//
// dose is the incident fluence, in J/m², 0 or greater; attenuation is
// Napierian, in 1/m, 0 or greater. Errors: *ArgumentError. Source: the
// derivative of the law of Beer and Lambert at the surface.
func AbsorbedEnergyDensity(dose units.Fluence, attenuation units.AttenuationCoefficient) (units.EnergyDensity, error) {
	if err := first(notNegative("dose", dose), notNegative("attenuation", attenuation)); err != nil {
		return 0, err
	}
	return answer("absorbed_energy_density", units.EnergyDensity(float64(dose)*float64(attenuation)))
}
