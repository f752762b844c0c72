package euv

import (
	"math"

	"example.com/dosewright/units"
)

// tabulated holds the scattering factors of some formulas at a list of
// wavelengths, found in the tables once. Densities and thicknesses may change
// between evaluations without another search.
type tabulated struct {
	wavelengths []units.Length
	both        map[*compound][]Index   // δ and β of one formula unit per m³
	absorbing   map[*compound][]float64 // β alone, which exists at more wavelengths
}

// maxTabulated is how many formulas are kept; one more starts afresh.
const maxTabulated = 64

// reset forgets everything and takes other wavelengths.
func (t *tabulated) reset(wavelengths []units.Length) {
	t.wavelengths = append(t.wavelengths[:0], wavelengths...)
	t.both, t.absorbing = nil, nil
}

// refraction is compound.refraction at all wavelengths.
func (t *tabulated) refraction(c *compound) ([]Index, error) {
	return remembered(&t.both, t.wavelengths, c, c.refraction)
}

// absorption is compound.absorption at all wavelengths.
func (t *tabulated) absorption(c *compound) ([]float64, error) {
	return remembered(&t.absorbing, t.wavelengths, c, c.absorption)
}

func remembered[T any](in *map[*compound][]T, at []units.Length, c *compound, find func(units.Length) (T, error)) ([]T, error) {
	if row := (*in)[c]; row != nil {
		return row, nil
	}
	row := make([]T, len(at))
	for i, l := range at {
		var err error
		if row[i], err = find(l); err != nil {
			return nil, err
		}
	}
	if *in == nil || len(*in) >= maxTabulated {
		*in = make(map[*compound][]T)
	}
	(*in)[c] = row
	return row, nil
}

// indices writes the indices at the wavelengths of t from number from on.
func (m Material) indices(dst []Index, t *tabulated, from int) error {
	if err := m.check(); err != nil {
		return err
	}
	one, err := t.refraction(m.Formula.c)
	if err != nil {
		return err
	}
	perVolume, sound := m.perVolume(), true
	for i, n := range one[from:][:len(dst)] {
		dst[i] = Index{n.Delta * perVolume, n.Beta * perVolume}
		sound = sound && dst[i].Delta < 1 && dst[i].Delta+dst[i].Beta < math.Inf(1)
	}
	for i := 0; i < len(dst) && !sound && err == nil; i++ { // which one is it?
		_, err = m.times(one[from+i])
	}
	return err
}

// indices writes n to all of dst.
func (n Index) indices(dst []Index, _ *tabulated, _ int) error {
	if err := n.check(); err != nil {
		return err
	}
	for i := range dst {
		dst[i] = n
	}
	return nil
}
