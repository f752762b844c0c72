package euv

import (
	"math"

	"example.com/dosewright/units"
)

// light is what falls on a stack: some wavelengths ("lanes") at one angle, and
// the indices of all media there. The work goes through the stack once, and at
// each place through all lanes, so that the processor overlaps them.
type light struct {
	k             []float64 // wave numbers 2π/λ in m⁻¹, one a lane
	sinSq, cosine float64   // of the angle from the normal
	index         [][]Index // of each medium of the plan, one a lane
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

// between is the part of the light from lane from to lane to; its indices stand
// in rows, which is made longer when it must be.
func (l *light) between(from, to int, rows [][]Index) light {
	part := *l
	part.k, part.index = l.k[from:to], rows[:0]
	for _, row := range l.index {
		part.index = append(part.index, row[from:to])
	}
	return part
}

// rows are lists of complex numbers, one a lane.
type rows [][lanes]complex128

// wave is what the media, films and faces of a plan do to light: memory for
// one evaluation after the other.
type wave struct {
	normal rows // normal component of each medium, over k
	square rows // n² of each medium, for p
	phase  rows // of each film
	half   rows // half the phase of each film, for transmission
	damp   rows // Névot–Croce factor of each face
	r      rows // reflection coefficient of each face, seen from above

	up, down   [lanes]complex128 // amplitudes of the light, up to a common factor
	a, b, c, d [lanes]complex128 // one period of a repeating sequence
	ratio, low [lanes]complex128 // of its eigenvalues, and the lower of them

	other [lanes]units.Ratio // intensities of p, beside those of s
}

// fit gives the wave the sizes of a plan.
func (w *wave) fit(p *plan) {
	w.normal = w.normal.resize(len(p.media))
	w.square = w.square.resize(len(p.media))
	w.phase = w.phase.resize(len(p.films))
	w.damp = w.damp.resize(len(p.faces))
	w.r = w.r.resize(len(p.faces))
}

func (r rows) resize(n int) rows {
	if cap(r) < n {
		return make(rows, n)
	}
	return r[:n]
}

// enter computes what both polarizations share.
func (w *wave) enter(p *plan, l *light) {
	for m := range p.media {
		l.normals(w.normal[m][:len(l.k)], l.index[m])
	}
	for i, f := range p.films {
		l.phases(w.phase[i][:len(l.k)], w.normal[f.medium][:len(l.k)], f.thickness)
	}
	for i, f := range p.faces {
		if f.variance > 0 {
			l.damps(w.damp[i][:len(l.k)], w.normal[f.above][:len(l.k)], w.normal[f.below][:len(l.k)], f.variance)
		}
	}
}

// reflect computes the coefficients of the faces for one polarization.
func (w *wave) reflect(p *plan, l *light, pol Polarization) {
	n := len(l.k)
	if pol == PolarizationP {
		for m := range p.media {
			squares(w.square[m][:n], l.index[m])
		}
	}
	for i, f := range p.faces {
		r := w.r[i][:n]
		if pol == PolarizationP {
			reflectP(r, w.normal[f.above][:n], w.normal[f.below][:n], w.square[f.above][:n], w.square[f.below][:n])
		} else {
			reflectS(r, w.normal[f.above][:n], w.normal[f.below][:n])
		}
		if f.variance > 0 {
			multiply(r, w.damp[i][:n])
		}
	}
}

// reflectivity writes the intensities that the plan reflects to dst, one a
// lane.
func (w *wave) reflectivity(dst []units.Ratio, p *plan, l *light, pol Polarization) {
	w.enter(p, l)
	w.each(dst, l, pol, func(dst []units.Ratio, pol Polarization) {
		w.reflect(p, l, pol)
		w.fold(p, len(l.k))
		w.intensities(dst)
	})
}

// each asks for the intensities of the polarizations that the light has, and
// takes their mean.
func (w *wave) each(dst []units.Ratio, l *light, pol Polarization, ask func([]units.Ratio, Polarization)) {
	if l.sinSq == 0 {
		pol = PolarizationS
	}
	if pol != Unpolarised {
		ask(dst, pol)
		return
	}
	ask(dst, PolarizationS)
	ask(w.other[:len(dst)], PolarizationP)
	for i := range dst {
		dst[i] = 0.5 * (dst[i] + w.other[i])
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
