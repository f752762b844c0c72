package units

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// The concise form of the SI Brochure, 9th edition, 5.4.5; the first row is
// GUM 7.2.2, the second the neutron mass as the brochure prints it, both with
// two digits of the uncertainty.
func TestFormatUncertain(t *testing.T) {
	for _, c := range []struct {
		v, u float64
		want string
	}{
		{100.02147, 0.00035, "100.02147(35)"},
		{1.674927471e-27, 0.000000021e-27, "1.674927471(21)e-27"},
		{13.5, 0.02, "13.500(20)"},
		{30, 0.6, "30.00(60)"},
		{30, 0.0996, "30.00(10)"},
		{13.5, 1.2, "13.5(12)"},
		{0, 0.5, "0.00(50)"},
		{-13.5, 0.02, "-13.500(20)"},
		{0.001, 5, "0.0(50)"},
		{123456, 1500, "1.235(15)e5"},
		{1e7, 2e6, "1.00(20)e7"},
		{64, 0, "64(0)"},
		{3022, 112, "3020(110)"},
	} {
		if got := FormatUncertain(c.v, c.u, 5); got != c.want {
			t.Errorf("%g ± %g is %s, want %s", c.v, c.u, got, c.want)
		}
	}
	for _, c := range []struct {
		v, u float64
		want string
	}{{30, 1.2, "(30.0 ± 1.2)"}, {13.5, 0.04, "(13.500 ± 0.040)"}, {30, 0, "(30 ± 0)"}, {3022, 219, "(3020 ± 220)"}, {1.5e-9, 2e-11, "(1.500e-9 ± 2.0e-11)"}} {
		if got := FormatExpanded(c.v, c.u); got != c.want {
			t.Errorf("%g ± %g expanded is %s, want %s", c.v, c.u, got, c.want)
		}
	}
}

// What is written reads back, to half a digit of the uncertainty.
func TestUncertainReadsBack(t *testing.T) {
	random := rand.New(rand.NewPCG(9, 9))
	for range 20000 {
		v := random.NormFloat64() * math.Pow(10, float64(random.IntN(60)-30))
		u := math.Abs(v) * math.Pow(10, -10*random.Float64()+2)
		text := FormatUncertain(v, u, 5)
		value, spread, ok := SplitConcise(text)
		if !ok {
			t.Fatalf("%g ± %g is %s, no concise form", v, u, text)
		}
		gotV, errV := Unit{}.Read(value)
		gotU, errU := Unit{}.Read(spread)
		if errV != nil || errU != nil {
			t.Fatalf("%s: %s and %s, %v, %v", text, value, spread, errV, errU)
		}
		near.Rel(t, text+", uncertainty", gotU, u, 0.0501)
		near.Abs(t, text+", value", gotV, v, 0.0501*u)
	}
}

func TestSplitConcise(t *testing.T) {
	for _, c := range []struct{ text, value, spread string }{
		{"13.50(2)", "13.50", "0.02"},
		{"13.50(12)", "13.50", "0.12"},
		{"13.5(12)", "13.5", "1.2"},
		{"1.6(2)e-27", "1.6e-27", "0.2e-27"},
		{"7(0.5)", "7", "0.5"},
		{"7(2)", "7", "2"},
		{"100.02147(0.00035)", "100.02147", "0.00035"},
	} {
		if value, spread, ok := SplitConcise(c.text); !ok || value != c.value || spread != c.spread {
			t.Errorf("%s: %s and %s, %v", c.text, value, spread, ok)
		}
	}
	for _, text := range []string{"13.5", "13.5(2", "13.5)", ""} {
		if value, _, ok := SplitConcise(text); ok || value != text {
			t.Errorf("%q: %s, %v", text, value, ok)
		}
	}
}

func TestUnitOver(t *testing.T) {
	for _, c := range []struct{ of, per, same string }{
		{"mJ/cm^2", "nm", "mJ/(cm^2*nm)"}, {"W", "degC", "W/K"}, {"degC", "W", "K/W"}, {"1", "s", "1/s"}, {"m", "1", "m"}, {"nm^(1/2)", "nm^(1/2)", "m/m"},
	} {
		got, err := parse(t, c.of).Over(parse(t, c.per))
		if err != nil {
			t.Fatal(err)
		}
		sameUnit(t, c.of+" per "+c.per, got, parse(t, c.same))
		if strings.Contains(got.String(), celsius) {
			t.Errorf("%s per %s prints as %s", c.of, c.per, got)
		}
	}
	if u, err := parse(t, "m^21").Over(parse(t, "m^-1")); err == nil {
		t.Errorf("m^21 per m^-1 is %s", u)
	}
	if i := parse(t, "degC").Interval(); i.Point() || i.String() != "K" {
		t.Errorf("the interval of °C is %s", i)
	}
}
