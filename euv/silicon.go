package euv

import (
	"math"

	"example.com/dosewright/units"
)

// Silicon at room temperature (handbook values).
const (
	siliconDensity      = 2330 // kg/m³
	siliconSpecificHeat = 702  // J/(kg K)
)

// SiliconCTE is the linear expansion coefficient of silicon at a temperature.
//
//	α = (3.725 (1 − exp(−5.88e-3 (T − 124))) + 5.548e-4 T) · 1e-6/K,   T in K
//
// temperature is a point, between 120 K and 1500 K. Errors: *ArgumentError.
// Source: Y. Okada and Y. Tokumaru, J. Appl. Phys. 56, 314 (1984).
func SiliconCTE(temperature units.Temperature) (units.ExpansionCoefficient, error) {
	if !(temperature >= 120 && temperature <= 1500) {
		return 0, outside("temperature", temperature, "between 120 K and 1500 K")
	}
	t := float64(temperature)
	return units.ExpansionCoefficient((5.548e-4*t - 3.725*math.Expm1(-5.88e-3*(t-124))) * 1e-6), nil
}

// Expansion is the change of a length with temperature.
//
//	change = length · cte · rise
//
// length is in m, 0 or greater; cte, the linear expansion coefficient, is in
// 1/K, of either sign and taken as constant; rise is a temperature difference,
// in K, of either sign. Errors: *ArgumentError. Source: the definition of the
// coefficient.
func Expansion(length units.Length, cte units.ExpansionCoefficient, rise units.TemperatureDifference) (units.Length, error) {
	if err := first(notNegative("length", length), finite("cte", cte), finite("rise", rise)); err != nil {
		return 0, err
	}
	return answer("expansion", units.Length(float64(length)*float64(cte)*float64(rise)))
}
