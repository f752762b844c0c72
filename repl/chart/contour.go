package chart

import "math"

// contourCells bounds the cells along each side of a map that contours are
// drawn for. A finer grid is thinned: the lines would be closer than the ink.
const contourCells = 200

// line is a contour in the unit square.
type line struct {
	points []point
	closed bool
}

// edge is a side of a cell, the one to the right of a place of the grid or
// the one above it.
type edge struct {
	i, j  int
	above bool
}

// tracer follows one level through a field.
type tracer struct {
	f     *field
	level float64
	next  map[edge][]edge // the edges to which a line leads on, two at most
	order []edge          // as they were found, so that lines come in a fixed order
}

// contours are the lines along which a field has the level, between places
// where it is known.
func (f *field) contours(level float64) []line {
	t := tracer{f: f, level: level, next: map[edge][]edge{}}
	for j := range len(f.ys) - 1 {
		for i := range len(f.xs) - 1 {
			t.cross(i, j)
		}
	}
	var out []line
	for _, ends := range []int{1, 2} { // open lines from their ends, then rings
		for _, e := range t.order {
			if len(t.next[e]) == ends {
				out = append(out, t.follow(e))
			}
		}
	}
	return out
}

// coarse leaves out rows and columns until neither side has more cells than
// contours are drawn for; the border stays.
func (f *field) coarse() *field {
	columns, rows := picks(len(f.xs)), picks(len(f.ys))
	out := &field{head: f.head, span: f.span}
	for _, i := range columns {
		out.xs = append(out.xs, f.xs[i])
	}
	for _, j := range rows {
		out.ys = append(out.ys, f.ys[j])
		var row []float64
		for _, i := range columns {
			row = append(row, f.z[j][i])
		}
		out.z = append(out.z, row)
	}
	return out
}

// picks are the numbers to keep of n, first and last among them.
func picks(n int) []int {
	cells := min(n-1, contourCells)
	out := make([]int, cells+1)
	for k := range out {
		out[k] = k * (n - 1) / cells
	}
	return out
}

// cross finds the way of the level through one cell: which sides it enters
// and leaves. A place at the level counts as above it. Where both diagonals
// disagree, the mean of the corners says which of them belong together.
func (t *tracer) cross(i, j int) {
	z := t.f.z
	corners := [4]float64{z[j][i], z[j][i+1], z[j+1][i+1], z[j+1][i]} // counterclockwise
	sides := [4]edge{{i, j, false}, {i + 1, j, true}, {i, j + 1, false}, {i, j, true}}
	var crossed []edge
	mean := 0.0
	for k, c := range corners {
		if (c >= t.level) != (corners[(k+1)%4] >= t.level) {
			crossed = append(crossed, sides[k])
		}
		mean += c / 4
	}
	switch {
	case math.IsNaN(mean): // a corner is blank
	case len(crossed) == 2:
		t.join(crossed[0], crossed[1])
	case len(crossed) == 4 && (corners[0] >= t.level) == (mean >= t.level):
		t.join(sides[0], sides[1]) // the second and the fourth corner are cut off
		t.join(sides[2], sides[3])
	case len(crossed) == 4:
		t.join(sides[3], sides[0])
		t.join(sides[1], sides[2])
	}
}

func (t *tracer) join(a, b edge) {
	for _, e := range [...]edge{a, b} {
		if t.next[e] == nil {
			t.order = append(t.order, e)
		}
	}
	t.next[a] = append(t.next[a], b)
	t.next[b] = append(t.next[b], a)
}

// follow walks a line from an edge to its end, or round to its start, and
// takes the way back behind it.
func (t *tracer) follow(first edge) line {
	l := line{points: []point{t.point(first)}}
	for here := first; len(t.next[here]) > 0; {
		there := t.next[here][0]
		t.next[here] = t.next[here][1:]
		if back := t.next[there]; back[0] == here {
			t.next[there] = back[1:]
		} else {
			t.next[there] = back[:1]
		}
		if there == first {
			l.closed = true
			break
		}
		l.points = append(l.points, t.point(there))
		here = there
	}
	return l
}

// point is where the level cuts an edge.
func (t *tracer) point(e edge) point {
	i, j := e.i+1, e.j
	if e.above {
		i, j = e.i, e.j+1
	}
	from, to := t.f.z[e.j][e.i], t.f.z[j][i]
	part := (t.level - from) / (to - from)
	x0, x1, y0, y1 := t.f.xs[e.i], t.f.xs[i], t.f.ys[e.j], t.f.ys[j]
	return point{x0 + part*(x1-x0), y0 + part*(y1-y0)}
}
