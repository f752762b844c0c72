package repl

import (
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// FitResult is what a fit found; the names are now inputs with these values.
type FitResult struct {
	Found       []*Value
	Names       []string
	Correlation [][]float64
	Residual    *Value // standard deviation of the residuals
	DoF         int
	Rows        int
	Warnings    []string
}

func (f *FitResult) table() *Table {
	t := &Table{Columns: []Column{{"name", ""}, {"value", ""}, {"u", ""}, {"unit", ""}}, Warnings: f.Warnings}
	for _, n := range f.Names {
		t.Columns = append(t.Columns, Column{"r with " + n, ""})
	}
	for i, v := range f.Found {
		row := []Cell{word(f.Names[i]), number(v.Number()), number(v.Unit.FromDifference(v.U)), word(v.Unit.String())}
		for k := range f.Names {
			if f.Correlation == nil {
				row = append(row, word(""))
			} else {
				row = append(row, number(f.Correlation[i][k]))
			}
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

func (f *FitResult) lines(style Style) []Line {
	out := f.table().lines(style)
	said := howMany(f.Rows, "row")
	switch f.DoF {
	case 0:
		said += ", none to spare: no uncertainty can be told"
	case 1:
		said += ", 1 degree of freedom"
	default:
		said += fmt.Sprintf(", %d degrees of freedom", f.DoF)
	}
	if f.DoF > 0 {
		said += ", residual standard deviation " + f.Residual.Text(style.Digits)
	}
	return append(out, Line{said, Plain})
}

func (f *FitResult) record() Record {
	t := f.table()
	return Record{Kind: TableRecord, Columns: t.Columns, Rows: t.Rows, Warnings: t.Warnings}
}

func (s *Session) fit(j job) ([]Result, error) {
	a := j.do.(*syntax.Fit)
	columns := s.tables[a.Data.Name]
	if columns == nil {
		return nil, syntax.Fail(a.Data.Where, a.Data.Name+" is no table of data", "read one first: data "+a.Data.Name+" = \"file.csv\"")
	}
	c := s.checker(j.text, "")
	w := &fitting{session: s, job: j, a: a, c: c}
	if err := w.parameters(); err != nil {
		return nil, err
	}
	w.columns(columns)
	if n := len(a.Names); w.rows < n {
		return nil, syntax.Fail(a.Names[0].Where.Join(a.Names[n-1].Where), howMany(w.rows, "row")+" cannot tell "+howMany(n, "name"), "fit fewer names, or give more rows")
	}
	f, err := s.formulas(c, []syntax.Column{{X: a.X}, {X: a.Y}})
	if err == nil {
		err = c.Comparable(a.X, a.Y)
	}
	if err != nil {
		return nil, err
	}
	if err := w.takes(columns); err != nil {
		return nil, err
	}
	if err := w.solve(f); err != nil {
		return nil, err
	}
	return w.result(f)
}

// fitting is a fit on its way.
type fitting struct {
	session *Session
	job     job
	a       *syntax.Fit
	c       *program.Checker
	names   []string // of all inputs: parameters, then columns in both spellings
	start   []float64
	lists   []study.Column
	rows    int
	fit     *study.Fit
}

// parameters finds the names to be found; their values are where to start.
func (w *fitting) parameters() error {
	for i, n := range w.a.Names {
		d := w.session.store.defs[n.Name]
		if d == nil || d.node == nil || d.node.Type.Kind != program.Number {
			return syntax.Fail(n.Where, n.Name+" has no value to start from", "define it first, near the value that is expected: "+n.Name+" = …")
		}
		for _, before := range w.a.Names[:i] {
			if before.Name == n.Name {
				return syntax.Fail(n.Where, n.Name+" stands twice", "name each once")
			}
		}
		v, err := w.session.valueOf(d)
		if err != nil {
			return err
		}
		w.names, w.start = append(w.names, n.Name), append(w.start, v)
	}
	return nil
}

// columns makes each column a local name, as NAME.column and, where that has
// no other meaning, as column.
func (w *fitting) columns(columns []string) {
	for _, col := range columns {
		d := w.session.store.defs[w.a.Data.Name+"."+col]
		if d == nil {
			continue
		}
		var values []float64
		for _, n := range program.Items(d.node, nil) {
			v, _ := n.Constant()
			values = append(values, v)
		}
		w.rows = len(values)
		for _, name := range []string{d.name, col} {
			if name == col && w.session.store.defs[col] != nil {
				continue
			}
			w.c.Local(name, program.Item(d.node))
			w.lists = append(w.lists, study.Column{Slot: len(w.names), Values: values})
			w.names, w.start = append(w.names, name), append(w.start, 0)
		}
	}
}

// takes refuses an equation without a column of the table, and warns of a column
// that a name of the session hides.
func (w *fitting) takes(columns []string) error {
	data, found := w.a.Data.Name, false
	for _, x := range []syntax.Expr{w.a.X, w.a.Y} {
		syntax.Each(x, func(x syntax.Expr) {
			n, ok := x.(*syntax.Name)
			if !ok {
				return
			}
			column, long := strings.CutPrefix(n.Name, data+".")
			hidden := !long && w.session.store.defs[n.Name] != nil
			switch {
			case !slices.Contains(columns, column):
			case !hidden:
				found = true
			case !slices.Contains(w.names[:len(w.a.Names)], n.Name):
				note := n.Name + " is the name of the session here; the column is " + data + "." + n.Name
				if !slices.Contains(w.c.Warnings, note) {
					w.c.Warnings = append(w.c.Warnings, note)
				}
			}
		})
	}
	if !found {
		at := w.a.X.Span().Join(w.a.Y.Span())
		return syntax.Fail(at, "no column of "+data+" stands in this equation", "its columns are "+data+"."+strings.Join(columns, ", "+data+"."))
	}
	return nil
}

func (w *fitting) solve(f *formulas) error {
	p, err := program.CompileAll(f.nodes, w.session.opened(w.names, false), program.Opening{Inputs: w.names})
	if err != nil {
		return w.session.blame(err, w.c)
	}
	problem := &study.Fitting{Slots: w.start, Columns: w.lists}
	for i := range w.a.Names {
		problem.Parameters = append(problem.Parameters, i)
	}
	w.fit, err = problem.Run(w.job.ctx, func() study.Block { return p.Block() })
	if err == nil {
		return nil
	}
	var run *program.RunError
	if errors.As(err, &run) {
		return w.session.blame(err, w.c)
	}
	at := w.a.Names[0].Where.Join(w.a.Names[len(w.a.Names)-1].Where)
	return &syntax.Error{Marks: []syntax.Span{at}, Msg: w.named(err), Hint: "nothing has changed; start nearer, fit fewer names, or give more rows", Cause: err}
}

// named puts the names in the place of the numbers that the fit knows.
func (w *fitting) named(err error) string {
	text := err.Error()
	for i := len(w.a.Names) - 1; i >= 0; i-- {
		text = strings.ReplaceAll(text, "parameter "+strconv.Itoa(i), w.a.Names[i].Name)
	}
	return text
}

// result makes the names inputs with what was found.
func (w *fitting) result(f *formulas) ([]Result, error) {
	s := w.session
	out := &FitResult{DoF: w.fit.DoF, Correlation: w.fit.Correlation, Rows: w.rows, Warnings: w.c.Warnings}
	before := s.snapshot()
	for i, n := range w.a.Names {
		d := s.store.defs[n.Name]
		v := s.value(w.fit.Values[i], d.node.Type, s.written(d), nil)
		if w.fit.U != nil {
			v.U, v.Uncertain, v.DoF = w.fit.U[i], true, float64(w.fit.DoF)
		}
		out.Names, out.Found = append(out.Names, n.Name), append(out.Found, v)
		if err := s.become(w.job, n, d, v); err != nil {
			s.restore(before)
			return nil, err
		}
	}
	s.correlate(w.a.Names, w.fit.Correlation)
	out.Residual = s.value(w.fit.Residual, program.Type{Dim: f.types[0].Dim}, nil, nil)
	return []Result{out}, nil
}

// become replaces a definition by a literal with the value that was found.
func (s *Session) become(j job, n syntax.Name, d *definition, v *Value) error {
	bracket := ""
	if written := s.written(d); written != nil && !written.IsOne() {
		bracket = " [" + written.String() + "]"
	}
	unit := v.Unit
	text := n.Name + bracket + " = " + literalOf(v, unit) + "  # found by: " + statementWithoutNote(j.text)
	st, bad := syntax.Parse(text)
	if bad != nil {
		return bad
	}
	fresh := s.newDefinition(n.Name, job{ctx: j.ctx, text: text, note: st.Note, do: st.Do})
	if err := s.checked(fresh); err != nil {
		return err
	}
	return s.install(fresh, n.Where)
}

// written is the unit in which a definition states its value: that of its
// bracket, else that of the literal it is; nil for formulas.
func (s *Session) written(d *definition) *units.Unit {
	if d.unit != nil {
		return d.unit
	}
	def, ok := d.action.(*syntax.Define)
	if !ok {
		return nil
	}
	x := def.X
	for {
		switch inner := x.(type) {
		case *syntax.At:
			x = inner.X
			continue
		case *syntax.Unary:
			x = inner.X
			continue
		case *syntax.Literal:
			if u, err := s.sys.Parse(inner.Unit); err == nil && !u.Point() {
				return &u
			}
		}
		return nil
	}
}

// literalOf writes a value in full, as the language reads it; a minus stands
// before the parentheses of (x ± u).
func literalOf(v *Value, unit units.Unit) string {
	text := unit.Digits(v.SI)
	if v.Uncertain {
		number, negative := strings.CutPrefix(text, "-")
		text = "(" + number + " ± " + unit.Interval().Digits(v.U) + ")"
		if negative {
			text = "-" + text
		}
	}
	if !unit.IsOne() {
		text += " " + unit.String()
	}
	if v.Uncertain && v.DoF > 0 {
		text += " (nu=" + strconv.FormatFloat(v.DoF, 'g', -1, 64) + ")"
	}
	if v.Plane != "" {
		text += " at " + v.Plane
	}
	return text
}

// correlate puts the correlations that a fit found, nil for none, in the place of
// all that its names had before.
func (s *Session) correlate(names []syntax.Name, r [][]float64) {
	for _, n := range names {
		s.part(n.Name)
	}
	for i := range r {
		for k := range i {
			s.pairings = append(s.pairings, pairing{names[k].Name, names[i].Name, r[k][i]})
		}
	}
}
