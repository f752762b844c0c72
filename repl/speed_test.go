package repl

import (
	"math"
	"math/rand/v2"
	"runtime"
	"testing"
	"time"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// The estimate of throughput that the speed is measured with: eight uncertain
// inputs, a tenth power and a quotient of sums.
const throughputFormula = "p*t1*t2*r^10*a/(d*s+b)"

func throughputSession(t testing.TB, config Config) *Session {
	s := NewSession(config)
	spoken(t, s, "p = 250 W ± 2 %", "t1 = 0.9000(90)", "t2 = 0.800(10)", "r = 0.7000(50)", "a = 0.0707 m^2 ± 1 %",
		"d = 30 mJ/cm^2 ± 2 %", "s = 0.50 m^2 ± 2 %", "b = 10 J ± 2 %")
	return s
}

// throughputByHand is the same in SI units, as value and standard uncertainty.
var throughputByHand = [8][2]float64{{250, 5}, {0.9, 0.009}, {0.8, 0.01}, {0.7, 0.005}, {0.0707, 0.000707}, {300, 6}, {0.5, 0.01}, {10, 0.2}}

func throughputAt(p, t1, t2, r, a, d, s, b float64) float64 {
	r2 := r * r
	r4 := r2 * r2
	return p * t1 * t2 * (r4 * r4 * r2) * a / (d*s + b)
}

var sink float64

// trialsByHand draws the same normals and evaluates without units, on one core,
// and keeps the values.
func trialsByHand(values []float64) (sum float64) {
	random := rand.New(rand.NewPCG(1, 2))
	draw := func(i int) float64 { return throughputByHand[i][0] + throughputByHand[i][1]*random.NormFloat64() }
	for k := range values {
		y := throughputAt(draw(0), draw(1), draw(2), draw(3), draw(4), draw(5), draw(6), draw(7))
		values[k] = y
		sum += y
	}
	return sum
}

// sideBySide runs both in turn and reports nanoseconds a piece and the ratio,
// each from its fastest turn, since other work on the machine only slows.
func sideBySide(b *testing.B, pieces int, ours, hand func()) {
	fastest := [2]time.Duration{math.MaxInt64, math.MaxInt64}
	for b.Loop() {
		for i, f := range []func(){ours, hand} {
			start := time.Now()
			f()
			fastest[i] = min(fastest[i], time.Since(start))
		}
	}
	a, h := float64(fastest[0].Nanoseconds())/float64(pieces), float64(fastest[1].Nanoseconds())/float64(pieces)
	b.ReportMetric(a, "ns/piece")
	b.ReportMetric(h, "ns/hand")
	b.ReportMetric(a/h, "ratio")
	b.ReportMetric(0, "ns/op")
}

func BenchmarkPropagateMillion(b *testing.B) {
	for _, cores := range []int{1, 2} {
		b.Run(map[int]string{1: "one core", 2: "two cores"}[cores], func(b *testing.B) {
			defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(cores))
			s := throughputSession(b, Config{})
			values := make([]float64, 1_000_000)
			sideBySide(b, len(values),
				func() { spoken(b, s, "propagate "+throughputFormula+" : trials = 1e6") },
				func() { sink = trialsByHand(values) })
		})
	}
}

// BenchmarkBlock is the evaluation alone, as blocks and by hand.
func BenchmarkBlock(b *testing.B) {
	s := throughputSession(b, Config{})
	st, bad := syntax.Parse(throughputFormula)
	if bad != nil {
		b.Fatal(bad)
	}
	n, err := s.checker(throughputFormula, "").Check(st.Do.(*syntax.Show).X)
	if err != nil {
		b.Fatal(err)
	}
	in, err := s.inputsOf(n)
	if err != nil {
		b.Fatal(err)
	}
	block := in.program.Block()
	lanes, out := make([][]float64, 8), [][]float64{make([]float64, program.Lanes)}
	random := rand.New(rand.NewPCG(1, 2))
	for i := range lanes {
		lanes[i] = make([]float64, program.Lanes)
		for k := range lanes[i] {
			lanes[i][k] = throughputByHand[i][0] + throughputByHand[i][1]*random.NormFloat64()
		}
	}
	const rounds = 20
	sideBySide(b, rounds*program.Lanes,
		func() {
			for range rounds {
				if _, err := block(lanes, out); err != nil {
					b.Fatal(err)
				}
			}
		},
		func() {
			for range rounds {
				for k := range out[0] {
					out[0][k] = throughputAt(lanes[0][k], lanes[1][k], lanes[2][k], lanes[3][k], lanes[4][k], lanes[5][k], lanes[6][k], lanes[7][k])
				}
			}
			sink = out[0][0]
		})
}

// counting is a file that only counts what is written.
type counting struct{ bytes int }

func (c *counting) Write(p []byte) (int, error) {
	c.bytes += len(p)
	return len(p), nil
}

func (c *counting) Commit() error { return nil }
func (c *counting) Abort()        {}

// A sweep of a million points goes to a file row by row: in less than 2 s, and in
// less memory than the table would take.
func BenchmarkSweepToFile(b *testing.B) {
	file := &counting{}
	s := throughputSession(b, Config{Create: func(string) (File, error) { return file, nil }})
	statement := "sweep d = 20 mJ/cm^2 .. 50 mJ/cm^2 1e6 points : " + throughputFormula + " to \"sweep.csv\""
	b.ReportAllocs()
	for b.Loop() {
		spoken(b, s, statement)
	}
	b.ReportMetric(float64(file.bytes)/float64(b.N), "bytes/file")
}

// A million points are swept to a file without a million rows in memory.
func TestMillionPointsToFile(t *testing.T) {
	file := &counting{}
	s := throughputSession(t, Config{Create: func(string) (File, error) { return file, nil }})
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	start := time.Now()
	prints(t, s, "sweep d = 20 mJ/cm^2 .. 50 mJ/cm^2 1e6 points : "+throughputFormula+" to \"sweep.csv\"", "1000000 points\nwritten: sweep.csv")
	took := time.Since(start)
	runtime.ReadMemStats(&after)
	if used := after.TotalAlloc - before.TotalAlloc; used > 20e6 {
		t.Errorf("it took %d bytes of memory", used)
	}
	if file.bytes < 20e6 {
		t.Errorf("the file has %d bytes", file.bytes)
	}
	t.Logf("%v, %.1f MB allocated, %.1f MB written", took, float64(after.TotalAlloc-before.TotalAlloc)/1e6, float64(file.bytes)/1e6)
	// In a reply, or in a picture, there is no room for so many.
	refused(t, s, "sweep d = 20 mJ/cm^2 .. 50 mJ/cm^2 1e6 points : d", "this table has 1000000 rows; a reply holds 1000", "write it to a file: to \"sweep.csv\" at the end, or take fewer points")
	refused(t, s, "sweep d = 20 mJ/cm^2 .. 50 mJ/cm^2 1e6 points : d plot", "this picture would have 1000000 points; the most are 200000", "take larger steps, or write a table: to \"sweep.csv\"")
	refused(t, s, "sweep d = 20 mJ/cm^2 .. 50 mJ/cm^2 1e9 points : d to \"sweep.csv\"", "this sweep has 1.000e9 points; the most are 10000000", "take larger steps")
	refused(t, s, "sweep d = 20 mJ/cm^2 .. 50 mJ/cm^2 1e6 points, x = 1 .. 2 1e6 points : d to \"sweep.csv\"", "this sweep has 1.000e12 points; the most are 10000000", "take larger steps")
}
