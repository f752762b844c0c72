package units

import (
	"errors"
	"fmt"
	"math"
	"math/big"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// oracle reads a decimal in a unit by rational arithmetic alone. Where the
// scale is a root or holds π it is as good as their digits, far beyond a tie
// that a short decimal could come near.
func oracle(t *testing.T, text string, u Unit) float64 {
	t.Helper()
	r := ratio(t, text)
	r.Mul(r, u.scale.rat())
	if u.point {
		r.Add(r, big.NewRat(27315, 100))
	}
	v, _ := r.Float64()
	return v
}

func randomDecimal(random *rand.Rand) string {
	var b strings.Builder
	if random.IntN(2) == 0 {
		b.WriteByte('-')
	}
	digits := func(n int) {
		for range n {
			b.WriteByte(byte('0' + random.IntN(10)))
		}
	}
	digits(1 + random.IntN(9))
	if random.IntN(3) > 0 {
		b.WriteByte('.')
		digits(1 + random.IntN(24))
	}
	switch random.IntN(4) {
	case 0:
		fmt.Fprintf(&b, "e%d", random.IntN(660)-340)
	case 1:
		fmt.Fprintf(&b, "E%+d", random.IntN(60)-30)
	}
	return b.String()
}

func TestReadIsRoundedOnce(t *testing.T) {
	random := rand.New(rand.NewPCG(6, 6))
	for _, unit := range roundTripUnits {
		u := parse(t, unit)
		for range 700 {
			text := randomDecimal(random)
			want := oracle(t, text, u)
			got, err := u.Read(text)
			switch {
			case math.IsInf(want, 0):
				if !errors.Is(err, ErrTooLarge) {
					t.Fatalf("%s %s: %g, %v, want ErrTooLarge", text, unit, got, err)
				}
			case want == 0 && ratio(t, text).Sign() != 0 && !u.point:
				if !errors.Is(err, ErrTooSmall) {
					t.Fatalf("%s %s: %g, %v, want ErrTooSmall", text, unit, got, err)
				}
			case err != nil || got != want:
				t.Fatalf("%s %s: %g, %v, want %g", text, unit, got, err, want)
			}
		}
	}
}

// Decimals that lie on or beside the middle of two float64s, where a second
// rounding goes wrong.
func TestReadBesideTies(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 6))
	for _, unit := range []string{"1", "nm", "eV", "Torr", "inch", "km/h", "°C", "au", "Da", "mJ/cm^2"} {
		u := parse(t, unit)
		for range 200 {
			v := math.Ldexp(1+random.Float64(), random.IntN(60)-20)
			middle := new(big.Rat).SetFloat64(v)
			middle.Add(middle, new(big.Rat).SetFloat64(math.Nextafter(v, math.Inf(1))))
			middle.Quo(middle, big.NewRat(2, 1))
			if u.point {
				middle.Sub(middle, big.NewRat(27315, 100))
			}
			middle.Quo(middle, u.scale.rat())
			for _, decimals := range []int{17, 30, 60, 120} {
				text := middle.FloatString(decimals)
				if ratio(t, text).Sign() == 0 {
					continue
				}
				got, err := u.Read(text)
				if want := oracle(t, text, u); err != nil || got != want {
					t.Fatalf("%s %s: %g, %v, want %g", text, unit, got, err, want)
				}
			}
		}
	}
}

// Square roots against math/big's own.
func TestReadInRoots(t *testing.T) {
	for _, c := range []struct{ unit, radicand string }{{"nm^(1/2)", "1e-9"}, {"min^(1/2)", "60"}, {"Torr^(1/2)", "20265/152"}, {"eV^(1/2)", "1.602176634e-19"}} {
		want := new(big.Float).SetPrec(200).SetRat(ratio(t, c.radicand))
		f, _ := want.Sqrt(want).Float64()
		got, err := parse(t, c.unit).Read("1")
		if err != nil {
			t.Fatal(err)
		}
		near.Abs(t, "1 "+c.unit, got, f, 0)
	}
	got, _ := parse(t, "h^(1/3)").Read("1")
	near.Rel(t, "1 h^(1/3)", got, math.Cbrt(3600), 2e-16)
}

