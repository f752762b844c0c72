package repl

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// line is a chain of elements of every kind: mirrors whose reflectivity runs
// with the wavelength, a film that does too, and one that does not.
const line = `chain line
  band: 13.5 nm, 2 %
  at IF
  illuminator x4: reflectivity(rough_mirror, λ)
  pellicle: transmittance(film(Si, 50 nm), wavelength)
  at MASK
  mask: reflectivity(mirror, λ, 6 deg)
  reduction: 4, 4
  pellicle_out: 88 %
  projection x6: reflectivity(rough_mirror, λ, 6 deg, p)
  at WAFER
end`

func lineSession(t testing.TB) *Session {
	s := NewSession(Config{})
	spoken(t, s, mirrorBlock, line)
	return s
}

// mirrorStack is the mirror of the session, made by hand.
func mirrorStack(t testing.TB, rough units.Length) euv.Stack {
	si, err := euv.SolidElement("Si")
	if err != nil {
		t.Fatal(err)
	}
	mo, err := euv.SolidElement("Mo")
	if err != nil {
		t.Fatal(err)
	}
	s := euv.Stack{Repeats: []euv.Repeat{euv.Periods(50, euv.Layer{Medium: si, Thickness: 4.17e-9}, euv.Layer{Medium: mo, Thickness: 2.78e-9})}, Substrate: si}
	return s.WithRoughness(rough)
}

// midpoints is the mean over a band as one writes it down: the middles of 20,000
// equal parts.
func midpoints(t testing.TB, center, width float64, weight func(float64) float64, spectra ...euv.Spectral) float64 {
	const parts = 20_000
	at, product, one := make([]float64, parts), make([]float64, parts), make([]float64, parts)
	for i := range at {
		at[i] = center + width*((float64(i)+0.5)/parts-0.5)
		product[i] = weight(at[i])
	}
	whole := 0.0
	for _, w := range product {
		whole += w
	}
	for _, f := range spectra {
		if err := f(one, at); err != nil {
			t.Fatal(err)
		}
		for i := range product {
			product[i] *= one[i]
		}
	}
	sum := 0.0
	for _, v := range product {
		sum += v
	}
	return sum / whole
}

func flat(float64) float64 { return 1 }

// times is a spectrum to a power.
func times(f euv.Spectral, n int) []euv.Spectral {
	var all []euv.Spectral
	for range n {
		all = append(all, f)
	}
	return all
}

func TestBandAgainstMidpoints(t *testing.T) {
	s := lineSession(t)
	si, err := euv.SolidElement("Si")
	if err != nil {
		t.Fatal(err)
	}
	six := units.Angle(6 * math.Pi / 180)
	spectra := times(euv.ReflectivityOf(mirrorStack(t, 0.7e-9), 0, euv.Unpolarised), 4)
	spectra = append(spectra, euv.TransmittanceOf(euv.Film{Material: si, Thickness: 50e-9}, 0, euv.Unpolarised))
	toMask := midpoints(t, 13.5e-9, 0.02*13.5e-9, flat, spectra...)
	near.Abs(t, "to the mask", valued(t, s, "transmission(line, IF, MASK)").SI, toMask, 1e-8)
	spectra = append(spectra, euv.ReflectivityOf(mirrorStack(t, 0), six, euv.Unpolarised))
	spectra = append(spectra, times(euv.ReflectivityOf(mirrorStack(t, 0.7e-9), six, euv.PolarizationP), 6)...)
	want := 0.88 * midpoints(t, 13.5e-9, 0.02*13.5e-9, flat, spectra...)
	got := valued(t, s, "transmission(line, IF, WAFER)").SI
	near.Abs(t, "to the wafer", got, want, 1e-8)
	near.Rel(t, "to the wafer", got, want, 1e-7)
	near.Rel(t, "behind the mask: what is left over what was left", valued(t, s, "transmission(line, MASK, WAFER)").SI, want/toMask, 1e-7)
}

