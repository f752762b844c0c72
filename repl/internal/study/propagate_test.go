package study

import (
	"context"
	"errors"
	"math"
	"runtime"
	"slices"
	"testing"

	"gonum.org/v1/gonum/stat"

	"example.com/dosewright/internal/near"
)

func propagate(t testing.TB, p Program, s *Sources, a Propagation) *Distribution {
	t.Helper()
	d, err := Propagate(context.Background(), p, s, a)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

func sum(x []float64) (float64, error) {
	var y float64
	for _, v := range x {
		y += v
	}
	return y, nil
}

// TestAdditive is JCGM 101:2008, 9.2: four inputs added.
func TestAdditive(t *testing.T) {
	normal := Input{U: 1}
	flat := Input{Shape: Rectangular, Low: -math.Sqrt(3), High: math.Sqrt(3)}
	wide := Input{Shape: Rectangular, Low: -10 * math.Sqrt(3), High: 10 * math.Sqrt(3)}
	for _, c := range []struct {
		id, interval string
		inputs       []Input
	}{
		{"S1-9.2.2", "95 % interval", []Input{normal, normal, normal, normal}},
		{"S1-9.2.3", "95 % interval, exact: ±2√3 (2 - (3/5)^(1/4))", []Input{flat, flat, flat, flat}},
		{"S1-9.2.4", "95 % interval (Monte Carlo)", []Input{flat, flat, flat, wide}},
	} {
		d := propagate(t, program(sum), sources(t, c.inputs), Propagation{Trials: 2_000_000, Seed: 1})
		exact, u := gum(t, c.id, c.interval), gum(t, c.id, "u")
		within := 5 * d.Tolerance.SD
		near.Abs(t, c.id+" u", d.SD, u.recomputed[0], within)
		near.Abs(t, c.id+" mean", d.Mean, 0, 5*d.Tolerance.Mean)
		near.Abs(t, c.id+" low", d.Low, exact.recomputed[0], 5*d.Tolerance.Low)
		near.Abs(t, c.id+" high", d.High, exact.recomputed[1], 5*d.Tolerance.High)
		ends := 15 * d.SD / math.Sqrt(float64(d.Trials)) // five times √(0.025·0.975/M) over a density of 0.058/u
		near.Abs(t, c.id+" symmetric low", d.SymLow, exact.recomputed[0], ends)
		near.Abs(t, c.id+" symmetric high", d.SymHigh, exact.recomputed[1], ends)
		near.Abs(t, c.id+" skewness", d.Skewness, 0, 0.006)
		// A shortest interval is placed loosely; its length is not.
		near.Abs(t, c.id+" length", d.High-d.Low, exact.recomputed[1]-exact.recomputed[0], 2*exact.tolerance)
		t.Logf("%s: u %.4f ± %.1g, [%.3f, %.3f] ± %.2g, exact ±%.3f", c.id, d.SD, d.Tolerance.SD, d.Low, d.High, d.Tolerance.High, exact.recomputed[1])
	}
}

// TestComparisonLoss is JCGM 101:2008, 9.4, in 1e-6.
func TestComparisonLoss(t *testing.T) {
	f := eval(func(x []float64) float64 { return 1e6 * (x[0]*x[0] + x[1]*x[1]) })
	for _, c := range []struct {
		id    string
		x1, r float64
	}{
		{"S1-9.4-r0-x0.0", 0, 0},
		{"S1-9.4-r0-x0.01", 0.01, 0},
		{"S1-9.4-r0-x0.05", 0.05, 0},
		{"S1-9.4-r0.9-x0.0", 0, 0.9},
		{"S1-9.4-r0.9-x0.05", 0.05, 0.9},
	} {
		s := sources(t, []Input{{Value: c.x1, U: 0.005}, {U: 0.005}}, Correlation{0, 1, c.r})
		d := propagate(t, program(f), s, Propagation{Trials: 2_000_000, Seed: 20080901})
		mean, u, short := gum(t, c.id, "Monte Carlo estimate / 1e-6"), gum(t, c.id, "u / 1e-6"), gum(t, c.id, "shortest 95 % / 1e-6")
		near.Abs(t, c.id+" mean", d.Mean, mean.published[0], mean.tolerance)
		near.Abs(t, c.id+" u", d.SD, u.published[0], u.tolerance)
		near.Abs(t, c.id+" low", d.Low, short.published[0], short.tolerance)
		near.Abs(t, c.id+" high", d.High, short.published[1], short.tolerance)
		near.Abs(t, c.id+" mean, exact", d.Mean, 1e6*c.x1*c.x1+50, 5*d.Tolerance.Mean)
		t.Logf("%s: %.2f, u %.2f, [%.2f, %.1f], published %v %v %v", c.id, d.Mean, d.SD, d.Low, d.High, mean.published, u.published, short.published)
	}
}

// TestReproducible: the same bits on one core and on two, whatever is watched.
func TestReproducible(t *testing.T) {
	s := sources(t, []Input{
		{Value: 1, U: 0.1},
		{Shape: Rectangular, Low: 2, High: 3},
		{Shape: Triangular, Low: 0, High: 1},
		{Value: 5, U: 0.1, DoF: 4},
		{Value: 6, U: 0.2},
		{Value: 7, U: 0.3},
		Exact(2),
	}, Correlation{4, 5, -0.7})
	f := program(eval(func(x []float64) float64 { return x[0]*x[1] + x[2]*x[3] - x[4]*x[5]*x[6] }))
	asked := Propagation{Trials: 100_001, Seed: 42}
	before := runtime.GOMAXPROCS(1)
	one := propagate(t, f, s, asked)
	runtime.GOMAXPROCS(2)
	two := propagate(t, f, s, asked)
	runtime.GOMAXPROCS(7)
	seven := propagate(t, f, s, asked)
	runtime.GOMAXPROCS(before)
	for _, d := range []*Distribution{two, seven} {
		if !slices.Equal(d.Histogram.Counts, one.Histogram.Counts) {
			t.Error("the histograms differ")
		}
		if bits(d) != bits(one) {
			t.Errorf("%v\n%v", bits(d), bits(one))
		}
	}
	asked.Seed++
	if other := propagate(t, f, s, asked); other.Mean == one.Mean {
		t.Error("another seed gives the same mean")
	}
}

func bits(d *Distribution) (b [8]uint64) {
	for i, x := range []float64{d.Mean, d.SD, d.Skewness, d.Low, d.High, d.SymLow, d.Tolerance.High, d.Histogram.Low} {
		b[i] = math.Float64bits(x)
	}
	return b
}

// TestInputsAreDrawnAsTold compares moments of single inputs with closed forms.
func TestInputsAreDrawnAsTold(t *testing.T) {
	for _, c := range []struct {
		what           string
		in             Input
		mean, sd, half float64 // half: of the 95 % interval
	}{
		{"normal", Input{Value: 3, U: 2}, 3, 2, 2 * 1.959963984540054},
		{"rectangular", Input{Shape: Rectangular, Low: 1, High: 5}, 3, 4 / math.Sqrt(12), 1.9},
		{"triangular", Input{Shape: Triangular, Low: 1, High: 5}, 3, 2 / math.Sqrt(6), 2 * (1 - math.Sqrt(0.05))},
		{"t, 5", Input{Value: 3, U: 2, DoF: 5}, 3, 2 * math.Sqrt(5.0/3), 0},
		{"t, 50.5", Input{Value: 3, U: 2, DoF: 50.5}, 3, 2 * math.Sqrt(50.5/48.5), 0},
	} {
		d := propagate(t, program(sum), sources(t, []Input{c.in}), Propagation{Trials: 1_000_000, Seed: 3})
		if c.half == 0 {
			k, err := CoverageFactor(0.95, c.in.DoF)
			if err != nil {
				t.Fatal(err)
			}
			c.half = k * c.in.U
		}
		near.Abs(t, c.what+" mean", d.Mean, c.mean, 5*c.sd/1000)
		near.Rel(t, c.what+" sd", d.SD, c.sd, 0.006)
		near.Rel(t, c.what+" interval", (d.SymHigh-d.SymLow)/2, c.half, 0.006)
		if d.NoSpread {
			t.Errorf("%s has a standard deviation", c.what)
		}
	}
	for _, nu := range []float64{1, minimumDoF} { // no mean, but quantiles
		d := propagate(t, program(sum), sources(t, []Input{{U: 1, DoF: nu}}), Propagation{Trials: 1_000_000, Seed: 3})
		k, err := CoverageFactor(0.95, nu)
		if err != nil {
			t.Fatal(err)
		}
		near.Rel(t, "interval without moments", d.SymHigh, k, 0.03)
		if !d.NoSpread {
			t.Error("no spread exists, and this must be said")
		}
	}
}

// TestCorrelatedDraws looks at the drawn numbers themselves.
func TestCorrelatedDraws(t *testing.T) {
	want := [][]float64{{1, 0.5, -0.3}, {0.5, 1, 0.2}, {-0.3, 0.2, 1}}
	for _, nu := range []float64{0, 8} {
		in := Input{U: 1, DoF: nu}
		s := sources(t, []Input{in, Exact(9), in, in}, Correlation{0, 2, 0.5}, Correlation{0, 3, -0.3}, Correlation{3, 2, 0.2})
		d := newDrawer(s)
		d.begin(1, 0)
		all := make([][]float64, 3)
		for range 400 {
			d.draw(BlockSize)
			for k, slot := range []int{0, 2, 3} {
				all[k] = append(all[k], d.lanes[slot]...)
			}
		}
		for i := range all {
			for j := range all {
				near.Abs(t, "correlation", stat.Correlation(all[i], all[j], nil), want[i][j], 0.012)
			}
		}
	}
	x := Input{Value: 1, U: 0.1}
	same := propagate(t, program(eval(func(x []float64) float64 { return x[0] - x[1] })),
		sources(t, []Input{x, x}, Correlation{0, 1, 1}), Propagation{Trials: 10_000})
	near.Abs(t, "difference of what is one", same.SD, 0, 1e-15)
}

func TestDrawRefused(t *testing.T) {
	x, flat := Input{Value: 1, U: 0.1}, Input{Shape: Rectangular, High: 1}
	few := Input{Value: 1, U: 0.1, DoF: 4}
	for _, inputs := range [][]Input{{x, flat}, {flat, flat}, {x, few}} {
		s := sources(t, inputs, Correlation{0, 1, 0.5})
		if _, err := Propagate(context.Background(), program(sum), s, Propagation{}); !errors.Is(err, ErrCorrelation) {
			t.Errorf("%v: %v", inputs, err)
		}
	}
	s := sources(t, []Input{x})
	for _, c := range []struct {
		a     Propagation
		cause error
	}{
		{Propagation{Trials: MaxTrials + 1}, ErrSize},
		{Propagation{Trials: 1000}, ErrRange},
		{Propagation{Trials: -1}, ErrRange},
		{Propagation{Coverage: 1}, ErrRange},
		{Propagation{Coverage: 0.99999}, ErrRange},
		{Propagation{Bins: -1}, ErrSize},
	} {
		if _, err := Propagate(context.Background(), program(sum), s, c.a); !errors.Is(err, c.cause) {
			t.Errorf("%+v: %v", c.a, err)
		}
	}
}

// TestCancelled: what stands is a prefix, the same as asking for no more.
func TestCancelled(t *testing.T) {
	s := sources(t, []Input{{Value: 1, U: 0.1}, {Value: 2, U: 0.1}})
	ctx, cancel := context.WithCancel(context.Background())
	d, err := Propagate(ctx, program(sum), s, Propagation{Trials: 3_000_000, Seed: 5, Watch: func(r Running) {
		if r.Trials == 5*chunkTrials {
			cancel()
		}
	}})
	if !errors.Is(err, context.Canceled) || d == nil || d.Asked != 3_000_000 {
		t.Fatalf("%+v, %v", d, err)
	}
	if d.Trials < 5*chunkTrials || d.Trials > 2_000_000 || d.Trials%chunkTrials != 0 {
		t.Errorf("%d trials", d.Trials)
	}
	whole := propagate(t, program(sum), s, Propagation{Trials: d.Trials, Seed: 5})
	if bits(whole) != bits(d) {
		t.Error("the trials are not a prefix")
	}
	if d, err := Propagate(ctx, program(sum), s, Propagation{}); d != nil || !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled before: %v, %v", d, err)
	}
}

