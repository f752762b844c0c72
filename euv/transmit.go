package euv

import "example.com/dosewright/units"

func (s Stack) transmit(e *Evaluator, dst []units.Ratio) error {
	if err := s.checkTransmits("transmittance"); err != nil {
		return err
	}
	if s.Substrate != nil {
		return &BodyError{
			Body: s.String(), Asked: "transmittance",
			Why: "the light ends in the substrate, which has no other side; leave the substrate out, or make it a layer",
		}
	}
	return e.lanes(&s, dst, "transmittance", (*wave).transmittance)
}

func (s Stack) checkTransmits(asked string) error {
	if err := s.check(); err != nil {
		return err
	}
	if s.isRough() {
		return &BodyError{
			Body: "a stack with rough interfaces", Asked: asked,
			Why: "the roughness factor is known for reflection only; ask for that of the smooth stack",
		}
	}
	return nil
}

// through goes through a smooth stack from below, one film after the other. It
// writes to w.up the reflected and to w.down the transmitted amplitude, both
// over the incident one: the recursion of fold with its divisions, and beside
// it the product
//
//	t = Π (1 + r)·exp(−ikgd) / (1 + r·up)
//
// over all faces and films, which no absorber can make overflow.
func (w *wave) through(p *plan, n int) {
	w.start(n)
	for i := len(p.blocks) - 1; i >= 0; i-- {
		b := &p.blocks[i]
		w.crossFace(b.below, n)
		for left := b.times; left > 0; left-- {
			for j := b.to - 1; j >= b.from; j-- {
				f := p.steps[j].film
				multiply(w.up[:n], w.phase[f][:n])
				multiply(w.down[:n], w.half[f][:n])
				w.crossFace(p.steps[j].into, n)
			}
			if left > 1 {
				w.crossFace(b.wrap, n)
			}
		}
	}
	w.crossFace(p.top, n)
}

// halve computes half the phases of the films, which transmission needs too.
func (w *wave) halve(p *plan, l *light) {
	w.half = w.half.resize(len(p.films))
	for i, f := range p.films {
		n := len(l.k)
		l.phases(w.half[i][:n], w.normal[f.medium][:n], f.thickness/2)
	}
}

// crossFace carries both amplitudes from just below a face to just above it.
func (w *wave) crossFace(t turn, n int) {
	if t == 0 {
		return
	}
	row, sign := w.at(t)
	up, down, r := w.up[:n], w.down[:n], row[:n]
	for i := range up {
		r := complex(sign*real(r[i]), sign*imag(r[i]))
		all := 1 + r*up[i]
		up[i] = divide(r+up[i], all)
		down[i] = divide((1+r)*down[i], all)
	}
}

// transmittance writes the intensities that pass to dst, one a lane: above and
// below there is vacuum, so that |t|² is the share of the power.
func (w *wave) transmittance(dst []units.Ratio, p *plan, l *light, pol Polarization) {
	w.enter(p, l)
	w.halve(p, l)
	w.each(dst, p, l, pol, func(dst []units.Ratio) {
		w.through(p, len(dst))
		for i, t := range w.down[:len(dst)] {
			dst[i] = units.Ratio(real(t)*real(t) + imag(t)*imag(t))
		}
	})
}
