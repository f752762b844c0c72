package euv

import "example.com/dosewright/units"

// Surface is the face of a half space: a thick mirror without layers, as used
// at grazing incidence.
type Surface struct {
	Medium    Medium
	Roughness units.Length // rms, 0 or greater
}

// String names the medium.
func (s Surface) String() string {
	if s.Medium == nil {
		return "a surface without a medium"
	}
	return "a surface of " + s.Medium.String()
}

// Kinks lists the wavelengths at which the tables of the medium have points;
// see Body.
func (s Surface) Kinks(low, high units.Length) []units.Length { return s.stack().Kinks(low, high) }

// Warnings lists doubts about the medium.
func (s Surface) Warnings() []string { return s.stack().Warnings() }

// stack is a substrate without layers, which a Stack of its own must have.
func (s Surface) stack() Stack { return Stack{Substrate: s.Medium, BottomRoughness: s.Roughness} }

func (s Surface) reflect(e *Evaluator, dst []units.Ratio) error {
	if s.Medium == nil {
		return &BodyError{Body: s.String(), Asked: "reflectivity", Why: "give a material or an index"}
	}
	if err := notNegative("roughness", s.Roughness); err != nil {
		return err
	}
	bare := s.stack()
	return e.reflectStack(&bare, dst)
}

func (s Surface) transmit(*Evaluator, []units.Ratio) error {
	return &BodyError{
		Body: s.String(), Asked: "transmittance",
		Why: "it is a half space without an end; ask for that of a film, which has a thickness",
	}
}
