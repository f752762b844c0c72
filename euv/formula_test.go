package euv

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func TestParseFormula(t *testing.T) {
	for text, want := range map[string]string{
		"SiO2":         "Si 1, O 2",
		"C5H8O2":       "C 5, H 8, O 2",
		"B4C":          "B 4, C 1",
		"SnO1.5":       "Sn 1, O 1.5",
		"Co":           "Co 1",
		"CO":           "C 1, O 1",
		"Al2(SO4)3":    "Al 2, S 3, O 12",
		"((CH3)3C)2O":  "C 8, H 18, O 1",
		"CH3(CH2)4CH3": "C 6, H 14",
		"H0.5":         "H 0.5",
	} {
		f := sure(ParseFormula(text))
		var parts []string
		for _, a := range f.c.atoms {
			parts = append(parts, fmt.Sprintf("%s %g", a.of.symbol, a.count))
		}
		if got := strings.Join(parts, ", "); got != want {
			t.Errorf("%s = %s, want %s", text, got, want)
		}
		if f.String() != text {
			t.Errorf("%s is written %s", text, f)
		}
	}
}

func TestFormulaRefused(t *testing.T) {
	for text, want := range map[string]string{
		"":          "an element symbol is wanted",
		"si":        "Si, not si",
		"Xy2":       "Xy is no element",
		"SiO2)":     "no opening",
		"(SiO2":     "not closed",
		"()":        "an element symbol is wanted",
		"Si O2":     "' ' stands",
		"SiO2.":     "no count",
		"SiO0":      "no count",
		"SiO1e3":    "'e' stands",
		"SiO-2":     "'-' stands",
		"SiO1.2.3":  "no count",
		"H20000":    "no count",
		"(H200)200": "more than 10000 atoms of H",
		strings.Repeat("(", 20) + "H" + strings.Repeat(")", 20): "nest deeper",
		strings.Repeat("H", 300):                                "longer than 200",
		"Si₂":                                                   "'₂' stands",
	} {
		_, err := ParseFormula(text)
		var refused *FormulaError
		if !errors.As(err, &refused) {
			t.Errorf("%q: %v", text, err)
			continue
		}
		if !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %q, want %q", text, err, want)
		}
		if refused.At < 0 || refused.At > len(text) {
			t.Errorf("%q: mistake at %d", text, refused.At)
		}
	}
}

func TestMaterialRefused(t *testing.T) {
	for _, d := range []units.Density{0, -1, 31000, units.Density(math.NaN()), units.Density(math.Inf(1))} {
		_, err := NewMaterial("Si", d)
		var refused *ArgumentError
		if !errors.As(err, &refused) || refused.Argument != "density" {
			t.Errorf("density %g: %v", d, err)
		}
	}
	for symbol, want := range map[string]string{
		"H": "gas column", "Xe": "gas column", "Hg": "no solid", "SiO2": "needs its density", "Q": "no element",
	} {
		_, err := SolidElement(symbol)
		var refused *FormulaError
		if !errors.As(err, &refused) || !strings.Contains(err.Error(), want) {
			t.Errorf("%s as a solid: %v", symbol, err)
		}
	}
	if _, err := Delta(Material{}, 13.5*nm); err == nil {
		t.Error("the zero material has a δ")
	}
	if w := (Surface{Medium: sure(NewMaterial("Mo", 1000))}).Warnings(); len(w) != 1 {
		t.Errorf("molybdenum at 1 g/cm³: warnings %q", w)
	}
}

// δ and β are sums over atoms: a formula is the same as its elements mixed.
func TestFormulaIsTheSumOfItsAtoms(t *testing.T) {
	const l = 13.5 * nm
	whole := sure(NewMaterial("SiO2", 2200))
	share := func(symbol string, count float64) Material {
		f := sure(ParseFormula(symbol))
		return Material{f, units.Density(2200 * count * f.c.weight / whole.Formula.c.weight)}
	}
	si, o := share("Si", 1), share("O", 2)
	near.Rel(t, "δ", float64(sure(Delta(whole, l))), float64(sure(Delta(si, l))+sure(Delta(o, l))), 1e-14)
	near.Rel(t, "β", float64(sure(Beta(whole, l))), float64(sure(Beta(si, l))+sure(Beta(o, l))), 1e-14)
}

func FuzzFormula(f *testing.F) {
	for _, seed := range []string{"SiO2", "C5H8O2", "Al2(SO4)3", "SnO1.5", "((((", "H1e9", "Ω", "\xff", ")", "Si0.0", "(((H9999)9999)9999)"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		parsed, err := ParseFormula(text)
		if err != nil {
			var refused *FormulaError
			if !errors.As(err, &refused) || refused.At < 0 || refused.At > len(text) {
				t.Fatalf("%q: %#v", text, err)
			}
			return
		}
		if w := parsed.c.weight; !(w > 0 && w < 1e9) {
			t.Fatalf("%q weighs %g", text, w)
		}
		again := sure(ParseFormula(parsed.String()))
		if again.c.weight != parsed.c.weight {
			t.Fatalf("%q does not read back", text)
		}
		n, err := Material{parsed, 1000}.Index(13.5 * nm)
		if err == nil && !(n.Delta < 1 && n.Beta >= 0) {
			t.Fatalf("%q has index %v", text, n)
		}
	})
}
