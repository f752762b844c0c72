package euv_test

import (
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// A wafer field by field, and the wafers of a shift.
func TestWaferTimeFieldByField(t *testing.T) {
	const dose, area, power, overhead = 340.0, 8.58 * squareCm, 1.9, 9.5
	for _, fields := range []int{1, 64, 96} {
		seconds := overhead
		for range fields {
			seconds += dose * area / power
		}
		got := sound[units.WaferTime](t)(euv.WaferTimeOf(dose, units.FieldsPerWafer(fields), area, power, overhead))
		near.Rel(t, "time", got, seconds, 1e-13)
		perSecond := sound[units.Throughput](t)(euv.ThroughputOf(dose, units.FieldsPerWafer(fields), area, power, overhead))
		near.Rel(t, "a shift", perSecond*8*3600, 8*3600/seconds, 1e-13)
	}
}

// Throughput is not proportional to the power: doubling it at 120 wafer/h with
// 8 s overhead gives less than 240 (arithmetic: 30 s become 8 + 11 = 19 s).
func TestThroughputIsNotProportionalToPower(t *testing.T) {
	const area = 22.0 / (300 * 100) // 22 J a wafer at 300 J/m² and 100 fields
	got := sound[units.Throughput](t)(euv.ThroughputOf(300, 100, area, 2, 8)) / waferPerHour
	near.Rel(t, "doubled", got, 3600.0/19, 1e-13)
}
