package euv

import (
	"fmt"
	"math"
	"strconv"

	"example.com/dosewright/units"
)

// maxDensity refuses slips of unit: no element is denser than 22.6 g/cm³.
const maxDensity = 30 * gramPerCubicCentimetre

// Material is a chemical formula at a density. Its index is that of its atoms,
// each as if it stood alone: right away from absorption edges, and within a
// percent or so above 50 eV. Both fields may be set at will; what cannot be is
// refused when the material is used. Materials compare with ==.
type Material struct {
	Formula Formula
	Density units.Density
}

// NewMaterial makes a material from a formula such as C8H8O and a density
// greater than 0 and at most 30 g/cm³. Errors: *FormulaError, *ArgumentError.
func NewMaterial(formula string, density units.Density) (Material, error) {
	f, err := ParseFormula(formula)
	if err != nil {
		return Material{}, err
	}
	m := Material{f, density}
	return m, m.check()
}

// SolidElement makes a material from an element symbol at the density of the
// solid (CRC Handbook, see tables/SOURCES.txt). Compounds have no density of
// their own here, and elements that are gases or liquids at room temperature
// are refused, since their tabulated density is that of the liquid.
func SolidElement(symbol string) (Material, error) {
	f, err := ParseFormula(symbol)
	if err != nil {
		return Material{}, err
	}
	e := elements()[symbol]
	if e == nil {
		return Material{}, &FormulaError{symbol, 0, "a compound needs its density: only elements have one in the tables"}
	}
	switch {
	case e.state == stateBoilingLiquid:
		return Material{}, &FormulaError{symbol, 0, symbol + " is a gas at room temperature: use a gas column, or state a density"}
	case e.state != stateSolid || e.density <= 0:
		return Material{}, &FormulaError{symbol, 0, symbol + " is no solid at room temperature: state a density"}
	}
	return Material{f, e.density}, nil
}

// String writes formula and density.
func (m Material) String() string {
	return m.Formula.String() + " " + formatRatio(float64(m.Density/gramPerCubicCentimetre)) + " g/cm³"
}

func formatRatio(x float64) string { return strconv.FormatFloat(x, 'g', 6, 64) }

func (m Material) check() error {
	if m.Formula.c == nil {
		return &FormulaError{Why: "a material needs a formula and a density"}
	}
	if !isFinite(m.Density) || m.Density <= 0 || m.Density > maxDensity {
		return outside("density", m.Density, "greater than 0 and at most 30 g/cm³")
	}
	return nil
}

func (m Material) kinks(low, high float64, yield func(float64)) {
	if m.Formula.c == nil {
		return
	}
	for _, a := range m.Formula.c.atoms {
		for _, e := range a.of.factors().energy {
			if e > low && e < high {
				yield(e)
			}
		}
	}
}

func (m Material) edges(yield func(low, high float64)) {
	if m.Formula.c == nil {
		return
	}
	for _, a := range m.Formula.c.atoms {
		a.of.factors().edges(yield)
	}
}

// warnings compares the density with that of the elements as solids, volumes
// added: a metal with the density of water is a slip, a porous film is not.
func (m Material) warnings() []string {
	if m.Formula.c == nil {
		return nil
	}
	volume := 0.0
	for _, a := range m.Formula.c.atoms {
		if a.of.state != stateSolid || a.of.density <= 0 {
			return nil
		}
		volume += a.count * a.of.weight / float64(a.of.density)
	}
	usual := units.Density(m.Formula.c.weight / volume)
	if m.Density >= usual/2 && m.Density <= usual*2 {
		return nil
	}
	return []string{fmt.Sprintf("%s is given %s g/cm³, the solid has about %s g/cm³",
		m.Formula, formatRatio(float64(m.Density/gramPerCubicCentimetre)), formatRatio(math.Round(float64(usual))/1000))}
}
