package study

import (
	"context"
	"errors"
	"math"
	"runtime"
	"testing"

	"example.com/dosewright/internal/near"
)

func axis(t *testing.T, x Axis, err error) Axis {
	t.Helper()
	if err != nil {
		t.Fatal(err)
	}
	return x
}

func TestStepped(t *testing.T) {
	for _, c := range []struct {
		a, b, s float64
		n       int
		last    float64
	}{
		{0, 1, 0.1, 11, 1},
		{10, 90, 10, 9, 90},
		{13.4e-9, 13.6e-9, 0.001e-9, 201, 13.6e-9},
		{1, 2, 0.3, 4, 1.9},
		{0.1, 0.7, 0.1, 7, 0.7},
		{90, 10, 10, 9, 10},
		{90, 10, -10, 9, 10},
		{0, 0.3, 1, 1, 0},
		{-0.3, 0.3, 0.1, 7, 0.3},
		{0, 1e6, 0.1, 10_000_001, 1e6},
		{295.15, 296.15, 0.01, 101, 296.15},
		{0, 1, 1.0 / 3, 4, 1},
	} {
		x, err := Stepped(0, c.a, c.b, c.s)
		if err != nil {
			t.Errorf("%g .. %g by %g: %v", c.a, c.b, c.s, err)
			continue
		}
		if x.Len() != c.n || x.At(0) != c.a {
			t.Errorf("%g .. %g by %g: %d points from %g, want %d", c.a, c.b, c.s, x.Len(), x.At(0), c.n)
		}
		near.Rel(t, "last", x.At(x.Len()-1), c.last, 1e-15)
		if c.last == c.b && x.At(x.Len()-1) != c.b {
			t.Errorf("%g .. %g by %g does not hit its end", c.a, c.b, c.s)
		}
	}
	x, err := Stepped(0, 0, 1, 0.1)
	step := 0.1
	if axis(t, x, err).At(6) != 6*step { // not a sum of steps, which is 0.6 less one ulp
		t.Errorf("step 6 at %.17g", x.At(6))
	}
	for _, c := range [][3]float64{
		{1, 1, 0.1}, {0, 1, 0}, {0, math.Inf(1), 1}, {math.NaN(), 1, 1}, {0, 1, math.NaN()}, {0, 1, math.Inf(1)}, {1e9, 1e9 + 1, 1e-8}, {0, 1, 1e-320},
	} {
		if _, err := Stepped(0, c[0], c[1], c[2]); !errors.Is(err, ErrRange) {
			t.Errorf("%g .. %g by %g: %v", c[0], c[1], c[2], err)
		}
	}
}

func TestSpacedAndLogarithmic(t *testing.T) {
	x, err := Spaced(0, 13, 14, 11)
	x = axis(t, x, err)
	for i, want := range []float64{13, 13.1, 13.2, 13.3, 13.4, 13.5, 13.6, 13.7, 13.8, 13.9, 14} {
		near.Rel(t, "spaced", x.At(i), want, 2e-16)
	}
	x, err = Logarithmic(0, 1e-3, 1e3, 7)
	x = axis(t, x, err)
	for i, want := range []float64{1e-3, 1e-2, 1e-1, 1, 10, 100, 1000} {
		near.Rel(t, "logarithmic", x.At(i), want, 2e-15)
	}
	x, err = Logarithmic(0, -100, -1, 3)
	near.Rel(t, "below 0", axis(t, x, err).At(1), -10, 1e-15)
	for _, c := range [][2]float64{{0, 1}, {-1, 1}, {1, 0}, {1e-300, 1e300}} {
		if _, err := Logarithmic(0, c[0], c[1], 5); !errors.Is(err, ErrRange) {
			t.Errorf("logarithmic from %g to %g: %v", c[0], c[1], err)
		}
	}
	if _, err := Spaced(0, 0, 1, 1); !errors.Is(err, ErrRange) {
		t.Errorf("one point: %v", err)
	}
}

func spaced(t *testing.T, slot int, a, b float64, n int) Axis {
	t.Helper()
	x, err := Spaced(slot, a, b, n)
	return axis(t, x, err)
}

