package euv_test

import (
	"math"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// The dose of a point that a slit of any height passes: irradiance times the
// time in the slit.
func TestScanAgainstTheSlit(t *testing.T) {
	const power, across = 2.0, 26 * millimetre
	for _, height := range []float64{0.5 * millimetre, 2 * millimetre, 8 * millimetre} {
		for _, dose := range []float64{100, 300, 600} {
			v := sound[units.Speed](t)(euv.ScanSpeed(power, units.Fluence(dose), across, units.Speed(math.Inf(1))))
			irradiance := power / (across * height)
			near.Rel(t, "dose", irradiance*height/v, dose, 1e-14)
			near.Rel(t, "and back", sound[units.Fluence](t)(euv.ScanDose(power, units.Speed(v), across)), dose, 1e-14)
		}
	}
	near.Rel(t, "below the limit", sound[units.Speed](t)(euv.ScanSpeed(power, 300, across, 0.3)), 2/(300*0.026), 1e-15)
	near.Rel(t, "limit", sound[units.Speed](t)(euv.ScanSpeed(power, 300, across, 0.2)), 0.2, 0)
}

// A stage that starts at rest, speeds up, scans, and slows down to rest again,
// in steps of a microsecond.
func TestFieldTimeAgainstMotion(t *testing.T) {
	const v, a, path, dt = 0.25, 15.0, 35 * millimetre, 1e-6
	seconds, speed, scanned := 0.0, 0.0, 0.0
	for ; speed < v; seconds += dt {
		speed += a * dt
	}
	for ; scanned < path; seconds += dt {
		scanned += v * dt
	}
	for ; speed > 0; seconds += dt {
		speed -= a * dt
	}
	got := sound[units.FieldTime](t)(euv.FieldTimeOf(33*millimetre, 2*millimetre, v, a, 0.02, 2))
	near.Abs(t, "time", got, seconds+0.02, 4*dt)
}

// Pulses counted at points all over a slit's height.
func TestPulsesPerPointByCounting(t *testing.T) {
	const f, h, v, points = 50e3, 2 * millimetre, 0.256, 1000
	sum := 0
	for p := range points {
		first := float64(p) / points / f // when the first pulse meets the point
		for k := 0; (first+float64(k)/f)*v < h; k++ {
			sum++
		}
	}
	got := sound[units.PulseCount](t)(euv.PulsesPerPoint(f, h, v))
	near.Abs(t, "pulses", got, float64(sum)/points, 1.5/points)
	near.Rel(t, "arithmetic", got, 390.625, 1e-14)
}

// Energy is kept: what leaves the mask times the transmission meets the smaller
// area of the wafer.
func TestMaskDoseKeepsEnergy(t *testing.T) {
	for _, m := range [][2]float64{{4, 4}, {4, 8}, {1, 1}} {
		const field, transmission, dose = 8.58 * squareCm, 0.08, 300.0
		onMask := sound[units.Fluence](t)(euv.MaskDose(dose, units.Ratio(m[0]), units.Ratio(m[1]), transmission))
		near.Rel(t, "energy", onMask*(field*m[0]*m[1])*transmission, dose*field, 1e-14)
	}
}
