package repl

import (
	"fmt"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// install puts a definition in its place when nothing that rests on it breaks
// and it has a value; else the session stays as it was.
func (s *Session) install(d *definition, at syntax.Span) error {
	if e := s.store.circle(d, at); e != nil {
		return e
	}
	if old := s.store.defs[d.name]; old != nil && s.clash(old, d) {
		return &syntax.Error{
			Marks: []syntax.Span{at}, Msg: d.name + " is defined in " + s.where(d.name) + " already",
			Hint: "rename one of the two, or forget " + d.name + " before the import", Cause: ErrFile,
		}
	}
	if err := s.definitionsFit(d.name, at); err != nil {
		return err
	}
	old := s.store.defs[d.name]
	undo := s.replace(d)
	if err := s.survives(d, old, at); err != nil {
		undo()
		return err
	}
	return nil
}

// replace puts d in place and returns what restores the state before.
func (s *Session) replace(d *definition) (undo func()) {
	var old []*definition
	for _, name := range append([]string{d.name}, s.store.dependents(d.name)...) {
		if o := s.store.defs[name]; o != nil {
			old = append(old, o)
		}
	}
	existed := s.store.defs[d.name] != nil
	s.store.put(d)
	s.store.forgetValues(d.name)
	return func() {
		if !existed {
			s.store.remove(d.name)
		}
		for _, o := range old {
			s.store.put(o)
			o.known = false
		}
	}
}

// survives checks the dependents of a definition that took another's place,
// and that it has a value.
func (s *Session) survives(d, old *definition, at syntax.Span) error {
	if err := s.dependentsKeep(d, old, at); err != nil {
		return err
	}
	c := s.checker(d.text, d.name)
	if d.node == nil {
		return nil
	}
	switch d.node.Type.Kind {
	case program.Number, program.Point:
		if _, err := s.valueOf(d); err != nil {
			return s.blame(err, c)
		}
	case program.ChainKind:
		for i, step := range d.node.Chain().Steps {
			if step.All == nil {
				continue
			}
			if _, _, err := s.compute(c.Factor(d.node.Chain(), i, step.Factor.At)); err != nil {
				return s.blame(err, c)
			}
		}
	}
	return nil
}

// dependentsKeep checks again all that rests on d and refuses when one of them
// would change its dimension or plane, or break.
func (s *Session) dependentsKeep(d, old *definition, at syntax.Span) error {
	if old == nil || old.node != nil && d.node != nil && old.node.Type == d.node.Type && d.node.Type.Kind != program.ChainKind && d.node.Type.Kind != program.BodyKind {
		return nil
	}
	var broken []string
	var first error
	for _, name := range s.store.dependents(d.name) {
		was := s.store.defs[name]
		fresh := *was
		fresh.known = false
		err := s.checked(&fresh)
		if e := s.store.circle(&fresh, at); err == nil && e != nil {
			err = e
		}
		if err == nil && fresh.node != nil && fresh.node.Type != was.node.Type {
			err = fmt.Errorf("%s would be %s instead of %s", name, s.describe(fresh.node.Type), s.describe(was.node.Type))
		}
		if err != nil {
			broken = append(broken, name)
			if first == nil {
				first = err
			}
			continue
		}
		s.store.put(&fresh)
	}
	if len(broken) == 0 {
		return nil
	}
	return s.breaks(d, at, broken, first)
}

func (s *Session) breaks(d *definition, at syntax.Span, broken []string, first error) error {
	reason := first.Error()
	if e, ok := first.(*syntax.Error); ok {
		reason = e.Msg
	}
	var named []string
	for _, name := range broken[:min(len(broken), 8)] {
		named = append(named, s.where(name))
	}
	if n := len(broken) - len(named); n > 0 {
		named = append(named, fmt.Sprintf("%d more", n))
	}
	verb := "rests"
	if len(broken) > 1 {
		verb = "rest"
	}
	return &syntax.Error{
		Marks: []syntax.Span{at}, Cause: ErrDependent,
		Msg:  fmt.Sprintf("%s %s on %s and would break: %s", strings.Join(named, ", "), verb, d.name, reason),
		Hint: "nothing has changed; redefine " + broken[0] + " first, or use another name here",
	}
}

// describe says what a type is, as "power (W) at IF".
func (s *Session) describe(t program.Type) string {
	text := s.kindOf(t.Dim)
	if t.Plane != "" {
		text += " at " + string(t.Plane)
	}
	return text
}

// kindOf names a dimension with its unit, as "fluence (mJ/cm²)".
func (s *Session) kindOf(d units.Dimension) string {
	unit := s.sys.UnitText(d)
	switch name := s.sys.Name(d); {
	case d.IsNumber():
		return "a pure number"
	case name == "":
		return "a quantity in " + unit
	default:
		return name + " (" + unit + ")"
	}
}

// clash says whether a definition of one file would silently replace that of
// another.
func (s *Session) clash(old, d *definition) bool { return d.file != "" && old.file != d.file }
