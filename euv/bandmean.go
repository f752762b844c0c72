package euv

import (
	"math"

	"example.com/dosewright/units"
)

const (
	maxPanels = 4096  // that BandMean cuts a band into
	bandAim   = 1e-10 // the error, over the mean, at which it stops
)

// BandMean is the mean of a spectrum over the band center ± width/2, and an
// estimate of its error, as Band.Mean makes it. Panels whose error is too large
// are halved, all of a round in one call of f, until each is below 1e-10 of the
// mean or the number of panels reaches some thousands, when the estimate says
// what is left. A step in the spectrum may hide between two nodes, and the
// estimate then knows nothing of it: give its place among the kinks. The arguments are those of NewBand. Errors: *ArgumentError, and
// those of f.
func BandMean(f Spectral, center, width units.Length, kinks []units.Length) (mean, deviation float64, err error) {
	b, err := NewBand(center, width, kinks)
	if err != nil {
		return 0, 0, err
	}
	var done sums
	for kept := 0; len(b.panels) > 0; {
		values := make([]float64, len(b.nodes))
		if err := f(values, b.nodes); err != nil {
			return 0, 0, err
		}
		kept += len(b.panels)
		if b.panels, err = done.settle(b.panels, values, width, kept < maxPanels); err != nil {
			return 0, 0, err
		}
		b.place()
	}
	return done.mean, done.deviation, nil
}

// sums are those over the panels that are settled.
type sums struct{ mean, deviation float64 }

// settle adds the panels that are right, and returns the halves of the others.
func (s *sums) settle(panels []panel, values []float64, width units.Length, again bool) ([]panel, error) {
	if width == 0 { // all nodes lie at one wavelength
		s.mean = values[0]
		return nil, s.check()
	}
	type result struct{ share, mean, deviation float64 }
	var results []result
	total := s.mean
	for i, p := range panels {
		m, d := panelMean(values[i*panelNodes:])
		share := 2 * p.half / float64(width)
		results = append(results, result{share, m, d})
		total += share * m
	}
	var halves []panel
	for i, r := range results {
		if again && r.deviation > bandAim*math.Abs(total) {
			p := panels[i]
			halves = append(halves, panel{p.middle - p.half/2, p.half / 2}, panel{p.middle + p.half/2, p.half / 2})
			continue
		}
		s.mean += r.share * r.mean
		s.deviation += r.share * r.deviation
	}
	return halves, s.check()
}

func (s *sums) check() error {
	if !isFinite(s.mean) || !isFinite(s.deviation) {
		return outside("mean", units.Ratio(s.mean), "finite: a value of the spectrum is not")
	}
	return nil
}
