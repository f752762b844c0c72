package benchmarks

import (
	"testing"

	"github.com/expr-lang/expr"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// The formula of all of these: a throughput with eight inputs, a tenth power
// and a quotient of sums.
const formula = "p*t1*t2*r^10*a/(d*s+b)"

var names = []string{"p", "t1", "t2", "r", "a", "d", "s", "b"}

var values = []float64{250, 0.9, 0.8, 0.7, 0.0707, 300, 0.5, 10}

// byHand is what a program without units would say.
//
//go:noinline
func byHand(p, t1, t2, r, a, d, s, b float64) float64 {
	r2 := r * r
	r4 := r2 * r2
	return p * t1 * t2 * (r4 * r4 * r2) * a / (d*s + b)
}

var sink float64

func BenchmarkFormula(b *testing.B) {
	b.Run("by hand", func(b *testing.B) {
		for b.Loop() {
			sink = byHand(values[0], values[1], values[2], values[3], values[4], values[5], values[6], values[7])
		}
	})
	b.Run("dosewright", func(b *testing.B) {
		run := compiled(b).Runner()
		b.ReportAllocs()
		for b.Loop() {
			v, err := run.SI(values...)
			if err != nil {
				b.Fatal(err)
			}
			sink = v
		}
	})
	b.Run("dosewright in rows", func(b *testing.B) {
		f := compiled(b)
		const n = 1 << 14
		dst := make([]float64, n)
		var in [][]float64
		for _, v := range values {
			row := make([]float64, n)
			for i := range row {
				row[i] = v * (1 + float64(i)/1e6)
			}
			in = append(in, row)
		}
		for b.Loop() {
			if _, err := f.RunSI(b.Context(), dst, in); err != nil {
				b.Fatal(err)
			}
		}
		b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/n, "ns/row")
	})
	b.Run("general library", func(b *testing.B) {
		env := map[string]any{}
		for i, name := range names {
			env[name] = values[i]
		}
		program, err := expr.Compile(formula, expr.Env(env))
		if err != nil {
			b.Fatal(err)
		}
		b.ReportAllocs()
		for b.Loop() {
			v, err := expr.Run(program, env)
			if err != nil {
				b.Fatal(err)
			}
			sink = v.(float64)
		}
	})
}

func compiled(b *testing.B) *repl.Formula {
	b.Helper()
	f, err := repl.NewSession(repl.Config{}).Freeze(b.Context())
	if err != nil {
		b.Fatal(err)
	}
	var inputs []repl.Input
	for _, name := range names {
		inputs = append(inputs, repl.InputOf[units.Ratio](name))
	}
	g, err := f.Compile(formula, inputs...)
	if err != nil {
		b.Fatal(err)
	}
	return g
}

func BenchmarkTyped(b *testing.B) {
	b.Run("float64", func(b *testing.B) {
		x, y := 3.0, 0.0
		for b.Loop() {
			y += x * 1.5 / (y + 2)
		}
		sink = y
	})
	b.Run("typed", func(b *testing.B) {
		x, y := units.Power(3), units.Power(0)
		for b.Loop() {
			y += x * 1.5 / (y + 2)
		}
		sink = float64(y)
	})
	b.Run("dynamic", func(b *testing.B) {
		x, err := units.Standard().Parse("W")
		if err != nil {
			b.Fatal(err)
		}
		q, r := units.New(3, x.Dimension()), units.New(1/3.0, units.Dimension{})
		for b.Loop() {
			p, err := q.Mul(r)
			if err != nil {
				b.Fatal(err)
			}
			sink = p.SI()
		}
	})
}
