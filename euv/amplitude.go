package euv

import "example.com/dosewright/units"

// ReflectedAmplitude is the field that the stack reflects over the field that
// comes, both at the stack's top: of the component along the surface, so that s
// and p agree at normal incidence, with fields as exp(+iωt). Its square is the
// reflectivity. The polarization is s or p, or any at normal incidence.
// wavelength and angle are those of Reflectivity, and so are errors and source.
func (s Stack) ReflectedAmplitude(wavelength units.Length, angle units.Angle, pol Polarization) (complex128, error) {
	if err := s.check(); err != nil {
		return 0, err
	}
	w, err := s.amplitudes(wavelength, angle, pol, func(w *wave, p *plan, _ *light) {
		w.fold(p, 1)
		w.up[0] /= w.down[0]
	})
	if err != nil {
		return 0, err
	}
	return w.up[0], nil
}

// TransmittedAmplitude is the field just below the stack's lowest interface,
// over the field that comes to its top; the rest is as in ReflectedAmplitude.
// Rough stacks are refused. Without a substrate its square is the
// transmittance.
func (s Stack) TransmittedAmplitude(wavelength units.Length, angle units.Angle, pol Polarization) (complex128, error) {
	if err := s.checkTransmits("transmitted amplitude"); err != nil {
		return 0, err
	}
	w, err := s.amplitudes(wavelength, angle, pol, func(w *wave, p *plan, l *light) {
		w.halve(p, l)
		w.through(p, 1)
	})
	if err != nil {
		return 0, err
	}
	return w.down[0], nil
}

// amplitudes lets one wave through a checked stack.
func (s Stack) amplitudes(wavelength units.Length, angle units.Angle, pol Polarization, do func(*wave, *plan, *light)) (*wave, error) {
	if pol == Unpolarised && angle > 0 {
		return nil, outside("polarization", units.Count(pol), "s or p: unpolarised light has no one amplitude")
	}
	var e Evaluator
	if err := e.Aim([]units.Length{wavelength}, angle, pol); err != nil {
		return nil, err
	}
	e.plan.make(&s)
	e.wave.fit(&e.plan)
	if err := e.wave.tabulate(&e.plan, &e.table, 0, 1); err != nil {
		return nil, err
	}
	e.wave.enter(&e.plan, &e.light)
	if pol == PolarizationP {
		e.wave.turnToP(&e.plan, &e.light)
	}
	do(&e.wave, &e.plan, &e.light)
	for _, a := range []complex128{e.wave.up[0], e.wave.down[0]} {
		if !isFinite(real(a)) || !isFinite(imag(a)) {
			return nil, outside("amplitude", units.Ratio(real(a)), "finite: here a roughness is too large, or an index too strange")
		}
	}
	return &e.wave, nil
}
