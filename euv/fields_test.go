package euv_test

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// fieldCounts are the three answers for fields of w by h in a circle of radius
// r, all in one unit of length.
type fieldCounts struct{ complete, least, most int }

func countFields(t testing.TB, w, h, r float64) fieldCounts {
	t.Helper()
	n := sound[units.FieldsPerWafer](t)
	width, height, diameter := units.Length(w), units.Length(h), units.Length(2*r)
	return fieldCounts{
		int(n(euv.CompleteFields(width, height, diameter, 0))),
		int(n(euv.TouchedFieldsLeast(width, height, diameter, 0))),
		int(n(euv.TouchedFieldsMost(width, height, diameter, 0))),
	}
}

// oneByOne looks at every field of a grid with a corner at x, y.
func oneByOne(w, h, r, x, y float64) (complete, touched int) {
	cols, rows := int(r/w)+2, int(r/h)+2
	for i := -cols; i <= cols; i++ {
		for j := -rows; j <= rows; j++ {
			left, bottom := x+float64(i)*w, y+float64(j)*h
			right, top := left+w, bottom+h
			farX, farY := max(-left, right), max(-bottom, top)
			if farX*farX+farY*farY <= r*r {
				complete++
			}
			nearX, nearY := max(0, left, -right), max(0, bottom, -top)
			if nearX*nearX+nearY*nearY < r*r {
				touched++
			}
		}
	}
	return complete, touched
}

// sampled is the best of many positions: those of a fine regular mesh, which
// has the symmetric ones in it, and random ones.
func sampled(rng *rand.Rand, w, h, r float64, mesh, random int) fieldCounts {
	best := fieldCounts{least: math.MaxInt}
	try := func(x, y float64) {
		complete, touched := oneByOne(w, h, r, x, y)
		best = fieldCounts{max(best.complete, complete), min(best.least, touched), max(best.most, touched)}
	}
	for i := range mesh {
		for j := range mesh {
			try(w*float64(i)/float64(mesh), h*float64(j)/float64(mesh))
		}
	}
	for range random {
		try(w*rng.Float64(), h*rng.Float64())
	}
	return best
}

// Fields on wafers: 26 mm by 33 mm and half of it on 300 mm less 3 mm, counted
// by brute force over offsets; geometry.
func TestFieldsOnAWafer(t *testing.T) {
	n := sound[units.FieldsPerWafer](t)
	near.Rel(t, "complete", n(euv.CompleteFields(26*millimetre, 33*millimetre, 0.3, 3*millimetre)), 64, 0)
	near.Rel(t, "complete half fields", n(euv.CompleteFields(26*millimetre, 16.5*millimetre, 0.3, 3*millimetre)), 134, 0)
	near.Rel(t, "touched, least", n(euv.TouchedFieldsLeast(26*millimetre, 33*millimetre, 0.3, 3*millimetre)), 95, 0)
	near.Rel(t, "touched, most", n(euv.TouchedFieldsMost(26*millimetre, 33*millimetre, 0.3, 3*millimetre)), 104, 0)
}

// Where a mesh of offsets is fine enough, it finds the same.
func TestFieldsAgainstBruteForce(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for _, c := range []struct {
		w, h, r float64
		mesh    int
	}{
		{26, 33, 147, 120},
		{26, 16.5, 147, 240},
		{33, 26, 147, 120},
		{13, 16.5, 97, 120},
		{22, 22, 147, 120},
		{30, 10, 100, 120},
		{60, 7, 97, 120},
		{25, 32, 72, 120},
		{40, 50, 97, 120},
		{80, 90, 147, 120},
		{11, 14, 48, 120},
		{150, 140, 147, 120},
		{200, 100, 147, 120},
		{300, 290, 147, 120},
	} {
		name := fmt.Sprintf("%g by %g in %g", c.w, c.h, c.r)
		got := countFields(t, c.w, c.h, c.r)
		want := sampled(rng, c.w, c.h, c.r, c.mesh, 2000)
		if got != want {
			t.Errorf("%s: got %+v, brute force %+v", name, got, want)
		}
	}
}

