package units

import (
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// roundTripUnits are of every sort: powers of ten of both signs, rationals, π,
// a zero of its own, roots, large and small.
var roundTripUnits = []string{
	"1", "m", "nm", "mJ/cm^2", "°C", "Torr", "mTorr", "deg", "arcsec", "psi", "m^(1/2)", "nm^(1/2)", "min^(1/3)",
	"deg^(1/2)", "(Torr/min)^(5/6)", "eV", "keV/nm^3", "Da", "au", "inch", "year", "L/min", "wafer/h", "kWh/wafer",
	"%/Gpulse", "ppm/K", "qm", "Qm", "atm*L", "mm^3/h^2", "1/eV", "psi^-1", "Qm^9", "qm^9", "km/h", "ns^-2",
}

// whatever returns a float64 of any size, the usual ones often.
func whatever(random *rand.Rand) float64 {
	switch random.IntN(4) {
	case 0:
		for {
			if v := math.Float64frombits(random.Uint64()); !math.IsNaN(v) && !math.IsInf(v, 0) {
				return v
			}
		}
	case 1:
		return float64(random.IntN(200000)-100000) / 1000
	case 2:
		return math.Ldexp(random.Float64()-0.5, random.IntN(80)-40)
	}
	return random.NormFloat64() * 300
}

func TestUnitStringReadsBack(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 5))
	symbols := Standard().Words()
	for range 5000 {
		text := randomUnit(random, symbols, 3)
		u, err := Standard().Parse(text)
		if err != nil {
			continue // an exponent or a length out of range
		}
		sameUnit(t, text+" as "+u.String(), parse(t, u.String()), u)
		if again := parse(t, u.String()).String(); again != u.String() {
			t.Errorf("%s prints as %s, and that as %s", text, u, again)
		}
	}
	for _, text := range roundTripUnits {
		sameUnit(t, text, parse(t, parse(t, text).String()), parse(t, text))
	}
}

// randomUnit writes a unit, rarely an illegal one.
func randomUnit(random *rand.Rand, symbols []string, depth int) string {
	var b strings.Builder
	for i := range 1 + random.IntN(3) {
		if i > 0 {
			b.WriteString([]string{"*", "/", "·"}[random.IntN(3)])
		}
		if depth > 0 && random.IntN(4) == 0 {
			b.WriteString("(" + randomUnit(random, symbols, depth-1) + ")")
		} else {
			b.WriteString([]string{"", "", "m", "k", "µ"}[random.IntN(5)] + symbols[random.IntN(len(symbols))])
		}
		b.WriteString([]string{"", "", "", "^2", "^-1", "³", "⁻²", "^(1/2)", "^(-2/3)", "-1", "2"}[random.IntN(11)])
	}
	return b.String()
}

func TestDigitsReadBackExactly(t *testing.T) {
	random := rand.New(rand.NewPCG(2, 5))
	edges := []float64{
		0, 1, -1, 273.15, 295.15, 300, 0x1p-1074, 0x1p-1022, 0x1.fffffffffffffp-1023, math.MaxFloat64, -math.MaxFloat64,
		1e16, 1e17, 1e22, 1e23, 0.1, 1. / 3, 13.5e-9,
	}
	for _, text := range roundTripUnits {
		u := parse(t, text)
		for i := range 400 {
			si := whatever(random)
			if i < len(edges) {
				si = edges[i]
			}
			got, err := u.Read(u.Digits(si))
			if err != nil || got != si {
				t.Fatalf("%g in %s is %s, which reads as %g (%v)", si, text, u.Digits(si), got, err)
			}
		}
	}
}

