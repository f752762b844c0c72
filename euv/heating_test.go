package euv

import (
	"fmt"
	"math"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/internal/num"
	"example.com/dosewright/units"
)

// Check 10. Source: arithmetic with c = 0.702 J/(g K), ρ = 2.33 g/cm³
// (handbook). Twin: the energy balance of a whole wafer.
func TestWaferHeating(t *testing.T) {
	const dose, diameter, thickness = 300, 0.3, 0.775e-3
	got := good(WaferHeating(dose, 1, thickness))
	near.Abs(t, "rise", float64(got.Value), 0.2367, 0.5e-4)
	if len(got.Warnings) != 1 {
		t.Errorf("warnings %q", got.Warnings)
	}
	area := math.Pi / 4 * diameter * diameter
	energy := dose * area
	near.Abs(t, "energy", energy, 21.2, 0.05)
	grams := area * 1e4 * thickness * 100 * 2.33
	near.Rel(t, "balance", grams*0.702*float64(got.Value), energy, 1e-14)
	near.Rel(t, "two thirds absorbed", float64(good(WaferHeating(dose, 2./3, thickness)).Value), float64(got.Value)*2/3, 1e-14)
}

// Check 11. Source: a published exercise on a fused quartz mask.
func TestExpansionOfQuartz(t *testing.T) {
	near.Rel(t, "10 nm over 36 mm", float64(good(Expansion(36e-3, 0.5e-6, 0.5556))), 10e-9, 1e-4)
	near.Rel(t, "cooling", float64(good(Expansion(36e-3, 0.5e-6, -0.5556))), -10e-9, 1e-4)
}

// Check 12. Source: Y. Okada and Y. Tokumaru, J. Appl. Phys. 56, 314 (1984).
func TestSiliconCTE(t *testing.T) {
	near.Abs(t, "at 295.15 K", float64(good(SiliconCTE(295.15))), 2.527e-6, 0.5e-9)
	if a := good(SiliconCTE(120)); a >= 0 { // silicon shrinks on warming below about 120 K
		t.Errorf("at 120 K %g", a)
	}
	// twin: the integral of the coefficient in closed form, over its whole range
	grown := 0.0
	for low := 120.0; low < 1500; low += 20 {
		grown += quad.Fixed(func(t float64) float64 { return float64(good(SiliconCTE(units.Temperature(t)))) }, low, low+20, 8, nil, 0)
	}
	whole := func(t float64) float64 {
		return (3.725*(t+math.Exp(-5.88e-3*(t-124))/5.88e-3) + 5.548e-4*t*t/2) * 1e-6
	}
	near.Rel(t, "integral", grown, whole(1500)-whole(120), 1e-12)
}

// Twin: the temperature at which what comes in equals what goes out, by a
// bracketed search, with σ from its own digits (CODATA 2022).
func TestRadiativeTemperatureBalances(t *testing.T) {
	const sigma = 5.670374419e-8
	for _, flux := range []float64{1e-3, 10, 5e4, 1e7} {
		for _, emissivity := range []float64{0.02, 0.4, 1} {
			for _, faces := range []float64{1, 2} {
				for _, around := range []float64{0, 77, 293.15, 1200} {
					want := good(num.Root(func(t float64) float64 {
						return faces*emissivity*sigma*(t*t*t*t-around*around*around*around) - flux
					}, around, 1e6, 0))
					got := good(RadiativeTemperature(units.Irradiance(flux), units.Ratio(emissivity), units.Count(faces), units.Temperature(around)))
					near.Rel(t, fmt.Sprintf("%g W/m², emissivity %g, %g faces in %g K", flux, emissivity, faces, around), float64(got), want, 1e-9)
				}
			}
		}
	}
	near.Rel(t, "σ", stefanBoltzmann, sigma, 1e-10)
	near.Rel(t, "without heat", float64(good(RadiativeTemperature(0, 0.4, 2, 293.15))), 293.15, 1e-15)
}

func BenchmarkRadiativeTemperature(b *testing.B) {
	for b.Loop() {
		if _, err := RadiativeTemperature(5e4, 0.4, 2, 293.15); err != nil {
			b.Fatal(err)
		}
	}
}
