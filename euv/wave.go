package euv

import (
	"math"

	"example.com/dosewright/units"
)

// light is what falls on a stack: some wavelengths ("lanes") at one angle. The
// work goes through the stack once, and at each place through all lanes, so that
// the processor overlaps them.
type light struct {
	k             []float64 // wave numbers 2π/λ in m⁻¹, one a lane
	sinSq, cosine float64   // of the angle from the normal
}

// lanes is how many wavelengths go through a stack together: few enough that
// everything about them stays in the first cache.
const lanes = 64

func wavenumber(wavelength units.Length) float64 { return 2 * math.Pi / float64(wavelength) }

// point gives the light its angle.
func (l *light) point(angle units.Angle) {
	sin, cos := math.Sincos(float64(angle))
	l.sinSq, l.cosine = sin*sin, cos
}

// rows are lists of complex numbers, one a lane.
type rows [][lanes]complex128

// wave is what the media, films and faces of a plan do to light: memory for
// one evaluation after the other.
type wave struct {
	index  [][lanes]Index    // of each medium
	normal rows              // normal component of each medium, over k
	phase  rows              // of each film
	half   rows              // half the phase of each film, for transmission
	r      rows              // reflection coefficient of each face, seen from above
	damp   [lanes]complex128 // Névot–Croce factor of one face

	up, down   [lanes]complex128 // amplitudes of the light, up to a common factor
	a, b, c, d [lanes]complex128 // one period of a repeating sequence

	other [lanes]units.Ratio // intensities of s, beside those of p
}

// fit gives the wave the sizes of a plan.
func (w *wave) fit(p *plan) {
	if cap(w.index) < len(p.media) {
		w.index = make([][lanes]Index, len(p.media))
	}
	w.index = w.index[:len(p.media)]
	w.normal = w.normal.resize(len(p.media))
	w.phase = w.phase.resize(len(p.films))
	w.r = w.r.resize(len(p.faces))
}

func (r rows) resize(n int) rows {
	if cap(r) < n {
		return make(rows, n)
	}
	return r[:n]
}

// tabulate finds the indices of the plan's media, for the wavelengths of the
// table from one number to another.
func (w *wave) tabulate(p *plan, t *tabulated, from, to int) error {
	for i, m := range p.media {
		if err := m.indices(w.index[i][:to-from], t, from); err != nil {
			return err
		}
	}
	return nil
}

// enter computes the films' phases and the faces' coefficients for s.
func (w *wave) enter(p *plan, l *light) {
	n := len(l.k)
	for i := range w.normal[0][:n] { // the vacuum above
		w.normal[0][i] = complex(l.cosine, 0)
	}
	for m := 1; m < len(p.media); m++ {
		l.normals(w.normal[m][:n], w.index[m][:n])
	}
	for i, f := range p.films {
		l.phases(w.phase[i][:n], w.normal[f.medium][:n], f.thickness)
	}
	for i, f := range p.faces {
		above, below := w.normal[f.above][:n], w.normal[f.below][:n]
		reflectS(w.r[i][:n], above, below)
		if f.variance > 0 {
			l.damps(w.damp[:n], above, below, f.variance)
			multiply(w.r[i][:n], w.damp[:n])
		}
	}
}

// turnToP turns the coefficients for s into those for p, which phases and
// roughness do not notice.
func (w *wave) turnToP(p *plan, l *light) {
	n := len(l.k)
	for i, f := range p.faces {
		reflectP(w.r[i][:n], w.normal[f.above][:n], w.normal[f.below][:n], l.sinSq)
	}
}

// reflectivity writes the intensities that the plan reflects to dst, one a
// lane.
func (w *wave) reflectivity(dst []units.Ratio, p *plan, l *light, pol Polarization) {
	w.enter(p, l)
	w.each(dst, p, l, pol, func(dst []units.Ratio) {
		w.fold(p, len(dst))
		w.intensities(dst)
	})
}

// each asks for the intensities of the polarizations that the light has, and
// takes their mean.
func (w *wave) each(dst []units.Ratio, p *plan, l *light, pol Polarization, ask func([]units.Ratio)) {
	if pol == PolarizationS || l.sinSq == 0 {
		ask(dst)
		return
	}
	if pol == Unpolarised {
		ask(w.other[:len(dst)])
	}
	w.turnToP(p, l)
	ask(dst)
	if pol == Unpolarised {
		for i := range dst {
			dst[i] = 0.5 * (dst[i] + w.other[i])
		}
	}
}

func (w *wave) intensities(dst []units.Ratio) {
	for i := range dst {
		u, d := w.up[i&(lanes-1)], w.down[i&(lanes-1)]
		dst[i] = units.Ratio((real(u)*real(u) + imag(u)*imag(u)) / (real(d)*real(d) + imag(d)*imag(d)))
	}
}

// at is the coefficient of a face as it occurs in the stack: the row, and the
// sign to put before it.
func (w *wave) at(t turn) (*[lanes]complex128, float64) {
	switch {
	case t > 0:
		return &w.r[t-1], 1
	case t < 0:
		return &w.r[-t-1], -1
	}
	return new([lanes]complex128), 0
}
