package repl

import (
	"math"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
)

// axis makes the points of one varied name.
func (s *Session) axis(j job, slot int, a syntax.Axis, v varied) (study.Axis, error) {
	c := s.checker(j.text, "")
	if a.By != nil {
		return s.stepped(j, c, slot, a, v)
	}
	n, err := s.single(j.ctx, a.Points, c)
	if err != nil {
		return study.Axis{}, err
	}
	if !n.Unit.Dimension().IsNumber() || n.SI != math.Trunc(n.SI) || n.SI < 2 || n.SI > 1e12 {
		return study.Axis{}, syntax.Fail(a.Points.Span(), "a range has a whole number of points from 2 on", "write 41 points")
	}
	at := a.From.Span().Join(a.To.Span())
	make := study.Spaced
	if a.Log {
		make = study.Logarithmic
		if !(v.from > 0 && v.to > 0 || v.from < 0 && v.to < 0) {
			return study.Axis{}, syntax.Fail(at, "equal ratios need both ends above zero, or both below", "leave out log, or begin above zero")
		}
	}
	x, err := make(slot, v.from, v.to, int(n.SI))
	if err != nil {
		return study.Axis{}, &syntax.Error{Marks: []syntax.Span{at}, Msg: "these ends lie too far apart for floating point", Hint: "choose a shorter range", Cause: err}
	}
	return x, nil
}

func (s *Session) stepped(j job, c *program.Checker, slot int, a syntax.Axis, v varied) (study.Axis, error) {
	refuse := func(msg, hint string) (study.Axis, error) {
		return study.Axis{}, syntax.Fail(a.By.Span(), msg, hint)
	}
	step, err := s.single(j.ctx, a.By, c)
	way := "write the step in " + v.unit.Interval().String()
	if v.unit.IsOne() {
		way = "write the step as a plain number"
	}
	switch {
	case err != nil:
		return study.Axis{}, err
	case step.Point:
		return refuse("a step is a difference, not a temperature point", "write the step in K")
	case step.Unit.Dimension() != v.unit.Dimension():
		return refuse("the step is "+s.kindOf(step.Unit.Dimension())+", the range "+s.describe(v.typ), way)
	case step.SI == 0:
		return refuse("a step of zero leads nowhere", "write a step, or so many points: 41 points")
	}
	x, err := study.Stepped(slot, v.from, v.to, step.SI)
	if err != nil {
		return refuse("this step is lost in the rounding of the ends", "write a larger step, or so many points: 41 points")
	}
	return x, nil
}