func TestSpectrumOfTheSource(t *testing.T) {
	s := lineSession(t)
	weight := func(l float64) float64 { return math.Exp(-math.Pow((l-13.5e-9)/0.05e-9, 2)) }
	spoken(t, s, "line_shape(l) = exp(-((l - 13.5 nm)/(0.05 nm))^2)")
	mirrors := times(euv.ReflectivityOf(mirrorStack(t, 0.7e-9), 0, euv.Unpolarised), 11)
	want := midpoints(t, 13.5e-9, 0.27e-9, weight, mirrors...)
	// a shape in any unit, and a band as a part of its centre or as a length
	for _, head := range []string{
		"band: 13.5 nm, 2 %\nspectrum: line_shape(λ)",
		"spectrum: 5 W/nm * line_shape(wavelength)\nband: 13.5 nm, 0.27 nm",
	} {
		spoken(t, s, "chain weighted\n"+head+"\nat IF\nmirror x11: reflectivity(rough_mirror, λ)\nat WAFER\nend")
		near.Abs(t, head, valued(t, s, "transmission(weighted, IF, WAFER)").SI, want, 1e-8)
	}
	unweighted := midpoints(t, 13.5e-9, 0.27e-9, flat, mirrors...)
	if !(want > 1.05*unweighted) {
		t.Errorf("a narrow line in the middle of the band changes %g to %g only", unweighted, want)
	}
}

func TestPlanesOfASpectralChain(t *testing.T) {
	s := lineSession(t)
	spoken(t, s, "P = 250 W at IF")
	for _, c := range [][2]string{
		{"carry(carry(P, line, MASK), line, WAFER)", "carry(P, line, WAFER)"},
		{"carry(carry(P, line, WAFER), line, IF)", "P"},
		{"carry(carry(P, line, WAFER), line, MASK)", "carry(P, line, MASK)"},
		{"transmission(line, IF, MASK) * transmission(line, MASK, WAFER)", "transmission(line, IF, WAFER)"},
		{"1 / transmission(line, WAFER, IF)", "transmission(line, IF, WAFER)"},
		{"P * transmission(line, IF, WAFER)", "carry(P, line, WAFER)"},
		{"carry(30 mJ/cm^2 at WAFER, line, MASK)", "mask_dose(30 mJ/cm^2 at WAFER, 4, 4, transmission(line, MASK, WAFER))"},
	} {
		near.Rel(t, c[0], valued(t, s, c[0]).SI, valued(t, s, c[1]).SI, 1e-12)
	}
	if v := valued(t, s, "carry(P, line, WAFER)"); v.Plane != "WAFER" {
		t.Errorf("carried to %q", v.Plane)
	}
}

func TestWalkOfASpectralChain(t *testing.T) {
	s := lineSession(t)
	for _, c := range []struct {
		start string
		first float64 // what stands at IF
	}{{"250 W at IF", 250}, {"2 W at WAFER", 2 / valued(t, s, "transmission(line, IF, WAFER)").SI}} {
		r := spoken(t, s, "walk line "+c.start)
		table := r.Results[0].(*Table)
		product, last := 1.0, 0.0
		for i, row := range numbersOf(table.Rows) {
			switch {
			case len(row) == 1 && i == 0:
				near.Rel(t, "at IF", row[0], c.first, 1e-12)
			case len(row) == 3:
				product *= row[0]
				near.Rel(t, table.Rows[i][0].Text, row[1]+row[2], last, 1e-12)
			}
			last = row[len(row)-1]
			if len(row) == 3 {
				last = row[1]
			}
		}
		near.Rel(t, "product of the factors", product, valued(t, s, "transmission(line, IF, WAFER)").SI, 1e-12)
		near.Rel(t, "at WAFER", last, c.first*product, 1e-12)
		said := r.Results[1].(*Text)
		for _, want := range []string{"in the band 0.0083929;", "at the brightest wavelength, 13.493 nm,", "% of that"} {
			if text := strings.Join(said.content, " "); !strings.Contains(text, want) {
				t.Errorf("walk says %q, want %q", text, want)
			}
		}
	}
}

// A band changes nothing, not the last bit, where no element runs with the
// wavelength.
func TestBandOfAFlatChain(t *testing.T) {
	s := NewSession(Config{})
	const elements = "at IF\nilluminator x4: (66.0 ± 0.5) %\npellicle: 88 %\nprojection x6: 0.665\nat WAFER\nend"
	spoken(t, s, "chain plain_line\n"+elements, "chain banded\nband: 13.5 nm, 2 %\n"+elements)
	for _, call := range []string{"transmission(%s, IF, WAFER)", "carry(250 W at IF, %s, WAFER)", "transmission(%s, WAFER, IF)"} {
		a, b := valued(t, s, fmt.Sprintf(call, "plain_line")), valued(t, s, fmt.Sprintf(call, "banded"))
		if a.SI != b.SI || a.U != b.U {
			t.Errorf("%s: %v ± %v, with a band %v ± %v", call, a.SI, a.U, b.SI, b.U)
		}
	}
}

