package study

import "math"

// Axis is a slot and the values that it takes, in order.
type Axis struct {
	slot  int
	n     int
	from  float64
	to    float64
	by    float64 // step, or 0
	ratio float64 // to/from of a logarithmic axis, or 0
}

// Spaced is an axis of n equally spaced points from a to b, n ≥ 2; b may be less
// than a. Error: ErrRange.
func Spaced(slot int, a, b float64, n int) (Axis, error) {
	if err := points(a, b, n); err != nil {
		return Axis{}, err
	}
	return Axis{slot: slot, n: n, from: a, to: b}, nil
}

// Logarithmic is an axis of n points from a to b with equal ratios, n ≥ 2; a and
// b are not 0 and have the same sign. Error: ErrRange.
func Logarithmic(slot int, a, b float64, n int) (Axis, error) {
	if err := points(a, b, n); err != nil {
		return Axis{}, err
	}
	if !(a/b > 0) || !finite(a/b) || !finite(b/a) {
		return Axis{}, refuse(ErrRange, "from %g to %g there are no equal ratios: both ends must be above 0, or both below", a, b)
	}
	return Axis{slot: slot, n: n, from: a, to: b, ratio: b / a}, nil
}

// Stepped is an axis from a towards b by steps of s, a size: its sign does not
// count. Points are a ± i·s; b is the last when it is a whole number of steps
// away but for rounding, else the last lies before b. Error: ErrRange, also when
// s is lost in the rounding of a and b.
func Stepped(slot int, a, b, s float64) (Axis, error) {
	if err := points(a, b, 2); err != nil {
		return Axis{}, err
	}
	s = math.Copysign(s, b-a)
	steps := (b - a) / s
	rounding := 0x1p-51 * ((math.Abs(a)+math.Abs(b))/math.Abs(s) + steps)
	switch {
	case s == 0 || !finite(s):
		return Axis{}, refuse(ErrRange, "%g is no step", s)
	case !(rounding < 0.25):
		return Axis{}, refuse(ErrRange, "the step %g is lost in the rounding of %g and %g", s, a, b)
	}
	axis := Axis{slot: slot, from: a, to: b, by: s}
	whole := math.Round(steps)
	if math.Abs(steps-whole) > rounding {
		whole = math.Floor(steps)
		axis.to = a + whole*s
	}
	axis.n = int(whole) + 1
	return axis, nil
}

func points(a, b float64, n int) error {
	switch {
	case !finite(a) || !finite(b) || !finite(b-a) || a == b:
		return refuse(ErrRange, "%g and %g are not two ends of a range", a, b)
	case n < 2:
		return refuse(ErrRange, "%d points make no range: it takes 2 or more", n)
	}
	return nil
}

// Len is the number of points.
func (x Axis) Len() int { return x.n }

// At is point i, from 0 up to Len()−1; the two ends are exact.
func (x Axis) At(i int) float64 {
	part := float64(i) / float64(x.n-1)
	switch {
	case i == 0:
		return x.from
	case i == x.n-1:
		return x.to
	case x.by != 0:
		return x.from + float64(i)*x.by
	case x.ratio != 0:
		return x.from * math.Pow(x.ratio, part)
	}
	return x.from + (x.to-x.from)*float64(i)/float64(x.n-1)
}
