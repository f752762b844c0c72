package units

import (
	"math/big"
	"testing"

	"example.com/dosewright/internal/near"
)

// conversion is a row of testdata/conversions.json: factors of NIST SP 811
// (2008) appendix B, the SI Brochure, 9th edition, and CODATA 2022, each row
// with its own source.
type conversion struct {
	ID, Kind, From, To string
	Factor             string
	Factor_rational    string
	Contains_pi        bool
	Input, Output      string
	Issue, Expected    string
}

// conversionsLeftOut says why a row of the table is not run.
var conversionsLeftOut = map[string]string{
	"C011": unknown("erg"), "C013": unknown("cal_IT"), "C014": unknown("kcal_th"), "C015": unknown("Btu_IT"),
	"C016": unknown("Btu_th"), "C018": unknown("t_TNT"), "C019": unknown("E_h"), "C020": unknown("E_h"),
	"C021": unknown("therm_EC"), "C024": unknown("hp_550ftlbf"), "C029": unknown("cal_th"),
	"C030": unknown("ton_refrigeration"), "C036": unknown("mmHg"), "C038": unknown("ksi"), "C039": unknown("inHg"),
	"C040": unknown("inH2O"), "C041": unknown("cmH2O"), "C043": unknown("dyn"), "C058": isSeveral,
	"C061": unknown("ft"), "C062": unknown("ft_US_survey"), "C064": unknown("mi"), "C065": unknown("nmi"),
	"C067": unknown("micron"), "C070": unknown("pt_computer"), "C080": unknown("barn"), "C083": isInch,
	"C084": unknown("ft"), "C085": unknown("gal_US"), "C093": unknown("year_365d"), "C099": unknown("wk"),
	"C106": unknown("r"), "C110": unknown("sphere"), "C133": isWrongDim, "C138": unknown("lb"), "C140": unknown("gr"),
	"C144": unknown("m_e"), "C148": unknown("lb"), "C149": unknown("lb"), "C154": unknown("dyn"),
	"C157": unknown("dyn"), "C158": unknown("P"), "C159": unknown("cP"), "C161": unknown("cSt"),
	"C166": unknown("gal_US"), "C171": unknown("mi"), "C172": unknown("ft"), "C175": unknown("g_n"),
	"C180": unknown("Btu_IT"), "C181": unknown("Btu_IT"), "C183": unknown("ft"), "C187": unknown("ft"),
	"C188": unknown("cal_th"), "C191": unknown("Btu_IT"), "C199": isInch, "C208": unknown("°R"), "C210": unknown("G"),
	"C213": unknown("Ci"), "C215": unknown("phot"),
	"A13": unknown("°F"), "A14": unknown("°F"), "A18": unknown("°F"), "A21": unknown("°F"),
	"A22": unknown("°R"), "A23": unknown("°R"),
}

// The spellings of the table are made one word mechanically: a blank between
// symbols is a product, and “(difference)” behind a unit is dropped, since the
// row's kind says the same.
func TestConversions(t *testing.T) {
	var table struct{ Cases []conversion }
	readTable(t, "conversions.json", &table)
	var count rowCount
	for _, c := range table.Cases {
		from, to := oneWordSI(c.From), oneWordSI(c.To)
		if _, out := conversionsLeftOut[c.ID]; out {
			count.leftOut++
			if _, err := Standard().Parse(to); err == nil {
				mustRefuse(t, c.ID, from)
			}
			continue
		}
		count.run++
		switch c.Kind {
		case "linear", "difference":
			c.linear(t, from, to)
		case "affine":
			c.affine(t, from, to)
		default:
			t.Errorf("%s: kind %q is not known to this test", c.ID, c.Kind)
		}
	}
	count.check(t, "conversions.json, cases", rowCount{run: 54, leftOut: 65})
}