// A chain of one mirror is that mirror.
func TestPeakOfAChain(t *testing.T) {
	s := lineSession(t)
	spoken(t, s, "chain one\nband: 13.5 nm, 2 %\nat IF\nm: reflectivity(rough_mirror, λ)\nat WAFER\nend")
	near.Abs(t, "peak in nm", valued(t, s, "peak_wavelength(one, IF, WAFER)").Number(), valued(t, s, "peak_wavelength(rough_mirror)").Number(), 1e-6)
	near.Abs(t, "width in nm", valued(t, s, "bandwidth(one, IF, WAFER)").Number(), valued(t, s, "bandwidth(rough_mirror)").Number(), 1e-6)
	// the reflectivity at the brightest wavelength is the peak
	spoken(t, s, "top = peak_wavelength(line, IF, WAFER)")
	product := "reflectivity(rough_mirror, top)^4 * transmittance(film(Si, 50 nm), top) * reflectivity(mirror, top, 6 deg) * 0.88 * reflectivity(rough_mirror, top, 6 deg, p)^6"
	summit := valued(t, s, product).SI
	for _, off := range []string{"-0.001 nm", "0.001 nm"} {
		if beside := valued(t, s, strings.ReplaceAll(product, "top", "(top + "+off+")")).SI; !(beside < summit) {
			t.Errorf("%s beside the top the chain passes %g, at the top %g", off, beside, summit)
		}
	}
	half := valued(t, s, "bandwidth(line, IF, WAFER)").SI
	if !(half > 0.15e-9 && half < valued(t, s, "bandwidth(one, IF, WAFER)").SI) {
		t.Errorf("twelve surfaces have a band of %g m", half)
	}
}

// The wavelength of a chain without a band is 13.5 nm.
func TestOneWavelength(t *testing.T) {
	s := lineSession(t)
	for _, running := range []string{"λ", "wavelength"} {
		spoken(t, s, "chain narrow\nat IF\nm: reflectivity(rough_mirror, "+running+")\nat WAFER\nend")
		near.Rel(t, running, valued(t, s, "transmission(narrow, IF, WAFER)").SI, valued(t, s, "reflectivity(rough_mirror, 13.5 nm)").SI, 1e-15)
	}
	spoken(t, s, "chain elsewhere\nband: 13.4 nm, 0 %\nat IF\nm: reflectivity(rough_mirror, λ)\nat WAFER\nend")
	near.Rel(t, "13.4 nm", valued(t, s, "transmission(elsewhere, IF, WAFER)").SI, valued(t, s, "reflectivity(rough_mirror, 13.4 nm)").SI, 1e-15)
	if r := heard(s, "λ"); r.Err == nil || !strings.Contains(r.Err.Error(), "λ is no name that is known here") {
		t.Errorf("λ outside a chain: %v", r.Err)
	}
}

// A shared spectrum is a function of the session.
func TestSharedSpectrum(t *testing.T) {
	s := lineSession(t)
	spoken(t, s, "R1(λ) = reflectivity(rough_mirror, λ)", "n = 11",
		"chain shared\nband: 13.5 nm, 2 %\nat IF\nm x(n): R1(λ)\nat WAFER\nend",
		"chain written\nband: 13.5 nm, 2 %\nat IF\nm x11: reflectivity(rough_mirror, λ)\nat WAFER\nend")
	near.Rel(t, "x(n) and x11", valued(t, s, "transmission(shared, IF, WAFER)").SI, valued(t, s, "transmission(written, IF, WAFER)").SI, 1e-13)
	spoken(t, s, "n = 6")
	near.Rel(t, "n = 6", valued(t, s, "transmission(shared, IF, WAFER)").SI,
		midpoints(t, 13.5e-9, 0.27e-9, flat, times(euv.ReflectivityOf(mirrorStack(t, 0.7e-9), 0, euv.Unpolarised), 6)...), 1e-8)
	spoken(t, s, "n = 2.5")
	refused(t, s, "transmission(shared, IF, WAFER)", "light crosses m 2.5000 times; that is a whole number from 1 to 1000", "why and check show what the inputs are")
}

// Independent errors add by squares, a shared one by its multiple.
func TestIndependentSpectra(t *testing.T) {
	s := lineSession(t)
	const mirrors = "\nband: 13.5 nm, 2 %%\nat IF\nm x4%s: reflectivity(rough_mirror, λ) * (1.00 ± 0.01 - 0.04)\nat WAFER\nend"
	spoken(t, s, "chain shared"+fmt.Sprintf(mirrors, ""), "chain apart"+fmt.Sprintf(mirrors, " independent"))
	shared, apart := valued(t, s, "transmission(shared, IF, WAFER)"), valued(t, s, "transmission(apart, IF, WAFER)")
	near.Rel(t, "values", shared.SI, apart.SI, 1e-9)
	near.Rel(t, "shared: 4 times 1 % of 0.96", shared.U/shared.SI, 4*0.01/0.96, 1e-6)
	near.Rel(t, "independent: twice", apart.U/apart.SI, 2*0.01/0.96, 1e-6)
}

