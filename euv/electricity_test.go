package euv_test

import (
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func TestEnergyPerPass(t *testing.T) {
	// arithmetic on figures of an encyclopedia article: 1310 kW at 136 wafer/h
	const kWh = 3.6e6
	got := sound[units.WaferEnergy](t)(euv.EnergyPerPass(1310e3, 1310e3, 1, 136*waferPerHour))
	near.Rel(t, "always busy", got/kWh, 9.632, 1e-4)

	// a day, hour by hour: the tool exposes in 18 of 24 hours
	energy, wafers := 0.0, 0.0
	for hour := range 24 {
		if hour < 18 {
			energy += 1200
			wafers += 150
		} else {
			energy += 700
		}
	}
	got = sound[units.WaferEnergy](t)(euv.EnergyPerPass(1200e3, 700e3, 0.75, 150*waferPerHour))
	near.Rel(t, "a day", got/kWh, energy/wafers, 1e-14)
}

func TestCoolingFlow(t *testing.T) {
	// the flow, warmed by its rise, carries the power: 998.2 kg/m³ and
	// 4182 J/(kg·K) (handbook, from memory)
	for _, c := range []struct{ power, rise float64 }{{1e6, 8}, {30e3, 0.5}, {0, 5}} {
		q := sound[units.FlowRate](t)(euv.CoolingFlow(units.Power(c.power), units.TemperatureDifference(c.rise)))
		near.Rel(t, "power", q*998.2*4182*c.rise, c.power, 1e-15)
	}
}