// linear checks a factor exactly, and the reading and stating of 1.
func (c conversion) linear(t *testing.T, from, to string) {
	u, v := parse(t, from), parse(t, to)
	if u.dim != v.dim {
		t.Errorf("%s: %s is %s, %s is %s", c.ID, from, u.dim, to, v.dim)
		return
	}
	got := new(big.Rat).Quo(u.scale.rat(), v.scale.rat())
	want := ratio(t, c.Factor)
	switch {
	case c.Factor_rational != "":
		want = ratio(t, c.Factor_rational)
		fallthrough
	default:
		if got.Cmp(want) != 0 {
			t.Errorf("%s: 1 %s = %s %s, want %s", c.ID, from, decimalText(got), to, c.Factor)
		}
	case c.Contains_pi: // printed with thirty digits
		if !closeRat(got, want, "1e-29") {
			t.Errorf("%s: 1 %s = %s %s, want %s", c.ID, from, decimalText(got), to, c.Factor)
		}
	}
	si, err := u.ReadDifference("1")
	if err != nil {
		t.Fatal(err)
	}
	f, _ := want.Float64()
	near.Rel(t, c.ID+": 1 "+from+" in "+to, v.FromDifference(si), f, 4e-16)
}

// affine checks the reading of a point and its stating in another unit.
func (c conversion) affine(t *testing.T, from, to string) {
	si, err := parse(t, from).Read(c.Input)
	if err != nil {
		t.Fatal(err)
	}
	want, _ := ratio(t, c.Output).Float64()
	near.Abs(t, c.ID+": "+c.Input+" "+from+" in "+to, parse(t, to).From(si), want, 0)
}

// negativesLeftOut says why a negative row is not run.
var negativesLeftOut = map[string]string{
	"N02": unknown("mmHg"), "N06": isRadian, "N07": isTradeUnit, "N12": isSeveral,
}

func TestNegativeConversions(t *testing.T) {
	var table struct{ Negative_cases []conversion }
	readTable(t, "conversions.json", &table)
	run := map[string]func(c conversion){
		"N01": func(c conversion) { // 5 °C − 2 °C = 3 K, 5 °C is 278.15 K
			u := parse(t, "°C")
			five, _ := u.Read("5")
			two, _ := u.Read("2")
			near.Abs(t, "5 °C", five, 278.15, 0)
			near.Abs(t, "5 °C − 2 °C", five-two, 3, 1e-13)
			three, _ := u.ReadDifference("3")
			near.Abs(t, "a difference of 3 °C", three, 3, 0)
		},
		"N03": func(c conversion) { mustRefuse(t, c.ID, c.From) },
		"N04": func(c conversion) {
			if parse(t, c.From).dim == parse(t, c.To).dim {
				t.Errorf("%s: %s and %s have one dimension", c.ID, c.From, c.To)
			}
		},
		"N05": func(c conversion) { sameUnit(t, c.ID, parse(t, c.From), parse(t, c.To)) },
		"N08": func(c conversion) {
			if got := parse(t, c.From).scale.rat(); got.Cmp(ratio(t, "1e-9")) != 0 {
				t.Errorf("%s: ppb is %s", c.ID, got)
			}
		},
		"N09": func(c conversion) { mustRefuse(t, c.ID, c.From) },
		"N10": func(c conversion) { mustRefuse(t, c.ID, c.From) },
		"N11": func(c conversion) { mustRefuse(t, c.ID, c.From) },
	}
	var count rowCount
	for _, c := range table.Negative_cases {
		check, ok := run[c.ID]
		_, out := negativesLeftOut[c.ID]
		switch {
		case ok == out:
			t.Errorf("%s (%s) must be run or left out", c.ID, c.Issue)
		case out:
			count.leftOut++
		default:
			count.run++
			check(c)
		}
	}
	count.check(t, "conversions.json, negative cases", rowCount{run: 8, leftOut: 4})
}

// The units of the trade that the published rows spell otherwise.
func TestFactorsOfTheTrade(t *testing.T) {
	for _, c := range []struct{ unit, si, want, source string }{
		{"inch^3", "m^3", "1.6387064E-5", "NIST SP 811 (2008), B.8, cubic inch"},
		{"inch", "m", "2.54E-2", "NIST SP 811 (2008), B.8"},
		{"kWh", "J", "3.6E+6", "NIST SP 811 (2008), B.8"},
		{"year", "d", "365.25", "the Julian year, IAU Style Manual (from memory)"},
		{"bar", "Pa", "1E+5", "NIST SP 811 (2008), B.8"},
		{"angstrom", "nm", "0.1", "NIST SP 811 (2008), B.8"},
	} {
		got := new(big.Rat).Quo(parse(t, c.unit).scale.rat(), parse(t, c.si).scale.rat())
		if got.Cmp(ratio(t, c.want)) != 0 {
			t.Errorf("1 %s = %s %s, want %s (%s)", c.unit, decimalText(got), c.si, c.want, c.source)
		}
	}
}
