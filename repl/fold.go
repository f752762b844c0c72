package repl

import (
	"strings"
	"unicode/utf8"
)

// helpWidth is how many columns a line of help may take.
const helpWidth = 100

// folded breaks a line at its last blank within helpWidth, as often as it
// takes. What goes on stands below the last column of the line, the one behind
// two blanks or more.
func folded(line string) []string {
	indent := 4
	if gap := strings.LastIndex(line, "  "); gap > 0 {
		indent = utf8.RuneCountInString(line[:gap+2])
	}
	margin := strings.Repeat(" ", indent)
	var out []string
	for utf8.RuneCountInString(line) > helpWidth {
		cut := lastBlank(line, indent)
		if cut < 0 {
			break
		}
		out = append(out, line[:cut])
		line = margin + line[cut+1:]
	}
	return append(out, line)
}

// lastBlank is where the last blank between an indent and helpWidth lies, in
// bytes; −1 when there is none.
func lastBlank(line string, indent int) int {
	last, column := -1, 0
	for i, r := range line {
		if column > helpWidth {
			break
		}
		if r == ' ' && column > indent {
			last = i
		}
		column++
	}
	return last
}

func foldedAll(lines []string) []string {
	var out []string
	for _, l := range lines {
		out = append(out, folded(l)...)
	}
	return out
}
