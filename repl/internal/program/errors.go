package program

import (
	"errors"

	"example.com/dosewright/units"
)

// The causes of refusals, for errors.Is. Dimensions have units.ErrDimension.
var (
	ErrPlane     = errors.New("planes differ")
	ErrNotFinite = errors.New("the result is not a finite number")
	ErrDivision  = errors.New("division by zero")
	ErrUnknown   = errors.New("unknown name")
	ErrSize      = errors.New("too large")
)

// PlaneError says which two planes did not fit; "" is none. It wraps ErrPlane.
type PlaneError struct {
	Op         string // what was tried: "add", "take", "state", …
	Have, Want string
}

func (e *PlaneError) Error() string {
	return "cannot " + e.Op + " what stands at " + e.Have + " and at " + e.Want
}

func (e *PlaneError) Unwrap() error { return ErrPlane }

// Differ is the cause of a refusal of two types: their dimensions or their
// planes; nil when neither differs.
func Differ(op string, have, want Type) error {
	switch {
	case have.Dim != want.Dim:
		return &units.DimensionError{Op: op, Have: have.Dim, Rhs: want.Dim}
	case have.Plane != want.Plane:
		return planesDiffer(op, have.Plane, want.Plane)
	}
	return nil
}

// planesDiffer is the cause of a refusal of two planes.
func planesDiffer(op string, have, want Plane) error {
	return &PlaneError{op, string(have), string(want)}
}
