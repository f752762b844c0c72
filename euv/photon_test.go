package euv_test

import (
	"encoding/json"
	"math"
	"os"
	"strconv"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

const (
	nanometre    = 1e-9 // m
	millimetre   = 1e-3 // m
	mJPerCm2     = 10.0 // J/m²
	squareCm     = 1e-4 // m²
	waferPerHour = 1 / 3600.0
	gigapulse    = 1e9
	percent      = 1e-2
)

// sound returns a result as a float64, or fails the test when there is none.
func sound[T units.Kind](t testing.TB) func(T, error) float64 {
	return func(v T, err error) float64 {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return float64(v)
	}
}

// exactSI are values computed with 24 digits from the exact SI constants.
func exactSI(t *testing.T) func(name string) float64 {
	raw, err := os.ReadFile("../testdata/si.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Derived struct{ Values map[string]string } `json:"exact_derived_from_defining_constants"`
	}
	if err := json.Unmarshal(raw, &file); err != nil {
		t.Fatal(err)
	}
	return func(name string) float64 {
		x, err := strconv.ParseFloat(file.Derived.Values[name], 64)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		return x
	}
}

func TestPhotonsAgainstExactConstants(t *testing.T) {
	si := exactSI(t)
	const tol = 4e-16
	near.Rel(t, "h c", euv.PlanckConstant*euv.SpeedOfLight, si("hc_J_m"), tol)
	near.Rel(t, "F", euv.ElementaryCharge*euv.AvogadroConstant, si("F_C_per_mol"), tol)
	near.Rel(t, "R", euv.BoltzmannConstant*euv.AvogadroConstant, si("R_J_per_mol_K"), tol)
	near.Rel(t, "energy", sound[units.Energy](t)(euv.PhotonEnergy(13.5e-9)), si("photon_energy_13.5nm_J"), tol)
	near.Rel(t, "wavelength", sound[units.Length](t)(euv.PhotonWavelength(92*euv.ElementaryCharge)), si("wavelength_of_92_eV_nm")*nanometre, tol)
	perNM2 := si("photons_per_nm2_at_1_mJ_per_cm2_13.5nm")
	near.Rel(t, "density", sound[units.ArealDensity](t)(euv.PhotonDensity(mJPerCm2, 13.5e-9)), perNM2/1e-18, tol)
	near.Rel(t, "count", sound[units.Count](t)(euv.PhotonCount(30*mJPerCm2, 400e-18, 13.5e-9)), 30*400*perNM2, tol)
	near.Rel(t, "rate", sound[units.Rate](t)(euv.PhotonRate(250, 13.5e-9)), 250/si("photon_energy_13.5nm_J"), tol)
	near.Rel(t, "dose", sound[units.Fluence](t)(euv.DoseOf(units.ArealDensity(perNM2/1e-18), 13.5e-9)), mJPerCm2, tol)
}

// The classical electron radius from other constants: e²/(4π ε₀ m c²). Vacuum
// permittivity 8.8541878188e-12 F/m and electron mass 9.1093837139e-31 kg:
// CODATA 2022 (E. Tiesinga et al., from memory).
func TestClassicalElectronRadius(t *testing.T) {
	const permittivity, mass = 8.8541878188e-12, 9.1093837139e-31
	e, c := euv.ElementaryCharge, euv.SpeedOfLight
	near.Rel(t, "r_e", euv.ClassicalElectronRadius, e*e/(4*math.Pi*permittivity*mass*c*c), 1e-9)
}

func TestPhotonChecks(t *testing.T) {
	eV := func(nm float64) float64 {
		return sound[units.Energy](t)(euv.PhotonEnergy(units.Length(nm*nanometre))) / euv.ElementaryCharge
	}
	// exact SI constants
	near.Rel(t, "h c in eV nm", eV(1), 1239.841984332, 1e-12)
	near.Rel(t, "13.5 nm", eV(13.5), 91.84015, 1e-7)
	near.Rel(t, "193 nm", eV(193), 6.42405, 1e-6)
	near.Rel(t, "ratio", eV(13.5)/eV(193), 14.2963, 1e-6)
	near.Rel(t, "photons a nm² and mJ/cm²", sound[units.ArealDensity](t)(euv.PhotonDensity(mJPerCm2, 13.5e-9))*1e-18, 0.679606, 1e-6)
	// common practice, no source: 92 eV at 13.5 nm, 6 to 7 eV for deep UV
	near.Abs(t, "13.5 nm, order", eV(13.5), 92, 0.5)
	near.Abs(t, "193 nm, order", eV(193), 6.5, 0.5)
	// common practice, no source: resists of 10 and 30 mJ/cm² take in a handful
	// and some twenty photons a nm²
	for dose, want := range map[units.Fluence]float64{10 * mJPerCm2: 6.8, 30 * mJPerCm2: 20.4} {
		near.Rel(t, "photons a nm²", sound[units.ArealDensity](t)(euv.PhotonDensity(dose, 13.5e-9))*1e-18, want, 0.01)
	}
	// arithmetic: 15 mJ/cm² at one electron per photon is 163.3 µC/cm²
	perM2 := sound[units.ArealDensity](t)(euv.PhotonDensity(15*mJPerCm2, 13.5e-9)) * euv.ElementaryCharge
	near.Rel(t, "charge", perM2*1e6*squareCm, 163.3, 3e-4)
}

func BenchmarkPhotonCount(b *testing.B) {
	for b.Loop() {
		if _, err := euv.PhotonCount(300, 4e-16, 13.5e-9); err != nil {
			b.Fatal(err)
		}
	}
}
