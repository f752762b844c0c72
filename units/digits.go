package units

import (
	"math"
	"math/big"
	"strconv"
	"strings"
)

// Digits gives a decimal text that Read takes back to exactly si: of up to 16
// significant digits the shortest, else 17 digits, of which zeros at the end
// are dropped; si must be finite.
func (u Unit) Digits(si float64) string {
	switch {
	case math.IsNaN(si) || math.IsInf(si, 0):
		return strconv.FormatFloat(si, 'g', -1, 64)
	case u.point && celsiusRange(si):
		return u.celsius(si)
	case si == 0:
		return "0"
	}
	v, first := u.From(si), 15
	if size := math.Abs(v); min(size, math.Abs(si)) < subnormal {
		first = 1
	}
	for n := first; n < 17; n++ {
		if text := strconv.FormatFloat(v, 'g', n, 64); u.takesBack(text, si) {
			return shortest(text)
		}
	}
	return shortest(u.quotient(si).Text('g', 17))
}

// shortest drops the zeros that a fixed number of digits leaves at the end.
func shortest(text string) string {
	head, exponent, has := strings.Cut(text, "e")
	if strings.Contains(head, ".") {
		head = strings.TrimRight(strings.TrimRight(head, "0"), ".")
	}
	if has {
		return head + "e" + exponent
	}
	return head
}

// subnormal is where float64 begins to lose digits.
const subnormal = 0x1p-1022

func (u Unit) takesBack(text string, si float64) bool {
	back, err := u.Read(text)
	return err == nil && back == si
}

// quotient is the value in the unit of a finite SI value, with digits to
// spare and of any size. 17 digits of it always read back, which those of a
// rounded float64 need not.
func (u Unit) quotient(si float64) *big.Float {
	r := new(big.Rat).SetFloat64(si)
	return new(big.Float).SetPrec(200).SetRat(r.Quo(r, u.scale.rat()))
}

// celsiusRange says whether the zero of the Celsius scale matters to a kelvin
// value.
func celsiusRange(si float64) bool { return si > -1e19 && si < 1e19 }

// celsius writes a kelvin value in °C with the fewest decimals that read back.
func (u Unit) celsius(si float64) string {
	r := new(big.Rat).SetFloat64(si)
	r.Sub(r, celsiusZero())
	for n := 0; ; n++ {
		text := r.FloatString(n)
		switch {
		case !u.takesBack(text, si):
		case text == "-0":
			return "0"
		default:
			return text
		}
	}
}
