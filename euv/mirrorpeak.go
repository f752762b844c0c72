package euv

import (
	"math"

	"example.com/dosewright/units"
)

// PeakReflectivity is the highest reflectivity of a stack near a wavelength, for
// unpolarised light; Stack.Peak also takes s and p.
//
// angle is taken from the normal, 0° or greater and less than 90°; near is a
// wavelength in m: the peak is looked for within 10 % of it, and not beyond the
// next absorption edge of a layer on either side, so that near 13.5 nm with
// silicon in the stack it begins above silicon's L edge. The warnings are those
// of the stack. Errors: *ArgumentError, *BodyError, *FormulaError. Source: that
// of Reflectivity.
func PeakReflectivity(s Stack, angle units.Angle, near units.Length) (Warned[units.Ratio], error) {
	p, err := s.Peak(angle, Unpolarised, near)
	return Warned[units.Ratio]{units.Ratio(p.Value), s.warningsOf(err)}, err
}

// PeakWavelength is the wavelength, in m, at which PeakReflectivity is reached.
func PeakWavelength(s Stack, angle units.Angle, near units.Length) (Warned[units.Length], error) {
	p, err := s.Peak(angle, Unpolarised, near)
	return Warned[units.Length]{p.Wavelength, s.warningsOf(err)}, err
}

// Bandwidth is the full width at half maximum, in m, of the peak that
// PeakReflectivity finds: between the nearest wavelengths on either side at
// which half of it is left. A peak that is cut off before that is refused.
func Bandwidth(s Stack, angle units.Angle, near units.Length) (Warned[units.Length], error) {
	p, err := s.Peak(angle, Unpolarised, near)
	var width units.Length
	if err == nil {
		width, err = p.Bandwidth()
	}
	return Warned[units.Length]{width, s.warningsOf(err)}, err
}

// warningsOf are the stack's warnings, none beside an error.
func (s Stack) warningsOf(err error) []string {
	if err != nil {
		return nil
	}
	return s.Warnings()
}

// Peak finds the highest reflectivity near a wavelength; see PeakReflectivity.
func (s Stack) Peak(angle units.Angle, pol Polarization, near units.Length) (Peak, error) {
	if err := first(positive("near", near), s.check()); err != nil {
		return Peak{}, err
	}
	from, to := s.between(near)
	return FindPeak(ReflectivityOf(s, angle, pol), from, to, s.fringe(from))
}

// between is the range around a wavelength without an edge of absorption.
func (s Stack) between(near units.Length) (from, to units.Length) {
	const reach = 0.1
	from, to = (1-reach)*near, (1+reach)*near
	for _, m := range s.media() {
		m.edges(func(low, high float64) {
			if long := wavelengthOf(low); wavelengthOf(high) < near {
				from = max(from, long)
			} else {
				to = min(to, wavelengthOf(high))
			}
		})
	}
	return from, to
}

// fringe is the distance of the interference fringes of the whole stack,
// λ²/(2·thickness).
func (s Stack) fringe(wavelength units.Length) units.Length {
	total := 0.0
	for _, r := range s.Repeats {
		for _, l := range r.Layers {
			total += float64(r.Times) * float64(l.Thickness)
		}
	}
	return units.Length(math.Pow(float64(wavelength), 2) / (2 * total))
}
