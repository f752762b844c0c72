package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// GasColumn is the gas that light goes through: an ideal gas whose molecules
// absorb with a cross-section σ. Its transmittance is
//
//	exp(−σ pressure path / (k temperature))
//
// and its path is that of the light, so that the angle must be 0. Hydrogen and
// vacuum equipment are under the site's rules and the applicable codes; this is
// arithmetic for planning only.
type GasColumn struct {
	Formula     Formula           // of the molecule: H2, not H
	Pressure    units.Pressure    // 0 or greater
	Path        units.Length      // 0 or greater
	Temperature units.Temperature // greater than 0
	// CrossSection is σ of one molecule. With 0, σ is the sum over the atoms of
	// the tables, 2 r_e λ f2 of each.
	CrossSection units.Area
}

// String writes gas, pressure and path.
func (g GasColumn) String() string {
	return fmt.Sprintf("a column of %s Pa %s over %s m", formatRatio(float64(g.Pressure)), g.Formula, formatRatio(float64(g.Path)))
}

// Kinks lists the wavelengths at which the tables of the atoms have points; a
// given cross-section has none. See Body.
func (g GasColumn) Kinks(low, high units.Length) []units.Length {
	if g.CrossSection > 0 {
		return nil
	}
	return kinksOf([]Medium{Material{Formula: g.Formula}}, low, high)
}

// Warnings says so when atoms of the tables stand for molecular hydrogen.
func (g GasColumn) Warnings() []string {
	if g.CrossSection == 0 && g.Formula.isHydrogenMolecule() {
		return []string{"two atoms of the tables stand for the H2 molecule, which absorbs about 20 % more; a measured cross-section may be given"}
	}
	return nil
}

func (f Formula) isHydrogenMolecule() bool {
	return f.c != nil && len(f.c.atoms) == 1 && f.c.atoms[0].of.symbol == "H" && f.c.atoms[0].count == 2
}

func (g GasColumn) transmit(e *Evaluator, dst []units.Ratio) error {
	err := first(notNegative("pressure", g.Pressure), notNegative("path", g.Path),
		positive("temperature", g.Temperature), notNegative("cross_section", g.CrossSection))
	switch {
	case err != nil:
		return err
	case g.Formula.c == nil:
		return &FormulaError{Why: "a gas column needs the formula of its molecule"}
	case e.light.sinSq > 0:
		return &BodyError{
			Body: g.String(), Asked: "transmittance at an angle",
			Why: "the path of a gas column is that of the light already; state that path and leave the angle at 0",
		}
	}
	perArea, err := answer("molecules per area",
		units.ArealDensity(float64(g.Pressure)/(BoltzmannConstant*float64(g.Temperature))*float64(g.Path)))
	if err != nil {
		return err
	}
	if g.CrossSection == 0 {
		return e.absorb(dst, g.Formula, float64(perArea))
	}
	passes := units.Ratio(math.Exp(-float64(g.CrossSection) * float64(perArea)))
	for i := range dst {
		dst[i] = passes
	}
	return nil
}

func (g GasColumn) reflect(*Evaluator, []units.Ratio) error {
	return &BodyError{Body: g.String(), Asked: "reflectivity", Why: "a gas does not reflect in this model"}
}