// TestFailedTrials: a few are left out and counted, many refuse.
func TestFailedTrials(t *testing.T) {
	within := func(limit float64) Eval {
		return func(x []float64) (float64, error) {
			if x[0] > limit {
				return 0, errDomain
			}
			return x[0], nil
		}
	}
	s := sources(t, []Input{{U: 1}})
	d := propagate(t, program(within(3.5)), s, Propagation{Trials: 500_000, Seed: 1})
	if d.Failed < 80 || d.Failed > 160 || !errors.Is(d.Failure, errDomain) { // 2.33e-4 expected
		t.Errorf("%d failed, %v", d.Failed, d.Failure)
	}
	total := d.Histogram.Below + d.Histogram.Above
	for _, n := range d.Histogram.Counts {
		total += n
	}
	if total != d.Trials-d.Failed {
		t.Errorf("the histogram holds %d of %d", total, d.Trials-d.Failed)
	}
	near.Abs(t, "mean without them", d.Mean, -0.00087, 0.006) // −φ(3.5)/Φ(3.5)
	if _, err := Propagate(context.Background(), program(within(2)), s, Propagation{}); !errors.Is(err, errDomain) {
		t.Errorf("many failed: %v", err)
	}
	all := eval(func(x []float64) float64 { return 1 / (x[0] - x[0]) })
	if _, err := Propagate(context.Background(), program(all), s, Propagation{}); !errors.Is(err, ErrNotFinite) {
		t.Errorf("no value at all: %v", err)
	}
}

