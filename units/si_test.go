package units

import "testing"

// siTable is testdata/si.json: facts of the SI Brochure, 9th edition, version
// 3.01 (2024), tables 2 to 8, and of the SI Reference Point 1.0.0 (2026).
type siTable struct {
	Base_units []struct{ Symbol, Dimension_symbol string }

	Derived_units_with_special_names []struct {
		Symbol         string
		Dimension      map[string]int
		In_other_units string
		Prefix_allowed bool
	}
	Prefixes []struct {
		Symbol      string
		Power_of_10 int
	}
	Non_SI_units_accepted []struct {
		Symbol                string
		Alternative_symbols   []string
		Factor_to_coherent_SI string
		Definition            string

		Factor_is_a_terminating_decimal_exactly_as_written bool

		Prefix_allowed_SIRP bool
	}
}

// dimensionSymbols are those of SI Brochure table 3; the table writes Theta.
var dimensionSymbols = map[string]Base{
	"T": TimeBase, "L": LengthBase, "M": MassBase, "I": CurrentBase, "Theta": TemperatureBase, "N": AmountBase, "J": LuminousBase,
}

func TestSIUnits(t *testing.T) {
	var table siTable
	readTable(t, "si.json", &table)
	var count rowCount
	for _, c := range table.Base_units {
		count.run++
		u := parse(t, c.Symbol)
		if u.dim != dimensionSymbols[c.Dimension_symbol].Of() || !u.scale.isOne() {
			t.Errorf("%s is %s of scale %v", c.Symbol, u.dim, u.scale)
		}
	}
	count.check(t, "si.json, base units", rowCount{run: 7})

	count = rowCount{}
	for _, c := range table.Derived_units_with_special_names {
		count.run++
		u := parse(t, c.Symbol)
		var want Dimension
		for symbol, n := range c.Dimension {
			want = want.with(dimensionSymbols[symbol], int8(n*sixths))
		}
		if u.dim != want || !u.scale.isOne() {
			t.Errorf("%s is %s of scale %v, want %s", c.Symbol, u.dim, u.scale, want)
		}
		if c.Symbol == celsius {
			t.Logf("the prefixes of %s are left out: %s", c.Symbol, isPoint)
			mustRefuse(t, "m°C", "m°C")
			continue
		}
		sameUnit(t, c.Symbol, u, parse(t, oneWordSI(c.In_other_units)))
		prefixed(t, c.Symbol, c.Prefix_allowed)
	}
	count.check(t, "si.json, derived units", rowCount{run: 22})

	count = rowCount{}
	for _, c := range table.Prefixes {
		count.run++
		got, err := Standard().Parse(c.Symbol + "m")
		if err != nil || got.scale.ten != c.Power_of_10 || !got.scale.onlyTens() {
			t.Errorf("%sm is %v of scale %v (%v), want 10^%d", c.Symbol, got, got.scale, err, c.Power_of_10)
		}
		mustRefuse(t, c.Symbol+"km", c.Symbol+"km") // no two prefixes
	}
	count.check(t, "si.json, prefixes", rowCount{run: 24})
}

func prefixed(t *testing.T, symbol string, allowed bool) {
	t.Helper()
	if _, err := Standard().Parse("k" + symbol); (err == nil) != allowed {
		t.Errorf("k%s: %v, prefix allowed: %v", symbol, err, allowed)
	}
}

var acceptedLeftOut = map[string]string{"Np": unknown("Np"), "B": unknown("B"), "dB": unknown("dB")}

func TestAcceptedUnits(t *testing.T) {
	var table siTable
	readTable(t, "si.json", &table)
	var count rowCount
	for _, c := range table.Non_SI_units_accepted {
		if _, out := acceptedLeftOut[c.Symbol]; out {
			count.leftOut++
			mustRefuse(t, c.Symbol, c.Symbol)
			continue
		}
		count.run++
		u := parse(t, c.Symbol)
		got, want := u.scale.rat(), ratio(t, c.Factor_to_coherent_SI)
		switch {
		case u.scale.pi != 0: // printed with fifty digits
			if !closeRat(got, want, "1e-49") {
				t.Errorf("%s is %s, want %s", c.Symbol, decimalText(got), c.Factor_to_coherent_SI)
			}
		case got.Cmp(want) != 0:
			t.Errorf("%s is %s, want %s (%s)", c.Symbol, decimalText(got), c.Factor_to_coherent_SI, c.Definition)
		}
		prefixed(t, c.Symbol, c.Prefix_allowed_SIRP)
		for _, other := range c.Alternative_symbols {
			sameUnit(t, other, parse(t, other), u)
		}
	}
	count.check(t, "si.json, accepted units", rowCount{run: 12, leftOut: 3})
}
