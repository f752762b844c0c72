package study

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// CoverageFactor is the k with which k times the standard uncertainty covers the
// probability p, 0 < p < 1, on both sides together: from the t-distribution with
// dof degrees of freedom, which need not be whole, 0 standing for infinitely many
// (JCGM 100:2008, G.3). Error: ErrRange.
func CoverageFactor(p, dof float64) (float64, error) {
	if !(p > 0 && p < 1) {
		return 0, refuse(ErrRange, "%g is no coverage probability: it lies between 0 and 1", p)
	}
	k := math.Sqrt2 * math.Erfinv(p)
	switch {
	case dof > manyDoF && finite(dof):
		k += (k*k*k + k) / (4 * dof)
	case dof != 0:
		if !(dof >= minimumDoF) || !finite(dof) {
			return 0, refuse(ErrRange, "%g is no number of degrees of freedom", dof)
		}
		k = distuv.StudentsT{Sigma: 1, Nu: dof}.Quantile(1 - (1-p)/2)
	}
	if !finite(k) {
		return 0, refuse(ErrRange, "a coverage probability of %g is too near to 1", p)
	}
	return k, nil
}

// manyDoF is from where on the quantile of the t-distribution is that of the
// normal one with the first term of its expansion (Abramowitz, Stegun, Handbook of
// Mathematical Functions (1964), 26.7.5; from memory); the next term is below
// 1e-10 for k up to 4, and the exact function loses its digits there.
const manyDoF = 1e6
