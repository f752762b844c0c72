package euv

import (
	"math"
	"sync"

	"gonum.org/v1/gonum/integrate/quad"
)

// The tails of the Poisson and the binomial distribution are the probability
// of the last term, by the saddle-point form of C. Loader (Fast and accurate
// computation of binomial probabilities, 2000), times the sum of the others
// relative to it. Everything is added with one sign and multiplied in the
// logarithm, so that a tail of 1e-250 keeps the digits of one of 0.1.
//
// The relative sum has an exact integral form, scale · ∫ exp(−e(v)) dv with
//
//	e(v) = down·excess(−v) + up·excess(rise·v) + slope·v,
//
// whose cost does not grow with the counts.
type tail struct {
	scale, down, up, rise, slope float64

	fewest float64 // the smaller count of the two sides; few make a short sum
}

// fall is the exponent behind which nothing is left to add: e⁻³⁸ is 3e-17.
const fall = 38

// directTerms is the number of terms up to which the sum itself is quicker.
const directTerms = 100

// reach is an upper bound of the v at which e(v) passes fall, as long as v is
// small, from e(v) ≈ slope·v + ½(down + up·rise²)v².
func (t tail) reach() float64 {
	curve := t.down + t.up*t.rise*t.rise
	root := math.Sqrt(t.slope*t.slope + 2*fall*curve)
	return 2 * fall / (t.slope + root)
}

func (t tail) exponent(v float64) float64 {
	e := t.slope * v
	if t.down != 0 {
		e += t.down * excess(-v)
	}
	if t.up != 0 {
		e += t.up * excess(t.rise*v)
	}
	return e
}

// sum returns the relative sum; ratio(j) is term j+1 over term j.
func (t tail) sum(ratio func(j float64) float64) float64 {
	reach := t.reach()
	if t.fewest <= directTerms || reach*t.scale <= directTerms {
		return addTerms(ratio)
	}
	for t.exponent(reach) < fall {
		reach *= 1.1
	}
	total := 0.0
	for _, n := range legendre() {
		total += n.weight * math.Exp(-t.exponent(reach*n.place))
	}
	return t.scale * reach * total
}

// addTerms adds 1 + r(0) + r(0)r(1) + … until nothing changes. Its callers
// have terms that fall fast; the bound only guards a mistake in that.
func addTerms(ratio func(j float64) float64) float64 {
	total, term := 1.0, 1.0
	for j := 0.0; j < 20*directTerms && term > 1e-17*total; j++ {
		term *= ratio(j)
		total += term
	}
	return total
}

type node struct{ place, weight float64 }

// legendre is the Gauss–Legendre rule on 0 to 1. With 28 places it integrates
// exp(−38v) and the half of a Gaussian that falls by e⁻³⁸ to the last digit.
var legendre = sync.OnceValue(func() []node {
	const places = 28
	x, w := make([]float64, places), make([]float64, places)
	quad.Legendre{}.FixedLocations(x, w, 0, 1)
	nodes := make([]node, places)
	for i := range nodes {
		nodes[i] = node{x[i], w[i]}
	}
	return nodes
})

// excess is x − ln(1+x) for x > −1, without the cancellation near zero: with
// s = x/(2+x) it is x·s − 2(s³/3 + s⁵/5 + …).
func excess(x float64) float64 {
	if x < -0.2 || x > 0.25 {
		return x - math.Log1p(x)
	}
	s := x / (2 + x)
	q := s * s
	return x*s - 2*s*q*(1./3+q*(1./5+q*(1./7+q*(1./9+q*(1./11+q*(1./13+q*(1./15+q/17)))))))
}

// deviance is count·ln(count/mean) − count + mean, given the exact difference
// mean − count; count > 0, mean > 0.
func deviance(count, mean, difference float64) float64 {
	if mean < count/2 {
		return difference + count*math.Log(count/mean)
	}
	return count * excess(difference/count)
}

// stirling is ln n! − ln(√(2πn) nⁿ e⁻ⁿ) for n ≥ 1: Stirling's series, whose
// next term is below 1e-16 from 16 on.
func stirling(n float64) float64 {
	if n < 16 {
		g, _ := math.Lgamma(n + 1)
		return g - (0.5*math.Log(2*math.Pi*n) + n*math.Log(n) - n)
	}
	q := 1 / (n * n)
	return (1./12 - q*(1./360-q*(1./1260-q*(1./1680-q*(1./1188-q*691/360360))))) / n
}

// logBelowOne returns ln(1 − eˡ). Its callers give the smaller side of a
// distribution split at or beyond its mean, so that eˡ stays below about a half.
func logBelowOne(l float64) float64 { return math.Log1p(-math.Exp(l)) }

// ln is the natural logarithm, also of numbers so small that float64 holds them
// with fewer digits: there math.Log is wrong on some processors.
func ln(x float64) float64 {
	if x < 0x1p-1000 {
		return math.Log(x*0x1p100) - 100*math.Ln2
	}
	return math.Log(x)
}
