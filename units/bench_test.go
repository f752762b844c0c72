package units

import (
	"testing"
)

func BenchmarkParse(b *testing.B) {
	s := Standard()
	b.ReportAllocs()
	for b.Loop() {
		if _, err := s.Parse("mJ/cm^2"); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkRead(b *testing.B) {
	for _, unit := range []string{"nm", "eV", "Torr", "deg", "°C"} {
		u := parse(b, unit)
		b.Run(unit, func(b *testing.B) {
			for b.Loop() {
				if _, err := u.Read("13.5"); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkDigits(b *testing.B) {
	u := parse(b, "nm")
	for b.Loop() {
		u.Digits(13.5e-9)
	}
}

func BenchmarkText(b *testing.B) {
	s, q := Standard(), Of(Fluence(300))
	for b.Loop() {
		s.Text(q, 5)
	}
}

// BenchmarkStandard is the cost of a system with its habits, from nothing; a
// program pays it once.
func BenchmarkStandard(b *testing.B) {
	for b.Loop() {
		newSystem(newRows()).habits()
	}
}

// chain is long enough for the clock, and short enough that no product leaves
// the range.
const chain = 1000

// mulQuantities multiplies in a chain, so that each product waits for the one
// before, as in an expression.
func mulQuantities(q Quantity, pair [2]Quantity) (Quantity, error) {
	var err error
	for i := range chain {
		if q, err = q.Mul(pair[i&1]); err != nil {
			return q, err
		}
	}
	return q, nil
}

func mulFloats(v float64, pair [2]float64) float64 {
	for i := range chain {
		v *= pair[i&1]
	}
	return v
}

func BenchmarkQuantityMul(b *testing.B) {
	pair := [2]Quantity{New(1.5, dimFluence), New(1/1.5, must(b)(Dimension{}.Div(dimFluence)))}
	for b.Loop() {
		if _, err := mulQuantities(New(300, dimArea), pair); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/chain, "ns/mul")
}

func BenchmarkQuantityMulCounted(b *testing.B) {
	pair := [2]Quantity{New(1.5, dimWaferEnergy), New(1/1.5, must(b)(Dimension{}.Div(dimWaferEnergy)))}
	for b.Loop() {
		if _, err := mulQuantities(New(300, dimFieldArea), pair); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/chain, "ns/mul")
}

func BenchmarkFloatMul(b *testing.B) {
	pair := [2]float64{1.5, 1 / 1.5}
	for b.Loop() {
		mulFloats(300, pair)
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/chain, "ns/mul")
}

// A product of quantities costs no allocation; what it costs in time is for the
// benchmarks to say.
func TestQuantityMulAllocatesNothing(t *testing.T) {
	pair := [2]Quantity{New(1.5, dimFluence), New(1/1.5, must(t)(Dimension{}.Div(dimFluence)))}
	if n := testing.AllocsPerRun(10, func() { mulQuantities(New(300, dimArea), pair) }); n != 0 {
		t.Errorf("%v allocations", n)
	}
}
