package repl_test

import (
	"context"
	"errors"
	"math"
	"math/rand/v2"
	"runtime"
	"strconv"
	"sync"
	"sync/atomic"
	"testing"
	"testing/fstest"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

func frozen(t testing.TB, config repl.Config, texts ...string) *repl.Frozen {
	t.Helper()
	z, err := defined(t, config, texts...).Freeze(t.Context())
	if err != nil {
		t.Fatal(err)
	}
	return z
}

// What the session does later does not reach what is frozen, and the other way
// round.
func TestFrozenStays(t *testing.T) {
	s := defined(t, repl.Config{}, "x = 2 nm", "y = 3 * x")
	z, err := s.Freeze(t.Context())
	if err != nil {
		t.Fatal(err)
	}
	f, err := z.Compile("y + z", repl.InputOf[units.Length]("z"))
	if err != nil {
		t.Fatal(err)
	}
	own := z.Session()
	for _, c := range []*repl.Session{s, own} {
		if err := c.Define(t.Context(), "x = 5 nm"); err != nil {
			t.Fatal(err)
		}
		if v, err := c.Eval(t.Context(), "y"); err != nil || v.Text(5) != "15 nm" {
			t.Errorf("y is %v (%v)", v, err)
		}
	}
	if v, err := z.Eval(t.Context(), "y"); err != nil || v.Text(5) != "6 nm" {
		t.Errorf("frozen y is %v (%v)", v, err)
	}
	if q, err := f.Run(units.Of(units.Length(1e-9))); err != nil || !near.Within(q.SI(), 7e-9, 1e-15) {
		t.Errorf("the formula gives %v (%v)", q, err)
	}
}

func TestFormula(t *testing.T) {
	z := frozen(t, repl.Config{}, line3...)
	// dose is a name of the session, fields is new.
	f, err := z.Compile("throughput(dose, fields, 8.58 cm^2/field, P * 2 %, overhead) [wafer/h]",
		repl.InputOf[units.Fluence]("dose"), repl.InputOf[units.FieldsPerWafer]("fields"))
	if err != nil {
		t.Fatal(err)
	}
	if in := f.Inputs(); len(in) != 2 || in[0].Plane != "WAFER" || in[1].Plane != "" || f.Plane() != "" || f.Dimension() != units.DimensionOf[units.Throughput]() {
		t.Errorf("inputs %+v, result %s at %q", in, f.Dimension(), f.Plane())
	}
	for _, dose := range []units.Fluence{200, 300, 400} {
		q, err := f.Run(units.Of(dose), units.Of(units.FieldsPerWafer(96)))
		if err != nil {
			t.Fatal(err)
		}
		near.Rel(t, "wph", q.SI(), line3ByHand(float64(dose)), 1e-14)
	}
	v, err := f.Value(units.Of(units.Fluence(300)), units.Of(units.FieldsPerWafer(96)))
	if err != nil || v.Unit.String() != "wafer/h" {
		t.Fatalf("%v, %v", v, err)
	}
	near.Rel(t, "wph", v.Number(), 3600*line3ByHand(300), 1e-14)
}

// An input replaces a name in all that rests on it, chains included.
func TestFormulaThroughNames(t *testing.T) {
	z := frozen(t, repl.Config{}, "R = 50 %", "chain pair\n  at IF\n  mirror x2: R\n  at WAFER\nend", "P = carry(8 W at IF, pair, WAFER)", "twice = 2 * P")
	f, err := z.Compile("twice", repl.InputOf[units.Ratio]("R"))
	if err != nil {
		t.Fatal(err)
	}
	q, err := f.Run(units.Of(units.Ratio(0.25)))
	if err != nil || f.Plane() != "WAFER" {
		t.Fatalf("at %s, %v", f.Plane(), err)
	}
	near.Rel(t, "twice the power behind two mirrors of 25 %", q.SI(), 2*8*0.25*0.25, 1e-15)
}

func TestFormulaWarns(t *testing.T) {
	z := frozen(t, repl.Config{}, "T0 = 22 degC")
	f, err := z.Compile("T0 * 2", repl.InputOf[units.Temperature]("T0"))
	if err != nil || len(f.Warnings()) != 1 {
		t.Fatalf("%v, warnings %q", err, f.Warnings())
	}
	v, err := f.Value(units.Of(units.Temperature(300)))
	if err != nil || len(v.Warnings) != 1 {
		t.Fatalf("%v, %v", v, err)
	}
	near.Rel(t, "twice 300 K", v.SI, 600, 1e-15)
}

func TestCompileRefuses(t *testing.T) {
	z := frozen(t, repl.Config{}, append(line3, "list = {1, 2}")...)
	length := func(name string) repl.Input { return repl.InputOf[units.Length](name) }
	for _, c := range []struct {
		text  string
		in    []repl.Input
		cause error
	}{
		{"x + ", []repl.Input{length("x")}, nil},
		{"x = 3", []repl.Input{length("x")}, nil},
		{"x + y", []repl.Input{length("x")}, repl.ErrUnknown},
		{"x + 1 W", []repl.Input{length("x")}, units.ErrDimension},
		{"x + P", []repl.Input{repl.InputOf[units.Power]("x").At("IF")}, repl.ErrPlane},
		{"dose", []repl.Input{length("dose")}, units.ErrDimension},
		{"dose", []repl.Input{repl.InputOf[units.Fluence]("dose").At("MASK")}, repl.ErrPlane},
		{"x", []repl.Input{length("x"), length("x")}, nil},
		{"1", []repl.Input{length("")}, nil},
		{"1", []repl.Input{length("2x")}, nil},
		{"1", []repl.Input{length("check")}, nil},
		{"1", []repl.Input{length("pi")}, nil},
		{"1", []repl.Input{length("throughput")}, nil},
		{"1", []repl.Input{length("list")}, nil},
		{"1", []repl.Input{length("pair")}, nil},
		{"list", nil, nil},
		{"pair", nil, nil},
		{"1 / 0", nil, repl.ErrDivision},
	} {
		f, err := z.Compile(c.text, c.in...)
		if err == nil && c.cause == repl.ErrDivision {
			_, err = f.Run()
		}
		var bad *repl.Refusal
		if !errors.As(err, &bad) || c.cause != nil && !errors.Is(err, c.cause) || bad.WayOn() == "" {
			t.Errorf("%s with %+v: %v, want %v", c.text, c.in, err, c.cause)
		}
	}
}

func TestRunRefuses(t *testing.T) {
	z := frozen(t, repl.Config{})
	f, err := z.Compile("1 nm / x", repl.InputOf[units.Length]("x"))
	if err != nil {
		t.Fatal(err)
	}
	one := units.Of(units.Length(1e-9))
	for _, c := range []struct {
		values []units.Quantity
		cause  error
	}{
		{nil, nil},
		{[]units.Quantity{one, one}, nil},
		{[]units.Quantity{units.Of(units.Power(1))}, units.ErrDimension},
		{[]units.Quantity{units.Of(units.Length(0))}, repl.ErrDivision},
		{[]units.Quantity{units.Of(units.Length(math.NaN()))}, repl.ErrNotFinite},
		{[]units.Quantity{units.Of(units.Length(5e-324))}, repl.ErrNotFinite},
	} {
		var bad *repl.Refusal
		if q, err := f.Run(c.values...); !errors.As(err, &bad) || c.cause != nil && !errors.Is(err, c.cause) {
			t.Errorf("%v: %v, %v, want %v", c.values, q, err, c.cause)
		}
		if v, err := f.Value(c.values...); err == nil {
			t.Errorf("%v: the value %v", c.values, v)
		}
	}
	if q, err := f.Run(one); err != nil || !near.Within(q.SI(), 1, 1e-15) {
		t.Errorf("after refusals: %v, %v", q, err)
	}
	if _, err := f.Runner().SI(1, 2); err == nil {
		t.Error("a runner takes two values for one input")
	}
}

// Rows give bit for bit what single runs give, at every length.
func TestRunSIAgrees(t *testing.T) {
	f := estimator(t)
	random := rand.New(rand.NewPCG(3, 4))
	for _, n := range []int{0, 1, 2, 511, 512, 513, 3000} {
		in := estimateRows(n)
		for k := range in {
			for i := range in[k] {
				in[k][i] *= 0.5 + random.Float64()
			}
		}
		dst := make([]float64, n)
		if done, err := f.RunSI(t.Context(), dst, in); err != nil || done != n {
			t.Fatalf("%d rows: %d, %v", n, done, err)
		}
		r, v := f.Runner(), make([]float64, len(in))
		for i := range dst {
			for k := range in {
				v[k] = in[k][i]
			}
			y, err := r.SI(v...)
			if err != nil || math.Float64bits(y) != math.Float64bits(dst[i]) {
				t.Fatalf("row %d of %d: %v, alone %v (%v)", i, n, dst[i], y, err)
			}
			near.Rel(t, "by hand", y, estimateByHand(v[0], v[1], v[2], v[3], v[4], v[5], v[6], v[7]), 1e-14)
		}
	}
}

func TestRunSIStops(t *testing.T) {
	z := frozen(t, repl.Config{})
	f, err := z.Compile("1 nm / x", repl.InputOf[units.Length]("x"))
	if err != nil {
		t.Fatal(err)
	}
	x, dst := make([]float64, 2000), make([]float64, 2000)
	for i := range x {
		x[i] = 1e-9
	}
	x[700], x[1500] = 0, math.NaN()
	n, err := f.RunSI(t.Context(), dst, [][]float64{x})
	if n != 700 || !errors.Is(err, repl.ErrDivision) {
		t.Fatalf("stops at %d: %v, want 700", n, err)
	}
	near.Rel(t, "the last with a value", dst[699], 1, 1e-15)
	for i, y := range dst[700:] {
		if y != 0 {
			t.Fatalf("behind it, row %d is %v", 700+i, y)
		}
	}
	n, err = f.RunSI(t.Context(), dst[701:], [][]float64{x[701:]})
	if n != 1500-701 || !errors.Is(err, repl.ErrNotFinite) {
		t.Errorf("goes on to %d: %v, want %d", n, err, 1500-701)
	}
	ended, cancel := context.WithCancel(t.Context())
	cancel()
	if n, err := f.RunSI(ended, dst, [][]float64{x}); n != 0 || !errors.Is(err, context.Canceled) {
		t.Errorf("with an ended context: %d, %v", n, err)
	}
	for _, in := range [][][]float64{nil, {x, x}, {x[1:]}} {
		if n, err := f.RunSI(t.Context(), dst, in); n != 0 || err == nil {
			t.Errorf("%d rows of inputs: %d, %v", len(in), n, err)
		}
	}
}

func TestRunsAllocateNothing(t *testing.T) {
	if raceDetected {
		t.Skip("the race detector drops what a pool keeps")
	}
	f := estimator(t)
	q, v, r := estimateQuantities(), estimateValues(), f.Runner()
	in, dst := estimateRows(2000), make([]float64, 2000)
	for what, run := range map[string]func() error{
		"Run":   func() error { return errOf(f.Run(q...)) },
		"SI":    func() error { return errOf(r.SI(v...)) },
		"RunSI": func() error { return errOf(f.RunSI(context.Background(), dst, in)) },
	} {
		if n := testing.AllocsPerRun(1000, func() {
			if err := run(); err != nil {
				t.Fatal(err)
			}
		}); n != 0 {
			t.Errorf("%s allocates %v times", what, n)
		}
	}
}

// workers are how many goroutines share what is frozen.
const workers = 8

// together runs the same on many goroutines.
func together(t *testing.T, work func(worker int) error) {
	t.Helper()
	var all sync.WaitGroup
	for w := range workers {
		all.Go(func() {
			if err := work(w); err != nil {
				t.Errorf("worker %d: %v", w, err)
			}
		})
	}
	all.Wait()
}

// Many goroutines ask one frozen session everything; the race detector looks
// on. Every answer is that of the session alone.
func TestFrozenTogether(t *testing.T) {
	z := frozen(t, repl.Config{Files: fstest.MapFS{}}, append(line3,
		"stack std\n  bilayer x10: Si 4.15 nm, Mo 2.85 nm\n  substrate: Si\nend",
		"chain wide\n  at IF\n  mirror: reflectivity(std, λ)\n  at WAFER\n  band: 13.5 nm, 2 %\nend",
		"T_wide = transmission(wide, IF, WAFER)", "d = 30 mJ/cm^2 ± 2 %", "E = d * 1 cm^2", "case hot : d = 40 mJ/cm^2")...)
	f, err := z.Compile("throughput(dose, 96 field/wafer, 8.58 cm^2/field, P * 2 %, overhead)", repl.InputOf[units.Fluence]("dose"))
	if err != nil {
		t.Fatal(err)
	}
	wide, err := z.Compile("transmission(wide, IF, WAFER) * x", repl.InputOf[units.Ratio]("x"))
	if err != nil {
		t.Fatal(err)
	}
	ctx := t.Context()
	ask := func(w int) (string, error) {
		var said string
		for _, text := range []string{"wph", "T_wide", "E", "reflectivity(std, 13.5 nm)", "photon_energy(13.5 nm)", "P_IF / 3", "transmission(wide, IF, WAFER)"} {
			v, err := z.Eval(ctx, text)
			if err != nil {
				return "", err
			}
			said += v.Text(12) + "\n"
		}
		for _, err := range []error{
			errOf(z.Check(ctx, "wph >= 1 wafer/h")), errOf(z.Explain(ctx, "wph")), errOf(z.Budget(ctx, "E")),
			errOf(z.Sweep(ctx, "dose = 20 mJ/cm^2 .. 40 mJ/cm^2 600 points : wph")), errOf(z.Solve(ctx, "wph = 80 wafer/h for dose in 10 mJ/cm^2 .. 90 mJ/cm^2")),
			errOf(z.Maximise(ctx, "wph for dose in 20 mJ/cm^2 .. 40 mJ/cm^2")), errOf(z.Minimise(ctx, "wph for dose in 20 mJ/cm^2 .. 40 mJ/cm^2")),
			errOf(z.Compare(ctx, "E : base, hot")), errOf(z.Propagate(ctx, "E : trials = 1e4")), z.Session().Define(ctx, "wph2 = wph * 2"),
		} {
			if err != nil {
				return "", err
			}
		}
		q, err := f.Run(units.Of(units.Fluence(300)))
		if err != nil {
			return "", err
		}
		said += q.String()
		dst, in := make([]float64, 700), [][]float64{make([]float64, 700)}
		for i := range in[0] {
			in[0][i] = 300
		}
		if _, err := f.RunSI(ctx, dst, in); err != nil {
			return "", err
		}
		v, err := wide.Value(units.Of(units.Ratio(2)))
		if err != nil {
			return "", err
		}
		return said + strconv.FormatFloat(dst[699], 'g', -1, 64) + v.Text(12), nil
	}
	want, err := ask(0)
	if err != nil {
		t.Fatal(err)
	}
	rounds := 20
	if testing.Short() {
		rounds = 3
	}
	together(t, func(w int) error {
		for range rounds {
			got, err := ask(w)
			if err != nil {
				return err
			}
			if got != want {
				return errors.New("answers differ: " + got + "\nalone: " + want)
			}
		}
		return nil
	})
}

// A formula whose first runs come from many goroutines at once.
func TestFormulaTogether(t *testing.T) {
	for range 50 {
		f := estimator(t)
		want, err := estimator(t).Run(estimateQuantities()...)
		if err != nil {
			t.Fatal(err)
		}
		together(t, func(int) error {
			dst := make([]float64, 600)
			in := make([][]float64, len(estimateValues()))
			for k, v := range estimateValues() {
				in[k] = make([]float64, len(dst))
				for i := range in[k] {
					in[k][i] = v
				}
			}
			q, err := f.Run(estimateQuantities()...)
			if err == nil {
				_, err = f.RunSI(context.Background(), dst, in)
			}
			if err == nil && (q != want || dst[599] != want.SI()) {
				err = errors.New("answers differ")
			}
			return err
		})
	}
}

// A million evaluations on eight goroutines leave the memory as it was.
func TestSoak(t *testing.T) {
	total := 1_000_000
	if testing.Short() || raceDetected {
		total = 40_000
	}
	z := frozen(t, repl.Config{}, line3...)
	f, err := z.Compile("throughput(dose, 96 field/wafer, 8.58 cm^2/field, P * 2 %, overhead)", repl.InputOf[units.Fluence]("dose"))
	if err != nil {
		t.Fatal(err)
	}
	var count atomic.Int64
	soak := func(total int) {
		together(t, func(w int) error {
			for i := range total / workers {
				dose := 200 + float64((i*7+w)%200)
				var got float64
				if i%2 == 0 {
					q, err := f.Run(units.Of(units.Fluence(dose)))
					if err != nil {
						return err
					}
					got = q.SI()
				} else {
					v, err := z.Eval(context.Background(), "throughput("+strconv.FormatFloat(dose/10, 'g', -1, 64)+" mJ/cm^2, 96 field/wafer, 8.58 cm^2/field, P * 2 %, overhead)")
					if err != nil {
						return err
					}
					got = v.SI
				}
				if !near.Within(got, line3ByHand(dose), 1e-13) {
					return errors.New("a wrong answer: " + strconv.FormatFloat(got, 'g', -1, 64))
				}
				count.Add(1)
			}
			return nil
		})
	}
	soak(total / 20)
	before := held()
	soak(total)
	after := held()
	t.Logf("%d evaluations; %d kB held before, %d kB after", count.Load(), before>>10, after>>10)
	if count.Load() != int64(total+total/20) {
		t.Errorf("%d evaluations, want %d", count.Load(), total+total/20)
	}
	if after > before+before/10+256<<10 {
		t.Errorf("memory grows from %d to %d bytes", before, after)
	}
}

// held is how much memory is in use, what no one can reach aside.
func held() uint64 {
	runtime.GC()
	runtime.GC()
	var m runtime.MemStats
	runtime.ReadMemStats(&m)
	return m.HeapAlloc
}
