package num

import (
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
)

func TestMaximum(t *testing.T) {
	for _, c := range []struct {
		what   string
		f      func(float64) float64
		a, b   float64
		x, y   float64
		xt, yt float64
	}{
		{"parabola", func(x float64) float64 { return 3 - (x-2)*(x-2) }, 0, 5, 2, 3, 1e-8, 1e-15},
		{"sine", math.Sin, 0, 3, math.Pi / 2, 1, 1e-7, 1e-15},
		{"cusp", func(x float64) float64 { return -math.Abs(x - 0.3) }, -1, 1, 0.3, 0, 1e-9, 1e-9},
		{"small scale", func(x float64) float64 { return 1 / (1 + math.Pow((x-13.5e-9)/0.3e-9, 2)) }, 12e-9, 15e-9, 13.5e-9, 1, 1e-9, 1e-15},
		{"rising", func(x float64) float64 { return x }, 1, 4, 4, 4, 0, 0},
		{"falling", func(x float64) float64 { return -x }, 1, 4, 1, -1, 0, 0},
		{"level", func(float64) float64 { return 7 }, 1, 4, 1, 7, 0, 0},
	} {
		x, y, err := Maximum(c.f, c.a, c.b, 1e-10)
		if err != nil {
			t.Errorf("%s: %v", c.what, err)
			continue
		}
		near.Rel(t, c.what+", place", x, c.x, c.xt)
		near.Abs(t, c.what+", value", y, c.y, c.yt)
	}
}

func TestMaximumRefuses(t *testing.T) {
	if _, _, err := Maximum(math.Sqrt, -1, 1, 1e-9); !errors.Is(err, ErrNotFinite) {
		t.Errorf("NaN at an end: %v", err)
	}
	hole := func(x float64) float64 { return math.Log(math.Abs(x) - 0.5) }
	if _, _, err := Maximum(hole, -1, 1, 1e-9); !errors.Is(err, ErrNotFinite) {
		t.Errorf("NaN inside: %v", err)
	}
	if _, _, err := Maximum(math.Sin, 2, 1, 1e-9); !errors.Is(err, ErrInterval) {
		t.Errorf("reversed: %v", err)
	}
}
