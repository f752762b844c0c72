package units

import (
	"math"
	"math/big"
	"strconv"
	"strings"
)

// Unit is a unit of measurement: a dimension, an exact scale and the way it is
// printed. Units come from a System; the zero value is the unit one.
type Unit struct {
	dim   Dimension
	scale factor
	parts []part
	point bool // a temperature scale with its own zero
}

// part is one symbol of a unit with what it stands for and its exponent.
type part struct {
	symbol   string
	dim      Dimension
	scale    factor
	num, den int
}

// power raises a part; its exponent must be a multiple of 1/6 up to ±21.
func (p part) power(num, den int) (part, error) {
	p.num, p.den = reduce(p.num*num, p.den*den)
	switch n := p.num * sixths / p.den; {
	case sixths%p.den != 0:
		return p, ErrRoot
	case n > maxSixth || n < -maxSixth:
		return p, ErrExponent
	}
	return p, nil
}

// compose makes the unit that is the product of parts. Exponents are added up
// before their range is checked, so that the order of parts does not matter.
func compose(parts []part) (Unit, error) {
	u := Unit{parts: parts}
	var sum [lastBase + 1]int
	for _, p := range parts {
		for b := range sum {
			switch n := int(p.dim.sixth(Base(b))) * p.num; {
			case n == 0: // most are
			case n%p.den != 0:
				return Unit{}, ErrRoot
			default:
				sum[b] += n / p.den
			}
		}
		u.scale = u.scale.times(p.scale.power(p.num, p.den))
	}
	for b, n := range sum {
		if n > maxSixth || n < -maxSixth {
			return Unit{}, ErrExponent
		}
		u.dim = u.dim.with(Base(b), int8(n))
	}
	return u, nil
}

// celsiusZero returns 273.15 K (SI Brochure, 9th edition, 2.3.1).
func celsiusZero() *big.Rat { return big.NewRat(27315, 100) }

// Dimension returns the dimension of the unit.
func (u Unit) Dimension() Dimension { return u.dim }

// Point says whether the unit reads points on a scale with a zero of its own:
// degrees Celsius alone.
func (u Unit) Point() bool { return u.point }

// IsOne says whether u is the unit one, which is not printed.
func (u Unit) IsOne() bool { return len(u.parts) == 0 }

// Read gives the SI value of a decimal text in the unit, rounded to the
// nearest float64 once. Its errors are ErrNumber, ErrTooLarge, ErrTooSmall.
func (u Unit) Read(text string) (float64, error) {
	d, err := splitDecimal(text)
	switch {
	case err != nil:
		return 0, err
	case !u.point:
		return d.times(u.scale)
	case d.magnitude() > 310:
		return 0, ErrTooLarge
	case d.magnitude() < -400:
		d = decimal{digits: "0"}
	}
	r := d.rat()
	if d.minus {
		r.Neg(r)
	}
	v, _ := r.Add(r, celsiusZero()).Float64()
	if math.IsInf(v, 0) {
		return 0, ErrTooLarge
	}
	return v, nil
}

// ReadDifference is Read for a difference: the zero of a temperature scale
// does not count.
func (u Unit) ReadDifference(text string) (float64, error) {
	u.point = false
	return u.Read(text)
}

// From gives the value in the unit of a value in SI units, rounded once; it is
// infinite where a float64 cannot hold it, as for 1e300 m in qm. A Celsius
// temperature is the one with the fewest decimals that Read takes back to si:
// 26.85 for 300, although the nearest float64 to the kelvin value of 26.85 °C
// is not that.
func (u Unit) From(si float64) float64 {
	if !u.point || !celsiusRange(si) {
		return u.scale.divide(si)
	}
	v, _ := strconv.ParseFloat(u.celsius(si), 64)
	return v
}

// FromDifference is From for a difference.
func (u Unit) FromDifference(si float64) float64 { return u.scale.divide(si) }

// SI gives the SI value of v in the unit, rounded once; the reverse of
// FromDifference. It is infinite where a float64 cannot hold it.
func (u Unit) SI(v float64) float64 { return u.scale.power(-1, 1).divide(v) }

// String writes the unit as it is printed: "mJ/cm²", "nm⁻²", "W/(m·K)"; the
// unit one is "1".
func (u Unit) String() string {
	if u.IsOne() {
		return "1"
	}
	var above, below []string
	for _, p := range u.parts {
		if p.num > 0 {
			above = append(above, p.symbol+superscript(p.num, p.den))
		}
	}
	for _, p := range u.parts {
		switch {
		case p.num < 0 && len(above) > 0:
			below = append(below, p.symbol+superscript(-p.num, p.den))
		case p.num < 0:
			below = append(below, p.symbol+superscript(p.num, p.den))
		}
	}
	if len(above) == 0 {
		return strings.Join(below, "·")
	}
	return quotient(above, below)
}

// hugs says whether the unit stands right behind its number (SI Brochure
// 5.4.3: the degree, minute and second of a plane angle).
func (u Unit) hugs() bool {
	return len(u.parts) == 1 && strings.Contains("°′″", u.parts[0].symbol) && u.parts[0].num == 1 && u.parts[0].den == 1
}
