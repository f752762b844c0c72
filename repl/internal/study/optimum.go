package study

import (
	"cmp"
	"context"
	"slices"

	"example.com/dosewright/internal/num"
)

// Boundary says what an optimum stands at.
type Boundary int

// The boundaries.
const (
	Inside     Boundary = iota
	AtFrom              // the range begins there
	AtTo                // the range ends there
	AtNoValues          // the model has no value beyond
)

// Optimum is one of the best places of a range.
type Optimum struct {
	X, To    float64 // To = X, or the far end of a level top, to one step of the survey
	Y        float64
	Boundary Boundary
}

// Optima is what looking for the best place gave.
type Optima struct {
	List    []Optimum // the best first, at most MaxOptima
	Found   int       // local optima altogether
	Failed  int       // points of the survey without a value
	Failure error     // of the first of them
}

// MaxOptima is the largest number of local optima that are reported.
const MaxOptima = 20

// Maximise finds the local maxima of f that the survey of the range resolves, the
// two ends among them. The place of a smooth maximum is right to about 1e-8 of
// its width, since it is flat there. Errors: ErrRange, ErrSize, that of ctx, and
// that of the model when it has no value anywhere.
func Maximise(ctx context.Context, f Eval, r Range) (*Optima, error) {
	return r.optima(ctx, f, 1)
}

// Minimise is Maximise for the least.
func Minimise(ctx context.Context, f Eval, r Range) (*Optima, error) {
	return r.optima(ctx, f, -1)
}

func (r Range) optima(ctx context.Context, f Eval, way float64) (*Optima, error) {
	s, err := r.look(ctx, f, nil)
	if err != nil {
		return nil, err
	}
	o := &Optima{Failed: s.failed, Failure: s.failure}
	for _, all := range s.stretches {
		for _, h := range humps(len(all), func(k int) float64 { return way * all[k].left }) {
			if err := ctx.Err(); err != nil {
				return nil, err
			}
			best := s.top(all, h, way)
			best.Boundary = r.boundary(all, best)
			o.List = append(o.List, best)
		}
	}
	slices.SortStableFunc(o.List, func(a, b Optimum) int { return cmp.Compare(way*b.Y, way*a.Y) })
	o.Found = len(o.List)
	o.List = o.List[:min(MaxOptima, o.Found)]
	return o, nil
}

// top climbs between the neighbours of a run of best points.
func (s *survey) top(all []place, h run, way float64) Optimum {
	best := Optimum{X: all[h.first].x, To: all[h.last].x, Y: all[h.first].left}
	a, b := all[max(0, h.first-1)], all[min(len(all)-1, h.last+1)]
	x, y, err := num.Maximum(s.number(func(p place) float64 { return way * p.left }), a.x, b.x, 1e-12)
	if err == nil && y > way*best.Y {
		return Optimum{X: x, To: x, Y: way * y}
	}
	return best
}

func (r Range) boundary(all []place, o Optimum) Boundary {
	switch {
	case o.X == r.From:
		return AtFrom
	case o.To == r.To:
		return AtTo
	case o.X == all[0].x || o.To == all[len(all)-1].x:
		return AtNoValues
	}
	return Inside
}
