package repl

import (
	"errors"
	"fmt"
	"slices"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// whatIf is a named case: formulas in the place of some names.
type whatIf struct {
	name string
	text string // the statement, with which its formulas are checked again
	sets []syntax.Setting
}

// baseCase is the session as it stands.
const baseCase = "base"

func (s *Session) defineCase(j job) ([]Result, error) {
	a := j.do.(*syntax.Case)
	if a.Name == baseCase {
		return nil, syntax.Fail(a.NameAt, "base is the session as it stands", "choose another name for the case")
	}
	w := &whatIf{a.Name, j.text, a.Sets}
	c := s.checker(j.text, "")
	if _, err := s.settings(w, c); err != nil {
		return nil, err
	}
	if s.cases == nil {
		s.cases = map[string]*whatIf{}
	}
	s.cases[a.Name] = w
	return noteOnly(c.Warnings), nil
}

// settings checks what a case sets against the session as it stands.
func (s *Session) settings(w *whatIf, c *program.Checker) (map[string]*program.Node, error) {
	sets := map[string]*program.Node{}
	for _, set := range w.sets {
		d := s.store.defs[set.Name]
		if d == nil || d.node == nil || d.node.Type.Kind != program.Number && d.node.Type.Kind != program.Point {
			return nil, syntax.Fail(set.NameAt, set.Name+" is no single value that a case could set", "a case sets names that are defined")
		}
		if sets[set.Name] != nil {
			return nil, syntax.Fail(set.NameAt, set.Name+" is set twice", "set each name once")
		}
		n, err := c.Check(set.X)
		if err != nil {
			return nil, err
		}
		if _, fits := inPlaceOf(d.node.Type, n.Type); !fits {
			return nil, &syntax.Error{
				Marks: []syntax.Span{set.X.Span()}, Msg: fmt.Sprintf("%s is %s, not %s", set.Name, s.pointOr(d.node.Type), s.pointOr(n.Type)),
				Hint: "a case keeps the dimension and plane of each name", Cause: program.Differ("set", n.Type, d.node.Type),
			}
		}
		sets[set.Name] = n
	}
	for _, set := range w.sets {
		if s.returns(set.Name, sets) {
			return nil, syntax.Fail(set.X.Span(), set.Name+" would rest on itself in this case", "write the value without what rests on "+set.Name)
		}
	}
	return sets, nil
}

// returns says whether a name rests on itself under the formulas of a case.
func (s *Session) returns(name string, sets map[string]*program.Node) bool {
	seen := map[string]bool{}
	var reaches func(at string) bool
	reaches = func(at string) bool {
		found := false
		below := func(u string) {
			if u == name {
				found = true
			} else if !found && !seen[u] {
				seen[u] = true
				found = reaches(u)
			}
		}
		if n := sets[at]; n != nil {
			n.Names(below)
		} else if d := s.store.defs[at]; d != nil {
			for _, u := range d.uses {
				below(u)
			}
		}
		return found
	}
	return reaches(name)
}

func (s *Session) compare(j job) ([]Result, error) {
	a := j.do.(*syntax.Compare)
	c := s.checker(j.text, "")
	f, err := s.formulas(c, a.Columns)
	if err != nil {
		return nil, err
	}
	rows := []compared{{name: baseCase}}
	for _, n := range a.Cases {
		if n.Name == baseCase {
			continue
		}
		w := s.cases[n.Name]
		if w == nil {
			return nil, syntax.Fail(n.Where, n.Name+" is no case", "define it: case "+n.Name+" : x = …; base is the session as it stands")
		}
		sets, err := s.settings(w, s.checker(w.text, ""))
		if err != nil {
			return nil, &syntax.Error{Marks: []syntax.Span{n.Where}, Msg: "case " + n.Name + " does not fit the session any more: " + messageOf(err), Hint: "define the case again", Cause: err}
		}
		rows = append(rows, compared{n.Name, sets, n.Where})
	}
	return s.comparison(f, c, rows)
}

// compared is a row of a comparison.
type compared struct {
	name string
	sets map[string]*program.Node
	at   syntax.Span
}

// messageOf is what a refusal says, without its way on.
func messageOf(err error) string {
	var bad *syntax.Error
	if errors.As(err, &bad) {
		return bad.Msg
	}
	return err.Error()
}

func (s *Session) comparison(f *formulas, c *program.Checker, rows []compared) ([]Result, error) {
	t := &Table{Columns: []Column{{"case", ""}}, Warnings: c.Warnings}
	var base []float64
	for _, w := range rows {
		y, warnings, err := s.under(w.sets, f)
		switch {
		case err != nil && w.sets == nil:
			return nil, s.blame(err, c)
		case err != nil:
			return nil, &syntax.Error{Marks: []syntax.Span{w.at}, Msg: "in case " + w.name + ": " + messageOf(s.blame(err, c)), Hint: "set other values in this case", Cause: err}
		}
		for _, said := range warnings {
			if !slices.Contains(t.Warnings, said) {
				t.Warnings = append(t.Warnings, said)
			}
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
func (s *Session) under(sets map[string]*program.Node, f *formulas) (y []float64, warnings []string, err error) {
	var names []string
	for name := range sets {
		names = append(names, name)
	}
	resolve := s.opened(names, false)
	p, err := program.CompileAll(f.nodes, func(name string) (*program.Node, error) {
		if n := sets[name]; n != nil {
			return n, nil
		}
		return resolve(name)
	}, program.Opening{})
	if err != nil {
		return nil, nil, err
	}
	y = make([]float64, len(f.nodes))
	frame := p.NewFrame()
	err = p.RunAll(frame, nil, y)
	return y, frame.Warnings, err
}
