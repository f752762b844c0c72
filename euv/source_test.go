package euv_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// Two published pairs of power and throughput, 100 W with 60 wafer/h and 250 W
// with 125 wafer/h, give energy and overhead of a wafer: 5200 J, 8.0 s
// (arithmetic).
func TestEnergyAndOverheadOfTwoPairs(t *testing.T) {
	time1, time2 := 3600.0/60, 3600.0/125
	energy := (time1 - time2) / (1.0/100 - 1.0/250)
	overhead := units.WaferTime(time1 - energy/100)
	near.Rel(t, "energy", energy, 5200, 1e-12)
	near.Rel(t, "overhead", float64(overhead), 8.0, 1e-12)

	dose := units.Fluence(energy / (100 * 8.58 * squareCm))
	for power, perHour := range map[units.Power]float64{100: 60, 250: 125} {
		got := sound[units.Power](t)(euv.SourcePower(dose, units.Throughput(perHour*waferPerHour), 100, 8.58*squareCm, overhead, 1))
		near.Rel(t, "power", got, float64(power), 1e-12)
		back := sound[units.Throughput](t)(euv.ThroughputOf(dose, 100, 8.58*squareCm, power, overhead))
		near.Rel(t, "throughput", back/waferPerHour, perHour, 1e-12)
	}
}

// The power that SourcePower asks for, sent through the transmission, gives the
// throughput back.
func TestSourcePowerIsTheInverseOfThroughput(t *testing.T) {
	for _, perHour := range []float64{1, 60, 150, 220, 300, 378, 378.9} {
		const transmission = 0.009
		p := sound[units.Power](t)(euv.SourcePower(340, units.Throughput(perHour*waferPerHour), 96, 8.58*squareCm, 9.5, transmission))
		back := sound[units.Throughput](t)(euv.ThroughputOf(340, 96, 8.58*squareCm, units.Power(p*transmission), 9.5))
		near.Rel(t, "throughput", back/waferPerHour, perHour, 1e-12)
	}
}

func TestSourcePowerSaysItsCeiling(t *testing.T) {
	for _, perHour := range []float64{378.95, 400, 1e6} {
		p, err := euv.SourcePower(340, units.Throughput(perHour*waferPerHour), 96, 8.58*squareCm, 9.5, 0.009)
		var bad *euv.ArgumentError
		if !errors.As(err, &bad) || bad.Argument != "throughput" || p != 0 {
			t.Fatalf("%g wafer/h: got %v, %v", perHour, p, err)
		}
		if want := "less than 378.95 wafer/h, since the overhead alone takes 9.5 s/wafer"; bad.Want != want {
			t.Errorf("%g wafer/h: got %q, want %q", perHour, bad.Want, want)
		}
		if !strings.Contains(err.Error(), bad.Want) {
			t.Errorf("the message %q does not say %q", err, bad.Want)
		}
	}
	// without an overhead there is no ceiling
	sound[units.Power](t)(euv.SourcePower(340, 1e6, 96, 8.58*squareCm, 0, 0.009))
}

// The part of a cone, by summing rings of solid angle over its half angle.
func TestCollectedFractionOfCones(t *testing.T) {
	for _, degrees := range []float64{1, 30, 60, 78, 89} {
		half := degrees * math.Pi / 180
		cone := 2 * math.Pi * midpoints(0, half, math.Sin)
		got := sound[units.Ratio](t)(euv.CollectedFraction(units.SolidAngle(cone)))
		near.Rel(t, "fraction", got, 1-math.Cos(half), 1e-8)
	}
	near.Rel(t, "half space", sound[units.Ratio](t)(euv.CollectedFraction(2*math.Pi)), 1, 0)
}

// midpoints is the integral of f from a to b.
func midpoints(a, b float64, f func(float64) float64) float64 {
	const n = 20000
	sum := 0.0
	for i := range n {
		sum += f(a + (b-a)*(float64(i)+0.5)/n)
	}
	return sum * (b - a) / n
}

// The laser's power, followed to intermediate focus by a chain.
func TestLaserPowerAlongAChain(t *testing.T) {
	for _, c := range []struct{ power, efficiency, angle, collector, path float64 }{
		{250, 0.055, 5, 0.41, 0.9}, {600, 0.06, 5.5, 0.45, 0.85}, {1, 1, 2 * math.Pi, 1, 1}, {0, 0.05, 5, 0.4, 0.9},
	} {
		laser := sound[units.Power](t)(euv.LaserPower(units.Power(c.power), units.Ratio(c.efficiency), units.SolidAngle(c.angle), units.Ratio(c.collector), units.Ratio(c.path)))
		chain, err := euv.NewChain(euv.Plane("LASER"),
			euv.Element{Label: "plasma", Factor: units.Ratio(c.efficiency)}, euv.SourcePlane,
			euv.Element{Label: "opening", Factor: units.Ratio(c.angle / (2 * math.Pi))},
			euv.Element{Label: "collector", Factor: units.Ratio(c.collector)},
			euv.Element{Label: "path", Factor: units.Ratio(c.path)}, euv.FocusPlane)
		if err != nil {
			t.Fatal(err)
		}
		near.Rel(t, "power at IF", sound[units.Power](t)(chain.CarryPower(units.Power(laser), "LASER", euv.FocusPlane)), c.power, 1e-14)
	}
}

func TestPulseEnergy(t *testing.T) {
	// arithmetic: 250 W at 50 kpulse/s are 5 mJ/pulse
	near.Rel(t, "energy", sound[units.PulseEnergy](t)(euv.PulseEnergy(250, 50e3)), 5e-3, 1e-15)
	e := sound[units.PulseEnergy](t)(euv.PulseEnergy(333, 62e3))
	near.Rel(t, "pulses of a second", e*62e3, 333, 1e-15)
}

// The projected solid angle of the cone that the aperture accepts, by summing
// cosθ over its rings.
func TestEtendueOfCones(t *testing.T) {
	for _, na := range []float64{0.01, 0.33, 0.55, 0.95} {
		projected := 2 * math.Pi * midpoints(0, math.Asin(na), func(theta float64) float64 { return math.Cos(theta) * math.Sin(theta) })
		got := sound[units.Etendue](t)(euv.Etendue(26*millimetre, 2*millimetre, units.Ratio(na), 0.5))
		near.Rel(t, "etendue", got, 52e-6*0.5*projected, 1e-8)
	}
}

func BenchmarkSourcePower(b *testing.B) {
	for b.Loop() {
		if _, err := euv.SourcePower(340, 150*waferPerHour, 96, 8.58*squareCm, 9.5, 0.009); err != nil {
			b.Fatal(err)
		}
	}
}
