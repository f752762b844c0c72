package euv

import "example.com/dosewright/units"

// PhotonEnergy is the energy of a photon.
//
//	E = h c / wavelength
//
// wavelength is that in vacuum, in m, greater than 0; the result is in J.
// Errors: *ArgumentError. Source: exact SI constants.
func PhotonEnergy(wavelength units.Length) (units.Energy, error) {
	if err := positive("wavelength", wavelength); err != nil {
		return 0, err
	}
	return answer("photon_energy", units.Energy(hc/float64(wavelength)))
}

// PhotonWavelength is the vacuum wavelength of a photon; the inverse of
// PhotonEnergy.
//
//	wavelength = h c / E
//
// energy is in J, greater than 0; the result is in m. Errors: *ArgumentError.
// Source: exact SI constants.
func PhotonWavelength(energy units.Energy) (units.Length, error) {
	if err := positive("energy", energy); err != nil {
		return 0, err
	}
	return answer("photon_wavelength", units.Length(hc/float64(energy)))
}

// PhotonDensity is the mean number of incident photons per area.
//
//	density = dose · wavelength / (h c)
//
// dose is in J/m², 0 or greater; wavelength is that in vacuum, in m, greater
// than 0; the result is in m⁻². Errors: *ArgumentError. Source: exact SI
// constants.
func PhotonDensity(dose units.Fluence, wavelength units.Length) (units.ArealDensity, error) {
	if err := first(notNegative("dose", dose), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("photon_density", units.ArealDensity(float64(dose)*(float64(wavelength)/hc)))
}

// PhotonCount is the mean number of photons that fall on an area. The count of
// one such area scatters around it by its square root.
//
//	N = dose · area · wavelength / (h c)
//
// dose is in J/m², 0 or greater; area in m², greater than 0; wavelength is that
// in vacuum, in m, greater than 0. Errors: *ArgumentError. Source: exact SI
// constants.
func PhotonCount(dose units.Fluence, area units.Area, wavelength units.Length) (units.Count, error) {
	if err := first(notNegative("dose", dose), positive("area", area), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("photon_count", units.Count(float64(dose)*float64(area)*(float64(wavelength)/hc)))
}

// PhotonRate is the mean number of photons per time that a power is made of.
//
//	rate = power · wavelength / (h c)
//
// power is in W, 0 or greater; wavelength is that in vacuum, in m, greater than
// 0; the result is in s⁻¹. Errors: *ArgumentError. Source: exact SI constants.
func PhotonRate(power units.Power, wavelength units.Length) (units.Rate, error) {
	if err := first(notNegative("power", power), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("photon_rate", units.Rate(float64(power)*(float64(wavelength)/hc)))
}

// DoseOf is the dose that brings a number of photons per area; the inverse of
// PhotonDensity.
//
//	dose = photons_per_area · h c / wavelength
//
// photonsPerArea is in m⁻², 0 or greater; wavelength is that in vacuum, in m,
// greater than 0; the result is in J/m². Errors: *ArgumentError. Source: exact
// SI constants.
func DoseOf(photonsPerArea units.ArealDensity, wavelength units.Length) (units.Fluence, error) {
	if err := first(notNegative("photons_per_area", photonsPerArea), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("dose_of", units.Fluence(float64(photonsPerArea)*(hc/float64(wavelength))))
}
