package program

import (
	"fmt"
	"math"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// An uncertain literal is one source with a standard uncertainty in SI units.
func TestSpreads(t *testing.T) {
	for text, want := range map[string]string{
		"13.50(2) nm":                       "1.35000e-8 ± 2.00000e-11",
		"13.50(12) nm":                      "1.35000e-8 ± 1.20000e-10",
		"13.50(0.02) nm":                    "1.35000e-8 ± 2.00000e-11",
		"1.6(2)e-27 kg":                     "1.60000e-27 ± 2.00000e-28",
		"30 mJ/cm^2 ± 2 %":                  "300 ± 6",
		"30 mJ/cm^2 ± 0.6 mJ/cm^2":          "300 ± 6",
		"30 mJ/cm^2 ± 6 J/m^2":              "300 ± 6",
		"(30 ± 0.6) mJ/cm^2":                "300 ± 6",
		"(66.0 ± 0.5) %":                    "0.660000 ± 0.00500000",
		"0.66 ± 1 %":                        "0.660000 ± 0.00660000",
		"1 ± 0.1":                           "1 ± 0.100000",
		"22 degC ± 0.5 K":                   "295.150 ± 0.500000",
		"-5.0(2) degC":                      "268.150 ± 0.200000",
		"100 W ± 3 % (k=2)":                 "100 ± 1.50000",
		"100.0(30) W (k=2)":                 "100 ± 1.50000",
		"(100 ± 3) W (k=2, nu=4)":           "100 ± 1.50000 with 4",
		"100 W ± 3 W (p=95.45 %)":           "100 ± 1.50000",        // k = 2.000 for a normal distribution, from memory
		"100 W ± 2.776445 W (p=95 %, nu=4)": "100 ± 1.00000 with 4", // t of JCGM 100:2008, table G.2: 2.78, more digits from memory
	} {
		d := newDesk()
		a, err := d.say(text)
		if err != nil {
			t.Errorf("%s: %s", text, d.refusal(text, err))
			continue
		}
		n, _, ok := Source(a.node)
		if !ok {
			t.Errorf("%s is no source", text)
			continue
		}
		got := fmt.Sprintf("%s ± %s", number(n.Value()), number(n.Spread().U))
		if n.Spread().DoF > 0 {
			got += fmt.Sprintf(" with %v", n.Spread().DoF)
		}
		if got != want {
			t.Errorf("%s is %s, want %s", text, got, want)
		}
	}
	d := newDesk()
	holds(t, d, `
66 % ± 0.5 % ! 66 % ± 0.5 %: ± 0.5 % can be meant of the value or in points of %; write (66 ± 0.5) % for points, or 0.66 ± 0.5 % for a part of the value
66 % ± 5 ppm ! 66 % ± 5 ppm: ± 5 ppm can be meant of the value or in points of %; write (66 ± 0.0005) % for points, or 0.66 ± 5 ppm for a part of the value
30 mJ/cm^2 ± 0.6 ! ± 0.6: the uncertainty has no unit; write 30 mJ/cm^2 ± 0.6 mJ/cm^2, or (30 ± 0.6) mJ/cm^2
30 mJ/cm^2 ± 0.6 W ! ± 0.6 W: the uncertainty is power (W), the value fluence (mJ/cm²); write it in mJ/cm^2, or as a percentage of the value
22 degC ± 2 % ! ± 2 %: a percentage of a temperature point has no meaning; write the uncertainty in K: 22 degC ± 0.5 K
13.5(2) nm ± 3 nm ! ± 3 nm: the uncertainty stands twice; write 13.50(2) nm or 13.50 nm ± 0.02 nm
1 ± 0.1 (k=0) ! k=0: k = 0 says nothing here; k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once
1 ± 0.1 (p=100 %) ! p=100: p = 100 % says nothing here; k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once
1 ± 0.1 (k=2, k=2) ! k=2: k = 2 says nothing here; k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once
1 ± 0.1 (k=2, p=95 %) ! ± 0.1: k and p both say how far the uncertainty is expanded; give one of them
1 ± 0.1 (q=2) ! q=2: q = 2 says nothing here; k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once
1 ± 0.1 (k=2 m) ! k=2: k is a pure number; write (k=2), (p=95 %) or (nu=4)
1 ± 0.1 (nu=0) ! nu=0: nu = 0 says nothing here; k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once
1 ± 0.1 (p=95 %, nu=1e-300) ! nu=1e-300: nu = 1e-300 says nothing here; k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once
1 ± 1e300 (k=1e-300) ! ± 1e300: the uncertainty leaves the range of floating point; give a coverage and degrees of freedom that measurements have
1 ± 1e400 ! 1 ± 1e400: this uncertainty: the number is larger than 1.8e308 in SI units; choose a unit that brings the number closer to one
`)
}

func number(v float64) string { return units.FormatNumber(v, 6) }

// One source, however often its name is used: x − x has no uncertainty.
func TestSourcesAreInputs(t *testing.T) {
	d := newDesk()
	holds(t, d, "x = 3 ± 0.1\ny = x*x - 9\nz = 2 ± 0.2")
	p, err := CompileAll([]*Node{checked(t, d, "(x - x) + y*z")}, d.resolve, Opening{Sources: true})
	if err != nil {
		t.Fatal(err)
	}
	if len(p.Sources) != 2 {
		t.Fatalf("%d sources", len(p.Sources))
	}
	at := map[float64]float64{3: 4, 2: 5} // other values for the sources
	var in []float64
	for _, s := range p.Sources {
		in = append(in, at[s.Value()])
	}
	got, err := p.Run(p.NewFrame(), in...)
	if err != nil {
		t.Fatal(err)
	}
	near.Rel(t, "(x - x) + (x² − 9) z", got, (16-9)*5, 1e-15)
}

// A block of lanes computes what single runs compute, and stops where they do.
func TestBlocksAgreeWithRuns(t *testing.T) {
	for _, text := range []string{
		"a*b + c/d - a^10", "a^-3 + b^0 + c^(1/3)", "-(a - b)*(c + 2)/(d*d + 1)", "2^a + b^2*pi", "a", "5",
		"if(a < b, 1/(a - b), c)", "max(a, b, c) + ln(d^2)", "1/(a - 1.5)", "sqrt(a^2 + b^2)", "1e300^2*a", "a^(-1/2)",
		"(a*1e300*1e300)^0", "1/(a*1e300*1e300)", "(1e300*1e300*a)^-1",
	} {
		d := newDesk()
		holds(t, d, "a = 1\nb = 1\nc = 1\nd = 1")
		p, err := Compile(checked(t, d, text), d.resolve, "a", "b", "c", "d")
		if err != nil {
			t.Fatal(err)
		}
		in := make([][]float64, 4)
		for lane := range Lanes {
			for i := range in {
				in[i] = append(in[i], math.Sin(float64(7*lane+i*i+1))*3)
			}
		}
		in[0][300] = 1.5
		out := [][]float64{make([]float64, Lanes)}
		n, blockErr := p.Block()(in, out)
		f := p.NewFrame()
		for lane := range Lanes {
			want, err := p.Run(f, in[0][lane], in[1][lane], in[2][lane], in[3][lane])
			if err != nil {
				if n != lane || blockErr == nil || blockErr.Error() != err.Error() {
					t.Errorf("%s, lane %d: %v; the block stops at %d: %v", text, lane, err, n, blockErr)
				}
				break
			}
			if lane >= n {
				t.Errorf("%s: the block stops at lane %d: %v, a run gives %v", text, n, blockErr, want)
				break
			}
			near.Rel(t, fmt.Sprint(text, ", lane ", lane), out[0][lane], want, 1e-14)
		}
	}
}
