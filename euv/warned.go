package euv

import "example.com/dosewright/units"

// Warned is a result that carries doubts with it: a model behind the number,
// an extrapolation, an atomic table used for a molecule. Warnings are whole
// sentences without a stop, for people to read; there are none when the list
// is empty.
type Warned[T units.Kind] struct {
	Value    T
	Warnings []string
}
