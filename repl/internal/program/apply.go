package program

import (
	"errors"
	"fmt"
	"slices"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// apply makes the node of a call of a row that works on numbers.
func (c *Checker) apply(k *Call) (*Node, error) {
	f := k.Func
	n := c.made(Node{op: opCall, fn: f}, k.Tree.Where)
	n.Type = Type{Kind: f.Result.Kind, Dim: f.Result.Dim, Plane: f.Result.Plane}
	var types []Type
	for i, p := range f.Params {
		a := k.Args[i]
		if a == nil { // a word is the number of its place
			a = c.constant(float64(slices.Index(p.Words, k.Words[i])), Type{}, k.Tree.Where)
		}
		n.args = append(n.args, a)
		types = append(types, a.Type)
	}
	if f.Rule != nil {
		t, err := f.Rule(types)
		if err != nil {
			return nil, c.ruleRefused(k, types, err)
		}
		n.Type = t.item()
	}
	if i := f.Result.Follows; i > 0 {
		n.Type.Plane = types[i-1].Plane
	}
	return n, nil
}

func (c *Checker) ruleRefused(k *Call, types []Type, err error) error {
	if errors.Is(err, units.ErrRoot) || errors.Is(err, units.ErrExponent) {
		return c.powerRefused(k.Tree.Where, types[0], err)
	}
	e := &syntax.Error{Msg: k.Func.Name + ": " + err.Error(), Hint: k.Func.Signature(), Cause: err}
	for _, x := range k.Exprs {
		if x != nil {
			e.Marks = append(e.Marks, x.Span())
		}
	}
	if len(k.Exprs) == 0 {
		for _, a := range k.Tree.Args {
			e.Marks = append(e.Marks, a.X.Span())
		}
	}
	if len(k.Exprs) == 1 && !types[0].Pure() {
		e.Msg += ", not " + c.describe(types[0])
	}
	return e
}

// variadic checks sum(a, b, …) and sum(list).
func (c *Checker) variadic(k *Call) (*Node, error) {
	f := k.Func
	if len(k.Tree.Args) == 0 {
		return nil, syntax.Fail(k.Tree.Where, f.Name+" needs at least one value", "write "+f.Name+"({1, 2, 3})")
	}
	n := c.made(Node{op: opCall, fn: f}, k.Tree.Where)
	var t Type            // of all arguments so far
	var first syntax.Expr // the one that it comes from
	for i, a := range k.Tree.Args {
		if a.Label != "" {
			return nil, syntax.Fail(a.LabelAt, f.Name+" has no argument "+a.Label, f.Signature())
		}
		x, err := c.check(a.X)
		if err != nil {
			return nil, err
		}
		if kind := x.Type.Kind; kind == Text || kind == ChainKind || kind == condition || kind == List && len(k.Tree.Args) > 1 {
			return nil, syntax.Fail(a.X.Span(), f.Name+" takes numbers, or one list", f.Signature())
		}
		if i == 0 {
			t, first = x.Type.item(), a.X
		}
		if err := c.comparable(first, a.X, t, x.Type, "stand side by side in "+f.Name); err != nil {
			return nil, err
		}
		if t.Kind != x.Type.item().Kind {
			return nil, c.pair(first, a.X, "temperature points and differences do not mix", "write all of them in degC")
		}
		if t.Plane == "" && x.Type.Plane != "" {
			t.Plane, first = x.Type.Plane, a.X
		}
		n.args = append(n.args, x)
	}
	var err error
	if n.Type, err = f.Rule([]Type{t}); err != nil {
		return nil, c.ruleRefused(k, []Type{t}, err)
	}
	return n, nil
}

// own checks a call of a function of the session: its body, with the
// arguments in place of the parameters.
func (c *Checker) own(x *syntax.Call, f *OwnFunction) (*Node, error) {
	if slices.Contains(c.inside, f.Name) {
		return nil, syntax.Fail(x.FuncAt, f.Name+" calls itself", "a function of the session has no recursion; write the steps as names")
	}
	c.use(f.Name)
	here := c.place(x.Where)
	inner := &Checker{
		Scope: c.Scope, Source: f.Source, Owner: c.Owner, anchor: &here, size: c.size,
		locals: map[string]*Node{}, inside: append(slices.Clone(c.inside), f.Name),
	}
	if len(inner.inside) > 40 {
		return nil, syntax.Fail(x.Where, "session functions call one another deeper than 40", "write the steps as names")
	}
	for i, a := range x.Args {
		at := i
		if a.Label != "" {
			at = slices.IndexFunc(f.Params, func(p syntax.Param) bool { return p.Name == a.Label })
		}
		if at < 0 || at >= len(f.Params) {
			return nil, syntax.Fail(x.Where, fmt.Sprintf("%s takes %s", f.Name, named(len(f.Params), "argument")), OwnSignature(f))
		}
		if err := c.bind(inner, f, f.Params[at], a.X); err != nil {
			return nil, err
		}
	}
	for _, p := range f.Params {
		if inner.locals[p.Name] == nil {
			return nil, syntax.Fail(x.Where, f.Name+" needs its argument "+p.Name, OwnSignature(f))
		}
	}
	inner.Uses, inner.Warnings = c.Uses, c.Warnings
	n, err := inner.plain(f.Body)
	if err == nil && f.Stated != nil {
		_, err = inner.StatedUnit(f.Stated, n, f.Body)
	}
	c.Uses, c.Warnings = inner.Uses, inner.Warnings
	if err != nil {
		return nil, inside(f.Name, x.Where, err)
	}
	return n, nil
}

// bind checks an argument against what the parameter declares.
func (c *Checker) bind(inner *Checker, f *OwnFunction, p syntax.Param, x syntax.Expr) error {
	n, err := c.check(x)
	if err != nil {
		return err
	}
	if inner.locals[p.Name] != nil {
		return syntax.Fail(x.Span(), f.Name+" has its argument "+p.Name+" twice", OwnSignature(f))
	}
	inner.locals[p.Name] = n
	if p.Stated == nil {
		return nil
	}
	u, err := inner.StatedBare(p.Stated)
	if err != nil {
		return inside(f.Name, x.Span(), err)
	}
	want := Param{Name: p.Name, Dim: u.Dimension()}
	if u.Point() {
		want.Kind = Point
	}
	if p.Stated.Plane != "" {
		if want.Plane, err = inner.plane(p.Stated.Plane); err != nil {
			return syntax.Fail(x.Span(), "in "+f.Name+": "+err.Error(), c.planesHint(p.Stated.Plane))
		}
		if !mayStand(want.Dim) {
			return syntax.Fail(x.Span(), "in "+f.Name+": "+c.quantity(want.Dim)+" does not stand at a plane", "declare "+p.Name+" ["+p.Stated.Unit+"]")
		}
		if t := n.Type; t.Plane == "" {
			t.Plane = want.Plane
			inner.locals[p.Name] = c.retyped(n, t, x.Span())
		}
	}
	return c.fits(&Function{Name: f.Name}, want, n, x)
}

// OwnSignature writes a function of the session with its parameters.
func OwnSignature(f *OwnFunction) string {
	s := f.Name + "("
	for i, p := range f.Params {
		if i > 0 {
			s += ", "
		}
		s += p.Name
		if p.Stated != nil {
			s += " [" + p.Stated.Unit
			if p.Stated.Plane != "" {
				s += " at " + p.Stated.Plane
			}
			s += "]"
		}
	}
	return s + ")"
}

// inside moves a refusal from a function's text to the place of its call. Of
// functions that call one another the innermost is named.
func inside(name string, at syntax.Span, err error) error {
	e, ok := err.(*syntax.Error)
	if !ok {
		return err
	}
	if _, named := e.Cause.(*syntax.Error); named {
		return &syntax.Error{Marks: []syntax.Span{at}, Msg: e.Msg, Hint: e.Hint, Cause: e.Cause}
	}
	return &syntax.Error{Marks: []syntax.Span{at}, Msg: "in " + name + ": " + e.Msg, Hint: e.Hint, Cause: e}
}
