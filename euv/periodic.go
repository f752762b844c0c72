package euv

// period multiplies the films and faces of one period of a repeating sequence,
// from just inside its first film to just inside the first film of the next:
//
//	up   = a·up' + b·down'
//	down = c·up' + d·down'
func (w *wave) period(steps []step, wrap turn, n int) {
	row, sign := w.at(wrap)
	a, b, c, d, r := w.a[:n], w.b[:n], w.c[:n], w.d[:n], row[:n]
	for i := range a {
		r := complex(sign*real(r[i]), sign*imag(r[i]))
		a[i], b[i], c[i], d[i] = 1, r, r, 1
	}
	for i := len(steps) - 1; i >= 0; i-- {
		multiply(a, w.phase[steps[i].film][:n])
		multiply(b, w.phase[steps[i].film][:n])
		if t := steps[i].into; t != 0 {
			w.periodAbove(t, n)
		}
		if i%tidy == tidy-1 {
			w.tidyPeriod(n)
		}
	}
}

// periodAbove multiplies a face to the period.
func (w *wave) periodAbove(t turn, n int) {
	row, sign := w.at(t)
	as, bs, cs, ds, r := w.a[:n], w.b[:n], w.c[:n], w.d[:n], row[:n]
	for i := range as {
		r := complex(sign*real(r[i]), sign*imag(r[i]))
		a, b, c, d := as[i], bs[i], cs[i], ds[i]
		as[i], bs[i], cs[i], ds[i] = a+r*c, b+r*d, c+r*a, d+r*b
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

// power applies the period times times, 1 or more, in about log2(times) steps.
//
// With eigenvalues p and q, |p| ≥ |q|, the m-th power of a two-by-two matrix M
// is, up to the factor p^(m−1),
//
//	M·S(m) − q·S(m−1)        S(m) = 1 + ρ + ρ² + … + ρ^(m−1),  ρ = q/p
//
// which is the formula with Chebyshev's polynomials of the second kind
// (F. Abelès, Ann. Phys. 5, 596, 1950) written so that nothing grows: |ρ| ≤ 1,
// and for thick absorbers ρ just vanishes. Nothing divides by p − q either, so
// that the edge of the stop band, where the two meet, is no special place.
func (w *wave) power(times, n int) {
	w.eigenvalues(n)
	a, b, c, d := w.a[:n], w.b[:n], w.c[:n], w.d[:n]
	ups, downs, ratio, low := w.up[:n], w.down[:n], w.ratio[:n], w.low[:n]
	for i := range a {
		before := geometric(ratio[i], times-1)
		sum := 1 + ratio[i]*before
		q := low[i] * before
		up, down := ups[i], downs[i]
		ups[i] = sum*(a[i]*up+b[i]*down) - q*up
		downs[i] = sum*(c[i]*up+d[i]*down) - q*down
	}
	w.tidyLight(n)
}

// eigenvalues finds q and ρ of power.
func (w *wave) eigenvalues(n int) {
	a, b, c, d, ratio, low := w.a[:n], w.b[:n], w.c[:n], w.d[:n], w.ratio[:n], w.low[:n]
	for i := range a {
		half, delta := 0.5*(a[i]+d[i]), 0.5*(a[i]-d[i])
		root := squareRoot(delta*delta + b[i]*c[i])
		if real(half)*real(root)+imag(half)*imag(root) < 0 {
			root = -root
		}
		p, q := half+root, half-root
		low[i], ratio[i] = q, 0
		if p != 0 {
			ratio[i] = divide(q, p)
		}
	}
}

// geometric is 1 + x + … + x^(n−1), by doubling.
func geometric(x complex128, n int) complex128 {
	if n <= 0 {
		return 0
	}
	digit := 1 // the leading binary digit of n
	for digit <= n>>1 {
		digit <<= 1
	}
	sum, power := complex128(1), x // of the digits read so far
	for digit >>= 1; digit > 0; digit >>= 1 {
		sum += sum * power
		power *= power
		if n&digit != 0 {
			sum += power
			power *= x
		}
	}
	return sum
}
