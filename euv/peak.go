package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/internal/num"
	"example.com/dosewright/units"
)

// Peak is the highest maximum of a spectrum within a range of wavelengths, and
// the nearest places on either side at which half of it is left.
type Peak struct {
	Value      float64      // of the spectrum at the maximum
	Wavelength units.Length // of the maximum
	// Low and High are where the spectrum has fallen to half of Value. Each is
	// 0 when that does not happen within the range.
	Low, High units.Length

	from, to units.Length
}

// Bandwidth is the full width at half maximum, High − Low. It is refused with
// an *ArgumentError when one of them lies outside the range that was searched.
func (p Peak) Bandwidth() (units.Length, error) {
	if p.Low == 0 || p.High == 0 {
		return 0, outside("near", p.Wavelength, fmt.Sprintf(
			"at a peak that falls to half its height between %.5g nm and %.5g nm, the range searched", nanometres(p.from), nanometres(p.to)))
	}
	return p.High - p.Low, nil
}

// The number of places at which a search looks first.
const (
	leastPlaces = 400
	mostPlaces  = 20_000
	mostHumps   = 16 // that are climbed
)

// FindPeak finds the highest maximum of a spectrum between two wavelengths,
// 0 < from < to. fringe is the distance between the closest features that
// matter, greater than 0; no more than 20,000 places are looked at first. The
// wavelength is right to about 1e-8 of the width of the peak. A spectrum that
// is highest at an end of the range has no peak there and is refused. Errors:
// *ArgumentError, and those of f.
func FindPeak(f Spectral, from, to, fringe units.Length) (Peak, error) {
	err := first(positive("from", from), positive("to", to), positive("fringe", fringe))
	if err == nil && !(from < to) {
		err = outside("to", to, "greater than from")
	}
	if err != nil {
		return Peak{}, err
	}
	const placesPerFringe = 16
	n := math.Ceil(float64(to-from) / float64(fringe) * placesPerFringe)
	s := newSearch(f, float64(from), float64(to), int(min(max(n, leastPlaces), mostPlaces)))
	p := Peak{from: from, to: to}
	at := s.highest()
	if s.err == nil && !(at.x > s.places[0] && at.x < s.places[len(s.places)-1] && at.y > 0) {
		s.err = outside("near", units.Length(at.x), fmt.Sprintf(
			"near a maximum: between %.5g nm and %.5g nm there is none", nanometres(from), nanometres(to)))
	}
	p.Value, p.Wavelength = at.y, units.Length(at.x)
	p.Low, p.High = units.Length(s.half(at, -1)), units.Length(s.half(at, 1))
	if s.err != nil {
		return Peak{}, s.err
	}
	return p, nil
}

// search looks at a spectrum; after the first error nothing is asked.
type search struct {
	f              Spectral
	places, values []float64
	err            error
	x, y           [1]float64
}

type summit struct{ x, y float64 }

func newSearch(f Spectral, from, to float64, n int) *search {
	s := &search{f: f, places: make([]float64, n+1), values: make([]float64, n+1)}
	for i := range s.places {
		s.places[i] = from + (to-from)*(float64(i)/float64(n))
	}
	s.err = f(s.values, s.places)
	return s
}

// at is the spectrum at one wavelength.
func (s *search) at(x float64) float64 {
	s.x[0] = x
	if s.err == nil {
		s.err = s.f(s.y[:], s.x[:])
	}
	return s.y[0]
}

// highest climbs the humps that are within a tenth of the highest place, since
// the places may have missed a top by that.
func (s *search) highest() summit {
	best := summit{y: math.Inf(-1)}
	if s.err != nil {
		return best
	}
	for i, v := range s.values {
		if v > best.y {
			best = summit{s.places[i], v}
		}
	}
	enough, climbed := 0.9*best.y, 0
	last := len(s.places) - 1
	for i, v := range s.values {
		if i == 0 || i == last || v < enough || v < s.values[i-1] || v <= s.values[i+1] || climbed == mostHumps {
			continue
		}
		climbed++
		x, y, err := num.Maximum(s.at, s.places[i-1], s.places[i+1], 1e-12)
		if s.err == nil {
			s.err = err
		}
		if y > best.y {
			best = summit{x, y}
		}
	}
	return best
}

// half is the nearest wavelength on one side of a maximum at which half of it
// is left; 0 when there is none.
func (s *search) half(top summit, side int) float64 {
	inside := top.x
	for i := s.nextTo(top.x, side); s.err == nil && i >= 0 && i < len(s.places); i += side {
		if s.values[i] <= top.y/2 {
			x, err := num.Root(func(x float64) float64 { return s.at(x) - top.y/2 },
				min(inside, s.places[i]), max(inside, s.places[i]), 1e-14)
			if s.err == nil {
				s.err = err
			}
			return x
		}
		inside = s.places[i]
	}
	return 0
}

// nextTo is the first place beyond x on one side.
func (s *search) nextTo(x float64, side int) int {
	n := len(s.places)
	i := int(float64(n-1) * (x - s.places[0]) / (s.places[n-1] - s.places[0]))
	if side > 0 {
		i++
	}
	for i >= 0 && i < n && float64(side)*(s.places[i]-x) <= 0 {
		i += side
	}
	return i
}
