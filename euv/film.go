package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// Film is a layer that absorbs and does nothing else: its transmittance is
//
//	exp(−4πβ thickness / (wavelength cos angle))
//
// the absorption along the straight path, once, without reflection at its
// faces and without the bending of the ray, both of which are small where n is
// near 1. For all three take a Stack of one layer.
type Film struct {
	Material  Material
	Thickness units.Length // 0 or greater, at most 1 m
}

// String writes thickness and material.
func (f Film) String() string {
	return fmt.Sprintf("a film of %s nm %s", formatRatio(nanometres(f.Thickness)), f.Material)
}

// Kinks lists the wavelengths at which the tables of the material have points;
// see Body.
func (f Film) Kinks(low, high units.Length) []units.Length {
	return kinksOf([]Medium{f.Material}, low, high)
}

// Warnings lists doubts about the material.
func (f Film) Warnings() []string { return f.Material.warnings() }

func (f Film) transmit(e *Evaluator, dst []units.Ratio) error {
	if err := f.Material.check(); err != nil {
		return err
	}
	if !(f.Thickness >= 0 && f.Thickness <= maxThickness) {
		return outside("thickness", f.Thickness, "between 0 and 1 m")
	}
	return e.absorb(dst, f.Material.Formula, f.Material.perVolume()*float64(f.Thickness)/e.light.cosine)
}

func (f Film) reflect(*Evaluator, []units.Ratio) error {
	return &BodyError{
		Body: f.String(), Asked: "reflectivity",
		Why: "a film here absorbs only; ask for that of a stack of one layer",
	}
}

// absorb writes what passes a number of formula units per area.
func (e *Evaluator) absorb(dst []units.Ratio, of Formula, perArea float64) error {
	beta, err := e.table.absorption(of.c)
	if err != nil {
		return err
	}
	for i := range dst {
		dst[i] = units.Ratio(math.Exp(-2 * e.light.k[i] * beta[i] * perArea))
	}
	return nil
}
