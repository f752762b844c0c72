package study

import (
	"context"
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

func TestSolve(t *testing.T) {
	one := func(f func(float64) float64) Eval { return eval(func(x []float64) float64 { return f(x[0]) }) }
	for _, c := range []struct {
		what        string
		left, right func(float64) float64
		from, to    float64
		roots       []float64
		touching    int
		jumps       []float64
	}{
		{"line", func(x float64) float64 { return 2 * x }, fixed(6.6), 0, 10, []float64{3.3}, 0, nil},
		{"at the beginning", func(x float64) float64 { return 2 * x }, fixed(6.6), 3.3, 10, []float64{3.3}, 0, nil},
		{"at the end", func(x float64) float64 { return 3 * x }, fixed(0.3), 0, 0.1, []float64{0.1}, 0, nil},
		{"sine", math.Sin, fixed(0), 1, 20, multiples(math.Pi, 1, 6), 0, nil},
		{"parabola touches", func(x float64) float64 { return x * x }, func(x float64) float64 { return 2*x - 1 }, -3, 4.1, []float64{1}, 1, nil},
		{"parabola touches at a point of the survey", func(x float64) float64 { return (x - 1) * (x - 1) }, fixed(0), 0, 2, []float64{1}, 1, nil},
		{"parabola touches from below", func(x float64) float64 { return 1 - (x-0.3)*(x-0.3) }, fixed(1), 0, 2, []float64{0.3}, 1, nil},
		{"nearly touches", func(x float64) float64 { return (x-1)*(x-1) + 1e-6 }, fixed(0), -3, 4.1, nil, 0, nil},
		{"two close together", func(x float64) float64 { return (x-1)*(x-1) - 1e-6 }, fixed(0), -3, 4.1, []float64{0.999, 1.001}, 0, nil},
		{"squared sine", func(x float64) float64 { return math.Sin(x) * math.Sin(x) }, fixed(0), 1, 20, multiples(math.Pi, 1, 6), 6, nil},
		{"pole", func(x float64) float64 { return 1 / (x - 0.7) }, fixed(0), 0, 2, nil, 0, []float64{0.7}},
		{"pole at a place that fails", func(x float64) float64 { return 1 / x }, fixed(0), -1, 1, nil, 0, []float64{0}},
		{"pole and root", math.Tan, fixed(0.5), 0, 3, []float64{math.Atan(0.5)}, 0, []float64{math.Pi / 2}},
		{"even pole", func(x float64) float64 { return 1 / (x * x) }, fixed(0), -1, 1.5, nil, 0, nil},
		{"jump", func(x float64) float64 { return math.Floor(x) }, fixed(2.5), 0, 10, nil, 0, []float64{3}},
		{"jump to nearly 0", func(x float64) float64 {
			if x < 0.7 {
				return -1
			}
			return x - 0.7 + 1e-9
		}, fixed(0), 0, 1, nil, 0, []float64{0.7}},
		{"steep but whole", func(x float64) float64 { return math.Tanh(1e9 * (x - 0.5)) }, fixed(0), 0, 1.1, []float64{0.5}, 0, nil},
		{"cube root", math.Cbrt, fixed(0), -1, 1.3, []float64{0}, 0, nil},
		{"triple", func(x float64) float64 { return x * x * x }, fixed(0), -1, 1.3, []float64{0}, 0, nil},
		{"kink", func(x float64) float64 { return math.Abs(x - 0.123) }, fixed(0), 0, 1, []float64{0.123}, 1, nil},
		{"half without values", math.Log, fixed(0), -1, 5, []float64{1}, 0, nil},
		{"root at the edge of values", math.Sqrt, fixed(0), -1, 5, []float64{0}, 0, nil},
		{"nine decades", func(x float64) float64 { return x }, fixed(13.5e-9), 1e-9, 1, []float64{13.5e-9}, 0, nil},
		{"small scale", func(x float64) float64 { return math.Exp(-5e6 * x) }, fixed(0.5), 0, 1e-6, []float64{math.Ln2 / 5e6}, 0, nil},
		{"large sides", func(x float64) float64 { return 1e15 + x*x }, fixed(1e15), -1, 1.01, []float64{0}, 1, nil},
		{"never", math.Exp, fixed(-1), -5, 5, nil, 0, nil},
		{"dies away", func(x float64) float64 { return math.Exp(-x) }, fixed(0), 0, 100, nil, 0, nil},
	} {
		r, err := Solve(context.Background(), one(c.left), one(c.right), Range{Slots: []float64{0}, From: c.from, To: c.to})
		if err != nil {
			t.Errorf("%s: %v", c.what, err)
			continue
		}
		if len(r.List) != len(c.roots) || len(r.Jumps) != len(c.jumps) {
			t.Errorf("%s: roots %+v, jumps %v", c.what, r.List, r.Jumps)
			continue
		}
		touching := 0
		for i, root := range r.List {
			tol := 1e-12 * math.Max(math.Abs(c.roots[i]), c.to-c.from)
			if root.Touching {
				touching++
				tol *= 1e6
			}
			if c.what == "large sides" {
				tol = 0.4 // x² below 0.1 is lost beside 1e15
			}
			near.Abs(t, c.what, root.X, c.roots[i], tol)
			if root.Left != c.left(root.X) || root.Right != c.right(root.X) {
				t.Errorf("%s: the sides told are not those at the root", c.what)
			}
		}
		if touching != c.touching {
			t.Errorf("%s: %d touch, want %d", c.what, touching, c.touching)
		}
		for i, x := range r.Jumps {
			near.Abs(t, c.what+" jump", x, c.jumps[i], 1e-12)
		}
	}
}

func fixed(y float64) func(float64) float64 { return func(float64) float64 { return y } }

func multiples(x float64, a, b int) (all []float64) {
	for i := a; i <= b; i++ {
		all = append(all, float64(i)*x)
	}
	return all
}

func TestSolveInterval(t *testing.T) {
	floor := eval(func(x []float64) float64 { return math.Floor(x[0]) })
	for _, c := range []struct {
		value, from, to, x, far float64
	}{
		{3, 0, 10, 3, 4},
		{0, 0, 10, 0, 1},
		{2999, 0, 10_000, 2999, 3000}, // shorter than a step of the survey
	} {
		right := eval(func([]float64) float64 { return c.value })
		r, err := Solve(context.Background(), floor, right, Range{Slots: []float64{0}, From: c.from, To: c.to})
		if err != nil || len(r.List) != 1 {
			t.Errorf("floor = %g: %+v, %v", c.value, r, err)
			continue
		}
		near.Abs(t, "beginning", r.List[0].X, c.x, 1e-12*c.to)
		near.Abs(t, "end", r.List[0].To, c.far, 1e-12*c.to)
		if math.Floor(r.List[0].X) != c.value || math.Floor(r.List[0].To) != c.value {
			t.Errorf("floor = %g: an end does not solve", c.value)
		}
	}
}

func TestSolveWithoutRoot(t *testing.T) {
	left := eval(func(x []float64) float64 { return x[1] + (x[0]-2)*(x[0]-2) })
	r, err := Solve(context.Background(), left, eval(func([]float64) float64 { return 1 }), Range{Slots: []float64{0, 5}, From: 0, To: 3})
	if err != nil || len(r.List) != 0 {
		t.Fatalf("%+v, %v", r, err)
	}
	near.Rel(t, "left side at the beginning", r.Start.Left, 9, 1e-15)
	near.Rel(t, "left side at the end", r.End.Left, 6, 1e-15)
	near.Abs(t, "nearest", r.Nearest.X, 2, 1e-6)
	near.Rel(t, "left side there", r.Nearest.Left, 5, 1e-12)

	r, err = Solve(context.Background(), below1, eval(func([]float64) float64 { return 0.81 }), Range{Slots: []float64{0}, From: 0, To: 2, Points: 201})
	if err != nil || len(r.List) != 1 || r.Failed != 100 || !errors.Is(r.Failure, errDomain) {
		t.Fatalf("%+v, %v", r, err)
	}
	near.Rel(t, "root beside places without value", r.List[0].X, 0.9, 1e-14)
	near.Rel(t, "last place with a value", r.End.X, 1, 1e-15)
	if _, err = Solve(context.Background(), below1, below1, Range{Slots: []float64{0}, From: 3, To: 4}); !errors.Is(err, errDomain) {
		t.Errorf("nowhere a value: %v", err)
	}
}

func TestRangeRefused(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	ok := Range{Slots: []float64{0}, To: 1}
	if _, err := Solve(ctx, sum, sum, ok); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
	for _, c := range []struct {
		r     Range
		cause error
	}{
		{Range{Slots: []float64{0}, From: 1, To: 1}, ErrRange},
		{Range{Slots: []float64{0}, From: 2, To: 1}, ErrRange},
		{Range{Slots: []float64{0}, To: math.Inf(1)}, ErrRange},
		{Range{Slots: []float64{0}, Slot: 1, To: 1}, ErrRange},
		{Range{Slots: []float64{0}, To: 1, Points: 2}, ErrSize},
		{Range{Slots: []float64{0}, To: 1, Points: MaxSurvey + 1}, ErrSize},
		{Range{Slots: []float64{0}, From: -1e308, To: 1e308}, ErrRange},
	} {
		if _, err := Maximise(context.Background(), sum, c.r); !errors.Is(err, c.cause) {
			t.Errorf("%+v: %v", c.r, err)
		}
	}
}

func TestOptima(t *testing.T) {
	hump := func(x, at, width, height float64) float64 { return height * math.Exp(-(x-at)*(x-at)/width/width) }
	for _, c := range []struct {
		what     string
		f        func(float64) float64
		from, to float64
		least    bool
		want     []Optimum
	}{
		{"parabola", func(x float64) float64 { return 3 - (x-2)*(x-2) }, 0, 5, false, []Optimum{{X: 2, To: 2, Y: 3}}},
		{
			"two humps", func(x float64) float64 { return hump(x, 3, 0.5, 1) + hump(x, 7, 0.5, 2) }, 0, 10, false,
			[]Optimum{{X: 7, To: 7, Y: 2}, {X: 3, To: 3, Y: 1}},
		},
		{"symmetric about the middle of a step", func(x float64) float64 { return -x * x }, -1, 1, false, []Optimum{{}}},
		{"rising", func(x float64) float64 { return x }, 1, 4, false, []Optimum{{X: 4, To: 4, Y: 4, Boundary: AtTo}}},
		{"rising, least", func(x float64) float64 { return x }, 1, 4, true, []Optimum{{X: 1, To: 1, Y: 1, Boundary: AtFrom}}},
		{
			"both ends", func(x float64) float64 { return x * x }, -1, 2, false,
			[]Optimum{{X: 2, To: 2, Y: 4, Boundary: AtTo}, {X: -1, To: -1, Y: 1, Boundary: AtFrom}},
		},
		{"level", fixed(7), 1, 4, false, []Optimum{{X: 1, To: 4, Y: 7, Boundary: AtFrom}}},
		{"edge of values", func(x float64) float64 { return -math.Sqrt(x - 1) }, 0, 4, false, []Optimum{{X: 1, To: 1, Boundary: AtNoValues}}},
		{"cusp, least", func(x float64) float64 { return math.Abs(x - 0.3) }, -1, 1, true, []Optimum{{X: 0.3, To: 0.3}}},
		{
			"swing at depth of focus", func(x float64) float64 { return 1 / (1 + math.Pow((x-13.5e-9)/0.3e-9, 2)) }, 12e-9, 15e-9, false,
			[]Optimum{{X: 13.5e-9, To: 13.5e-9, Y: 1}},
		},
	} {
		f := eval(func(x []float64) float64 { return c.f(x[0]) })
		find := Maximise
		if c.least {
			find = Minimise
		}
		o, err := find(context.Background(), f, Range{Slots: []float64{0}, From: c.from, To: c.to})
		if err != nil || len(o.List) != len(c.want) || o.Found != len(c.want) {
			t.Errorf("%s: %+v, %v", c.what, o, err)
			continue
		}
		for i, want := range c.want {
			got := o.List[i]
			near.Abs(t, c.what+" place", got.X, want.X, 1e-7*(c.to-c.from))
			near.Abs(t, c.what+" far end", got.To, want.To, 1e-7*(c.to-c.from))
			near.Abs(t, c.what+" value", got.Y, want.Y, 1e-7)
			if got.Boundary != want.Boundary {
				t.Errorf("%s: boundary %d, want %d", c.what, got.Boundary, want.Boundary)
			}
		}
	}
	steps := eval(func(x []float64) float64 { return -math.Abs(math.Floor(x[0]) - 3) })
	o, err := Maximise(context.Background(), steps, Range{Slots: []float64{0}, From: 0, To: 10})
	if err != nil || len(o.List) != 1 {
		t.Fatalf("%+v, %v", o, err)
	}
	near.Abs(t, "level top begins", o.List[0].X, 3, 10.0/499)
	near.Abs(t, "level top ends", o.List[0].To, 4, 10.0/499)
	o, err = Maximise(context.Background(), eval(func(x []float64) float64 { return math.Sin(x[0]) }), Range{Slots: []float64{0}, From: 0, To: 400})
	if err != nil || o.Found != 64 || len(o.List) != MaxOptima { // 63 or 64 turns of 2π, the last before its top
		t.Errorf("%d found, %v", o.Found, err)
	}
}
