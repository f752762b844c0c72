package program

import (
	"math"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// inBandChain has elements and a source that depend on the wavelength by
// polynomials of x = λ/13.5 nm, which runs from 1 − h to 1 + h with h = 0.1.
const inBandChain = `
k = 0.5
chain line
  band: 13.5 nm, 20 %
  spectrum: 3*λ/(13.5 nm)
  at IF
  falling: k*(2 - λ/(13.5 nm))
  at MASK
  rising: (λ/(27 nm))^2
  at WAFER
end
`

// powerMean is the mean of xⁿ over 1 − h … 1 + h: ((1+h)ⁿ⁺¹ − (1−h)ⁿ⁺¹)/(2h(n+1)).
func powerMean(n float64) float64 {
	const h = 0.1
	return (math.Pow(1+h, n+1) - math.Pow(1-h, n+1)) / (2 * h * (n + 1))
}

// The factors in the band are the integrals of the polynomials, weighted by the
// source 3x, and those of neighbours multiply.
func TestInBandFactors(t *testing.T) {
	d := newDesk()
	holds(t, d, inBandChain)
	const k = 0.5
	falling := k * (2*powerMean(1) - powerMean(2)) / powerMean(1)
	both := k * (2*powerMean(3) - powerMean(4)) / 4 / powerMean(1)
	for text, want := range map[string]float64{
		"transmission(line, IF, MASK)":    falling,
		"transmission(line, IF, WAFER)":   both,
		"transmission(line, MASK, WAFER)": both / falling,
		"transmission(line, WAFER, MASK)": falling / both,
	} {
		a, err := d.say(text)
		if err != nil {
			t.Fatal(d.refusal(text, err))
		}
		near.Rel(t, text, a.value, want, 1e-7) // the desk's rule of 4000 midpoints
	}
}

// Without a width the factor is the one at the centre, and without a source
// all wavelengths count alike. A width may be a length or a part of the centre.
func TestInBandWidths(t *testing.T) {
	holds(t, newDesk(), `
chain sharp
  band: 13.5 nm, 0 nm
  at IF
  falling: 2 - λ/(13.0 nm)
  at WAFER
end
transmission(sharp, IF, WAFER) => 0.961538 at WAFER/IF
chain flat
  band: 13.5 nm, 20 %
  at IF
  square: (λ/(27 nm))^2
  at WAFER
end
# (1 + 0.1²/3)/4
transmission(flat, IF, WAFER) => 0.250833 at WAFER/IF
chain flat_2
  band: 13.5 nm, 2.7 nm
  at IF
  square: (λ/(27 nm))^2
  at WAFER
end
transmission(flat_2, IF, WAFER) => 0.250833 at WAFER/IF
chain endless
  band: 13.5 nm, 27 nm
  at IF
  falling: 0.5*λ/λ
  at WAFER
end
transmission(endless, IF, WAFER) ! at transmission(endless, IF, WAFER): the band has its centre at 13.500 nm and the width 27 nm; a width is 0 or greater and less than twice the centre
`)
}

// Open inputs and uncertain ones of the formula hold inside the band too.
func TestInBandInputs(t *testing.T) {
	d := newDesk()
	holds(t, d, inBandChain+"\nk = 0.5 ± 0.1\ng = 1")
	p, err := CompileAll([]*Node{checked(t, d, "g * transmission(line, IF, MASK)")}, d.resolve, Opening{Inputs: []string{"g"}, Sources: true})
	if err != nil {
		t.Fatal(err)
	}
	if len(p.Sources) != 1 {
		t.Fatalf("%d sources", len(p.Sources))
	}
	f := p.NewFrame()
	for _, k := range []float64{0.25, 0.5, 0.75} {
		got, err := p.Run(f, 3, k)
		if err != nil {
			t.Fatal(err)
		}
		near.Rel(t, "3 times k", got, 3*k*(2*powerMean(1)-powerMean(2))/powerMean(1), 1e-7)
	}
}

// The whole band is searched for kinks of the functions in it.
func TestInBandKinks(t *testing.T) {
	d := newDesk()
	var low, high float64
	d.add(Function{
		Name: "mirror", Params: []Param{{Name: "x"}},
		Call:  func(x []float64) (float64, []string, error) { return 0.5, nil, nil },
		Kinks: func(from, to float64) []float64 { low, high = from, to; return nil },
	})
	holds(t, d, `
chain kinked
  band: 13.5 nm, 2 nm
  at IF
  m: mirror(λ/(1 nm))
  at WAFER
end
transmission(kinked, IF, WAFER) => 0.500000 at WAFER/IF
`)
	near.Rel(t, "low", low, 12.5e-9, 1e-12)
	near.Rel(t, "high", high, 14.5e-9, 1e-12)
}

// unsettled is a desk whose means carry an error of a part of the value.
type unsettled struct {
	*desk
	part float64
}

func (u unsettled) Integrate(f func(dst, wavelengths []float64) error, center, width float64, kinks []float64) (float64, float64, error) {
	mean, _, err := u.desk.Integrate(f, center, width, kinks)
	return mean, u.part * mean, err
}

// A mean that is known to less than a millionth says so.
func TestInBandDoubt(t *testing.T) {
	for part, doubts := range map[float64]int{0: 0, 0.9e-6: 0, 1.1e-6: 1, 1e-4: 1} {
		d := newDesk()
		holds(t, d, inBandChain)
		text := "transmission(line, IF, MASK)"
		n := checkedIn(t, unsettled{d, part}, text)
		p, err := Compile(n, d.resolve)
		if err != nil {
			t.Fatal(err)
		}
		f := p.NewFrame()
		if _, err := p.Run(f); err != nil {
			t.Fatal(err)
		}
		if len(f.Warnings) != doubts || doubts > 0 && !strings.Contains(f.Warnings[0], "mean over the band") {
			t.Errorf("known to %g: %q", part, f.Warnings)
		}
	}
}
