package euv

import "example.com/dosewright/units"

// Evaluator asks bodies what they do to light: many wavelengths at once, one
// body after the other. Aim it, and then ask; asking again for a body with
// other thicknesses, densities, roughnesses or pressures searches no table and
// allocates nothing. The zero value is ready to be aimed. It is not for
// concurrent use: give each goroutine its own.
type Evaluator struct {
	table tabulated
	light light // all of it
	now   light // the part that goes through the stack
	pol   Polarization
	plan  plan
	wave  wave
}

// maxWavelengths bounds the memory of an Evaluator.
const maxWavelengths = 1_000_000

// Aim sets the light: vacuum wavelengths in any order, at most a million, the
// angle from the normal, 0° or greater and less than 90°, and the
// polarization. The wavelengths are copied. Errors: *ArgumentError; the
// evaluator is then as it was.
func (e *Evaluator) Aim(wavelengths []units.Length, angle units.Angle, pol Polarization) error {
	if err := first(checkAngle(angle), pol.check()); err != nil {
		return err
	}
	if len(wavelengths) > maxWavelengths {
		return outside("wavelengths", units.Count(len(wavelengths)), "at most a million")
	}
	for _, l := range wavelengths {
		if err := checkWavelength(l); err != nil {
			return err
		}
	}
	e.table.reset(wavelengths)
	e.pol = pol
	e.light.point(angle)
	e.light.k = e.light.k[:0]
	for _, l := range wavelengths {
		e.light.k = append(e.light.k, wavenumber(l))
	}
	return nil
}

// Reflectivity writes the share of the power that the body reflects at each
// wavelength to dst, which must have one place for each. What is refused, and
// with what error, is said at the function Reflectivity.
func (e *Evaluator) Reflectivity(dst []units.Ratio, b Body) error {
	if err := e.checkAsked(dst, b); err != nil {
		return err
	}
	return b.reflect(e, dst)
}

// Transmittance writes the share of the power that passes the body once; see
// Reflectivity and the function Transmittance.
func (e *Evaluator) Transmittance(dst []units.Ratio, b Body) error {
	if err := e.checkAsked(dst, b); err != nil {
		return err
	}
	return b.transmit(e, dst)
}

func (e *Evaluator) checkAsked(dst []units.Ratio, b Body) error {
	if len(dst) != len(e.light.k) {
		return outside("length of dst", units.Count(len(dst)), "the number of wavelengths, "+formatRatio(float64(len(e.light.k))))
	}
	if b == nil {
		return &BodyError{Body: "no body", Asked: "light", Why: "give a stack, a surface, a film or a gas column"}
	}
	return nil
}

// reflectStack is reflection by a checked stack.
func (e *Evaluator) reflectStack(s *Stack, dst []units.Ratio) error {
	return e.lanes(s, dst, "reflectivity", (*wave).reflectivity)
}

// lanes plans a checked stack and takes some wavelengths at a time through it.
func (e *Evaluator) lanes(s *Stack, dst []units.Ratio, what string, do func(*wave, []units.Ratio, *plan, *light, Polarization)) error {
	e.plan.make(s)
	e.wave.fit(&e.plan)
	e.now = e.light
	for from := 0; from < len(dst); from += lanes {
		to := min(from+lanes, len(dst))
		e.now.k = e.light.k[from:to]
		if err := e.wave.tabulate(&e.plan, &e.table, from, to); err != nil {
			return err
		}
		do(&e.wave, dst[from:to], &e.plan, &e.now, e.pol)
	}
	for i, v := range dst {
		if v >= 0 && v <= 1 {
			continue
		}
		var err error
		if dst[i], err = clampUnit(what, v); err != nil {
			return err
		}
	}
	return nil
}
