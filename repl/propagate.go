package repl

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Distribution is what propagating the distributions of the inputs gave. All
// numbers are in the unit of Mean.
type Distribution struct {
	Mean      *Value // with its standard uncertainty
	Skewness  float64
	Low, High float64 // shortest interval of the coverage probability, in SI units
	Coverage  float64
	Trials    int
	Asked     int                                  // more than Trials when it was interrupted
	Failed    int                                  // trials without a value, left out
	Tolerance struct{ Mean, U, Low, High float64 } // what is not settled yet, in SI units
	Seed      uint64
	chart     []string
	files     []Line
}

func (d *Distribution) lines(style Style) []Line {
	u := d.Mean.Unit
	in := func(si float64) string { return units.FormatNumber(u.From(si), style.Digits) }
	step := func(si float64) string { return units.FormatNumber(u.FromDifference(si), 2) }
	rows := [][]string{
		{"mean", u.Label(in(d.Mean.SI)), "± " + step(d.Tolerance.Mean)},
		{"standard uncertainty", u.Interval().Label(units.FormatNumber(u.FromDifference(d.Mean.U), style.Digits)), "± " + step(d.Tolerance.U)},
		{"skewness", units.FormatNumber(d.Skewness, 2), ""},
		{
			fmt.Sprintf("shortest %s %% interval", units.FormatNumber(100*d.Coverage, 4)), fmt.Sprintf("%s to %s", u.Label(in(d.Low)), u.Label(in(d.High))),
			fmt.Sprintf("± %s and %s", step(d.Tolerance.Low), step(d.Tolerance.High)),
		},
	}
	if d.Tolerance.Mean == 0 {
		for i := range rows {
			rows[i][2] = ""
		}
	}
	var out []Line
	for _, l := range aligned(rows) {
		out = append(out, Line{l, Plain})
	}
	said := fmt.Sprintf("%d trials, seed %d; behind ± stands what is not settled yet", d.Trials, d.Seed)
	if d.Tolerance.Mean == 0 {
		said = fmt.Sprintf("%d trials, seed %d", d.Trials, d.Seed)
	}
	if d.Trials < d.Asked {
		said = fmt.Sprintf("interrupted: %d of %d trials, seed %d", d.Trials, d.Asked, d.Seed)
	}
	out = append(out, Line{said, Plain})
	for _, l := range d.chart {
		out = append(out, Line{l, Plain})
	}
	out = append(out, d.files...)
	return append(out, warningLines(d.Mean.Warnings)...)
}

func (d *Distribution) record() Record {
	r := d.Mean.record()
	r.Kind = DistributionRecord
	u := d.Mean.Unit
	full := func(v float64) json.Number { return json.Number(strconv.FormatFloat(v, 'g', -1, 64)) }
	r.Low, r.High = full(u.From(d.Low)), full(u.From(d.High))
	r.Coverage, r.Trials, r.Skewness = d.Coverage, d.Trials, d.Skewness
	return r
}

func (s *Session) propagate(j job) ([]Result, error) {
	a := j.do.(*syntax.Propagate)
	if err := s.destinations(a.Out, false); err != nil {
		return nil, err
	}
	c := s.checker(j.text, "")
	asked, err := s.options(j.ctx, a.Options, c)
	if err != nil {
		return nil, err
	}
	n, err := c.Check(a.Of.X)
	if err == nil && n.Type.Kind != program.Number && n.Type.Kind != program.Point {
		err = syntax.Fail(a.Of.X.Span(), "this has no single value", "take one of it, such as mean(…)")
	}
	if err != nil {
		return nil, err
	}
	unit := s.declared(a.Of.X)
	if a.Of.Stated != nil {
		u, err := c.StatedUnit(a.Of.Stated, n, a.Of.X)
		if err != nil {
			return nil, err
		}
		unit = &u
	}
	in, err := s.inputsOf(n)
	if err != nil {
		return nil, err
	}
	if len(in.program.Sources) == 0 {
		return nil, syntax.Fail(a.Of.X.Span(), "no uncertain input takes part in this", "give an input its uncertainty, as in 3.0 W ± 2 %")
	}
	if err := s.drawable(in, j.text, a.Of.X); err != nil {
		return nil, err
	}
	asked.Watch = s.watch(j.ctx, asked.Trials)
	d, err := study.Propagate(j.ctx, func() study.Block { return in.program.Block() }, in.sources, asked)
	switch {
	case errors.Is(err, study.ErrRange) || errors.Is(err, study.ErrSize):
		return nil, &syntax.Error{Marks: []syntax.Span{a.Of.X.Span()}, Msg: err.Error(), Hint: "options stand behind a colon, as in propagate x : trials = 1e5, coverage = 95 %", Cause: err}
	case d == nil || err != nil && j.ctx.Err() == nil: // an end of the context keeps what was computed
		return nil, s.blame(err, c)
	}
	out := s.distribution(d, n.Type, unit, asked.Seed, append(c.Warnings, in.warnings()...))
	if out.chart, err = s.draw(a.Out, histogram(d, out.Mean.Unit, strings.TrimSpace(c.Said(a.Of.X)))); err != nil {
		return nil, err
	}
	out.files = made(a.Out)
	return []Result{out}, nil
}