func TestMeasuredCurveInAChain(t *testing.T) {
	var table strings.Builder
	table.WriteString("λ / nm,R / %\n")
	var xs, ys []float64
	for i := range 81 {
		x := 13.1 + 0.01*float64(i)
		y := 66 * math.Exp(-math.Pow((x-13.5)/0.3, 4))
		fmt.Fprintf(&table, "%.3f,%.4f\n", x, y)
		xs, ys = append(xs, math.Round(x*1e3)/1e12), append(ys, math.Round(y*1e4)/1e6)
	}
	s := NewSession(inFolder(map[string]string{"mirror.csv": table.String()}).config())
	spoken(t, s, `data measured = "mirror.csv"`, "chain line\nband: 13.5 nm, 2 %\nat IF\nm x11: curve(measured.λ, measured.R, λ)\nat WAFER\nend")
	read := func(dst, wavelengths []float64) error {
		for i, l := range wavelengths {
			k := 1
			for xs[k] < l {
				k++
			}
			dst[i] = ys[k-1] + (ys[k]-ys[k-1])*(l-xs[k-1])/(xs[k]-xs[k-1])
		}
		return nil
	}
	near.Abs(t, "eleven measured mirrors", valued(t, s, "transmission(line, IF, WAFER)").SI, midpoints(t, 13.5e-9, 0.27e-9, flat, times(read, 11)...), 1e-8)
	refusedBlock(t, s, "chain wide\n  band: 13.5 nm, 10 %\n  at IF\n  m: curve(measured.λ, measured.R, λ)\n  at WAFER\nend",
		"x is 12.825 nm; the table runs from 13.100 nm to 13.900 nm", "why and check show what the inputs are")
}

// What is no factor is refused, with its label, where the chain is defined.
func TestElementsOutsideTheirRange(t *testing.T) {
	s := lineSession(t)
	for element, message := range map[string]string{
		"λ / (13.45 nm)":                             "window is 1.00",
		"reflectivity(mirror, λ) - 1":                "window is -0.",
		"curve({13 nm, 14 nm}, {0.9, 1.2}, λ)":       "window is 1.",
		"2 * transmittance(film(Si, 1 nm), λ)":       "window is 1.9",
		"1 / (1 - transmittance(film(Si, 9 nm), λ))": "window is ",
	} {
		const block = "chain broken\n  band: 13.5 nm, 2 %%\n  at IF\n  window: %s\n  at WAFER\nend"
		r := heard(s, fmt.Sprintf(block, element))
		bad, ok := r.Err.(*Refusal)
		if !ok || !strings.HasPrefix(bad.Message(), message) || !strings.HasSuffix(bad.Message(), "the factor of an element lies between 0 and 1") {
			t.Errorf("window: %s: %v", element, r.Err)
		}
	}
	if r := heard(s, "transmission(broken, IF, WAFER)"); r.Err == nil || !strings.Contains(r.Err.Error(), "broken is no name that is known here") {
		t.Errorf("a refused chain stands: %v", r.Err)
	}
}

func TestBandsThatMakeNoSense(t *testing.T) {
	s := lineSession(t)
	for band, message := range map[string]string{
		"band: 13.5 nm":                             "a band has a centre and a full width",
		"band: 13.5 nm, λ":                          "a band does not depend on the running wavelength",
		"band: 13.5 nm, 250 %":                      "the width 33.75",
		"band: 13.5 nm, -2 %":                       "the width -0.27",
		"band: 0 nm, 2 %":                           "the band has its centre at 0",
		"band: 92 eV, 2 %":                          "the centre of a band is length (m), not energy (J)",
		"band: 13.5 nm, 2 W":                        "the width of a band is a part of its centre or a length, not power (W)",
		"band: 13.5 nm, 2 %\nspectrum: 0 * λ":       "the source's spectrum has no light in the band",
		"band: 13.5 nm, 2 %\nspectrum: λ - 13.5 nm": "the source's spectrum is negative at 13.",
	} {
		r := heard(s, "chain broken\n  "+band+"\n  at IF\n  m: reflectivity(mirror, λ)\n  at WAFER\nend")
		if r.Err == nil || !strings.Contains(r.Err.Error(), message) {
			t.Errorf("%s: %v, want %q", band, r.Err, message)
		}
	}
}
