package study

import "math"

// Rounding leaves a pivot that should be 0 at about 1e-16, and what stands below
// it at about the square root of that.
const (
	noPivot   = 1e-12
	noColumn  = 1e-6
	underZero = -1e-9
)

// factor sets up the group's correlation matrix and its Cholesky root, which
// exists for a semi-definite matrix too: where a pivot is 0, the input is
// determined by those before it, and its column is 0.
func (g *group) factor(known map[[2]int]float64) error {
	n := len(g.slots)
	if n < 2 {
		return nil
	}
	g.r, g.root = grid(n, n), grid(n, n)
	for i := range n {
		for j := range n {
			g.r[i][j] = known[[2]int{g.slots[i], g.slots[j]}]
		}
		g.r[i][i] = 1
	}
	for k := range n {
		pivot := g.rest(k, k)
		if pivot < underZero {
			return g.contradiction(k, pivot)
		}
		if pivot < noPivot {
			pivot = 0
		}
		g.root[k][k] = math.Sqrt(pivot)
		for i := k + 1; i < n; i++ {
			rest := g.rest(i, k)
			switch {
			case pivot > 0:
				g.root[i][k] = rest / g.root[k][k]
			case math.Abs(rest) > noColumn:
				return g.contradiction(i, -math.Abs(rest))
			}
		}
	}
	return nil
}

// rest is what the columns before k leave of the coefficient i, k.
func (g *group) rest(i, k int) float64 {
	x := g.r[i][k]
	for j := range k {
		x -= g.root[i][j] * g.root[k][j]
	}
	return x
}

func (g *group) contradiction(k int, by float64) error {
	return refuse(ErrCorrelation, "the correlations among inputs %v contradict each other: once the others are known, "+
		"input %d would have the variance %.2g of its own, which is below 0; coefficients rounded too far do that", g.slots, g.slots[k], by)
}
