package study

import (
	"context"
	"math"
)

// Range is one slot that runs from one end to the other while the others stand.
type Range struct {
	Slots    []float64 // values of all slots
	Slot     int       // the one that runs
	From, To float64   // in order
	Points   int       // of the first survey, 3 to MaxSurvey; 0 for 500
}

// MaxSurvey is the largest number of points of a survey.
const MaxSurvey = 1_000_000

const (
	surveyPoints = 500
	manyDecades  = 1000 // from this ratio of the ends on, the survey is logarithmic
	halvings     = 100  // of a step, to find where something begins
)

// place is a point of a survey. An optimum has nothing on its right.
type place struct {
	x, left, right float64
}

func (p place) gap() float64 { return p.left - p.right }

// size is what rounding is relative to.
func (p place) size() float64 { return math.Max(math.Abs(p.left), math.Abs(p.right)) }

// survey is what stands of a range: stretches of places, in order, between which
// the model has no value.
type survey struct {
	Range
	at        func(x float64) (place, error)
	stretches [][]place
	failed    int // points of the survey without a value
	failure   error
}

// look visits the points of the range. Points are equally spaced, or have equal
// ratios where the range spans three decades or more.
func (r Range) look(ctx context.Context, left, right Eval) (*survey, error) {
	axis, err := r.axis()
	if err != nil {
		return nil, err
	}
	s := &survey{Range: r, at: r.along(left, right)}
	var stretch []place
	end := func() {
		if len(stretch) > 0 {
			s.stretches = append(s.stretches, stretch)
		}
		stretch = nil
	}
	for i := range axis.n {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		x := axis.At(i)
		p, err := s.at(x)
		switch {
		case err != nil:
			s.failed++
			if s.failure == nil {
				s.failure = err
			}
			if n := len(stretch); n > 0 {
				stretch = s.extend(stretch, stretch[n-1], x)
			}
			end()
			continue
		case len(stretch) == 0 && i > 0:
			stretch = s.extend(stretch, p, axis.At(i-1))
		}
		stretch = append(stretch, p)
	}
	end()
	if len(s.stretches) == 0 {
		return nil, s.failure
	}
	return s, nil
}

// extend adds the last place with a value on the way from good to bad.
func (s *survey) extend(stretch []place, good place, bad float64) []place {
	edge := s.last(good, bad, func(place) bool { return true })
	if edge.x == good.x {
		return stretch
	}
	return append(stretch, edge)
}

// last is the last place on the way from good to bad that has a value and holds,
// by bisection.
func (s *survey) last(good place, bad float64, holds func(place) bool) place {
	for range halvings {
		x := good.x/2 + bad/2
		if x == good.x || x == bad {
			break
		}
		if p, err := s.at(x); err == nil && holds(p) {
			good = p
		} else {
			bad = x
		}
	}
	return good
}

func (r Range) axis() (Axis, error) {
	n := r.Points
	if n == 0 {
		n = surveyPoints
	}
	switch {
	case r.Slot < 0 || r.Slot >= len(r.Slots):
		return Axis{}, refuse(ErrRange, "there is no slot %d", r.Slot)
	case !(r.From < r.To):
		return Axis{}, refuse(ErrRange, "%g and %g are not two ends in order", r.From, r.To)
	case n < 3 || n > MaxSurvey:
		return Axis{}, refuse(ErrSize, "a survey of %d points: it has 3 to %d", n, MaxSurvey)
	case r.From*r.To > 0 && math.Max(r.To/r.From, r.From/r.To) >= manyDecades:
		return Logarithmic(r.Slot, r.From, r.To, n)
	}
	return Spaced(r.Slot, r.From, r.To, n)
}

// along makes a function of the running slot alone.
func (r Range) along(left, right Eval) func(x float64) (place, error) {
	slots := append([]float64(nil), r.Slots...)
	return func(x float64) (p place, err error) {
		slots[r.Slot] = x
		p.x = x
		if p.left, err = left.at(slots); err != nil {
			return p, err
		}
		if right != nil {
			p.right, err = right.at(slots)
		}
		if err == nil && !finite(p.gap()) {
			err = ErrNotFinite
		}
		return p, err
	}
}

// number is the survey's function for a search that wants plain numbers: NaN
// where there is no value, which the search refuses.
func (s *survey) number(of func(place) float64) func(float64) float64 {
	return func(x float64) float64 {
		p, err := s.at(x)
		if err != nil {
			return math.NaN()
		}
		return of(p)
	}
}

// run is a range of indices with one value, both ends counted.
type run struct{ first, last int }

// humps finds the local maxima of y: runs of one value with less on both sides,
// or with an end of y on one.
func humps(n int, y func(int) float64) []run {
	var all []run
	for i := 0; i < n; {
		j := i
		for j+1 < n && y(j+1) == y(i) {
			j++
		}
		if (i == 0 || y(i-1) < y(i)) && (j == n-1 || y(j+1) < y(i)) {
			all = append(all, run{i, j})
		}
		i = j + 1
	}
	return all
}
