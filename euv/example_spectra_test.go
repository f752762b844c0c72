package euv_test

import (
	"fmt"
	"log"

	"example.com/dosewright/euv"
	"example.com/dosewright/units"
)

// aimed is an evaluator at three wavelengths and 6° from the normal.
func aimed() *euv.Evaluator {
	e := new(euv.Evaluator)
	if err := e.Aim([]units.Length{13.4e-9, 13.5e-9, 13.6e-9}, 6*degree, euv.Unpolarised); err != nil {
		log.Fatal(err)
	}
	return e
}

func ExampleEvaluator_Aim() {
	var e euv.Evaluator
	fmt.Println(e.Aim([]units.Length{13.5e-9}, 6*degree, euv.PolarizationS))
	fmt.Println(e.Aim([]units.Length{13.5e-9}, 90*degree, euv.PolarizationS))
	// Output:
	// <nil>
	// angle is 90°; it must be from the normal, 0° or greater and less than 90°
}

// One evaluator asks many mirrors, here those of several caps.
func ExampleEvaluator_Reflectivity() {
	e, m := aimed(), mirrorOf()
	r := make([]units.Ratio, 3)
	for _, d := range []units.Length{1.5e-9, 2.5e-9} {
		m.Repeats[0].Layers[0].Thickness = d
		err := e.Reflectivity(r, m)
		fmt.Printf("%.1f nm: %.4f %v\n", d*1e9, r, err)
	}
	// Output:
	// 1.5 nm: [0.6754 0.7161 0.7218] <nil>
	// 2.5 nm: [0.6627 0.7082 0.7206] <nil>
}

func ExampleEvaluator_Transmittance() {
	t := make([]units.Ratio, 3)
	err := aimed().Transmittance(t, filmOf())
	fmt.Printf("%.4f %v\n", t, err)
	// Output: [0.8403 0.8388 0.8372] <nil>
}

func ExampleBand_Wavelengths() {
	band, err := euv.NewBand(13.5e-9, 0.27e-9, nil)
	if err != nil {
		log.Fatal(err)
	}
	nodes := band.Wavelengths()
	fmt.Printf("%d between %.3f nm and %.3f nm\n", len(nodes), nodes[0]*1e9, nodes[len(nodes)-1]*1e9)
	// Output: 30 between 13.366 nm and 13.634 nm
}

// The mean of a parabola over a band is known: half width² / 3.
func ExampleBand_Mean() {
	band, err := euv.NewBand(13.5e-9, 0.6e-9, nil)
	if err != nil {
		log.Fatal(err)
	}
	var values []float64
	for _, l := range band.Wavelengths() {
		off := float64(l)*1e9 - 13.5
		values = append(values, off*off)
	}
	mean, _, err := band.Mean(values)
	fmt.Printf("%.6f %v\n", mean, err)
	// Output: 0.030000 <nil>
}

func ExamplePeak_Bandwidth() {
	p, err := mirrorOf().Peak(6*degree, euv.PolarizationS, 13.5e-9)
	if err != nil {
		log.Fatal(err)
	}
	w, err := p.Bandwidth()
	fmt.Printf("%.3f nm %v\n", w*1e9, err)
	// Output: 0.582 nm <nil>
}

func ExampleMeasured_At() {
	m, err := euv.NewMeasured([]units.Length{13.3e-9, 13.5e-9, 13.7e-9}, []units.Ratio{0.55, 0.66, 0.47})
	if err != nil {
		log.Fatal(err)
	}
	r, err := m.At(13.4e-9)
	fmt.Printf("%.3f %v\n", r, err)
	_, err = m.At(14e-9)
	fmt.Println(err)
	// Output:
	// 0.605 <nil>
	// x is 14 nm; it must be between 13.300 nm and 13.700 nm, where the table ends
}

func ExamplePolarization_String() {
	fmt.Println(euv.Unpolarised, euv.PolarizationS, euv.PolarizationP)
	// Output: unpolarised s p
}
