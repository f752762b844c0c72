package euv

import "example.com/dosewright/units"

// CDShift is the change of a width with the dose, by both of its edges.
//
//	shift = 2 CD/NILS · dose_error
//
// cd is the width, in m, and nils its normalised image log-slope, both greater
// than 0; doseError is the relative error of the dose, between −1 and 1. The
// result is positive where a bright feature grows; a dark one shrinks by as
// much. It is linear: right for errors that are small against 1. Errors:
// *ArgumentError. Source: the definition of the log-slope.
func CDShift(cd units.Length, nils, doseError units.Ratio) (units.Length, error) {
	err := first(positive("CD", cd), positive("NILS", nils), signedFraction("dose_error", doseError))
	if err != nil {
		return 0, err
	}
	return answer("cd_shift", units.Length(bothEdges(cd, nils)*float64(doseError)))
}

// bothEdges is the growth of a width per relative change of intensity.
func bothEdges(cd units.Length, nils units.Ratio) float64 { return 2 * float64(cd) / float64(nils) }

// ExposureLatitude is the whole relative range of dose, from end to end, within
// which a width stays inside plus or minus cd_tolerance.
//
//	latitude = cd_tolerance · NILS
//
// nils is 0 or greater; cdTolerance is relative to the width, between 0 and 1.
// Errors: *ArgumentError. Source: CDShift solved for the dose, both ways.
func ExposureLatitude(nils, cdTolerance units.Ratio) (units.Ratio, error) {
	if err := first(notNegative("NILS", nils), fraction("cd_tolerance", cdTolerance)); err != nil {
		return 0, err
	}
	return nils * cdTolerance, nil
}

// FlareShift is the change of a width by flare, an even light of scattering, by
// both of its edges.
//
//	shift = 2 CD/NILS · flare · (density/edge_intensity − 1)
//
// cd is the width, in m, and nils its normalised image log-slope, both greater
// than 0; flare is the scattered fraction of the light and density the bright
// fraction of the surroundings, both between 0 and 1; edgeIntensity is that at
// the edge without flare, relative to a clear field, greater than 0. The result
// is positive where a bright feature grows. Errors: *ArgumentError. Source: an
// image (1 − flare)·I + flare·density, and CDShift.
func FlareShift(cd units.Length, nils, flare, density, edgeIntensity units.Ratio) (units.Length, error) {
	err := first(positive("CD", cd), positive("NILS", nils), fraction("flare", flare),
		fraction("density", density), positive("edge_intensity", edgeIntensity))
	if err != nil {
		return 0, err
	}
	change := float64(flare) * (float64(density)/float64(edgeIntensity) - 1)
	return answer("flare_shift", units.Length(bothEdges(cd, nils)*change))
}
