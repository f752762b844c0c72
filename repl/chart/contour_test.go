package chart

import (
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

// square is a field of n by n values of f over the unit square.
func square(n int, f func(x, y float64) float64) *field {
	out := &field{span: span{lo: -10, hi: 10}}
	for i := range n {
		out.xs = append(out.xs, float64(i)/float64(n-1))
	}
	out.ys = out.xs
	for _, y := range out.ys {
		var row []float64
		for _, x := range out.xs {
			row = append(row, f(x, y))
		}
		out.z = append(out.z, row)
	}
	return out
}

// TestContourCircle finds one ring with the area and the radius of the circle.
func TestContourCircle(t *testing.T) {
	lines := square(101, func(x, y float64) float64 { return math.Hypot(x-0.5, y-0.5) }).contours(0.3)
	if len(lines) != 1 || !lines[0].closed {
		t.Fatalf("%d lines", len(lines))
	}
	area := 0.0
	points := lines[0].points
	for i, p := range points {
		q := points[(i+1)%len(points)]
		area += (p.x*q.y - q.x*p.y) / 2
		near.Rel(t, "radius", math.Hypot(p.x-0.5, p.y-0.5), 0.3, 1e-3)
		if step := math.Hypot(p.x-q.x, p.y-q.y); step > 0.0142 { // the diagonal of a cell
			t.Fatalf("a step of %g between neighbours", step)
		}
	}
	near.Rel(t, "area", math.Abs(area), math.Pi*0.09, 1e-3)
}

// TestContourPlane finds the straight line on which a plane has a level,
// exactly, and cut in two by a blank.
func TestContourPlane(t *testing.T) {
	plane := func(x, y float64) float64 { return 2*x + y }
	f := square(11, plane)
	lines := f.contours(1.05)
	if len(lines) != 1 || lines[0].closed || len(lines[0].points) < 10 {
		t.Fatalf("%+v", lines)
	}
	for _, p := range lines[0].points {
		near.Abs(t, "level", plane(p.x, p.y), 1.05, 1e-12)
	}
	f.z[5][3] = math.NaN()
	if lines := f.contours(1.05); len(lines) != 2 {
		t.Errorf("%d lines beside a blank, want 2", len(lines))
	}
	if lines := f.contours(5); lines != nil {
		t.Errorf("%d lines at a level that is not reached", len(lines))
	}
}

// TestContourSaddle joins across a saddle what its middle says.
func TestContourSaddle(t *testing.T) {
	f := square(2, func(x, y float64) float64 { return math.Abs(x - y) }) // 0 and 1 in turn, 0.5 between
	for level, above := range map[float64]bool{0.4: true, 0.6: false} {
		lines := f.contours(level)
		if len(lines) != 2 {
			t.Fatalf("level %g: %d lines", level, len(lines))
		}
		for _, l := range lines {
			// A line cuts off one corner: (0, 0) or (1, 1) if the middle is above.
			a, b := l.points[0], l.points[1]
			cutsLow := math.Signbit(a.x+a.y-1) == math.Signbit(b.x+b.y-1)
			if cutsLow != above {
				t.Errorf("level %g: a line from %v to %v", level, a, b)
			}
		}
	}
}

// TestCoarse keeps the border of a fine grid, within the bound.
func TestCoarse(t *testing.T) {
	f := square(777, func(x, y float64) float64 { return x - y }).coarse()
	if len(f.xs) != contourCells+1 || len(f.z) != contourCells+1 || len(f.z[0]) != contourCells+1 {
		t.Fatalf("%d by %d", len(f.xs), len(f.z))
	}
	if f.xs[0] != 0 || f.xs[contourCells] != 1 || f.z[contourCells][0] != -1 {
		t.Error("the border is lost")
	}
}

// TestFieldValue meets the places of the grid and is even between them.
func TestFieldValue(t *testing.T) {
	f := square(4, func(x, y float64) float64 { return 1 + x + 10*y + x*y })
	for _, n := range []int{3, 7, 64} {
		across := spots(f.xs, n)
		for i, x := range across {
			for j, y := range across {
				u, v := (float64(i)+0.5)/float64(n), (float64(j)+0.5)/float64(n)
				near.Rel(t, "value", f.value(x, y), 1+u+10*v+u*v, 1e-12)
			}
		}
	}
	f.z[1][1] = math.NaN()
	if v := f.value(spot{1, 0.4}, spot{1, 0.4}); !math.IsNaN(v) {
		t.Errorf("%g nearest to a blank", v)
	}
	near.Rel(t, "on the far side", f.value(spot{1, 1}, spot{1, 1}), f.z[2][2], 1e-12)
}

// TestFlat gives a flat map one tone.
func TestFlat(t *testing.T) {
	f := square(5, func(x, y float64) float64 { return 7.1 })
	for _, n := range []int{37, 74, 75, 1000} {
		for _, x := range spots(f.xs, n) {
			if v := f.value(x, spots(f.ys, 3)[1]); v != 7.1 {
				t.Fatalf("%g on a map of 7.1", v)
			}
		}
	}
}

// TestFalling turns a map with falling axes round.
func TestFalling(t *testing.T) {
	rising := hill(5, 4)
	falling := hill(5, 4)
	g := falling.Grid
	for i, j := 0, len(g.X)-1; i < j; i, j = i+1, j-1 {
		g.X[i], g.X[j] = g.X[j], g.X[i]
		for _, row := range g.Z {
			row[i], row[j] = row[j], row[i]
		}
	}
	for i, j := 0, len(g.Y)-1; i < j; i, j = i+1, j-1 {
		g.Y[i], g.Y[j] = g.Y[j], g.Y[i]
		g.Z[i], g.Z[j] = g.Z[j], g.Z[i]
	}
	if a, b := drawn(t, rising), drawn(t, falling); string(a.text) != string(b.text) {
		t.Error("the drawing depends on the direction of the axes")
	}
}
