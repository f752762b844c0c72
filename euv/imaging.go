package euv

import (
	"math"

	"example.com/dosewright/units"
)

// HalfPitch is the half pitch of dense lines that a process of a given k1
// resolves; the pitch is twice that.
//
//	half_pitch = k1 · wavelength/NA
//
// k1 is greater than 0; na, the numerical aperture at the wafer, lies between
// 0 and 1; wavelength is in m, greater than 0. Errors: *ArgumentError. Source:
// the criterion of Lord Rayleigh with a factor of the process (common
// practice).
func HalfPitch(k1, na units.Ratio, wavelength units.Length) (units.Length, error) {
	if err := first(positive("k1", k1), aperture(na), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("half_pitch", units.Length(float64(k1)*float64(wavelength)/float64(na)))
}

// K1 is the factor of the process that a half pitch asks for; the inverse of
// HalfPitch.
//
//	k1 = half_pitch · NA/wavelength
//
// halfPitch is in m, greater than 0; the rest is as there. Below 0.25 no single
// exposure resolves lines. Errors: *ArgumentError. Source: that of HalfPitch.
func K1(halfPitch units.Length, na units.Ratio, wavelength units.Length) (units.Ratio, error) {
	if err := first(positive("half_pitch", halfPitch), aperture(na), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("k1", units.Ratio(float64(halfPitch)*float64(na)/float64(wavelength)))
}

// DepthOfFocus is the whole range of focus, from end to end, in the paraxial
// form.
//
//	depth = k2 · wavelength/NA²
//
// k2 is a factor of the process, greater than 0; na lies between 0 and 1;
// wavelength is in m, greater than 0. Errors: *ArgumentError. Source: the
// quarter-wave criterion of Lord Rayleigh, k2 = 1 for a total of λ/NA² (common
// practice).
func DepthOfFocus(na, k2 units.Ratio, wavelength units.Length) (units.Length, error) {
	if err := first(aperture(na), positive("k2", k2), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	return answer("depth_of_focus", units.Length(float64(k2)*float64(wavelength)/(float64(na)*float64(na))))
}

// DepthOfFocusExact is the whole range of focus, from end to end, without the
// paraxial approximation.
//
//	depth = k3 · wavelength/sin²(θ/2),   sin θ = NA
//
// k3 is a factor of the process, greater than 0, a quarter for the criterion of
// Lord Rayleigh; na lies between 0 and 1; wavelength is in m, greater than 0.
// Errors: *ArgumentError. Source: B. J. Lin, J. Microlith. Microfab. Microsyst.
// 1, 7 (2002) (from memory).
func DepthOfFocusExact(na, k3 units.Ratio, wavelength units.Length) (units.Length, error) {
	if err := first(aperture(na), positive("k3", k3), positive("wavelength", wavelength)); err != nil {
		return 0, err
	}
	sin := math.Sin(math.Asin(float64(na)) / 2)
	return answer("depth_of_focus_exact", units.Length(float64(k3)*float64(wavelength)/(sin*sin)))
}

// NILS is the normalised image log-slope of an edge.
//
//	NILS = CD · d ln I/dx
//
// slope is the steepness of the natural logarithm of the intensity at the
// edge, in 1/m, and cd the width of the feature, in m; both are 0 or greater.
// Errors: *ArgumentError. Source: the definition (common practice).
func NILS(slope units.AttenuationCoefficient, cd units.Length) (units.Ratio, error) {
	if err := first(notNegative("slope", slope), notNegative("CD", cd)); err != nil {
		return 0, err
	}
	return answer("nils", units.Ratio(float64(slope)*float64(cd)))
}

// TwoBeamNILS is the normalised image log-slope of equal lines and spaces that
// two beams make, at the middle of the slope.
//
//	I = 1 + contrast · cos(2πx/pitch):   NILS = π · contrast
//
// contrast (visibility) lies between 0 and 1. Errors: *ArgumentError. Source:
// the derivative of that image at a quarter of the pitch.
func TwoBeamNILS(contrast units.Ratio) (units.Ratio, error) {
	if err := fraction("contrast", contrast); err != nil {
		return 0, err
	}
	return math.Pi * contrast, nil
}
