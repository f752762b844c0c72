package num

import (
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

func TestRoot(t *testing.T) {
	for _, c := range []struct {
		what string
		f    func(float64) float64
		a, b float64
		want float64
	}{
		{"line", func(x float64) float64 { return 2*x - 3 }, 0, 5, 1.5},
		{"cosine", math.Cos, 0, 3, math.Pi / 2},
		{"falling exponential", func(x float64) float64 { return math.Exp(-x) - 1e-6 }, 0, 100, 6 * math.Ln10},
		{"triple root", func(x float64) float64 { return (x - 1) * (x - 1) * (x - 1) }, 0, 3.1, 1},
		{"tiny scale", func(x float64) float64 { return x - 13.5e-9 }, 1e-9, 1, 13.5e-9},
		{"huge scale", func(x float64) float64 { return x*x - 1e200 }, 0, 1e110, 1e100},
		{"at the left end", func(x float64) float64 { return x - 2 }, 2, 3, 2},
		{"at the right end", func(x float64) float64 { return x - 3 }, 2, 3, 3},
		{"a jump", func(x float64) float64 { return math.Copysign(1, x-0.7) }, 0, 1, 0.7},
	} {
		x, err := Root(c.f, c.a, c.b, 1e-14)
		if err != nil {
			t.Errorf("%s: %v", c.what, err)
			continue
		}
		tol := 1e-13
		if c.what == "triple root" {
			tol = 1e-5 // (x−1)³ is lost in rounding below 1e-5
		}
		near.Rel(t, c.what, x, c.want, tol)
	}
	x, err := Root(func(x float64) float64 { return math.Atan(x) }, -1, 3, 1e-12)
	if err != nil {
		t.Fatal(err)
	}
	near.Abs(t, "zero at the origin", x, 0, 1e-15)
}

func TestRootRefuses(t *testing.T) {
	line := func(x float64) float64 { return x }
	for _, c := range []struct {
		what string
		f    func(float64) float64
		a, b float64
		want error
	}{
		{"no sign change", func(x float64) float64 { return x*x + 1 }, -1, 1, ErrNoBracket},
		{"empty interval", line, 1, 1, ErrInterval},
		{"reversed interval", line, 1, -1, ErrInterval},
		{"infinite end", line, -1, math.Inf(1), ErrInterval},
		{"NaN at an end", math.Sqrt, -1, 1, ErrNotFinite},
		{"NaN inside", func(x float64) float64 { return (x - 0.3) / ((x - 0.3) * (x - 0.3)) * math.Sqrt(math.Abs(x)-0.2) }, -1, 1, ErrNotFinite},
	} {
		if _, err := Root(c.f, c.a, c.b, 1e-12); !errors.Is(err, c.want) {
			t.Errorf("%s: got %v, want %v", c.what, err, c.want)
		}
	}
}

func TestRootTakesFewSteps(t *testing.T) {
	calls := 0
	_, err := Root(func(x float64) float64 { calls++; return math.Exp(x) - 2 }, 0, 4, 1e-15)
	if err != nil || calls > 14 {
		t.Errorf("%d calls, error %v; bisection would need about 50", calls, err)
	}
}
