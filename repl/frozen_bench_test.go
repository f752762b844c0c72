package repl_test

import (
	"context"
	"testing"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// estimate is an estimate of throughput: eight inputs, a tenth power, a quotient
// of sums.
const estimate = "p*t1*t2*r^10*a/(d*s+b)"

// estimateInputs are power, two transmissions, a reflectivity, an area, a dose,
// a settling per dose and an offset.
func estimateInputs() []repl.Input {
	return []repl.Input{
		repl.InputOf[units.Power]("p"), repl.InputOf[units.Ratio]("t1"), repl.InputOf[units.Ratio]("t2"),
		repl.InputOf[units.Ratio]("r"), repl.InputOf[units.Area]("a"), repl.InputOf[units.Fluence]("d"),
		repl.InputOf[units.Ratio]("s"), repl.InputOf[units.Fluence]("b"),
	}
}

func estimateValues() []float64 { return []float64{250, 0.9, 0.85, 0.65, 0.0707, 340, 1.3, 20} }

// estimateByHand is the estimate as a programmer would write it.
//
//go:noinline
func estimateByHand(p, t1, t2, r, a, d, s, b float64) float64 {
	r2 := r * r
	r4 := r2 * r2
	return p * t1 * t2 * (r4 * r4 * r2) * a / (d*s + b)
}

func estimator(t testing.TB) *repl.Formula {
	t.Helper()
	z, err := repl.NewSession(repl.Config{}).Freeze(t.Context())
	if err != nil {
		t.Fatal(err)
	}
	f, err := z.Compile(estimate, estimateInputs()...)
	if err != nil {
		t.Fatal(err)
	}
	return f
}

func estimateQuantities() []units.Quantity {
	var list []units.Quantity
	for i, v := range estimateValues() {
		list = append(list, units.New(v, estimateInputs()[i].Dimension))
	}
	return list
}

// BenchmarkScalar holds one run of a compiled formula against the same by hand.
func BenchmarkScalar(b *testing.B) {
	f, v, q := estimator(b), estimateValues(), estimateQuantities()
	b.Run("by hand", func(b *testing.B) {
		sum := 0.0
		for b.Loop() {
			sum += estimateByHand(v[0], v[1], v[2], v[3], v[4], v[5], v[6], v[7])
		}
		if !(sum > 0) {
			b.Fatal(sum)
		}
	})
	b.Run("runner", func(b *testing.B) {
		r := f.Runner()
		b.ReportAllocs()
		for b.Loop() {
			if _, err := r.SI(v...); err != nil {
				b.Fatal(err)
			}
		}
	})
	b.Run("quantities", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			if _, err := f.Run(q...); err != nil {
				b.Fatal(err)
			}
		}
	})
}

// BenchmarkRows holds many runs at once against a loop by hand. The time is for
// ten thousand rows; ns/row is what to read.
func BenchmarkRows(b *testing.B) {
	const rows = 10_000
	f, in, dst := estimator(b), estimateRows(rows), make([]float64, rows)
	perRow := func(b *testing.B) { b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/rows, "ns/row") }
	b.Run("by hand", func(b *testing.B) {
		for b.Loop() {
			for i := range dst {
				dst[i] = estimateByHand(in[0][i], in[1][i], in[2][i], in[3][i], in[4][i], in[5][i], in[6][i], in[7][i])
			}
		}
		perRow(b)
	})
	b.Run("blocks", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			if _, err := f.RunSI(context.Background(), dst, in); err != nil {
				b.Fatal(err)
			}
		}
		perRow(b)
	})
}

func estimateRows(n int) [][]float64 {
	in := make([][]float64, len(estimateValues()))
	for k, v := range estimateValues() {
		in[k] = make([]float64, n)
		for i := range in[k] {
			in[k][i] = v * (1 + float64(i)/float64(n))
		}
	}
	return in
}

// BenchmarkCompile reads, checks and compiles the estimate.
func BenchmarkCompile(b *testing.B) {
	z, err := repl.NewSession(repl.Config{}).Freeze(context.Background())
	if err != nil {
		b.Fatal(err)
	}
	in := estimateInputs()
	b.ReportAllocs()
	for b.Loop() {
		if _, err := z.Compile(estimate, in...); err != nil {
			b.Fatal(err)
		}
	}
}

// BenchmarkEval reads, checks, compiles and runs an expression of a frozen
// session.
func BenchmarkEval(b *testing.B) {
	s := repl.NewSession(repl.Config{})
	for _, text := range []string{"P = 3 W at WAFER", "dose = 30 mJ/cm^2 at WAFER", "overhead = 9.5 s/wafer"} {
		if err := s.Define(b.Context(), text); err != nil {
			b.Fatal(err)
		}
	}
	z, err := s.Freeze(b.Context())
	if err != nil {
		b.Fatal(err)
	}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := z.Eval(context.Background(), "throughput(dose, 96 field/wafer, 8.58 cm^2/field, P, overhead)"); err != nil {
			b.Fatal(err)
		}
	}
}
