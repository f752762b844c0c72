package repl

import (
	"fmt"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/units"
)

// builder is a body of the language that can be built from its numbers.
type builder interface {
	program.Body
	body(x []float64) (euv.Body, error)
}

// filmBody is a film: density and thickness.
type filmBody struct{ material *materialBody }

// Describe names the film.
func (b *filmBody) Describe() string { return "a film of " + b.material.name }

func (b *filmBody) body(x []float64) (euv.Body, error) {
	return euv.Film{Material: b.material.at(x[0]), Thickness: units.Length(x[1])}, nil
}

// gasBody is a gas column: pressure, path, temperature, cross-section.
type gasBody struct{ formula euv.Formula }

// Describe names the gas.
func (b *gasBody) Describe() string { return "a column of " + b.formula.String() }

func (b *gasBody) body(x []float64) (euv.Body, error) {
	g := euv.GasColumn{Formula: b.formula, Pressure: units.Pressure(x[0]), Path: units.Length(x[1]), Temperature: units.Temperature(x[2])}
	if x[3] > 0 && x[3]-x[3] == 0 {
		g.CrossSection = units.Area(x[3])
	}
	return g, nil
}

// asked is a question to a body: the row's own numbers first, then those of the
// body.
type asked struct {
	body    builder
	numbers int // how many numbers the body has
	own     int // how many are the row's own: wavelength, angle, roughness
	pol     euv.Polarization
	light   func(*euv.Evaluator, []units.Ratio, euv.Body) error
}

// at builds the body, with the roughness of the question on a surface.
func (q *asked) at(x []float64) (euv.Body, error) {
	b, err := q.body.body(x[q.own:])
	if s, ok := b.(euv.Surface); ok && q.own > 2 {
		s.Roughness = units.Length(x[2])
		b = s
	} else if err == nil && q.own > 2 && x[2] != 0 {
		err = fmt.Errorf("roughness is for the surface of a material; %s has its own", q.body.Describe())
	}
	return b, err
}

func (q *asked) call(x []float64) (float64, []string, error) {
	b, err := q.at(x)
	if err != nil {
		return 0, nil, err
	}
	var e euv.Evaluator
	var v [1]units.Ratio
	if err = e.Aim([]units.Length{units.Length(x[0])}, units.Angle(x[1]), q.pol); err == nil {
		err = q.light(&e, v[:], b)
	}
	if err != nil {
		return 0, nil, fault(err)
	}
	return float64(v[0]), b.Warnings(), nil
}

// spectral asks for many wavelengths at once.
func (q *asked) spectral() func(first, others, out []float64) error {
	var e euv.Evaluator
	var at []units.Length
	var v []units.Ratio
	var angle float64
	x := make([]float64, 0, 16)
	return func(first, others, out []float64) error {
		fresh := len(at) != len(first) || angle != others[0]
		for i := range first {
			fresh = fresh || float64(at[i]) != first[i]
		}
		if fresh {
			at, v, angle = at[:0], v[:0], others[0]
			for _, l := range first {
				at, v = append(at, units.Length(l)), append(v, 0)
			}
			if err := e.Aim(at, units.Angle(angle), q.pol); err != nil {
				return err
			}
		}
		x = append(append(x[:0], first[0]), others...)
		b, err := q.at(x)
		if err == nil {
			err = q.light(&e, v, b)
		}
		for i := range out {
			out[i] = float64(v[i])
		}
		return err
	}
}

// kinks are those of the body's tables; they do not depend on its numbers, so
// that the body is built with ones.
func (q *asked) kinks(low, high float64) []float64 {
	x := make([]float64, q.numbers)
	for i := range x {
		x[i] = 1
	}
	b, err := q.body.body(x)
	if err != nil {
		return nil
	}
	var list []float64
	for _, l := range b.Kinks(units.Length(low), units.Length(high)) {
		list = append(list, float64(l))
	}
	return list
}
