package euv_test

import (
	"fmt"
	"log"
	"math"

	"example.com/dosewright/euv"
	"example.com/dosewright/units"
)

const degree = units.Angle(math.Pi / 180)

// solidOf is an element at the density of the solid.
func solidOf(symbol string) euv.Material {
	m, err := euv.SolidElement(symbol)
	if err != nil {
		log.Fatal(err)
	}
	return m
}

// mirrorOf is a capped mirror of fifty bilayers.
func mirrorOf() euv.Stack {
	si, mo := solidOf("Si"), solidOf("Mo")
	return euv.Stack{
		Repeats: []euv.Repeat{
			euv.Once(euv.Layer{Medium: solidOf("Ru"), Thickness: 2.5e-9}),
			euv.Periods(50, euv.Layer{Medium: si, Thickness: 4.15e-9}, euv.Layer{Medium: mo, Thickness: 2.85e-9}),
		},
		Substrate: si,
	}.WithRoughness(0.4e-9)
}

func ExampleSolidElement() {
	m, err := euv.SolidElement("Mo")
	fmt.Println(m, err)
	_, err = euv.SolidElement("Xe")
	fmt.Println(err)
	// Output:
	// Mo 10.22 g/cm³ <nil>
	// formula "Xe": Xe is a gas at room temperature: use a gas column, or state a density
}

func ExampleNewMaterial() {
	m, err := euv.NewMaterial("C8H8O", 1170)
	fmt.Println(m, err)
	// Output: C8H8O 1.17 g/cm³ <nil>
}

func ExampleParseFormula() {
	f, err := euv.ParseFormula("SnO1.5")
	fmt.Println(f, err)
	_, err = euv.ParseFormula("sio2")
	fmt.Println(err)
	// Output:
	// SnO1.5 <nil>
	// formula "sio2": element symbols start with a capital: Si, not si
}

func ExampleDelta() {
	v, err := euv.Delta(solidOf("Mo"), 13.5e-9)
	fmt.Printf("%.6f %v\n", v, err)
	// Output: 0.076208 <nil>
}

func ExampleBeta() {
	v, err := euv.Beta(solidOf("Mo"), 13.5e-9)
	fmt.Printf("%.6f %v\n", v, err)
	// Output: 0.006436 <nil>
}

func ExampleAttenuation() {
	m, _ := euv.NewMaterial("C5H8O2", 1190)
	a, err := euv.Attenuation(m, 13.5e-9)
	fmt.Printf("%.3f µm⁻¹ %v\n", a/1e6, err)
	// Output: 5.241 µm⁻¹ <nil>
}

func ExamplePenetrationDepth() {
	d, err := euv.PenetrationDepth(solidOf("Sn"), 13.5e-9)
	fmt.Printf("%.2f nm %v\n", d*1e9, err)
	// Output: 14.79 nm <nil>
}

func ExampleNapierian() {
	a, err := euv.Napierian(2e6)
	fmt.Printf("%.4f µm⁻¹ %v\n", a/1e6, err)
	// Output: 4.6052 µm⁻¹ <nil>
}

func ExampleDecadic() {
	a, err := euv.Decadic(4.6e6)
	fmt.Printf("%.4f µm⁻¹ %v\n", a/1e6, err)
	// Output: 1.9978 µm⁻¹ <nil>
}

func ExampleReflectivity() {
	r, err := euv.Reflectivity(mirrorOf(), 13.5e-9, 6*degree, euv.Unpolarised, 0)
	fmt.Printf("mirror at 6°: %.4f %v\n", r.Value, err)
	r, err = euv.Reflectivity(euv.Surface{Medium: solidOf("Ru")}, 13.5e-9, 80*degree, euv.PolarizationS, 0.5e-9)
	fmt.Printf("ruthenium at 10° grazing: %.4f %v\n", r.Value, err)
	// Output:
	// mirror at 6°: 0.7082 <nil>
	// ruthenium at 10° grazing: 0.8925 <nil>
}

