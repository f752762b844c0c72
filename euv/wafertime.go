package euv

import "example.com/dosewright/units"

// WaferTimeOf is the time of one wafer.
//
//	time = overhead + dose · fields_per_wafer · field_area / power
//
// dose and power are at the wafer, in J/m² and W; fieldsPerWafer is in
// field/wafer, fieldArea in m²/field: all greater than 0. overhead is the time
// of a wafer in which nothing is exposed, in s/wafer, 0 or greater. The result
// is in s/wafer. Errors: *ArgumentError. Source: energy balance.
func WaferTimeOf(dose units.Fluence, fieldsPerWafer units.FieldsPerWafer, fieldArea units.FieldArea, power units.Power, overhead units.WaferTime) (units.WaferTime, error) {
	energy, err := exposureEnergy(dose, fieldsPerWafer, fieldArea)
	if err = first(err, positive("power", power), notNegative("overhead", overhead)); err != nil {
		return 0, err
	}
	return answer("wafer_time", overhead+units.WaferTime(energy/float64(power)))
}

// ThroughputOf is the number of wafers per time while the tool runs; the
// inverse of WaferTimeOf. Since the overhead is a term of its own, it is not
// proportional to the power, and it holds no idle time.
//
//	throughput = 1 / (overhead + dose · fields_per_wafer · field_area / power)
//
// The arguments, errors and the source are those of WaferTimeOf; the result is
// in wafer/s.
func ThroughputOf(dose units.Fluence, fieldsPerWafer units.FieldsPerWafer, fieldArea units.FieldArea, power units.Power, overhead units.WaferTime) (units.Throughput, error) {
	t, err := WaferTimeOf(dose, fieldsPerWafer, fieldArea, power, overhead)
	if err != nil {
		return 0, err
	}
	return answer("throughput", units.Throughput(1/float64(t)))
}

// exposureEnergy is the energy that the exposure of a wafer takes at the wafer,
// in J per wafer.
func exposureEnergy(dose units.Fluence, fieldsPerWafer units.FieldsPerWafer, fieldArea units.FieldArea) (float64, error) {
	err := first(positive("dose", dose), positive("fields_per_wafer", fieldsPerWafer), positive("field_area", fieldArea))
	return float64(dose) * float64(fieldsPerWafer) * float64(fieldArea), err
}
