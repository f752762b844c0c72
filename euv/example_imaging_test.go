package euv_test

import (
	"fmt"
	"math"

	"example.com/dosewright/euv"
)

func ExampleHalfPitch() {
	x, err := euv.HalfPitch(0.4, 0.33, 13.5e-9)
	fmt.Printf("%.4g m %v\n", x, err)
	// Output: 1.636e-08 m <nil>
}

func ExampleK1() {
	x, err := euv.K1(16e-9, 0.33, 13.5e-9) // half pitch 16 nm
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 0.3911 <nil>
}

func ExampleDepthOfFocus() {
	x, err := euv.DepthOfFocus(0.33, 1, 13.5e-9)
	fmt.Printf("%.5g m %v\n", x, err)
	// Output: 1.2397e-07 m <nil>
}

func ExampleDepthOfFocusExact() {
	x, err := euv.DepthOfFocusExact(0.33, 0.25, 13.5e-9)
	fmt.Printf("%.5g m %v\n", x, err)
	// Output: 1.2049e-07 m <nil>
}

func ExampleNILS() {
	x, err := euv.NILS(0.15e9, 16e-9) // 0.15 /nm, 16 nm
	fmt.Printf("%.2f %v\n", x, err)
	// Output: 2.40 <nil>
}

func ExampleTwoBeamNILS() {
	x, err := euv.TwoBeamNILS(0.8)
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 2.5133 <nil>
}

func ExampleCDShift() {
	x, err := euv.CDShift(16e-9, 2.4, 0.01) // 16 nm, 1 % more dose
	fmt.Printf("%.3g m %v\n", x, err)
	// Output: 1.33e-10 m <nil>
}

func ExampleExposureLatitude() {
	x, err := euv.ExposureLatitude(2.4, 0.1) // ±10 % of the width
	fmt.Printf("%.2f %v\n", x, err)
	// Output: 0.24 <nil>
}

func ExampleFlareShift() {
	x, err := euv.FlareShift(16e-9, 2.4, 0.04, 0.5, 0.3) // 4 % flare, half of the surroundings bright
	fmt.Printf("%.3g m %v\n", x, err)
	// Output: 3.56e-10 m <nil>
}

func ExampleBlurContrast() {
	x, err := euv.BlurContrast(4e-9, 32e-9) // 4 nm, pitch 32 nm
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 0.7346 <nil>
}

func ExampleSigmaOfFWHM() {
	x, err := euv.SigmaOfFWHM(10e-9) // 10 nm
	fmt.Printf("%.5g m %v\n", x, err)
	// Output: 4.2466e-09 m <nil>
}

func ExampleFWHMOfSigma() {
	x, err := euv.FWHMOfSigma(4e-9) // 4 nm
	fmt.Printf("%.5g m %v\n", x, err)
	// Output: 9.4193e-09 m <nil>
}

func ExampleWaferErrorOfMask() {
	x, err := euv.WaferErrorOfMask(2e-9, 1.6, 4) // 2 nm on the mask
	fmt.Printf("%.2g m %v\n", x, err)
	// Output: 8e-10 m <nil>
}

func ExampleMaskErrorFor() {
	x, err := euv.MaskErrorFor(0.8e-9, 1.6, 4) // 0.8 nm on the wafer
	fmt.Printf("%.2g m %v\n", x, err)
	// Output: 2e-09 m <nil>
}

func ExampleShadow() {
	x, err := euv.Shadow(60e-9, 6*math.Pi/180, 4, 2) // 60 nm, 6°, in and out
	fmt.Printf("%.4g m %v\n", x, err)
	// Output: 3.153e-09 m <nil>
}

func ExampleMaskAngleLow() {
	x, err := euv.MaskAngleLow(0.33, 4, 6*math.Pi/180) // chief ray at 6°
	fmt.Printf("%.4f rad %v\n", x, err)
	// Output: 0.0221 rad <nil>
}

func ExampleMaskAngleHigh() {
	x, err := euv.MaskAngleHigh(0.33, 4, 6*math.Pi/180) // chief ray at 6°
	fmt.Printf("%.4f rad %v\n", x, err)
	// Output: 0.1873 rad <nil>
}

func ExampleExpansion() {
	x, err := euv.Expansion(150e-3, 2.5e-6, 0.1) // 150 mm of silicon, 0.1 K warmer
	fmt.Printf("%.3g m %v\n", x, err)
	// Output: 3.75e-08 m <nil>
}

func ExampleSiliconCTE() {
	x, err := euv.SiliconCTE(295.15) // 22 °C
	fmt.Printf("%.4g /K %v\n", x, err)
	// Output: 2.527e-06 /K <nil>
}

func ExampleWaferHeating() {
	w, err := euv.WaferHeating(300, 1, 0.775e-3) // 30 mJ/cm², 0.775 mm
	fmt.Printf("%.4f %q %v\n", w.Value, w.Warnings, err)
	// Output: 0.2367 ["an adiabatic ceiling: what the wafer gives to its support, its surroundings and its unexposed parts is left out"] <nil>
}

func ExampleRadiativeTemperature() {
	x, err := euv.RadiativeTemperature(50e3, 0.4, 2, 293.15) // 5 W/cm², in surroundings at 20 °C
	fmt.Printf("%.1f K %v\n", x, err)
	// Output: 1026.3 K <nil>
}
