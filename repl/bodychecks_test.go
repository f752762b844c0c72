package repl

import (
	"context"
	"errors"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// mirrorBlock is the mirror of the checks: 50 bilayers, period 6.95 nm, 40 % of
// it molybdenum, silicon first and as substrate.
const mirrorBlock = `stack mirror
  bilayer x50: Si 4.17 nm, Mo 2.78 nm
  substrate: Si
end
stack rough_mirror
  bilayer x50: Si 4.17 nm, Mo 2.78 nm
  roughness: 0.7 nm
  substrate: Si
end`

// TestPublishedMirrors asks the outside's values of materials, mirrors and
// trains of them, to the last digit that is published.
func TestPublishedMirrors(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, mirrorBlock, "stack mo_first", "bilayer x50: Mo 2.78 nm, Si 4.17 nm", "substrate: Si", "end",
		"material pmma = C5H8O2 1.19 g/cm^3", "material styrene = C8H8O 1.17 g/cm^3")
	for _, n := range []string{"10", "11"} {
		spoken(t, s, "chain train"+n, "band: 13.5 nm, 2 %", "at IF", "mirror x"+n+": reflectivity(rough_mirror, λ)", "at WAFER", "end")
	}
	const henke, computed = "Henke, Gullikson & Davis (1993) with later updates, densities of the solids", "independent computation"
	for _, c := range []struct {
		statement string
		want, off float64
		source    string
	}{
		{"attenuation(pmma) [/µm]", 5.241, 5e-4, henke},
		{"attenuation(styrene) [/µm]", 4.085, 5e-4, henke},
		{"delta(Mo, 13.5 nm)", 0.0762084, 5e-8, henke},
		{"delta(Si, 13.5 nm)", 0.000999981, 5e-10, henke},
		{"delta(Ru, 13.5 nm)", 0.1136455, 5e-8, henke},
		{"peak_reflectivity(mirror)", 0.73598, 5e-6, computed},
		{"peak_wavelength(mirror) [nm]", 13.577, 5e-4, computed},
		{"bandwidth(mirror) [nm]", 0.609, 5e-4, computed},
		{"peak_reflectivity(mo_first)", 0.74898, 5e-6, computed},
		{"peak_reflectivity(rough_mirror)", 0.68017, 5e-6, computed},
		{"peak_wavelength(rough_mirror) [nm]", 13.546, 5e-4, computed},
		{"bandwidth(rough_mirror) [nm]", 0.514, 5e-4, computed},
		{"bandwidth(train10, IF, WAFER) [nm]", 0.246, 5e-4, computed},
		{"bandwidth(train11, IF, WAFER) [nm]", 0.237, 5e-4, computed},
		// orders
		{"peak_reflectivity(rough_mirror) [%]", 70, 3, "a real mirror reflects about 70 %: common practice, no source; 69–70 % and about 0.5 nm measured: Bajt et al., Opt. Eng. 41, 1797 (2002), from memory"},
		{"bandwidth(rough_mirror) [nm]", 0.5, 0.05, "a band of about 0.5 nm: common practice, no source"},
		{"peak_reflectivity(mirror) [%]", 74, 2, "the smooth ideal lies a few % above: common practice, no source"},
		{"transmission(train11, IF, WAFER) [% at WAFER/IF]", 2, 1.2, "about 2 % after eleven reflections: common practice, no source"},
	} {
		near.Abs(t, c.statement+" ("+c.source+")", valued(t, s, c.statement).Number(), c.want, c.off)
	}
}

// About 50 bilayers are what is put on a mirror (common practice, no source):
// before them each ten more bring per cents, behind them hardly anything.
func TestFiftyBilayersAreEnough(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "n = 50", "stack mirror", "bilayer x(n): Si 4.17 nm, Mo 2.78 nm", "substrate: Si", "end")
	at := func(n string) float64 {
		spoken(t, s, "n = "+n)
		return valued(t, s, "peak_reflectivity(mirror)").SI
	}
	if gain := at("40") - at("30"); !(gain > 0.02) {
		t.Errorf("from 30 to 40 bilayers the peak gains %g", gain)
	}
	if gain := at("200") - at("50"); !(gain > 0 && gain < 0.005) {
		t.Errorf("from 50 to 200 bilayers the peak gains %g", gain)
	}
}

// Eleven mirrors at 70 % leave 2 % of one wavelength; in their band of 2 % it is
// less, since the product of the curves is narrower than one of them.
func TestBandOfElevenMirrors(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, mirrorBlock, "chain train", "band: 13.5 nm, 2 %", "at IF", "mirror x11: reflectivity(rough_mirror, λ)", "at WAFER", "end")
	inBand := valued(t, s, "transmission(train, IF, WAFER)").SI
	atPeak := valued(t, s, "peak_reflectivity(rough_mirror)^11").SI
	if !(inBand < atPeak && inBand > atPeak/2) {
		t.Errorf("in the band %g, at the peak %g", inBand, atPeak)
	}
	near.Abs(t, "0.7^11 in per cent (arithmetic)", valued(t, s, "0.7^11 [%]").Number(), 1.977, 5e-4)
}

// heard says statements and returns the last reply, refused or not.
func heard(s *Session, statements ...string) *Reply {
	var r *Reply
	for _, text := range statements {
		for line := range strings.Lines(text) {
			r = s.Feed(context.Background(), strings.TrimRight(line, "\n"))
		}
	}
	return r
}

// refusedBlock says a block that must be refused with this message and way on,
// and must leave all names as they are.
func refusedBlock(t testing.TB, s *Session, block, message, wayOn string) {
	t.Helper()
	before := printed(spoken(t, s, "names"))
	r := heard(s, block)
	var bad *Refusal
	switch {
	case !errors.As(r.Err, &bad):
		t.Errorf("%s\nis not refused: %s", block, printed(r))
	case bad.Message() != message || bad.WayOn() != wayOn:
		t.Errorf("%s\n got %s\n     %s\nwant %s\n     %s", block, bad.Message(), bad.WayOn(), message, wayOn)
	case len(bad.Marks()) == 0:
		t.Errorf("%s\nnothing is marked", block)
	}
	if after := printed(spoken(t, s, "names")); after != before {
		t.Errorf("%s\nchanged the session from\n%s\nto\n%s", block, before, after)
	}
}
