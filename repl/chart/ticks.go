package chart

import (
	"math"
	"strconv"
)

// tick is a mark on an axis; a minor one has no label.
type tick struct {
	value float64
	label string
}

// ticks marks the axis at about n round values.
func (s span) ticks(n int) []tick {
	if !s.log {
		return s.evenTicks(n)
	}
	switch decades := math.Log10(s.hi) - math.Log10(s.lo); {
	case decades < 0.7:
		return s.evenTicks(n)
	case decades < 2:
		return s.decadeTicks(1, 1, 2, 5)
	default:
		return s.decadeTicks(int(math.Ceil(decades/float64(n))), 1)
	}
}

// fitting marks the axis at n round values or fewer, so that the labels take
// up no more than the room.
func (s span) fitting(n int, room float64, width func(label string) float64) []tick {
	for ; n > 2; n-- {
		taken := 0.0
		for _, t := range s.ticks(n) {
			if t.label != "" {
				taken += width(t.label)
			}
		}
		if taken <= room {
			break
		}
	}
	return s.ticks(n)
}

// evenTicks are multiples of 1, 2 or 5 times a power of ten.
func (s span) evenTicks(n int) []tick {
	raw := (s.hi - s.lo) / float64(n)
	ten := tenOf(raw)
	mantissa := 0.0
	for _, m := range []float64{5, 2, 1} {
		if raw <= m*math.Pow10(ten)*(1+1e-9) {
			mantissa = m
		}
	}
	if mantissa == 0 {
		mantissa, ten = 1, ten+1
	}
	step := mantissa * math.Pow10(ten)
	size := math.Max(math.Abs(s.lo), math.Abs(s.hi))
	var out []tick
	for k := math.Ceil(s.lo/step - 1e-6); k <= math.Floor(s.hi/step+1e-6); k++ {
		v := math.Min(math.Max(scaled(k*mantissa, ten), s.lo), s.hi)
		out = append(out, tick{v, figure(v, size, ten)})
	}
	return out
}

// decadeTicks label the given multiples in every so many decades, and mark
// all nine if no decade is left out.
func (s span) decadeTicks(every int, labelled ...float64) []tick {
	var out []tick
	for ten := tenOf(s.lo); ten <= tenOf(s.hi); ten++ {
		if ten%every != 0 {
			continue
		}
		for m := 1.0; m < 10; m++ {
			t := tick{value: scaled(m, ten)}
			for _, l := range labelled {
				if l == m {
					t.label = figure(t.value, t.value, ten)
				}
			}
			inside := t.value >= s.lo*(1-1e-9) && t.value <= s.hi*(1+1e-9)
			if inside && (t.label != "" || every == 1) {
				out = append(out, t)
			}
		}
	}
	return out
}

// figure writes v to the place 10^last, as all values up to the given size
// are written on one axis: 0.25, 13.50, 1.5e19.
func figure(v, size float64, last int) string {
	ten := tenOf(size)
	switch {
	case size < 1/largest || math.Abs(v) < math.Pow10(last)/2:
		return "0"
	case ten >= -3 && ten < 6:
		return strconv.FormatFloat(v, 'f', max(-last, 0), 64)
	}
	return strconv.FormatFloat(scaled(v, -ten), 'f', max(ten-last, 0), 64) + "e" + strconv.Itoa(ten)
}

// tenOf is the power of ten in a positive v: 10^n ≤ v < 10^(n+1).
func tenOf(v float64) int {
	n := int(math.Floor(math.Log10(v)))
	if math.Pow10(n+1) <= v {
		n++
	}
	return n
}

// scaled is v·10^ten, rounded once if v is a whole number.
func scaled(v float64, ten int) float64 {
	if ten < 0 {
		return v / math.Pow10(-ten)
	}
	return v * math.Pow10(ten)
}
