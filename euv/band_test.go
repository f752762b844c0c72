package euv

import (
	"errors"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// The formula with 15 nodes is exact up to x²³, that with 7 up to x¹³, and not
// beyond: no digit of the nodes and weights can be wrong.
func TestKronrodIsExact(t *testing.T) {
	for power := range 27 {
		var values [panelNodes]float64
		for i, x := range kronrodNodes {
			values[i] = math.Pow(x, float64(power))
		}
		mean, deviation := panelMean(values[:])
		want := 0.0
		if power%2 == 0 {
			want = 1 / float64(power+1)
		}
		if power <= 23 {
			near.Abs(t, "mean of a power", mean, want, 1e-16)
		} else if power%2 == 0 && math.Abs(mean-want) < 1e-12 {
			t.Errorf("x^%d is integrated exactly", power)
		}
		if exact := deviation < 2e-16; exact != (power <= 13 || power%2 == 1) {
			t.Errorf("x^%d: the formulas differ by %g", power, deviation)
		}
	}
}

func TestBandMean(t *testing.T) {
	const center, width, kink = 13.5e-9, 0.6e-9, 13.4123e-9
	low, high := center-width/2, center+width/2
	for _, c := range []struct {
		what  string
		f     func(l float64) float64
		kinks []units.Length
		want  float64
		tol   float64
	}{
		{"constant", func(float64) float64 { return 0.7 }, nil, 0.7, 1e-14},
		{"line", func(l float64) float64 { return l / 13.5e-9 }, nil, 1, 1e-14},
		{
			"kink, told", func(l float64) float64 { return math.Abs(l-kink) / width },
			[]units.Length{kink, 1, 0},
			((kink-low)*(kink-low) + (high-kink)*(high-kink)) / (2 * width * width), 1e-14,
		},
		{
			"kink, not told", func(l float64) float64 { return math.Abs(l-kink) / width }, nil,
			((kink-low)*(kink-low) + (high-kink)*(high-kink)) / (2 * width * width), 1e-9,
		},
		{
			"Gaussian", func(l float64) float64 { return math.Exp(-math.Pow((l-13.45e-9)/0.05e-9, 2)) }, nil,
			0.05e-9 * math.Sqrt(math.Pi) / 2 * (math.Erf(0.35/0.05) + math.Erf(0.25/0.05)) / width, 1e-12,
		},
		{"step", func(l float64) float64 {
			if l < kink {
				return 1
			}
			return 0
		}, nil, (kink - low) / width, 1e-3},
		{"fringes", func(l float64) float64 { return math.Pow(math.Sin(2*math.Pi*(l-low)/(width/40)), 2) }, nil, 0.5, 1e-12},
	} {
		f := func(dst, wavelengths []float64) error {
			for i, l := range wavelengths {
				dst[i] = c.f(l)
			}
			return nil
		}
		mean, deviation, err := BandMean(f, center, width, c.kinks)
		if err != nil {
			t.Errorf("%s: %v", c.what, err)
			continue
		}
		near.Rel(t, c.what, mean, c.want, c.tol)
		if c.what != "step" && math.Abs(mean-c.want) > deviation+1e-12 {
			t.Errorf("%s: off by %g, said %g", c.what, math.Abs(mean-c.want), deviation)
		}
		t.Logf("%s: off by %.2g, estimate %.2g", c.what, math.Abs(mean-c.want), deviation)
	}
}

// A band prepared once and the adaptive mean agree on the eleventh power of a
// mirror, within their estimates.
func TestPreparedBand(t *testing.T) {
	s := mirror(t, 50, 6.95*nm, 2.5*nm).WithRoughness(0.7 * nm)
	kinks := s.Kinks(13*nm, 14*nm)
	if len(kinks) < 3 {
		t.Fatalf("only %d kinks between 13 nm and 14 nm", len(kinks))
	}
	b := sure(NewBand(13.5*nm, 0.27*nm, kinks))
	var e Evaluator
	wavelengths := b.Wavelengths()
	dst, values := make([]units.Ratio, len(wavelengths)), make([]float64, len(wavelengths))
	if err := errors.Join(e.Aim(wavelengths, 0, Unpolarised), e.Reflectivity(dst, s)); err != nil {
		t.Fatal(err)
	}
	for i, r := range dst {
		values[i] = math.Pow(float64(r), 11)
	}
	mean, deviation, err := b.Mean(values)
	if err != nil {
		t.Fatal(err)
	}
	one := ReflectivityOf(s, 0, Unpolarised)
	want, estimate, err := BandMean(func(dst, l []float64) error {
		err := one(dst, l)
		for i := range dst {
			dst[i] = math.Pow(dst[i], 11)
		}
		return err
	}, 13.5*nm, 0.27*nm, kinks)
	if err != nil {
		t.Fatal(err)
	}
	near.Rel(t, "mean", mean, want, 1e-12)
	t.Logf("mean %.12g, estimates %.2g and %.2g, %d wavelengths", mean, deviation, estimate, len(wavelengths))
	if deviation > 1e-8*mean || estimate > 1e-9*want {
		t.Errorf("estimates %g and %g of %g", deviation, estimate, mean)
	}
}

func TestBandEdges(t *testing.T) {
	square := func(dst, l []float64) error {
		for i := range dst {
			dst[i] = l[i] * l[i]
		}
		return nil
	}
	mean, deviation, err := BandMean(square, 13.5*nm, 0, nil)
	if err != nil || deviation != 0 {
		t.Errorf("a band without width: %g, %v", deviation, err)
	}
	near.Rel(t, "a band without width", mean, 13.5e-9*13.5e-9, 1e-15)
	for _, c := range [][2]units.Length{{0, 1}, {13.5 * nm, 27 * nm}, {13.5 * nm, -1}, {units.Length(math.NaN()), 1}, {1, units.Length(math.Inf(1))}} {
		_, _, err := BandMean(square, c[0], c[1], nil)
		var refused *ArgumentError
		if !errors.As(err, &refused) {
			t.Errorf("band %v: %v", c, err)
		}
	}
	poison := func(dst, l []float64) error { dst[len(dst)/2] = math.NaN(); return nil }
	if _, _, err := BandMean(poison, 13.5*nm, 0.1*nm, nil); err == nil {
		t.Error("a NaN travels on")
	}
	wrong := errors.New("wrong")
	if _, _, err := BandMean(func(_, _ []float64) error { return wrong }, 13.5*nm, nm, nil); !errors.Is(err, wrong) {
		t.Errorf("the error of the spectrum became %v", err)
	}
	b := sure(NewBand(13.5*nm, 0.1*nm, nil))
	if _, _, err := b.Mean(make([]float64, 3)); err == nil {
		t.Error("three values are taken")
	}
}