func TestGrid(t *testing.T) {
	s := &Sweep{Slots: []float64{0, 5, 0}, Axes: []Axis{spaced(t, 2, 0, 2, 3), spaced(t, 0, 10, 13, 4)}, Outputs: 2}
	p := program(
		eval(func(x []float64) float64 { return 100*x[2] + x[0] }),
		eval(func(x []float64) float64 { return x[1] }),
	)
	i := 0
	err := s.Run(context.Background(), p, func(r Row) error {
		x, y := float64(i/4), 10+float64(i%4)
		if r.Index != i || r.X[0] != x || r.X[1] != y || r.Y[0] != 100*x+y || r.Y[1] != 5 || r.Err != nil {
			t.Errorf("row %d is %+v", i, r)
		}
		i++
		return nil
	})
	if err != nil || i != 12 {
		t.Errorf("%d rows, %v", i, err)
	}
}

// TestSweepInOrder: a long sweep with holes comes in order on any number of cores.
func TestSweepInOrder(t *testing.T) {
	f := func(x []float64) (float64, error) {
		if int(x[0])%7 == 3 {
			return 0, errDomain
		}
		if int(x[0])%1000 == 1 {
			return math.Inf(1), nil
		}
		return 2 * x[0], nil
	}
	s := &Sweep{Slots: []float64{0}, Axes: []Axis{spaced(t, 0, 0, 50_000, 50_001)}, Outputs: 1}
	for _, cores := range []int{1, 2, 5} {
		before := runtime.GOMAXPROCS(cores)
		next := 0
		err := s.Run(context.Background(), program(f), func(r Row) error {
			var want error
			switch {
			case next%7 == 3:
				want = errDomain
			case next%1000 == 1:
				want = ErrNotFinite
			}
			if r.Index != next || r.X[0] != float64(next) || !errors.Is(r.Err, want) || want == nil && r.Y[0] != 2*r.X[0] {
				t.Fatalf("row %d is %+v", next, r)
			}
			next++
			return nil
		})
		runtime.GOMAXPROCS(before)
		if err != nil || next != 50_001 {
			t.Errorf("%d rows, %v", next, err)
		}
	}
}

func TestSweepEnds(t *testing.T) {
	s := &Sweep{Slots: []float64{0}, Axes: []Axis{spaced(t, 0, 0, 1, 1_000_000)}, Outputs: 1}
	stop, rows := errors.New("enough"), 0
	err := s.Run(context.Background(), program(sum), func(Row) error {
		if rows++; rows == 1000 {
			return stop
		}
		return nil
	})
	if err != stop || rows != 1000 {
		t.Errorf("%d rows, %v", rows, err)
	}
	ctx, cancel := context.WithCancel(context.Background())
	rows = 0
	err = s.Run(ctx, program(sum), func(Row) error {
		if rows++; rows == 1000 {
			cancel()
		}
		return nil
	})
	if !errors.Is(err, context.Canceled) || rows < 1000 || rows > 200_000 {
		t.Errorf("%d rows, %v", rows, err)
	}
}

func TestSweepRefused(t *testing.T) {
	many := spaced(t, 0, 0, 1, 1_000_000_000)
	row := spaced(t, 0, 0, 1, 100_000)
	column := spaced(t, 1, 0, 1, 100_000)
	for _, c := range []struct {
		s     Sweep
		cause error
	}{
		{Sweep{Slots: []float64{0}, Axes: []Axis{many}, Outputs: 1}, ErrSize},
		{Sweep{Slots: []float64{0, 0}, Axes: []Axis{row, column}, Outputs: 1}, ErrSize},
		{Sweep{Slots: []float64{0}, Axes: []Axis{row}, Outputs: 1, Limit: 99_999}, ErrSize},
		{Sweep{Slots: []float64{0, 0}, Axes: []Axis{row, row}, Outputs: 1}, ErrRange},
		{Sweep{Slots: []float64{0}, Axes: []Axis{column}, Outputs: 1}, ErrRange},
		{Sweep{Slots: []float64{0}, Axes: []Axis{row}}, ErrRange},
		{Sweep{Slots: []float64{0}, Axes: []Axis{{}}, Outputs: 1}, ErrRange},
		{Sweep{Slots: []float64{0}, Outputs: 1}, ErrRange},
	} {
		err := c.s.Run(context.Background(), program(sum), func(Row) error { t.Error("a point was run"); return nil })
		if !errors.Is(err, c.cause) {
			t.Errorf("%v", err)
		}
		t.Log(err)
	}
}
