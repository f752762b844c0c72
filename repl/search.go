package repl

import (
	"fmt"
	"math"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
)

// Found is the answer of solve, maximise and minimise: a table of places, with
// remarks behind it.
type Found struct {
	Table
	Remarks []string
}

func (f *Found) lines(style Style) []Line {
	var out []Line
	if len(f.Rows) > 0 {
		out = f.Table.lines(style)
	}
	for _, r := range f.Remarks {
		out = append(out, Line{r, Plain})
	}
	if len(f.Rows) == 0 {
		out = append(out, warningLines(f.Warnings)...)
	}
	return out
}

func (s *Session) search(j job) ([]Result, error) {
	a := j.do.(*syntax.Search)
	c := s.checker(j.text, "")
	v, err := s.vary(j.ctx, c, a.Axis)
	if err != nil {
		return nil, err
	}
	if v.from > v.to {
		v.from, v.to = v.to, v.from
	}
	columns := []syntax.Column{{X: a.X}}
	if a.Y != nil {
		columns = append(columns, syntax.Column{X: a.Y})
	}
	f, err := s.formulas(c, columns)
	if err != nil {
		return nil, err
	}
	if a.Y != nil {
		if err := c.Comparable(a.X, a.Y); err != nil {
			return nil, err
		}
	}
	p, err := s.compileVaried(f, v)
	if err != nil {
		return nil, s.blame(err, c)
	}
	h := &hunt{session: s, job: j, c: c, v: v, f: f, evals: evals(p), r: study.Range{Slots: make([]float64, 1), From: v.from, To: v.to}}
	if a.Y != nil {
		return h.solve()
	}
	return h.optimum(a.Word)
}

// hunt is a search on its way.
type hunt struct {
	session *Session
	job     job
	c       *program.Checker
	v       varied
	f       *formulas
	evals   []study.Eval
	r       study.Range
}

func (h *hunt) place(x float64) string {
	return h.session.sys.TextIn(x, h.v.unit, h.session.digits)
}

// text writes the value of formula k.
func (h *hunt) text(k int, y float64) string {
	return h.session.sys.TextIn(y, h.session.choose(h.f, k, y), h.session.digits)
}

func (h *hunt) solve() ([]Result, error) {
	r, err := study.Solve(h.job.ctx, h.evals[0], h.evals[1], h.r)
	if err != nil {
		return nil, h.session.blame(err, h.c)
	}
	out := &Found{Table: Table{Warnings: h.c.Warnings}}
	typical := r.Nearest
	if len(r.List) > 0 {
		typical = r.List[0]
	}
	left := h.session.choose(h.f, 0, typical.Left)
	right := h.session.choose(h.f, 1, typical.Right)
	a := h.job.do.(*syntax.Search)
	out.Columns = []Column{{h.v.name, stated(h.v.unit)}, {side(a.X, h.f.names[0]), stated(left)}, {side(a.Y, h.f.names[1]), stated(right)}}
	for _, root := range r.List {
		out.Rows = append(out.Rows, []Cell{number(h.v.unit.From(root.X)), number(left.From(root.Left)), number(right.From(root.Right))})
		switch {
		case root.To != root.X:
			out.Remarks = append(out.Remarks, fmt.Sprintf("every %s from %s to %s solves it", h.v.name, h.place(root.X), h.place(root.To)))
		case root.Touching:
			out.Remarks = append(out.Remarks, "at "+h.place(root.X)+" the sides touch and do not cross")
		}
	}
	if len(r.List) == 0 {
		out.Remarks = append(out.Remarks, h.noRoot(r)...)
	}
	for _, x := range r.Jumps {
		if math.Abs(x) < 1e-15*math.Max(math.Abs(h.v.from), math.Abs(h.v.to)) {
			x = 0 // found to rounding only
		}
		out.Remarks = append(out.Remarks, "at "+h.place(x)+" the sides change places without meeting: a jump or a pole, no root")
	}
	if r.Failed > 0 {
		out.Remarks = append(out.Remarks, fmt.Sprintf("parts of the range have no value: %v", r.Failure))
	}
	return []Result{out}, nil
}

// side is the head of one side of an equation: what is written there, or for a
// number alone that it is wanted.
func side(x syntax.Expr, said string) string {
	if bare(x) {
		return "wanted"
	}
	return said
}

// noRoot says what the sides are at the ends and where they come nearest.
func (h *hunt) noRoot(r *study.Roots) []string {
	at := func(p study.Root) string {
		return fmt.Sprintf("at %s: %s against %s", h.place(p.X), h.text(0, p.Left), h.text(1, p.Right))
	}
	return []string{
		fmt.Sprintf("no %s from %s to %s solves it", h.v.name, h.place(h.v.from), h.place(h.v.to)),
		at(r.Start), at(r.End), "nearest " + at(r.Nearest),
	}
}

func (h *hunt) optimum(which string) ([]Result, error) {
	find := study.Maximise
	if which == "minimise" {
		find = study.Minimise
	}
	o, err := find(h.job.ctx, h.evals[0], h.r)
	if err != nil {
		return nil, h.session.blame(err, h.c)
	}
	unit := h.session.choose(h.f, 0, o.List[0].Y)
	out := &Found{Table: Table{Columns: []Column{{h.v.name, stated(h.v.unit)}, {h.f.names[0], stated(unit)}, {"where", ""}}, Warnings: h.c.Warnings}}
	for _, p := range o.List {
		out.Rows = append(out.Rows, []Cell{number(h.v.unit.From(p.X)), number(unit.From(p.Y)), word(whereabouts(p.Boundary))})
		if p.To != p.X {
			out.Remarks = append(out.Remarks, fmt.Sprintf("the same from %s to %s", h.place(p.X), h.place(p.To)))
		}
	}
	if n := o.Found - len(o.List); n > 0 {
		out.Remarks = append(out.Remarks, fmt.Sprintf("%d more local ones are left out", n))
	}
	if o.Failed > 0 {
		out.Remarks = append(out.Remarks, fmt.Sprintf("parts of the range have no value: %v", o.Failure))
	}
	return []Result{out}, nil
}

// whereabouts says where in the range an optimum lies.
func whereabouts(b study.Boundary) string {
	switch b {
	case study.AtFrom:
		return "at the lower end of the range"
	case study.AtTo:
		return "at the upper end of the range"
	case study.AtNoValues:
		return "where values end"
	}
	return "inside"
}
