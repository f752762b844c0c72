package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// ArgumentError is the error of every function of this package: an argument
// that is not finite or lies outside the range in which the formula holds.
type ArgumentError struct {
	Argument string         // the argument's name, as in the doc comment and the catalogue
	Value    units.Quantity // what was given
	Want     string         // what it must be, as "greater than 0"
	angle    bool           // Value is an angle and said in degrees
}

func (e *ArgumentError) Error() string {
	value := e.Value.String()
	if e.angle {
		value = units.FormatNumber(e.Value.SI()*180/math.Pi, 5) + "°"
	}
	return fmt.Sprintf("%s is %s; it must be %s", e.Argument, value, e.Want)
}

// outside makes the error for an argument.
func outside[T units.Kind](name string, v T, want string) error {
	_, angle := any(v).(units.Angle)
	return &ArgumentError{Argument: name, Value: units.Of(v), Want: want, angle: angle}
}

// first returns the first error that is not nil.
func first(errs ...error) error {
	for _, err := range errs {
		if err != nil {
			return err
		}
	}
	return nil
}

func isFinite[T units.Kind](v T) bool { return !math.IsNaN(float64(v)) && !math.IsInf(float64(v), 0) }

// finite refuses NaN and infinities.
func finite[T units.Kind](name string, v T) error {
	if !isFinite(v) {
		return outside(name, v, "finite")
	}
	return nil
}

// positive refuses what is not finite and greater than zero.
func positive[T units.Kind](name string, v T) error {
	if !isFinite(v) || v <= 0 {
		return outside(name, v, "greater than 0")
	}
	return nil
}

// notNegative refuses what is not finite or less than zero.
func notNegative[T units.Kind](name string, v T) error {
	if !isFinite(v) || v < 0 {
		return outside(name, v, "0 or greater")
	}
	return nil
}

// fraction refuses what lies outside 0 to 1.
func fraction[T units.Kind](name string, v T) error {
	if !(v >= 0 && v <= 1) {
		return outside(name, v, "between 0 and 1")
	}
	return nil
}

// share refuses what lies outside 0 to 1 or is zero: a divisor.
func share[T units.Kind](name string, v T) error {
	if !(v > 0 && v <= 1) {
		return outside(name, v, "greater than 0 and at most 1")
	}
	return nil
}

// answer passes a result on, or refuses one that left the floating-point
// range.
func answer[T units.Kind](name string, v T) (T, error) {
	if !isFinite(v) {
		return 0, outside(name, v, "finite: the arguments lie too far apart for floating point")
	}
	return v, nil
}
