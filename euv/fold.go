package euv

import "math"

// fold goes through the stack from below. What is carried upwards are the
// amplitudes for light that ends below the stack; growing exponentials never
// occur, since each film only multiplies the upward light by its phase, which
// is at most one in size. This is the recursion of L. G. Parratt, Phys. Rev.
// 95, 359 (1954), without its divisions.
func (w *wave) fold(p *plan, n int) {
	w.start(n)
	for i := len(p.blocks) - 1; i >= 0; i-- {
		b := &p.blocks[i]
		steps, left := p.steps[b.from:b.to], b.times
		if left == 1 || b.below != b.wrap { // the last period is like no other
			w.steps(steps, b.below, n)
			left--
		}
		if left > 0 {
			w.period(steps, b.wrap, n)
			w.power(left, n)
		}
	}
	w.above(p.top, n)
}

// start lets light go down, and none come up.
func (w *wave) start(n int) {
	for i := range n {
		w.up[i&(lanes-1)], w.down[i&(lanes-1)] = 0, 1
	}
}

// above carries the amplitudes from just below a face to just above it.
func (w *wave) above(t turn, n int) {
	if t == 0 {
		return
	}
	row, sign := w.at(t)
	up, down, r := w.up[:n], w.down[:n], row[:n]
	for i := range up {
		r := complex(sign*real(r[i]), sign*imag(r[i]))
		u, d := up[i], down[i]
		up[i], down[i] = u+r*d, d+r*u
	}
}

// tidy is how many faces pass before sizes are brought back to about one: each
// at most doubles the amplitudes.
const tidy = 32

// steps carries amplitudes from below a sequence of films to its top.
func (w *wave) steps(steps []step, below turn, n int) {
	for i := len(steps) - 1; i >= 0; i-- {
		w.above(below, n)
		multiply(w.up[:n], w.phase[steps[i].film][:n])
		below = steps[i].into
		if i%tidy == 0 {
			w.tidyLight(n)
		}
	}
}

// tidyLight divides by powers of two; only the ratio of up and down has a
// meaning.
func (w *wave) tidyLight(n int) {
	up, down := w.up[:n], w.down[:n]
	for i := range up {
		if s, far := backToOne(down[i]); far {
			up[i] *= s
			down[i] *= s
		}
	}
}

// backToOne says whether a number is far from one in size, and the power of
// two that brings it back.
func backToOne(z complex128) (complex128, bool) {
	size := math.Abs(real(z)) + math.Abs(imag(z))
	if size > 0x1p-50 && size < 0x1p50 {
		return 1, false
	}
	_, e := math.Frexp(size)
	return complex(math.Ldexp(1, -e), 0), true
}
