package terminal

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// visible makes a text safe to print: control characters, which could command
// the terminal, and marks that change the order of what is read appear as
// escapes, and so do bytes that are no UTF-8. A tab becomes one blank, so that
// marks under a line keep their places. Line breaks are for the caller.
func visible(text string) string {
	if !strings.ContainsFunc(text, hidden) {
		return text
	}
	var b strings.Builder
	for i, r := range text {
		switch {
		case r == '\t':
			b.WriteByte(' ')
		case r == utf8.RuneError && !strings.HasPrefix(text[i:], "\uFFFD"):
			fmt.Fprintf(&b, `\x%02x`, text[i])
		case !hidden(r) || r == utf8.RuneError:
			b.WriteRune(r)
		case r < 0x100:
			fmt.Fprintf(&b, `\x%02x`, r)
		default:
			fmt.Fprintf(&b, `\u%04x`, r)
		}
	}
	return b.String()
}

func hidden(r rune) bool {
	return unicode.IsControl(r) || r == utf8.RuneError || reorders(r)
}

// reorders holds for the line separators, the directional marks, embeddings,
// overrides and isolates of Unicode (UAX #9).
func reorders(r rune) bool {
	switch {
	case r == 0x061C, r == 0x200E, r == 0x200F:
		return true
	case r >= 0x2028 && r <= 0x202E, r >= 0x2066 && r <= 0x2069:
		return true
	}
	return false
}
