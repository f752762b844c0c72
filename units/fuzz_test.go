package units

import (
	"errors"
	"math"
	"testing"
	"unicode/utf8"
)

// FuzzParse holds that no text stops the program, that every refusal marks a
// place in the text, and that every unit that is read prints as itself.
func FuzzParse(f *testing.F) {
	for _, seed := range append([]string{
		"", "1", "/m", "1/K", "mJ/cm^2", "W/(m*K)", "W/m*K", "nm⁻²", "°C", "W/(m·°C)", "m^(1/2)", "(m*s)^(-2/3)", "cm-1", "cm2",
		"m²^2", "m**2", "m.s", "m s", "((((m))))", "µm", "μm", "A\u030a", "\u212b", "m\u200b2", "12h", "{photon}", "м", "m\xff",
		"Qphoton^21*Qphoton^21", "(rad*rad*rad)^(5/6)", "/L/L/L/L/L", "F^6", "m^11*m^-1*m^11", "%", "''", "deg^(1/6)", "kWh/wafer",
	}, roundTripUnits...) {
		f.Add(seed)
	}
	s := Standard()
	f.Fuzz(func(t *testing.T, text string) {
		u, err := s.Parse(text)
		var bad *ParseError
		switch {
		case err == nil:
			printed := u.String()
			if !utf8.ValidString(printed) {
				t.Fatalf("%q prints as %q", text, printed)
			}
			sameUnit(t, text, parse(t, printed), u)
			if again := parse(t, printed).String(); again != printed {
				t.Fatalf("%q prints as %q, and that as %q", text, printed, again)
			}
		case !errors.As(err, &bad):
			t.Fatalf("%q: %v is no *ParseError", text, err)
		case bad.Msg == "" || bad.Start < 0 || bad.Start > bad.End || bad.End > len(text):
			t.Fatalf("%q: %q marks %d to %d", text, bad.Msg, bad.Start, bad.End)
		}
	})
}

// FuzzRead holds that what is read is finite, that a refusal has one of the
// three causes, and that the digits of what is read read back.
func FuzzRead(f *testing.F) {
	for _, number := range []string{"13.5", "-5", "1.2e-3", "1e400", "1e-400", "0e999999999999", "1e-99999999999", "1.", ".1", "+1", "١", "0.1e+7"} {
		for _, unit := range []string{"nm", "°C", "Torr", "deg", "nm^(1/2)"} {
			f.Add(number, unit)
		}
	}
	s := Standard()
	f.Fuzz(func(t *testing.T, number, unit string) {
		u, err := s.Parse(unit)
		if err != nil || len(number) > 2000 {
			return
		}
		v, err := u.Read(number)
		if err != nil {
			if !errors.Is(err, ErrNumber) && !errors.Is(err, ErrTooLarge) && !errors.Is(err, ErrTooSmall) || v != 0 {
				t.Fatalf("%q %s: %g, %v", number, unit, v, err)
			}
			return
		}
		if math.IsNaN(v) || math.IsInf(v, 0) {
			t.Fatalf("%q %s is %g", number, unit, v)
		}
		if back, err := u.Read(u.Digits(v)); err != nil || back != v {
			t.Fatalf("%q %s is %g, its digits %s read as %g, %v", number, unit, v, u.Digits(v), back, err)
		}
	})
}