func ExampleTransmittance() {
	t, err := euv.Transmittance(euv.Film{Material: solidOf("Zr"), Thickness: 200e-9}, 13.5e-9, 0, euv.Unpolarised)
	fmt.Printf("film: %.4f %v\n", t.Value, err)
	h2, _ := euv.ParseFormula("H2")
	gas := euv.GasColumn{Formula: h2, Pressure: 5, Path: 2, Temperature: 293.15}
	t, err = euv.Transmittance(gas, 13.5e-9, 0, euv.Unpolarised)
	fmt.Printf("gas: %.4f %v, with %d warning\n", t.Value, err, len(t.Warnings))
	_, err = euv.Transmittance(mirrorOf(), 13.5e-9, 0, euv.Unpolarised)
	fmt.Println(err)
	// Output:
	// film: 0.4968 <nil>
	// gas: 0.9877 <nil>, with 1 warning
	// transmittance of a stack with rough interfaces: the roughness factor is known for reflection only; ask for that of the smooth stack
}

func ExampleStack_ReflectedAmplitude() {
	r, err := mirrorOf().ReflectedAmplitude(13.5e-9, 6*degree, euv.PolarizationS)
	fmt.Printf("%.4f %v\n", r, err)
	// Output: (0.6075+0.5851i) <nil>
}

func ExampleStack_TransmittedAmplitude() {
	film := euv.Stack{Repeats: []euv.Repeat{euv.Once(euv.Layer{Medium: solidOf("Zr"), Thickness: 200e-9})}}
	t, err := film.TransmittedAmplitude(13.5e-9, 0, euv.PolarizationS)
	fmt.Printf("%.4f %v\n", t, err)
	// Output: (0.1884-0.6788i) <nil>
}

func ExampleIndex() {
	layer := euv.Layer{Medium: euv.Index{Delta: 0.04, Beta: 0.004}, Thickness: 50e-9}
	t, err := euv.Transmittance(euv.Stack{Repeats: []euv.Repeat{euv.Once(layer)}}, 13.5e-9, 0, euv.Unpolarised)
	fmt.Printf("%.4f %v\n", t.Value, err)
	// Output: 0.8300 <nil>
}

func ExamplePeakReflectivity() {
	r, err := euv.PeakReflectivity(mirrorOf(), 6*degree, 13.5e-9)
	fmt.Printf("%.4f %v\n", r.Value, err)
	// Output: 0.7210 <nil>
}

func ExamplePeakWavelength() {
	l, err := euv.PeakWavelength(mirrorOf(), 6*degree, 13.5e-9)
	fmt.Printf("%.3f nm %v\n", l.Value*1e9, err)
	// Output: 13.584 nm <nil>
}

func ExampleBandwidth() {
	w, err := euv.Bandwidth(mirrorOf(), 6*degree, 13.5e-9)
	fmt.Printf("%.3f nm %v\n", w.Value*1e9, err)
	// Output: 0.576 nm <nil>
}

func ExampleStack_Peak() {
	p, err := mirrorOf().Peak(6*degree, euv.PolarizationS, 13.5e-9)
	fmt.Printf("%.4f between half heights at %.3f nm and %.3f nm %v\n", p.Value, p.Low*1e9, p.High*1e9, err)
	// Output: 0.7249 between half heights at 13.220 nm and 13.802 nm <nil>
}

func ExampleFindPeak() {
	one := euv.ReflectivityOf(mirrorOf(), 6*degree, euv.Unpolarised)
	eleven := func(dst, wavelengths []float64) error {
		err := one(dst, wavelengths)
		for i, r := range dst {
			dst[i] = math.Pow(r, 11)
		}
		return err
	}
	p, err := euv.FindPeak(eleven, 12.6e-9, 14.4e-9, 0.1e-9)
	fmt.Printf("%.5f at %.3f nm %v\n", p.Value, p.Wavelength*1e9, err)
	// Output: 0.02737 at 13.584 nm <nil>
}

