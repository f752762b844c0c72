package repl

import (
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// picturable refuses columns that make no picture together.
func (w *sweeping) picturable() error {
	if len(w.vs) == 2 && len(w.f.nodes) > 1 {
		return syntax.Fail(w.a.Columns[1].X.Span(), "a map shows one value over two names", "leave one expression, or vary one name")
	}
	first := *w.f.units[0]
	for k, u := range w.f.units {
		if u.String() != first.String() {
			return syntax.Fail(w.a.Columns[k].X.Span(), w.f.names[k]+" is "+statedIn(*u)+", the curves before it are "+statedIn(first),
				"curves of one picture share a unit: state them alike, or draw two pictures")
		}
	}
	return nil
}

func statedIn(u units.Unit) string {
	if u.IsOne() {
		return "a pure number"
	}
	return "stated in " + u.String()
}

// picture draws one axis as curves and two as a map.
func (w *sweeping) picture() *Picture {
	cols := w.columns()
	p := &Picture{X: Axis{Name: cols[0].Name, Unit: cols[0].Unit, Log: w.a.Axes[0].Log}}
	if len(w.vs) == 2 {
		p.Y = Axis{Name: cols[1].Name, Unit: cols[1].Unit, Log: w.a.Axes[1].Log}
		p.Grid = w.grid(cols[2].head())
		return p
	}
	p.Y = Axis{Name: cols[1].Name, Unit: cols[1].Unit}
	for k, name := range w.f.names {
		s := Series{Name: name}
		for _, row := range w.keep {
			s.X = append(s.X, w.unit(0).From(row[0]))
			s.Y = append(s.Y, w.unit(1+k).From(row[1+k]))
		}
		p.Lines = append(p.Lines, s)
	}
	if len(p.Lines) > 1 {
		p.Y.Name = "value"
	}
	return p
}

// grid lays the rows out; the second name varies fastest.
func (w *sweeping) grid(head string) *Grid {
	g := &Grid{Head: head}
	nx, ny := w.axes[0].Len(), w.axes[1].Len()
	for i := range nx {
		g.X = append(g.X, w.unit(0).From(w.axes[0].At(i)))
	}
	for k := range ny {
		g.Y = append(g.Y, w.unit(1).From(w.axes[1].At(k)))
		row := make([]float64, nx)
		for i := range nx {
			row[i] = w.unit(2).From(w.keep[i*ny+k][2])
		}
		g.Z = append(g.Z, row)
	}
	return g
}
