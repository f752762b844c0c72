package units

import "strings"

// steps are the words of which the way from one dimension to another is made.
var steps = []struct {
	base  Base
	words [4]string // by exponent 0, 1, 2, 3
}{
	{LengthBase, [4]string{"", "length", "area", "volume"}},
	{TimeBase, [4]string{"", "time", "time²", "time³"}},
	{CurrentBase, [4]string{"", "current", "current²", "current³"}},
	{TemperatureBase, [4]string{"", "temperature", "temperature²", "temperature³"}},
	{AmountBase, [4]string{"", "amount of substance", "", ""}},
}

// Between names the factor by which a quantity of one dimension becomes one of
// another, as "area/time" from fluence to power; "" when no short name says
// it.
func (s *System) Between(from, to Dimension) string {
	ratio, err := to.Div(from)
	if err != nil || ratio.IsNumber() {
		return ""
	}
	var above, below []string
	left := ratio
	take := func(b Base, word func(n int) string) bool {
		num, den := ratio.Exponent(b)
		if num == 0 {
			return true
		}
		n := max(num, -num)
		if den != 1 || n > 3 || word(n) == "" {
			return false
		}
		if num > 0 {
			above = append(above, word(n))
		} else {
			below = append(below, word(n))
		}
		left = left.with(b, 0)
		return true
	}
	for _, step := range steps {
		if !take(step.base, func(n int) string { return step.words[n] }) {
			return ""
		}
	}
	for _, b := range ratio.bases() {
		if b.Counted() && !take(b, func(n int) string { return s.symbol(b) + superscript(n, 1) }) {
			return ""
		}
	}
	if !left.IsNumber() {
		return ""
	}
	return quotient(above, below)
}

func quotient(above, below []string) string {
	text := strings.Join(above, "·")
	if text == "" {
		text = "1"
	}
	switch len(below) {
	case 0:
		return text
	case 1:
		return text + "/" + below[0]
	}
	return text + "/(" + strings.Join(below, "·") + ")"
}