func TestConstantOutput(t *testing.T) {
	d := propagate(t, program(eval(func([]float64) float64 { return 7 })), sources(t, []Input{{U: 1}}), Propagation{Trials: 20_000})
	if d.Mean != 7 || d.SD != 0 || d.Low != 7 || d.High != 7 || d.Skewness != 0 || !slices.Equal(d.Histogram.Counts, []int{20_000}) {
		t.Errorf("%+v", d)
	}
}

// TestToleranceIsHonest: over many seeds the results scatter as they say.
func TestToleranceIsHonest(t *testing.T) {
	for _, c := range []struct {
		what string
		in   []Input
	}{
		{"normal", []Input{{U: 1}}},
		{"skew", []Input{{Value: 0, U: 1}, {U: 1}}},
	} {
		f := eval(func(x []float64) float64 {
			if len(x) == 1 {
				return x[0]
			}
			return x[0]*x[0] + x[1]*x[1]
		})
		var mean, sd, low, high moments
		var told Tolerance
		const runs = 60
		for seed := range uint64(runs) {
			d := propagate(t, program(f), sources(t, c.in), Propagation{Trials: 20 * chunkTrials, Seed: seed})
			mean.add(d.Mean)
			sd.add(d.SD)
			low.add(d.Low)
			high.add(d.High)
			told.Mean += d.Tolerance.Mean / runs
			told.SD += d.Tolerance.SD / runs
			told.Low += d.Tolerance.Low / runs
			told.High += d.Tolerance.High / runs
		}
		t.Logf("%s: told %+v, seen %.2g %.2g %.2g %.2g", c.what, told, mean.sd(), sd.sd(), low.sd(), high.sd())
		near.Rel(t, c.what+" mean", told.Mean, mean.sd(), 0.35)
		near.Rel(t, c.what+" sd", told.SD, sd.sd(), 0.35)
		for _, end := range [][2]float64{{told.Low, low.sd()}, {told.High, high.sd()}} {
			if end[0] < end[1]/1.5 { // a distribution that begins at a cliff settles faster than told
				t.Errorf("%s: an end is told to %.2g and scatters by %.2g", c.what, end[0], end[1])
			}
			if c.what == "normal" {
				near.Rel(t, c.what+" end", end[0], end[1], 0.4)
			}
		}
	}
}

