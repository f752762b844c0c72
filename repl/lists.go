package repl

import (
	"fmt"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// shownItems is how many values of a list are printed.
const shownItems = 12

// ListValue is an answer of several values in one unit.
type ListValue struct {
	Values []float64 // SI
	Unit   units.Unit
	Plane  string
	sys    *units.System
}

func (v *ListValue) lines(style Style) []Line {
	s := "{"
	for i, x := range v.Values[:min(len(v.Values), shownItems)] {
		if i > 0 {
			s += ", "
		}
		s += v.sys.TextIn(x, v.Unit, style.Digits)
		if v.Plane != "" {
			s += " at " + v.Plane
		}
	}
	s += "}"
	if n := len(v.Values) - shownItems; n > 0 {
		s += fmt.Sprintf(" and %d more", n)
	}
	return []Line{{s, Plain}}
}

func (v *ListValue) record() Record {
	r := Record{Kind: TableRecord, Columns: []Column{{"value", v.Unit.String()}}}
	for _, x := range v.Values {
		r.Rows = append(r.Rows, []Cell{number(v.Unit.From(x))})
	}
	return r
}

func (s *Session) showList(n *program.Node, stated *syntax.Stated, x syntax.Expr, c *program.Checker) ([]Result, error) {
	v := &ListValue{Plane: string(n.Type.Plane), sys: s.sys}
	for _, item := range program.Items(n, s.resolve) {
		y, _, err := s.compute(item)
		if err != nil {
			return nil, s.blame(err, c)
		}
		v.Values = append(v.Values, y)
	}
	largest := 0.0
	for _, y := range v.Values {
		largest = max(largest, y, -y)
	}
	v.Unit = s.display(largest, program.Item(n))
	if stated != nil {
		u, err := c.StatedUnit(stated, n, x)
		if err != nil {
			return nil, err
		}
		v.Unit = u
	}
	return []Result{v}, nil
}
