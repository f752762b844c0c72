// Spectrum prints the reflectivity of a mirror for 13.5 nm light as CSV: the
// wavelength in nm, the share that one mirror reflects, and what eleven of them
// leave.
//
//	go run ./examples/spectrum > mirror.csv
//
// It uses the package euv alone: bodies are plain values, and one Evaluator asks
// them for many wavelengths at once.
package main

import (
	"bufio"
	"fmt"
	"io"
	"log"
	"math"
	"os"

	"example.com/dosewright/euv"
	"example.com/dosewright/units"
)

const nanometre = 1e-9

func main() {
	if err := run(os.Stdout); err != nil {
		log.Fatal(err)
	}
}

// run writes 101 wavelengths from 13 nm to 14 nm.
func run(to io.Writer) error {
	mirror, err := coating()
	if err != nil {
		return err
	}
	var wavelengths []units.Length
	for i := range 101 {
		wavelengths = append(wavelengths, units.Length(1300+i)/100*nanometre)
	}
	var light euv.Evaluator
	if err := light.Aim(wavelengths, 6*math.Pi/180, euv.Unpolarised); err != nil {
		return err
	}
	reflected := make([]units.Ratio, len(wavelengths))
	if err := light.Reflectivity(reflected, mirror); err != nil {
		return err
	}
	w := bufio.NewWriter(to)
	fmt.Fprintln(w, "wavelength / nm,reflectivity,eleven mirrors")
	for i, r := range reflected {
		fmt.Fprintf(w, "%.2f,%.5f,%.6f\n", float64(wavelengths[i])/nanometre, float64(r), math.Pow(float64(r), 11))
	}
	return w.Flush()
}

// coating is fifty bilayers of silicon and molybdenum on silicon, under a cap of
// ruthenium, every interface rough.
func coating() (euv.Stack, error) {
	var s euv.Stack
	media := map[string]euv.Material{}
	for _, symbol := range []string{"Si", "Mo", "Ru"} {
		m, err := euv.SolidElement(symbol)
		if err != nil {
			return s, err
		}
		media[symbol] = m
	}
	s.Repeats = []euv.Repeat{
		euv.Once(euv.Layer{Medium: media["Ru"], Thickness: 2.5 * nanometre}),
		euv.Periods(50,
			euv.Layer{Medium: media["Si"], Thickness: 4.15 * nanometre},
			euv.Layer{Medium: media["Mo"], Thickness: 2.80 * nanometre}),
	}
	s.Substrate = media["Si"]
	return s.WithRoughness(0.4 * nanometre), nil
}