// TestMoments compares with certified values (NIST StRD, univariate), whole and
// merged from parts.
func TestMoments(t *testing.T) {
	var file struct {
		Univariate []struct {
			Name      string
			Certified map[string]decimal
			Data      []decimal
		}
	}
	published(t, "statistics.json", &file)
	seen := 0
	for _, set := range file.Univariate {
		if len(set.Data) == 0 {
			continue
		}
		seen++
		var sample []float64
		for _, x := range set.Data {
			sample = append(sample, float64(x))
		}
		for _, part := range []int{len(sample), 7} {
			var m moments
			for rest := sample; len(rest) > 0; {
				n := min(part, len(rest))
				m.merge(momentsOf(rest[:n]))
				rest = rest[n:]
			}
			near.Rel(t, set.Name+" mean", m.mean, float64(set.Certified["mean"]), 1e-14)
			near.Rel(t, set.Name+" sd", m.sd(), float64(set.Certified["sd_n_minus_1"]), 1e-9)
			near.Abs(t, set.Name+" skewness", m.skewness(), skewness(sample), 1e-6)
		}
	}
	if seen < 5 {
		t.Errorf("%d sets", seen)
	}
}

// skewness is the slow oracle.
func skewness(sample []float64) float64 {
	mean := stat.Mean(sample, nil)
	var m2, m3 float64
	for _, x := range sample {
		m2 += (x - mean) * (x - mean)
		m3 += (x - mean) * (x - mean) * (x - mean)
	}
	n := float64(len(sample))
	return m3 / n / math.Pow(m2/n, 1.5)
}

