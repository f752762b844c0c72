package repl

import (
	"context"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

func (s *Session) show(j job) ([]Result, error) {
	a := j.do.(*syntax.Show)
	c := s.checker(j.text, "")
	v, err := s.answer(j.ctx, a.X, a.Stated, c)
	if err != nil {
		return nil, err
	}
	if v != nil {
		return []Result{v}, nil
	}
	return s.showOther(a, c)
}

// showOther prints what is no single value: a list, or a chain.
func (s *Session) showOther(a *syntax.Show, c *program.Checker) ([]Result, error) {
	n, err := c.Check(a.X)
	if err != nil {
		return nil, err
	}
	switch n.Type.Kind {
	case program.List:
		return s.showList(n, a.Stated, a.X, c)
	case program.ChainKind:
		return nil, syntax.Fail(a.X.Span(), n.Chain().Name+" is a chain, not a value", "walk "+n.Chain().Name+" 250 W at IF, or transmission("+n.Chain().Name+", IF, WAFER)")
	}
	if n.Type.Kind == program.BodyKind {
		what := c.Said(a.X)
		return nil, syntax.Fail(a.X.Span(), what+" is a body, not a value", "reflectivity("+what+", 13.5 nm) or transmittance("+what+") ask it; see: help reflectivity")
	}
	return nil, syntax.Fail(a.X.Span(), "this has no value to print", "see: help language")
}

// new makes a definition from where statements come from now.
func (s *Session) newDefinition(name string, j job) *definition {
	return &definition{name: name, text: j.text, note: j.note, action: j.do, file: s.origin.file, line: s.origin.line}
}

func (s *Session) define(j job) ([]Result, error) {
	a := j.do.(*syntax.Define)
	if err := s.nameable(a.Name, a.NameAt, a.X); err != nil {
		return nil, err
	}
	d := s.newDefinition(a.Name, j)
	if err := s.checked(d); err != nil {
		return nil, err
	}
	if err := s.install(d, a.NameAt); err != nil {
		return nil, err
	}
	return s.valueResults(j.ctx, d)
}

// nameable refuses constants as names, and a name that its own formula uses.
func (s *Session) nameable(name string, at syntax.Span, x syntax.Expr) error {
	if _, ok := s.constants[name]; ok {
		return syntax.Fail(at, name+" is a constant of the language", "choose another name, such as "+name+"_1")
	}
	var self *syntax.Error
	syntax.Each(x, func(x syntax.Expr) {
		if n, ok := x.(*syntax.Name); ok && n.Name == name && self == nil {
			self = &syntax.Error{
				Marks: []syntax.Span{at, n.Where}, Cause: ErrCircle,
				Msg:  name + " would rest on itself",
				Hint: "a name stands for its formula; give the new value another name, such as " + name + "_2",
			}
		}
	})
	if self != nil {
		return self
	}
	return nil
}

// checked gives a definition its node, from its statement and the present
// state of the session.
func (s *Session) checked(d *definition) error {
	c := s.checker(d.text, d.name)
	var err error
	switch a := d.action.(type) {
	case *syntax.Define:
		err = s.checkedValue(d, a, c)
	case *syntax.Block:
		if a.Kind == "stack" {
			d.node, err = s.checkedStack(a, c)
		} else {
			d.node, err = c.ChainBlock(a)
		}
	case *syntax.Material:
		d.node, err = s.checkedMaterial(a, c)
	case *syntax.DefineFunction:
		d.own = &program.OwnFunction{Name: a.Name, Params: a.Params, Stated: a.Stated, Body: a.X, Source: d.text}
	}
	d.uses, d.warning = c.Uses, c.Warnings
	d.source = d.node != nil && program.Uncertain(d.node, func(string) bool { return false })
	return err
}

func (s *Session) checkedValue(d *definition, a *syntax.Define, c *program.Checker) error {
	n, err := c.Check(a.X)
	if err != nil {
		return err
	}
	switch n.Type.Kind {
	case program.Number, program.Point, program.List, program.BodyKind:
	default:
		return syntax.Fail(a.X.Span(), "a name holds a value or a list", "chains and functions have statements of their own: help chain, help function")
	}
	d.node, d.bare = n, bare(a.X)
	if a.Stated == nil {
		d.unit = s.rowUnit(a.X)
		return nil
	}
	u, err := c.StatedUnit(a.Stated, n, a.X)
	if err == nil && a.Stated.Unit != "" {
		d.unit = &u
	}
	return err
}

// bare says whether an expression is a literal alone, with sign and plane.
func bare(x syntax.Expr) bool {
	switch x := x.(type) {
	case *syntax.Literal:
		return true
	case *syntax.At:
		return bare(x.X)
	case *syntax.Unary:
		return bare(x.X)
	case *syntax.List:
		return true
	}
	return false
}

func (s *Session) valueResults(ctx context.Context, d *definition) ([]Result, error) {
	if k := d.node.Type.Kind; k == program.List || k == program.BodyKind || d.bare {
		return noteOnly(d.warning), nil
	}
	v, err := s.valueOf(d)
	if err != nil {
		return nil, err
	}
	value := s.value(v, d.node.Type, d.unit, d.warning)
	if err := s.addUncertainty(ctx, value, d.node); err != nil {
		return nil, s.blame(err, s.checker(d.text, d.name))
	}
	return []Result{value}, nil
}

func noteOnly(warnings []string) []Result {
	if len(warnings) == 0 {
		return nil
	}
	return []Result{&Text{warnings: warnings}}
}

func (s *Session) defineFunction(j job) ([]Result, error) {
	a := j.do.(*syntax.DefineFunction)
	if s.rows[a.Name] != nil || a.Name == "if" {
		return nil, syntax.Fail(a.NameAt, a.Name+" is a function of the catalogue", "choose another name, such as "+a.Name+"_1")
	}
	if err := s.nameable(a.Name, a.NameAt, &syntax.Name{}); err != nil {
		return nil, err
	}
	for i, p := range a.Params {
		for _, q := range a.Params[:i] {
			if p.Name == q.Name {
				return nil, syntax.Fail(p.NameAt, "the parameter "+p.Name+" stands twice", "give the second one another name")
			}
		}
	}
	var spread syntax.Expr
	syntax.Each(a.X, func(x syntax.Expr) {
		if l, ok := x.(*syntax.Literal); ok && (l.Spread != nil || strings.Contains(l.Number, "(")) || uncertainCall(x) {
			spread = x
		}
	})
	if spread != nil {
		return nil, syntax.Fail(spread.Span(), "an uncertain value inside a function would be a new source of error at each call", "give it a name of its own and use the name")
	}
	d := s.newDefinition(a.Name, j)
	if err := s.checked(d); err != nil {
		return nil, err
	}
	return nil, s.install(d, a.NameAt)
}

func (s *Session) defineChain(j job) ([]Result, error) {
	b := j.do.(*syntax.Block)
	if err := s.nameable(b.Name, b.NameAt, &syntax.Name{}); err != nil {
		return nil, err
	}
	d := s.newDefinition(b.Name, j)
	if err := s.checked(d); err != nil {
		return nil, err
	}
	if err := s.install(d, b.NameAt); err != nil {
		return nil, err
	}
	s.planes[b.Name] = d.node.Chain().Planes()
	return nil, nil
}

func (s *Session) declareCounted(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	name := c.Names[0].Name
	for _, known := range s.counted {
		if known == name {
			return nil, nil
		}
	}
	sys, _, err := s.sys.WithCounted(name)
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{c.Names[0].Where}, Msg: err.Error(), Hint: "choose another word", Cause: err}
	}
	s.sys = sys
	s.counted = append(s.counted, name)
	return nil, nil
}
