package chart

import (
	"sort"
	"strings"
	"unicode"

	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// superscripts and their plain form. The font has some of them only.
const (
	superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻⁼⁽⁾ⁿ"
	plainScripts = "0123456789+-=()n"
)

// longest bounds the letters of a label; a line holds about a hundred.
const longest = 400

// face is the font of all words in a picture.
func face(size vg.Length) font.Font {
	return font.Font{Typeface: "Liberation", Variant: "Sans", Size: size}
}

// letters is a style of writing in that font, placed by its middle above pt.
func letters(size vg.Length) text.Style {
	return text.Style{
		Color: ink, Font: face(size), Handler: plot.DefaultTextHandler,
		XAlign: draw.XCenter, YAlign: draw.YBottom,
	}
}

// label writes a text with runes that the font can draw: a superscript of
// which it lacks a part becomes plain (µm⁻¹ → µm^-1), a sign of its own name
// becomes one that looks alike, and what is left over becomes a question mark.
// Control characters become blanks.
func label(s string) string {
	known := plot.DefaultTextHandler.Cache().Lookup(face(1), 1).Face
	var buf sfnt.Buffer
	has := func(r rune) bool {
		i, err := known.GlyphIndex(&buf, r)
		return err == nil && i != 0
	}
	var b strings.Builder
	runes := []rune(s)
	for i := 0; i < len(runes); i++ {
		r := runes[i]
		n := raised(runes[i:])
		switch {
		case n > 0:
			b.WriteString(power(runes[i:i+n], has))
			i += n - 1
		case unicode.IsControl(r):
			b.WriteByte(' ')
		case has(r):
			b.WriteRune(r)
		default:
			b.WriteString(alike(r))
		}
	}
	return b.String()
}

// raised counts the superscripts at the start of a text.
func raised(runes []rune) int {
	n := 0
	for n < len(runes) && strings.ContainsRune(superscripts, runes[n]) {
		n++
	}
	return n
}

// power keeps a superscript that can be drawn as a whole.
func power(runes []rune, has func(rune) bool) string {
	plain := []rune{'^'}
	whole := true
	for _, r := range runes {
		whole = whole && has(r)
		place := strings.Count(superscripts[:strings.IndexRune(superscripts, r)], "") - 1
		plain = append(plain, rune(plainScripts[place]))
	}
	if whole {
		return string(runes)
	}
	return string(plain)
}

// alike stands in for a rune that the font lacks.
func alike(r rune) string {
	switch r {
	case '⋅':
		return "·"
	case '℃':
		return "°C"
	case 'ℏ':
		return "ħ"
	case '∛':
		return "cbrt"
	case '₋':
		return "_-"
	}
	return "?"
}

// fit shortens a text to a width.
func fit(style text.Style, s string, width vg.Length) string {
	runes := []rune(s)
	if len(runes) <= longest && style.Width(s) <= width {
		return s
	}
	n := sort.Search(min(len(runes), longest), func(n int) bool {
		return style.Width(string(runes[:n+1])+"…") > width
	})
	return string(runes[:n]) + "…"
}
