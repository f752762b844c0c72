package repl

import (
	"context"
	"math"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Verdict is the answer of a check.
type Verdict struct {
	Holds       bool
	Op          string
	Left, Right *Value
	Within      *Value // nil but for "a = b within c"
}

func (v *Verdict) lines(style Style) []Line {
	s, tone := "holds: ", Good
	if !v.Holds {
		s, tone = "fails: ", Bad
	}
	s += v.Left.Text(style.Digits) + " " + v.Op + " " + v.Right.Text(style.Digits)
	if v.Within != nil {
		s += " within " + v.Within.Text(style.Digits)
	}
	return append([]Line{{s, tone}}, warningLines(v.Left.Warnings)...)
}

func (v *Verdict) record() Record {
	return Record{Kind: CheckRecord, Holds: v.Holds, Warnings: v.Left.Warnings}
}

func (s *Session) check(j job) ([]Result, error) {
	a := j.do.(*syntax.Check)
	c := s.checker(j.text, "")
	if (a.Op == "=") != (a.Within != nil) {
		hint := "write check a = b within 2 %"
		if a.Op != "=" {
			hint = "write check a " + a.Op + " b, or check a = b within 2 %"
		}
		return nil, syntax.Fail(a.OpAt, "within belongs to =, and = needs it: no two measured values are equal to the last digit", hint)
	}
	if err := c.Comparable(a.X, a.Y); err != nil {
		return nil, err
	}
	v := &Verdict{Op: a.Op}
	var err error
	if v.Left, err = s.single(j.ctx, a.X, c); err != nil {
		return nil, err
	}
	if v.Right, err = s.single(j.ctx, a.Y, c); err != nil {
		return nil, err
	}
	if v.Left.Point == v.Right.Point {
		v.Left.Unit = v.Right.Unit // both sides in one unit
	}
	if a.Within == nil {
		v.Holds = program.Holds(a.Op, v.Left.SI, v.Right.SI)
		return []Result{v}, nil
	}
	return s.within(j.ctx, a, v, c)
}

func (s *Session) within(ctx context.Context, a *syntax.Check, v *Verdict, c *program.Checker) ([]Result, error) {
	w, err := s.single(ctx, a.Within, c)
	if err != nil {
		return nil, err
	}
	band := math.Abs(w.SI)
	switch have := w.Unit.Dimension(); {
	case have.IsNumber() && !v.Right.Unit.Dimension().IsNumber() || have.IsNumber() && percent(a.Within):
		band *= math.Abs(v.Right.SI)
	case have == v.Right.Unit.Dimension():
	default:
		return nil, &syntax.Error{
			Marks: []syntax.Span{a.Within.Span()}, Msg: "within is a fraction of the right side or a quantity of its dimension, not " + s.describe(program.Type{Dim: have}),
			Hint: "write within 2 %, or within 1 " + s.sys.UnitText(v.Right.Unit.Dimension()), Cause: &units.DimensionError{Op: "compare", Have: have, Rhs: v.Right.Unit.Dimension()},
		}
	}
	v.Within = w
	v.Holds = math.Abs(v.Left.SI-v.Right.SI) <= band
	return []Result{v}, nil
}

// percent says whether a tolerance is written as a fraction of the value: it
// is what tells 2 % of a number from the number 0.02.
func percent(x syntax.Expr) bool {
	l, ok := x.(*syntax.Literal)
	return ok && (l.Unit == "%" || l.Unit == "ppm" || l.Unit == "ppb")
}

// single is the value of an expression that must have one.
func (s *Session) single(ctx context.Context, x syntax.Expr, c *program.Checker) (*Value, error) {
	v, err := s.answer(ctx, x, nil, c)
	if err == nil && v == nil {
		err = syntax.Fail(x.Span(), "this has no single value", "take one of it, such as mean(…)")
	}
	if v != nil && percent(x) {
		if u, e := s.sys.Parse(x.(*syntax.Literal).Unit); e == nil {
			v.Unit = u
		}
	}
	return v, err
}
