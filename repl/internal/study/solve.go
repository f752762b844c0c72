package study

import (
	"cmp"
	"context"
	"math"
	"slices"

	"example.com/dosewright/internal/num"
)

// Roots is what solving an equation gave.
type Roots struct {
	List    []Root    // in order
	Jumps   []float64 // where the two sides change places without meeting: jumps and poles
	Failed  int       // points of the survey without a value
	Failure error     // of the first of them

	Start, End, Nearest Root // the first and last place with values, and the one where the sides come nearest
}

// Root is a place and the two sides there.
type Root struct {
	X, To       float64 // To = X, or the far end where a whole interval solves
	Left, Right float64 // at X
	Touching    bool    // the sides touch there without crossing
}

const (
	closeBy    = 1e-12 // of a step: how near to a root the sides are looked at
	meets      = 1e-2  // of their distance one step away: they meet if they are nearer than that close by
	touches    = 1e-10 // the same for sides that touch
	unresolved = 1e-9  // of a step: an interval of solutions shorter than this is a point
	ulps       = 16 * 0x1p-52
)

// Solve finds every root of left = right in the range that the survey resolves:
// crossings, touchings and whole intervals, but not places where a side jumps or
// has a pole. Two roots within one step of the survey may be missed, unless the
// sides turn round between them. Errors: ErrRange, ErrSize, that of ctx, and that
// of the model when it has no value anywhere.
func Solve(ctx context.Context, left, right Eval, r Range) (*Roots, error) {
	s, err := r.look(ctx, left, right)
	if err != nil {
		return nil, err
	}
	f := &solver{survey: s, roots: Roots{Failed: s.failed, Failure: s.failure}}
	first, last := s.stretches[0], s.stretches[len(s.stretches)-1]
	f.roots.Start, f.roots.End = root(first[0]), root(last[len(last)-1])
	f.nearest = first[0]
	for _, stretch := range s.stretches {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		f.stretch(stretch)
	}
	f.roots.Nearest = root(f.nearest)
	slices.SortFunc(f.roots.List, func(a, b Root) int { return cmp.Compare(a.X, b.X) })
	slices.Sort(f.roots.Jumps)
	return &f.roots, nil
}

func root(p place) Root { return Root{X: p.x, To: p.x, Left: p.left, Right: p.right} }

type solver struct {
	*survey
	roots   Roots
	nearest place
}

// note remembers the place where the sides come nearest.
func (f *solver) note(p place) {
	if math.Abs(p.gap()) < math.Abs(f.nearest.gap()) {
		f.nearest = p
	}
}

// stretch looks through places without a gap in between, cut where the sign of
// the difference changes.
func (f *solver) stretch(all []place) {
	for i := 0; i < len(all); {
		j := i
		for j+1 < len(all) && sign(all[j+1]) == sign(all[i]) {
			j++
		}
		switch {
		case sign(all[i]) == 0:
			f.level(all, i, j)
		default:
			f.touching(all, i, j)
		}
		if j+1 < len(all) && sign(all[i])*sign(all[j+1]) < 0 {
			f.crossing(all[j], all[j+1])
		}
		i = j + 1
	}
}

func sign(p place) int { return cmp.Compare(p.gap(), 0) }

// crossing looks for the root between two places of opposite sign, neither 0.
func (f *solver) crossing(a, b place) {
	last := a.x
	gap := f.number(place.gap)
	x, err := num.Root(func(x float64) float64 { last = x; return gap(x) }, a.x, b.x, 0)
	p, failed := f.at(x)
	if err != nil || failed != nil {
		f.roots.Jumps = append(f.roots.Jumps, last)
		return
	}
	f.note(p)
	near := math.Max(closeBy*(b.x-a.x), ulps*math.Abs(x))
	before, here, behind := f.distance(x-near), math.Abs(p.gap()), f.distance(x+near)
	limit := meets * math.Max(math.Abs(a.gap()), math.Abs(b.gap()))
	switch {
	case max(before, here, behind) > limit:
		f.roots.Jumps = append(f.roots.Jumps, x)
	case max(before, here, behind) == 0:
		f.between(a, p, p, b)
	default:
		f.roots.List = append(f.roots.List, root(p))
	}
}

// distance of the sides at x; where there is none, none is held against a root.
func (f *solver) distance(x float64) float64 {
	p, err := f.at(x)
	if err != nil {
		return 0
	}
	return math.Abs(p.gap())
}

// level is a run of survey points that solve exactly.
func (f *solver) level(all []place, i, j int) {
	a, b := all[i], all[j]
	f.note(a)
	f.between(all[max(0, i-1)], a, b, all[min(len(all)-1, j+1)])
}

// between reports the interval of exact solutions that reaches from a or before
// to b or behind; the places outside do not solve, or are a and b themselves.
func (f *solver) between(outside, a, b, beyond place) {
	step := math.Max(b.x-outside.x, beyond.x-a.x)
	first, last := f.border(outside, a), f.border(beyond, b)
	r := root(a)
	if last.x-first.x > unresolved*step {
		r = root(first)
		r.To = last.x
	}
	r.Touching = sign(outside)*sign(beyond) > 0
	f.roots.List = append(f.roots.List, r)
}

// border is the last exact solution on the way from inside to outside.
func (f *solver) border(outside, inside place) place {
	return f.last(inside, outside.x, func(p place) bool { return p.gap() == 0 })
}

// touching looks at the places of one sign from i to j for those where the sides
// come nearest, and there for a root.
func (f *solver) touching(all []place, i, j int) {
	toward := -float64(sign(all[i]))
	same := all[i : j+1]
	for _, h := range humps(len(same), func(k int) float64 { return toward * same[k].gap() }) {
		first, last := i+h.first, i+h.last
		f.note(all[first])
		if first == i && i > 0 || last == j && j < len(all)-1 {
			continue // the way to a crossing
		}
		a, b := all[max(0, first-1)], all[min(len(all)-1, last+1)]
		if a.x < b.x {
			f.turn(a, b, toward)
		}
	}
}

// turn looks at the extremum between a and b, which is toward the other side. At
// an end of the range only rounding is forgiven: a root may lie just outside.
func (f *solver) turn(a, b place, toward float64) {
	x, _, err := num.Maximum(f.number(func(p place) float64 { return toward * p.gap() }), a.x, b.x, 1e-12)
	if err != nil {
		return
	}
	p, err := f.at(x)
	if err != nil {
		return
	}
	f.note(p)
	limit := ulps * p.size()
	if p.x != f.From && p.x != f.To {
		limit = math.Max(limit, touches*math.Max(math.Abs(a.gap()), math.Abs(b.gap())))
	}
	switch {
	case math.Abs(p.gap()) <= limit:
		r := root(p)
		r.Touching = a.x < x && x < b.x
		f.roots.List = append(f.roots.List, r)
	case toward*p.gap() > 0:
		f.crossing(a, p)
		f.crossing(p, b)
	}
}
