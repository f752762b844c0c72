package chart

import (
	"math"

	"example.com/dosewright/repl"
)

// MaxPoints bounds the points of one picture, MaxCurves the curves of one
// chart: more could not be told apart.
const (
	MaxPoints = 1_000_000
	MaxCurves = 12
)

// point is a place in the unit square, (0, 0) where both axes start.
type point struct{ x, y float64 }

// frame is what stands around the drawing.
type frame struct {
	title, xHead, yHead string
	x, y                span
}

// curve is a series in the unit square, cut where it has gaps.
type curve struct {
	name string
	runs [][]point
}

// curvesOf checks the lines of a picture and thins them for a drawing of so
// many columns.
func curvesOf(p *repl.Picture, columns int) (frame, []curve, error) {
	if len(p.Lines) > MaxCurves {
		return frame{}, nil, refuse("a chart shows at most %d curves, not %d: leave some out, or draw a map",
			MaxCurves, len(p.Lines))
	}
	x, y := newReach(p.X), newReach(p.Y)
	for _, s := range p.Lines {
		if err := widen(s, &x, &y); err != nil {
			return frame{}, nil, err
		}
	}
	if x.hi < x.lo {
		return frame{}, nil, refuse("no curve has a finite point")
	}
	f := frame{p.Title, p.X.Head(), p.Y.Head(), x.span(0), y.span(0.04)}
	curves := make([]curve, len(p.Lines))
	total := 0
	for i, s := range p.Lines {
		curves[i] = curve{s.Name, f.runs(s)}
		for j, run := range curves[i].runs {
			curves[i].runs[j] = thin(run, columns)
			total += len(curves[i].runs[j])
		}
	}
	if total > MaxPoints {
		return frame{}, nil, refuse("%d points are left to draw, at most %d can be: sort the curves by %s, or leave some out",
			total, MaxPoints, f.xHead)
	}
	return f, curves, nil
}

// widen checks one series and widens the axes for it.
func widen(s repl.Series, x, y *reach) error {
	if len(s.X) != len(s.Y) {
		return refuse("the curve %q has %d values along the axis and %d across it", s.Name, len(s.X), len(s.Y))
	}
	for i := range s.X {
		if !finite(s.X[i]) || !finite(s.Y[i]) {
			continue
		}
		if err := x.add(s.X[i]); err != nil {
			return err
		}
		if err := y.add(s.Y[i]); err != nil {
			return err
		}
	}
	return nil
}

// runs maps a series to the unit square, a new run after each gap.
func (f frame) runs(s repl.Series) [][]point {
	var runs [][]point
	open := false
	for i := range s.X {
		if !finite(s.X[i]) || !finite(s.Y[i]) {
			open = false
			continue
		}
		if !open {
			runs = append(runs, nil)
			open = true
		}
		last := &runs[len(runs)-1]
		*last = append(*last, point{f.x.at(s.X[i]), f.y.at(s.Y[i])})
	}
	return runs
}

// end is the height at which a curve stops, below all others if it is empty.
func (c curve) end() float64 {
	if len(c.runs) == 0 {
		return math.Inf(-1)
	}
	last := c.runs[len(c.runs)-1]
	return last[len(last)-1].y
}
