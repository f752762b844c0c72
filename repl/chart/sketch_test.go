package chart

import (
	"math"
	"strings"
	"testing"
	"unicode/utf8"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl"
)

// TestSketchWidth holds every line of every sample within its width.
func TestSketchWidth(t *testing.T) {
	for name, p := range samples() {
		for _, columns := range []int{-5, 40, 53, 80, 200, 999} {
			lines := Sketch(p, columns)
			room := min(max(columns, MinColumns), MaxColumns)
			if len(lines) < sketchRows(room)+2 {
				t.Errorf("%s: %d lines of %d columns", name, len(lines), room)
			}
			for _, l := range lines {
				if n := utf8.RuneCountInString(l); n > room {
					t.Errorf("%s: %d characters in %q, room for %d", name, n, l, room)
				}
				if strings.TrimRight(l, " ") != l || strings.ContainsAny(l, "\x1b\t\n") {
					t.Errorf("%s: blanks or control characters in %q", name, l)
				}
			}
		}
	}
}

// area is what a sketch shows between the axes.
func area(lines []string) (rows []string) {
	for _, l := range lines {
		if _, inside, ok := strings.Cut(l, "│"); ok {
			rows = append(rows, inside)
		} else if _, inside, ok := strings.Cut(l, "┤"); ok && !strings.Contains(l, "├") {
			rows = append(rows, inside)
		}
	}
	return rows
}

func TestSketchWords(t *testing.T) {
	for name, words := range map[string][]string{
		"family5": {"Transmission of a film\ntransmission\n", "thickness / nm", "1.0 ┤", "c α = 3 µm⁻¹"},
		"decades": {"rate / s⁻¹", "pressure / Pa", "1e-8 ┤", "a first   b second"},
		"hill":    {"dose / (mJ/cm²)", "defocus / nm", "width / nm:   · below 17   : 17 to 18", "█ from 22"},
		"bell":    {"density / (cm²/mJ)", "├───────── 27.06 to 32.94 ─────────┤"},
	} {
		text := strings.Join(Sketch(samples()[name], 80), "\n")
		for _, w := range words {
			if !strings.Contains(text, w) {
				t.Errorf("%s: no %q in\n%s", name, w, text)
			}
		}
	}
}

// TestSketchLine finds a rising line in each column, rising.
func TestSketchLine(t *testing.T) {
	p := &repl.Picture{X: repl.Axis{Name: "x"}, Lines: []repl.Series{{X: []float64{0, 1}, Y: []float64{0, 1}}}}
	rows := area(Sketch(p, 60))
	if len(rows) != sketchRows(60) {
		t.Fatalf("%d rows", len(rows))
	}
	last := len(rows)
	for column := range len([]rune(rows[0])) {
		lowest := -1
		for j, row := range rows {
			if r := []rune(row); column < len(r) && r[column] != ' ' {
				lowest = j
			}
		}
		if lowest < 0 || lowest > last {
			t.Fatalf("column %d: row %d after %d", column, lowest, last)
		}
		last = lowest
	}
	if last != 0 {
		t.Errorf("the line ends in row %d", last)
	}
}

// TestSketchTurns gives curves that coincide equal shares of their cells.
func TestSketchTurns(t *testing.T) {
	one := repl.Series{X: []float64{0, 1}, Y: []float64{2, 2}}
	p := &repl.Picture{X: repl.Axis{Name: "x"}, Lines: []repl.Series{one, one, one}}
	text := strings.Join(area(Sketch(p, 60)), "")
	for _, l := range "abc" {
		if n := strings.Count(text, string(l)); n < 17 || n > 21 {
			t.Errorf("%d times %c", n, l)
		}
	}
}

// TestSketchPeak shows the one high point of a long curve, and points that
// stand alone.
func TestSketchPeak(t *testing.T) {
	s := repl.Series{}
	for i := range 100_000 {
		s.X, s.Y = append(s.X, float64(i)), append(s.Y, 0)
	}
	s.Y[31_416] = 1
	rows := area(Sketch(&repl.Picture{X: repl.Axis{Name: "x"}, Lines: []repl.Series{s}}, 80))
	at := float64(utf8.RuneCountInString(strings.TrimRight(rows[0], " "))-1) / 75
	near.Abs(t, "place of the peak", at, 0.314, 0.02)

	if n := strings.Count(strings.Join(area(Sketch(samples()["gaps"], 80)), ""), "o"); n != 2 {
		t.Errorf("%d points alone, want 2", n)
	}
}

// TestSketchTones meets the tone of each value, and a blank for none.
func TestSketchTones(t *testing.T) {
	p := hill(75, 16)
	p.Grid.Z = nil
	for range p.Grid.Y {
		row := make([]float64, len(p.Grid.X))
		for i := range row {
			row[i] = float64(i)
			if i > 60 {
				row[i] = math.NaN()
			}
		}
		p.Grid.Z = append(p.Grid.Z, row)
	}
	limits := shadeLimits(span{lo: 0, hi: 60})
	if len(limits) != 5 || limits[0].label != "10" {
		t.Fatalf("limits %v", limits)
	}
	for _, row := range area(Sketch(p, 80)) {
		for i, r := range []rune(row) {
			z := (float64(i) + 0.5) / 75 * 74 // the middle of the column
			if want := shades[int(z/10)]; z < 59 && r != want && math.Mod(z, 10) > 0.1 {
				t.Fatalf("column %d holds %c, want %c", i, r, want)
			}
			if z > 61 && r != ' ' {
				t.Fatalf("%c where there is no value", r)
			}
		}
	}
}

// TestSketchBars meets the heights of bars in eighths of a row.
func TestSketchBars(t *testing.T) {
	b := &bars{edges: []float64{0, 0.25, 0.5, 1}, height: []float64{0.2, 1, 0.4}}
	want := []float64{0.2, 0.2, 1, 1, 0.4, 0.4, 0.4, 0.4}
	for i, got := range b.tallest(8) {
		near.Rel(t, "height", got, want[i], 1e-15)
	}
	for i, got := range b.tallest(3) { // narrow bars do not vanish
		near.Rel(t, "height", got, []float64{1, 1, 0.4}[i], 1e-15)
	}
	full, p := 0, bell(40)
	rows := area(Sketch(p, 80))
	for _, r := range strings.Join(rows, "") {
		for level, e := range eighths {
			if r == e {
				full += level
			}
		}
	}
	// The area of the bars is 1: as eighths, over 12 units of dose and 1.15
	// times the highest density.
	highest := 0.0
	for _, d := range p.Bars.Density {
		highest = math.Max(highest, d)
	}
	whole := float64(8*len(rows)*75) / (12 * 1.15 * highest)
	near.Rel(t, "area in eighths", float64(full), whole, 0.03)
}
