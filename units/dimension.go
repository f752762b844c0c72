package units

import (
	"fmt"
	"strings"
)

// Dimension says what a quantity is made of: exponents of the seven SI base
// dimensions and of the counted things (wafer, field, die, pulse and those
// that a System declares). The zero value is the dimension of a pure number.
// Dimensions compare with == and serve as map keys.
//
// Exponents are held in sixths, so that square and cube roots stay exact, and
// reach from −21 to +21.
type Dimension struct {
	si, things, declared uint64 // eight signed bytes each, one per lane
}

// Base names one independent dimension: one of the seven of the SI or a
// counted thing.
type Base uint8

// The SI base dimensions in the order of SI Brochure, 9th edition, table 3,
// then the counted things that every System knows.
const (
	TimeBase Base = iota
	LengthBase
	MassBase
	CurrentBase
	TemperatureBase
	AmountBase
	LuminousBase
	_
	Wafer
	Field
	Die
	Pulse
	firstDeclared
)

const (
	sixths   = 6 // the fixed denominator of exponents
	maxSixth = 21 * sixths
	lanes    = 8 // signed bytes in a word
	lastBase = Base(3*lanes - 1)
	// MaxDeclared is how many counted things a System may declare.
	MaxDeclared = int(lastBase-firstDeclared) + 1
)

// Of gives the dimension that is the base to the first power; beyond the last
// base it is that of a number.
func (b Base) Of() Dimension {
	if b > lastBase {
		return Dimension{}
	}
	return Dimension{}.with(b, sixths)
}

// Counted says whether the base is a counted thing and not one of the SI.
func (b Base) Counted() bool { return b >= Wafer }

func (d Dimension) words() [3]uint64 { return [3]uint64{d.si, d.things, d.declared} }

// with returns d with the exponent of one base set, in sixths.
func (d Dimension) with(b Base, n int8) Dimension {
	w := d.words()
	shift := uint(b%lanes) * 8
	w[b/lanes] = w[b/lanes]&^(0xff<<shift) | uint64(uint8(n))<<shift
	return Dimension{w[0], w[1], w[2]}
}

// sixth returns the exponent of a base in sixths.
func (d Dimension) sixth(b Base) int8 {
	return int8(d.words()[b/lanes] >> (uint(b%lanes) * 8))
}

// Exponent returns the exponent of a base as a fraction in lowest terms.
func (d Dimension) Exponent(b Base) (num, den int) {
	if b > lastBase {
		return 0, 1
	}
	return reduce(int(d.sixth(b)), sixths)
}

// IsNumber says whether d is the dimension of a pure number.
func (d Dimension) IsNumber() bool { return d == Dimension{} }

// HasCounted says whether a counted thing takes part in d.
func (d Dimension) HasCounted() bool { return d.things|d.declared != 0 }

// WithoutCounted returns d with every counted thing dropped.
func (d Dimension) WithoutCounted() Dimension { return Dimension{si: d.si} }

const high = 0x8080808080808080

// addBytes adds eight signed bytes lane by lane; over has the high bit of each
// lane that overflowed.
func addBytes(a, b uint64) (sum, over uint64) {
	sum = (a&^high + b&^high) ^ ((a ^ b) & high)
	return sum, (a ^ sum) & (b ^ sum) & high
}

// negBytes negates eight signed bytes; a lane of −128 never occurs, since
// exponents end at ±126.
func negBytes(a uint64) uint64 {
	sum, _ := addBytes(^a, 0x0101010101010101)
	return sum
}

// Mul returns the dimension of a product. It fails when an exponent leaves
// the range −21 to +21.
func (d Dimension) Mul(e Dimension) (Dimension, error) {
	if p, ok := d.mulPlain(e); ok {
		return p, nil
	}
	si, large := addLanes(d.si, e.si)
	things, large2 := addLanes(d.things, e.things)
	declared, large3 := addLanes(d.declared, e.declared)
	if large|large2|large3 != 0 {
		return d.mulSlowly(e)
	}
	return Dimension{si, things, declared}, nil
}

// mulPlain is Mul where no counted thing takes part and no exponent is large;
// it is small enough to be inlined.
func (d Dimension) mulPlain(e Dimension) (Dimension, bool) {
	si, large := addLanes(d.si, e.si)
	return Dimension{si: si}, large|d.things|e.things|d.declared|e.declared == 0
}

