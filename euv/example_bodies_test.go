package euv_test

import (
	"fmt"
	"log"

	"example.com/dosewright/euv"
	"example.com/dosewright/units"
)

// filmOf is a free film of zirconium.
func filmOf() euv.Film { return euv.Film{Material: solidOf("Zr"), Thickness: 50e-9} }

func ExampleOnce() {
	top := euv.Once(euv.Layer{Medium: solidOf("Ru"), Thickness: 2.5e-9})
	s := euv.Stack{Repeats: []euv.Repeat{top}, Substrate: solidOf("Si")}
	r, err := euv.Reflectivity(s, 13.5e-9, 6*degree, euv.Unpolarised, 0)
	fmt.Printf("%.5f %v\n", r.Value, err)
	// Output: 0.01038 <nil>
}

func ExamplePeriods() {
	si, mo := solidOf("Si"), solidOf("Mo")
	for _, n := range []int{10, 20, 40} {
		pairs := euv.Periods(n, euv.Layer{Medium: si, Thickness: 4.15e-9}, euv.Layer{Medium: mo, Thickness: 2.85e-9})
		r, err := euv.PeakReflectivity(euv.Stack{Repeats: []euv.Repeat{pairs}, Substrate: si}, 6*degree, 13.5e-9)
		fmt.Printf("%d: %.4f %v\n", n, r.Value, err)
	}
	// Output:
	// 10: 0.3204 <nil>
	// 20: 0.6083 <nil>
	// 40: 0.7261 <nil>
}

func ExampleReflectivityOf() {
	spectrum := euv.ReflectivityOf(mirrorOf(), 6*degree, euv.Unpolarised)
	r := make([]float64, 3)
	err := spectrum(r, []float64{13.4e-9, 13.5e-9, 13.6e-9})
	fmt.Printf("%.4f %v\n", r, err)
	// Output: [0.6627 0.7082 0.7206] <nil>
}

func ExampleStack_String() {
	fmt.Println(mirrorOf())
	// Output: a stack of 101 layers on Si 2.33 g/cm³
}

func ExampleStack_WithRoughness() {
	m := mirrorOf()
	for _, sigma := range []units.Length{0, 0.4e-9, 0.8e-9} {
		r, err := euv.PeakReflectivity(m.WithRoughness(sigma), 6*degree, 13.5e-9)
		fmt.Printf("%.1f nm: %.4f %v\n", sigma*1e9, r.Value, err)
	}
	// Output:
	// 0.0 nm: 0.7394 <nil>
	// 0.4 nm: 0.7210 <nil>
	// 0.8 nm: 0.6621 <nil>
}

func ExampleStack_Kinks() {
	for _, l := range mirrorOf().Kinks(13.4e-9, 13.6e-9) {
		fmt.Printf("%.4f nm\n", l*1e9)
	}
	// Output:
	// 13.4037 nm
	// 13.4400 nm
	// 13.4446 nm
	// 13.5133 nm
	// 13.5444 nm
	// 13.5502 nm
	// 13.5873 nm
}

func ExampleStack_Warnings() {
	foam := euv.Material{Formula: solidOf("Si").Formula, Density: 400}
	s := euv.Stack{Repeats: []euv.Repeat{euv.Once(euv.Layer{Medium: foam, Thickness: 20e-9, Roughness: 30e-9})}}
	for _, w := range s.Warnings() {
		fmt.Println(w)
	}
	// Output:
	// the roughness 30 nm is larger than the layer of Si 0.4 g/cm³ below it, 20 nm
	// Si is given 0.4 g/cm³, the solid has about 2.33 g/cm³
}

func ExampleFilm_String() {
	fmt.Println(filmOf())
	// Output: a film of 50 nm Zr 6.506 g/cm³
}

func ExampleFilm_Kinks() {
	fmt.Println(len(filmOf().Kinks(13.3e-9, 13.7e-9)), "points of the table lie in the band")
	// Output: 2 points of the table lie in the band
}

func ExampleFilm_Warnings() {
	f := filmOf()
	f.Material.Density = 1000
	fmt.Println(f.Warnings())
	// Output: [Zr is given 1 g/cm³, the solid has about 6.506 g/cm³]
}

// hydrogenOf is the gas before a mirror.
func hydrogenOf() euv.GasColumn {
	h2, err := euv.ParseFormula("H2")
	if err != nil {
		log.Fatal(err)
	}
	return euv.GasColumn{Formula: h2, Pressure: 5, Path: 2, Temperature: 293.15}
}

func ExampleGasColumn_String() {
	fmt.Println(hydrogenOf())
	// Output: a column of 5 Pa H2 over 2 m
}

func ExampleGasColumn_Kinks() {
	gas := hydrogenOf()
	tabulated := len(gas.Kinks(13e-9, 14e-9))
	gas.CrossSection = 5e-24 // of one molecule, in m²
	fmt.Println(tabulated > 0, len(gas.Kinks(13e-9, 14e-9)))
	// Output: true 0
}

func ExampleGasColumn_Warnings() {
	fmt.Println(hydrogenOf().Warnings())
	// Output: [two atoms of the tables stand for the H2 molecule, which absorbs about 20 % more; a measured cross-section may be given]
}

func ExampleSurface_String() {
	fmt.Println(euv.Surface{Medium: solidOf("Ru")})
	// Output: a surface of Ru 12.41 g/cm³
}

func ExampleSurface_Kinks() {
	s := euv.Surface{Medium: euv.Index{Delta: 0.11, Beta: 0.016}}
	fmt.Println(len(s.Kinks(13e-9, 14e-9)), "kinks: an index is the same at all wavelengths")
	// Output: 0 kinks: an index is the same at all wavelengths
}

func ExampleSurface_Warnings() {
	m := solidOf("Ru")
	m.Density /= 10 // a slip of the point
	fmt.Println(euv.Surface{Medium: m}.Warnings())
	// Output: [Ru is given 1.241 g/cm³, the solid has about 12.41 g/cm³]
}

func ExampleMaterial_Index() {
	n, err := solidOf("Mo").Index(13.5e-9)
	fmt.Printf("n = 1 - %.5f - %.5fi %v\n", n.Delta, n.Beta, err)
	// Output: n = 1 - 0.07621 - 0.00644i <nil>
}

func ExampleMaterial_String() {
	m, err := euv.NewMaterial("SiO2", 2200)
	fmt.Println(m, err)
	// Output: SiO2 2.2 g/cm³ <nil>
}

func ExampleFormula_String() {
	f, err := euv.ParseFormula("Si3N4")
	fmt.Println(f, err)
	// Output: Si3N4 <nil>
}

func ExampleIndex_Index() {
	n, err := euv.Index{Delta: 0.04, Beta: 0.004}.Index(13.5e-9)
	fmt.Println(n, err)
	_, err = euv.Index{Delta: 0.04, Beta: -0.004}.Index(13.5e-9)
	fmt.Println(err)
	// Output:
	// index 1-0.04-0.004i <nil>
	// beta is -0.0040000; it must be between 0 and 1e6; with n = 1 - delta - i beta an absorbing medium has beta > 0
}

func ExampleIndex_String() {
	fmt.Println(euv.Index{Delta: 0.04, Beta: 0.004})
	// Output: index 1-0.04-0.004i
}