func TestSortEnds(t *testing.T) {
	r := newStream()
	r.begin(1, 1)
	for range 300 {
		y := make([]float64, 1+r.IntN(5000))
		for i := range y {
			y[i] = math.Floor(r.NormFloat64() * math.Pow(10, float64(r.IntN(4))))
		}
		want := slices.Clone(y)
		slices.Sort(want)
		tail := r.IntN(len(y)/2 + 1)
		e := sortEnds(y, tail)
		n := len(y)
		if !slices.Equal(e.y[:tail], want[:tail]) || !slices.Equal(e.y[n-tail:], want[n-tail:]) {
			t.Fatalf("n %d, tail %d", n, tail)
		}
		slices.Sort(y)
		if !slices.Equal(y, want) {
			t.Fatal("values were lost")
		}
	}
}

func TestPropagateDoesNotAllocatePerTrial(t *testing.T) {
	s := sources(t, []Input{{U: 1}, {U: 1, DoF: 3}, {U: 1}, {U: 1}}, Correlation{2, 3, 0.5})
	count := func(trials int) float64 {
		return testing.AllocsPerRun(3, func() { propagate(t, program(sum), s, Propagation{Trials: trials}) })
	}
	few, many := count(20_000), count(400_000)
	if many > few+50 {
		t.Errorf("%g allocations for 20 000 trials, %g for 400 000", few, many)
	}
}
