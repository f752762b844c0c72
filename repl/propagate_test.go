package repl

import (
	"context"
	"fmt"
	"math"
	"runtime"
	"strings"
	"testing"
	"time"

	"example.com/dosewright/internal/near"
)

// The interval is the shortest one of its coverage: for an exponential-like
// distribution it begins where the density is highest, not at the 2.5 % point.
func TestShortestInterval(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "x = rectangular(0, 1)", "y = -ln(x)")
	d := resultOf[*Distribution](t, s, "propagate y : trials = 1e6")
	// y is exponential: mean 1, standard deviation 1, skewness 2, shortest 95 % from
	// 0 to ln 20; any text on probability.
	near.Abs(t, "mean", d.Mean.SI, 1, 5*d.Tolerance.Mean)
	near.Abs(t, "u", d.Mean.U, 1, 5*d.Tolerance.U)
	near.Abs(t, "skewness", d.Skewness, 2, 0.05)
	near.Abs(t, "low", d.Low, 0, 0.001)
	near.Abs(t, "high", d.High, math.Log(20), 5*d.Tolerance.High)
	half := resultOf[*Distribution](t, s, "propagate y : trials = 1e6, coverage = 50 %")
	near.Abs(t, "high of 50 %", half.High, math.Ln2, 5*half.Tolerance.High)
	if half.Coverage != 0.5 || half.Trials != 1_000_000 || half.Seed != 1 {
		t.Errorf("coverage %v, %d trials, seed %d", half.Coverage, half.Trials, half.Seed)
	}
	// No interval of that coverage is shorter: neither that of equal tails nor any
	// other that the quantiles of an exponential give.
	for _, below := range []float64{0.001, 0.01, 0.025, 0.049} {
		if other := math.Log((1 - below) / (0.05 - below)); other < d.High-d.Low-5*(d.Tolerance.High+d.Tolerance.Low) {
			t.Errorf("an interval that leaves %v below is %v long, this one %v", below, other, d.High-d.Low)
		}
	}
}

// Equal seeds give equal bits on one core and on two; other seeds do not.
func TestSeedsReproduce(t *testing.T) {
	run := func(cores int, seed string) string {
		defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(cores))
		s := throughputSession(t, Config{})
		d := resultOf[*Distribution](t, s, "propagate "+throughputFormula+" : trials = 1e5, seed = "+seed)
		return fmt.Sprintf("%x %x %x %x %x %x", d.Mean.SI, d.Mean.U, d.Skewness, d.Low, d.High, d.Tolerance)
	}
	one := run(1, "7")
	if two := run(2, "7"); two != one {
		t.Errorf("two cores give %s, one gives %s", two, one)
	}
	if again := run(1, "7"); again != one {
		t.Errorf("the second run gives %s, the first gave %s", again, one)
	}
	if other := run(2, "8"); other == one {
		t.Error("another seed gives the same")
	}
	// Defaults are seed 1 and a million trials.
	s := throughputSession(t, Config{})
	a, b := resultOf[*Distribution](t, s, "propagate p*t1"), resultOf[*Distribution](t, s, "propagate p*t1 : seed = 1, trials = 1e6")
	if a.Mean.SI != b.Mean.SI || a.High != b.High || a.Trials != 1_000_000 {
		t.Error("the defaults are not what help says")
	}
}

// What was computed when the context ends is kept, and the reply says so.
func TestInterruptedPropagation(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	defer stop()
	seen := 0
	s := throughputSession(t, Config{Progress: func(_ context.Context, done, total int, unit string) {
		if unit != "trials" || total != 1_000_000 {
			t.Errorf("told of %d of %d %s", done, total, unit)
		}
		if seen = done; done > 100_000 {
			stop()
		}
	}})
	r := s.Feed(ctx, "propagate "+throughputFormula)
	if r.Err != nil {
		t.Fatal(r.Err)
	}
	d := r.Results[0].(*Distribution)
	if d.Trials < 100_000 || d.Trials > 900_000 || d.Trials < seen || d.Asked != 1_000_000 {
		t.Errorf("%d of %d trials are kept, %d were seen", d.Trials, d.Asked, seen)
	}
	if text := printed(r); !strings.Contains(text, fmt.Sprintf("interrupted: %d of 1000000 trials, seed 1", d.Trials)) {
		t.Errorf("the reply does not say that it was interrupted:\n%s", text)
	}
	// A prefix of the whole: the same as if so many had been asked for.
	whole := resultOf[*Distribution](t, throughputSession(t, Config{}), fmt.Sprintf("propagate %s : trials = %d", throughputFormula, d.Trials))
	if whole.Mean.SI != d.Mean.SI || whole.Low != d.Low {
		t.Errorf("interrupted: %v from %v, whole: %v from %v", d.Mean.SI, d.Low, whole.Mean.SI, whole.Low)
	}
	// An end by time is an end like another.
	late, cancel := context.WithDeadline(context.Background(), time.Unix(0, 0))
	defer cancel()
	if r := throughputSession(t, Config{}).Feed(late, "propagate p*t1"); r.Err == nil {
		t.Error("nothing was computed, and yet there is an answer")
	}
}