func TestDigitsAreShort(t *testing.T) {
	for _, c := range []struct{ number, unit string }{
		{"13.5", "nm"},
		{"30", "mJ/cm^2"},
		{"22", "°C"},
		{"0", "°C"},
		{"-5", "°C"},
		{"26.85", "°C"},
		{"-273.15", "°C"},
		{"6", "deg"},
		{"0.1", "Torr"},
		{"14.7", "psi"},
		{"91.84", "eV"},
		{"2", "year"},
		{"0", "m"},
		{"64", "1"},
		{"0.123456789012345", "L/min"},
		{"5e-324", "m"},
		{"1e-320", "m"},
		{"1e+22", "m"},
		{"4.2", "nm^(1/2)"},
	} {
		u := parse(t, c.unit)
		si, err := u.Read(c.number)
		if err != nil {
			t.Fatal(err)
		}
		if got := u.Digits(si); got != c.number {
			t.Errorf("%s %s comes back as %s", c.number, c.unit, got)
		}
	}
	for _, si := range []float64{math.Inf(1), math.Inf(-1), math.NaN()} {
		if _, err := parse(t, "°C").Read(parse(t, "°C").Digits(si)); err == nil {
			t.Errorf("%g has digits", si)
		}
	}
}

// Text at 17 digits reads back within the rounding of From, half a unit in the
// last place, and that of 17 digits.
func TestTextReadsBack(t *testing.T) {
	s := Standard()
	random := rand.New(rand.NewPCG(3, 5))
	dims := []Dimension{{}}
	for _, text := range roundTripUnits {
		dims = append(dims, parse(t, text).dim)
	}
	for d := range s.habits() {
		dims = append(dims, d)
	}
	for _, d := range dims {
		for range 60 {
			q := New(math.Ldexp(random.Float64()-0.5, random.IntN(160)-80), d)
			back := readText(t, s.Text(q, 17))
			if back.dim != d {
				t.Fatalf("%s is %s, want %s", s.Text(q, 17), back.dim, d)
			}
			near.Rel(t, s.Text(q, 17), back.si, q.si, 0x1p-51)
			five := readText(t, s.Text(q, 5))
			near.Rel(t, s.Text(q, 5), five.si, q.si, 0.5001e-4)
		}
	}
	c := parse(t, "°C")
	for range 1000 {
		si := 1000 * random.Float64()
		back := readText(t, s.TextIn(si, c, 17))
		near.Abs(t, s.TextIn(si, c, 17), back.si, si, 0x1p-43)
	}
}

// readText reads a number, a blank where there is one, and a unit.
func readText(t *testing.T, text string) Quantity {
	t.Helper()
	number, unit, _ := strings.Cut(text, " ")
	if unit == "" {
		unit = "1"
	}
	u := parse(t, unit)
	si, err := u.Read(number)
	if err != nil {
		t.Fatalf("%s: %v", text, err)
	}
	return New(si, u.dim)
}

func TestTextBeyondFloat64(t *testing.T) {
	for _, c := range []struct {
		si   float64
		unit string
		text string
	}{
		{1e300, "qm", "1.0000e330 qm"},
		{-1e300, "qm", "-1.0000e330 qm"},
		{1e-300, "Qm", "1.0000e-330 Qm"},
		{0, "Qm", "0 Qm"},
		{math.Inf(1), "m", "+Inf m"},
		{math.NaN(), "m", "NaN m"},
	} {
		if got := Standard().TextIn(c.si, parse(t, c.unit), 5); got != c.text {
			t.Errorf("%g in %s is %s, want %s", c.si, c.unit, got, c.text)
		}
	}
}

// A root of a scale comes back exactly when it is raised again.
func TestRootsAreExact(t *testing.T) {
	for _, c := range []struct{ text, same string }{
		{"(nm^(1/2))^2", "nm"},
		{"nm^(1/2)*nm^(1/2)", "nm"},
		{"min^(1/3)*min^(2/3)", "min"},
		{"(deg^(1/6))^6", "deg"},
		{"h^(1/2)*h^(1/3)*h^(1/6)", "h"},
		{"Torr^(1/2)/Torr^(1/3)", "Torr^(1/6)"},
		{"(cm^2)^(1/2)", "cm"},
		{"(h*s)^(1/2)", "min"},
		{"(h*s)^(1/2)", "min"},
		{"cm^(-1/2)*cm^(-1/2)", "cm^-1"},
	} {
		sameUnit(t, c.text, parse(t, c.text), parse(t, c.same))
	}
}
