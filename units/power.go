package units

import (
	"errors"
	"strconv"
	"strings"
	"unicode/utf8"
)

// power reads what stands behind a symbol: ^2, ^-1, ^(1/2), 2, -1, ², ⁻¹.
func (p *reader) power() (num, den int, has bool, err error) {
	r := p.peek()
	start := p.pos
	den = 1
	switch {
	case r == '^':
		p.next()
		if p.peek() == '(' {
			num, den, err = p.fraction(start)
		} else {
			num, err = p.digits(start)
		}
	case lowered(r) != 0:
		num, err = p.raised(start)
	case isDigit(r), isMinus(r) && p.digitAfter():
		num, err = p.digits(start)
	default:
		return 0, 1, false, nil
	}
	if err != nil {
		return 0, 1, false, err
	}
	if r := p.peek(); r == '^' || isDigit(r) || lowered(r) != 0 || r == '.' && p.digitAfter() {
		return 0, 1, false, p.badPower(start)
	}
	return num, den, true, nil
}

func (p *reader) badPower(start int) error {
	end := p.pos
	for end < len(p.text) && strings.ContainsRune("^0123456789.-+", rune(p.text[end])) {
		end++
	}
	return p.fail(start, max(end, start+1), errPower.Error(), "write one power behind a symbol, as in m^2")
}

// digitAfter says whether a digit touches the rune that peek gave.
func (p *reader) digitAfter() bool {
	ahead := *p
	ahead.next()
	return isDigit(ahead.peek())
}

func (p *reader) digits(start int) (int, error) {
	var b strings.Builder
	if isMinus(p.peek()) {
		b.WriteByte('-')
		p.next()
	}
	for r := p.peek(); isDigit(r); r = p.peek() {
		b.WriteRune(r)
		p.next()
	}
	return p.whole(start, b.String())
}

// whole reads the digits of a power; three are more than any exponent has.
func (p *reader) whole(start int, text string) (int, error) {
	n, err := strconv.Atoi(text)
	if err != nil || n > maxSixth || n < -maxSixth {
		return 0, p.badPower(start)
	}
	if n == 0 {
		return 0, p.fail(start, p.pos, "the power zero leaves no unit", "leave the symbol out")
	}
	return n, nil
}

func (p *reader) raised(start int) (int, error) {
	var b strings.Builder
	for lowered(p.peek()) != 0 {
		b.WriteByte(lowered(p.peek()))
		p.next()
	}
	return p.whole(start, b.String())
}

// fraction reads (1/2) or (3) behind ^.
func (p *reader) fraction(start int) (num, den int, err error) {
	p.next()
	den = 1
	if num, err = p.digits(start); err != nil {
		return 0, 1, err
	}
	if p.peek() == '/' {
		p.next()
		if den, err = p.digits(start); err != nil || den < 0 {
			return 0, 1, p.badPower(start)
		}
	}
	if p.peek() != ')' {
		return 0, 1, p.badPower(start)
	}
	p.next()
	num, den = reduce(num, den)
	return num, den, nil
}

// lowered gives the plain sign of a raised digit or minus, or 0.
func lowered(r rune) byte {
	if i := strings.IndexRune("⁰¹²³⁴⁵⁶⁷⁸⁹⁻", r); i >= 0 {
		return "0123456789-"[utf8.RuneCountInString("⁰¹²³⁴⁵⁶⁷⁸⁹⁻"[:i])]
	}
	return 0
}

func isDigit(r rune) bool { return r >= '0' && r <= '9' }

func isMinus(r rune) bool { return r == '-' || r == '−' }

var errPower = errors.New("a power is a whole number, or a fraction such as ^(1/2)")
