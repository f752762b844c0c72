package study

import (
	"fmt"
	"math"
)

// stepTries bounds the search for a first step: 16⁶⁰ is about 1e72.
const stepTries = 60

// model runs the two sides of a fit over all rows, block by block.
type model struct {
	*Fitting
	rows  int
	run   *runner
	lanes [][]float64
	sides [][]float64
	ins   [][]float64
	outs  [][]float64
	scale []float64 // how large each parameter was at its largest
	unit  []float64 // how far it may move when it was never other than 0
}

func (f *Fitting) model(p Program) *model {
	m := &model{
		Fitting: f, rows: len(f.Columns[0].Values), run: newRunner(p(), len(f.Slots), 2),
		lanes: grid(len(f.Slots), BlockSize), sides: grid(2, BlockSize),
		ins: make([][]float64, len(f.Slots)), outs: make([][]float64, 2),
		scale: make([]float64, len(f.Parameters)), unit: make([]float64, len(f.Parameters)),
	}
	for slot, v := range f.Slots {
		fill(m.lanes[slot], v)
	}
	return m
}

// residuals are left − right in every row.
type residuals struct {
	values []float64
	square float64 // sum of their squares
	size   float64 // root of the sum of squares of the sides
}

// residuals at the given parameters; the error is that of the first row without
// a value, and names it, from 1.
func (m *model) residuals(at []float64) (residuals, error) {
	for i, slot := range m.Parameters {
		if !finite(at[i]) {
			return residuals{}, ErrNotFinite
		}
		fill(m.lanes[slot], at[i])
	}
	r := residuals{values: make([]float64, m.rows)}
	var sides float64
	var failure error
	for start := 0; start < m.rows && failure == nil; start += BlockSize {
		width := min(BlockSize, m.rows-start)
		for _, c := range m.Columns {
			copy(m.lanes[c.Slot], c.Values[start:start+width])
		}
		m.run.run(cut(m.ins, m.lanes, 0, width), cut(m.outs, m.sides, 0, width), func(lane int, err error) {
			if failure == nil {
				failure = fmt.Errorf("row %d: %w", start+lane+1, err)
			}
		})
		for lane := range width {
			left, right := m.sides[0][lane], m.sides[1][lane]
			r.values[start+lane] = left - right
			r.square += square(left - right)
			sides += left*left + right*right
		}
	}
	r.size = math.Sqrt(sides)
	if failure == nil && (!finite(r.square) || !finite(r.size)) {
		failure = ErrNotFinite
	}
	return r, failure
}

// jacobian differentiates the residuals by each parameter, by central
// differences that take two step sizes, so that curvature of third order drops
// out.
func (m *model) jacobian(at []float64) (*jacobian, error) {
	j := newJacobian(m.rows, len(at))
	for i := range at {
		h, err := m.stepOf(i, at)
		if err != nil {
			return nil, err
		}
		var sides [4]residuals
		for k, a := range []float64{1, -1, 0.5, -0.5} {
			if sides[k], err = m.residuals(plusAt(at, i, a*h)); err != nil {
				return nil, err
			}
		}
		for row := range m.rows {
			wide := sides[0].values[row] - sides[1].values[row]
			slim := sides[2].values[row] - sides[3].values[row]
			j.Set(row, i, (8*slim-wide)/(6*h))
		}
	}
	return j, j.prepare()
}

// stepOf is the step for a parameter: relative to the largest value it has had,
// or, when that is 0 but for rounding, one that moves the sides by a small part.
func (m *model) stepOf(i int, at []float64) (float64, error) {
	m.scale[i] = math.Max(m.scale[i], math.Abs(at[i]))
	if m.unit[i] > 0 {
		return math.Max(m.unit[i], relativeStep*m.scale[i]), nil
	}
	here, err := m.residuals(at)
	if err != nil {
		return 0, err
	}
	if h := relativeStep * m.scale[i]; h > 0 {
		there, err := m.residuals(plusAt(at, i, h))
		if err != nil || apart(here.values, there.values) > 1e-11*there.size {
			return h, nil
		}
	}
	h := 1.0
	for range stepTries {
		there, err := m.residuals(plusAt(at, i, h))
		switch change := apart(here.values, there.values); {
		case err != nil || change > 1e-3*there.size:
			h /= 16
		case change < 1e-6*there.size:
			h *= 16
		default:
			m.unit[i] = h
			return h, nil
		}
	}
	return 0, refuse(ErrUndetermined, "parameter %d moves neither side in any row: start elsewhere, or leave it out", i)
}

func plusAt(at []float64, i int, h float64) []float64 {
	moved := append([]float64(nil), at...)
	moved[i] += h
	return moved
}

func apart(a, b []float64) float64 {
	var sum float64
	for i := range a {
		sum += square(a[i] - b[i])
	}
	return math.Sqrt(sum)
}
