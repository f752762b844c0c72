package chart

import (
	"errors"
	"fmt"
	"math"

	"example.com/dosewright/repl"
)

// ErrPicture is the cause of every refusal to draw a picture as it stands.
var ErrPicture = errors.New("no picture")

func refuse(format string, args ...any) error {
	return fmt.Errorf("%w: %s", ErrPicture, fmt.Sprintf(format, args...))
}

// largest bounds the size of a value, so that no difference overflows; its
// inverse bounds what a logarithmic axis takes, and the narrowest axis.
const largest = 1e300

// span is the stretch of values that an axis shows; lo < hi, and both are
// positive on a logarithmic axis.
type span struct {
	lo, hi float64
	log    bool
}

// at is the place of v on the axis: 0 at its start, 1 at its end.
func (s span) at(v float64) float64 {
	if s.log {
		return (math.Log(v) - math.Log(s.lo)) / (math.Log(s.hi) - math.Log(s.lo))
	}
	return (v - s.lo) / (s.hi - s.lo)
}

// reach gathers the least and greatest value on an axis.
type reach struct {
	axis   repl.Axis
	lo, hi float64
}

func newReach(axis repl.Axis) reach { return reach{axis, math.Inf(1), math.Inf(-1)} }

// add takes a finite value, or says why the axis cannot show it.
func (r *reach) add(v float64) error {
	switch {
	case r.axis.Log && v <= 0:
		return refuse("the logarithmic axis %q cannot show %.5g, only positive values", r.axis.Head(), v)
	case math.Abs(v) > largest || r.axis.Log && v < 1/largest:
		return refuse("the axis %q cannot show %.5g: the limits are %g and %g in size",
			r.axis.Head(), v, 1/largest, largest)
	}
	r.lo, r.hi = math.Min(r.lo, v), math.Max(r.hi, v)
	return nil
}

// span gives the stretch of the axis, with so large a part of it free at both
// ends. A single value stands in the middle.
func (r reach) span(margin float64) span {
	if r.axis.Log {
		return logSpan(r.lo, r.hi, margin)
	}
	lo, hi := r.lo, r.hi
	size := math.Max(math.Abs(lo), math.Abs(hi))
	pad := margin * (hi - lo)
	if hi-lo <= 1e-11*size || hi-lo < 1/largest {
		pad = size / 20
		if size < 1/largest {
			pad = 1
		}
	}
	s := span{lo: lo - pad, hi: hi + pad}
	if lo >= 0 && hi > pad {
		s.lo = math.Max(s.lo, 0) // no room below zero where nothing is negative
	}
	if hi <= 0 && lo < -pad {
		s.hi = math.Min(s.hi, 0)
	}
	return s
}

func logSpan(lo, hi, margin float64) span {
	wide := math.Log(hi) - math.Log(lo)
	pad := math.Exp(margin * wide)
	if wide < 1e-9 {
		pad = 3
	}
	return span{math.Max(lo/pad, 1/largest), math.Min(hi*pad, largest), true}
}

// finite says whether v is neither a NaN nor an infinity.
func finite(v float64) bool { return !math.IsNaN(v) && !math.IsInf(v, 0) }
