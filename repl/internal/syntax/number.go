package syntax

import (
	"strings"
	"unicode/utf8"
)

// number scans 13.5, 1_000, 1.2e-3 and the concise forms 13.50(2) and
// 1.6(2)e-27. Grouping marks are dropped from the token's text.
func (s *scanner) number() (Token, *Error) {
	start := s.pos
	var b strings.Builder
	s.digits(&b)
	if s.peekAt(0) == '.' && isDigit(rune(s.peekAt(1))) {
		b.WriteByte('.')
		s.pos++
		s.digits(&b)
	}
	s.concise(&b)
	s.exponent(&b)
	at := Span{start, s.pos}
	switch {
	case s.peekAt(0) == '.' && s.peekAt(1) != '.' && !s.letterAt(s.pos+1):
		return Token{}, Fail(Span{start, s.pos + 1}, "a number has digits on both sides of its point",
			"write "+b.String()+" or "+b.String()+".0")
	case s.peekAt(0) == ',' && s.depth == 0 && isDigit(rune(s.peekAt(1))):
		end := s.pos + 1
		for end < len(s.src) && isDigit(rune(s.src[end])) {
			end++
		}
		rest := s.src[s.pos+1 : end]
		hint := "write " + b.String() + "." + rest + " for the decimal, " + b.String() + rest + " for the group; a list has a blank behind its comma"
		if whole, part, pointed := strings.Cut(b.String(), "."); pointed {
			hint = "write " + whole + part + "." + rest
		} else if len(rest) != 3 {
			hint = "write " + b.String() + "." + rest + " for the decimal; a list has a blank behind its comma"
		}
		return Token{}, Fail(Span{start, end}, s.src[start:end]+" may be a decimal comma or a group of digits", hint)
	}
	return Token{Number, b.String(), at}, nil
}

// digits copies digits and drops the marks that group them.
func (s *scanner) digits(b *strings.Builder) {
	for s.pos < len(s.src) {
		r, n := utf8.DecodeRuneInString(s.src[s.pos:])
		switch {
		case isDigit(r):
			b.WriteRune(r)
		case (r == '_' || r == '\u2009' || r == '\u202F') && isDigit(rune(s.peekAt(n))):
		default:
			return
		}
		s.pos += n
	}
}

// concise copies "(2)" or "(0.02)" when it touches the digits.
func (s *scanner) concise(b *strings.Builder) {
	if s.peekAt(0) != '(' || !isDigit(rune(s.peekAt(1))) {
		return
	}
	end := strings.IndexByte(s.src[s.pos:], ')')
	if end < 0 {
		return
	}
	inner := s.src[s.pos : s.pos+end+1]
	for _, r := range inner[1:end] {
		if !isDigit(r) && r != '.' && r != '\u2009' && r != '\u202F' && r != '_' {
			return
		}
	}
	b.WriteString(strings.NewReplacer("_", "", "\u2009", "", "\u202F", "").Replace(inner))
	s.pos += end + 1
}

// exponent copies e-3 or E+3; a letter e without digits belongs to a unit.
func (s *scanner) exponent(b *strings.Builder) {
	if c := s.peekAt(0); c != 'e' && c != 'E' {
		return
	}
	n, sign := 1, ""
	if rest := s.src[s.pos+1:]; strings.HasPrefix(rest, "-") || strings.HasPrefix(rest, "+") {
		n, sign = 2, rest[:1]
	} else if strings.HasPrefix(rest, "−") {
		n, sign = 1+len("−"), "-"
	}
	if !isDigit(rune(s.peekAt(n))) {
		return
	}
	b.WriteString("e" + sign)
	s.pos += n
	for isDigit(rune(s.peekAt(0))) {
		b.WriteByte(s.src[s.pos])
		s.pos++
	}
}
