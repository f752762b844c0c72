package euv

import (
	"fmt"
	"math"
	"sort"

	"example.com/dosewright/units"
)

// Where the scattering factors hold and how they are read between the points
// of the table: f1 linear in energy; f2 as a power of the energy, that is,
// linear in ln f2 against ln energy (the habit of the compilers, B. L. Henke,
// E. M. Gullikson, J. C. Davis, At. Data Nucl. Data Tables 54, 181, 1993).
// Every point of the tables is kept, and none is made up: an energy outside
// the table, or between two points of which one has no f1, has no answer.

// missing marks a point of the published tables that has no f1.
const missing = -9999

// steep is the power of the energy beyond which a rise of f2 counts as an
// absorption edge: in these tables noise between close points reaches a
// power of about 25, the edges of the light elements start above 100.
const steep = 100

// factors are the scattering factors of one element, in order of energy in eV.
type factors struct {
	energy, f1, f2 []float64
	power          []float64 // f2 rises as energy^power up to the next point
}

// hcElectronVolts is h·c in eV·m.
const hcElectronVolts = hc / ElementaryCharge

// electronVolts is the photon energy of a wavelength in eV; the same formula
// turns an energy in eV into a wavelength in metres.
func electronVolts(wavelength units.Length) float64 { return hcElectronVolts / float64(wavelength) }

func wavelengthOf(energy float64) units.Length { return units.Length(hcElectronVolts / energy) }

// locate finds the point at or below an energy, or says that the table does
// not reach there.
func (f *factors) locate(energy float64) (int, bool) {
	n := len(f.energy)
	if n == 0 || !(energy >= f.energy[0] && energy <= f.energy[n-1]) {
		return 0, false
	}
	i := sort.Search(n, func(i int) bool { return f.energy[i] > energy })
	return i - 1, true
}

// f1At is f1 at an energy next to point i.
func (f *factors) f1At(i int, energy float64) (float64, bool) {
	at := f.energy[i]
	switch {
	case f.f1[i] == missing:
		return 0, false
	case energy == at:
		return f.f1[i], true
	case f.f1[i+1] == missing:
		return 0, false
	}
	return f.f1[i] + (f.f1[i+1]-f.f1[i])*(energy-at)/(f.energy[i+1]-at), true
}

// f2At is f2 at an energy next to point i.
func (f *factors) f2At(i int, energy float64) float64 {
	return f.f2[i] * math.Exp(f.power[i]*math.Log(energy/f.energy[i]))
}

// refuse says where the table of an element holds, for light outside it.
func (e *element) refuse(wavelength units.Length, what string) error {
	f := e.factors()
	if len(f.energy) == 0 {
		return &FormulaError{Formula: e.symbol, Why: "the tables have no scattering factors for " + e.symbol}
	}
	low := 0
	if what == "delta" {
		low = f.lowest()
	}
	short, long := wavelengthOf(f.energy[len(f.energy)-1]), wavelengthOf(f.energy[low])
	want := fmt.Sprintf("between %.5g nm and %.5g nm, where %s of %s is tabulated",
		float64(short)*1e9, float64(long)*1e9, what, e.symbol)
	return outside("wavelength", wavelength, want)
}

// edges calls yield with the lower and upper energy of every steep rise, and
// twice with the energy of each end of the part that has both factors.
func (f *factors) edges(yield func(low, high float64)) {
	n := len(f.energy)
	if n == 0 {
		return
	}
	low := f.lowest()
	yield(f.energy[low], f.energy[low])
	yield(f.energy[n-1], f.energy[n-1])
	for i, p := range f.power {
		if p > steep {
			yield(f.energy[i], f.energy[i+1])
		}
	}
}

// lowest is the first point that has f1.
func (f *factors) lowest() int {
	i := 0
	for i < len(f.f1)-1 && f.f1[i] == missing {
		i++
	}
	return i
}
