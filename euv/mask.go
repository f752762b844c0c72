package euv

import (
	"math"

	"example.com/dosewright/units"
)

// WaferErrorOfMask is the error of a width on the wafer that one on the mask
// causes.
//
//	wafer error = MEEF · mask_error/reduction
//
// maskError is in m on the mask, of either sign; meef, the mask error
// enhancement factor, is greater than 0; reduction is 1 or greater. Errors:
// *ArgumentError. Source: the definition of MEEF (common practice).
func WaferErrorOfMask(maskError units.Length, meef, reduction units.Ratio) (units.Length, error) {
	if err := first(finite("mask_error", maskError), positive("MEEF", meef), reducing(reduction)); err != nil {
		return 0, err
	}
	return answer("wafer_error_of_mask", units.Length(float64(maskError)*float64(meef)/float64(reduction)))
}

// MaskErrorFor is the error of a width on the mask, in m on the mask, that makes
// an error waferError on the wafer; the inverse of WaferErrorOfMask.
//
//	mask error = wafer_error · reduction/MEEF
//
// waferError is in m on the wafer, of either sign; the rest is as there.
// Errors: *ArgumentError.
func MaskErrorFor(waferError units.Length, meef, reduction units.Ratio) (units.Length, error) {
	if err := first(finite("wafer_error", waferError), positive("MEEF", meef), reducing(reduction)); err != nil {
		return 0, err
	}
	return answer("mask_error_for", units.Length(float64(waferError)*float64(reduction)/float64(meef)))
}

// Shadow is the width of the shadow that a mask's absorber throws by the slant
// of the chief ray, as a length on the wafer.
//
//	shadow = passes · absorber_thickness · tan(chief_ray)/reduction
//
// absorberThickness is in m, 0 or greater; chiefRay is measured from the mask's
// normal, in rad, 0 or greater and less than 90°; reduction is 1 or greater;
// passes is 1, or 2 when the light passes the absorber on its way in and out.
// It is geometry alone and knows no mask 3D effect. Errors: *ArgumentError.
// Source: geometry.
func Shadow(absorberThickness units.Length, chiefRay units.Angle, reduction units.Ratio, passes units.Count) (units.Length, error) {
	err := first(notNegative("absorber_thickness", absorberThickness), slanted(chiefRay),
		reducing(reduction), either("passes", passes, 1, 2))
	if err != nil {
		return 0, err
	}
	return answer("shadow", units.Length(
		float64(passes)*float64(absorberThickness)*math.Tan(float64(chiefRay))/float64(reduction)))
}

// MaskAngleLow is the smallest angle of light on the mask, from its normal; it
// is negative where the cone reaches over the normal.
//
//	angle = chief_ray − asin(NA/reduction)
//
// na, the numerical aperture at the wafer, lies between 0 and 1; reduction is
// that of the direction in question, 1 or greater; chiefRay is in rad, 0 or
// greater, so that the whole cone stays below 90°. Errors: *ArgumentError.
// Source: geometry; the aperture at the mask is NA/reduction (sine condition).
func MaskAngleLow(na, reduction units.Ratio, chiefRay units.Angle) (units.Angle, error) {
	half, err := coneAtMask(na, reduction, chiefRay)
	if err != nil {
		return 0, err
	}
	return chiefRay - half, nil
}

// MaskAngleHigh is the largest angle of light on the mask, from its normal.
//
//	angle = chief_ray + asin(NA/reduction)
//
// Arguments, errors and source are those of MaskAngleLow.
func MaskAngleHigh(na, reduction units.Ratio, chiefRay units.Angle) (units.Angle, error) {
	half, err := coneAtMask(na, reduction, chiefRay)
	if err != nil {
		return 0, err
	}
	return chiefRay + half, nil
}

// coneAtMask is the half angle of the cone of light at the mask.
func coneAtMask(na, reduction units.Ratio, chiefRay units.Angle) (units.Angle, error) {
	if err := first(aperture(na), reducing(reduction), slanted(chiefRay)); err != nil {
		return 0, err
	}
	half := units.Angle(math.Asin(float64(na / reduction)))
	if chiefRay+half >= math.Pi/2 {
		return 0, outside("chief_ray", chiefRay, "less than 90 deg by more than asin(NA/reduction)")
	}
	return half, nil
}

// slanted refuses what is no angle between the mask's normal and its plane.
func slanted(chiefRay units.Angle) error {
	if !(chiefRay >= 0 && chiefRay < math.Pi/2) {
		return outside("chief_ray", chiefRay, "0 or greater and less than 90 deg")
	}
	return nil
}
