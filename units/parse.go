package units

import (
	"fmt"
	"strings"
	"unicode/utf8"
)

// ParseError says why a text is no unit. Start and End are byte offsets of the
// place in Text; Symbol is the word at fault when a word is, and Hint says one
// way on.
type ParseError struct {
	Text       string
	Start, End int
	Symbol     string
	Msg, Hint  string
}

func (e *ParseError) Error() string {
	if e.Hint == "" {
		return e.Msg
	}
	return e.Msg + ": " + e.Hint
}

const (
	maxUnit = 200 // bytes of a unit as typed and as printed; bounds the depth too
	growth  = 8   // printing makes a unit longer by less than this
	// maxMagnitude bounds the scale of a unit, so that it is a float64.
	maxMagnitude = 300
)

// Parse reads a unit: "mJ/cm^2", "W/(m*K)", "nm⁻²", "1/K", "/µm", "1". A unit
// is one word; its symbols are joined by /, * or ·. Every error is a
// *ParseError.
func (s *System) Parse(text string) (Unit, error) {
	p := reader{sys: s, text: text}
	if len(text) > maxUnit {
		return Unit{}, p.fail(0, len(text), fmt.Sprintf("a unit has at most %d bytes", maxUnit), nameIt)
	}
	if p.peek() == end {
		return Unit{}, p.fail(0, len(text), "here a unit is missing", "write a unit such as nm, or 1 for a pure number")
	}
	parts, err := p.unit()
	switch {
	case err != nil:
		return Unit{}, err
	case p.peek() != end:
		return Unit{}, p.stray()
	}
	return p.complete(parts)
}

// nameIt is the way on from a unit that is too much.
const nameIt = "name the quantity and multiply"

// complete makes the unit. Degree Celsius is a point on a scale by itself; in
// a compound it is the kelvin (SI Brochure 2.3.1).
func (p *reader) complete(parts []part) (Unit, error) {
	point := len(parts) == 1 && parts[0].symbol == celsius && parts[0].num == 1 && parts[0].den == 1
	for i := range parts {
		if parts[i].symbol == celsius && !point {
			parts[i].symbol = "K"
		}
	}
	u, err := compose(parts)
	if err != nil {
		return Unit{}, p.fail(0, len(p.text), err.Error(), nameIt)
	}
	if m := u.scale.magnitude(); m > maxMagnitude || m < -maxMagnitude {
		return Unit{}, p.fail(0, len(p.text), fmt.Sprintf("this unit is outside of 1e-%d to 1e%[1]d in SI units", maxMagnitude), nameIt)
	}
	if len(p.text)*growth > maxUnit && len(u.String()) > maxUnit {
		return Unit{}, p.fail(0, len(p.text), fmt.Sprintf("a unit has at most %d bytes when it is printed", maxUnit), nameIt)
	}
	u.point = point
	return u, nil
}

type reader struct {
	sys  *System
	text string
	pos  int
}

func (p *reader) fail(start, end int, msg, hint string) *ParseError {
	return &ParseError{Text: p.text, Start: start, End: end, Msg: msg, Hint: hint}
}

const end rune = -1

// peek passes over marks that are not seen and gives the rune behind them, or
// end.
func (p *reader) peek() rune {
	for p.pos < len(p.text) {
		r, n := utf8.DecodeRuneInString(p.text[p.pos:])
		if !unseen(r) {
			return r
		}
		p.pos += n
	}
	return end
}

// next passes over the rune that peek gave.
func (p *reader) next() {
	_, n := utf8.DecodeRuneInString(p.text[p.pos:])
	p.pos += n
}

// unit reads factors joined by product marks and then solidi, up to a closing
// parenthesis or the end.
func (p *reader) unit() ([]part, error) {
	var parts []part
	var err error
	r := p.peek()
	start, slash := p.pos, -1
	switch r {
	case '1':
		p.next()
		if r := p.peek(); r != end && r != '/' {
			return nil, p.numberInside(start)
		}
	case '/':
	default:
		if parts, err = p.factor(); err != nil {
			return nil, err
		}
	}
	for {
		r := p.peek()
		at := p.pos
		switch {
		case r == '/':
			slash = at
		case !isProduct(r):
			return parts, nil
		case strings.HasPrefix(p.text[at:], "**"):
			return nil, p.fail(at, at+2, "** is no power here", "write "+strings.ReplaceAll(p.text, "**", "^"))
		case slash >= 0:
			return nil, p.ambiguous(start, slash, at)
		}
		p.next()
		f, err := p.factor()
		if err != nil {
			return nil, err
		}
		for i := range f {
			if r == '/' {
				f[i].num = -f[i].num
			}
		}
		parts = append(parts, f...)
	}
}

// factor reads a symbol or a parenthesis, with its power.
func (p *reader) factor() ([]part, error) {
	r := p.peek()
	start := p.pos
	var parts []part
	switch {
	case r == '(':
		p.next()
		inside, err := p.unit()
		if err != nil {
			return nil, err
		}
		if p.peek() != ')' {
			return nil, p.unclosed(start)
		}
		p.next()
		parts = inside
	case isSymbol(r):
		one, err := p.symbol()
		if err != nil {
			return nil, err
		}
		parts = []part{one}
	case r == end:
		return nil, p.fail(max(0, start-1), start, "the unit breaks off here", "write the symbol that follows")
	default:
		return nil, p.stray()
	}
	num, den, has, err := p.power()
	if err != nil || !has {
		return parts, err
	}
	for i := range parts {
		if parts[i], err = parts[i].power(num, den); err != nil {
			return nil, p.fail(start, p.pos, err.Error(), "exponents are multiples of 1/6 from -21 to 21")
		}
	}
	return parts, nil
}

func (p *reader) symbol() (part, error) {
	start := p.pos
	var b strings.Builder
	for r := p.peek(); isSymbol(r) || r == ring && b.Len() > 0; r = p.peek() {
		b.WriteString(folded(r))
		p.next()
	}
	word := strings.ReplaceAll(b.String(), "A"+string(ring), "Å")
	if one, ok := p.sys.lookup(word); ok {
		return one, nil
	}
	msg, hint := p.sys.explain(word)
	return part{}, &ParseError{Text: p.text, Start: start, End: p.pos, Symbol: word, Msg: msg, Hint: hint}
}
