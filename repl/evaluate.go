package repl

import (
	"context"
	"errors"
	"fmt"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// checker makes a checker for one statement.
func (s *Session) checker(source, owner string) *program.Checker {
	return &program.Checker{Scope: scope{s}, Source: source, Owner: owner}
}

// resolve gives the number that a name has now, or its list.
func (s *Session) resolve(name string) (*program.Node, error) {
	d := s.store.defs[name]
	if d == nil || d.node == nil {
		return nil, fmt.Errorf("%s has no value", name)
	}
	if d.node.Type.Kind == program.List {
		return d.node, nil
	}
	v, err := s.valueOf(d)
	if err != nil {
		return nil, err
	}
	return program.NewConstant(units.New(v, d.node.Type.Dim)), nil
}

// valueOf computes what a name is worth, once for each state of what it rests
// on.
func (s *Session) valueOf(d *definition) (float64, error) {
	if !d.known {
		d.value, d.warning, d.err = s.compute(d.node)
		d.known = true
	}
	return d.value, d.err
}

// compute runs a checked formula on the values that names have now.
func (s *Session) compute(n *program.Node) (float64, []string, error) {
	p, err := program.Compile(n, s.resolve)
	if err != nil {
		return 0, nil, err
	}
	f := p.NewFrame()
	v, err := p.Run(f)
	return v, f.Warnings, err
}

// answer checks and computes an expression.
func (s *Session) answer(ctx context.Context, x syntax.Expr, stated *syntax.Stated, c *program.Checker) (*Value, error) {
	n, err := c.Check(x)
	if err != nil {
		return nil, err
	}
	unit := s.declared(x)
	if stated != nil {
		u, err := c.StatedUnit(stated, n, x)
		if err != nil {
			return nil, err
		}
		unit = &u
		if stated.Unit == "" {
			unit = nil
		}
	}
	if k := n.Type.Kind; k != program.Number && k != program.Point {
		return nil, nil
	}
	v, warnings, err := s.compute(n)
	if err != nil {
		return nil, s.blame(err, c)
	}
	value := s.value(v, n.Type, unit, append(c.Warnings, warnings...))
	if err := s.addUncertainty(ctx, value, n); err != nil {
		return nil, s.blame(err, c)
	}
	return value, nil
}

// declared is the unit that a bare name was defined with, or that a bare call
// is stated in.
func (s *Session) declared(x syntax.Expr) *units.Unit {
	if name, ok := x.(*syntax.Name); ok {
		if d := s.store.defs[name.Name]; d != nil {
			return d.unit
		}
	}
	return s.rowUnit(x)
}

// rowUnit is the unit in which a function wants its answer stated, when the
// expression is a call of it and nothing more.
func (s *Session) rowUnit(x syntax.Expr) *units.Unit {
	call, ok := x.(*syntax.Call)
	if !ok {
		return nil
	}
	f := s.rows[call.Func]
	if f == nil || f.Result.Unit == "" {
		return nil
	}
	if u, err := s.sys.Parse(f.Result.Unit); err == nil && u.Dimension() == f.Result.Dim {
		return &u
	}
	return nil
}

// blame turns what stopped a run into a refusal that marks the place.
func (s *Session) blame(err error, c *program.Checker) error {
	var run *program.RunError
	if !errors.As(err, &run) {
		return err
	}
	e := &syntax.Error{Msg: run.Err.Error(), Cause: err, Hint: "why and check show what the inputs are"}
	switch {
	case errors.Is(err, ErrDivision):
		e.Msg, e.Hint = "division by zero", "the divisor must differ from zero: see its value with why"
	case errors.Is(run.Err, ErrNotFinite):
		e.Msg, e.Hint = "the result is not a finite number", "look at the range of each input, and at roots and logarithms of what is negative"
	}
	var arg *program.ArgumentFault
	if errors.As(err, &arg) && run.Function() != "" {
		e.Hint = "help " + run.Function() + " shows the range of each argument"
	}
	if run.Node == nil {
		return e
	}
	if run.Node.Owner == c.Owner {
		e.Marks = []syntax.Span{run.At()}
		return e
	}
	e.Msg = "in " + s.where(run.Node.Owner) + ": " + e.Msg
	return e
}

// where names a definition with its place.
func (s *Session) where(name string) string {
	d := s.store.defs[name]
	switch {
	case d == nil:
		return name
	case d.file != "":
		return fmt.Sprintf("%s (%s:%d)", name, d.file, d.line)
	}
	return name
}

// Eval answers one expression, perhaps with a unit in brackets behind it, and
// leaves the session as it is. The error is a *Refusal.
func (s *Session) Eval(ctx context.Context, text string) (*Value, error) {
	v, err := s.eval(ctx, text)
	if err != nil {
		return nil, s.refusal(text, err).Err
	}
	return v, nil
}

func (s *Session) eval(ctx context.Context, text string) (*Value, error) {
	x, stated, err := s.expression(text)
	if err == nil {
		err = ctx.Err()
	}
	if err != nil {
		return nil, err
	}
	v, err := s.answer(ctx, x, stated, s.checker(text, ""))
	if err == nil && v == nil {
		err = syntax.Fail(x.Span(), "this has no single value", "take one of it, such as mean(…)")
	}
	return v, err
}

// expression reads a text that is one expression.
func (s *Session) expression(text string) (syntax.Expr, *syntax.Stated, error) {
	if s.broken != nil {
		return nil, nil, s.broken
	}
	if long := s.statementFits(text); long != nil {
		return nil, nil, long
	}
	st, bad := syntax.Parse(text)
	if bad != nil {
		return nil, nil, bad
	}
	show, ok := st.Do.(*syntax.Show)
	if !ok {
		return nil, nil, syntax.Fail(syntax.Span{Start: 0, End: len(text)}, "this is no expression", "Feed takes statements")
	}
	return show.X, show.Stated, nil
}
