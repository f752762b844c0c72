package repl

import (
	"math"
	"regexp"
	"strconv"
	"strings"
)

// spaced brings a line to one form, since columns grow with their numbers.
func spaced(line string) string { return strings.Join(strings.Fields(line), " ") }

func sameText(recorded []string, now []Line) bool {
	if len(recorded) != len(now) {
		return false
	}
	for i, l := range now {
		if spaced(recorded[i]) != spaced(l.Text) {
			return false
		}
	}
	return true
}

// printedNumber is a number as replies print it.
var printedNumber = regexp.MustCompile(`[-−]?[0-9]+(\.[0-9]+)?(e-?[0-9]+)?`)

// sameNumbers compares recorded lines with lines printed in full: the texts
// are equal, and each number agrees at the digits that were recorded.
func sameNumbers(recorded []string, full []Line) bool {
	if len(recorded) != len(full) {
		return false
	}
	for i, l := range full {
		was, now := spaced(recorded[i]), spaced(l.Text)
		if was == now {
			continue
		}
		if printedNumber.ReplaceAllString(was, "#") != printedNumber.ReplaceAllString(now, "#") {
			return false
		}
		a, b := printedNumber.FindAllString(was, -1), printedNumber.FindAllString(now, -1)
		for k := range a {
			if !agrees(a[k], b[k]) {
				return false
			}
		}
	}
	return true
}

// agrees says whether a recorded number is the other one rounded, or a hair
// from it.
func agrees(recorded, full string) bool {
	if recorded == full {
		return true
	}
	was, err := strconv.ParseFloat(strings.Replace(recorded, "−", "-", 1), 64)
	now, err2 := strconv.ParseFloat(strings.Replace(full, "−", "-", 1), 64)
	if err != nil || err2 != nil {
		return false
	}
	return math.Abs(was-now) <= lastPlace(recorded)*(0.5+1e-6)+1e-12*math.Abs(was)
}

// lastPlace is what one unit of the last digit is worth. A short number without
// a point was printed so because it is whole, and has no last place.
func lastPlace(text string) float64 {
	mantissa, exponent, _ := strings.Cut(text, "e")
	_, tail, point := strings.Cut(mantissa, ".")
	ten, _ := strconv.Atoi(exponent)
	if !point && exponent == "" && len(mantissa) < DefaultDigits {
		return 0
	}
	return math.Pow(10, float64(ten-len(tail)))
}
