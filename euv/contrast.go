package euv

import (
	"math"

	"example.com/dosewright/units"
)

// Tone says what light does to a resist.
type Tone int

const (
	Positive Tone = iota // what was exposed is dissolved
	Negative             // what was exposed stays
)

// Words returns the words in order: positive, negative.
func (Tone) Words() []string { return []string{"positive", "negative"} }

// String returns the word, or "Tone(n)" for a value that has none.
func (t Tone) String() string { return wordOf("Tone", t.Words(), int(t)) }

// ResistContrast is the steepness of the curve of remaining thickness over the
// decimal logarithm of the dose.
//
//	contrast = 1/(2 log10(dose_end/dose_half))   for a positive resist
//	contrast = 1/(2 log10(dose_half/dose_end))   for a negative resist
//
// doseHalf is the dose that leaves half of the thickness. doseEnd is the dose
// at which the straight line through that point reaches no thickness: for a
// positive resist the dose to clear, above doseHalf, for a negative resist
// the dose at which it begins to stay, below. Both are in J/m², greater than
// 0. Errors: *ArgumentError. Source: IUPAC Gold Book, term 09460.
func ResistContrast(doseHalf, doseEnd units.Fluence, tone Tone) (units.Ratio, error) {
	err := first(positive("dose_half", doseHalf), positive("dose_end", doseEnd), known("tone", tone.Words(), int(tone)))
	switch {
	case err != nil:
	case tone == Positive && doseEnd <= doseHalf:
		err = outside("dose_end", doseEnd, "greater than dose_half for a positive resist")
	case tone == Negative && doseEnd >= doseHalf:
		err = outside("dose_end", doseEnd, "less than dose_half for a negative resist")
	}
	if err != nil {
		return 0, err
	}
	decades := math.Log1p(float64(doseEnd-doseHalf)/float64(doseHalf)) / math.Ln10
	return answer("resist_contrast", units.Ratio(1/(2*math.Abs(decades))))
}
