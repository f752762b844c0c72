package euv

import (
	"math"

	"example.com/dosewright/units"
)

// Delta is δ of the refractive index n = 1 − δ − iβ of a material.
//
//	δ = r_e λ² Σ N f1 / 2π
//
// summed over the atoms of the formula, N of each per volume. It is negative
// where f1 is. Wavelengths for which an element has no f1 are refused; β may
// exist there. wavelength is that in vacuum, in m. Errors: *ArgumentError,
// *FormulaError. Source: Henke, Gullikson & Davis, At. Data Nucl. Data Tables
// 54, 181 (1993), equation of the refractive index, with the tables' later
// updates.
func Delta(m Material, wavelength units.Length) (units.Ratio, error) {
	n, err := m.Index(wavelength)
	return units.Ratio(n.Delta), err
}

// Beta is β of the refractive index n = 1 − δ − iβ of a material.
//
//	β = r_e λ² Σ N f2 / 2π
//
// summed over the atoms of the formula, N of each per volume. It exists at
// every wavelength of the tables, from about 4.13 nm to 49.7 nm. Errors and
// source are those of Delta.
func Beta(m Material, wavelength units.Length) (units.Ratio, error) {
	if err := m.check(); err != nil {
		return 0, err
	}
	b, err := m.Formula.c.absorption(wavelength)
	if err != nil {
		return 0, err
	}
	return answer("beta", units.Ratio(m.perVolume()*b))
}

// Index is n = 1 − δ − iβ with both from the tables. See Delta and Beta.
func (m Material) Index(wavelength units.Length) (Index, error) {
	if err := m.check(); err != nil {
		return Index{}, err
	}
	n, err := m.Formula.c.refraction(wavelength)
	if err != nil {
		return Index{}, err
	}
	return m.times(n)
}

// perVolume is the number of formula units per volume, in m⁻³.
func (m Material) perVolume() float64 {
	const kilogramPerGram = 1e-3
	return float64(m.Density) * AvogadroConstant / (m.Formula.c.weight * kilogramPerGram)
}

// times turns δ and β of one formula unit per volume into those of the
// material.
func (m Material) times(one Index) (Index, error) {
	perVolume := m.perVolume()
	n := Index{one.Delta * perVolume, one.Beta * perVolume}
	if !(n.Delta < 1) || !isFinite(n.Delta) || !isFinite(n.Beta) {
		return Index{}, outside("density", m.Density, "small enough that the index stays above 0")
	}
	return n, nil
}

// refraction gives δ and β of one formula unit per m³, in m³.
func (c *compound) refraction(wavelength units.Length) (Index, error) {
	if err := positive("wavelength", wavelength); err != nil {
		return Index{}, err
	}
	var sum Index
	energy := electronVolts(wavelength)
	for _, a := range c.atoms {
		f := a.of.factors()
		i, ok := f.locate(energy)
		f1 := 0.0
		if ok {
			f1, ok = f.f1At(i, energy)
		}
		if !ok {
			return Index{}, a.of.refuse(wavelength, "delta")
		}
		sum.Delta += a.count * f1
		sum.Beta += a.count * f.f2At(i, energy)
	}
	scale := perFactor(wavelength)
	return Index{scale * sum.Delta, scale * sum.Beta}, nil
}

// absorption gives β of one formula unit per m³, in m³, also where δ is not
// tabulated.
func (c *compound) absorption(wavelength units.Length) (float64, error) {
	if err := positive("wavelength", wavelength); err != nil {
		return 0, err
	}
	sum := 0.0
	energy := electronVolts(wavelength)
	for _, a := range c.atoms {
		f := a.of.factors()
		i, ok := f.locate(energy)
		if !ok {
			return 0, a.of.refuse(wavelength, "beta")
		}
		sum += a.count * f.f2At(i, energy)
	}
	return perFactor(wavelength) * sum, nil
}

// perFactor is r_e λ²/2π, in m³.
func perFactor(wavelength units.Length) float64 {
	return ClassicalElectronRadius * float64(wavelength) * float64(wavelength) / (2 * math.Pi)
}
