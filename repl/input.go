package repl

import (
	"fmt"
	"slices"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Input is a name of a formula that is left open, and what kind of value each
// run gives it. A name that the session defines keeps its dimension and plane,
// and its definition is replaced in the formula and in all that it rests on.
type Input struct {
	Name      string
	Dimension units.Dimension
	Plane     string // where its values stand, "" for nowhere, or as the session's name does
	Point     bool   // its values are temperature points, in kelvin
}

// InputOf is an input with the dimension of a typed quantity:
// InputOf[units.Fluence]("dose").
func InputOf[T units.Kind](name string) Input {
	p := of[T]()
	return Input{Name: name, Dimension: p.Dim, Point: p.Kind == program.Point}
}

// At is the input at a plane: InputOf[units.Power]("P").At("IF").
func (in Input) At(plane string) Input {
	in.Plane = plane
	return in
}

// open makes the inputs known to a checker and lists their names. The inputs
// come back with the planes and kinds that the session's names have.
func (s *Session) open(c *program.Checker, inputs []Input) ([]Input, []string, error) {
	known, names := make([]Input, 0, len(inputs)), make([]string, 0, len(inputs))
	fresh := make(map[string]program.Type, len(inputs))
	for _, in := range inputs {
		if slices.Contains(names, in.Name) {
			return nil, nil, syntax.Fail(syntax.Span{}, "the input "+in.Name+" stands twice", "give each input once")
		}
		t, err := s.openable(in)
		if err != nil {
			return nil, nil, err
		}
		if s.store.defs[in.Name] == nil {
			fresh[in.Name] = t
		}
		in.Plane, in.Point = string(t.Plane), t.Kind == program.Point
		known, names = append(known, in), append(names, in.Name)
	}
	c.Locals(fresh)
	return known, names, nil
}

// openable is the type of an input, which that of a name of the session must
// fit.
func (s *Session) openable(in Input) (program.Type, error) {
	given := program.Type{Dim: in.Dimension, Plane: program.Plane(in.Plane)}
	if in.Point {
		given.Kind = program.Point
	}
	refuse := func(msg, hint string) (program.Type, error) {
		return given, &syntax.Error{Msg: msg, Hint: hint}
	}
	if !isName(in.Name) || syntax.Reserved(in.Name) {
		return refuse(fmt.Sprintf("%q is no name for an input", in.Name), "a name has letters, digits and _, and is no word of the language")
	}
	if _, constant := s.constants[in.Name]; constant || s.rows[in.Name] != nil {
		return refuse(in.Name+" has a meaning in the language", "choose another name for the input")
	}
	d := s.store.defs[in.Name]
	if d == nil {
		return given, nil
	}
	if d.node == nil || d.node.Type.Kind != program.Number && d.node.Type.Kind != program.Point {
		return refuse(in.Name+" is no single value that could be an input", "choose another name for the input")
	}
	t, fits := inPlaceOf(d.node.Type, given)
	if fits {
		return t, nil
	}
	return given, &syntax.Error{
		Msg:  fmt.Sprintf("%s is %s; this input is %s", in.Name, s.pointOr(d.node.Type), s.pointOr(given)),
		Hint: "give the input the dimension and plane of " + s.where(in.Name) + ", or use a new name", Cause: program.Differ("open", d.node.Type, t),
	}
}
