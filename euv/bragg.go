package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// BraggPeriod is the period of a multilayer that reflects a wavelength.
//
//	order · wavelength = 2 period √((1 − delta)² − sin²angle)
//
// wavelength is that in vacuum, in m, greater than 0; angle is taken from the
// normal, at least 0 and less than 90°; order is a whole number, at least 1;
// delta is the mean of 1 − n over the period, weighted by thickness, between
// −1 and 1. A delta of 0 gives the kinematic period, which is too short by
// about 3 % for molybdenum and silicon at 13.5 nm. At angles beyond the
// critical one the multilayer reflects totally and no period answers. Errors:
// *ArgumentError. Source: the Bragg condition inside a medium of mean
// refractive index 1 − delta.
func BraggPeriod(wavelength units.Length, angle units.Angle, order units.Count, delta units.Ratio) (units.Length, error) {
	if err := positive("wavelength", wavelength); err != nil {
		return 0, err
	}
	orders, err := pathPerPeriod(angle, order, delta)
	if err != nil {
		return 0, err
	}
	return answer("bragg_period", units.Length(float64(wavelength)/orders))
}

// BraggWavelength is the vacuum wavelength that a multilayer reflects; the
// inverse of BraggPeriod.
//
//	order · wavelength = 2 period √((1 − delta)² − sin²angle)
//
// period is in m, greater than 0; the other arguments, errors and the source
// are those of BraggPeriod.
func BraggWavelength(period units.Length, angle units.Angle, order units.Count, delta units.Ratio) (units.Length, error) {
	if err := positive("period", period); err != nil {
		return 0, err
	}
	orders, err := pathPerPeriod(angle, order, delta)
	if err != nil {
		return 0, err
	}
	return answer("bragg_wavelength", units.Length(float64(period)*orders))
}

// pathPerPeriod is 2 √((1 − δ)² − sin²θ) / m, the wavelength per period. The
// root is taken of cos²θ − δ(2 − δ), which keeps its digits near 90°.
func pathPerPeriod(angle units.Angle, order units.Count, delta units.Ratio) (float64, error) {
	if !(angle >= 0 && angle < math.Pi/2) {
		return 0, outside("angle", angle, "at least 0 and less than 90°, from the normal")
	}
	if err := whole("order", order); err != nil || order < 1 {
		return 0, outside("order", order, "a whole number, at least 1")
	}
	d := float64(delta)
	if !(d > -1 && d < 1) {
		return 0, outside("delta", delta, "greater than -1 and less than 1")
	}
	c := math.Cos(float64(angle))
	square := c*c - d*(2-d)
	if !(square > 0) {
		return 0, outside("angle", angle, fmt.Sprintf(
			"less than %.5g°, beyond which a multilayer of this delta reflects totally", math.Asin(1-d)*180/math.Pi))
	}
	return 2 * math.Sqrt(square) / float64(order), nil
}
