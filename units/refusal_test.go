package units

import (
	"errors"
	"strings"
	"testing"
)

// Every refusal says what, and one way on where the unit alone shows one (a
// word that may be a name has none here: whoever knows the names adds it).
func TestRefusals(t *testing.T) {
	for _, c := range []struct {
		text      string
		msg, hint string // parts of each
		mark      string // the marked part of the text
	}{
		{"", "a unit is missing", "1 for a pure number", ""},
		{"\u200b", "a unit is missing", "1 for a pure number", "\u200b"},
		{"W/m*K", "two ways (SI Brochure 5.2)", "write W/(m*K) or W*K/m", "W/m*K"},
		{"W/m·K", "two ways", "write W/(m*K) or W*K/m", "W/m·K"},
		{"W/m2.K", "a point does not join", "write W/(m2*K) or W*K/m2", "."},
		{"W/m K", "one word without blanks", "write W/(m*K) or W*K/m", " "},
		{"mJ/cm2.s", "a point does not join", "write mJ/(cm2*s) or mJ*s/cm2", "."},
		{"1/m*K", "two ways", "write 1/(m*K) or K/m", "1/m*K"},
		{"/m*K", "two ways", "write /(m*K) or K/m", "/m*K"},
		{"W/m2/K*s", "two ways", "parentheses", "W/m2/K*s"},
		{"(W/m*K)", "two ways", "parentheses", "W/m*K)"},
		{"sccm", "sccm depends on a reference temperature and pressure", "1.5 L/min", "sccm"},
		{"mil", "several meanings", "0.001 inch", "mil"},
		{"in", "a word of the language", "write inch", "in"},
		{"cal", "several values", "in J", "cal"},
		{"gal", "several meanings", "in L", "gal"},
		{"ton", "several meanings", "write t", "ton"},
		{"oz", "several meanings", "in g", "oz"},
		{"Btu", "several values", "kJ", "Btu"},
		{"ppt", "two meanings", "5e-12", "ppt"},
		{"psig", "gauge pressure", "absolute", "psig"},
		{"dB/m", "a logarithm", "number", "dB"},
		{"a", "year", "write year", "a"},
		{"Nm", "slip for nm", "write N*m or nm", "Nm"},
		{"nM", "slip for nm", "nmol/L", "nM"},
		{"u", "micro prefix", "write Da", "u"},
		{"KHz", "KHz is no unit", "kHz", "KHz"},
		{"mj", "mj is no unit", "mJ", "mj"},
		{"hz", "hz is no unit", "Hz", "hz"},
		{"ev", "ev is no unit", "eV", "ev"},
		{"Kg", "Kg is no unit", "kg", "Kg"},
		{"mJ/CM^2", "CM is no unit", "cm", "CM"},
		{"torr", "torr is no unit", "Torr", "torr"},
		{"kmin", "kmin is no unit", "in min", "kmin"},
		{"mkg", "mkg is no unit", "in kg", "mkg"},
		{"°F", "°F is no unit", "°C or K", "°F"},
		{"℉", "°F is no unit", "K", "℉"},
		{"degF", "degF is no unit", "degC or K", "degF"},
		{"м", "U+043C", "Latin", "м"},
		{"m/с", "U+0441", "Latin", "с"},
		{"ν", "U+03BD", "Latin", "ν"},
		{"Αm", "U+0391", "Latin", "Αm"},
		{"m**2", "** is no power", "write m^2", "**"},
		{"m**2/s**2", "** is no power", "write m^2/s^2", "**"},
		{"m2.5", "a power is a whole number", "m^2", "2.5"},
		{"m^2.5", "a power is a whole number", "m^2", "^2.5"},
		{"m²^2", "a power is a whole number", "m^2", "²^2"},
		{"m^", "a power is a whole number", "m^2", "^"},
		{"m^(1/2", "a power is a whole number", "m^2", "^(1/2"},
		{"m^+2", "a power is a whole number", "m^2", "^+2"},
		{"m^(1/0)", "a power is a whole number", "m^2", "^(1/0"},
		{"m^(1/-2)", "a power is a whole number", "m^2", "^(1/-2"},
		{"m^(x)", "a power is a whole number", "m^2", "^("},
		{"m^(0/2)", "zero leaves no unit", "leave the symbol out", "^(0"},
		{"m^127", "a power is a whole number", "m^2", "^127"},
		{"m^0", "zero leaves no unit", "leave the symbol out", "^0"},
		{"m^22", "-21 to 21", "1/6", "m^22"},
		{"m^(1/4)", "multiple of a sixth", "1/6", "m^(1/4)"},
		{"F^6", "-21 to 21", "multiply", "F^6"},
		{"Qm^11", "outside of 1e-300 to 1e300", "multiply", "Qm^11"},
		{"m+2", "no plus sign", "write m^2", "+"},
		{"m.s", "a point does not join", "write m*s", "."},
		{"g.m.s", "a point does not join", "write g*m*s", "."},
		{"m s", "one word without blanks", "write m*s", " "},
		{" m", "one word without blanks", "write m", " "},
		{"W / m", "one word without blanks", "write W/m", " "},
		{"mJ per cm2", "one word without blanks", "write mJ/cm2", " "},
		{"W/(m K)", "one word without blanks", "write W/(m*K)", " "},
		{"m\u00a0s", "one word without blanks", "write m*s", "\u00a0"},
		{"m qqx", "one word without blanks", "join symbols", " "},
		{"12h", "no number", "as in 12 h", "12"},
		{"g/12h", "no number", "as in 12 h", "12"},
		{"1e3", "no number", "as in 12 h", "1"},
		{"2*m", "no number", "12 h", "2"},
		{"1/1", "no number", "12 h", "1"},
		{"(m", "not closed", "write )", "(m"},
		{"m)", "never opened", "leave it out", ")"},
		{"m()", "a mark is missing before", "* or /", "("},
		{"()", "empty", "leave it out", ")"},
		{"m/", "breaks off", "the symbol that follows", "/"},
		{"m*", "breaks off", "symbol", "*"},
		{"m//s", "a symbol is missing", "leave the mark out", "/"},
		{"m·/s", "a symbol is missing", "leave the mark out", "/"},
		{"{photon}/nm2", "brackets and braces", "photon/nm^2", "{"},
		{"m[2]", "brackets and braces", "photon/nm^2", "["},
		{"m;", "';' has no meaning", "joined by", ";"},
		{"m-", "'-' has no meaning", "joined by", "-"},
		{"m\x00", "has no meaning", "joined by", "\x00"},
		{"m\xff", "no UTF-8", "UTF-8", "\xff"},
		{"\xff", "no UTF-8", "UTF-8", "\xff"},
		{"n", "n alone is a prefix", "", "n"},
		{"W/n", "n alone is a prefix", "", "n"},
		{"da", "da alone is a prefix", "", "da"},
		{"x", "x is no unit", "", "x"},
		{"W/dose", "dose is no unit", "", "dose"},
		{"m_inc", "m_inc is no unit", "", "m_inc"},
		{strings.Repeat("m*", 100) + "m", "at most 200 bytes", "multiply", ""},
		{"(" + strings.Repeat("K*", 40) + "rad)^(1/6)", "at most 200 bytes when it is printed", "multiply", ""},
	} {
		_, err := Standard().Parse(c.text)
		var bad *ParseError
		if !errors.As(err, &bad) {
			t.Errorf("%q: %v, want a *ParseError", c.text, err)
			continue
		}
		if !strings.Contains(bad.Msg, c.msg) || !strings.Contains(bad.Hint, c.hint) || (c.hint == "") != (bad.Hint == "") {
			t.Errorf("%q: %q with the hint %q, want %q and %q", c.text, bad.Msg, bad.Hint, c.msg, c.hint)
		}
		if text := err.Error(); !strings.HasPrefix(text, bad.Msg) || !strings.HasSuffix(text, bad.Hint) {
			t.Errorf("%q: the error reads %q", c.text, text)
		}
		if bad.Text != c.text || bad.Start < 0 || bad.End > len(c.text) || bad.Start > bad.End {
			t.Errorf("%q: marks %d to %d of %q", c.text, bad.Start, bad.End, bad.Text)
			continue
		}
		if got := c.text[bad.Start:bad.End]; c.mark != "" && got != c.mark {
			t.Errorf("%q: marks %q, want %q", c.text, got, c.mark)
		}
		offered(t, bad.Hint)
	}
}

