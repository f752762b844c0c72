package euv

import "example.com/dosewright/units"

// Spectral is a spectrum of any origin: a function that writes its values at
// some wavelengths, in m and in any order, to dst, which is as long. The
// product of what several bodies do to light is one.
type Spectral func(dst, wavelengths []float64) error

// ReflectivityOf is the reflectivity of a body as a spectrum. It keeps its
// memory between calls and is not for concurrent use. See Reflectivity.
func ReflectivityOf(b Body, angle units.Angle, pol Polarization) Spectral {
	return spectralOf(b, angle, pol, (*Evaluator).Reflectivity)
}

// TransmittanceOf is the transmittance of a body as a spectrum; see
// ReflectivityOf and Transmittance.
func TransmittanceOf(b Body, angle units.Angle, pol Polarization) Spectral {
	return spectralOf(b, angle, pol, (*Evaluator).Transmittance)
}

func spectralOf(b Body, angle units.Angle, pol Polarization, what func(*Evaluator, []units.Ratio, Body) error) Spectral {
	var e Evaluator
	var in []units.Length
	var out []units.Ratio
	return func(dst, wavelengths []float64) error {
		in, out = in[:0], out[:0]
		for _, l := range wavelengths {
			in, out = append(in, units.Length(l)), append(out, 0)
		}
		if err := e.Aim(in, angle, pol); err != nil {
			return err
		}
		if err := what(&e, out, b); err != nil {
			return err
		}
		for i, v := range out {
			dst[i] = float64(v)
		}
		return nil
	}
}
