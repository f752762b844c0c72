package num

import "math"

const (
	epsilon   = 0x1p-52 // distance from 1 to the next float64
	rootSteps = 400     // bisection alone needs about 110 in the worst case
)

// Root finds a zero of f between a and b, a < b, where f has opposite signs:
// Brent's method (R. P. Brent, Algorithms for Minimization without
// Derivatives, 1973, chapter 4), which mixes bisection with inverse
// interpolation and never leaves the bracket. The place is right to the
// relative tolerance tolRel (0 means to the last digit or so); a zero at the
// origin is found to tolRel times 1e-16 of the interval.
//
// A function that jumps through zero, or has a pole, has its sign change
// found: look at f(x) when that can happen. Errors: ErrInterval, ErrNotFinite,
// ErrNoBracket.
func Root(f func(float64) float64, a, b, tolRel float64) (float64, error) {
	if err := ordered(a, b); err != nil {
		return 0, err
	}
	fa, fb := f(a), f(b)
	switch {
	case !finite(fa) || !finite(fb):
		return 0, ErrNotFinite
	case fa == 0:
		return a, nil
	case fb == 0:
		return b, nil
	case (fa > 0) == (fb > 0):
		return 0, ErrNoBracket
	}
	return brentRoot(f, bracket{a: a, b: b, c: a, fa: fa, fb: fb, fc: fa, d: b - a, e: b - a}, tolRel)
}

// bracket is the state of the search: b is the best place, c lies on the other
// side of the zero, a is the best place before; d and e are the last two steps.
type bracket struct {
	a, b, c, fa, fb, fc, d, e float64
}

func brentRoot(f func(float64) float64, s bracket, tolRel float64) (float64, error) {
	floor := epsilon * math.Abs(s.b-s.a) * epsilon
	for range rootSteps {
		if math.Abs(s.fc) < math.Abs(s.fb) {
			s.a, s.b, s.c = s.b, s.c, s.b
			s.fa, s.fb, s.fc = s.fb, s.fc, s.fb
		}
		tol := 2*epsilon*math.Abs(s.b) + 0.5*math.Max(tolRel*math.Abs(s.b), floor)
		half := 0.5*s.c - 0.5*s.b
		if math.Abs(half) <= tol || s.fb == 0 {
			return s.b, nil
		}
		s.step(half, tol)
		s.a, s.fa = s.b, s.fb
		if math.Abs(s.d) > tol {
			s.b += s.d
		} else {
			s.b += math.Copysign(tol, half)
		}
		if s.fb = f(s.b); !finite(s.fb) {
			return 0, ErrNotFinite
		}
		if (s.fb > 0) == (s.fc > 0) {
			s.c, s.fc = s.a, s.fa
			s.d = s.b - s.a
			s.e = s.d
		}
	}
	return 0, ErrNoConvergence
}

// step chooses the next step: interpolation when it falls well inside the
// bracket and shrinks fast enough, else half the bracket.
func (s *bracket) step(half, tol float64) {
	if math.Abs(s.e) < tol || math.Abs(s.fa) <= math.Abs(s.fb) {
		s.d, s.e = half, half
		return
	}
	var p, q float64
	t := s.fb / s.fa
	if s.a == s.c {
		p, q = 2*half*t, 1-t
	} else {
		u, v := s.fa/s.fc, s.fb/s.fc
		p = t * (2*half*u*(u-v) - (s.b-s.a)*(v-1))
		q = (u - 1) * (v - 1) * (t - 1)
	}
	if p > 0 {
		q = -q
	} else {
		p = -p
	}
	if 2*p < 3*half*q-math.Abs(tol*q) && p < math.Abs(0.5*s.e*q) {
		s.e, s.d = s.d, p/q
	} else {
		s.d, s.e = half, half
	}
}
