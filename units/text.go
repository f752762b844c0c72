package units

import (
	"math"
	"slices"
	"strconv"
	"strings"
)

// Name returns the word for a dimension, as "fluence", or "" when it has none.
func (s *System) Name(d Dimension) string {
	if d.IsNumber() {
		return "number"
	}
	return s.habits()[d].name
}

// UnitText names the unit in which the trade states a dimension, as "mJ/cm²".
func (s *System) UnitText(d Dimension) string { return s.DisplayUnit(Quantity{dim: d}).String() }

// DisplayUnit chooses the unit in which the trade states the quantity. Without
// a habit for its dimension it is that of the dimension without counted
// things, times these, or the coherent unit.
func (s *System) DisplayUnit(q Quantity) Unit {
	if h, ok := s.habits()[q.dim]; ok {
		return h.at(q.si)
	}
	plain := q.dim.WithoutCounted()
	if !q.dim.HasCounted() || plain.IsNumber() {
		return s.baseUnit(q.dim)
	}
	u := s.DisplayUnit(Quantity{q.si, plain})
	var things []part
	for _, p := range s.baseUnit(q.dim).parts {
		if p.dim.HasCounted() {
			things = append(things, p)
		}
	}
	parts := slices.Concat(things, u.parts)
	if u.parts[0].num > 0 && things[0].num < 0 {
		parts = slices.Concat(u.parts, things)
	}
	return Unit{dim: q.dim, scale: u.scale, parts: parts}
}

// baseUnit is the coherent unit of a dimension, written in base units.
func (s *System) baseUnit(d Dimension) Unit {
	u := Unit{dim: d}
	for _, b := range d.bases() {
		num, den := d.Exponent(b)
		u.parts = append(u.parts, part{s.symbol(b), b.Of(), factor{}, num, den})
	}
	return u
}

// Text writes a quantity in the unit that the trade uses, with so many
// significant digits.
func (s *System) Text(q Quantity, digits int) string { return s.TextIn(q.si, s.DisplayUnit(q), digits) }

// TextIn writes an SI value in a unit.
func (s *System) TextIn(si float64, u Unit, digits int) string {
	v := u.From(si)
	if finite := !math.IsNaN(si) && !math.IsInf(si, 0); finite && (math.IsInf(v, 0) || v == 0 && si != 0 && !u.point) {
		text := u.quotient(si).Text('e', clampDigits(digits)-1) // no float64 holds it
		return u.Label(plainExponent(text))
	}
	return u.Label(FormatNumber(v, digits))
}

func clampDigits(digits int) int { return min(max(digits, 1), 17) }

// plainExponent writes 1e+20 as 1e20.
func plainExponent(text string) string { return strings.Replace(text, "e+", "e", 1) }

// Label writes a number with the unit behind it: a blank between, but none
// before the degree, minute and second of an angle (SI Brochure 5.4.3).
func (u Unit) Label(number string) string {
	switch {
	case u.IsOne():
		return number
	case u.hugs():
		return number + u.String()
	}
	return number + " " + u.String()
}

// String writes the quantity with five significant digits in the unit that
// the trade uses for its dimension.
func (q Quantity) String() string { return Standard().Text(q, 5) }

// FormatNumber writes v with so many significant digits (at least 1, at most
// 17), a whole number plain: 64, 91.840, 1.6990e19.
func FormatNumber(v float64, digits int) string {
	digits = clampDigits(digits)
	size := math.Abs(v)
	switch {
	case v == 0:
		return "0"
	case math.IsNaN(v) || math.IsInf(v, 0):
		return strconv.FormatFloat(v, 'g', -1, 64)
	}
	if n := math.Round(v); n != 0 && size < 1e6 && (v == n || digits < 12 && math.Abs(v-n) <= 1e-12*size) {
		return strconv.FormatFloat(n, 'f', 0, 64)
	}
	text := strconv.FormatFloat(v, 'e', digits-1, 64)
	mantissa, exponent, _ := strings.Cut(text, "e")
	ten, _ := strconv.Atoi(exponent)
	if ten >= -4 && ten < 6 {
		return strconv.FormatFloat(v, 'f', max(digits-1-ten, 0), 64)
	}
	return mantissa + "e" + strconv.Itoa(ten)
}
