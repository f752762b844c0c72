package chart

import (
	"math"

	"example.com/dosewright/repl"
)

// bars is a histogram over the unit square, with the coverage interval.
type bars struct {
	edges, height []float64
	low, high     float64 // places of the limits
	marked        bool    // whether there are limits
	limits        string  // the limits in words
}

// barsOf checks the bars of a picture. Limits are marked if Low < High.
func barsOf(p *repl.Picture) (frame, *bars, error) {
	b := p.Bars
	switch n := len(b.Density); {
	case n == 0 || len(b.Edges) != n+1:
		return frame{}, nil, refuse("a histogram of %d bars has %d edges", n, len(b.Edges))
	case n > MaxPoints:
		return frame{}, nil, refuse("a histogram of %d bars is too large: at most %d", n, MaxPoints)
	case p.Y.Log:
		return frame{}, nil, refuse("bars stand on zero, which the logarithmic axis %q cannot show", p.Y.Head())
	}
	x, y, err := barReach(p)
	if err != nil {
		return frame{}, nil, err
	}
	out := &bars{low: math.NaN(), high: math.NaN()}
	if out.marked = finite(b.Low) && finite(b.High) && b.Low < b.High; out.marked {
		for _, v := range []float64{b.Low, b.High} {
			if err := x.add(v); err != nil {
				return frame{}, nil, err
			}
		}
		out.limits = limits(b.Low, b.High)
	}
	f := frame{p.Title, p.X.Head(), p.Y.Head(), x.span(0), span{hi: 1}}
	if y.hi >= 1/largest {
		f.y.hi = y.hi * 1.15 // room for the mark of the interval
	}
	out.edges, out.height = places(f.x, b.Edges), places(f.y, b.Density)
	if out.marked {
		out.low, out.high = f.x.at(b.Low), f.x.at(b.High)
	}
	return f, out, nil
}

func barReach(p *repl.Picture) (x, y reach, err error) {
	x, y = newReach(p.X), newReach(p.Y)
	for i, e := range p.Bars.Edges {
		if !finite(e) || i > 0 && e <= p.Bars.Edges[i-1] {
			return x, y, refuse("edge %d of the histogram is %.5g: edges must rise", i+1, e)
		}
		if err := x.add(e); err != nil {
			return x, y, err
		}
	}
	for i, d := range p.Bars.Density {
		if !finite(d) || d < 0 {
			return x, y, refuse("the height of bar %d is %.5g: it cannot be below zero, nor unbounded", i+1, d)
		}
		if err := y.add(d); err != nil {
			return x, y, err
		}
	}
	return x, y, nil
}

// limits writes an interval to three digits of its width: 12.31 to 14.02.
func limits(low, high float64) string {
	size := math.Max(math.Abs(low), math.Abs(high))
	last := max(tenOf(high-low)-2, tenOf(size)-12)
	return figure(low, size, last) + " to " + figure(high, size, last)
}

// outline is the staircase of the bars between two places, from the base and
// back to it; nil if there is none.
func (b *bars) outline(from, to float64) []point {
	var out []point
	for i, h := range b.height {
		left, right := math.Max(b.edges[i], from), math.Min(b.edges[i+1], to)
		if left >= right {
			continue
		}
		if out == nil {
			out = append(out, point{left, 0})
		}
		out = append(out, point{left, h}, point{right, h})
	}
	if out == nil {
		return nil
	}
	return append(out, point{out[len(out)-1].x, 0})
}
