package chart

import (
	"strings"
	"testing"
	"unicode"

	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
)

func TestLabel(t *testing.T) {
	for in, want := range map[string]string{
		"dose / (mJ/cm²)":       "dose / (mJ/cm²)",
		"α / µm⁻¹":              "α / µm^-1",
		"rate / (cm⁻²·s⁻¹)":     "rate / (cm^-2·s^-1)",
		"density / 10¹⁹":        "density / 10^19",
		"density / 10²¹":        "density / 10²¹",
		"x⁽ⁿ⁺¹⁾":                "x^(n+1)",
		"ℏ⋅ω at 20 ℃":           "ħ·ω at 20 °C",
		"∛V":                    "cbrtV",
		"two\nlines\tand \x00":  "two lines and  ",
		"漢字":                    "??",
		"Ω Å ° μ µ ± × √ ≤ ′ ″": "Ω Å ° μ µ ± × √ ≤ ′ ″",
	} {
		if got := label(in); got != want {
			t.Errorf("label(%q) = %q, want %q", in, got, want)
		}
	}
}

// drawable says whether the font of the pictures holds a rune.
func drawable(t testing.TB) func(rune) bool {
	font := plot.DefaultTextHandler.Cache().Lookup(face(1), 1).Face
	var buf sfnt.Buffer
	return func(r rune) bool {
		i, err := font.GlyphIndex(&buf, r)
		if err != nil {
			t.Fatal(err)
		}
		return i != 0
	}
}

// TestEveryRune holds that whatever a label is made of, the font can draw it.
func TestEveryRune(t *testing.T) {
	known := drawable(t)
	var b strings.Builder
	for r := rune(0); r <= unicode.MaxRune; r++ {
		b.WriteRune(r)
	}
	for _, r := range label(b.String()) {
		if !known(r) {
			t.Fatalf("%q is left in a label", r)
		}
	}
	for _, r := range superscripts { // and each superscript by itself
		for _, out := range label("m" + string(r)) {
			if !known(out) {
				t.Errorf("%q stays for %q", out, r)
			}
		}
	}
}

// TestEveryWord holds the same for the words of whole pictures.
func TestEveryWord(t *testing.T) {
	known := drawable(t)
	for name, p := range samples() {
		d := drawn(t, p)
		if len(d.words) < 5 {
			t.Errorf("%s has %d words", name, len(d.words))
		}
		for _, w := range d.words {
			for _, r := range w {
				if !known(r) {
					t.Errorf("%s: the font has no %q of %q", name, r, w)
				}
			}
		}
	}
}

func TestFit(t *testing.T) {
	style := letters(9)
	long := strings.Repeat("long name ", 100_000)
	for _, width := range []float64{20, 100, 400} {
		got := fit(style, long, vg.Length(width))
		if w := float64(style.Width(got)); w > width || w < width-10 || !strings.HasSuffix(got, "…") {
			t.Errorf("%q is %.1f wide for a room of %g", got, w, width)
		}
	}
	if got := fit(style, "short", 100); got != "short" {
		t.Errorf("got %q", got)
	}
	if got := fit(style, "short", 0); got != "…" {
		t.Errorf("got %q", got)
	}
}