// No position beats the answer, whatever the geometry.
func TestFieldsAreNeverBeaten(t *testing.T) {
	rng := rand.New(rand.NewPCG(3, 4))
	equal := 0
	const geometries = 60
	for range geometries {
		w, h := 0.1+rng.Float64()*0.9, 0.1+rng.Float64()*0.9
		got, best := countFields(t, w, h, 1), sampled(rng, w, h, 1, 60, 1000)
		if best.complete > got.complete || best.least < got.least || best.most > got.most {
			t.Errorf("%g by %g: got %+v, but a position has %+v", w, h, got, best)
		}
		if best == got {
			equal++
		}
	}
	if equal < geometries/2 {
		t.Errorf("only %d of %d geometries agree", equal, geometries)
	}
}

// Fields whose corners lie on the circle exactly, and circles that grid lines
// touch exactly: hand counts.
func TestFieldsThatJustFit(t *testing.T) {
	for _, c := range []struct {
		w, h, r float64
		want    fieldCounts
	}{
		{10, 10, 5, fieldCounts{0, 1, 4}}, // the circle fits into a field
		{10, 10, 4, fieldCounts{0, 1, 4}},
		{10, 5, 5, fieldCounts{0, 2, 6}}, // and into two rows
	} {
		if got := countFields(t, c.w, c.h, c.r); got != c.want {
			t.Errorf("%g by %g in %g: got %+v, want %+v", c.w, c.h, c.r, got, c.want)
		}
	}
	rng := rand.New(rand.NewPCG(5, 6))
	cos, sin := math.Cos(0.7), math.Sin(0.7)
	for _, c := range []struct {
		w, h, r  float64
		complete int
	}{
		{30, 40, 24.999, 0},                  // the diagonal is too long
		{6, 8, 5, 1},                         // the diagonal is the diameter
		{0.3, 0.4, 0.25, 1},                  // the same, not exact in binary
		{0.294 * cos, 0.294 * sin, 0.147, 1}, // and at another angle
		{1, 1, math.Sqrt2, 4},                // four squares around the centre
		{0.1, 0.1, math.Sqrt2 / 10, 4},       // the same
		{1, 1, math.Sqrt(5), 12},             // a square of 16 less its corners
	} {
		got := countFields(t, c.w, c.h, c.r)
		want := sampled(rng, c.w, c.h, c.r*(1-1e-9), 120, 5000) // without the fields that the circle only meets
		want.complete = c.complete
		if got != want {
			t.Errorf("%g by %g in %g: got %+v, want %+v", c.w, c.h, c.r, got, want)
		}
	}
}

// A field and its mirror, another unit of length and an edge in place of a
// smaller wafer give the same.
func TestFieldsScaleAndTurn(t *testing.T) {
	for _, c := range [][2]float64{{26, 33}, {26, 16.5}, {7, 9}, {50, 3}} {
		want := countFields(t, c[0], c[1], 147)
		for what, got := range map[string]fieldCounts{
			"turned":  countFields(t, c[1], c[0], 147),
			"smaller": countFields(t, c[0]*1e-6, c[1]*1e-6, 147e-6),
			"greater": countFields(t, c[0]/3, c[1]/3, 147.0/3),
		} {
			if got != want {
				t.Errorf("%v %s: got %+v, want %+v", c, what, got, want)
			}
		}
		edged := sound[units.FieldsPerWafer](t)(euv.CompleteFields(units.Length(c[0]), units.Length(c[1]), 300, 3))
		near.Rel(t, "edge", edged, float64(want.complete), 0)
	}
}

func TestFieldsRefuseTooMany(t *testing.T) {
	for _, c := range [][2]units.Length{{0.5 * millimetre, 0.5 * millimetre}, {1e9, 1e-9}, {1e-300, 1e-300}, {1e-9, 1}} {
		n, err := euv.CompleteFields(c[0], c[1], 0.3, 0)
		var bad *euv.ArgumentError
		if !errors.As(err, &bad) || bad.Argument != "width" || n != 0 || !strings.Contains(err.Error(), "at most 1e5") {
			t.Errorf("%v: got %v, %v", c, n, err)
		}
	}
}

func BenchmarkCompleteFields(b *testing.B) {
	for _, c := range []struct {
		name          string
		width, height units.Length
	}{{"scanner field", 26 * millimetre, 33 * millimetre}, {"die of 5 mm", 5 * millimetre, 5 * millimetre}, {"die of 1 mm", millimetre, millimetre}} {
		b.Run(c.name, func(b *testing.B) {
			for b.Loop() {
				if _, err := euv.CompleteFields(c.width, c.height, 0.3, 3*millimetre); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
