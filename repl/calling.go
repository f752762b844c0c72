package repl

import (
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
)

// calling is the call that is being typed.
type calling struct {
	function string
	place    int    // of the argument being typed, from 0
	label    string // its name where one is given, as in area = …
}

// callAt finds the innermost call that is open at the end of a text.
func callAt(text string) (calling, bool) {
	depth, place, end := 0, 0, len(text)
	quoted := strings.Count(text, `"`)%2 == 1
	if quoted {
		return calling{}, false
	}
	argument := -1 // where the argument being typed begins
	for i := end - 1; i >= 0; i-- {
		switch text[i] {
		case ')', '}', ']':
			depth++
		case '{', '[':
			if depth == 0 {
				return calling{}, false
			}
			depth--
		case ',':
			if depth == 0 {
				if argument < 0 {
					argument = i + 1
				}
				place++
			}
		case '(':
			if depth > 0 {
				depth--
				continue
			}
			if argument < 0 {
				argument = i + 1
			}
			name := text[wordStart(text[:i]):i]
			label, _, has := strings.Cut(text[argument:], "=")
			if label = strings.TrimSpace(label); !has || strings.ContainsAny(label, " (<>") {
				label = ""
			}
			return calling{name, place, label}, name != ""
		}
	}
	return calling{}, false
}

// wordStart is where the word at the end of a text begins.
func wordStart(text string) int {
	start := len(text)
	for i, r := range text {
		if wordRune(r) {
			if start == len(text) {
				start = i
			}
		} else {
			start = len(text)
		}
	}
	return start
}

// parameter finds what the argument being typed stands for.
func (c calling) parameter(f *program.Function) *program.Param {
	at := c.place
	if c.label != "" {
		at = slices.IndexFunc(f.Params, func(p program.Param) bool { return p.Name == c.label })
	}
	if f.Variadic() {
		at = 0
	}
	if at < 0 || at >= len(f.Params) {
		return nil
	}
	return &f.Params[at]
}

// Hint is one line about the call that is being typed at the cursor, a byte
// offset: its arguments, and the one that is due; "" outside of calls.
func (s *Session) Hint(line string, cursor int) string {
	c, ok := callAt(line[:min(max(cursor, 0), len(line))])
	if !ok {
		return ""
	}
	if d := s.store.defs[c.function]; d != nil && d.own != nil {
		return program.OwnSignature(d.own)
	}
	f := s.rows[c.function]
	if f == nil {
		return ""
	}
	hint := f.Signature()
	if p := c.parameter(f); p != nil {
		hint += "   " + p.Name + ": " + s.paramKind(f, *p)
		if p.Doc != "" {
			hint += ", " + p.Doc
		}
	}
	return hint
}
