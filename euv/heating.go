package euv

import (
	"math"

	"example.com/dosewright/units"
)

// WaferHeating is the rise in temperature of a silicon wafer that keeps all the
// heat of one exposure where it fell: a ceiling, and a warning says so.
//
//	rise = absorbed · dose/(ρ c thickness)
//
// dose is the incident fluence over the whole surface, in J/m², 0 or greater;
// absorbed is the fraction that turns to heat, between 0 and 1; thickness is in
// m, greater than 0. ρ = 2330 kg/m³ and c = 702 J/(kg K) are those of silicon
// at room temperature (handbook values). Errors: *ArgumentError. Source:
// conservation of energy.
//
// Planning arithmetic only: for heat loads the site's rules, the applicable
// codes and licensed practice decide.
func WaferHeating(dose units.Fluence, absorbed units.Ratio, thickness units.Length) (Warned[units.TemperatureDifference], error) {
	err := first(notNegative("dose", dose), fraction("absorbed", absorbed), positive("thickness", thickness))
	if err != nil {
		return Warned[units.TemperatureDifference]{}, err
	}
	heat := float64(dose) * float64(absorbed)
	rise, err := answer("wafer_heating",
		units.TemperatureDifference(heat/(siliconDensity*siliconSpecificHeat*float64(thickness))))
	return Warned[units.TemperatureDifference]{rise, []string{
		"an adiabatic ceiling: what the wafer gives to its support, its surroundings and its unexposed parts is left out",
	}}, err
}

// stefanBoltzmann is 2π⁵k⁴/(15 h³c²) in W/(m² K⁴), from the exact constants of
// the SI (SI Brochure, 9th edition, table 1).
const stefanBoltzmann = 2 * math.Pi * math.Pi * math.Pi * math.Pi * math.Pi *
	(BoltzmannConstant * BoltzmannConstant * BoltzmannConstant * BoltzmannConstant) /
	(15 * (PlanckConstant * PlanckConstant * PlanckConstant) * (SpeedOfLight * SpeedOfLight))

// RadiativeTemperature is the temperature at which a thin body gives off by
// radiation alone what it absorbs.
//
//	absorbed_flux = faces · emissivity · σ · (T⁴ − surroundings⁴)
//
// absorbedFlux is the absorbed power per area of one face, in W/m², 0 or
// greater; emissivity is that of each face, greater than 0 and at most 1; faces
// that radiate are 1 or 2; surroundings is a temperature point, in K, 0 or
// greater. The result is a temperature point. Errors: *ArgumentError. Source:
// the law of Stefan and Boltzmann with Kirchhoff's law for grey bodies.
//
// Planning arithmetic only: for heat loads the site's rules, the applicable
// codes and licensed practice decide.
func RadiativeTemperature(absorbedFlux units.Irradiance, emissivity units.Ratio, faces units.Count, surroundings units.Temperature) (units.Temperature, error) {
	err := first(notNegative("absorbed_flux", absorbedFlux), share("emissivity", emissivity),
		either("faces", faces, 1, 2), notNegative("surroundings", surroundings))
	if err != nil {
		return 0, err
	}
	alone := math.Sqrt(math.Sqrt(float64(absorbedFlux) / (float64(faces) * float64(emissivity) * stefanBoltzmann)))
	return answer("radiative_temperature", units.Temperature(fourthRootOfSum(alone, float64(surroundings))))
}

// fourthRootOfSum is (a⁴ + b⁴)^¼ of numbers that are not negative.
func fourthRootOfSum(a, b float64) float64 { return math.Sqrt(math.Hypot(a*a, b*b)) }
