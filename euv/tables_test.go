package euv

import (
	"encoding/csv"
	"errors"
	"math"
	"os"
	"strconv"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

func table(t testing.TB, name string) [][]string {
	f := sure(os.Open("../testdata/" + name))
	defer f.Close()
	return sure(csv.NewReader(f).ReadAll())[1:]
}

func number(text string) float64 { return sure(strconv.ParseFloat(text, 64)) }

// Every number of the published tables stands in the embedded form, to the last
// bit: B. L. Henke, E. M. Gullikson, J. C. Davis, At. Data Nucl. Data Tables 54,
// 181 (1993) with later updates, and the CRC Handbook's densities, as text in
// testdata.
func TestEveryTablePointIsKept(t *testing.T) {
	next := map[string]int{}
	for _, row := range table(t, "atomic-scattering-factors.csv") {
		f := elements()[row[0]].factors()
		i := next[row[0]]
		next[row[0]]++
		if f.energy[i] != number(row[1]) || f.f1[i] != number(row[2]) || f.f2[i] != number(row[3]) {
			t.Fatalf("%v is %g, %g, %g", row, f.energy[i], f.f1[i], f.f2[i])
		}
		if i > 0 && f.energy[i-1] >= f.energy[i] {
			t.Errorf("%s: energy %g stands out of order", row[0], f.energy[i])
		}
	}
	for symbol, n := range next {
		if got := len(elements()[symbol].factors().energy); got != n {
			t.Errorf("%s has %d points, want %d", symbol, got, n)
		}
	}
	if len(next) != 92 {
		t.Errorf("%d elements, want 92", len(next))
	}
	for _, row := range table(t, "elements.csv") {
		e := elements()[row[0]]
		if e.weight != number(row[2]) || float64(e.density) != number(row[3])*1000 {
			t.Errorf("%v has weight %g and density %g", row, e.weight, e.density)
		}
		if _, err := SolidElement(row[0]); (err == nil) != (row[4] == "solid") {
			t.Errorf("%s is %q; as a solid: %v", row[0], row[4], err)
		}
	}
}

// At the points themselves the interpolation gives the tabulated factors;
// between two of them f1 lies on the straight line and ln f2 on that of ln E;
// beside a point without f1 there is none.
func TestInterpolation(t *testing.T) {
	for symbol, e := range elements() {
		f := e.factors()
		for i := range f.energy {
			at, ok := f.locate(f.energy[i])
			if !ok || at != i || f.f2At(i, f.energy[i]) != f.f2[i] {
				t.Fatalf("%s at point %d: %d, %v", symbol, i, at, ok)
			}
			f1, ok := f.f1At(i, f.energy[i])
			if ok != (f.f1[i] != missing) || ok && f1 != f.f1[i] {
				t.Fatalf("%s: f1 at point %d is %g, %v", symbol, i, f1, ok)
			}
			if i == len(f.energy)-1 {
				continue
			}
			mean := math.Sqrt(f.energy[i] * f.energy[i+1])
			near.Rel(t, symbol+" f2", f.f2At(i, mean), math.Sqrt(f.f2[i]*f.f2[i+1]), 1e-12)
			middle := (f.energy[i] + f.energy[i+1]) / 2
			f1, ok = f.f1At(i, middle)
			if ok != (f.f1[i] != missing && f.f1[i+1] != missing) {
				t.Errorf("%s: f1 beside a missing one at %g eV: %g, %v", symbol, middle, f1, ok)
			}
			if ok {
				near.Abs(t, symbol+" f1", f1, (f.f1[i]+f.f1[i+1])/2, 1e-12)
			}
		}
	}
}

func TestOutsideTheTables(t *testing.T) {
	si := solid(t, "Si")
	for _, l := range []float64{4.1, 50, 0, -13.5, math.NaN(), math.Inf(1)} {
		for _, ask := range []func(Material, units.Length) (units.Ratio, error){Delta, Beta} {
			v, err := ask(si, inNm(l))
			var refused *ArgumentError
			if !errors.As(err, &refused) || refused.Argument != "wavelength" || v != 0 {
				t.Errorf("%g nm gives %g, %v", l, v, err)
			}
		}
	}
	if _, err := Delta(si, inNm(42.4)); err == nil {
		t.Error("silicon has no f1 at 42.4 nm")
	}
}