// addLanes is addBytes; large is not zero when a sum overflowed or left −64 to
// 63, so that the range must be looked at closely.
func addLanes(a, b uint64) (sum, large uint64) {
	sum, over := addBytes(a, b)
	return sum, over | (sum^sum<<1)&high
}

// mulSlowly is Mul lane by lane, with the exact check of the range.
func (d Dimension) mulSlowly(e Dimension) (Dimension, error) {
	for b := Base(0); b <= lastBase; b++ {
		n := int(d.sixth(b)) + int(e.sixth(b))
		if n > maxSixth || n < -maxSixth {
			return Dimension{}, ErrExponent
		}
		d = d.with(b, int8(n))
	}
	return d, nil
}

// Div returns the dimension of a quotient, with the error of Mul.
func (d Dimension) Div(e Dimension) (Dimension, error) {
	return d.Mul(Dimension{negBytes(e.si), negBytes(e.things), negBytes(e.declared)})
}

// Pow returns the dimension of d to the power num/den. It fails when an
// exponent leaves the range or is no multiple of 1/6; the error of the latter
// is ErrRoot.
func (d Dimension) Pow(num, den int) (Dimension, error) {
	if den == 0 {
		return Dimension{}, ErrRoot
	}
	num, den = reduce(num, den)
	var p Dimension
	for b := Base(0); b <= lastBase; b++ {
		n := int(d.sixth(b))
		if n == 0 {
			continue
		}
		if num > 127 || num < -127 {
			return Dimension{}, ErrExponent
		}
		if n*num%den != 0 {
			return Dimension{}, ErrRoot
		}
		n = n * num / den
		if n > maxSixth || n < -maxSixth {
			return Dimension{}, ErrExponent
		}
		p = p.with(b, int8(n))
	}
	return p, nil
}

// baseSymbols are the symbols that String writes, in lanes.
var baseSymbols = [...]string{
	"s", "m", "kg", "A", "K", "mol", "cd", "",
	"wafer", "field", "die", "pulse",
}

func (b Base) symbol() string {
	if int(b) < len(baseSymbols) {
		return baseSymbols[b]
	}
	return fmt.Sprintf("thing%d", b-firstDeclared+1)
}

// String writes d in base units, as "kg·s⁻²"; a pure number is "1". The names
// of declared things are known to their System only; see System.BaseText.
func (d Dimension) String() string { return d.text(Base.symbol) }

// order in which bases are written: the field's habit, mass first.
var writing = [...]Base{MassBase, LengthBase, TimeBase, CurrentBase, TemperatureBase, AmountBase, LuminousBase}

func (d Dimension) bases() []Base {
	var list []Base
	for _, b := range writing {
		if d.sixth(b) != 0 {
			list = append(list, b)
		}
	}
	for b := Wafer; b <= lastBase; b++ {
		if d.sixth(b) != 0 {
			list = append(list, b)
		}
	}
	return list
}

func (d Dimension) text(symbol func(Base) string) string {
	if d.IsNumber() {
		return "1"
	}
	var parts []string
	for _, b := range d.bases() {
		num, den := d.Exponent(b)
		parts = append(parts, symbol(b)+superscript(num, den))
	}
	return strings.Join(parts, "·")
}

func reduce(num, den int) (int, int) {
	a, b := num, den
	for b != 0 {
		a, b = b, a%b
	}
	if a < 0 {
		a = -a
	}
	if den < 0 {
		a = -a
	}
	if a == 0 {
		return 0, 1
	}
	return num / a, den / a
}

var raised = strings.NewReplacer("0", "⁰", "1", "¹", "2", "²", "3", "³", "4", "⁴",
	"5", "⁵", "6", "⁶", "7", "⁷", "8", "⁸", "9", "⁹", "-", "⁻")

// superscript writes an exponent as raised digits, a fraction as ^(1/2); the
// exponent one is not written.
func superscript(num, den int) string {
	switch {
	case den != 1:
		return fmt.Sprintf("^(%d/%d)", num, den)
	case num == 1:
		return ""
	}
	return raised.Replace(fmt.Sprint(num))
}
