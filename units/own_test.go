package units

import (
	"math/big"
	"slices"
	"strings"
	"testing"
)

func TestWithUnit(t *testing.T) {
	for _, c := range []struct {
		name, size string
		same       string // a unit of the standard system
		times      *big.Rat
	}{
		{"shot", "3.5 mJ/cm^2", "mJ/cm^2", big.NewRat(7, 2)},
		{"dozen", "12", "1", big.NewRat(12, 1)},
		{"cassette", "25 wafer", "wafer", big.NewRat(25, 1)},
		{"turn", "360 deg", "deg", big.NewRat(360, 1)},
		{"tiny", "1.25e-290", "1", new(big.Rat).SetFrac(big.NewInt(125), new(big.Int).Exp(big.NewInt(10), big.NewInt(292), nil))},
		{"milliTorrs", "0.001 Torr", "mTorr", big.NewRat(1, 1)},
		{"step", "2 K", "K", big.NewRat(2, 1)},
		{"metres", "1.000 m", "m", big.NewRat(1, 1)},
	} {
		s, err := Standard().WithUnit(c.name, c.size)
		if err != nil {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		u, err := s.Parse(c.name)
		same := parse(t, c.same)
		want := new(big.Rat).Mul(same.scale.rat(), c.times)
		if err != nil || u.dim != same.dim || u.scale.rat().Cmp(want) != 0 || u.String() != c.name || u.Point() {
			t.Errorf("%s is %s of %s, %v (%v)", c.name, decimalText(u.scale.rat()), u.dim, u, err)
		}
		if _, err := s.Parse("m" + c.name); err == nil {
			t.Errorf("m%s is read: own units take no prefixes", c.name)
		}
		if text := u.Digits(u.SI(2.5)); text != "2.5" {
			t.Errorf("2.5 %s is written %s", c.name, text)
		}
		if _, err := Standard().Parse(c.name); err == nil {
			t.Errorf("the standard system knows %s", c.name)
		}
	}
}

// Own units stand on one another, and beside counted things.
func TestWithUnitOnOwn(t *testing.T) {
	s, lot, err := Standard().WithCounted("lot")
	if err != nil {
		t.Fatal(err)
	}
	s, err = s.WithUnit("batch", "6 lot")
	if err != nil {
		t.Fatal(err)
	}
	s, err = s.WithUnit("day", "4 batch/h")
	if err != nil {
		t.Fatal(err)
	}
	u, err := s.Parse("day")
	if want := must(t)(dimPerTime.Mul(lot.Of())); err != nil || u.dim != want {
		t.Errorf("day is %s (%v)", s.BaseText(u.dim), err)
	}
	if v, err := u.Read("3600"); err != nil || v != 24 {
		t.Errorf("3600 day are %v lot/s (%v), want 24", v, err)
	}
	if s, _, err = s.WithCounted("tray"); err != nil {
		t.Fatal(err)
	}
	if _, err := s.Parse("batch/tray"); err != nil || !slices.Equal(s.Declared(), []string{"lot", "tray"}) {
		t.Errorf("declared are %q (%v)", s.Declared(), err)
	}
	if len(Standard().Declared()) != 0 {
		t.Error("the standard system has changed")
	}
}

func TestOwnUnitsRefused(t *testing.T) {
	for _, c := range []struct{ name, size, why string }{
		{"", "1 m", "no name for a unit"},
		{"shot2", "1 m", "letters only"},
		{"m", "1 m", "is a unit already"},
		{"mm", "1 m", "is a unit already"},
		{"k", "1 m", "prefix"},
		{"mil", "1 m", "several meanings"},
		{strings.Repeat("l", 41), "1 m", "at most 40 bytes"},
		{"shot", "", "no decimal number"},
		{"shot", "mJ/cm^2", "no decimal number"},
		{"shot", "0 m", "not above zero"},
		{"shot", "-1 m", "not above zero"},
		{"shot", "1e301", "outside"},
		{"shot", "1e200 Qm^9", "outside"},
		{"shot", "1e-999999999999 m", "outside"},
		{"shot", strings.Repeat("1", 41), "more than 40 digits"},
		{"shot", "1 degC", "give it in K"},
		{"shot", "1 parsnip", "parsnip"},
		{"shot", "1 m m", "blank"},
	} {
		if s, err := Standard().WithUnit(c.name, c.size); err == nil || s != nil || !strings.Contains(err.Error(), c.why) {
			t.Errorf("%q as %.30q: %v, want %q", c.name, c.size, err, c.why)
		}
	}
	s, err := Standard().WithUnit("shot", "3.5 mJ/cm^2")
	if err != nil {
		t.Fatal(err)
	}
	if _, err := s.WithUnit("shot", "1 m"); err == nil {
		t.Error("shot is given twice")
	}
	if _, _, err := s.WithCounted("shot"); err == nil {
		t.Error("shot is a unit and a counted thing")
	}
}