// An interrupted sweep, search or fit leaves nothing and says why.
func TestInterruptedOthers(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	stop()
	f := inFolder(map[string]string{"t.csv": "x,y\n1,2\n2,4\n3,7\n"})
	s := NewSession(f.config())
	spoken(t, s, `data T = "t.csv"`, "m = 1")
	for _, statement := range []string{"sweep x = 1 .. 2 by 0.1 : x^2", `sweep x = 1 .. 2 by 0.1 : x^2 to "x.csv"`, "solve x^2 = 2 for x in 0 .. 2", "maximise x for x in 0 .. 2", "fit y = m*x over T for m"} {
		if r := s.Feed(ctx, statement); r.Err == nil {
			t.Errorf("%s ran to its end: %s", statement, printed(r))
		}
	}
	if f.MapFS["x.csv"] != nil {
		t.Error("an interrupted sweep leaves a file")
	}
	prints(t, s, "m", "1")
}

// Trials without a value are counted and left out; with many there is no answer.
func TestTrialsWithoutValue(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "x = 3.5 ± 1", "y = 1.0(1)", "z = 0.1 ± 1")
	d := resultOf[*Distribution](t, s, "propagate ln(x) + y : trials = 1e5")
	if d.Failed < 10 || d.Failed > 60 || len(d.Mean.Warnings) == 0 { // P(x ≤ 0) = 2.3e-4
		t.Errorf("%d trials failed: %q", d.Failed, d.Mean.Warnings)
	}
	if w := d.Mean.Warnings[len(d.Mean.Warnings)-1]; !strings.Contains(w, "trials had no value and are left out") {
		t.Errorf("the reply says %q", w)
	}
	r := s.Feed(context.Background(), "propagate ln(z) : trials = 1e5")
	if r.Err == nil || !strings.Contains(r.Err.Error(), "finite") {
		t.Errorf("half of the trials have no value: %v, %s", r.Err, printed(r))
	}
}

// A t-distribution with few degrees of freedom has no standard deviation, and
// one with some has a wider one than its input says (JCGM 101:2008, 6.4.9).
func TestFewDegreesOfFreedom(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "a = 0 ± 1 (nu=5)", "b = 0 ± 1 (nu=2)")
	d := resultOf[*Distribution](t, s, "propagate a : trials = 1e6")
	near.Rel(t, "u of t with 5", d.Mean.U, math.Sqrt(5.0/3), 0.01)
	near.Rel(t, "t_95(5)", d.High-d.Low, 2*2.571, 0.02) // JCGM 100:2008, table G.2
	d = resultOf[*Distribution](t, s, "propagate b : trials = 1e5")
	if len(d.Mean.Warnings) != 1 || !strings.Contains(d.Mean.Warnings[0], "no standard deviation exists") {
		t.Errorf("no warning: %q", d.Mean.Warnings)
	}
}

// The reply, its record and its picture say the same.
func TestDistributionReply(t *testing.T) {
	var shown *Picture
	f := inFolder(nil)
	config := f.config()
	config.Sketch = func(p *Picture, columns int) []string {
		shown = p
		return []string{"a chart " + fmt.Sprint(columns) + " wide"}
	}
	s := NewSession(config)
	spoken(t, s, "w [nm] = rectangular(10 nm, 14 nm)")
	text := printed(spoken(t, s, `propagate 2 * w [nm] : trials = 1e5, seed = 3, plot, to "w.svg"`))
	lines := strings.Split(text, "\n")
	if len(lines) != 7 || !strings.HasPrefix(lines[0], "mean ") || !strings.HasPrefix(lines[1], "standard uncertainty    2.30") || !strings.HasPrefix(lines[3], "shortest 95 % interval  20.") ||
		lines[4] != "100000 trials, seed 3; behind ± stands what is not settled yet" || lines[5] != "a chart 76 wide" || lines[6] != "written: w.svg" {
		t.Errorf("the reply is\n%s", text)
	}
	if shown == nil || shown.Bars == nil || shown.X.Name != "2 * w" || shown.X.Unit != "nm" {
		t.Fatalf("the picture is %+v", shown)
	}
	area := 0.0
	for i, h := range shown.Bars.Density {
		area += h * (shown.Bars.Edges[i+1] - shown.Bars.Edges[i])
	}
	near.Abs(t, "area under the histogram", area, 1, 0.002)
	if f.MapFS["w.svg"] == nil {
		t.Error("no picture was written")
	}
	r := s.Feed(context.Background(), "propagate 2 * w : trials = 1e5, seed = 3").Records()[0]
	d := resultOf[*Distribution](t, s, "propagate 2 * w : trials = 1e5, seed = 3")
	if r.Kind != DistributionRecord || r.Unit != "nm" || r.Trials != 100_000 || r.Coverage != 0.95 || parsed(t, string(r.Low)) != d.Mean.Unit.From(d.Low) {
		t.Errorf("the record is %+v", r)
	}
}

// Between a hundred thousand trials and ten times as many nothing more is kept
// but the values: no allocation per trial.
func TestTrialsAllocateNothing(t *testing.T) {
	s := throughputSession(t, Config{})
	count := func(trials string) float64 {
		return testing.AllocsPerRun(3, func() { spoken(t, s, "propagate "+throughputFormula+" : trials = "+trials) })
	}
	few, many := count("1e5"), count("1e6")
	if many-few > 200 { // of 900 000 trials: some for each chunk of 8192 at most
		t.Errorf("%v allocations for 1e5 trials, %v for 1e6", few, many)
	}
	t.Logf("%v allocations for 1e5 trials, %v for 1e6", few, many)
}
