package euv

import (
	"math"

	"example.com/dosewright/units"
)

// The conventions of this package: fields go as exp(+iωt), n = 1 − δ − iβ, the
// normal component of a wave vector is k·g with g = √(n² − sin²θ) on the
// branch with real part ≥ 0 and imaginary part ≤ 0, so that light decays away
// from the source. Amplitudes are of the field component along the surface,
// so that r of s and p agree at normal incidence.

// checkAngle refuses angles from the normal that are not 0 or more and less
// than 90°.
func checkAngle(angle units.Angle) error {
	if !(angle >= 0 && float64(angle) < math.Pi/2) {
		return outside("angle", angle, "from the normal, 0° or greater and less than 90°")
	}
	return nil
}

// checkWavelength refuses what no formula here takes: the tables reach from 4 nm
// to 50 nm, a given index further.
func checkWavelength(wavelength units.Length) error {
	if !(wavelength >= 1e-12 && wavelength <= 1) {
		return outside("wavelength", wavelength, "between 1 pm and 1 m")
	}
	return nil
}

// normals writes g in a medium, without loss at grazing incidence: n² − sin²θ
// is cos²θ − 2δ + δ² − β² − 2i(1−δ)β.
func (l *light) normals(dst []complex128, index []Index) {
	if l.sinSq == 0 {
		for i, n := range index {
			dst[i] = complex(1-n.Delta, -n.Beta)
		}
		return
	}
	for i, n := range index {
		x := l.cosine*l.cosine - n.Delta*(2-n.Delta) - n.Beta*n.Beta
		dst[i] = lowerRoot(x, 2*(1-n.Delta)*n.Beta)
	}
}

// lowerRoot is √(x − iy) for y ≥ 0 with real part ≥ 0 and imaginary part ≤ 0.
func lowerRoot(x, y float64) complex128 {
	m := math.Sqrt(x*x + y*y)
	if x >= 0 {
		re := math.Sqrt(0.5 * (m + x))
		if re == 0 {
			return 0
		}
		return complex(re, -0.5*y/re)
	}
	im := math.Sqrt(0.5 * (m - x))
	return complex(0.5*y/im, -im)
}

// squareRoot is the root with real part ≥ 0.
func squareRoot(z complex128) complex128 {
	x, y := real(z), imag(z)
	m := math.Sqrt(x*x + y*y)
	if x >= 0 {
		re := math.Sqrt(0.5 * (m + x))
		if re == 0 {
			return 0
		}
		return complex(re, 0.5*y/re)
	}
	im := math.Copysign(math.Sqrt(0.5*(m-x)), y)
	return complex(0.5*y/im, im)
}

// phases writes exp(−2i·k·g·d): what the reflected amplitude gains on its way
// down and up a film of thickness d.
func (l *light) phases(dst, g []complex128, d float64) {
	for i, k := range l.k {
		t := 2 * k * d
		dst[i] = complex(t*imag(g[i]), -t*real(g[i]))
	}
	exponentials(dst)
}

// damps writes the Névot–Croce factor exp(−2·k²·g·h·σ²) of an interface
// between media with normal components g and h and variance σ² of its height
// (L. Névot, P. Croce, Rev. Phys. Appl. 15, 761, 1980).
func (l *light) damps(dst, g, h []complex128, variance float64) {
	for i, k := range l.k {
		e := g[i] * h[i]
		s := -2 * k * k * variance
		dst[i] = complex(s*real(e), s*imag(e))
	}
	exponentials(dst)
}

// divide is a/b for b of ordinary size: the built-in division guards against
// overflow at several times the cost.
func divide(a, b complex128) complex128 {
	w := 1 / (real(b)*real(b) + imag(b)*imag(b))
	return complex((real(a)*real(b)+imag(a)*imag(b))*w, (imag(a)*real(b)-real(a)*imag(b))*w)
}

// multiply multiplies lane by lane.
func multiply(dst, by []complex128) {
	for i := range dst {
		dst[i] *= by[i]
	}
}

// reflectS writes Fresnel's coefficient of a smooth interface for s, between
// media with normal components g, from which the light comes, and h.
func reflectS(dst, g, h []complex128) {
	for i := range dst {
		dst[i] = divide(g[i]-h[i], g[i]+h[i])
	}
}

// reflectP turns the coefficients for s into those for p. With n² = g² + sin²θ
// in every medium, that for p, (n²h − m²g)/(n²h + m²g), has the one for s as a
// factor:
//
//	(g − h)/(g + h) · (gh − sin²θ)/(gh + sin²θ)
func reflectP(dst, g, h []complex128, sinSq float64) {
	for i := range dst {
		gh, s := g[i]*h[i], complex(sinSq, 0)
		dst[i] *= divide(gh-s, gh+s)
	}
}
