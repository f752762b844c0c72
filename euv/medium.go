package euv

import "example.com/dosewright/units"

// Medium is what a layer, a surface or a substrate is made of: a Material,
// whose index follows from the published tables, or an Index, which is given.
// Pointers to either are media too.
type Medium interface {
	// Index is the refractive index at a vacuum wavelength.
	Index(wavelength units.Length) (Index, error)
	// String names the medium.
	String() string
	// indices writes the indices at the wavelengths of t to dst, beginning with
	// number from.
	indices(dst []Index, t *tabulated, from int) error
	// kinks calls yield with every photon energy in eV, from low to high, at
	// which the index as a function of wavelength has a kink.
	kinks(low, high float64, yield func(energy float64))
	// edges calls yield with the energies of every steep rise of absorption, and
	// with those of the ends of the tables, for which low and high are the same.
	edges(yield func(low, high float64))
	// warnings lists doubts about the medium itself.
	warnings() []string
}

// Index is a refractive index n = 1 − Delta − i·Beta, for fields that go as
// exp(+iωt). Delta is less than 1 and may be negative; Beta is 0 or greater; both
// are at most a million in size.
// The zero value is vacuum. As a Medium it is the same at every wavelength.
type Index struct{ Delta, Beta float64 }

// Index returns n itself.
func (n Index) Index(units.Length) (Index, error) {
	if err := n.check(); err != nil {
		return Index{}, err
	}
	return n, nil
}

// maxIndex bounds |δ| and β, so that their squares stay inside floating point.
const maxIndex = 1e6

func (n Index) check() error {
	if !(n.Delta < 1 && n.Delta >= -maxIndex) {
		return outside("delta", units.Ratio(n.Delta), "less than 1 and at least -1e6")
	}
	if !(n.Beta >= 0 && n.Beta <= maxIndex) {
		return outside("beta", units.Ratio(n.Beta), "between 0 and 1e6; with n = 1 - delta - i beta an absorbing medium has beta > 0")
	}
	return nil
}

// String writes the index as 1 − δ − iβ.
func (n Index) String() string {
	return "index 1-" + formatRatio(n.Delta) + "-" + formatRatio(n.Beta) + "i"
}

func (n Index) kinks(_, _ float64, _ func(float64)) {}

func (n Index) edges(func(_, _ float64)) {}

func (n Index) warnings() []string { return nil }

// kinksOf lists the wavelengths strictly between low and high at which the
// indices of some media have kinks, in rising order and each once.
func kinksOf(media []Medium, low, high units.Length) []units.Length {
	var energies []float64
	for _, m := range media {
		m.kinks(electronVolts(high), electronVolts(low), func(e float64) { energies = append(energies, e) })
	}
	var out []units.Length
	for _, e := range energies {
		if l := wavelengthOf(e); l > low && l < high {
			out = append(out, l)
		}
	}
	return sortedOnce(out)
}
