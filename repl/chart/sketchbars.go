package chart

import (
	"math"
	"strings"
	"unicode/utf8"

	"example.com/dosewright/repl"
)

// eighths are the blocks by which a bar ends.
var eighths = []rune(" ▁▂▃▄▅▆▇█")

// sketchBars draws a histogram in blocks, and measures its interval below.
func sketchBars(p *repl.Picture, columns int) ([]string, error) {
	f, b, err := barsOf(p)
	if err != nil {
		return nil, err
	}
	s := newSheet(f, columns)
	for i, tall := range b.tallest(s.width()) {
		level := int(tall*float64(8*len(s.rows)) + 0.5)
		for j := range s.rows {
			above := level - 8*(len(s.rows)-1-j)
			s.rows[j][i] = eighths[min(max(above, 0), 8)]
		}
	}
	lines := s.lines()
	if b.marked {
		lines = append(lines, s.measure(b))
	}
	return lines, nil
}

// tallest is the height of the highest bar in each of n equal columns.
func (b *bars) tallest(n int) []float64 {
	out := make([]float64, n)
	for i, h := range b.height {
		first := min(int(b.edges[i]*float64(n)), n-1)
		last := min(int(math.Ceil(b.edges[i+1]*float64(n)))-1, n-1)
		for k := first; k <= max(first, last); k++ {
			out[k] = math.Max(out[k], h)
		}
	}
	return out
}

// measure draws the interval under the axis: ├─ 27.06 to 32.94 ─┤, or with
// the numbers beside it if it is too short.
func (s *sheet) measure(b *bars) string {
	from, to := s.column(b.low), s.column(b.high)
	blank := strings.Repeat(" ", s.left+from)
	room := to - from - 1
	words := " " + b.limits + " "
	if free := room - utf8.RuneCountInString(words); free >= 2 {
		return blank + "├" + strings.Repeat("─", free/2) + words + strings.Repeat("─", free-free/2) + "┤"
	}
	mark := "├" + strings.Repeat("─", max(room, 0)) + "┤"
	if s.left+from+utf8.RuneCountInString(mark+words) <= s.left+s.width() {
		return blank + mark + words
	}
	before := max(s.left+from-utf8.RuneCountInString(words), 0)
	return strings.Repeat(" ", before) + words + mark
}
