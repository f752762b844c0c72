// Package near holds the one tolerance helper through which tests compare
// floating-point numbers.
package near

import (
	"math"
	"testing"
)

// Rel fails the test unless got lies within the relative tolerance of want.
// Two zeros agree, and so do two equal infinities; a NaN never agrees.
func Rel(t testing.TB, what string, got, want, tol float64) {
	t.Helper()
	if !Within(got, want, tol) {
		t.Errorf("%s: got %.17g, want %.17g (relative difference %.3g, tolerance %.3g)",
			what, got, want, math.Abs(got-want)/math.Abs(want), tol)
	}
}

// Abs fails the test unless got lies within the absolute tolerance of want.
func Abs(t testing.TB, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: got %.17g, want %.17g (difference %.3g, tolerance %.3g)",
			what, got, want, math.Abs(got-want), tol)
	}
}

// Within says whether got lies within the relative tolerance of want.
func Within(got, want, tol float64) bool {
	return got == want || math.Abs(got-want) <= tol*math.Abs(want)
}
