package euv

import "example.com/dosewright/units"

// ScanSpeed is the stage speed at which a power carries a dose, or the limit of
// the stage when that is lower.
//
//	speed = power / (dose · slit_across), at most limit
//
// power and dose are at the wafer, in W and J/m²; slitAcross is the slit's long
// side, across the scan, in m: all greater than 0. The slit's height cancels.
// limit is in m/s, greater than 0; +Inf means that there is none. The result is
// in m/s. Errors: *ArgumentError. Source: energy balance.
func ScanSpeed(power units.Power, dose units.Fluence, slitAcross units.Length, limit units.Speed) (units.Speed, error) {
	err := first(positive("power", power), positive("dose", dose), positive("slit_across", slitAcross))
	if err == nil && !(limit > 0) {
		err = outside("limit", limit, "greater than 0")
	}
	if err != nil {
		return 0, err
	}
	return answer("scan_speed", min(limit, units.Speed(float64(power)/float64(dose)/float64(slitAcross))))
}

// ScanDose is the dose that a power leaves on the wafer at a scan speed.
//
//	dose = power / (speed · slit_across)
//
// power is at the wafer, in W, 0 or greater; speed is in m/s and slitAcross, the
// slit's long side, in m, both greater than 0. The result is in J/m². Errors:
// *ArgumentError. Source: energy balance.
func ScanDose(power units.Power, speed units.Speed, slitAcross units.Length) (units.Fluence, error) {
	err := first(notNegative("power", power), positive("speed", speed), positive("slit_across", slitAcross))
	if err != nil {
		return 0, err
	}
	return answer("scan_dose", units.Fluence(float64(power)/float64(speed)/float64(slitAcross)))
}

// PulsesPerPoint is the number of pulses that meet a point of the wafer while
// it crosses the slit. It need not be whole: points then see the whole number
// below or above.
//
//	pulses = repetition · slit_along / speed
//
// repetition is in pulse/s; slitAlong is the slit's height, along the scan, in
// m; speed is in m/s: all greater than 0. Errors: *ArgumentError. Source:
// kinematics.
func PulsesPerPoint(repetition units.PulseRate, slitAlong units.Length, speed units.Speed) (units.PulseCount, error) {
	err := first(positive("repetition", repetition), positive("slit_along", slitAlong), positive("speed", speed))
	if err != nil {
		return 0, err
	}
	return answer("pulses_per_point", units.PulseCount(float64(repetition)*float64(slitAlong)/float64(speed)))
}

// MaskDose is the dose on the mask, before it reflects, behind a dose on the
// wafer.
//
//	mask dose = dose / (reduction_x · reduction_y · transmission)
//
// dose is at the wafer, in J/m², 0 or greater; the reductions, across the scan
// and along it, are greater than 0 (4 for a 4x optics); transmission is the
// power at the wafer per power at the mask, greater than 0 and at most 1. The
// result is in J/m². Errors: *ArgumentError. Source: energy balance.
func MaskDose(dose units.Fluence, reductionX, reductionY, transmission units.Ratio) (units.Fluence, error) {
	err := first(notNegative("dose", dose), positive("reduction_x", reductionX), positive("reduction_y", reductionY),
		share("transmission", transmission))
	if err != nil {
		return 0, err
	}
	return answer("mask_dose", dose/units.Fluence(reductionX)/units.Fluence(reductionY)/units.Fluence(transmission))
}

// FieldTimeOf is the time of one field: the scan over field and slit, the
// turn-round of the stage and the step to the next field.
//
//	time = (field_along + slit_along)/speed + turn · speed/acceleration + step
//
// fieldAlong is the field's side along the scan and slitAlong the slit's, in m,
// speed is in m/s, acceleration in m/s²: all greater than 0. step is what the
// turn-round does not hide, in s/field, 0 or greater; turn is the number of
// accelerations a field, 0 or greater, as a rule 2: one to speed up, one to
// slow down. The result is in s/field. Errors: *ArgumentError. Source:
// kinematics.
func FieldTimeOf(fieldAlong, slitAlong units.Length, speed units.Speed, acceleration units.Acceleration, step units.FieldTime, turn units.Count) (units.FieldTime, error) {
	err := first(positive("field_along", fieldAlong), positive("slit_along", slitAlong), positive("speed", speed),
		positive("acceleration", acceleration), notNegative("step", step), notNegative("turn", turn))
	if err != nil {
		return 0, err
	}
	scan := float64(fieldAlong+slitAlong) / float64(speed)
	turning := float64(turn) * float64(speed) / float64(acceleration)
	return answer("field_time", units.FieldTime(scan+turning)+step)
}
