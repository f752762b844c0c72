package terminal

import (
	"fmt"
	"strings"
	"unicode/utf8"

	"github.com/chzyer/readline"
)

// place is where the cursor stands on the screen while a line is edited.
// Places in the line are counted in cells from the start of the prompt.
type place struct {
	cursor, end   int
	width, height int // of the screen
}

func (e *editor) place(line edited) place {
	var measure readline.Runes
	width, height := size(e.screen)
	return place{
		cursor: len(prompt) + measure.WidthAll(line.text[:line.at]),
		end:    len(prompt) + measure.WidthAll(line.text),
		width:  width, height: height,
	}
}

// rows is how many rows fit below the line.
func (p place) rows() int { return max(0, p.height-1-p.end/p.width) }

// below draws texts in the rows below the line and takes the cursor back. The
// next drawing of the line clears them: they help with typing, and are no part
// of what was said and answered.
func (p place) below(texts []string, paint func(text, code string) string) string {
	texts = texts[:min(len(texts), p.rows())]
	if len(texts) == 0 {
		return ""
	}
	var b strings.Builder
	down := p.end/p.width - p.cursor/p.width
	if down > 0 {
		fmt.Fprintf(&b, "\x1b[%dB", down)
	}
	for i, text := range texts {
		b.WriteByte('\n')
		if i == 0 {
			b.WriteString("\x1b[J")
		}
		b.WriteString(paint(cut(margin+visible(text), p.width), dim))
	}
	fmt.Fprintf(&b, "\x1b[%dA\r", down+len(texts))
	if column := p.cursor % p.width; column > 0 {
		fmt.Fprintf(&b, "\x1b[%dC", column)
	}
	return b.String()
}

// fold breaks a text at blanks into rows of at most so many characters.
func fold(text string, width int) (rows []string) {
	row := ""
	for word := range strings.FieldsSeq(text) {
		switch longer := row + " " + word; {
		case row == "":
			row = word
		case utf8.RuneCountInString(longer) <= width:
			row = longer
		default:
			rows, row = append(rows, row), word
		}
	}
	if row != "" {
		rows = append(rows, row)
	}
	return rows
}

// cut keeps a text from wrapping.
func cut(text string, width int) string {
	if runes := []rune(text); width > 0 && len(runes) >= width {
		return string(runes[:width-1])
	}
	return text
}