func ExampleBandMean() {
	m := mirrorOf()
	kinks := m.Kinks(13.365e-9, 13.635e-9)
	mean, deviation, err := euv.BandMean(euv.ReflectivityOf(m, 6*degree, euv.Unpolarised), 13.5e-9, 0.27e-9, kinks)
	fmt.Printf("%.6f, known to 1e-10: %t, %v\n", mean, deviation < 1e-10, err)
	// Output: 0.698086, known to 1e-10: true, <nil>
}

func ExampleTransmittanceOf() {
	film := euv.Film{Material: solidOf("Si"), Thickness: 50e-9}
	mean, _, err := euv.BandMean(euv.TransmittanceOf(film, 0, euv.Unpolarised), 13.5e-9, 0.27e-9, film.Kinks(13.365e-9, 13.635e-9))
	fmt.Printf("%.5f %v\n", mean, err)
	// Output: 0.91847 <nil>
}

// Many mirrors in one band: wavelengths and tables are prepared once.
func ExampleNewBand() {
	m := mirrorOf()
	band, err := euv.NewBand(13.5e-9, 0.27e-9, m.Kinks(13.365e-9, 13.635e-9))
	if err != nil {
		log.Fatal(err)
	}
	var e euv.Evaluator
	if err := e.Aim(band.Wavelengths(), 6*degree, euv.Unpolarised); err != nil {
		log.Fatal(err)
	}
	r := make([]units.Ratio, len(band.Wavelengths()))
	values := make([]float64, len(r))
	for _, cap := range []units.Length{1.5e-9, 2.5e-9, 3.5e-9} {
		m.Repeats[0].Layers[0].Thickness = cap
		if err := e.Reflectivity(r, m); err != nil {
			log.Fatal(err)
		}
		for i, v := range r {
			values[i] = math.Pow(float64(v), 11)
		}
		mean, _, err := band.Mean(values)
		fmt.Printf("cap %.1f nm: %.5f %v\n", cap*1e9, mean, err)
	}
	// Output:
	// cap 1.5 nm: 0.02248 <nil>
	// cap 2.5 nm: 0.02038 <nil>
	// cap 3.5 nm: 0.01351 <nil>
}

func ExampleEvaluator() {
	var e euv.Evaluator
	if err := e.Aim([]units.Length{13.4e-9, 13.5e-9, 13.6e-9}, 6*degree, euv.Unpolarised); err != nil {
		log.Fatal(err)
	}
	r := make([]units.Ratio, 3)
	err := e.Reflectivity(r, mirrorOf())
	fmt.Printf("%.4f %v\n", r, err)
	// Output: [0.6627 0.7082 0.7206] <nil>
}

func ExampleCurve() {
	wavelengths := []units.Length{13.3e-9, 13.5e-9, 13.7e-9}
	measured := []units.Ratio{0.55, 0.66, 0.47}
	r, err := euv.Curve(wavelengths, measured, 13.45e-9)
	fmt.Printf("%.4f %v\n", r, err)
	// Output: 0.6325 <nil>
}

func ExampleNewMeasured() {
	m, err := euv.NewMeasured([]units.Length{13.3e-9, 13.5e-9, 13.7e-9}, []units.Ratio{0.55, 0.66, 0.47})
	if err != nil {
		log.Fatal(err)
	}
	r, err := m.At(13.6e-9)
	fmt.Printf("%.4f %v\n", r, err)
	// Output: 0.5650 <nil>
}

func ExampleDebyeWaller() {
	f, err := euv.DebyeWaller(0.4e-9, 13.5e-9, 6*degree)
	fmt.Printf("%.4f %v\n", f, err)
	// Output: 0.8719 <nil>
}

func ExampleScatter() {
	s, err := euv.Scatter(0.15e-9, 13.5e-9, 6)
	fmt.Printf("%.4f %v\n", s, err)
	// Output: 0.1104 <nil>
}
