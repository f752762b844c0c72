package units

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
)

// ErrJSON is the cause of every refusal to write or read a quantity as JSON,
// for errors.Is.
var ErrJSON = errors.New("this quantity has no JSON")

// quantityObject is the form of a quantity in JSON.
type quantityObject struct {
	SI        *float64 `json:"si"`
	Dimension *string  `json:"dimension"`
}

// MarshalJSON writes the quantity as
//
//	{"si":300,"dimension":"kg·s⁻²"}
//
// si is the value in coherent SI units with all its digits: reading gives the
// same float64. dimension is a product of base units and of the counted things
// wafer, field, die and pulse, "1" for a pure number. A quantity that is not
// finite is refused, and so is one of a counted thing that a System declares:
// System.MarshalQuantity writes those.
func (q Quantity) MarshalJSON() ([]byte, error) { return Standard().MarshalQuantity(q) }

// UnmarshalJSON reads what MarshalJSON writes. Both fields must be there, and
// others are passed over; dimension may be any unit whose scale is one, such as
// "J/m²". null leaves q as it is.
func (q *Quantity) UnmarshalJSON(data []byte) error {
	if bytes.Equal(data, []byte("null")) {
		return nil
	}
	read, err := Standard().UnmarshalQuantity(data)
	if err == nil {
		*q = read
	}
	return err
}

// MarshalQuantity is Quantity.MarshalJSON for a System with counted things of
// its own, which stand by their names: {"si":0.56,"dimension":"lot⁻¹"}.
func (s *System) MarshalQuantity(q Quantity) ([]byte, error) {
	if q.si-q.si != 0 {
		return nil, fmt.Errorf("%w: %v is not finite", ErrJSON, q.si)
	}
	for b := firstDeclared + Base(len(s.declared)); b <= lastBase; b++ {
		if q.dim.sixth(b) != 0 {
			return nil, fmt.Errorf("%w: %s is a counted thing of another system, whose MarshalQuantity writes it", ErrJSON, b.symbol())
		}
	}
	text := s.BaseText(q.dim)
	return json.Marshal(quantityObject{&q.si, &text})
}

// UnmarshalQuantity reads what MarshalQuantity of a System with the same
// counted things writes. Every error wraps ErrJSON.
func (s *System) UnmarshalQuantity(data []byte) (Quantity, error) {
	var o quantityObject
	if err := json.Unmarshal(data, &o); err != nil {
		return Quantity{}, fmt.Errorf("%w: %w", ErrJSON, err)
	}
	if o.SI == nil || o.Dimension == nil {
		return Quantity{}, fmt.Errorf(`%w: it is {"si": number, "dimension": "kg·m²·s⁻³"}`, ErrJSON)
	}
	d, err := s.readBase(*o.Dimension)
	if err != nil {
		return Quantity{}, fmt.Errorf("%w: the dimension %.60q: %w", ErrJSON, *o.Dimension, err)
	}
	return Quantity{*o.SI, d}, nil
}

// maxBase bounds the text of a dimension, in bytes. It is more than a product
// of every base with a fraction as exponent takes.
const maxBase = 2000

// readBase reads a dimension as BaseText writes it.
func (s *System) readBase(text string) (Dimension, error) {
	if len(text) > maxBase {
		return Dimension{}, fmt.Errorf("it has more than %d bytes", maxBase)
	}
	p := reader{sys: s, text: text}
	if p.peek() == end {
		return Dimension{}, errors.New("a pure number has the dimension 1")
	}
	parts, err := p.unit()
	if err == nil && p.peek() != end {
		err = p.stray()
	}
	if err != nil {
		return Dimension{}, err
	}
	u, err := compose(parts)
	switch {
	case err != nil:
		return Dimension{}, err
	case !u.scale.isOne():
		return Dimension{}, errors.New("it has a scale other than one; the value stands in coherent SI units")
	case len(parts) == 1 && parts[0].symbol == celsius:
		return Dimension{}, errors.New("a temperature stands in K")
	}
	return u.dim, nil
}
