package program

import "errors"

// The causes of refusals, for errors.Is. Dimensions have units.ErrDimension.
var (
	ErrPlane     = errors.New("planes differ")
	ErrNotFinite = errors.New("the result is not a finite number")
	ErrDivision  = errors.New("division by zero")
	ErrUnknown   = errors.New("unknown name")
	ErrSize      = errors.New("too large")
)
