package euv

import (
	"math"
	"slices"

	"example.com/dosewright/units"
)

// Band is a range of wavelengths prepared for means over it: nodes at which a
// spectrum must be known, in panels that end at the kinks of the tables. Where
// many spectra are averaged over one band, as in a propagation of
// distributions, aim one Evaluator at its wavelengths. BandMean chooses its
// nodes by itself.
type Band struct {
	panels []panel
	nodes  []float64
}

// panel is a part of a band, as wide as 2·half.
type panel struct{ middle, half float64 }

// maxPanel is the widest panel of a band over its centre: a mirror's peak of
// 4 % is some panels wide.
const maxPanel = 1. / 100

// NewBand prepares the band center ± width/2. center is in m, greater than 0;
// width, in m, is 0 or greater and less than twice center; kinks are
// wavelengths, in any order, at which the spectra have kinks, and those outside
// the band are left out. A width of 0 is a single wavelength. Errors:
// *ArgumentError.
func NewBand(center, width units.Length, kinks []units.Length) (Band, error) {
	if err := first(positive("center", center), notNegative("width", width)); err != nil {
		return Band{}, err
	}
	low, high := float64(center)-float64(width)/2, float64(center)+float64(width)/2
	if low <= 0 {
		return Band{}, outside("width", width, "less than twice the center")
	}
	if len(kinks) > maxPanels/2 {
		return Band{}, outside("number of kinks", units.Count(len(kinks)), "at most "+formatRatio(maxPanels/2))
	}
	ends := []float64{low, high}
	for _, k := range kinks {
		if l := float64(k); l > low && l < high {
			ends = append(ends, l)
		}
	}
	slices.Sort(ends)
	var b Band
	for i, to := range ends[1:] {
		b.cut(ends[i], to, maxPanel*float64(center))
	}
	b.place()
	return b, nil
}

// cut adds the panels between two ends, none wider than widest. A band without
// width is one panel without width.
func (b *Band) cut(from, to, widest float64) {
	n := max(1, math.Ceil((to-from)/widest))
	for i := range int(n) {
		b.panels = append(b.panels, panel{from + (float64(i)+0.5)*(to-from)/n, (to - from) / (2 * n)})
	}
}

// place computes the nodes, panel by panel.
func (b *Band) place() {
	b.nodes = make([]float64, 0, len(b.panels)*panelNodes)
	for _, p := range b.panels {
		for _, x := range kronrodNodes {
			b.nodes = append(b.nodes, p.middle+p.half*x)
		}
	}
}

// Wavelengths lists the nodes, in m. The list is new at each call.
func (b *Band) Wavelengths() []units.Length {
	out := make([]units.Length, len(b.nodes))
	for i, x := range b.nodes {
		out[i] = units.Length(x)
	}
	return out
}

// Mean is the mean over the band of a spectrum with these values at the band's
// wavelengths, and an estimate of its error: the difference between the
// formulas with 15 and with 7 nodes, which is much too large where the spectrum
// is smooth. A list of the wrong length is refused with an *ArgumentError.
func (b *Band) Mean(values []float64) (mean, deviation float64, err error) {
	if len(values) != len(b.nodes) || len(values) == 0 {
		return 0, 0, outside("number of values", units.Count(len(values)), "the number of wavelengths of the band, "+formatRatio(float64(len(b.nodes))))
	}
	whole := 0.0
	for _, p := range b.panels {
		whole += p.half
	}
	for i, p := range b.panels {
		share := 1.0
		if whole > 0 {
			share = p.half / whole
		}
		m, d := panelMean(values[i*panelNodes:])
		mean += share * m
		deviation += share * d
	}
	if !isFinite(mean) || !isFinite(deviation) {
		return 0, 0, outside("mean", units.Ratio(mean), "finite: a value of the spectrum is not")
	}
	return mean, deviation, nil
}
