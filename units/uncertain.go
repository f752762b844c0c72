package units

import (
	"math"
	"strconv"
	"strings"
)

// FormatUncertain writes a value with its standard uncertainty in the concise
// form of the SI Brochure, 5.4.5, with two digits of it: 13.500(20),
// 3020(110), 1.675(12)e-27. An uncertainty of zero is written as (0) behind the value
// with so many digits.
func FormatUncertain(v, u float64, digits int) string {
	u = math.Abs(u)
	if u == 0 || u-u != 0 || v-v != 0 {
		return FormatNumber(v, digits) + "(0)"
	}
	last := lastDigit(u)
	top := last
	switch {
	case v != 0:
		top = max(top, decade(v))
	case last > -12:
		top = max(top, 0)
	}
	switch {
	case top >= -4 && top < 6 && last <= 0:
		return strconv.FormatFloat(v, 'f', -last, 64) + "(" + scaled(u, last) + ")"
	case top < 6 && last == 1:
		return rounded(v, last) + "(" + rounded(u, last) + ")"
	}
	ten := top
	if top < last+1 {
		ten = last + 1
	}
	mantissa := strconv.FormatFloat(shifted(v, -ten), 'f', ten-last, 64)
	return mantissa + "(" + scaled(u, last) + ")e" + strconv.Itoa(ten)
}

// FormatExpanded writes (30.0 ± 1.2), an expanded uncertainty with two digits;
// what is said of it, such as (k=2), stands behind the unit.
func FormatExpanded(v, u float64) string {
	u = math.Abs(u)
	if u == 0 || u-u != 0 {
		return "(" + FormatNumber(v, 5) + " ± 0)"
	}
	last := lastDigit(u)
	switch {
	case last <= 0 && last > -12 && math.Abs(v) < 1e9:
		return "(" + strconv.FormatFloat(v, 'f', -last, 64) + " ± " + strconv.FormatFloat(u, 'f', -last, 64) + ")"
	case last == 1 && math.Abs(v) < 1e6:
		return "(" + rounded(v, last) + " ± " + rounded(u, last) + ")"
	}
	digits := min(max(decade(v)-last+1, 2), 17)
	return "(" + exponential(v, digits) + " ± " + exponential(u, 2) + ")"
}

// rounded writes a number rounded to a power of ten from 10 up.
func rounded(v float64, ten int) string {
	return strconv.FormatFloat(math.Round(v/math.Pow10(ten))*math.Pow10(ten), 'f', 0, 64)
}

// exponential writes 3.02e3 with so many digits.
func exponential(v float64, digits int) string {
	mantissa, e, _ := strings.Cut(strconv.FormatFloat(v, 'e', digits-1, 64), "e")
	ten, _ := strconv.Atoi(e)
	return mantissa + "e" + strconv.Itoa(ten)
}

// lastDigit is the power of ten of the second digit of u, as it is rounded.
func lastDigit(u float64) int {
	text := strconv.FormatFloat(u, 'e', 1, 64)
	_, e, _ := strings.Cut(text, "e")
	n, _ := strconv.Atoi(e)
	return n - 1
}

func decade(v float64) int {
	_, e, _ := strings.Cut(strconv.FormatFloat(math.Abs(v), 'e', 12, 64), "e")
	n, _ := strconv.Atoi(e)
	return n
}

// scaled writes u in units of the power of ten that the last digit has.
func scaled(u float64, last int) string {
	text := strconv.FormatFloat(u, 'e', 1, 64)
	mantissa, e, _ := strings.Cut(text, "e")
	n, _ := strconv.Atoi(e)
	return strings.Replace(mantissa, ".", "", 1) + strings.Repeat("0", max(0, n-1-last))
}

// shifted multiplies by a power of ten with one rounding where it can.
func shifted(v float64, ten int) float64 {
	x, err := strconv.ParseFloat(strconv.FormatFloat(v, 'e', 17, 64), 64)
	if err != nil {
		return v
	}
	return factor{ten: -ten}.divide(x)
}

// SplitConcise takes the concise form apart: "13.50(2)" is "13.50" with
// "0.02", "1.6(2)e-27" is "1.6e-27" with "0.2e-27", "7(0.5)" is "7" with
// "0.5". ok is false for a plain number.
func SplitConcise(text string) (value, uncertainty string, ok bool) {
	head, rest, open := strings.Cut(text, "(")
	inner, exponent, closed := strings.Cut(rest, ")")
	if !open || !closed {
		return text, "", false
	}
	if !strings.Contains(inner, ".") {
		if _, tail, point := strings.Cut(head, "."); point {
			places := len(tail)
			inner = strings.Repeat("0", max(0, places+1-len(inner))) + inner
			inner = inner[:len(inner)-places] + "." + inner[len(inner)-places:]
		}
	}
	return head + exponent, inner + exponent, true
}
