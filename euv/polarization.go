package euv

import "example.com/dosewright/units"

// Polarization says how the light's electric field lies.
type Polarization uint8

const (
	// Unpolarised is the mean of the intensities of S and P.
	Unpolarised Polarization = iota
	// PolarizationS is the field across the plane of incidence.
	PolarizationS
	// PolarizationP is the field in the plane of incidence.
	PolarizationP
)

// String gives the word for the polarization.
func (p Polarization) String() string {
	switch p {
	case PolarizationS:
		return "s"
	case PolarizationP:
		return "p"
	}
	return "unpolarised"
}

func (p Polarization) check() error {
	if p > PolarizationP {
		return outside("polarization", units.Count(p), "unpolarised, s or p")
	}
	return nil
}
