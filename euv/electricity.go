package euv

import "example.com/dosewright/units"

// Water near 20 °C (handbook values, from memory).
const (
	waterDensity      = 998.2  // kg/m³
	waterSpecificHeat = 4182.0 // J/(kg·K)
)

// EnergyPerPass is the electrical energy that one wafer passing the tool costs,
// the idle time between wafers included.
//
//	energy = (power_exposing · busy + power_idle · (1 − busy)) / (throughput · busy)
//
// powerExposing and powerIdle are in W, 0 or greater; busy is the part of the
// time in which the tool exposes wafers, greater than 0 and at most 1;
// throughput is that of the busy time, in wafer/s, greater than 0. The result
// is in J/wafer. Errors: *ArgumentError. Source: energy balance. For planning
// only: electrical work follows the site's rules, the applicable codes and
// licensed practice.
func EnergyPerPass(powerExposing, powerIdle units.Power, busy units.Ratio, throughput units.Throughput) (units.WaferEnergy, error) {
	err := first(notNegative("power_exposing", powerExposing), notNegative("power_idle", powerIdle),
		share("busy", busy), positive("throughput", throughput))
	if err != nil {
		return 0, err
	}
	idlePerBusy := (1 - float64(busy)) / float64(busy)
	return answer("energy_per_pass", units.WaferEnergy((float64(powerExposing)+float64(powerIdle)*idlePerBusy)/float64(throughput)))
}

// CoolingFlow is the flow of water that takes a power away.
//
//	flow = power / (ρ c rise), ρ = 998.2 kg/m³, c = 4182 J/(kg·K)
//
// power is in W, 0 or greater; rise is the temperature difference between the
// water that leaves and the water that comes, in K, greater than 0. The result
// is in m³/s. Errors: *ArgumentError. Source: energy balance; ρ and c of water
// near 20 °C (handbook, from memory). For planning only: it sizes no pump, pipe
// or interlock; heat loads follow the site's rules, the applicable codes and
// licensed practice.
func CoolingFlow(power units.Power, rise units.TemperatureDifference) (units.FlowRate, error) {
	if err := first(notNegative("power", power), positive("rise", rise)); err != nil {
		return 0, err
	}
	return answer("cooling_flow", units.FlowRate(float64(power)/(waterDensity*waterSpecificHeat)/float64(rise)))
}
