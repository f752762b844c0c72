package page

import (
	"math"
	"os"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// luminance is the relative luminance of a colour #rrggbb. This and contrast
// are after W3C, Web Content Accessibility Guidelines 2.1 (2018), section 5,
// "relative luminance" and "contrast ratio"; the numbers are from memory.
func luminance(t *testing.T, colour string) float64 {
	t.Helper()
	n, err := strconv.ParseUint(strings.TrimPrefix(colour, "#"), 16, 32)
	if err != nil || len(colour) != 7 {
		t.Fatalf("%q is no colour", colour)
	}
	part := func(shift int) float64 {
		v := float64(n>>shift&0xff) / 255
		if v <= 0.03928 {
			return v / 12.92
		}
		return math.Pow((v+0.055)/1.055, 2.4)
	}
	return 0.2126*part(16) + 0.7152*part(8) + 0.0722*part(0)
}

func contrast(t *testing.T, a, b string) float64 {
	t.Helper()
	x, y := luminance(t, a), luminance(t, b)
	return (max(x, y) + 0.05) / (min(x, y) + 0.05)
}

func TestContrastItself(t *testing.T) {
	near.Abs(t, "black on white", contrast(t, "#000000", "#ffffff"), 21, 1e-12)
	near.Abs(t, "white on white", contrast(t, "#ffffff", "#ffffff"), 1, 1e-12)
	near.Abs(t, "a grey on white", contrast(t, "#777777", "#ffffff"), 4.48, 0.005) // the well-known grey just below 4.5, common practice
}

// schemes reads the colours of the style: by day, by night and on paper.
func schemes(t *testing.T) map[string]map[string]string {
	t.Helper()
	css, err := os.ReadFile("page.css")
	if err != nil {
		t.Fatal(err)
	}
	blocks := regexp.MustCompile(`(?s)(@media [^{]*\{\s*)?:root \{(.*?)\}`).FindAllStringSubmatch(string(css), -1)
	out := map[string]map[string]string{}
	for _, b := range blocks {
		name := "day"
		switch {
		case strings.Contains(b[1], "dark"):
			name = "night"
		case strings.Contains(b[1], "print"):
			name = "paper"
		}
		out[name] = map[string]string{}
		for _, v := range regexp.MustCompile(`--([a-z]+): (#[0-9a-f]{6});`).FindAllStringSubmatch(b[2], -1) {
			out[name][v[1]] = v[2]
		}
	}
	return out
}

// Words have a contrast of 4.5:1 at least on what they stand on, and lines that
// mean something 3:1 (Web Content Accessibility Guidelines 2.1, criteria 1.4.3
// and 1.4.11), in every scheme.
func TestContrast(t *testing.T) {
	all := schemes(t)
	if len(all) != 3 {
		t.Fatalf("%d schemes, want day, night and paper", len(all))
	}
	for scheme, c := range all {
		if len(c) != len(all["day"]) {
			t.Errorf("%s has %d colours, the day %d", scheme, len(c), len(all["day"]))
		}
		check := func(front, back string, least float64) {
			if got := contrast(t, c[front], c[back]); got < least {
				t.Errorf("%s: %s on %s has a contrast of %.2f, at least %g", scheme, front, back, got, least)
			}
		}
		for _, front := range []string{"ink", "quiet", "link", "good", "bad", "warn"} {
			check(front, "paper", 4.5)
			check(front, "panel", 4.5)
		}
		check("ink", "mark", 4.5)
		check("link", "mark", 4.5)
		check("quiet", "mark", 4.5)
		check("bar", "paper", 3)
		check("bad", "mark", 3) // the line under a mark
	}
}

// Colours are named once: no rule has one of its own, save the ground of
// pictures.
func TestColoursAreNamed(t *testing.T) {
	css, err := os.ReadFile("page.css")
	if err != nil {
		t.Fatal(err)
	}
	rules := regexp.MustCompile(`--[a-z]+: #[0-9a-f]{6};`).ReplaceAllString(string(css), "")
	if got := regexp.MustCompile(`#[0-9a-fA-F]{3,8}|rgba?\(|hsla?\(`).FindAllString(rules, -1); len(got) != 1 || got[0] != "#ffffff" {
		t.Errorf("colours outside of the schemes: %q", got)
	}
	for _, name := range regexp.MustCompile(`var\(--([a-z]+)\)`).FindAllStringSubmatch(rules, -1) {
		if schemes(t)["day"][name[1]] == "" {
			t.Errorf("the colour %s has no value", name[1])
		}
	}
}

// The style serves paper, phones, the dark and the keyboard.
func TestStyleServes(t *testing.T) {
	css, err := os.ReadFile("page.css")
	if err != nil {
		t.Fatal(err)
	}
	for _, part := range []string{"@media print", "@media (max-width:", "prefers-color-scheme: dark", ":focus-visible", ".skip:focus", "overflow-x: auto"} {
		if !strings.Contains(string(css), part) {
			t.Errorf("the style has no %s", part)
		}
	}
}
