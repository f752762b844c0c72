//go:build linux && !race

package terminal

import (
	"strconv"
	"strings"
	"unicode/utf8"
)

// screen is as much of a terminal as the prompt needs: it keeps what can be
// seen. Its backspace goes from the first column to the line above when that
// line was wrapped, as some terminal multiplexers have it.
type screen struct {
	width    int
	rows     [][]rune
	wrapped  []bool // the row goes on in the next
	row, col int
	full     bool // the last column is written, and the next character wraps
	undone   string
}

func newScreen(width int) *screen {
	if width == 0 { // unknown
		width = 80
	}
	return &screen{width: width, rows: [][]rune{nil}, wrapped: []bool{false}}
}

func (s *screen) write(text string) {
	text = s.undone + text
	s.undone = ""
	for len(text) > 0 {
		if text[0] == keyEscape {
			length := sequenceLength(text)
			if length == 0 {
				s.undone = text
				return
			}
			s.sequence(text[2:length-1], text[length-1])
			text = text[length:]
			continue
		}
		if !utf8.FullRuneInString(text) {
			s.undone = text
			return
		}
		r, size := utf8.DecodeRuneInString(text)
		s.put(r)
		text = text[size:]
	}
}

// sequenceLength is 0 when the sequence goes on in the next write.
func sequenceLength(text string) int {
	for i := 2; i < len(text); i++ {
		if text[i] >= 0x40 {
			return i + 1
		}
	}
	return 0
}

func (s *screen) put(r rune) {
	switch r {
	case '\r':
		s.col, s.full = 0, false
	case '\n':
		s.down()
	case '\b':
		s.back()
	case '\a':
	default:
		s.character(r)
	}
}

func (s *screen) character(r rune) {
	if s.full {
		s.wrapped[s.row] = true
		s.down()
		s.col = 0
	}
	for len(s.rows[s.row]) <= s.col {
		s.rows[s.row] = append(s.rows[s.row], ' ')
	}
	s.rows[s.row][s.col] = r
	if s.full = s.col == s.width-1; !s.full {
		s.col++
	}
}

func (s *screen) down() {
	s.full = false
	if s.row++; s.row == len(s.rows) {
		s.rows, s.wrapped = append(s.rows, nil), append(s.wrapped, false)
	}
}

func (s *screen) back() {
	s.full = false
	switch {
	case s.col > 0:
		s.col--
	case s.row > 0 && s.wrapped[s.row-1]:
		s.row, s.col = s.row-1, s.width-1
	}
}

func (s *screen) sequence(parameters string, final byte) {
	n, _ := strconv.Atoi(parameters)
	switch final {
	case 'A':
		s.row, s.full = max(0, s.row-max(1, n)), false
	case 'B':
		s.row, s.full = min(len(s.rows)-1, s.row+max(1, n)), false
	case 'C':
		s.col, s.full = min(s.width-1, s.col+max(1, n)), false
	case 'J':
		s.cut()
		s.rows, s.wrapped = s.rows[:s.row+1], s.wrapped[:s.row+1]
	case 'K':
		if n == 2 {
			s.rows[s.row] = nil
		}
		s.cut()
	}
}

func (s *screen) cut() {
	s.rows[s.row] = s.rows[s.row][:min(s.col, len(s.rows[s.row]))]
	s.wrapped[s.row] = false
}

// String is what can be seen, the cursor as a block.
func (s *screen) String() string {
	var b strings.Builder
	for i, row := range s.rows {
		text := append([]rune(nil), row...)
		if i == s.row {
			for len(text) <= s.col {
				text = append(text, ' ')
			}
			text[s.col] = '█'
		}
		b.WriteString(strings.TrimRight(string(text), " ") + "\n")
	}
	return strings.TrimRight(b.String(), "\n") + "\n"
}
