// Package num holds the numerical methods that no dependency gives in the form
// wanted here: bracketed roots, bounded maxima, quadrature between kinks and
// table interpolation. Everything is plain float64; nothing here knows a unit,
// allocates in an inner loop or keeps state.
package num

import "errors"

// The causes of a refused computation, for errors.Is.
var (
	ErrInterval      = errors.New("the interval is not two finite numbers in order")
	ErrNotFinite     = errors.New("the function is not finite everywhere in the interval")
	ErrNoBracket     = errors.New("the function has the same sign at both ends")
	ErrNoConvergence = errors.New("the iteration did not settle")
)

func finite(x float64) bool { return x-x == 0 }

// ordered refuses an interval whose ends are not finite or not in order.
func ordered(a, b float64) error {
	if !(a < b) || !finite(a) || !finite(b) {
		return ErrInterval
	}
	return nil
}
