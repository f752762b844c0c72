package program

import (
	"strings"

	"example.com/dosewright/units"
)

// Kind is what sort of thing a value is.
type Kind int

// The kinds of values. The zero value is a number.
const (
	Number Kind = iota
	Point       // a temperature point
	List        // numbers of one dimension
	Text
	ChainKind
	BodyKind   // a stack, a material, a film or a gas
	EitherKind // of a parameter: a body or a chain
	condition  // inside if only
)

// Type is all that checking knows of a value.
type Type struct {
	Kind   Kind
	Dim    units.Dimension
	Plane  Plane
	Points bool // a list holds temperature points
}

// item is the type of one value of a list; other types are their own.
func (t Type) item() Type {
	if t.Points {
		return Type{Kind: Point, Dim: t.Dim}
	}
	if t.Kind == List {
		t.Kind = Number
	}
	return t
}

// Pure says whether the value is a plain number without a plane.
func (t Type) Pure() bool { return t.Kind == Number && t.Dim.IsNumber() && t.Plane == "" }

// describe names a type for a message: "fluence (mJ/cm²) at WAFER".
func (c *Checker) describe(t Type) string {
	switch t.Kind {
	case Text:
		return "a text"
	case ChainKind:
		return "a chain"
	case BodyKind:
		return "a body"
	case List:
		return "a list of " + strings.Replace(c.describe(t.item()), "a temperature point", "temperature points", 1)
	case Point:
		return "a temperature point"
	case condition:
		return "a condition"
	}
	s := c.quantity(t.Dim)
	if t.Plane != "" {
		s += " at " + string(t.Plane)
	}
	return s
}

// quantity names a dimension: "fluence (mJ/cm²)".
func (c *Checker) quantity(d units.Dimension) string {
	name, unit := c.Scope.Units().Name(d), c.Scope.Units().UnitText(d)
	switch {
	case d.IsNumber():
		return "a pure number"
	case name == "":
		return "a quantity in " + unit
	}
	return name + " (" + unit + ")"
}

// Root returns the type of the n-th root.
func (t Type) Root(n int) (Type, error) {
	if t.Kind != Number {
		return t, units.ErrRoot
	}
	d, err := t.Dim.Pow(1, n)
	if err != nil {
		return t, err
	}
	p, err := t.Plane.power(1, n)
	if err != nil {
		return t, err
	}
	return Type{Dim: d, Plane: p}, nil
}
