package syntax

import (
	"strings"
	"unicode/utf8"
)

// unit scans a unit word: symbols joined by /, * or · when a letter, ° or %
// follows, or a parenthesis and a letter; powers; parentheses; no blanks. It
// scans what looks like a unit even where it is none (m**2, mJ/cm2.s), so that
// the one who knows units can say how to write it.
func (s *scanner) unit(blank bool) (Token, bool) {
	start := s.pos
	if s.peekAt(0) == '/' {
		if !blank || !s.symbolAt(s.pos+1) {
			return Token{}, false
		}
		s.pos++
		if s.peekAt(0) == '(' {
			s.pos++
			return s.unitRest(start, 1), true
		}
	} else if !s.letterOrMark(s.pos) {
		return Token{}, false
	}
	if word := s.symbol(); inGrammar(word) {
		s.pos = start
		return Token{}, false
	}
	return s.unitRest(start, 0), true
}

func (s *scanner) letterOrMark(pos int) bool {
	if pos >= len(s.src) {
		return false
	}
	r, _ := utf8.DecodeRuneInString(s.src[pos:])
	return isLetter(r) || strings.ContainsRune("°%′″℃º‰", r)
}

// symbolAt says whether a unit goes on at pos, behind a joining mark.
func (s *scanner) symbolAt(pos int) bool {
	if pos < len(s.src) && s.src[pos] == '(' {
		pos++
	}
	return s.letterOrMark(pos)
}

// symbol skips one run of letters and marks, with an underscore and what
// follows it, since such a word can only be a name in the wrong place.
func (s *scanner) symbol() string {
	start, under := s.pos, false
	for s.pos < len(s.src) {
		r, n := utf8.DecodeRuneInString(s.src[s.pos:])
		under = under || r == '_'
		if !s.letterOrMark(s.pos) && r != '_' && !(under && isDigit(r)) && r != '\u200B' && r != '\u00AD' {
			break
		}
		s.pos += n
	}
	return s.src[start:s.pos]
}

func (s *scanner) unitRest(start, open int) Token {
	for s.pos < len(s.src) {
		before := s.pos
		r, n := utf8.DecodeRuneInString(s.src[s.pos:])
		switch {
		case strings.HasPrefix(s.src[s.pos:], "**") && (isDigit(rune(s.peekAt(2))) || s.peekAt(2) == '-'):
			s.pos += 3
			s.plainDigits()
		case strings.ContainsRune("/*·⋅∙•.", r) && s.symbolAt(s.pos+n):
			s.pos += n
			if s.peekAt(0) == '(' {
				open++
				s.pos++
			}
			s.symbol()
		case r == ' ' && open > 0 && s.letterOrMark(s.pos+1):
			s.pos++ // W/(m K): whoever knows units says how to write it
		case r == ')' && open > 0:
			open--
			s.pos++
		case s.letterOrMark(s.pos) || r == '_':
			s.symbol()
		default:
			s.power(r)
		}
		if s.pos == before {
			break
		}
	}
	return Token{Unit, s.src[start:s.pos], Span{start, s.pos}}
}

// power skips ^2, ^-1, ^(1/2), 2, -1, ² and ⁻¹ behind a symbol.
func (s *scanner) power(r rune) {
	touches := s.pos > 0 && s.letterBefore()
	switch {
	case unraise(r) != 0:
		s.raised()
	case r == '^':
		switch next := s.peekAt(1); {
		case isDigit(rune(next)):
			s.pos++
			s.plainDigits()
		case next == '-' && isDigit(rune(s.peekAt(2))):
			s.pos += 2
			s.plainDigits()
		case next == '(':
			s.fraction()
		}
	case isDigit(r) && touches:
		s.plainDigits()
	case (r == '-' || r == '+') && touches && isDigit(rune(s.peekAt(1))):
		s.pos++
		s.plainDigits()
	}
}

func (s *scanner) letterBefore() bool {
	r, _ := utf8.DecodeLastRuneInString(s.src[:s.pos])
	return isLetter(r)
}

// plainDigits skips digits, and a decimal part so that it can be refused.
func (s *scanner) plainDigits() {
	for isDigit(rune(s.peekAt(0))) || s.peekAt(0) == '.' && isDigit(rune(s.peekAt(1))) {
		s.pos++
	}
}

// fraction skips ^(1/2) when the parenthesis holds digits only.
func (s *scanner) fraction() {
	n := strings.IndexByte(s.src[s.pos:], ')')
	if n < 0 || strings.Trim(s.src[s.pos+2:s.pos+n], "0123456789/-") != "" {
		return
	}
	s.pos += n + 1
}
