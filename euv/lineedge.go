package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// RoughnessOf says what a roughness was measured on.
type RoughnessOf int

const (
	LER RoughnessOf = iota // line edge roughness: the deviation of one edge
	LWR                    // line width roughness: the deviation of the width
)

// Words returns the words in order: LER, LWR.
func (RoughnessOf) Words() []string { return []string{"LER", "LWR"} }

// String returns the word, or "RoughnessOf(n)" for a value that has none.
func (r RoughnessOf) String() string { return wordOf("RoughnessOf", r.Words(), int(r)) }

// EdgeRoughness is the deviation of an edge that the shot noise of the light
// alone causes, one sigma.
//
//	roughness = (CD/NILS)/√count_in_cell
//
// cd is the width of the feature, in m, nils its normalised image log-slope,
// countInCell the mean number of photons absorbed in the cell over which the
// resist averages; all greater than 0. The result is a model and a warning
// says so. Errors: *ArgumentError. Source: linear error propagation of the
// count's 1/√N through the slope of the image.
func EdgeRoughness(cd units.Length, nils units.Ratio, countInCell units.Count) (Warned[units.Length], error) {
	err := first(positive("CD", cd), positive("NILS", nils), positive("count_in_cell", countInCell))
	if err != nil {
		return Warned[units.Length]{}, err
	}
	sigma, err := answer("edge_roughness", units.Length(float64(cd)/float64(nils)/math.Sqrt(float64(countInCell))))
	return Warned[units.Length]{sigma, []string{
		"a model of shot noise alone: resist chemistry, blur and development are left out",
	}}, err
}

// LWROfLER is the line width roughness of a line whose two edges have the line
// edge roughness ler.
//
//	LWR = √(2 (1 − correlation)) · LER
//
// ler is in m, 0 or greater; the result has the same multiple of sigma.
// correlation is that of the two edges, between −1 and 1: 0 for edges that
// know nothing of each other, 1 for a line that wiggles. Errors:
// *ArgumentError. Source: the variance of a difference; terms as in the IUPAC
// glossary of 2020.
func LWROfLER(ler units.Length, correlation units.Ratio) (units.Length, error) {
	if err := first(notNegative("ler", ler), signedFraction("correlation", correlation)); err != nil {
		return 0, err
	}
	return answer("lwr_of_ler", units.Length(float64(ler)*math.Sqrt(2*float64(1-correlation))))
}

// LEROfLWR is the line edge roughness of each edge of a line with the line
// width roughness lwr; the inverse of LWROfLER.
//
//	LER = LWR/√(2 (1 − correlation))
//
// lwr is in m, 0 or greater; correlation is at least −1 and less than 1, since
// a line of constant width says nothing of its edges. Errors: *ArgumentError.
// Source: that of LWROfLER.
func LEROfLWR(lwr units.Length, correlation units.Ratio) (units.Length, error) {
	err := first(notNegative("lwr", lwr), signedFraction("correlation", correlation))
	if err == nil && correlation == 1 {
		err = outside("correlation", correlation, "at least -1 and less than 1")
	}
	if err != nil {
		return 0, err
	}
	return answer("ler_of_lwr", units.Length(float64(lwr)/math.Sqrt(2*float64(1-correlation))))
}

// DoseForRoughness is the dose that takes a roughness from now to target, all
// else unchanged.
//
//	new dose = dose · (now/target)²
//
// now and target are roughnesses of one kind, in m, greater than 0; dose is in
// J/m², greater than 0. Past a factor of two, up or down, a warning says that
// the square law is stretched. Errors: *ArgumentError. Source: the 1/√N of
// shot noise with N proportional to the dose.
func DoseForRoughness(now, target units.Length, dose units.Fluence) (Warned[units.Fluence], error) {
	err := first(positive("now", now), positive("target", target), positive("dose", dose))
	if err != nil {
		return Warned[units.Fluence]{}, err
	}
	factor := float64(now) / float64(target)
	factor *= factor
	var w Warned[units.Fluence]
	if factor > 2*(1+1e-12) || factor < 0.5*(1-1e-12) {
		w.Warnings = []string{fmt.Sprintf(
			"the dose changes by a factor of %.3g: past 2x other causes of roughness than shot noise are not expected to follow", factor)}
	}
	w.Value, err = answer("dose_for_roughness", units.Fluence(float64(dose)*factor))
	return w, err
}

// ZFactor is the figure of merit that weighs resolution, roughness and dose of
// a resist; smaller is better.
//
//	Z = half_pitch³ · roughness² · dose
//
// halfPitch and roughness are in m, dose in J/m², all greater than 0. of says
// whether the roughness is of edge or width, sigmas (1 or 3) which multiple of
// sigma it is; nothing is converted, and a warning carries both along, since
// values of different kinds do not compare. Errors: *ArgumentError. Source:
// T. Wallow et al., Proc. SPIE 6921 (2008) (from memory).
func ZFactor(halfPitch, roughness units.Length, dose units.Fluence, of RoughnessOf, sigmas units.Count) (Warned[units.EnergyVolume], error) {
	err := first(positive("half_pitch", halfPitch), positive("roughness", roughness), positive("dose", dose),
		known("of", of.Words(), int(of)), either("sigmas", sigmas, 1, 3))
	if err != nil {
		return Warned[units.EnergyVolume]{}, err
	}
	r, l := float64(halfPitch), float64(roughness)
	z, err := answer("z_factor", units.EnergyVolume(r*r*r*l*l*float64(dose)))
	return Warned[units.EnergyVolume]{z, []string{
		fmt.Sprintf("from %s at %g sigma: compare it only with values of the same kind", of, float64(sigmas)),
	}}, err
}
