package study

import (
	"math"
	"slices"
)

// ends is a sample whose smallest and largest values are in order and at its two
// ends; what lies between is in no order. A coverage interval needs no more, and
// a full sort would cost more than the trials.
type ends struct {
	y    []float64
	tail int // how many at each end are in order
}

// sortEnds moves the values of y about. The sample is not empty; at least one
// value at each end is put in order.
func sortEnds(y []float64, tail int) ends {
	n := len(y)
	tail = max(1, tail)
	if 2*tail >= n {
		slices.Sort(y)
		return ends{y, n}
	}
	selectAt(y, 0, n-1, tail)
	selectAt(y, tail, n-1, n-tail)
	slices.Sort(y[:tail])
	slices.Sort(y[n-tail:])
	return ends{y, tail}
}

// tailFor is the number of values at each end that intervals of coverage p need
// in a sample of n.
func tailFor(n int, p float64) int { return n - span(n, p) }

// span is by how many places the ends of an interval of coverage p lie apart
// (JCGM 101:2008, 7.7.2).
func span(n int, p float64) int {
	return max(1, min(n-1, int(math.Floor(p*float64(n)+0.5))))
}

// shortest is the shortest coverage interval (JCGM 101:2008, 7.7.4 note).
func (e ends) shortest(p float64) (low, high float64) {
	n := len(e.y)
	if n < 2 {
		return e.y[0], e.y[0]
	}
	q := span(n, p)
	low, high = e.y[0], e.y[q]
	for r := range n - q {
		if e.y[r+q]-e.y[r] < high-low {
			low, high = e.y[r], e.y[r+q]
		}
	}
	return low, high
}

// symmetric is the interval that leaves out as much below as above (JCGM
// 101:2008, 7.7.2).
func (e ends) symmetric(p float64) (low, high float64) {
	n := len(e.y)
	if n < 2 {
		return e.y[0], e.y[0]
	}
	q := span(n, p)
	r := (n - q) / 2
	return e.y[r], e.y[min(n-1, r+q)]
}

// selectAt moves the values from a to b (inclusive) so that y[k] is the one that
// sorting would put there, with none greater before and none smaller behind it
// (Floyd, Rivest, Algorithm 489, Commun. ACM 18, 173 (1975); from memory).
func selectAt(y []float64, a, b, k int) {
	for b > a {
		if b-a > 600 {
			n, i := float64(b-a+1), float64(k-a+1)
			z := math.Log(n)
			s := 0.5 * math.Exp(2*z/3)
			sd := 0.5 * math.Sqrt(z*s*(n-s)/n) * math.Copysign(1, i-n/2)
			selectAt(y, max(a, int(float64(k)-i*s/n+sd)), min(b, int(float64(k)+(n-i)*s/n+sd)), k)
		}
		i, j := partition(y[a:b+1], y[k])
		if k <= a+j {
			b = a + j
		} else if k >= a+i {
			a += i
		} else {
			return
		}
	}
}

// partition puts values up to t before values from t up: y[:j+1] and y[i:] are
// the two parts, j < i, and what lies between equals t. t is one of y.
func partition(y []float64, t float64) (i, j int) {
	i, j = 0, len(y)-1
	for i <= j {
		for y[i] < t {
			i++
		}
		for y[j] > t {
			j--
		}
		if i <= j {
			y[i], y[j] = y[j], y[i]
			i++
			j--
		}
	}
	return i, j
}