func (s *Session) distribution(d *study.Distribution, t program.Type, unit *units.Unit, seed uint64, warnings []string) *Distribution {
	v := s.value(d.Mean, t, unit, warnings)
	v.Uncertain, v.U = true, d.SD
	if d.NoSpread {
		v.Warnings = append(v.Warnings, "an input has so few degrees of freedom that no standard deviation exists; the interval does")
	}
	if d.Failed > 0 {
		v.Warnings = append(v.Warnings, fmt.Sprintf("%d trials had no value and are left out: %v", d.Failed, d.Failure))
	}
	out := &Distribution{Mean: v, Skewness: d.Skewness, Low: d.Low, High: d.High, Coverage: d.Coverage, Trials: d.Trials, Asked: d.Asked, Failed: d.Failed, Seed: seed}
	out.Tolerance.Mean, out.Tolerance.U, out.Tolerance.Low, out.Tolerance.High = d.Tolerance.Mean, d.Tolerance.SD, d.Tolerance.Low, d.Tolerance.High
	return out
}

// drawable refuses correlated inputs that have no distribution together.
func (s *Session) drawable(in *inputs, text string, at syntax.Expr) error {
	for _, p := range in.pairs {
		a, b := in.list[p.A], in.list[p.B]
		nameA, nameB := s.inputName(in.program.Sources, p.A, text), s.inputName(in.program.Sources, p.B, text)
		switch {
		case a.Shape != study.Normal || b.Shape != study.Normal:
			return syntax.Fail(at.Span(), nameA+" and "+nameB+" are correlated and not both normal: no distribution of the two together is known", "budget takes the correlation to first order")
		case a.DoF != b.DoF:
			return syntax.Fail(at.Span(), nameA+" and "+nameB+" are correlated and differ in their degrees of freedom: no distribution of the two together is known", "give both the same nu, or see budget")
		}
	}
	return nil
}

// options reads trials = 1e6, seed = 1, coverage = 95 %.
func (s *Session) options(ctx context.Context, list []syntax.Option, c *program.Checker) (study.Propagation, error) {
	p := study.Propagation{Trials: s.limits.usual(), Seed: 1, Coverage: 0.95, Bins: 50}
	for i, o := range list {
		for _, before := range list[:i] {
			if before.Name == o.Name {
				return p, syntax.Fail(o.Where, o.Name+" is set twice", "set it once")
			}
		}
		v, err := s.single(ctx, o.X, c)
		if err != nil {
			return p, err
		}
		x := v.SI
		whole := v.Unit.Dimension().IsNumber() && x >= 0 && x == math.Trunc(x) && x < 1<<53
		switch {
		case o.Name == "trials" && whole && x <= study.MaxTrials:
			if err := s.trialsFit(int(x), o.Where.Join(o.X.Span())); err != nil {
				return p, err
			}
			p.Trials = int(x)
		case o.Name == "seed" && whole:
			p.Seed = uint64(x)
		case o.Name == "coverage" && v.Unit.Dimension().IsNumber() && x > 0 && x < 1:
			p.Coverage = x
		default:
			return p, syntax.Fail(o.Where.Join(o.X.Span()), o.Name+" cannot be this", fmt.Sprintf("options are trials, a whole number up to %d, seed, a whole number, and coverage, such as 95 %%", study.MaxTrials))
		}
	}
	return p, nil
}

// watch tells the host how far the trials are.
func (s *Session) watch(ctx context.Context, total int) func(study.Running) {
	if s.config.Progress == nil {
		return nil
	}
	return func(r study.Running) { s.config.Progress(ctx, r.Trials, total, "trials") }
}

// histogram makes the picture of a distribution.
func histogram(d *study.Distribution, unit units.Unit, name string) *Picture {
	h := d.Histogram
	b := &Bars{Low: unit.From(d.Low), High: unit.From(d.High)}
	total := float64(max(d.Trials-d.Failed, 1))
	width := unit.FromDifference(h.Width)
	for i, n := range h.Counts {
		b.Edges = append(b.Edges, unit.From(h.Low+float64(i)*h.Width))
		b.Density = append(b.Density, float64(n)/total/width)
	}
	b.Edges = append(b.Edges, unit.From(h.Low+float64(len(h.Counts))*h.Width))
	return &Picture{X: Axis{Name: name, Unit: stated(unit)}, Y: Axis{Name: "density"}, Bars: b}
}
