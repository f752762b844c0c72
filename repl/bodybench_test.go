package repl

import (
	"context"
	"math"
	"testing"
	"time"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
)

const trainOfEleven = "chain train\n  band: 13.5 nm, 2 %\n  at IF\n  mirror x11: reflectivity(rough_mirror, λ, 6 deg)\n  at WAFER\nend"

// BenchmarkBodies prints what questions about mirrors cost through the language,
// reading the statement included; best is the fastest round, which other work on
// the machine disturbs least.
func BenchmarkBodies(b *testing.B) {
	for name, c := range map[string]struct {
		statement string
		limit     float64 // ms
	}{
		"band of eleven mirrors": {"transmission(train, IF, WAFER)", 2},
		"one reflectivity":       {"reflectivity(rough_mirror, 13.5 nm, 6 deg)", 0},
		"peak":                   {"peak_reflectivity(rough_mirror)", 0},
		"sweep of a band":        {"sweep s = 0 nm .. 1 nm, 101 points : transmission(open_train, IF, WAFER)", 0},
		"propagate a band":       {"propagate transmission(open_train, IF, WAFER) : trials = 2000", 0},
	} {
		b.Run(name, func(b *testing.B) {
			s := NewSession(Config{})
			spoken(b, s, mirrorBlock, trainOfEleven, "s = 0.7 nm ± 0.1 nm",
				"stack open_mirror\n  bilayer x50: Si 4.17 nm, Mo 2.78 nm\n  roughness: s\n  substrate: Si\nend",
				"chain open_train\n  band: 13.5 nm, 2 %\n  at IF\n  mirror x11: reflectivity(open_mirror, λ, 6 deg)\n  at WAFER\nend")
			least := math.Inf(1)
			for b.Loop() {
				start := time.Now()
				if r := s.Feed(context.Background(), c.statement); r.Err != nil {
					b.Fatal(r.Err)
				}
				least = min(least, time.Since(start).Seconds()*1e3)
			}
			b.ReportMetric(least, "best-ms")
			if c.limit > 0 {
				b.ReportMetric(c.limit, "limit-ms")
			}
		})
	}
}

// The band of eleven mirrors is right to 1e-6 and better, in one call of the
// statement.
func TestBandOfElevenIsSettled(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, mirrorBlock, trainOfEleven)
	mirror := euv.ReflectivityOf(mirrorStack(t, 0.7e-9), 6*math.Pi/180, euv.Unpolarised)
	want := midpoints(t, 13.5e-9, 0.27e-9, flat, times(mirror, 11)...)
	v := valued(t, s, "transmission(train, IF, WAFER)")
	near.Rel(t, "eleven mirrors", v.SI, want, 1e-6)
	if len(v.Warnings) != 0 {
		t.Errorf("warnings %q", v.Warnings)
	}
}
