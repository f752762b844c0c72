package units

import (
	"fmt"
	"slices"
	"strings"
	"testing"
)

func TestWithCounted(t *testing.T) {
	old := Standard()
	words := old.Words()
	s, lot, err := old.WithCounted("lot")
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		text, printed string
		ten           int
	}{{"lot", "lot", 0}, {"lots", "lot", 0}, {"klot", "klot", 3}, {"mlots", "mlot", -3}, {"ulot", "µlot", -6}} {
		u, err := s.Parse(c.text)
		if err != nil || u.Dimension() != lot.Of() || u.String() != c.printed || u.scale.ten != c.ten {
			t.Errorf("%s is %v, %s, 10^%d (%v)", c.text, u, u.Dimension(), u.scale.ten, err)
		}
	}
	u, err := s.Parse("wafer/lot")
	if err != nil {
		t.Fatal(err)
	}
	for want, q := range map[string]Quantity{
		"25 wafer/lot":    New(25, u.Dimension()),
		"2 lot":           New(2, lot.Of()),
		"3 lot/s":         New(3, must(t)(dimPerTime.Mul(lot.Of()))),
		"30 mJ/(cm²·lot)": New(300, must(t)(dimFluence.Div(lot.Of()))),
		"4 s/lot²":        New(4, must(t)(dimDuration.Div(must(t)(lot.Of().Pow(2, 1))))),
	} {
		if got := s.Text(q, 5); got != want {
			t.Errorf("%s is written %s", want, got)
		}
	}
	if got := s.BaseText(must(t)(dimFluence.Mul(lot.Of()))); got != "kg·s⁻²·lot" {
		t.Errorf("in base units: %s", got)
	}
	if _, err := old.Parse("lot"); err == nil || !slices.Equal(words, Standard().Words()) {
		t.Error("the old system has changed")
	}
	if got := old.BaseText(lot.Of()); got != "thing1" {
		t.Errorf("the old system names lot %s", got)
	}
	other, tray, err := old.WithCounted("tray")
	if err != nil || tray != lot {
		t.Fatalf("a second branch: %v, %v", tray, err)
	}
	if _, err := other.Parse("lot"); err == nil || other.BaseText(tray.Of()) != "tray" || s.BaseText(lot.Of()) != "lot" {
		t.Error("two branches of one system are mixed up")
	}
}

func TestNamesOfCountedThings(t *testing.T) {
	for name, why := range map[string]string{
		"": "no name", "lot1": "letters only", "my lot": "letters only", "lot_a": "letters only", "°": "letters only", "ʰ": "letters only",
		"%": "letters only", "m": "m is a unit already", "wafer": "is a unit already", "wafers": "is a unit already", "mm": "is a unit already",
		"kg": "is a unit already", "ohm": "is a unit already (Ω)", "mwafer": "is a unit already", "da": "prefix", "k": "prefix", "µ": "prefix",
		"μ": "prefix", "mil": "several meanings", "in": "a word of the language", "hr": "no symbol", "year": "is a unit already",
		"da\u200b": "letters only", strings.Repeat("l", 41): "at most 40 bytes", "\xff": "letters only", "\u212a": "K is a unit already",
	} {
		s, _, err := Standard().WithCounted(name)
		if err == nil || s != nil || !strings.Contains(err.Error(), why) {
			t.Errorf("%q: %v, want %q", name, err, why)
		}
	}
	for _, name := range []string{"lot", "reticle", "Größe", "λ", "cassette", "x"} {
		s, b, err := Standard().WithCounted(name)
		if err != nil {
			t.Errorf("%q: %v", name, err)
			continue
		}
		if u, err := s.Parse(name); err != nil || u.Dimension() != b.Of() {
			t.Errorf("%q: %v, %v", name, u, err)
		}
		if _, _, err := s.WithCounted(name); err == nil {
			t.Errorf("%q is declared twice", name)
		}
		if _, _, err := s.WithCounted(name + "s"); err == nil {
			t.Errorf("%qs is declared beside it", name)
		}
	}
}

func TestMaxDeclared(t *testing.T) {
	s := Standard()
	seen := map[Dimension]bool{}
	for i := range MaxDeclared {
		name := "thing" + string(rune('a'+i))
		grown, b, err := s.WithCounted(name)
		if err != nil {
			t.Fatal(err)
		}
		if seen[b.Of()] || !b.Counted() || grown.BaseText(b.Of()) != name {
			t.Errorf("%s is base %d, %s", name, b, grown.BaseText(b.Of()))
		}
		seen[b.Of()] = true
		s = grown
	}
	_, _, err := s.WithCounted("lot")
	if err == nil || !strings.Contains(err.Error(), fmt.Sprint(MaxDeclared)) {
		t.Errorf("one more than %d: %v", MaxDeclared, err)
	}
	u, err := s.Parse("mthinga^2/kthingl")
	if err != nil || u.String() != "mthinga²/kthingl" {
		t.Errorf("%v, %v", u, err)
	}
}
