package study

import "math"

const (
	// relativeStep is the least step of a slope, relative to the input: with a
	// smaller one rounding costs more digits than curvature does.
	relativeStep = 0x1p-14
	shrinks      = 6 // tries, each with a quarter of the step
)

// slope is the derivative of f by one slot at x, for an input with the standard
// uncertainty u, and whether it had to be taken on one side.
//
// The points lie at ±u and ±u/2 (the step of JCGM 100:2008, 5.1.3 note 2, with
// the curvature of third order removed), or further out where u is less than
// 6e-5 of the input. Where f has no value there, the step shrinks; where f ends
// at x, as a ratio does at 1, the points lie on the other side.
func (f Eval) slope(x []float64, slot int, u float64) (c float64, oneSided bool, err error) {
	mid := x[slot]
	defer func() { x[slot] = mid }()
	widest := math.Max(u, relativeStep*math.Abs(mid))
	at := func(h float64) (y float64) {
		if err == nil {
			x[slot] = mid + h
			y, err = f.at(x)
		}
		return y
	}
	try := func(formula func(h float64) float64) (slope float64, done bool) {
		for h, left := widest, shrinks; left > 0; h, left = h/4, left-1 {
			err = nil
			if slope = formula(h); err == nil {
				return slope, true
			}
		}
		return 0, false
	}
	c, done := try(func(h float64) float64 {
		return (8*(at(h/2)-at(-h/2)) - (at(h) - at(-h))) / (6 * h)
	})
	for _, side := range []float64{1, -1} {
		if !done {
			oneSided = true
			c, done = try(func(h float64) float64 {
				h *= side / 3
				return (-11*at(0) + 18*at(h) - 9*at(2*h) + 2*at(3*h)) / (6 * h)
			})
		}
	}
	switch {
	case !done:
		return 0, false, err
	case !finite(c):
		return 0, false, ErrNotFinite
	}
	return c, oneSided, nil
}
