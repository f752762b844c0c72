package euv

import (
	"fmt"
	"strconv"
	"strings"
)

// Formula is a chemical formula: SiO2, C5H8O2, Al2(SO4)3, SnO1.5. It compares
// with == to itself and its copies. The zero value is no formula; ParseFormula
// makes one.
type Formula struct{ c *compound }

// compound is the meaning of a formula, never changed once it is read.
type compound struct {
	text   string
	atoms  []atoms // each element once
	weight float64 // atomic weights, summed
}

// atoms counts the atoms of one element in a formula unit.
type atoms struct {
	of    *element
	count float64
}

// FormulaError says why a chemical formula was refused.
type FormulaError struct {
	Formula string
	At      int // byte offset of the mistake in Formula
	Why     string
}

func (e *FormulaError) Error() string {
	if e.Formula == "" {
		return "no formula: " + e.Why
	}
	return fmt.Sprintf("formula %q: %s", e.Formula, e.Why)
}

// What a formula may hold, so that every input is read in little time and the
// numbers stay inside floating point.
const (
	maxFormula = 200 // bytes
	maxNesting = 10  // brackets
	maxCount   = 1e4 // atoms of one kind
)

// ParseFormula reads a chemical formula: element symbols, counts behind them
// (whole or with decimals), parentheses with a count. Case matters: Co is
// cobalt, CO is carbon and oxygen. Errors are a *FormulaError.
func ParseFormula(text string) (Formula, error) {
	if e := elements()[text]; e != nil && e.weight > 0 {
		return Formula{e.alone}, nil
	}
	p := formulaParser{text: text}
	counts := p.sequence(1, 0)
	switch {
	case p.err != nil:
		return Formula{}, p.err
	case p.at < len(text):
		return Formula{}, p.fail("a closing parenthesis has no opening one")
	}
	c := &compound{text: text, atoms: counts}
	for _, a := range counts {
		if a.of.weight == 0 {
			return Formula{}, &FormulaError{text, 0, "the tables have no atomic weight for " + a.of.symbol}
		}
		c.weight += a.count * a.of.weight
	}
	return Formula{c}, nil
}

// String gives the formula as it was written.
func (f Formula) String() string {
	if f.c == nil {
		return "no formula"
	}
	return f.c.text
}

// formulaParser keeps the first mistake; after it nothing is read.
type formulaParser struct {
	text string
	at   int
	err  error
}

func (p *formulaParser) fail(why string) error {
	if p.err == nil {
		p.err = &FormulaError{p.text, p.at, why}
	}
	return p.err
}

// sequence reads up to the end or a closing parenthesis.
func (p *formulaParser) sequence(depth int, from int) []atoms {
	var sum []atoms
	switch {
	case len(p.text) > maxFormula:
		p.fail(fmt.Sprintf("longer than %d characters", maxFormula))
	case depth > maxNesting:
		p.fail(fmt.Sprintf("parentheses nest deeper than %d", maxNesting))
	}
	for p.err == nil && p.at < len(p.text) && p.text[p.at] != ')' {
		if p.text[p.at] != '(' {
			sum = merge(sum, []atoms{{p.symbol(), 1}}, p.count())
			continue
		}
		open := p.at
		p.at++
		inner := p.sequence(depth+1, p.at)
		if p.err == nil && p.at == len(p.text) {
			p.at = open
			p.fail("an opening parenthesis is not closed")
			break
		}
		p.at++
		sum = merge(sum, inner, p.count())
	}
	if p.err == nil && len(sum) == 0 {
		p.at = from
		p.fail("an element symbol is wanted, as in SiO2")
	}
	for _, a := range sum {
		if a.count > maxCount && p.err == nil {
			p.fail(fmt.Sprintf("more than %g atoms of %s", float64(maxCount), a.of.symbol))
		}
	}
	return sum
}

// merge adds times each of more to sum.
func merge(sum, more []atoms, times float64) []atoms {
next:
	for _, m := range more {
		for i := range sum {
			if sum[i].of == m.of {
				sum[i].count += times * m.count
				continue next
			}
		}
		sum = append(sum, atoms{m.of, times * m.count})
	}
	return sum
}

// symbol reads one element symbol: a capital and the small letters behind it.
func (p *formulaParser) symbol() *element {
	rest := p.text[p.at:]
	end := 1
	for end < len(rest) && end < 3 && rest[end] >= 'a' && rest[end] <= 'z' {
		end++
	}
	if e := elements()[rest[:end]]; e != nil {
		p.at += end
		return e
	}
	p.fail(unknownSymbol(rest, end))
	return nil
}

// unknownSymbol explains what stands where a symbol is wanted.
func unknownSymbol(rest string, end int) string {
	if c := rest[0]; c < 'A' || c > 'Z' {
		for _, n := range []int{2, 1} {
			if len(rest) >= n {
				if guess := strings.ToUpper(rest[:1]) + strings.ToLower(rest[1:n]); elements()[guess] != nil {
					return fmt.Sprintf("element symbols start with a capital: %s, not %s", guess, rest[:n])
				}
			}
		}
		r := []rune(rest)[0]
		return fmt.Sprintf("%q stands where an element symbol is wanted; a formula is symbols, counts and parentheses", r)
	}
	return fmt.Sprintf("%s is no element of the tables", rest[:end])
}

// count reads the number behind a symbol or a parenthesis; without one it is 1.
func (p *formulaParser) count() float64 {
	start := p.at
	for p.at < len(p.text) && (p.text[p.at] >= '0' && p.text[p.at] <= '9' || p.text[p.at] == '.') {
		p.at++
	}
	if p.err != nil || p.at == start {
		return 1
	}
	digits := p.text[start:p.at]
	n, err := strconv.ParseFloat(digits, 64)
	if err != nil || digits[0] == '.' || digits[len(digits)-1] == '.' || !(n > 0 && n <= maxCount) {
		p.at = start
		p.fail(fmt.Sprintf("%s is no count: it must be greater than 0, at most %g, with digits on both sides of its point",
			digits, float64(maxCount)))
		return 1
	}
	return n
}