// offered holds that every unit that a hint offers is one.
func offered(t *testing.T, hint string) {
	t.Helper()
	rest, ok := strings.CutPrefix(hint, "write ")
	words := strings.Split(rest, " or ")
	for _, word := range words {
		if ok && len(word) > 1 && strings.ContainsAny(word, "*/^") && !strings.Contains(word, " ") {
			parse(t, word)
		}
	}
}

// Spellings that are taken for the one that is printed.
func TestSpellings(t *testing.T) {
	for _, c := range []struct{ text, printed string }{
		{"um", "µm"},
		{"μm", "µm"},
		{"µm", "µm"},
		{"Å", "Å"},
		{"\u212b", "Å"},
		{"A\u030a", "Å"},
		{"angstrom", "Å"},
		{"kΩ", "kΩ"},
		{"k\u2126", "kΩ"},
		{"kohm", "kΩ"},
		{"kOhm", "kΩ"},
		{"\u212a", "K"},
		{"℃", "°C"},
		{"degC", "°C"},
		{"ºC", "°C"},
		{"º", "°"},
		{"deg", "°"},
		{"arcmin", "′"},
		{"'", "′"},
		{"arcsec", "″"},
		{"''", "″"},
		{"l", "L"},
		{"years", "year"},
		{"wafers/h", "wafer/h"},
		{"cm2", "cm²"},
		{"cm^2", "cm²"},
		{"cm²", "cm²"},
		{"cm-1", "cm⁻¹"},
		{"cm−1", "cm⁻¹"},
		{"cm^-1", "cm⁻¹"},
		{"cm^−1", "cm⁻¹"},
		{"1/cm", "cm⁻¹"},
		{"/cm", "cm⁻¹"},
		{"cm^(-1)", "cm⁻¹"},
		{"m^(2/4)", "m^(1/2)"},
		{"m^(4/2)", "m²"},
		{"m¹", "m"},
		{"mJ·cm⁻²", "mJ/cm²"},
		{"W/(m*K)", "W/(m·K)"},
		{"W/(m⋅K)", "W/(m·K)"},
		{"W/m/K", "W/(m·K)"},
		{"W*m^-1*K^-1", "W/(m·K)"},
		{"(m/s)^2", "m²/s²"},
		{"(m/s)/kg", "m/(s·kg)"},
		{"m/(s/kg)", "m·kg/s"},
		{"(m*s)^(1/2)", "m^(1/2)·s^(1/2)"},
		{"1", "1"},
		{"c\u200bm\u200b2", "cm²"},
		{"\ufeffcm^2", "cm²"},
		{"cm\u00ad^\u200b2\u200b", "cm²"},
		{"cm^(\u200b-1\u200b/2)", "cm^(-1/2)"},
		{"°C*m", "K·m"},
		{"W/(m*°C)", "W/(m·K)"},
		{"ppm/°C", "ppm/K"},
		{"1/degC", "K⁻¹"},
		{"°C^2", "K²"},
		{"mm/mm", "mm/mm"},
		{"photons/nm2", "photon/nm²"},
	} {
		u := parse(t, c.text)
		if u.String() != c.printed {
			t.Errorf("%q prints as %q, want %q", c.text, u, c.printed)
		}
		sameUnit(t, c.text, parse(t, c.printed), u)
		if u.Point() != (c.printed == "°C") {
			t.Errorf("%q: a point is %v", c.text, u.Point())
		}
		if u.IsOne() != (c.printed == "1") {
			t.Errorf("%q: one is %v", c.text, u.IsOne())
		}
	}
	sameUnit(t, "the zero unit", Unit{}, parse(t, "1"))
}
