package num

import "math"

const (
	golden       = 0.38196601125010515 // 2 − golden ratio
	maximumSteps = 400                 // golden section alone needs about 80
)

// Maximum finds a local maximum of f between a and b, a < b: Brent's method
// (Algorithms for Minimization without Derivatives, 1973, chapter 5), which
// mixes golden section with parabolic interpolation, and then the two ends,
// which win when they are higher; x is then a or b exactly. A function with
// one hump has its maximum found; with several, bracket the highest first.
//
// tol is the tolerance of the place, relative to |x|; it never counts as less
// than 1e-15 of the interval. Since a smooth hump is flat at its top, rounding
// hides the place below about 1e-8 of the hump's width, however small tol is.
// Errors: ErrInterval, ErrNotFinite.
func Maximum(f func(float64) float64, a, b, tol float64) (x, y float64, err error) {
	if err := ordered(a, b); err != nil {
		return 0, 0, err
	}
	fa, fb := f(a), f(b)
	if !finite(fa) || !finite(fb) {
		return 0, 0, ErrNotFinite
	}
	x, y, err = interior(f, a, b, tol)
	switch {
	case err != nil:
		return 0, 0, err
	case fa >= y && fa >= fb:
		return a, fa, nil
	case fb >= y:
		return b, fb, nil
	}
	return x, y, nil
}

// hump is the state of the search: x is the best place, w and v the second and
// third best; d and e are the last two steps.
type hump struct {
	a, b, x, w, v, fx, fw, fv, d, e float64
}

func interior(f func(float64) float64, a, b, tol float64) (x, y float64, err error) {
	floor := 1e-15 * (b - a)
	start := a + golden*(b-a)
	y = f(start)
	if !finite(y) {
		return 0, 0, ErrNotFinite
	}
	s := hump{a: a, b: b, x: start, w: start, v: start, fx: y, fw: y, fv: y}
	for range maximumSteps {
		mid := 0.5*s.a + 0.5*s.b
		near := math.Max(tol*math.Abs(s.x), floor) + epsilon*math.Abs(s.x)
		if math.Abs(s.x-mid) <= 2*near-0.5*(s.b-s.a) {
			return s.x, s.fx, nil
		}
		s.step(mid, near)
		u := s.x + s.d
		if math.Abs(s.d) < near {
			u = s.x + math.Copysign(near, s.d)
		}
		fu := f(u)
		if !finite(fu) {
			return 0, 0, ErrNotFinite
		}
		s.take(u, fu)
	}
	return 0, 0, ErrNoConvergence
}

// step chooses the next step: to the top of the parabola through the three
// best places when that is trustworthy, else golden section.
func (s *hump) step(mid, near float64) {
	if math.Abs(s.e) > near {
		r := (s.x - s.w) * (s.fx - s.fv)
		q := (s.x - s.v) * (s.fx - s.fw)
		p := (s.x-s.v)*q - (s.x-s.w)*r
		q = 2 * (q - r)
		if q > 0 {
			p = -p
		} else {
			q = -q
		}
		before := s.e
		s.e = s.d
		if math.Abs(p) < math.Abs(0.5*q*before) && p > q*(s.a-s.x) && p < q*(s.b-s.x) {
			s.d = p / q
			if u := s.x + s.d; u-s.a < 2*near || s.b-u < 2*near {
				s.d = math.Copysign(near, mid-s.x)
			}
			return
		}
	}
	s.e = s.b - s.x
	if s.x >= mid {
		s.e = s.a - s.x
	}
	s.d = golden * s.e
}

// take puts a new value in its place among the best three and narrows the
// interval.
func (s *hump) take(u, fu float64) {
	if fu >= s.fx {
		if u >= s.x {
			s.a = s.x
		} else {
			s.b = s.x
		}
		s.v, s.w, s.x = s.w, s.x, u
		s.fv, s.fw, s.fx = s.fw, s.fx, fu
		return
	}
	if u < s.x {
		s.a = u
	} else {
		s.b = u
	}
	switch {
	case fu >= s.fw || s.w == s.x:
		s.v, s.w = s.w, u
		s.fv, s.fw = s.fw, fu
	case fu >= s.fv || s.v == s.x || s.v == s.w:
		s.v, s.fv = u, fu
	}
}
