package euv_test

import (
	"errors"
	"fmt"

	"example.com/dosewright/euv"
)

func ExampleArgumentError() {
	_, err := euv.PhotonEnergy(-13.5e-9)
	var bad *euv.ArgumentError
	if errors.As(err, &bad) {
		fmt.Println(bad.Argument, "|", bad.Value, "|", bad.Want)
	}
	// Output: wavelength | -13.500 nm | greater than 0
}

func ExampleArgumentError_Error() {
	_, err := euv.PhotonEnergy(-13.5e-9)
	fmt.Println(err)
	// Output: wavelength is -13.500 nm; it must be greater than 0
}

func ExampleBodyError_Error() {
	_, err := euv.Transmittance(euv.Surface{Medium: solidOf("Ru")}, 13.5e-9, 0, euv.Unpolarised)
	fmt.Println(err)
	// Output: transmittance of a surface of Ru 12.41 g/cm³: it is a half space without an end; ask for that of a film, which has a thickness
}

func ExampleChainError_Error() {
	_, err := euv.NewChain(euv.FocusPlane, euv.Element{Label: "mirror", Factor: 0.65})
	fmt.Println(err)
	// Output: a chain needs two planes or more to lead from one to the other; this has 1
}

func ExampleFormulaError_Error() {
	_, err := euv.ParseFormula("Si(O2")
	fmt.Println(err)
	// Output: formula "Si(O2": an opening parenthesis is not closed
}

func ExampleLossModel_Words() {
	fmt.Println(euv.Linear.Words())
	// Output: [linear exponential]
}

func ExampleLossModel_String() {
	fmt.Println(euv.Linear, euv.Exponential)
	// Output: linear exponential
}

func ExampleRoughnessOf_Words() {
	fmt.Println(euv.LER.Words())
	// Output: [LER LWR]
}

func ExampleRoughnessOf_String() {
	fmt.Println(euv.LER, euv.LWR)
	// Output: LER LWR
}

func ExampleTone_Words() {
	fmt.Println(euv.Positive.Words())
	// Output: [positive negative]
}

func ExampleTone_String() {
	fmt.Println(euv.Positive, euv.Negative)
	// Output: positive negative
}
