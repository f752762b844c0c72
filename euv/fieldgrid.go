package euv

import "math"

// How the best position of a grid over a circle is found without sampling.
//
// The fields that are whole at some position stay whole while all their corners
// stay in the circle: a closed region of positions, an intersection of discs.
// Its topmost point is a vertex, where one corner blocks on the left and one on
// the right: both lie on the circle. So it is enough to look at the positions
// that put two grid corners on the circle, and a mirrored grid counts alike,
// so that one sign of their distance is enough.
//
// The fields that are touched at some position stay so while the corner or the
// side that is nearest to the centre stays inside; for fields that are not
// touched, outside. The regions' vertices then also include positions where a
// grid line touches the circle. A vertex itself has the fewest touched fields;
// a little into the region lies the most.

const (
	closeness = 1e-12 // part of the radius by which a field may stick out
	aside     = 1e-9  // part of the radius, from a vertex into its region
)

type point struct{ x, y float64 }

func (p point) unit() point {
	l := math.Hypot(p.x, p.y)
	return point{p.x / l, p.y / l}
}

// vertex is a position of the grid, given by a grid corner, and the directions
// in which its two obstacles block.
type vertex struct {
	at, left, right point
}

// inside is the position a little away from both obstacles.
func (v vertex) inside(by float64) point {
	l, r := v.left.unit(), v.right.unit()
	d := point{l.x + r.x, l.y + r.y}.unit()
	return point{v.at.x - by*d.x, v.at.y - by*d.y}
}

// fieldGrid is a grid of fields over a circle around the origin.
type fieldGrid struct{ width, height, radius float64 }

// corners yields the positions with two grid corners on the circle, the second
// one a to the right of the first and b above, on the side of the circle that
// lets them be the topmost. Rounding moves a pair that is a diameter by up to
// 1e-8 of the radius along the circle: no harm, for if further corners lie on
// the circle, they make better pairs.
func (g fieldGrid) corners(yield func(vertex)) {
	limit := 4 * g.radius * g.radius * (1 + closeness)
	for a := g.width; a*a <= limit; a += g.width {
		for b := 0.0; a*a+b*b <= limit; b += g.height {
			l := math.Hypot(a, b)
			far := math.Sqrt(max(0, (g.radius-l/2)*(g.radius+l/2)))
			mid := point{-b / l * far, a / l * far}
			p, q := point{mid.x - a/2, mid.y - b/2}, point{mid.x + a/2, mid.y + b/2}
			if q.x >= -closeness*g.radius {
				yield(vertex{p, p, q})
			}
		}
	}
}

// vertices yields the positions of corners, and those with a grid line along
// the circle's top or right side besides a corner on the circle, or both.
func (g fieldGrid) vertices(yield func(vertex)) {
	g.corners(yield)
	r := g.radius
	up, right := point{0, 1}, point{1, 0}
	for y := r; y >= -r; y -= g.height {
		p := point{math.Sqrt((r - y) * (r + y)), y}
		yield(vertex{p, p, up})
	}
	for x := r; x >= -r; x -= g.width {
		p := point{x, math.Sqrt((r - x) * (r + x))}
		yield(vertex{p, p, right})
	}
	yield(vertex{point{r, r}, up, right})
}

// complete counts the fields that lie whole in the circle when a grid corner
// lies at p. In a column they reach as far as the side that is further out.
func (g fieldGrid) complete(p point) int {
	r := g.radius * (1 + closeness)
	left := p.x - math.Floor((p.x+r)/g.width)*g.width
	perRow := 1 / g.height
	down := p.y*perRow - math.Floor(p.y*perRow) // 0 to 1, so that a conversion to int rounds down
	n := 0
	for x := left; x+g.width <= r; x += g.width {
		far := x + g.width
		if far < -x {
			far = -x
		}
		half := math.Sqrt((r-far)*(r+far)) * perRow
		if rows := int(half-down+1) - 1 + int(half+down); rows > 0 {
			n += rows
		}
	}
	return n
}

// touched counts the fields of which a part lies in the circle of radius r when
// a grid corner lies at p. In a column they reach as far as the side that is
// further in.
func (g fieldGrid) touched(p point, r float64) int {
	left := p.x - math.Ceil((p.x+r)/g.width)*g.width
	perRow := 1 / g.height
	up := p.y*perRow - math.Floor(p.y*perRow)
	top := int(r*perRow) + 2 // less what a conversion to int rounds down is rounded up
	over, under := float64(top)+up, float64(top)-up
	n := 0
	for x := left; x < r; x += g.width {
		near := x
		if near < 0 {
			near = max(0, -x-g.width)
		}
		if near < r {
			half := math.Sqrt((r-near)*(r+near)) * perRow
			n += 2*top - int(over-half) - int(under-half)
		}
	}
	return n
}
