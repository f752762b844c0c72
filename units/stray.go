package units

import (
	"errors"
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// ambiguous refuses a product behind a solidus; start is where the quotient
// begins, slash and mark are the places of the two signs.
func (p *reader) ambiguous(start, slash, mark int) error {
	above, below := p.text[start:slash], p.text[slash+1:mark]
	_, n := utf8.DecodeRuneInString(p.text[mark:])
	rest := p.text[mark+n:]
	hint := "group what is divided by with parentheses"
	if !strings.ContainsAny(above+rest, "/()*·⋅∙•. ") && below != "" && rest != "" {
		times := above + "*"
		if above == "" || above == "1" {
			times = ""
		}
		hint = fmt.Sprintf("write %s/(%s*%s) or %s%s/%s", above, below, rest, times, rest, below)
	}
	return p.fail(start, len(p.text), p.text+" can be read in two ways (SI Brochure 5.2)", hint)
}

func (p *reader) numberInside(start int) error {
	end := start
	for end < len(p.text) && (isDigit(rune(p.text[end])) || p.text[end] == '.') {
		end++
	}
	return p.fail(start, max(end, start+1), "a unit holds no number", "write the number before it, as in 12 h")
}

// unclosed refuses a parenthesis that opens at start and does not end where a
// symbol could.
func (p *reader) unclosed(start int) error {
	if p.peek() == end {
		return p.fail(start, p.pos, "this parenthesis is not closed", "write ) where it ends")
	}
	return p.stray()
}

// stray refuses a mark that no unit has.
func (p *reader) stray() error {
	r, n := utf8.DecodeRuneInString(p.text[p.pos:])
	at, after := p.pos, p.pos+n
	switch {
	case isDigit(r):
		return p.numberInside(at)
	case r == '.' || unicode.IsSpace(r):
		return p.apart(at, after, r)
	case r == '+' && after < len(p.text) && isDigit(rune(p.text[after])):
		return p.fail(at, after, "a power has no plus sign", "write "+p.text[:at]+"^"+p.text[after:])
	case r == '{' || r == '[' || r == '}' || r == ']':
		return p.fail(at, after, "brackets and braces have no meaning inside a unit", "write the plain symbol, as in photon/nm^2")
	case r == '(':
		return p.fail(at, after, "a mark is missing before this parenthesis", "write * or / before it")
	case r == ')':
		return p.fail(at, after, "this parenthesis was never opened, or is empty", "leave it out")
	case r == utf8.RuneError:
		return p.fail(at, after, "this byte is no UTF-8 text", "save the text as UTF-8")
	case r == '/' || isProduct(r):
		return p.fail(at, after, "a symbol is missing before "+string(r), "write it, or leave the mark out")
	}
	return p.fail(at, after, fmt.Sprintf("%q has no meaning in a unit", r), "symbols are joined by /, * or ·, powers are written ^2")
}

// apart refuses a unit of several words or with points between its symbols,
// and offers the one word that it would be.
func (p *reader) apart(at, after int, r rune) error {
	msg := "a point does not join symbols"
	if r != '.' {
		msg = "a unit is one word without blanks"
	}
	spelled := oneWord(p.text)
	hint := "write " + spelled
	var bad *ParseError
	if _, err := p.sys.Parse(spelled); errors.As(err, &bad) {
		hint = "join symbols by /, * or ·"
		if bad.Symbol == "" && bad.Hint != "" {
			hint = bad.Hint
		}
	}
	return p.fail(at, after, msg, hint)
}

// oneWord joins by * what stands apart; "per" is a solidus.
func oneWord(text string) string {
	words := strings.FieldsFunc(text, func(r rune) bool { return r == '.' || unicode.IsSpace(r) })
	var b strings.Builder
	joined := true // nothing is missing between what is written and what follows
	for _, word := range words {
		first, _ := utf8.DecodeRuneInString(word)
		last, _ := utf8.DecodeLastRuneInString(word)
		switch {
		case word == "per":
			word, first, last = "/", '/', '/'
		case !joined && first != '/' && first != ')' && !isProduct(first):
			b.WriteByte('*')
		}
		b.WriteString(word)
		joined = last == '/' || last == '(' || isProduct(last)
	}
	return b.String()
}
