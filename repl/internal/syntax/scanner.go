package syntax

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// scanner cuts a statement into tokens on demand.
type scanner struct {
	src   string
	pos   int
	depth int // open parentheses and braces: a comma between digits is legal there
}

func (s *scanner) peek() rune {
	r, _ := utf8.DecodeRuneInString(s.src[s.pos:])
	if s.pos >= len(s.src) {
		return -1
	}
	return r
}

func (s *scanner) peekAt(n int) byte {
	if s.pos+n < len(s.src) {
		return s.src[s.pos+n]
	}
	return 0
}

func isLetter(r rune) bool { return unicode.IsLetter(r) || r == '\u030A' }
func isDigit(r rune) bool  { return '0' <= r && r <= '9' }

func (s *scanner) blanks() bool {
	start := s.pos
	for s.pos < len(s.src) {
		r, n := utf8.DecodeRuneInString(s.src[s.pos:])
		if !unicode.IsSpace(r) && r != '\u200B' && r != '\uFEFF' && r != '\u00AD' {
			break
		}
		s.pos += n
	}
	return s.pos > start
}

// next returns the next token; unitHere says that a unit may stand here.
func (s *scanner) next(unitHere bool) (Token, *Error) {
	blank := s.blanks()
	if unitHere {
		if t, ok := s.unit(blank); ok {
			return t, nil
		}
	}
	start := s.pos
	r := s.peek()
	switch {
	case r == -1 || r == '#':
		return Token{End, "", Span{start, start}}, nil
	case isDigit(r):
		return s.number()
	case isLetter(r) || r == '_':
		return s.word()
	case r == '"':
		return s.text()
	case r == '[':
		return s.bracket()
	case unraise(r) != 0:
		return s.raised(), nil
	}
	return s.operator(r)
}

func (s *scanner) word() (Token, *Error) {
	start := s.pos
	for s.pos < len(s.src) {
		r, n := utf8.DecodeRuneInString(s.src[s.pos:])
		if !isLetter(r) && !isDigit(r) && r != '_' && !(r == '.' && s.pos > start && s.letterAt(s.pos+1)) {
			break
		}
		s.pos += n
	}
	at := Span{start, s.pos}
	if n := s.pos - start; n > MaxName {
		return Token{}, Fail(at, fmt.Sprintf("this name has %d bytes; a name may have %d", n, MaxName), "choose a shorter name")
	}
	return Token{Word, s.src[start:s.pos], at}, nil
}

func (s *scanner) letterAt(pos int) bool {
	if pos >= len(s.src) {
		return false
	}
	r, _ := utf8.DecodeRuneInString(s.src[pos:])
	return isLetter(r)
}

func (s *scanner) text() (Token, *Error) {
	start := s.pos
	n := strings.IndexByte(s.src[start+1:], '"')
	if n < 0 {
		s.pos = len(s.src)
		return Token{}, Fail(Span{start, len(s.src)}, "this text has no closing quote", `texts are written "like this", on one line`)
	}
	s.pos = start + 1 + n + 1
	return Token{Text, s.src[start+1 : s.pos-1], Span{start, s.pos}}, nil
}

func (s *scanner) bracket() (Token, *Error) {
	start := s.pos
	n := strings.IndexByte(s.src[start:], ']')
	if n < 0 {
		s.pos = len(s.src)
		return Token{}, Fail(Span{start, len(s.src)}, "this bracket is not closed", "a stated unit is written [mJ/cm^2]")
	}
	s.pos = start + n + 1
	return Token{Bracket, strings.TrimSpace(s.src[start+1 : s.pos-1]), Span{start, s.pos}}, nil
}

const raisedDigits = "⁰¹²³⁴⁵⁶⁷⁸⁹"

// unraise gives the plain form of a raised digit or minus, or 0.
func unraise(r rune) byte {
	if r == '⁻' {
		return '-'
	}
	n := 0
	for _, d := range raisedDigits {
		if d == r {
			return byte('0' + n)
		}
		n++
	}
	return 0
}

func (s *scanner) raised() Token {
	start := s.pos
	var text []byte
	for s.pos < len(s.src) {
		r, n := utf8.DecodeRuneInString(s.src[s.pos:])
		b := unraise(r)
		if b == 0 {
			break
		}
		text = append(text, b)
		s.pos += n
	}
	return Token{Raised, string(text), Span{start, s.pos}}
}

// operators in the order in which they are tried, each with its ASCII form.
var operators = []struct{ typed, form string }{
	{"+/-", "±"},
	{"±", "±"},
	{"..", ".."},
	{"<=", "<="},
	{">=", ">="},
	{"≤", "<="},
	{"≥", ">="},
	{"**", "**"},
	{"==", "=="},
	{"+", "+"},
	{"-", "-"},
	{"−", "-"},
	{"–", "-"},
	{"*", "*"},
	{"×", "*"},
	{"·", "*"},
	{"⋅", "*"},
	{"/", "/"},
	{"^", "^"},
	{"(", "("},
	{")", ")"},
	{"{", "{"},
	{"}", "}"},
	{",", ","},
	{"=", "="},
	{"<", "<"},
	{">", ">"},
	{":", ":"},
	{"|", "|"},
	{"%", "%"},
	{"°", "°"},
}

func (s *scanner) operator(r rune) (Token, *Error) {
	start := s.pos
	for _, o := range operators {
		if !strings.HasPrefix(s.src[start:], o.typed) {
			continue
		}
		s.pos += len(o.typed)
		at := Span{start, s.pos}
		switch o.form {
		case "(", "{":
			s.depth++
		case ")", "}":
			s.depth--
		case "**":
			return Token{}, Fail(at, "** is no operator here", "a power is written x^2, a product x*y")
		case "==":
			return Token{}, Fail(at, "== is no operator here", "check a = b within 2 % compares; name = formula defines")
		case "%", "°":
			return Token{}, Fail(at, o.form+" stands right behind a number only", "write 70 % or 6°, or multiply by 1 "+o.form)
		}
		return Token{Op, o.form, at}, nil
	}
	_, n := utf8.DecodeRuneInString(s.src[start:])
	s.pos += n
	at := Span{start, s.pos}
	if r == '.' {
		return Token{}, Fail(at, "a number has digits on both sides of its point", "write 0.5 for .5 and 5 for 5.")
	}
	return Token{}, Fail(at, fmt.Sprintf("%s has no meaning here", Visible(string(r))), "see: help language")
}
