package repl

import (
	"fmt"
	"io"
	"math"
	"strconv"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// SweepTable is the answer of a sweep: a table, or what was made of it.
type SweepTable struct {
	Table
	Points int
	Holes  int   // points without a value
	Why    error // of the first of them
	hidden bool  // the rows are in a file or a picture
	chart  []string
	files  []Line
}

func (t *SweepTable) lines(style Style) []Line {
	var out []Line
	if !t.hidden {
		out = t.Table.lines(style)
	}
	for _, l := range t.chart {
		out = append(out, Line{l, Plain})
	}
	if len(t.files) > 0 {
		out = append(out, Line{howMany(t.Points, "point"), Plain})
		out = append(out, t.files...)
	}
	if t.hidden {
		out = append(out, warningLines(t.Warnings)...)
	}
	return out
}

// howMany writes "1 point" and "2 points".
func howMany(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return strconv.Itoa(n) + " " + thing + "s"
}

func (s *Session) sweep(j job) ([]Result, error) {
	a := j.do.(*syntax.Sweep)
	if len(a.Axes) > 2 {
		return nil, syntax.Fail(a.Axes[2].NameAt, "a sweep varies one or two names", "fix the others by definitions, or compare cases")
	}
	if err := s.destinations(a.Out, true); err != nil {
		return nil, err
	}
	c := s.checker(j.text, "")
	var vs []varied
	for _, ax := range a.Axes {
		v, err := s.vary(j.ctx, c, ax)
		if err != nil {
			return nil, err
		}
		vs = append(vs, v)
	}
	if len(vs) == 2 && vs[0].name == vs[1].name {
		return nil, syntax.Fail(a.Axes[1].NameAt, vs[1].name+" is varied twice", "vary two names")
	}
	f, err := s.formulas(c, a.Columns)
	if err != nil {
		return nil, err
	}
	p, err := s.compileVaried(f, vs...)
	if err != nil {
		return nil, s.blame(err, c)
	}
	run := &sweeping{session: s, job: j, a: a, c: c, vs: vs, f: f, p: p}
	return run.result()
}

// sweeping is a sweep on its way.
type sweeping struct {
	session *Session
	job     job
	a       *syntax.Sweep
	c       *program.Checker
	vs      []varied
	f       *formulas
	p       *program.Program
	axes    []study.Axis
	sweep   study.Sweep
	out     *SweepTable
	keep    [][]float64 // rows for the reply or a picture, in SI units
}

func (w *sweeping) result() ([]Result, error) {
	for i, ax := range w.a.Axes {
		x, err := w.session.axis(w.job, i, ax, w.vs[i])
		if err != nil {
			return nil, err
		}
		w.axes = append(w.axes, x)
	}
	w.sweep = study.Sweep{Slots: make([]float64, len(w.vs)), Axes: w.axes, Outputs: len(w.f.nodes)}
	if err := w.fits(); err != nil {
		return nil, err
	}
	w.out = &SweepTable{Points: int(w.sweep.Points()), Table: Table{Warnings: w.c.Warnings}}
	w.units()
	if _, picture := w.wants(); picture {
		if err := w.picturable(); err != nil {
			return nil, err
		}
	}
	if err := w.compute(); err != nil {
		return nil, err
	}
	return w.present()
}

// wants says whether the statement names a table file, and a picture.
func (w *sweeping) wants() (table *syntax.String, picture bool) {
	picture = w.a.Out.Plot
	for i, to := range w.a.Out.To {
		if ending(to.Text) == "csv" {
			table = &w.a.Out.To[i]
		} else {
			picture = true
		}
	}
	return table, picture
}

// fits refuses what would be too long a reply or too full a picture.
func (w *sweeping) fits() error {
	table, picture := w.wants()
	n, l := w.sweep.Points(), w.session.limits
	at := w.a.Axes[0].NameAt
	switch {
	case n > float64(l.Points):
		return over(at, "Points", n, l.Points, fmt.Sprintf("this sweep has %s points; the most are %d", units.FormatNumber(n, 4), l.Points), "take larger steps")
	case picture && n > float64(l.Pictured):
		return over(at, "Pictured", n, l.Pictured, fmt.Sprintf("this picture would have %.0f points; the most are %d", n, l.Pictured), "take larger steps, or write a table: to \"sweep.csv\"")
	case table == nil && !picture && n > float64(l.Rows):
		return over(at, "Rows", n, l.Rows, fmt.Sprintf("this table has %.0f rows; a reply holds %d", n, l.Rows), "write it to a file: to \"sweep.csv\" at the end, or take fewer points")
	}
	return nil
}

// units chooses the columns' units from the middle of the ranges.
func (w *sweeping) units() {
	slots := make([]float64, len(w.vs))
	for _, part := range []float64{0.5, 1, 0} {
		for i, v := range w.vs {
			slots[i] = v.from + part*(v.to-v.from)
		}
		out := make([]float64, len(w.f.nodes))
		frame := w.p.NewFrame()
		if w.p.RunAll(frame, slots, out) == nil || part == 0 {
			w.out.Warnings = append(w.out.Warnings, frame.Warnings...) // blocks of lanes keep none
			for k, y := range out {
				w.session.choose(w.f, k, y)
			}
			return
		}
	}
}

func (w *sweeping) columns() []Column {
	var list []Column
	for _, v := range w.vs {
		list = append(list, Column{v.name, stated(v.unit)})
	}
	for k, name := range w.f.names {
		list = append(list, Column{name, stated(*w.f.units[k])})
	}
	return list
}

// unit is the unit of a column, of the varied names first.
func (w *sweeping) unit(k int) units.Unit {
	if k < len(w.vs) {
		return w.vs[k].unit
	}
	return *w.f.units[k-len(w.vs)]
}

func (w *sweeping) compute() error {
	table, picture := w.wants()
	if table == nil {
		return w.run(nil)
	}
	err := w.session.write(*table, func(to io.Writer) error {
		rows := newTableWriter(to, w.columns(), w.unit)
		if err := w.run(rows); err != nil {
			return err
		}
		return rows.flush()
	})
	w.out.hidden = err == nil
	if !picture && w.out.Points > w.session.limits.Rows {
		w.keep = nil
	}
	return err
}

func (w *sweeping) run(to *tableWriter) error {
	_, picture := w.wants()
	kept := w.out.Points <= w.session.limits.Rows || picture
	row := make([]float64, len(w.vs)+len(w.f.nodes))
	err := w.sweep.Run(w.job.ctx, func() study.Block { return w.p.Block() }, func(r study.Row) error {
		copy(row, r.X)
		copy(row[len(r.X):], r.Y)
		if r.Err != nil {
			w.hole(r.X, row[len(r.X):], r.Err)
		}
		if kept {
			w.keep = append(w.keep, append([]float64(nil), row...))
		}
		if r.Index%4096 == 0 && w.session.config.Progress != nil {
			w.session.config.Progress(w.job.ctx, r.Index, w.out.Points, "points")
		}
		if to == nil {
			return nil
		}
		return to.row(row)
	})
	return w.session.blame(err, w.c)
}

// hole keeps of a point the columns that do have a value.
func (w *sweeping) hole(x, y []float64, err error) {
	f := w.p.NewFrame()
	for k := range y {
		if w.p.RunOne(f, x, y, k) != nil {
			y[k] = math.NaN()
		}
	}
	if w.out.Holes++; w.out.Holes == 1 {
		w.out.Why = err
	}
}

// remark tells of the points without a value.
func (w *sweeping) remark() {
	switch n := w.out.Holes; n {
	case 0:
	case 1:
		w.out.Warnings = append(w.out.Warnings, fmt.Sprintf("at 1 point a value is missing: %v", w.out.Why))
	default:
		w.out.Warnings = append(w.out.Warnings, fmt.Sprintf("at %d points a value is missing; the first: %v", n, w.out.Why))
	}
}

func (w *sweeping) present() ([]Result, error) {
	w.remark()
	w.out.Columns = w.columns()
	if w.out.Points <= w.session.limits.Rows {
		for _, row := range w.keep {
			var cells []Cell
			for k, v := range row {
				if math.IsNaN(v) {
					cells = append(cells, word("no value"))
				} else {
					cells = append(cells, number(w.unit(k).From(v)))
				}
			}
			w.out.Rows = append(w.out.Rows, cells)
		}
	}
	if _, picture := w.wants(); picture {
		var err error
		if w.out.chart, err = w.session.draw(w.a.Out, w.picture()); err != nil {
			return nil, err
		}
		w.out.hidden = w.out.hidden || len(w.out.chart) > 0 || len(w.a.Out.To) > 0
	}
	w.out.files = made(w.a.Out)
	return []Result{w.out}, nil
}
