package units

import (
	"errors"
	"math"
	"math/big"
	"strconv"
	"strings"
)

// The reasons for which a decimal is not read, for errors.Is.
var (
	ErrNumber   = errors.New("this is no decimal number")
	ErrTooLarge = errors.New("the number is larger than 1.8e308 in SI units")
	ErrTooSmall = errors.New("the number is smaller than 5e-324 in SI units")
)

// decimal is text taken apart: sign, digits without a point, power of ten.
type decimal struct {
	minus  bool
	digits string
	ten    int
}

// splitDecimal reads 13.5, -0.7, 1.2e-3, 1E+6; nothing else.
func splitDecimal(text string) (decimal, error) {
	rest, minus := strings.CutPrefix(text, "-")
	d := decimal{minus: minus}
	body := rest
	if at := strings.IndexAny(rest, "eE"); at >= 0 {
		ten, err := exponent(rest[at+1:])
		if err != nil {
			return d, err
		}
		body, d.ten = rest[:at], ten
	}
	head, tail, point := strings.Cut(body, ".")
	if head == "" || point && tail == "" || strings.Trim(head+tail, "0123456789") != "" {
		return d, ErrNumber
	}
	d.digits = strings.TrimLeft(head+tail, "0")
	d.ten -= len(tail)
	if d.digits == "" {
		return decimal{digits: "0"}, nil
	}
	return d, nil
}

// farTen stands for every longer exponent; no text holds digits enough to
// bring such a number back into range.
const farTen = 1_000_000_000

func exponent(text string) (int, error) {
	digits := text
	if text != "" && (text[0] == '-' || text[0] == '+') {
		digits = text[1:]
	}
	if digits == "" || strings.Trim(digits, "0123456789") != "" {
		return 0, ErrNumber
	}
	n, err := strconv.Atoi(digits)
	if err != nil || n > farTen {
		n = farTen
	}
	if text[0] == '-' {
		n = -n
	}
	return n, nil
}

// magnitude is the power of ten of the first digit.
func (d decimal) magnitude() int { return len(d.digits) - 1 + d.ten }

// times gives the decimal times the factor, rounded to float64 once.
func (d decimal) times(f factor) (float64, error) {
	if d.digits == "0" {
		return 0, nil
	}
	switch m := float64(d.magnitude()) + f.magnitude(); {
	case m > 310:
		return 0, ErrTooLarge
	case m < -326:
		return 0, ErrTooSmall
	}
	v := d.product(f)
	switch {
	case math.IsInf(v, 0):
		return 0, ErrTooLarge
	case v == 0:
		return 0, ErrTooSmall
	case d.minus:
		return -v, nil
	}
	return v, nil
}

// product is times without sign, for a result near enough to the range.
func (d decimal) product(f factor) float64 {
	if f.den != nil || f.pi != 0 || f.root != 0 {
		v, _ := new(big.Rat).Mul(d.rat(), f.rat()).Float64()
		return v
	}
	digits := d.digits
	if f.num != nil {
		n, _ := new(big.Int).SetString(digits, 10)
		digits = n.Mul(n, f.num).String()
	}
	// The point stands first: strconv loses the size of a whole number of more
	// than 800 digits with a negative exponent.
	v, _ := strconv.ParseFloat("0."+digits+"e"+strconv.Itoa(len(digits)+d.ten+f.ten), 64)
	return v
}

// rat returns the decimal exactly, without its sign.
func (d decimal) rat() *big.Rat {
	n, _ := new(big.Int).SetString(d.digits, 10)
	r := new(big.Rat).SetInt(n)
	return r.Mul(r, ratPower(big.NewRat(10, 1), d.ten))
}
