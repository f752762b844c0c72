package euv

import (
	"math"
	"sync"
)

// exponentials writes exp(z) over each z = x + iy: what films and rough faces
// do to a wave. The standard library's exp and sincos, one call each, took half
// the time of a mirror's spectrum. Here y is cut at the nearest of 64 places on
// the circle, so that short polynomials are left, in one loop that the processor
// overlaps from lane to lane. The error is below 4e-16 of the absolute
// value.
func exponentials(z []complex128) {
	circle := circle()
	for i, at := range z {
		x, y := real(at), imag(at)
		if !(math.Abs(x) < farOut && math.Abs(y) < farOut) {
			z[i] = farExponential(x, y)
			continue
		}
		var e float64
		if math.Abs(x) <= 1./16 { // a thin film, a smooth face
			e = 1 + x*(1+x*(1./2+x*(1./6+x*(1./24+x*(1./120+x*(1./720+x*(1./5040+x*(1./40320))))))))
		} else {
			e = exponential(x)
		}
		places := y*(32/math.Pi) + toWhole
		on := circle[math.Float64bits(places)%64]
		places -= toWhole
		r := (y - places*placeHigh) - places*placeLow
		s := r * r
		cos := e + e*(s*(-1./2+s*(1./24+s*(-1./720+s*(1./40320)))))
		sin := e * (r + r*(s*(-1./6+s*(1./120+s*(-1./5040)))))
		z[i] = complex(real(on)*cos-imag(on)*sin, imag(on)*cos+real(on)*sin)
	}
}

// circle holds exp(iπk/32), each from the angle to the nearest axis.
var circle = sync.OnceValue(func() *[64]complex128 {
	var c [64]complex128
	for k := range c {
		axis := (k + 8) / 16
		sin, cos := math.Sincos(float64(k-16*axis) * (math.Pi / 32))
		c[k] = [...]complex128{complex(cos, sin), complex(-sin, cos), complex(-cos, -sin), complex(sin, -cos)}[axis%4]
	}
	return &c
})

const (
	farOut = 700 // beyond it the range of float64 ends, or a place is not exact

	// Added to a number below 2⁵¹ in size, it leaves the nearest whole one in
	// the lowest bits.
	toWhole = 1.5 * (1 << 52)

	// π/32 and ln 2 in two parts each; the high one has so few binary digits
	// that its product with a whole number below 2¹⁹ is exact.
	placeHigh = 0x1.921fb544p-4
	placeLow  = math.Pi/32 - placeHigh
	ln2High   = 0x1.62e42fefp-1
	ln2Low    = math.Ln2 - ln2High
)

// exponential is exp(x) for |x| < 700: a power of two times a polynomial.
func exponential(x float64) float64 {
	twos := x*(1/math.Ln2) + toWhole
	power := math.Float64bits(twos) << 52
	twos -= toWhole
	r := (x - twos*ln2High) - twos*ln2Low
	p := 1 + r*(1+r*(1./2+r*(1./6+r*(1./24+r*(1./120+r*(1./720+r*(1./5040+r*(1./40320+
		r*(1./362880+r*(1./3628800+r*(1./39916800+r*(1./479001600+r*(1./6227020800)))))))))))))
	return math.Float64frombits(math.Float64bits(p) + power)
}

// farExponential is exp(x + iy) anywhere.
func farExponential(x, y float64) complex128 {
	sin, cos := math.Sincos(y)
	e := math.Exp(x)
	return complex(e*cos, e*sin)
}
