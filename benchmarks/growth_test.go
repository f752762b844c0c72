package benchmarks

import (
	"context"
	"fmt"
	"io"
	"io/fs"
	"math"
	"strings"
	"testing"
	"testing/fstest"
	"time"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// BenchmarkGrowth prints how the time of some tasks grows with their size: the
// exponent of a power law between a size and four times that size.
func BenchmarkGrowth(b *testing.B) {
	for _, task := range []struct {
		name string
		size int
		run  func(b *testing.B, n int)
	}{
		{"statements replayed", 2500, func(b *testing.B, n int) { replay(b, statements(n)) }},
		{"definitions in one chain", 2500, func(b *testing.B, n int) { replay(b, definitions(n)) }},
		{"trials", 100_000, func(b *testing.B, n int) {
			feed(b, "x = 3 W ± 2 %", fmt.Sprintf("propagate x^2 : trials = %d", n))
		}},
		{"points swept", 250_000, func(b *testing.B, n int) {
			feed(b, fmt.Sprintf("sweep x = 1 .. 2 %d points : x^2 to \"x.csv\"", n))
		}},
		{"wavelengths of a mirror", 5000, spectrum},
		{"bilayers of a mirror", 2000, bilayers},
	} {
		b.Run(task.name, func(b *testing.B) {
			small, large := math.Inf(1), math.Inf(1)
			for b.Loop() {
				small = min(small, seconds(b, task.run, task.size))
				large = min(large, seconds(b, task.run, 4*task.size))
			}
			b.ReportMetric(math.Log(large/small)/math.Log(4), "exponent")
			b.ReportMetric(small*1e3, "ms")
			b.ReportMetric(0, "ns/op")
		})
	}
}

func seconds(b *testing.B, run func(*testing.B, int), n int) float64 {
	start := time.Now()
	run(b, n)
	return time.Since(start).Seconds()
}

func statements(n int) string {
	var t strings.Builder
	for i := range n {
		fmt.Fprintf(&t, "photon_count(%d mJ/cm^2, hole_area(20 nm))\n", i%90+1)
	}
	return t.String()
}

func definitions(n int) string {
	t := strings.Builder{}
	t.WriteString("x0 = 1 nm\n")
	for i := 1; i < n; i++ {
		fmt.Fprintf(&t, "x%d = x%d + 0.5 nm\n", i, i-1)
	}
	return t.String()
}

func replay(b *testing.B, text string) {
	files := fstest.MapFS{"x.budget": &fstest.MapFile{Data: []byte(text), Mode: fs.ModePerm}}
	r, err := repl.Replay(context.Background(), repl.Config{Files: files}, "x.budget")
	if err != nil || len(r.Refused) > 0 {
		b.Fatal(err, r)
	}
}

// nowhere is a file that is thrown away.
type nowhere struct{ io.Writer }

func (nowhere) Commit() error { return nil }
func (nowhere) Abort()        {}

func feed(b *testing.B, lines ...string) {
	s := repl.NewSession(repl.Config{Create: func(string) (repl.File, error) { return nowhere{io.Discard}, nil }})
	for _, l := range lines {
		if r := s.Feed(context.Background(), l); r.Err != nil {
			b.Fatal(r.Err)
		}
	}
}

func mirror(b *testing.B, times int) euv.Stack {
	si, err := euv.SolidElement("Si")
	if err != nil {
		b.Fatal(err)
	}
	mo, err := euv.SolidElement("Mo")
	if err != nil {
		b.Fatal(err)
	}
	return euv.Stack{Repeats: []euv.Repeat{euv.Periods(times, euv.Layer{Medium: si, Thickness: 4.15e-9}, euv.Layer{Medium: mo, Thickness: 2.85e-9})}, Substrate: si}
}

func spectrum(b *testing.B, n int) {
	s := mirror(b, 50)
	var e euv.Evaluator
	at, dst := make([]units.Length, n), make([]units.Ratio, n)
	for i := range at {
		at[i] = units.Length(13e-9 + 1e-9*float64(i)/float64(n))
	}
	if err := e.Aim(at, 0, euv.Unpolarised); err != nil {
		b.Fatal(err)
	}
	if err := e.Reflectivity(dst, s); err != nil {
		b.Fatal(err)
	}
}

func bilayers(b *testing.B, n int) {
	s := mirror(b, n)
	for range 200 {
		if _, err := euv.Reflectivity(s, 13.5e-9, 0, euv.Unpolarised, 0); err != nil {
			b.Fatal(err)
		}
	}
}
