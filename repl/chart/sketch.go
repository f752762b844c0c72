package chart

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"example.com/dosewright/repl"
)

// The widths of a sketch, in characters.
const (
	MinColumns = 40
	MaxColumns = 200
)

// Sketch draws a picture with characters, for a terminal of so many columns
// (taken as 40 if fewer, as 200 if more); no line is longer. One curve is drawn
// in dots and strokes, several in letters that a key names; a map in seven
// tones of which a key tells the limits; a histogram in blocks with its
// interval measured below. There are no colour codes. A picture that [Draw]
// would refuse gives one line that says why.
func Sketch(p *repl.Picture, columns int) []string {
	columns = min(max(columns, MinColumns), MaxColumns)
	lines, err := sketch(p, columns)
	if err != nil {
		lines = []string{err.Error()}
	}
	for i, l := range lines {
		lines[i] = strings.TrimRight(clip(l, columns), " ")
	}
	return lines
}

func sketch(p *repl.Picture, columns int) ([]string, error) {
	kind, err := kindOf(p)
	if err != nil {
		return nil, err
	}
	switch kind {
	case mapKind:
		return sketchMap(p, columns)
	case barKind:
		return sketchBars(p, columns)
	default:
		return sketchCurves(p, columns)
	}
}

// sketchRows is the height of the part between the axes.
func sketchRows(columns int) int { return min(max(columns/5, 10), 22) }

// clip cuts a line to a width, and makes blanks of control characters.
func clip(s string, columns int) string {
	s = strings.Map(func(r rune) rune {
		if unicode.IsControl(r) {
			return ' '
		}
		return r
	}, s)
	if utf8.RuneCountInString(s) <= columns {
		return s
	}
	return string([]rune(s)[:columns-1]) + "…"
}

// sheet is the part between the axes, in characters; row 0 is at the top.
type sheet struct {
	f     frame
	left  int // characters before it: numbers and axis
	ticks []tick
	rows  [][]rune
}

// newSheet makes room beside the numbers of the vertical axis.
func newSheet(f frame, columns int) *sheet {
	rows := sketchRows(columns)
	s := &sheet{f: f, ticks: f.y.ticks(max(rows/3, 3))}
	for _, t := range s.ticks {
		s.left = max(s.left, utf8.RuneCountInString(t.label))
	}
	s.left += 2 // a blank and the axis
	for range rows {
		s.rows = append(s.rows, []rune(strings.Repeat(" ", columns-s.left-1)))
	}
	return s
}

func (s *sheet) width() int { return len(s.rows[0]) }

// column and row are the character at a place of the unit square.
func (s *sheet) column(x float64) int { return dot(x, s.width()) }

func (s *sheet) row(y float64) int { return dot(1-y, thirds*len(s.rows)) / thirds }

// dot is the number of the cell at a place, of n along the axis; the first and
// the last stand at its ends.
func dot(at float64, n int) int { return min(max(int(at*float64(n-1)+0.5), 0), n-1) }

// lines puts title, axes and heads around the sheet.
func (s *sheet) lines() []string {
	var out []string
	if s.f.title != "" {
		out = append(out, s.f.title)
	}
	if s.f.yHead != "" {
		out = append(out, s.f.yHead)
	}
	labels := make([]string, len(s.rows))
	for _, t := range s.ticks {
		if t.label != "" {
			labels[s.row(s.f.y.at(t.value))] = t.label
		}
	}
	for i, row := range s.rows {
		axis := "│"
		if labels[i] != "" {
			axis = "┤"
		}
		out = append(out, pad(labels[i], s.left-2)+" "+axis+string(row))
	}
	return append(out, s.foot()...)
}

// foot is the horizontal axis with its numbers, and its head at the end.
func (s *sheet) foot() []string {
	axis := []rune(strings.Repeat("─", s.width()))
	numbers := []rune(strings.Repeat(" ", s.left+s.width()+1))
	free := 0 // the first column that no number needs
	runes := func(label string) float64 { return float64(utf8.RuneCountInString(label) + 2) }
	for _, t := range s.f.x.fitting(max(s.width()/12, 3), float64(s.width()), runes) {
		if t.label == "" {
			continue
		}
		column, label := s.column(s.f.x.at(t.value)), []rune(t.label)
		axis[column] = '┬'
		from := min(max(s.left+column-len(label)/2, 0), len(numbers)-len(label))
		if from >= free {
			copy(numbers[from:], label)
			free = from + len(label) + 1
		}
	}
	out := []string{pad("└", s.left) + string(axis), string(numbers)}
	if s.f.xHead != "" {
		out = append(out, pad(s.f.xHead, s.left+s.width()))
	}
	return out
}

// pad puts blanks before a text.
func pad(s string, columns int) string {
	return strings.Repeat(" ", max(columns-utf8.RuneCountInString(s), 0)) + s
}
