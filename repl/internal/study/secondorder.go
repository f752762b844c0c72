package study

import (
	"context"
	"math"
)

// SecondOrder estimates what a first-order budget leaves out, from the second
// and third derivatives (JCGM 100:2008, 5.1.2 note), taken as if the inputs were
// normal.
type SecondOrder struct {
	U       float64 // combined standard uncertainty with these terms
	Shift   float64 // mean of the output less its value at the estimates
	Matters bool    // U or the mean moves by more than 5 % of U: propagate the distributions
	Unknown bool    // the model has no value one standard uncertainty away, or has more inputs than 64
}

const (
	matters       = 0.05 // moves the second of two printed digits
	mostDirection = 64   // pairs of directions cost four runs each
)

// direction is one of the independent, equally uncertain directions in which the
// inputs vary: a step for each of some slots.
type direction struct {
	slots []int
	steps []float64

	plus, minus         float64 // f one step ahead and one step back
	first, twice, third float64 // derivatives along the direction, per step
}

// directions of the sources: each input alone, or for a correlated group the
// columns of its Cholesky root.
func (s *Sources) directions() []*direction {
	var all []*direction
	for _, g := range s.groups {
		for k, slot := range g.slots {
			if g.root == nil {
				all = append(all, &direction{slots: g.slots, steps: []float64{s.inputs[slot].U}})
				continue
			}
			d := &direction{slots: g.slots[k:]}
			for i, slot := range d.slots {
				d.steps = append(d.steps, g.root[k+i][k]*s.inputs[slot].U)
			}
			if g.root[k][k] > 0 {
				all = append(all, d)
			}
		}
	}
	return all
}

func (f Eval) secondOrder(ctx context.Context, s *Sources, b *Budget, noise float64) (SecondOrder, error) {
	w := wander{f: f, base: s.Values(), at: s.Values(), mid: b.Value}
	directions := s.directions()
	if len(directions) > mostDirection {
		return SecondOrder{U: b.U, Unknown: true}, nil
	}
	var square, shift float64
	for k, d := range directions {
		if err := ctx.Err(); err != nil {
			return SecondOrder{}, err
		}
		w.differentiate(d)
		shift += d.twice / 2
		square += d.first*d.first + d.twice*d.twice/2 + d.first*d.third
		for _, e := range directions[:k] {
			square += w.pair(d, e)
		}
	}
	if w.failed || !finite(square) || !finite(shift) {
		return SecondOrder{U: b.U, Unknown: true}, nil
	}
	r := SecondOrder{U: math.Sqrt(math.Max(0, square)), Shift: shift}
	change := math.Max(math.Abs(r.U-b.U), math.Abs(r.Shift))
	r.Matters = change > matters*math.Max(r.U, b.U) && change > aboveSecond*noise
	return r, nil
}

// wander runs f some steps away from the estimates.
type wander struct {
	f        Eval
	base, at []float64
	mid      float64 // f at base
	failed   bool    // f has no value at one of the places
}

// step runs f a times d and b times e away; e may be nil.
func (w *wander) step(d *direction, a float64, e *direction, b float64) float64 {
	if w.failed {
		return 0
	}
	copy(w.at, w.base)
	for i, slot := range d.slots {
		w.at[slot] += a * d.steps[i]
	}
	if e != nil {
		for i, slot := range e.slots {
			w.at[slot] += b * e.steps[i]
		}
	}
	y, err := w.f.at(w.at)
	w.failed = err != nil
	return y
}

// differentiate finds the derivatives along d from the points at ±1 and ±½ steps.
func (w *wander) differentiate(d *direction) {
	d.plus, d.minus = w.step(d, 1, nil, 0), w.step(d, -1, nil, 0)
	ahead, behind := w.step(d, 0.5, nil, 0), w.step(d, -0.5, nil, 0)
	d.first = (8*(ahead-behind) - (d.plus - d.minus)) / 6
	d.twice = (16*(ahead-w.mid) + 16*(behind-w.mid) - (d.plus - w.mid) - (d.minus - w.mid)) / 3
	d.third = 4 * ((d.plus - d.minus) - 2*(ahead-behind))
}

// pair is what the mixed derivatives of two directions add to the variance.
func (w *wander) pair(d, e *direction) float64 {
	pp, pm := w.step(d, 1, e, 1), w.step(d, 1, e, -1)
	mp, mm := w.step(d, -1, e, 1), w.step(d, -1, e, -1)
	mixed := ((pp - pm) - (mp - mm)) / 4
	dee := ((pp - d.plus) + (pm - d.plus) - (mp - d.minus) - (mm - d.minus)) / 2
	edd := ((pp - e.plus) + (mp - e.plus) - (pm - e.minus) - (mm - e.minus)) / 2
	return mixed*mixed + d.first*dee + e.first*edd
}
