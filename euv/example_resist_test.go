package euv_test

import (
	"fmt"

	"example.com/dosewright/euv"
)

func ExampleAbsorbedFraction() {
	x, err := euv.AbsorbedFraction(5e6, 30e-9) // 5 /µm, 30 nm
	fmt.Printf("%.5f %v\n", x, err)
	// Output: 0.13929 <nil>
}

func ExampleAbsorbedPhotons() {
	x, err := euv.AbsorbedPhotons(300, 5e6, 30e-9, 400e-18, 13.5e-9) // 30 mJ/cm², 5 /µm, 30 nm, 400 nm²
	fmt.Printf("%.1f %v\n", x, err)
	// Output: 1136.0 <nil>
}

func ExampleAbsorbedEnergyDensity() {
	x, err := euv.AbsorbedEnergyDensity(300, 5e6) // 30 mJ/cm², 5 /µm
	fmt.Printf("%.3g J/m³ %v\n", x, err)
	// Output: 1.5e+09 J/m³ <nil>
}

func ExampleShotNoise() {
	x, err := euv.ShotNoise(400)
	fmt.Printf("%.3f %v\n", x, err)
	// Output: 0.050 <nil>
}

func ExampleYieldNoise() {
	x, err := euv.YieldNoise(400, 2, 2) // electrons per photon: mean 2, variance 2
	fmt.Printf("%.5f %v\n", x, err)
	// Output: 0.06124 <nil>
}

func ExampleEdgeRoughness() {
	w, err := euv.EdgeRoughness(16e-9, 2.4, 250) // 16 nm
	fmt.Printf("%.4g %q %v\n", w.Value, w.Warnings, err)
	// Output: 4.216e-10 ["a model of shot noise alone: resist chemistry, blur and development are left out"] <nil>
}

func ExampleLWROfLER() {
	x, err := euv.LWROfLER(1.8e-9, 0) // 1.8 nm, edges that know nothing of each other
	fmt.Printf("%.4g m %v\n", x, err)
	// Output: 2.546e-09 m <nil>
}

func ExampleLEROfLWR() {
	x, err := euv.LEROfLWR(2.5e-9, 0) // 2.5 nm
	fmt.Printf("%.4g m %v\n", x, err)
	// Output: 1.768e-09 m <nil>
}

func ExampleDoseForRoughness() {
	w, err := euv.DoseForRoughness(3.2e-9, 2e-9, 300) // from 3.2 nm to 2 nm at 30 mJ/cm²
	fmt.Printf("%.4g %q %v\n", w.Value, w.Warnings, err)
	// Output: 768 ["the dose changes by a factor of 2.56: past 2x other causes of roughness than shot noise are not expected to follow"] <nil>
}

func ExampleZFactor() {
	w, err := euv.ZFactor(16e-9, 3.3e-9, 300, euv.LWR, 3) // 16 nm, 3.3 nm, 30 mJ/cm²
	fmt.Printf("%.4g %q %v\n", w.Value, w.Warnings, err)
	// Output: 1.338e-38 ["from LWR at 3 sigma: compare it only with values of the same kind"] <nil>
}

func ExampleLineAverage() {
	x, err := euv.LineAverage(2.5e-9, 35e-9, 500e-9) // 2.5 nm, 35 nm, 500 nm
	fmt.Printf("%.4g m %v\n", x, err)
	// Output: 9.021e-10 m <nil>
}

func ExampleResistContrast() {
	x, err := euv.ResistContrast(80, 120, euv.Positive) // 8 and 12 mJ/cm²
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 2.8394 <nil>
}

func ExampleMissingProbability() {
	w, err := euv.MissingProbability(200, 0.5) // at most half of 200
	fmt.Printf("%.3g %q %v\n", w.Value, w.Warnings, err)
	// Output: 3.72e-15 [] <nil>
}

func ExampleLog10MissingProbability() {
	x, err := euv.Log10MissingProbability(10000, 0.5) // at most half of 10000
	fmt.Printf("%.2f %v\n", x, err)
	// Output: -668.27 <nil>
}

func ExampleMergingProbability() {
	w, err := euv.MergingProbability(200, 1.5) // one and a half times 200, or more
	fmt.Printf("%.3g %q %v\n", w.Value, w.Warnings, err)
	// Output: 2.71e-11 [] <nil>
}

func ExampleLog10MergingProbability() {
	x, err := euv.Log10MergingProbability(10000, 1.5)
	fmt.Printf("%.2f %v\n", x, err)
	// Output: -471.91 <nil>
}

func ExampleMeanForFailure() {
	x, err := euv.MeanForFailure(0.5, 1e-10)
	fmt.Printf("%.0f %v\n", x, err)
	// Output: 135 <nil>
}

func ExamplePoissonAtMost() {
	w, err := euv.PoissonAtMost(3, 5)
	fmt.Printf("%.5f %q %v\n", w.Value, w.Warnings, err)
	// Output: 0.26503 [] <nil>
}

func ExamplePoissonAtLeast() {
	w, err := euv.PoissonAtLeast(300, 200)
	fmt.Printf("%.3g %q %v\n", w.Value, w.Warnings, err)
	// Output: 2.71e-11 [] <nil>
}

func ExampleBinomialAtLeast() {
	w, err := euv.BinomialAtLeast(2, 3, 0.5)
	fmt.Printf("%.3f %q %v\n", w.Value, w.Warnings, err)
	// Output: 0.500 [] <nil>
}

func ExampleNormalAbove() {
	w, err := euv.NormalAbove(6)
	fmt.Printf("%.4g %q %v\n", w.Value, w.Warnings, err)
	// Output: 9.866e-10 [] <nil>
}

func ExampleNormalQuantile() {
	x, err := euv.NormalQuantile(0.975)
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 1.9600 <nil>
}

func ExampleFailures() {
	x, err := euv.Failures(1e-10, 5e9)
	fmt.Printf("%.2f %v\n", x, err)
	// Output: 0.50 <nil>
}

func ExampleNoFailure() {
	x, err := euv.NoFailure(1e-10, 5e9)
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 0.6065 <nil>
}

func ExampleYieldOf() {
	x, err := euv.YieldOf(1000, 80e-6) // 0.1 /cm², 80 mm²
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 0.9231 <nil>
}

func ExampleRateLimitLow() {
	x, err := euv.RateLimitLow(3, 1e6, 0.95, 2)
	fmt.Printf("%.4g %v\n", x, err)
	// Output: 6.187e-07 <nil>
}

func ExampleRateLimitHigh() {
	x, err := euv.RateLimitHigh(0, 1, 0.95, 2)
	fmt.Printf("%.4f %v\n", x, err)
	// Output: 3.6889 <nil>
}
