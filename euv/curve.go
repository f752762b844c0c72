package euv

import (
	"fmt"
	"math"
	"slices"
	"sort"

	"example.com/dosewright/units"
)

// Measured is a measured table of ys over xs, read between its points along
// straight lines and never outside them. NewMeasured makes one; the zero value
// has no points and refuses every x.
type Measured[X, Y units.Kind] struct {
	xs []X // rising
	ys []Y
}

// NewMeasured checks a table: as many ys as xs, at least two, all finite, xs
// strictly rising or strictly falling. The lists are copied. Errors:
// *ArgumentError.
func NewMeasured[X, Y units.Kind](xs []X, ys []Y) (Measured[X, Y], error) {
	var none Measured[X, Y]
	switch {
	case len(xs) != len(ys):
		return none, outside("number of ys", units.Count(len(ys)), "that of the xs, "+formatRatio(float64(len(xs))))
	case len(xs) < 2:
		return none, outside("number of xs", units.Count(len(xs)), "2 or more")
	}
	m := Measured[X, Y]{slices.Clone(xs), slices.Clone(ys)}
	if xs[0] > xs[1] {
		slices.Reverse(m.xs)
		slices.Reverse(m.ys)
	}
	for i := range m.xs {
		if err := first(finite("xs", m.xs[i]), finite("ys", m.ys[i])); err != nil {
			return none, err
		}
		if i > 0 && m.xs[i-1] >= m.xs[i] {
			return none, outside("xs", m.xs[i], "strictly in order, rising or falling")
		}
	}
	return m, nil
}

// At is y at x. An x outside the table is refused with an *ArgumentError that
// states the range.
func (m Measured[X, Y]) At(x X) (Y, error) {
	n := len(m.xs)
	if n == 0 {
		return 0, outside("number of xs", units.Count(0), "2 or more")
	}
	if !(x >= m.xs[0] && x <= m.xs[n-1]) {
		return 0, outside("x", x, fmt.Sprintf("between %v and %v, where the table ends", units.Of(m.xs[0]), units.Of(m.xs[n-1])))
	}
	i := min(sort.Search(n, func(i int) bool { return m.xs[i] > x }), n-1)
	a, b := float64(m.xs[i-1]), float64(m.xs[i])
	t := (float64(x)/2 - a/2) / (b/2 - a/2) // halves: b − a may be too large
	y := math.FMA(t, float64(m.ys[i]), (1-t)*float64(m.ys[i-1]))
	return answer("curve", Y(y))
}

// Curve is y at x in a measured table, along straight lines between its points.
//
// xs are strictly rising or strictly falling; ys are as many; x lies between
// the smallest and the largest of xs, else it is refused with that range. To
// read one table many times, make a Measured. Errors: *ArgumentError.
func Curve[X, Y units.Kind](xs []X, ys []Y, x X) (Y, error) {
	m, err := NewMeasured(xs, ys)
	if err != nil {
		return 0, err
	}
	return m.At(x)
}
