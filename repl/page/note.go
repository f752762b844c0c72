package page

import (
	"regexp"
	"strings"
	"unicode"
	"unicode/utf8"
)

// paragraphsOf cuts a note at its empty lines.
func paragraphsOf(lines []string) [][]string {
	var out [][]string
	fresh := true
	for _, l := range lines {
		if l == "" {
			fresh = true
			continue
		}
		if fresh {
			out = append(out, nil)
			fresh = false
		}
		out[len(out)-1] = append(out[len(out)-1], l)
	}
	return out
}

// firstSentence is the first line of a note, with the lines that go on with it:
// those that begin in lower case. The rest is what stands below.
func firstSentence(lines []string) (head string, rest []string) {
	n := 1
	for n < len(lines) {
		if r, _ := utf8.DecodeRuneInString(lines[n]); !unicode.IsLower(r) {
			break
		}
		n++
	}
	return joined(lines[:n]), lines[n:]
}

func joined(lines []string) string { return strings.Join(lines, " ") }

// numbered is a note that begins with a number of its own: 3. or 3.1) and the
// like. A quantity such as "3.5 W" is none.
var numbered = regexp.MustCompile(`^[0-9]+(\.[0-9]+)*[.)]\s`)

// levelOf is the level of a heading, 0 for a note that is none. A heading
// below another one needs one above it.
func levelOf(text string, below bool) int {
	number := numbered.FindString(text)
	switch {
	case number == "":
		return 0
	case below && strings.Contains(number[:len(number)-2], "."):
		return 3
	}
	return 2
}
