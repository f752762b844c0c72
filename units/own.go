package units

import (
	"fmt"
	"maps"
	"math/big"
	"slices"
	"strings"
	"unicode"
)

// WithUnit returns a System that also knows a unit by its name, without
// prefixes, as so much of another: WithUnit("shot", "3.5 mJ/cm^2"),
// WithUnit("dozen", "12"). The size is exact. It fails when the name is no word
// of letters or has a meaning already, and when the size is no number above
// zero with a unit that this System knows, from 1e-300 to 1e300 in SI units.
func (s *System) WithUnit(name, size string) (*System, error) {
	name = foldAll(name)
	if err := wordFor("a unit", name); err != nil {
		return nil, err
	}
	if err := s.free(name); err != nil {
		return nil, err
	}
	scale, dim, err := s.size(size)
	if err != nil {
		return nil, fmt.Errorf("the size of %s: %w", name, err)
	}
	grown := &System{words: maps.Clone(s.words), declared: slices.Clone(s.declared), habits: s.habits}
	grown.enter(&row{name, nil, scale, dim, false, "given as " + size})
	return grown, nil
}

// Declared lists the counted things that were declared, in order.
func (s *System) Declared() []string { return slices.Clone(s.declared) }

// wordFor refuses what is no name for a unit or a counted thing.
func wordFor(what, name string) error {
	switch {
	case name == "" || strings.ContainsFunc(name, func(r rune) bool { return !unicode.IsLetter(r) || !isSymbol(r) }):
		return fmt.Errorf("%q is no name for %s: it must be letters only", name, what)
	case len(name) > maxName:
		return fmt.Errorf("the name of %s has at most %d bytes, this has %d", what, maxName, len(name))
	}
	return nil
}

// size reads "3.5 mJ/cm^2" exactly.
func (s *System) size(text string) (factor, Dimension, error) {
	number, unit, _ := strings.Cut(strings.TrimSpace(text), " ")
	d, err := splitDecimal(number)
	switch {
	case err != nil:
		return factor{}, Dimension{}, fmt.Errorf("%.40q: %w", number, err)
	case d.minus || d.digits == "0":
		return factor{}, Dimension{}, fmt.Errorf("%.40q is not above zero", number)
	case len(d.digits) > maxName:
		return factor{}, Dimension{}, fmt.Errorf("it has more than %d digits", maxName)
	case d.magnitude() > maxMagnitude || d.magnitude() < -maxMagnitude:
		return factor{}, Dimension{}, fmt.Errorf("%.40q is outside of 1e-%d to 1e%[2]d", number, maxMagnitude)
	}
	var u Unit
	if unit = strings.TrimSpace(unit); unit != "" {
		if u, err = s.Parse(unit); err != nil {
			return factor{}, Dimension{}, err
		}
	}
	scale := u.scale.times(d.factor())
	switch m := scale.magnitude(); {
	case u.point:
		return factor{}, Dimension{}, fmt.Errorf("%s has a zero of its own; give it in K", u)
	case m > maxMagnitude || m < -maxMagnitude:
		return factor{}, Dimension{}, fmt.Errorf("it is outside of 1e-%d to 1e%[1]d in SI units", maxMagnitude)
	}
	return scale, u.dim, nil
}

// factor is a decimal above zero as a scale.
func (d decimal) factor() factor {
	digits := strings.TrimRight(d.digits, "0")
	f := tens(d.ten + len(d.digits) - len(digits))
	if digits != "1" {
		f.num, _ = new(big.Int).SetString(digits, 10)
	}
	return f
}
