package chart

import (
	"math"
	"math/rand/v2"
	"strconv"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl"
)

func TestTicks(t *testing.T) {
	for _, c := range []struct {
		s    span
		n    int
		want string
	}{
		{span{lo: 0, hi: 100}, 6, "0 20 40 60 80 100"},
		{span{lo: 0, hi: 1}, 5, "0 0.2 0.4 0.6 0.8 1.0"},
		{span{lo: -3, hi: 4}, 7, "-3 -2 -1 0 1 2 3 4"},
		{span{lo: 13.4, hi: 13.6}, 4, "13.40 13.45 13.50 13.55 13.60"},
		{span{lo: 0, hi: 7}, 1, "0"},
		{span{lo: 1e19, hi: 3e19}, 4, "1.0e19 1.5e19 2.0e19 2.5e19 3.0e19"},
		{span{lo: 0, hi: 2e-9}, 2, "0 1e-9 2e-9"},
		{span{lo: 999_000, hi: 1_001_000}, 2, "0.999e6 1.000e6 1.001e6"},
		{span{lo: 1e-3, hi: 1e3, log: true}, 7, "0.001 0.01 0.1 1 10 100 1000"},
		{span{lo: 1e-12, hi: 1e-3, log: true}, 4, "1e-12 1e-9 1e-6 0.001"},
		{span{lo: 1, hi: 20, log: true}, 5, "1 2 5 10 20"},
		{span{lo: 10, hi: 30, log: true}, 4, "10 15 20 25 30"},
		{span{lo: 2e-8, hi: 5e-7, log: true}, 4, "2e-8 5e-8 1e-7 2e-7 5e-7"},
	} {
		var got []string
		for _, k := range c.s.ticks(c.n) {
			if k.label != "" {
				got = append(got, k.label)
			}
		}
		if text := strings.Join(got, " "); text != c.want {
			t.Errorf("%+v: got %s, want %s", c.s, text, c.want)
		}
	}
}

// TestTicksAnywhere holds for spans of all sizes: some ticks, not many, all on
// the axis and rising, and each label within a hundredth of a step of its tick.
func TestTicksAnywhere(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 11))
	for range 20_000 {
		r := newReach(repl.Axis{Log: random.IntN(2) == 0})
		for range 1 + random.IntN(2) {
			v := math.Pow(10, 598*random.Float64()-299)
			if random.IntN(2) == 0 {
				v = math.Pow(10, 2*random.Float64())
			}
			if !r.axis.Log && random.IntN(2) == 0 {
				v = -v
			}
			if err := r.add(v); err != nil {
				t.Fatal(err)
			}
		}
		s := r.span([]float64{0, 0.04}[random.IntN(2)])
		ticks := s.ticks(6)
		labelled := 0
		for i, k := range ticks {
			if at := s.at(k.value); !(at >= -1e-6 && at <= 1+1e-6) {
				t.Fatalf("%+v: tick %g stands at %g", s, k.value, at)
			}
			if i > 0 && k.value <= ticks[i-1].value {
				t.Fatalf("%+v: tick %g after %g", s, k.value, ticks[i-1].value)
			}
			if k.label == "" {
				continue
			}
			labelled++
			v, err := strconv.ParseFloat(k.label, 64)
			if err != nil {
				t.Fatalf("label %q of %+v", k.label, s)
			}
			if off := math.Abs(v - k.value); off > (s.hi-s.lo)/600 && off > 1e-9*math.Abs(v) {
				t.Fatalf("%+v: tick %.17g is labelled %s", s, k.value, k.label)
			}
		}
		if labelled < 1 || labelled > 13 {
			t.Fatalf("%+v: %d labels", s, labelled)
		}
	}
}

func TestSpan(t *testing.T) {
	for _, c := range []struct {
		values []float64
		log    bool
		lo, hi float64
	}{
		{[]float64{0, 100}, false, 0, 104},
		{[]float64{-100, 0}, false, -104, 0},
		{[]float64{-1, 1}, false, -1.08, 1.08},
		{[]float64{10, 20}, false, 9.6, 20.4},
		{[]float64{250}, false, 237.5, 262.5},
		{[]float64{-20, -20}, false, -21, -19},
		{[]float64{0}, false, -1, 1},
		{[]float64{1e-320}, false, -1, 1},
		{[]float64{1, 1e100}, true, 1e-4, 1e104},
		{[]float64{6}, true, 2, 18},
	} {
		r := newReach(repl.Axis{Log: c.log})
		for _, v := range c.values {
			if err := r.add(v); err != nil {
				t.Fatal(err)
			}
		}
		s := r.span(0.04)
		near.Rel(t, "start", s.lo, c.lo, 1e-12)
		near.Rel(t, "end", s.hi, c.hi, 1e-12)
		near.Abs(t, "place of the start", s.at(s.lo), 0, 1e-15)
		near.Abs(t, "place of the end", s.at(s.hi), 1, 1e-15)
	}
}

// TestThin keeps peaks, ends and order, within four points a column.
func TestThin(t *testing.T) {
	const columns = 100
	random := rand.New(rand.NewPCG(3, 5))
	run := make([]point, 50_000)
	for i := range run {
		run[i] = point{float64(i) / float64(len(run)-1), random.Float64()}
	}
	run[12_345].y, run[45_678].y = 7, -7
	got := thin(run, columns)
	if len(got) > 4*(columns+1) {
		t.Errorf("%d points are left", len(got))
	}
	if got[0] != run[0] || got[len(got)-1] != run[len(run)-1] {
		t.Error("an end is lost")
	}
	seen := map[point]bool{}
	for i, p := range got {
		seen[p] = true
		if i > 0 && p.x <= got[i-1].x {
			t.Fatalf("point %d is out of order", i)
		}
	}
	if !seen[run[12_345]] || !seen[run[45_678]] {
		t.Error("a peak is lost")
	}
	if few := run[:4*columns]; len(thin(few, columns)) != len(few) {
		t.Error("a short run is thinned")
	}
}

// TestTooManyPoints refuses a curve that runs to and fro too often to be thinned.
func TestTooManyPoints(t *testing.T) {
	s := repl.Series{Name: "wild"}
	for i := range MaxPoints + 1 {
		s.X, s.Y = append(s.X, float64(i%2)), append(s.Y, float64(i))
	}
	_, _, err := curvesOf(&repl.Picture{X: repl.Axis{Name: "x"}, Lines: []repl.Series{s}}, 1000)
	if err == nil || !strings.Contains(err.Error(), "1000001 points are left") {
		t.Errorf("got %v", err)
	}
}
