package study

import (
	"context"
	"math"
)

// Fitting is a least-squares problem: find the parameters that make the sides of
// an equation agree best over the rows of some data. The program has two outputs,
// the sides.
type Fitting struct {
	Slots      []float64 // values of all slots; for the parameters, where to start
	Parameters []int     // their slots
	Columns    []Column  // the data, of one length, at most MaxRows
}

// Column is a slot and its value in each row.
type Column struct {
	Slot   int
	Values []float64
}

// MaxRows is the largest number of rows, MaxParameters that of parameters.
const (
	MaxRows       = 1_000_000
	MaxParameters = 50
)

// Fit is the result of a least-squares fit.
type Fit struct {
	Values      []float64   // of the parameters
	U           []float64   // their standard uncertainties; nil without degrees of freedom
	Correlation [][]float64 // of the parameters; nil without degrees of freedom
	Residual    float64     // standard deviation of the residuals left − right; 0 without degrees of freedom
	DoF         int         // rows less parameters
	Steps       int         // that it took
}

const (
	mostSteps = 200
	settled   = 1e-22 // of the sum of squares that a step still promises: 1e-11 of an uncertainty
	exactFit  = 1e-15 // residuals of this size, relative to the sides, are rounding
	rounding  = 0x1p-50
	lambda0   = 1e-3
	lambdaMax = 1e20
)

// Run fits by the method of Levenberg and Marquardt (Marquardt, J. SIAM 11, 431
// (1963)), with derivatives by differences; a model that is linear in its
// parameters takes a few steps from anywhere. The uncertainties are those of
// unknown but equal scatter in all rows: the residual standard deviation times
// the root of the diagonal of (JᵀJ)⁻¹.
//
// Errors: ErrRange, ErrSize, that of the model at the start, ErrUndetermined when
// the data leave a parameter open, ErrNoConvergence, and that of ctx.
func (f *Fitting) Run(ctx context.Context, p Program) (*Fit, error) {
	if err := f.refused(); err != nil {
		return nil, err
	}
	m := f.model(p)
	here := append([]float64(nil), f.start()...)
	r, err := m.residuals(here)
	if err != nil {
		return nil, err
	}
	for step, lambda := 1, lambda0; step <= mostSteps; step++ {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		j, err := m.jacobian(here)
		if err != nil {
			return nil, err
		}
		done := r.square <= square(exactFit*r.size)
		for !done {
			move, promise := j.step(r.values, lambda)
			if promise <= settled*r.square+square(rounding*r.size) || lambda > lambdaMax {
				done = true
				break
			}
			next := plus(here, move)
			there, err := m.residuals(next)
			if err == nil && there.square <= r.square+rounding*r.size*math.Sqrt(r.square) {
				here, r = next, there
				lambda = math.Max(lambda/10, 1e-12)
				break
			}
			lambda *= 10
		}
		if done {
			return j.result(here, r, step)
		}
	}
	return nil, refuse(ErrNoConvergence, "the fit did not settle in %d steps: start nearer to the answer", mostSteps)
}

func square(x float64) float64 { return x * x }

func plus(a, b []float64) []float64 {
	sum := make([]float64, len(a))
	for i := range a {
		sum[i] = a[i] + b[i]
	}
	return sum
}

func (f *Fitting) start() []float64 {
	var v []float64
	for _, slot := range f.Parameters {
		v = append(v, f.Slots[slot])
	}
	return v
}

func (f *Fitting) refused() error {
	n := len(f.Parameters)
	switch {
	case n == 0 || len(f.Columns) == 0:
		return refuse(ErrRange, "a fit needs a parameter and a column of data")
	case n > MaxParameters:
		return refuse(ErrSize, "%d parameters are too many: at most %d", n, MaxParameters)
	}
	taken := map[int]bool{}
	use := func(slot int) error {
		if slot < 0 || slot >= len(f.Slots) || taken[slot] {
			return refuse(ErrRange, "slot %d is taken twice or does not exist", slot)
		}
		taken[slot] = true
		return nil
	}
	for _, slot := range f.Parameters {
		if err := use(slot); err != nil {
			return err
		}
	}
	rows := len(f.Columns[0].Values)
	for i, c := range f.Columns {
		if err := use(c.Slot); err != nil {
			return err
		}
		if len(c.Values) != rows {
			return refuse(ErrRange, "column %d has %d rows, column 0 has %d", i, len(c.Values), rows)
		}
	}
	switch {
	case rows < n:
		return refuse(ErrUndetermined, "%d rows do not determine %d parameters", rows, n)
	case rows > MaxRows:
		return refuse(ErrSize, "%d rows are too many: at most %d", rows, MaxRows)
	}
	return nil
}
