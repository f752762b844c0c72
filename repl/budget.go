package repl

import (
	"cmp"
	"fmt"
	"slices"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Budget is an uncertainty budget: the value, and a row for each uncertain
// input, the largest share first.
type Budget struct {
	Of   *Value
	Rows []Share
	// K and Expanded are the coverage factor and the expanded uncertainty, in SI
	// units, for a coverage probability of 95 %.
	K, Expanded float64
}

// Share is what one input gives to a budget.
type Share struct {
	Input string
	X, U  float64    // value and standard uncertainty, in Unit
	Unit  units.Unit // of the input
	C     float64    // sensitivity, in the unit of the answer per Unit
	CU    float64    // |c| u(x), in the unit of the answer
	Part  float64    // of u²
}

func (b *Budget) record() Record {
	t := b.table()
	return Record{Kind: TableRecord, Columns: t.Columns, Rows: t.Rows, Warnings: b.Of.Warnings}
}

// table has the columns of JCGM 100 table H.1, and the share. Every input has
// a unit of its own, so units stand in a column too.
func (b *Budget) table() *Table {
	unit := b.Of.Unit.Interval()
	t := &Table{Columns: []Column{{"input", ""}, {"x", ""}, {"u(x)", ""}, {"unit", ""}, {"c", ""}, {"unit of c", ""}, {"|c| u(x)", stated(unit)}, {"share of u²", ""}}}
	for _, r := range b.Rows {
		per, err := unit.Over(r.Unit.Interval())
		text := per.String()
		if err != nil {
			text = "?"
		}
		t.Rows = append(t.Rows, []Cell{word(r.Input), number(r.X), number(r.U), word(r.Unit.String()), number(r.C), word(text), number(r.CU), number(r.Part)})
	}
	return t
}

// stated is a unit as a column head has it, "" for the unit one.
func stated(u units.Unit) string {
	if u.IsOne() {
		return ""
	}
	return u.String()
}

func (b *Budget) lines(style Style) []Line {
	out := []Line{{b.Of.Text(style.Digits), Plain}}
	if len(b.Rows) == 0 {
		return append(out, Line{"no uncertain input takes part", Plain})
	}
	out = append(out, b.table().lines(style)...)
	if b.Expanded == 0 {
		out = append(out, Line{"the inputs leave no uncertainty", Plain})
		return append(out, warningLines(b.Of.Warnings)...)
	}
	if slices.ContainsFunc(b.Rows, func(r Share) bool { return r.Part < 0 || r.Part > 1 }) {
		out = append(out, Line{"the inputs are correlated, so that shares may lie below 0 and above 1; they add up to 1", Plain})
	}
	unit := b.Of.Unit
	dof := "infinitely many effective degrees of freedom"
	if b.Of.DoF > 0 {
		dof = units.FormatNumber(b.Of.DoF, 3) + " effective degrees of freedom"
	}
	expanded := units.FormatExpanded(unit.From(b.Of.SI), unit.FromDifference(b.Expanded))
	out = append(out, Line{fmt.Sprintf("expanded: %s (k=%s), 95 %% with %s", unit.Label(expanded), units.FormatNumber(b.K, 3), dof), Plain})
	return append(out, warningLines(b.Of.Warnings)...)
}

func (s *Session) budget(j job) ([]Result, error) {
	a := j.do.(*syntax.Budget)
	c := s.checker(j.text, "")
	v, err := s.answer(j.ctx, a.Of.X, a.Of.Stated, c)
	if err == nil && v == nil {
		err = syntax.Fail(a.Of.X.Span(), "this has no single value", "take one of it, such as mean(…)")
	}
	if err != nil {
		return nil, err
	}
	n, err := s.checker(j.text, "").Check(a.Of.X)
	if err != nil {
		return nil, err
	}
	in, err := s.inputsOf(n)
	if err != nil {
		return nil, err
	}
	fo, err := in.firstOrder(j.ctx)
	if err != nil {
		return nil, s.blame(err, c)
	}
	b := &Budget{Of: v}
	if b.Expanded, b.K, err = fo.Expanded(0.95); err != nil {
		return nil, err
	}
	for i, r := range fo.Rows {
		b.Rows = append(b.Rows, s.share(in.program.Sources, i, r, v, j.text))
	}
	slices.SortStableFunc(b.Rows, func(x, y Share) int { return cmp.Compare(y.Part, x.Part) })
	return []Result{b}, nil
}

func (s *Session) share(sources []*program.Node, i int, r study.Contribution, of *Value, text string) Share {
	n := sources[r.Slot]
	unit := s.unitOf(n)
	step, sign := of.Unit.FromDifference(1), 1.0
	if in, minus, _ := s.input(n.Owner); in == n {
		sign = minus // the name is minus what stands in its literal
	}
	return Share{
		Input: s.inputName(sources, r.Slot, text), Unit: unit,
		X: unit.From(sign * n.Value()), U: unit.FromDifference(n.Spread().U),
		C: sign * r.C * step / unit.FromDifference(1), CU: r.U * step, Part: r.Share,
	}
}

// unitOf is the unit in which an input is stated: that of its name's bracket,
// else the usual one.
func (s *Session) unitOf(n *program.Node) units.Unit {
	if d := s.store.defs[n.Owner]; d != nil && d.unit != nil && d.node != nil && d.node.Type == n.Type {
		return *d.unit
	}
	return s.display(n.Value(), n.Type)
}

// inputName names an uncertain input: the name that owns it, with the literal
// where that name has several, or the literal of the statement at hand.
func (s *Session) inputName(sources []*program.Node, i int, text string) string {
	n := sources[i]
	d := s.store.defs[n.Owner]
	if d != nil {
		text = d.text
	}
	literal := "an input"
	if n.At.Start >= 0 && n.At.End <= len(text) && n.At.Start < n.At.End {
		literal = text[n.At.Start:n.At.End]
	}
	several := 0
	for _, o := range sources {
		if o.Owner == n.Owner {
			several++
		}
	}
	switch {
	case n.Owner == "":
		return literal
	case several > 1:
		return n.Owner + ": " + literal
	}
	return n.Owner
}
