package repl

import (
	"encoding/json"
	"math"
	"strconv"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/units"
)

// Value is an answer: a quantity in the unit in which it is stated.
type Value struct {
	SI    float64
	Unit  units.Unit
	Plane string // "" for none
	Point bool   // a temperature point, in kelvin
	// U is the standard uncertainty in SI units when Uncertain is set, and DoF
	// its effective degrees of freedom, 0 for infinitely many.
	U         float64
	Uncertain bool
	DoF       float64
	Warnings  []string
	sys       *units.System
	chosen    bool // Unit fits the value; nobody asked for it
}

// Quantity returns the value with its dimension.
func (v *Value) Quantity() units.Quantity { return units.New(v.SI, v.Unit.Dimension()) }

// Number returns the value in its unit.
func (v *Value) Number() float64 { return v.Unit.From(v.SI) }

// Text writes the value with its unit and plane.
func (v *Value) Text(digits int) string {
	s := v.sys.TextIn(v.SI, v.Unit, digits)
	if v.Uncertain {
		s = v.Unit.Label(units.FormatUncertain(v.Number(), v.Unit.FromDifference(v.U), digits))
	}
	if v.Plane != "" {
		s += " at " + v.Plane
	}
	return s
}

func (v *Value) lines(style Style) []Line {
	out := []Line{{v.Text(style.Digits), Plain}}
	return append(out, warningLines(v.Warnings)...)
}

func warningLines(warnings []string) []Line {
	var out []Line
	for _, w := range warnings {
		out = append(out, Line{"note: " + w, Warning})
	}
	return out
}

func (v *Value) record() Record {
	r := Record{
		Kind: ValueRecord, Value: json.Number(v.Unit.Digits(v.SI)), Unit: v.Unit.String(), SI: v.SI,
		Dimension: v.sys.BaseText(v.Unit.Dimension()), Plane: v.Plane, Warnings: v.Warnings,
	}
	if v.Uncertain {
		u := json.Number(strconv.FormatFloat(v.Unit.FromDifference(v.U), 'g', -1, 64))
		r.Uncertainty = &u
	}
	return r
}

// display chooses the unit in which a value of this type is stated.
func (s *Session) display(si float64, t program.Type) units.Unit {
	if t.Kind == program.Point {
		if u, err := s.sys.Parse("degC"); err == nil {
			return u
		}
	}
	if u, ok := s.prefer[t.Dim]; ok && !u.Point() {
		return u
	}
	return s.sys.DisplayUnit(units.New(si, t.Dim))
}

// value makes an answer.
func (s *Session) value(si float64, t program.Type, unit *units.Unit, warnings []string) *Value {
	if si == 0 {
		si = math.Abs(si) // minus zero is zero
	}
	v := &Value{SI: si, Plane: string(t.Plane), Point: t.Kind == program.Point, Warnings: warnings, sys: s.sys}
	if unit != nil {
		v.Unit = *unit
	} else {
		v.Unit, v.chosen = s.display(si, t), true
	}
	return v
}
