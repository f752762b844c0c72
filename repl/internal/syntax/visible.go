package syntax

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// hidden says whether a rune steers a screen instead of standing on it:
// control codes, line separators, marks that turn the direction of a text.
func hidden(r rune) bool {
	return unicode.IsControl(r) || r == '\u2028' || r == '\u2029' || unicode.Is(unicode.Bidi_Control, r)
}

// Visible writes a text so that no control code reaches a screen.
func Visible(text string) string {
	var b strings.Builder
	for i, r := range text {
		switch {
		case r == utf8.RuneError && notUTF8(text[i:]):
			b.WriteString("<not UTF-8>")
		case r == '\t':
			b.WriteString(" ")
		case hidden(r):
			fmt.Fprintf(&b, "<U+%04X>", r)
		default:
			b.WriteRune(r)
		}
	}
	return b.String()
}

func notUTF8(text string) bool {
	_, n := utf8.DecodeRuneInString(text)
	return n == 1
}

// unreadable refuses the first byte that is no UTF-8 and the first hidden rune
// of a statement, notes and texts included: what is said is also kept in
// files, and what it looks like is what it is. A tab is a blank.
func unreadable(src string) *Error {
	for i, r := range src {
		switch {
		case r == utf8.RuneError && notUTF8(src[i:]):
			return Fail(Span{i, i + 1}, fmt.Sprintf("the byte %02X is no UTF-8 text", src[i]), "save or paste the text as UTF-8")
		case r == '\n' || r == '\r':
			return Fail(Span{i, i + 1}, "a statement is one line", "give each line to itself; blocks end with a line end")
		case hidden(r) && r != '\t':
			return Fail(Span{i, i + utf8.RuneLen(r)}, Visible(string(r))+" is not seen on a screen and has no meaning here", "remove it")
		}
	}
	return nil
}
