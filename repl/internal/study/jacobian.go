package study

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/mat"
)

// jacobian is the matrix ∂residual/∂parameter, with columns scaled to length 1
// and decomposed as U Σ Vᵀ.
type jacobian struct {
	*mat.Dense
	length []float64 // of the columns before
	u, v   mat.Dense
	sigma  []float64
}

func newJacobian(rows, columns int) *jacobian {
	return &jacobian{Dense: mat.NewDense(rows, columns, nil), length: make([]float64, columns)}
}

// undetermined is the ratio of singular values below which a combination of
// parameters is lost in the rounding of the derivatives.
const undetermined = 1e-11

func (j *jacobian) prepare() error {
	rows, columns := j.Dims()
	for c := range columns {
		col := j.ColView(c)
		j.length[c] = mat.Norm(col, 2)
		if !(j.length[c] > 0) || !finite(j.length[c]) {
			return refuse(ErrUndetermined, "parameter %d moves neither side in any row: start elsewhere, or leave it out", c)
		}
		for r := range rows {
			j.Set(r, c, j.Dense.At(r, c)/j.length[c])
		}
	}
	var svd mat.SVD
	if !svd.Factorize(j.Dense, mat.SVDThin) {
		return fmt.Errorf("the derivatives have no decomposition: %w", ErrNoConvergence)
	}
	svd.UTo(&j.u)
	svd.VTo(&j.v)
	j.sigma = svd.Values(nil)
	return nil
}

// step solves (JᵀJ + λD²) step = −Jᵀr, D the lengths of the columns, and tells by
// how much it promises to lower the sum of squares.
func (j *jacobian) step(r []float64, lambda float64) (move []float64, promise float64) {
	_, n := j.Dims()
	var along mat.VecDense
	along.MulVec(j.u.T(), mat.NewVecDense(len(r), r))
	scaled := mat.NewVecDense(n, nil)
	for k, s := range j.sigma {
		if s < undetermined*j.sigma[0] {
			break // rounding alone: to move along it promises nothing
		}
		a := along.AtVec(k)
		part := s * s / (s*s + lambda)
		scaled.SetVec(k, -a*part/s)
		promise += a * a * part * (2 - part)
	}
	var turned mat.VecDense
	turned.MulVec(&j.v, scaled)
	move = make([]float64, n)
	for i := range move {
		move[i] = turned.AtVec(i) / j.length[i]
	}
	return move, promise
}

// result states the fit with its uncertainties.
func (j *jacobian) result(at []float64, r residuals, steps int) (*Fit, error) {
	rows, n := j.Dims()
	if smallest := j.sigma[n-1]; smallest < undetermined*j.sigma[0] {
		worst := 0
		for i := range n {
			if math.Abs(j.v.At(i, n-1)) > math.Abs(j.v.At(worst, n-1)) {
				worst = i
			}
		}
		return nil, refuse(ErrUndetermined, "the data do not determine parameter %d apart from the others", worst)
	}
	fit := &Fit{Values: at, DoF: rows - n, Steps: steps}
	if fit.DoF == 0 {
		return fit, nil
	}
	if r.square > square(exactFit*r.size) {
		fit.Residual = math.Sqrt(r.square / float64(fit.DoF))
	}
	fit.U, fit.Correlation = make([]float64, n), grid(n, n)
	cov := grid(n, n) // (JᵀJ)⁻¹ of the scaled columns
	for a := range n {
		for b := range n {
			for k, s := range j.sigma {
				cov[a][b] += j.v.At(a, k) * j.v.At(b, k) / (s * s)
			}
		}
	}
	for a := range n {
		fit.U[a] = fit.Residual * math.Sqrt(cov[a][a]) / j.length[a]
		for b := range n {
			fit.Correlation[a][b] = cov[a][b] / math.Sqrt(cov[a][a]*cov[b][b])
		}
		fit.Correlation[a][a] = 1
	}
	return fit, nil
}
