package euv_test

import (
	"fmt"
	"math"

	"example.com/dosewright/euv"
	"example.com/dosewright/units"
)

// show prints a result in a unit of the given size.
func show[T units.Kind](v T, err error) func(format string, unit float64) {
	return func(format string, unit float64) {
		if err != nil {
			fmt.Println(err)
			return
		}
		fmt.Printf(format+"\n", float64(v)/unit)
	}
}

func ExamplePhotonEnergy() {
	show(euv.PhotonEnergy(13.5e-9))("%.4f eV", euv.ElementaryCharge)
	// Output: 91.8401 eV
}

func ExamplePhotonWavelength() {
	show(euv.PhotonWavelength(92*euv.ElementaryCharge))("%.4f nm", 1e-9)
	// Output: 13.4765 nm
}

func ExamplePhotonDensity() {
	show(euv.PhotonDensity(30*mJPerCm2, 13.5e-9))("%.3f photon/nm²", 1e18)
	// Output: 20.388 photon/nm²
}

func ExamplePhotonCount() {
	show(euv.PhotonCount(30*mJPerCm2, 400e-18, 13.5e-9))("%.0f photons", 1)
	// Output: 8155 photons
}

func ExamplePhotonRate() {
	show(euv.PhotonRate(250, 13.5e-9))("%.4g photon/s", 1)
	// Output: 1.699e+19 photon/s
}

func ExampleDoseOf() {
	show(euv.DoseOf(20e18, 13.5e-9))("%.3f mJ/cm²", mJPerCm2)
	// Output: 29.429 mJ/cm²
}

func ExampleHoleArea() {
	show(euv.HoleArea(20e-9))("%.2f nm²", 1e-18)
	// Output: 314.16 nm²
}

func ExampleRectangleArea() {
	show(euv.RectangleArea(26e-3, 33e-3))("%.2f cm²", squareCm)
	// Output: 8.58 cm²
}

func ExampleEllipseArea() {
	show(euv.EllipseArea(20e-9, 30e-9))("%.2f nm²", 1e-18)
	// Output: 471.24 nm²
}

func ExampleBraggPeriod() {
	show(euv.BraggPeriod(13.5e-9, 0, 1, 0))("%.4f nm without refraction", 1e-9)
	show(euv.BraggPeriod(13.5e-9, 0, 1, 0.03108))("%.4f nm", 1e-9)
	// Output:
	// 6.7500 nm without refraction
	// 6.9665 nm
}

func ExampleBraggWavelength() {
	sixDegrees := units.Angle(6 * math.Pi / 180)
	show(euv.BraggWavelength(6.9665e-9, 0, 1, 0.03108))("%.4f nm", 1e-9)
	show(euv.BraggWavelength(6.9665e-9, sixDegrees, 1, 0.03108))("%.4f nm at 6°", 1e-9)
	// Output:
	// 13.5000 nm
	// 13.4212 nm at 6°
}

func ExampleNewChain() {
	chain, err := euv.NewChain(
		euv.FocusPlane,
		euv.Element{Label: "illuminator", Factor: 0.7, Crossings: 4},
		euv.MaskPlane,
		euv.Element{Label: "mask", Factor: 0.65},
		euv.Element{Label: "projection", Factor: 0.7, Crossings: 6},
		euv.Reduction{X: 4, Y: 4},
		euv.WaferPlane,
	)
	if err != nil {
		fmt.Println(err)
		return
	}
	show(chain.CarryPower(250, euv.FocusPlane, euv.WaferPlane))("%.3f W at WAFER", 1)
	show(chain.CarryFluence(30*mJPerCm2, euv.WaferPlane, euv.MaskPlane))("%.2f mJ/cm² at MASK", mJPerCm2)
	// Output:
	// 4.590 W at WAFER
	// 24.52 mJ/cm² at MASK
}

