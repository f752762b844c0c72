package program

import (
	"errors"
	"strings"
	"unicode"
	"unicode/utf8"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

func (c *Checker) literal(x *syntax.Literal) (*Node, error) {
	unit, err := c.unit(x.Unit, x.UnitAt)
	if err != nil {
		return nil, c.nameBehind(x, err)
	}
	c.nameShadowed(x)
	if strings.Trim(x.Unit, "%pmb°deg^²³⁻0123456789-") == "" && strings.ContainsAny(x.Unit, "^²³⁻23") && unit.Dimension().IsNumber() {
		symbol := strings.TrimRight(x.Unit, "^²³⁻¹0123456789-")
		return nil, syntax.Fail(x.Where, "the power belongs to the unit here: "+c.text(x.Where)+" is "+x.Number+" times "+symbol+" raised", "write ("+x.Number+" "+symbol+") and the power behind the parenthesis")
	}
	number, concise, uncertain := units.SplitConcise(x.Number)
	v, err := unit.Read(number)
	if err != nil {
		return nil, syntax.Fail(x.NumberAt, c.shorten(x.NumberAt)+": "+err.Error(), "choose a prefix or unit that brings the number closer to one")
	}
	t := Type{Dim: unit.Dimension()}
	if unit.Point() {
		t.Kind = Point
	}
	if !uncertain && x.Spread == nil {
		return c.constant(v, t, x.Where), nil
	}
	s, err := c.spread(x, unit, v, concise)
	if err != nil {
		return nil, err
	}
	return c.source(v, t, s, x.Where), nil
}

// shorten keeps a long number from filling the screen.
func (c *Checker) shorten(at syntax.Span) string {
	text := []rune(c.text(at))
	if len(text) > 24 {
		return string(text[:20]) + "…"
	}
	return string(text)
}

// unit reads a unit word that stands at a place of the statement.
func (c *Checker) unit(text string, at syntax.Span) (units.Unit, error) {
	if text == "" {
		return units.Unit{}, nil
	}
	u, err := c.Scope.Units().Parse(text)
	var bad *units.ParseError
	if errors.As(err, &bad) {
		mark := syntax.Span{Start: at.Start + bad.Start, End: at.Start + bad.End}
		if mark.End > at.End || mark.Start >= mark.End {
			mark = at
		}
		hint := bad.Hint
		if hint == "" {
			hint = "see: help units"
		}
		return u, &syntax.Error{Marks: []syntax.Span{mark}, Msg: bad.Msg, Hint: hint, Cause: err}
	}
	return u, err
}

// nameBehind improves the refusal of a unit when its word is a name: the
// quotient or product of the two was meant.
func (c *Checker) nameBehind(x *syntax.Literal, err error) error {
	var bad *units.ParseError
	if !errors.As(err, &bad) || bad.Symbol == "" {
		return err
	}
	known := c.locals[bad.Symbol] != nil || c.Scope.Node(bad.Symbol) != nil
	if !known && bad.Hint != "" {
		return err
	}
	return &syntax.Error{
		Marks: []syntax.Span{{Start: x.UnitAt.Start + bad.Start, End: x.UnitAt.Start + bad.End}},
		Msg:   bad.Symbol + " is no unit",
		Hint:  c.apart(c.text(x.NumberAt), x.Unit, bad),
		Cause: err,
	}
}

// apart writes number, unit and name so that the name is outside of the unit.
func (c *Checker) apart(number, unit string, bad *units.ParseError) string {
	before, rest := unit[:bad.Start], unit[bad.Start:]
	if grouped := strings.HasSuffix(before, "("); grouped && strings.ContainsAny(rest, "/*·⋅∙•") {
		before, rest = strings.TrimRight(before, "("), "("+rest
	} else {
		before, rest = strings.TrimRight(before, "("), strings.TrimRight(rest, ")")
	}
	joint, verb := "*", "multiply"
	if r, n := utf8.DecodeLastRuneInString(before); strings.ContainsRune("/*·⋅∙•", r) {
		before = before[:len(before)-n]
		if r == '/' {
			joint, verb = "/", "divide"
		}
	}
	if strings.Contains(before, "(") {
		return "a name stands behind the unit, with blanks around / or *"
	}
	return "to " + verb + " by the name " + bad.Symbol + " write " + strings.TrimSpace(number+" "+before) + " " + joint + " " + rest
}

// nameShadowed notes that a unit symbol is also a name.
func (c *Checker) nameShadowed(x *syntax.Literal) {
	for _, symbol := range strings.FieldsFunc(x.Unit, func(r rune) bool { return !unicode.IsLetter(r) }) {
		if c.locals[symbol] == nil && c.Scope.Node(symbol) == nil {
			continue
		}
		c.warn(symbol + " is read as the unit here; the name is written with a sign and blanks: " + c.text(x.NumberAt) + " * " + symbol)
	}
}

// StatedUnit reads a unit in brackets and checks that it can state a value of
// type t; name is what the value is called in messages.
func (c *Checker) StatedUnit(s *syntax.Stated, n *Node, x syntax.Expr) (units.Unit, error) {
	u, err := c.StatedBare(s)
	if err != nil {
		return u, err
	}
	t := n.Type
	if t.Kind == Text || t.Kind == ChainKind {
		return u, syntax.Fail(s.Where, c.describe(t)+" has no unit to be stated in", "leave the bracket out")
	}
	if u.Point() && t.Kind == Number && t.Dim == u.Dimension() {
		return u, syntax.Fail(s.Where, "a temperature difference has no place on the scale of "+u.String(), "state it in K")
	}
	if u.Dimension() != t.Dim && s.Unit != "" {
		return u, c.misstated(s, u, t, x)
	}
	if s.Plane == "" {
		return u, nil
	}
	p, err := c.plane(s.Plane)
	if err != nil {
		return u, syntax.Fail(s.Where, err.Error(), c.planesHint(s.Plane))
	}
	if p != t.Plane {
		msg := "the answer stands at " + string(t.Plane) + ", not at " + string(p)
		hint := "carry(…, CHAIN, " + string(p) + ") takes it there"
		if t.Plane == "" {
			msg = "the answer has no plane; a bracket requires one, it never attaches one"
			hint = "say where an input stands: " + "x at " + string(p)
		}
		return u, &syntax.Error{Marks: []syntax.Span{s.Where}, Msg: msg, Hint: hint, Cause: planesDiffer("state", t.Plane, p)}
	}
	return u, nil
}

func (c *Checker) misstated(s *syntax.Stated, u units.Unit, t Type, x syntax.Expr) error {
	e := &syntax.Error{Marks: []syntax.Span{x.Span(), s.Where}, Cause: &units.DimensionError{Op: "state", Have: t.Dim, Rhs: u.Dimension()}}
	if lit, ok := x.(*syntax.Literal); ok && lit.Unit == "" {
		e.Msg = "a bracket states the unit of an answer, it never gives one: " + c.text(x.Span()) + " is a pure number"
		e.Hint = "write " + c.text(x.Span()) + " " + s.Unit
		return e
	}
	e.Msg = c.quantity(t.Dim) + " is not stated in " + s.Unit + ", which is " + c.quantity(u.Dimension())
	if join := c.Scope.Units().Between(t.Dim, u.Dimension()); join != "" {
		e.Msg += ": they differ by " + join
	}
	e.Hint = c.hertzHint(x)
	if e.Hint == "" {
		e.Hint = "state it in " + c.Scope.Units().UnitText(t.Dim) + ", or change the formula"
	}
	return e
}

// hertzHint finds a frequency that was meant as pulses per time.
func (c *Checker) hertzHint(x syntax.Expr) string {
	found := ""
	syntax.Each(x, func(x syntax.Expr) {
		if lit, ok := x.(*syntax.Literal); ok && strings.HasSuffix(lit.Unit, "Hz") && found == "" {
			text := c.text(lit.NumberAt) + " " + strings.TrimSuffix(lit.Unit, "Hz")
			found = "where pulses per time are meant, write " + text + "pulse/s, not " + c.text(lit.Where)
		}
	})
	return found
}

// StatedBare reads the unit in a bracket alone.
func (c *Checker) StatedBare(s *syntax.Stated) (units.Unit, error) {
	at := syntax.Span{Start: s.Where.Start + 1, End: s.Where.End - 1}
	if at.Start <= at.End && at.End <= len(c.Source) {
		if i := strings.Index(c.Source[at.Start:at.End], s.Unit); i >= 0 {
			at = syntax.Span{Start: at.Start + i, End: at.Start + i + len(s.Unit)}
		}
	}
	return c.unit(s.Unit, at)
}
