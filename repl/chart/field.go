package chart

import (
	"math"
	"slices"
	"sort"

	"example.com/dosewright/repl"
)

// field is a grid over the unit square: z[j][i] at (xs[i], ys[j]), both
// ascending from 0 to 1; a NaN is blank.
type field struct {
	xs, ys []float64
	z      [][]float64
	head   string
	span   span
}

// fieldOf checks the grid of a picture.
func fieldOf(p *repl.Picture) (frame, *field, error) {
	g := p.Grid
	if len(g.X) < 2 || len(g.Y) < 2 {
		return frame{}, nil, refuse("a map needs two columns and two rows at least, not %d and %d", len(g.X), len(g.Y))
	}
	if n := len(g.X) * len(g.Y); n > MaxPoints || len(g.X) > MaxPoints {
		return frame{}, nil, refuse("a map of %d by %d values is too large: at most %d in all", len(g.X), len(g.Y), MaxPoints)
	}
	x, err := spanOfGrid(p.X, g.X)
	if err != nil {
		return frame{}, nil, err
	}
	y, err := spanOfGrid(p.Y, g.Y)
	if err != nil {
		return frame{}, nil, err
	}
	f := &field{z: make([][]float64, len(g.Y)), head: g.Head}
	if err := f.fill(g); err != nil {
		return frame{}, nil, err
	}
	f.xs, f.ys = places(x, g.X), places(y, g.Y)
	f.straighten()
	return frame{p.Title, p.X.Head(), p.Y.Head(), x, y}, f, nil
}

func spanOfGrid(axis repl.Axis, values []float64) (span, error) {
	r := newReach(axis)
	for i, v := range values {
		if !finite(v) {
			return span{}, refuse("the axis %q of a map holds %g", axis.Head(), v)
		}
		if i > 1 && (v > values[i-1]) != (values[1] > values[0]) || i > 0 && v == values[i-1] {
			return span{}, refuse("the axis %q of a map turns at %.5g: its values must rise or fall throughout", axis.Head(), v)
		}
		if err := r.add(v); err != nil {
			return span{}, err
		}
	}
	if s := r.span(0); s.at(r.hi)-s.at(r.lo) > 0.999 {
		return s, nil
	}
	return span{}, refuse("the values of the axis %q lie too close together", axis.Head())
}

func places(s span, values []float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = s.at(v)
	}
	return out
}

// fill copies the values, blanks for those that are not finite.
func (f *field) fill(g *repl.Grid) error {
	if len(g.Z) != len(g.Y) {
		return refuse("a map of %d rows has %d rows of values", len(g.Y), len(g.Z))
	}
	r := newReach(repl.Axis{Name: g.Head})
	for j, row := range g.Z {
		if len(row) != len(g.X) {
			return refuse("row %d of a map has %d values instead of %d", j+1, len(row), len(g.X))
		}
		f.z[j] = slices.Clone(row)
		for i, v := range row {
			if !finite(v) {
				f.z[j][i] = math.NaN()
			} else if err := r.add(v); err != nil {
				return err
			}
		}
	}
	if r.hi < r.lo {
		return refuse("no place of the map has a value")
	}
	f.span = r.span(0)
	return nil
}

// straighten turns falling axes round.
func (f *field) straighten() {
	if f.xs[0] > f.xs[1] {
		slices.Reverse(f.xs)
		for _, row := range f.z {
			slices.Reverse(row)
		}
	}
	if f.ys[0] > f.ys[1] {
		slices.Reverse(f.ys)
		slices.Reverse(f.z)
	}
}

// spot is a place along an axis: a part of the way from one value to the next.
type spot struct {
	cell int
	part float64
}

// spots are the middles of n equal parts of an axis.
func spots(axis []float64, n int) []spot {
	out := make([]spot, n)
	for k := range out {
		u := (float64(k) + 0.5) / float64(n)
		i := min(max(sort.SearchFloat64s(axis, u)-1, 0), len(axis)-2)
		out[k] = spot{i, (u - axis[i]) / (axis[i+1] - axis[i])}
	}
	return out
}

// value is z between four places of the grid. Where some of the four are
// blank, the others share their weight, so that the tone runs on without a
// step; nearest to a blank place there is no value.
func (f *field) value(x, y spot) float64 {
	i, j, s, t := x.cell, y.cell, x.part, y.part
	if math.IsNaN(f.z[j+int(t+0.5)][i+int(s+0.5)]) {
		return math.NaN()
	}
	corners := [...]struct{ z, weight float64 }{
		{f.z[j][i], (1 - s) * (1 - t)},
		{f.z[j][i+1], s * (1 - t)},
		{f.z[j+1][i], (1 - s) * t},
		{f.z[j+1][i+1], s * t},
	}
	sum, whole := 0.0, 0.0
	low, high := math.Inf(1), math.Inf(-1)
	for _, c := range corners {
		if !math.IsNaN(c.z) {
			sum += c.weight * c.z
			whole += c.weight
			low, high = math.Min(low, c.z), math.Max(high, c.z)
		}
	}
	// The nearest place has a quarter of the weight at least. Rounding must
	// not lead out of the corners, or a flat map would be mottled.
	return math.Min(math.Max(sum/whole, low), high)
}