func ExampleChain_Transmission() {
	chain, err := euv.NewChain(euv.FocusPlane, euv.Element{Label: "mirrors", Factor: 0.7, Crossings: 11}, euv.WaferPlane)
	if err != nil {
		fmt.Println(err)
		return
	}
	show(chain.Transmission(euv.FocusPlane, euv.WaferPlane))("%.3f %%", percent)
	show(chain.Transmission(euv.WaferPlane, euv.FocusPlane))("%.2f against the light", 1)
	// Output:
	// 1.977 %
	// 50.57 against the light
}

func ExampleChain_CarryPower() {
	chain, err := euv.NewChain(euv.SourcePlane, euv.Element{Label: "collector", Factor: 0.41}, euv.FocusPlane)
	if err != nil {
		fmt.Println(err)
		return
	}
	show(chain.CarryPower(250, euv.FocusPlane, euv.SourcePlane))("%.1f W at SOURCE", 1)
	// Output: 609.8 W at SOURCE
}

func ExampleChain_CarryFluence() {
	chain, err := euv.NewChain(euv.MaskPlane, euv.Element{Label: "all", Factor: 0.08}, euv.Reduction{X: 4, Y: 8}, euv.WaferPlane)
	if err != nil {
		fmt.Println(err)
		return
	}
	show(chain.CarryFluence(30*mJPerCm2, euv.WaferPlane, euv.MaskPlane))("%.2f mJ/cm² at MASK", mJPerCm2)
	// Output: 11.72 mJ/cm² at MASK
}

func ExampleChain_Walk() {
	chain, err := euv.NewChain(
		euv.FocusPlane,
		euv.Element{Label: "illuminator", Factor: 0.5},
		euv.MaskPlane,
		euv.Element{Label: "mask", Factor: 0.65},
		euv.Element{Label: "projection", Factor: 0.7, Crossings: 6},
		euv.WaferPlane,
	)
	if err != nil {
		fmt.Println(err)
		return
	}
	walk, err := chain.Walk(250, euv.FocusPlane)
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, p := range walk {
		if p.Plane != "" {
			fmt.Printf("%.2f W at %s\n", p.Power, p.Plane)
		} else {
			fmt.Printf("%s takes %.2f W\n", p.Label, p.Taken)
		}
	}
	// Output:
	// 250.00 W at IF
	// illuminator takes 125.00 W
	// 125.00 W at MASK
	// mask takes 43.75 W
	// projection takes 71.69 W
	// 9.56 W at WAFER
}

func ExampleSourcePower() {
	const dose, fieldArea = 34 * mJPerCm2, 8.58 * squareCm
	show(euv.SourcePower(dose, 150*waferPerHour, 96, fieldArea, 9.5, 0.009))("%.1f W", 1)
	_, err := euv.SourcePower(dose, 400*waferPerHour, 96, fieldArea, 9.5, 0.009)
	if bad, ok := err.(*euv.ArgumentError); ok {
		fmt.Printf("%s must be %s\n", bad.Argument, bad.Want)
	}
	// Output:
	// 214.6 W
	// throughput must be less than 378.95 wafer/h, since the overhead alone takes 9.5 s/wafer
}

func ExampleCollectedFraction() {
	show(euv.CollectedFraction(5))("%.2f %%", percent)
	// Output: 79.58 %
}

func ExampleLaserPower() {
	show(euv.LaserPower(250, 0.055, 5, 0.41, 0.9))("%.2f kW", 1000)
	// Output: 15.48 kW
}

func ExamplePulseEnergy() {
	show(euv.PulseEnergy(250, 50e3))("%.3f mJ/pulse", 1e-3)
	// Output: 5.000 mJ/pulse
}

func ExampleEtendue() {
	show(euv.Etendue(26e-3, 2e-3, 0.33, 0.5))("%.3f mm²·sr", 1e-6)
	// Output: 8.895 mm²·sr
}

