package euv

import (
	"fmt"

	"example.com/dosewright/units"
)

// countable is the last whole number up to which float64 holds every one.
const countable = 1 << 53

// whole refuses what is not a whole number that float64 can count to.
func whole[T units.Kind](name string, v T) error {
	if !(v >= 0 && float64(v) <= countable) || float64(v) != float64(int64(v)) {
		return outside(name, v, "a whole number between 0 and 9e15")
	}
	return nil
}

// expected refuses what is no mean of a count.
func expected(name string, v units.Count) error {
	if !(v >= 0 && v <= countable) {
		return outside(name, v, "between 0 and 9e15")
	}
	return nil
}

// within refuses 0, 1 and what lies outside them.
func within[T units.Kind](name string, v T) error {
	if !(v > 0 && v < 1) {
		return outside(name, v, "greater than 0 and less than 1")
	}
	return nil
}

// either refuses all but two numbers.
func either(name string, v, a, b units.Count) error {
	if v != a && v != b {
		return outside(name, v, fmt.Sprintf("%g or %g", float64(a), float64(b)))
	}
	return nil
}

// aperture refuses what is no numerical aperture in vacuum.
func aperture(v units.Ratio) error { return within("NA", v) }

// reducing refuses what is no reduction of a projection: 4 is written 4, not
// one quarter.
func reducing(v units.Ratio) error {
	if !isFinite(v) || v < 1 {
		return outside("reduction", v, "1 or greater")
	}
	return nil
}

// signedFraction refuses what lies outside −1 to 1.
func signedFraction(name string, v units.Ratio) error {
	if !(v >= -1 && v <= 1) {
		return outside(name, v, "between -1 and 1")
	}
	return nil
}
