package units

import (
	"errors"
	"fmt"
	"math"
)

// Quantity is a value in coherent SI units (counted things count as one each)
// together with its dimension. The zero value is the pure number 0.
type Quantity struct {
	si  float64
	dim Dimension
}

// The causes of refused arithmetic, for errors.Is.
var (
	ErrDimension = errors.New("dimensions differ")
	ErrExponent  = errors.New("an exponent of a dimension leaves the range -21 to 21")
	ErrRoot      = errors.New("the root of a dimension is no multiple of a sixth")
	ErrNotFinite = errors.New("the result is not a finite number")
)

// DimensionError says which two dimensions did not fit. It wraps ErrDimension.
type DimensionError struct {
	Op        string // what was tried: "add", "convert", …
	Have, Rhs Dimension
}

func (e *DimensionError) Error() string {
	return fmt.Sprintf("cannot %s %s and %s", e.Op, e.Have, e.Rhs)
}

func (e *DimensionError) Unwrap() error { return ErrDimension }

// New makes a quantity from a value in coherent SI units.
func New(si float64, d Dimension) Quantity { return Quantity{si, d} }

// SI returns the value in coherent SI units.
func (q Quantity) SI() float64 { return q.si }

// Dimension returns the dimension.
func (q Quantity) Dimension() Dimension { return q.dim }

func finite(si float64, d Dimension) (Quantity, error) {
	if si-si != 0 {
		return Quantity{}, ErrNotFinite
	}
	return Quantity{si, d}, nil
}

// Add returns q + r; their dimensions must be equal.
func (q Quantity) Add(r Quantity) (Quantity, error) {
	if q.dim != r.dim {
		return Quantity{}, &DimensionError{"add", q.dim, r.dim}
	}
	return finite(q.si+r.si, q.dim)
}

// Sub returns q − r; their dimensions must be equal.
func (q Quantity) Sub(r Quantity) (Quantity, error) {
	if q.dim != r.dim {
		return Quantity{}, &DimensionError{"subtract", q.dim, r.dim}
	}
	return finite(q.si-r.si, q.dim)
}

// Mul returns q · r.
func (q Quantity) Mul(r Quantity) (Quantity, error) {
	d, ok := q.dim.mulPlain(r.dim)
	if !ok {
		var err error
		if d, err = q.dim.Mul(r.dim); err != nil {
			return Quantity{}, err
		}
	}
	return finite(q.si*r.si, d)
}

// Div returns q / r; r must not be zero.
func (q Quantity) Div(r Quantity) (Quantity, error) {
	d, err := q.dim.Div(r.dim)
	if err != nil {
		return Quantity{}, err
	}
	return finite(q.si/r.si, d)
}

// Pow returns q to the power num/den.
func (q Quantity) Pow(num, den int) (Quantity, error) {
	d, err := q.dim.Pow(num, den)
	if err != nil {
		return Quantity{}, err
	}
	return finite(math.Pow(q.si, float64(num)/float64(den)), d)
}

// Compare returns −1, 0 or +1 as q is less than, equal to or greater than r;
// their dimensions must be equal.
func (q Quantity) Compare(r Quantity) (int, error) {
	if q.dim != r.dim {
		return 0, &DimensionError{"compare", q.dim, r.dim}
	}
	switch {
	case q.si < r.si:
		return -1, nil
	case q.si > r.si:
		return 1, nil
	}
	return 0, nil
}