func ExampleCollectorLoss() {
	for _, model := range []euv.LossModel{euv.Linear, euv.Exponential} {
		show(euv.CollectorLoss(0.17*perGpulse, 60.48*gigapulse, model))("%.3f %% "+model.String(), percent)
	}
	// Output:
	// 10.282 % linear
	// 9.771 % exponential
}

func ExampleCollectorLifeAverage() {
	show(euv.CollectorLifeAverage(0.17*perGpulse, 60.48*gigapulse, euv.Exponential))("%.3f %%", percent)
	// Output: 95.031 %
}

func ExampleEnergyPerPass() {
	show(euv.EnergyPerPass(1310e3, 1310e3, 1, 136*waferPerHour))("%.3f kWh/wafer", 3.6e6)
	show(euv.EnergyPerPass(1310e3, 900e3, 0.8, 136*waferPerHour))("%.3f kWh/wafer with idle time", 3.6e6)
	// Output:
	// 9.632 kWh/wafer
	// 11.287 kWh/wafer with idle time
}

func ExampleCoolingFlow() {
	show(euv.CoolingFlow(1e6, 8))("%.2f L/s", 1e-3)
	// Output: 29.94 L/s
}

func ExampleScanSpeed() {
	none := units.Speed(math.Inf(1))
	show(euv.ScanSpeed(2, 30*mJPerCm2, 26e-3, none))("%.1f mm/s", 1e-3)
	show(euv.ScanSpeed(2, 30*mJPerCm2, 26e-3, 0.2))("%.1f mm/s", 1e-3)
	// Output:
	// 256.4 mm/s
	// 200.0 mm/s
}

func ExampleScanDose() {
	show(euv.ScanDose(2, 256e-3, 26e-3))("%.3f mJ/cm²", mJPerCm2)
	// Output: 30.048 mJ/cm²
}

func ExampleFieldTimeOf() {
	show(euv.FieldTimeOf(33e-3, 2e-3, 250e-3, 15, 20e-3, 2))("%.2f ms/field", 1e-3)
	// Output: 193.33 ms/field
}

func ExampleWaferTimeOf() {
	show(euv.WaferTimeOf(34*mJPerCm2, 96, 8.58*squareCm, 1.9, 9.5))("%.3f s/wafer", 1)
	// Output: 24.240 s/wafer
}

func ExampleThroughputOf() {
	show(euv.ThroughputOf(34*mJPerCm2, 96, 8.58*squareCm, 1.9, 9.5))("%.2f wafer/h", waferPerHour)
	// Output: 148.52 wafer/h
}

func ExampleCompleteFields() {
	show(euv.CompleteFields(26e-3, 33e-3, 300e-3, 3e-3))("%.0f field/wafer", 1)
	// Output: 64 field/wafer
}

func ExampleTouchedFieldsLeast() {
	show(euv.TouchedFieldsLeast(26e-3, 33e-3, 300e-3, 3e-3))("%.0f field/wafer", 1)
	// Output: 95 field/wafer
}

func ExampleTouchedFieldsMost() {
	show(euv.TouchedFieldsMost(26e-3, 33e-3, 300e-3, 3e-3))("%.0f field/wafer", 1)
	// Output: 104 field/wafer
}

func ExamplePulsesPerPoint() {
	show(euv.PulsesPerPoint(50e3, 2e-3, 250e-3))("%.0f pulse", 1)
	// Output: 400 pulse
}

func ExampleDoseNoise() {
	show(euv.DoseNoise(0.03, 400, 0))("%.4f %%", percent)
	show(euv.DoseNoise(0.03, 400, 0.5))("%.4f %% when neighbours are alike", percent)
	// Output:
	// 0.1500 %
	// 0.2594 % when neighbours are alike
}

func ExampleMaskDose() {
	show(euv.MaskDose(30*mJPerCm2, 4, 4, 0.08))("%.2f mJ/cm²", mJPerCm2)
	// Output: 23.44 mJ/cm²
}