func TestReadRefusals(t *testing.T) {
	for _, c := range []struct {
		text, unit string
		want       error
	}{
		{"", "m", ErrNumber},
		{"-", "m", ErrNumber},
		{"+1", "m", ErrNumber},
		{".5", "m", ErrNumber},
		{"5.", "m", ErrNumber},
		{"1.2.3", "m", ErrNumber},
		{"1e", "m", ErrNumber},
		{"1e+", "m", ErrNumber},
		{"e5", "m", ErrNumber},
		{"1e5e5", "m", ErrNumber},
		{"1e5.5", "m", ErrNumber},
		{"1,5", "m", ErrNumber},
		{"1 000", "m", ErrNumber},
		{"1_000", "m", ErrNumber},
		{"--1", "m", ErrNumber},
		{"0x10", "m", ErrNumber},
		{"Inf", "m", ErrNumber},
		{"NaN", "m", ErrNumber},
		{"1e--5", "m", ErrNumber},
		{"1e_5", "m", ErrNumber},
		{"１", "m", ErrNumber},
		{"1\x00", "m", ErrNumber},
		{"1e5 ", "m", ErrNumber},
		{"", "°C", ErrNumber},
		{"x", "°C", ErrNumber},
		{"1e309", "m", ErrTooLarge},
		{"-1e309", "m", ErrTooLarge},
		{"1.8e308", "m", ErrTooLarge},
		{"1e290", "Qm", ErrTooLarge},
		{"1e999999999", "m", ErrTooLarge},
		{"1e99999999999999999999999", "m", ErrTooLarge},
		{"1e309", "°C", ErrTooLarge},
		{"1e500", "°C", ErrTooLarge},
		{"-1e99999999999999999999", "°C", ErrTooLarge},
		{"1e-330", "m", ErrTooSmall},
		{"2.4e-324", "m", ErrTooSmall},
		{"-1e-400", "m", ErrTooSmall},
		{"1e-300", "qm", ErrTooSmall},
		{"1e-99999999999999999999999", "m", ErrTooSmall},
		{"1e-999999999", "m", ErrTooSmall},
	} {
		if v, err := parse(t, c.unit).Read(c.text); !errors.Is(err, c.want) || v != 0 {
			t.Errorf("%q %s: %g, %v, want %v", c.text, c.unit, v, err, c.want)
		}
	}
	for _, c := range []struct {
		text, unit string
		want       float64
	}{
		{"0e99999999999999999999", "m", 0},
		{"0.000e-99999999999", "m", 0},
		{"1e-99999999999999999999", "°C", 273.15},
		{"1.7976931348623157e308", "m", math.MaxFloat64},
		{"2.5e-324", "m", 0x1p-1074},
		{"1e0000000000000000003", "m", 1000},
		{"1e-340", "Qm", 1e-310},
		{"1e330", "qm", 1e300},
		{"007", "m", 7},
		{"1.79e308", "°C", 1.79e308},
	} {
		got, err := parse(t, c.unit).Read(c.text)
		if err != nil {
			t.Errorf("%s %s: %v", c.text, c.unit, err)
		}
		near.Abs(t, c.text+" "+c.unit, got, c.want, 0)
	}
}

// The size of a number is judged with that of the unit.
func TestReadInFarUnits(t *testing.T) {
	for _, c := range []struct{ text, unit string }{
		{"1.5e-500", "au^21"}, {"1.5e401", "au^-21"}, {"2e-350", "psi^10"}, {"7e420", "deg^-20/au^21"}, {"3e-300", "photon/qm^9"},
	} {
		u := parse(t, c.unit)
		got, err := u.Read(c.text)
		if err != nil {
			t.Errorf("%s %s: %v", c.text, c.unit, err)
		}
		near.Abs(t, c.text+" "+c.unit, got, oracle(t, c.text, u), 0)
	}
}

// No number is too long to be right.
func TestReadLongNumbers(t *testing.T) {
	nines, zeros := strings.Repeat("9", 60_000), strings.Repeat("0", 60_000)
	for _, c := range []struct {
		text, unit string
		want       float64
		err        error
	}{
		{nines, "m", 0, ErrTooLarge},
		{"0." + nines, "m", 1, nil},
		{"0." + nines, "inch", 0.0254, nil},
		{"0." + nines, "Torr", 101325. / 760, nil},
		{"0." + nines, "°C", 274.15, nil},
		{"0." + zeros + "1", "Torr", 0, ErrTooSmall},
		{"0." + zeros + "1e60001", "Torr", 101325. / 760, nil},
		{"1" + zeros + "e-60000", "deg", math.Pi / 180, nil},
		{"1" + zeros + "e-60000", "°C", 274.15, nil},
		{nines + "e-60000", "nm^(1/2)", math.Sqrt(1e-9), nil},
		{zeros + "1", "psi", 8896443230521. / 1290320000, nil},
		{"-0." + zeros + "1", "°C", 273.15, nil},
	} {
		got, err := parse(t, c.unit).Read(c.text)
		if !errors.Is(err, c.err) {
			t.Errorf("%s…%s %s: %v, want %v", c.text[:9], c.text[len(c.text)-9:], c.unit, err, c.err)
		}
		near.Abs(t, c.text[:9]+"… "+c.unit, got, c.want, 0)
	}
}

func TestFromAndSI(t *testing.T) {
	random := rand.New(rand.NewPCG(8, 6))
	for _, unit := range roundTripUnits {
		u := parse(t, unit)
		for range 200 {
			v := random.NormFloat64()
			scale := u.scale.rat()
			want, _ := new(big.Rat).Quo(new(big.Rat).SetFloat64(v), scale).Float64()
			near.Abs(t, "FromDifference "+unit, u.FromDifference(v), want, 0)
			want, _ = scale.Mul(scale, new(big.Rat).SetFloat64(v)).Float64()
			if u.scale.root == 0 {
				near.Abs(t, "SI "+unit, u.SI(v), want, 0)
			}
			near.Rel(t, "SI "+unit, u.SI(v), want, 0x1p-52)
		}
	}
	if got := parse(t, "nm").From(math.Inf(1)); !math.IsInf(got, 1) {
		t.Errorf("From(Inf) is %g", got)
	}
	if got := parse(t, "Torr").From(math.NaN()); !math.IsNaN(got) {
		t.Errorf("From(NaN) is %g", got)
	}
}
