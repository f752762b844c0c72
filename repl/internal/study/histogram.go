package study

import "math"

// Histogram counts samples in bins of equal width: bin i holds Low + i·Width up
// to Low + (i+1)·Width. It spans 99.9 % of the sample; Below and Above count the
// rest, so that a long tail does not flatten the picture.
type Histogram struct {
	Low, Width   float64
	Counts       []int
	Below, Above int
}

const outside = 0.0005 // of the sample, at each end

// histogram of a sample; without spread it is one bin of no width.
func (e ends) histogram(bins int) Histogram {
	n := len(e.y)
	r := min(e.tail-1, int(outside*float64(n)))
	low, high := e.y[r], e.y[n-1-r]
	width := (high - low) / float64(bins)
	if !(width > math.Abs(low)*0x1p-50) {
		return Histogram{Low: low, Counts: []int{n}}
	}
	h := Histogram{Low: low, Width: width, Counts: make([]int, bins)}
	for _, y := range e.y {
		switch i := int((y - low) / width); {
		case y < low:
			h.Below++
		case y > high:
			h.Above++
		default:
			h.Counts[min(i, bins-1)]++
		}
	}
	return h
}
