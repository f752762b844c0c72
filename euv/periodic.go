package euv

import "math/bits"

// period multiplies the films and faces of one period of a repeating sequence,
// from just inside its first film to just inside the first film of the next:
//
//	up   = a·up' + b·down'
//	down = c·up' + d·down'
func (w *wave) period(steps []step, wrap turn, n int) {
	last := len(steps) - 1
	row, sign := w.at(wrap)
	a, b, c, d := w.a[:n], w.b[:n], w.c[:n], w.d[:n]
	r, phase := row[:n], w.phase[steps[last].film][:n]
	for i := range a {
		r := complex(sign*real(r[i]), sign*imag(r[i]))
		a[i], b[i], c[i], d[i] = phase[i], phase[i]*r, r, 1
	}
	for i := last - 1; i >= 0; i-- {
		w.periodAbove(steps[i+1].into, steps[i].film, n)
		if i%tidy == tidy-1 {
			w.tidyPeriod(n)
		}
	}
}

// periodAbove multiplies a face and the film above it to the period.
func (w *wave) periodAbove(t turn, film, n int) {
	row, sign := w.at(t)
	as, bs, cs, ds := w.a[:n], w.b[:n], w.c[:n], w.d[:n]
	rs, phase := row[:n], w.phase[film][:n]
	for i := range as {
		r := complex(sign*real(rs[i]), sign*imag(rs[i]))
		a, b, c, d := as[i], bs[i], cs[i], ds[i]
		as[i], bs[i], cs[i], ds[i] = phase[i]*(a+r*c), phase[i]*(b+r*d), c+r*a, d+r*b
	}
}

// tidyPeriod divides all four by one power of two.
func (w *wave) tidyPeriod(n int) {
	for i := range n {
		if s, far := backToOne(w.d[i]); far {
			w.a[i] *= s
			w.b[i] *= s
			w.c[i] *= s
			w.d[i] *= s
		}
	}
}

// power applies the period times times, 1 or more.
//
// A two-by-two matrix is h + N, with half its trace h and N = (δ b; c −δ) of
// trace 0, whose square is a number: N² = δ² + bc. With w = √N² its eigenvalues
// are p = h + w and q = h − w, and its m-th power is, up to a factor,
//
//	w(1 + ρᵐ) + (1 − ρᵐ)N        ρ = q/p
//
// which is the formula with Chebyshev's polynomials of the second kind
// (F. Abelès, Ann. Phys. 5, 596, 1950) written so that nothing grows: with
// |p| ≥ |q|, ρᵐ of a thick absorber just vanishes.
func (w *wave) power(times, n int) {
	a, b, c, d := w.a[:n], w.b[:n], w.c[:n], w.d[:n]
	ups, downs := w.up[:n], w.down[:n]
	for i := range a {
		h, delta := half(a[i]+d[i]), half(a[i]-d[i])
		root := squareRoot(delta*delta + b[i]*c[i])
		if real(h)*real(root)+imag(h)*imag(root) < 0 {
			root = -root
		}
		p, q := h+root, h-root
		var one, many complex128
		if sizeSq(root) > edge*sizeSq(p) {
			all := raised(divide(q, p), times)
			one, many = root*(1+all), 1-all
		} else {
			one, many = atEdge(p, q, times)
		}
		up, down := ups[i], downs[i]
		if up == 0 { // only the ratio of the two has a meaning
			ups[i], downs[i] = many*b[i], one-many*delta
			continue
		}
		ups[i] = one*up + many*(delta*up+b[i]*down)
		downs[i] = one*down + many*(c[i]*up-delta*down)
	}
	w.tidyLight(n)
}

// edge is the square of w/p below which 1 − ρᵐ loses digits.
const edge = 1e-4

// atEdge is the pair of power near the edge of the stop band, where w vanishes:
// both over 2w/p, with 1 + ρ + … + ρᵐ⁻¹ in the place of (1 − ρᵐ)/(1 − ρ).
func atEdge(p, q complex128, times int) (one, many complex128) {
	if p == 0 {
		return 0, 1
	}
	ratio := divide(q, p)
	return half(p) * (1 + raised(ratio, times)), geometric(ratio, times)
}

// raised is x to a power of 1 or more.
func raised(x complex128, power int) complex128 {
	y := x
	for digit := leading(power) >> 1; digit > 0; digit >>= 1 {
		y *= y
		if power&digit != 0 {
			y *= x
		}
	}
	return y
}

// geometric is 1 + x + … + x^(n−1), by doubling.
func geometric(x complex128, n int) complex128 {
	sum, power := complex128(1), x // of the digits of n read so far
	for digit := leading(n) >> 1; digit > 0; digit >>= 1 {
		sum += sum * power
		power *= power
		if n&digit != 0 {
			sum += power
			power *= x
		}
	}
	return sum
}

// leading is the leading binary digit of n.
func leading(n int) int { return 1 << (bits.Len(uint(n)) - 1) }

func half(z complex128) complex128 { return complex(0.5*real(z), 0.5*imag(z)) }

func sizeSq(z complex128) float64 { return real(z)*real(z) + imag(z)*imag(z) }
