package study

import "math"

// Shape is the shape of an input's distribution.
type Shape int

// The shapes. A Normal input with finite degrees of freedom is drawn from the
// scaled and shifted t-distribution (JCGM 101:2008, 6.4.9).
const (
	Normal      Shape = iota
	Rectangular       // JCGM 101:2008, 6.4.2
	Triangular        // symmetric; JCGM 101:2008, 6.4.5
)

// Input is what is known of one slot. The zero Input is exactly 0.
type Input struct {
	Value float64 // best estimate
	U     float64 // standard uncertainty, 0 for an exact input
	DoF   float64 // degrees of freedom of U, 0 for infinitely many
	Shape Shape

	// Low and High are the ends of a Rectangular or Triangular input. Value and
	// U follow from them and need not be given.
	Low, High float64
}

// Exact is an input without uncertainty.
func Exact(value float64) Input { return Input{Value: value} }

// uncertain says whether the input varies.
func (in Input) uncertain() bool { return in.U > 0 }

// settled checks the input and works out Value and U where they follow from the
// ends (JCGM 100:2008, 4.3.7 and 4.3.9).
func (in Input) settled(index int) (Input, error) {
	switch in.Shape {
	case Normal:
	case Rectangular, Triangular:
		if !(in.Low < in.High) || !finite(in.High-in.Low) {
			return in, refuse(ErrInput, "input %d: its ends %g and %g are not two finite numbers in order", index, in.Low, in.High)
		}
		half := (in.High - in.Low) / 2
		in.Value = in.Low + half
		in.U = half / math.Sqrt(3)
		if in.Shape == Triangular {
			in.U = half / math.Sqrt(6)
		}
	default:
		return in, refuse(ErrInput, "input %d: shape %d is not known", index, in.Shape)
	}
	switch {
	case !finite(in.Value):
		return in, refuse(ErrInput, "input %d: its value is not finite", index)
	case !(in.U >= 0) || !finite(in.U):
		return in, refuse(ErrInput, "input %d: its standard uncertainty %g is not a finite number from 0 up", index, in.U)
	case !(in.DoF >= 0) || !finite(in.DoF) || in.DoF > 0 && in.DoF < minimumDoF:
		return in, refuse(ErrInput, "input %d: %g is no number of degrees of freedom", index, in.DoF)
	}
	return in, nil
}

// minimumDoF keeps a t-distribution within the range of float64.
const minimumDoF = 0.5
