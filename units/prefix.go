package units

import "slices"

type prefix struct {
	symbol string
	ten    int
}

// printed is the one spelling of a prefix that is written.
func (p prefix) printed() string {
	if p.symbol == "u" {
		return "µ"
	}
	return p.symbol
}

func isPrefix(word string) bool {
	return slices.ContainsFunc(prefixes, func(p prefix) bool { return p.symbol == word })
}

// prefixes are those of the SI (SI Brochure, 9th edition, table 7); micro has
// three spellings, of which the first is printed.
var prefixes = []prefix{
	{"Q", 30},
	{"R", 27},
	{"Y", 24},
	{"Z", 21},
	{"E", 18},
	{"P", 15},
	{"T", 12},
	{"G", 9},
	{"M", 6},
	{"k", 3},
	{"h", 2},
	{"da", 1},
	{"d", -1},
	{"c", -2},
	{"m", -3},
	{"µ", -6},
	{"n", -9},
	{"p", -12},
	{"f", -15},
	{"a", -18},
	{"z", -21},
	{"y", -24},
	{"r", -27},
	{"q", -30},
	{"u", -6},
}

// engineering are the prefixes that a displayed unit may take.
var engineering = []string{"q", "r", "y", "z", "a", "f", "p", "n", "µ", "m", "", "k", "M", "G", "T", "P", "E", "Z", "Y", "R", "Q"}
