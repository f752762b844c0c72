package euv

import "example.com/dosewright/units"

// Body is what light meets: a Stack, a Surface, a Film or a GasColumn. Bodies
// are plain values: change a thickness or a pressure and ask again. What makes
// no sense is refused when the body is used.
type Body interface {
	// String names the body.
	String() string
	// Kinks lists, in rising order, the wavelengths strictly between low and
	// high at which the body's spectrum has a kink because a table has a point
	// there. Integrate from one to the next; see BandMean.
	Kinks(low, high units.Length) []units.Length
	// Warnings lists doubts about the body.
	Warnings() []string

	// reflect and transmit write what the body does to the light of an
	// evaluator to dst, which has one place for each wavelength.
	reflect(e *Evaluator, dst []units.Ratio) error
	transmit(e *Evaluator, dst []units.Ratio) error
}

// Reflectivity is the share of the power that a body reflects.
//
// wavelength is that in vacuum, in m; angle is taken from the normal, 0° or
// greater and less than 90°; unpolarised is the mean of the intensities of s
// and p. roughness, in m, 0 or greater, is the rms roughness of a Surface that
// has none of its own; a Stack has a roughness at each interface and refuses
// one here. Films and gas columns, which absorb only, are refused. The
// warnings are those of the body. Errors: *ArgumentError, *BodyError,
// *FormulaError. Source: recursion of L. G. Parratt, Phys. Rev. 95, 359
// (1954), with the roughness of L. Névot, P. Croce, Rev. Phys. Appl. 15, 761
// (1980).
func Reflectivity(b Body, wavelength units.Length, angle units.Angle, polarization Polarization, roughness units.Length) (Warned[units.Ratio], error) {
	b, err := roughened(b, roughness)
	if err != nil {
		return Warned[units.Ratio]{}, err
	}
	return ask(b, wavelength, angle, polarization, (*Evaluator).Reflectivity)
}

// Transmittance is the share of the power that passes a body once.
//
// For a Film it is the absorption along the straight path, without reflection
// at its faces; for a GasColumn that of the gas; for a smooth Stack without
// substrate it is exact, interference included. Rough stacks, stacks on a
// substrate and surfaces are refused. The arguments, warnings and errors are
// those of Reflectivity.
func Transmittance(b Body, wavelength units.Length, angle units.Angle, polarization Polarization) (Warned[units.Ratio], error) {
	return ask(b, wavelength, angle, polarization, (*Evaluator).Transmittance)
}

func ask(b Body, wavelength units.Length, angle units.Angle, pol Polarization, what func(*Evaluator, []units.Ratio, Body) error) (Warned[units.Ratio], error) {
	var e Evaluator
	var v [1]units.Ratio
	if err := e.Aim([]units.Length{wavelength}, angle, pol); err != nil {
		return Warned[units.Ratio]{}, err
	}
	if err := what(&e, v[:], b); err != nil {
		return Warned[units.Ratio]{}, err
	}
	return Warned[units.Ratio]{v[0], b.Warnings()}, nil
}

// roughened gives a surface its roughness.
func roughened(b Body, roughness units.Length) (Body, error) {
	if err := notNegative("roughness", roughness); err != nil || roughness == 0 {
		return b, err
	}
	if s, ok := b.(Surface); ok && s.Roughness == 0 {
		s.Roughness = roughness
		return s, nil
	}
	return nil, outside("roughness", roughness, "0 here: only the surface of a material takes it as an argument, and once; a stack states that of its interfaces")
}
