package chart

import (
	"math/bits"

	"example.com/dosewright/repl"
)

// strokes are the characters for the thirds of a cell that a curve visits:
// the lower third counts 1, the middle 2, the upper 4. They are in every font
// and of one width everywhere, which the finer braille dots are not.
var strokes = [8]rune{' ', '.', '·', ':', '\'', ':', ':', '|'}

// thirds is how finely a stroke tells the height.
const thirds = 3

// sketchCurves draws one curve in strokes, several in letters.
func sketchCurves(p *repl.Picture, columns int) ([]string, error) {
	f, curves, err := curvesOf(p, columns)
	if err != nil {
		return nil, err
	}
	s := newSheet(f, columns)
	if len(curves) == 1 {
		s.stroke(curves[0])
		return s.lines(), nil
	}
	s.letters(curves)
	var names []string
	for i, c := range curves {
		names = append(names, string(letter(i))+" "+c.name)
	}
	return append(s.lines(), wrapped(names, columns)...), nil
}

func letter(i int) rune { return rune('a' + i) }

// stroke draws a curve in strokes, a point alone as an o.
func (s *sheet) stroke(c curve) {
	visited := s.blank()
	c.walk(s.width(), thirds*len(s.rows), func(column, row int) {
		visited[row/thirds][column] |= 4 >> (row % thirds)
	})
	for j, row := range visited {
		for i, third := range row {
			s.rows[j][i] = strokes[third]
		}
	}
	for _, run := range c.runs {
		if len(run) == 1 {
			s.rows[s.row(run[0].y)][s.column(run[0].x)] = 'o'
		}
	}
}

// letters draws each curve in its letter. Where curves share cells, their
// letters take turns from column to column.
func (s *sheet) letters(curves []curve) {
	visited := s.blank()
	for k, c := range curves {
		c.walk(s.width(), thirds*len(s.rows), func(column, row int) { visited[row/thirds][column] |= 1 << k })
	}
	for j, row := range visited {
		for i, set := range row {
			if n := bits.OnesCount16(set); n > 0 {
				for range i % n {
					set &= set - 1 // not this one's turn
				}
				s.rows[j][i] = letter(bits.TrailingZeros16(set))
			}
		}
	}
}

// blank is a set for each cell.
func (s *sheet) blank() [][]uint16 {
	out := make([][]uint16, len(s.rows))
	for j := range out {
		out[j] = make([]uint16, s.width())
	}
	return out
}

// walk visits the cells of a curve, on a sheet of so many columns and rows.
func (c curve) walk(columns, rows int, visit func(column, row int)) {
	for _, run := range c.runs {
		here := run[0]
		for _, next := range run {
			x0, y0 := dot(here.x, columns), dot(1-here.y, rows)
			x1, y1 := dot(next.x, columns), dot(1-next.y, rows)
			steps := max(x1-x0, x0-x1, y1-y0, y0-y1, 1)
			for k := range steps + 1 {
				visit(x0+rounded(k*(x1-x0), steps), y0+rounded(k*(y1-y0), steps))
			}
			here = next
		}
	}
}

// rounded is a/b to the nearest whole number, for b > 0.
func rounded(a, b int) int {
	if a < 0 {
		return -((-a + b/2) / b)
	}
	return (a + b/2) / b
}

// wrapped fills lines with items, three blanks between them.
func wrapped(items []string, columns int) []string {
	var out []string
	for _, item := range items {
		item = clip(item, columns)
		if n := len(out) - 1; n >= 0 && len([]rune(out[n]))+3+len([]rune(item)) <= columns {
			out[n] += "   " + item
		} else {
			out = append(out, item)
		}
	}
	return out
}
