package repl

import (
	"fmt"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// whatIf is a named case: formulas in the place of some names.
type whatIf struct {
	name string
	note string
	sets map[string]*program.Node
}

// baseCase is the session as it stands.
const baseCase = "base"

func (s *Session) defineCase(j job) ([]Result, error) {
	a := j.do.(*syntax.Case)
	if a.Name == baseCase {
		return nil, syntax.Fail(a.NameAt, "base is the session as it stands", "choose another name for the case")
	}
	w := &whatIf{name: a.Name, note: j.note, sets: map[string]*program.Node{}}
	c := s.checker(j.text, "")
	for _, set := range a.Sets {
		d := s.store.defs[set.Name]
		if d == nil || d.node == nil || d.node.Type.Kind != program.Number && d.node.Type.Kind != program.Point {
			return nil, syntax.Fail(set.NameAt, set.Name+" is no single value that a case could set", "a case sets names that are defined")
		}
		if w.sets[set.Name] != nil {
			return nil, syntax.Fail(set.NameAt, set.Name+" is set twice", "set each name once")
		}
		n, err := c.Check(set.X)
		if err != nil {
			return nil, err
		}
		have := d.node.Type
		if n.Type.Plane == "" {
			have.Plane = ""
		}
		if n.Type != have {
			return nil, syntax.Fail(set.X.Span(), fmt.Sprintf("%s is %s, not %s", set.Name, s.describe(d.node.Type), s.describe(n.Type)), "a case keeps the dimension and plane of each name")
		}
		if s.reaches(n, set.Name) {
			return nil, syntax.Fail(set.X.Span(), set.Name+" would rest on itself in this case", "write the value without "+set.Name)
		}
		w.sets[set.Name] = n
	}
	if s.cases == nil {
		s.cases = map[string]*whatIf{}
	}
	s.cases[a.Name] = w
	return noteOnly(c.Warnings), nil
}

// reaches says whether a formula rests on a name.
func (s *Session) reaches(n *program.Node, name string) bool {
	var below []string
	n.Names(func(x string) { below = append(below, x) })
	return s.store.ancestors(below)[name]
}

func (s *Session) compare(j job) ([]Result, error) {
	a := j.do.(*syntax.Compare)
	c := s.checker(j.text, "")
	f, err := s.formulas(c, a.Columns)
	if err != nil {
		return nil, err
	}
	var cases []*whatIf
	hasBase := false
	for _, n := range a.Cases {
		w := s.cases[n.Name]
		if n.Name == baseCase {
			w, hasBase = &whatIf{name: baseCase}, true
			cases = append([]*whatIf{w}, cases...)
			continue
		}
		if w == nil {
			return nil, syntax.Fail(n.Where, n.Name+" is no case", "define it: case "+n.Name+" : x = …; base is the session as it stands")
		}
		cases = append(cases, w)
	}
	if !hasBase {
		cases = append([]*whatIf{{name: baseCase}}, cases...)
	}
	return s.comparison(f, c, cases)
}

func (s *Session) comparison(f *formulas, c *program.Checker, cases []*whatIf) ([]Result, error) {
	t := &Table{Columns: []Column{{"case", ""}}, Warnings: c.Warnings}
	var base []float64
	for _, w := range cases {
		y, err := s.under(w, f)
		if err != nil {
			return nil, s.blame(fmt.Errorf("in case %s: %w", w.name, err), c)
		}
		if base == nil {
			base = y
			for k := range y {
				u := s.choose(f, k, y[k])
				t.Columns = append(t.Columns, Column{f.names[k], stated(u)}, Column{"to " + baseCase, ""})
			}
		}
		row := []Cell{word(w.name)}
		for k := range y {
			row = append(row, number(f.units[k].From(y[k])))
			if base[k] == 0 || f.types[k].Kind == program.Point {
				row = append(row, word(""))
			} else {
				row = append(row, number(y[k]/base[k]))
			}
		}
		t.Rows = append(t.Rows, row)
	}
	return []Result{t}, nil
}

// under computes formulas with what a case sets.
func (s *Session) under(w *whatIf, f *formulas) ([]float64, error) {
	var names []string
	for name := range w.sets {
		names = append(names, name)
	}
	resolve := s.opened(names, false)
	p, err := program.CompileAll(f.nodes, func(name string) (*program.Node, error) {
		if n := w.sets[name]; n != nil {
			return n, nil
		}
		return resolve(name)
	}, program.Opening{})
	if err != nil {
		return nil, err
	}
	y := make([]float64, len(f.nodes))
	return y, p.RunAll(p.NewFrame(), nil, y)
}
