package study

import "math"

// noise is by how much rounding scatters the values of f around the estimates: by
// their third differences over steps of about a thousandth of the uncertainties,
// in which slope and curvature drop out. Of the two sides the quieter one counts,
// since f may have a jump or a corner at the estimates.
func (f Eval) noise(s *Sources, value float64) float64 {
	x := s.Values()
	side := func(sign float64) float64 {
		y := [9]float64{value}
		for k := 1; k < len(y); k++ {
			for slot, in := range s.inputs {
				step := sign * in.U * (1 + 0.1*math.Sin(float64(slot+1))) / 1024 // steps that are no round numbers
				x[slot] = in.Value + float64(k)*step
			}
			var err error
			if y[k], err = f.at(x); err != nil {
				return math.Inf(1)
			}
		}
		worst := 0.0
		for k := range len(y) - 3 {
			worst = math.Max(worst, math.Abs((y[k+3]-y[k])-3*(y[k+2]-y[k+1])))
		}
		return worst
	}
	noise := math.Min(side(1), side(-1))
	if !finite(noise) {
		noise = 0
	}
	return math.Max(noise, 0x1p-52*math.Abs(value))
}

// How many times the noise a part of the uncertainty, and a second-order term,
// must have to be more than rounding.
const (
	aboveNoise  = 8
	aboveSecond = 64
)
