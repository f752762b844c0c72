package euv

import (
	"math"
	"runtime"
	"sync"
	"testing"
	"time"

	"example.com/dosewright/units"
)

// Light on a mirror of 50 bilayers with a cap, 101 interfaces, at 20,000
// wavelengths whose indices have been found before.
const speedPoints = 20_000

type speedCase struct {
	name  string
	angle units.Angle
	rough units.Length
	limit float64 // ns a wavelength on one core that has nothing else to do
}

var speedCases = []speedCase{
	{"smooth", 0, 0, 150},
	{"rough, 6°, unpolarised", degrees(6), 0.4 * nm, 300},
}

// aimed is an evaluator that has found the indices, and its question.
func (c speedCase) aimed(t testing.TB) func() {
	var body Body = mirror(t, 50, 6.95*nm, 2.5*nm).WithRoughness(c.rough)
	dst := make([]units.Ratio, speedPoints)
	e := new(Evaluator)
	if err := e.Aim(grid(speedPoints), c.angle, Unpolarised); err != nil {
		t.Fatal(err)
	}
	ask := func() {
		if err := e.Reflectivity(dst, body); err != nil {
			t.Fatal(err)
		}
	}
	ask()
	return ask
}

// BenchmarkMirror prints the nanoseconds a wavelength of the fastest round,
// which other work on the machine disturbs least, how many times faster that is
// than the recursion by hand, and what two goroutines gain.
func BenchmarkMirror(b *testing.B) {
	var index [3]Index
	for i, symbol := range []string{"Ru", "Si", "Mo"} {
		index[i] = sure(solid(b, symbol).Index(13.5 * nm))
	}
	wavelengths, sum := grid(speedPoints), 0.0
	byHand := fastest(20, func() {
		for _, l := range wavelengths {
			sum += plainRecursion(float64(l), 50, [3]float64{2.5e-9, 0.6 * 6.95e-9, 0.4 * 6.95e-9}, index)
		}
	}) / speedPoints
	if !(sum > 0) {
		b.Fatal("the recursion reflects nothing")
	}
	for _, c := range speedCases {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			ask, least := c.aimed(b), math.Inf(1)
			for b.Loop() {
				least = min(least, fastest(1, ask)/speedPoints)
			}
			b.ReportMetric(least, "best-ns/wavelength")
			b.ReportMetric(c.limit, "limit-ns/wavelength")
			b.ReportMetric(byHand/least, "x-by-hand")
		})
	}
	b.Run("two cores", func(b *testing.B) {
		if runtime.GOMAXPROCS(0) < 2 {
			b.Skip("one core only")
		}
		asks := []func(){speedCases[0].aimed(b), speedCases[0].aimed(b)}
		one, two := math.Inf(1), math.Inf(1)
		for b.Loop() {
			one = min(one, fastest(20, asks[0]))
			two = min(two, fastest(20, func() {
				var both sync.WaitGroup
				for _, ask := range asks {
					both.Go(ask)
				}
				both.Wait()
			}))
		}
		b.ReportMetric(2*one/two, "x-one-core")
	})
}

// fastest is the time of the fastest of some rounds, in ns.
func fastest(rounds int, f func()) float64 {
	least := math.Inf(1)
	for range rounds {
		start := time.Now()
		f()
		least = min(least, float64(time.Since(start).Nanoseconds()))
	}
	return least
}

// Asking again allocates nothing, however many wavelengths there are.
func TestMirrorAllocatesNothing(t *testing.T) {
	for _, c := range speedCases {
		if n := testing.AllocsPerRun(3, c.aimed(t)); n != 0 {
			t.Errorf("%s: %g allocations for %d wavelengths", c.name, n, speedPoints)
		}
	}
}

// The spectrum agrees with the recursion, layer by layer, at every place.
func TestMirrorAgreesWithRecursion(t *testing.T) {
	worst := 0.0
	for _, c := range speedCases {
		s := mirror(t, 50, 6.95*nm, 2.5*nm).WithRoughness(c.rough)
		wavelengths := grid(400)
		dst := make([]units.Ratio, len(wavelengths))
		var e Evaluator
		if err := e.Aim(wavelengths, c.angle, Unpolarised); err != nil {
			t.Fatal(err)
		}
		if err := e.Reflectivity(dst, s); err != nil {
			t.Fatal(err)
		}
		for i, l := range wavelengths {
			off := math.Abs(float64(dst[i]) - recursion(t, s, l, c.angle, Unpolarised))
			worst = max(worst, off)
		}
	}
	if !(worst <= 1e-12) {
		t.Errorf("the largest difference is %g", worst)
	}
	t.Logf("largest difference %.2g", worst)
}
