package repl

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// doubtful is a mirror whose period, share of molybdenum, roughness and density
// are all uncertain, and a train of six of them.
const doubtful = `d = 6.95 nm ± 0.01 nm
g = 0.40 ± 0.01
sigma = 0.6 nm ± 0.1 nm
density = 10.22 g/cm^3 ± 2 %
material moly = Mo density
stack mirror
  bilayer x50: Si ((1-g)*d), moly (g*d)
  roughness: sigma
  substrate: Si
end
chain train
  band: 13.5 nm, 2 %
  at IF
  mirror x6: reflectivity(mirror, λ)
  at WAFER
end
R = reflectivity(mirror, 13.5 nm)
T = transmission(train, IF, WAFER)
W = bandwidth(mirror)`

// middles are the four numbers of doubtful, and what their errors are.
var (
	middles = [4]float64{6.95e-9, 0.40, 0.6e-9, 10220}
	spread  = [4]float64{0.01e-9, 0.01, 0.1e-9, 204.4}
)

func doubtfulStack(t testing.TB, x [4]float64) euv.Stack {
	t.Helper()
	si, err := euv.SolidElement("Si")
	if err != nil {
		t.Fatal(err)
	}
	mo, err := euv.NewMaterial("Mo", units.Density(x[3]))
	if err != nil {
		t.Fatal(err)
	}
	s := euv.Stack{Substrate: si, Repeats: []euv.Repeat{euv.Periods(50,
		euv.Layer{Medium: si, Thickness: units.Length((1 - x[1]) * x[0])}, euv.Layer{Medium: mo, Thickness: units.Length(x[1] * x[0])})}}
	return s.WithRoughness(units.Length(x[2]))
}

// The answers of doubtful, by the typed functions alone.
func typedR(t testing.TB, x [4]float64) float64 {
	r, err := euv.Reflectivity(doubtfulStack(t, x), 13.5e-9, 0, euv.Unpolarised, 0)
	if err != nil {
		t.Fatal(err)
	}
	return float64(r.Value)
}

func typedT(t testing.TB, x [4]float64) float64 {
	mirror := euv.ReflectivityOf(doubtfulStack(t, x), 0, euv.Unpolarised)
	mean, _, err := euv.BandMean(func(dst, wavelengths []float64) error {
		err := mirror(dst, wavelengths)
		for i, r := range dst {
			dst[i] = r * r * r * r * r * r
		}
		return err
	}, 13.5e-9, 0.27e-9, doubtfulStack(t, x).Kinks(13.3e-9, 13.7e-9))
	if err != nil {
		t.Fatal(err)
	}
	return mean
}

func typedW(t testing.TB, x [4]float64) float64 {
	w, err := euv.Bandwidth(doubtfulStack(t, x), 0, 13.5e-9)
	if err != nil {
		t.Fatal(err)
	}
	return float64(w.Value)
}

// firstOrder is the law of propagation with slopes by central differences.
func firstOrder(t testing.TB, f func(testing.TB, [4]float64) float64) float64 {
	sum := 0.0
	for i, u := range spread {
		up, down := middles, middles
		up[i] += u / 100
		down[i] -= u / 100
		slope := (f(t, up) - f(t, down)) / 2 * 100
		sum += slope * slope
	}
	return math.Sqrt(sum)
}

func TestUncertaintyOfBodies(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, doubtful)
	for name, f := range map[string]func(testing.TB, [4]float64) float64{"R": typedR, "T": typedT, "W": typedW} {
		v := valued(t, s, name)
		near.Rel(t, name, v.SI, f(t, middles), 1e-9)
		near.Rel(t, "u("+name+")", v.U, firstOrder(t, f), 1e-3)
	}
}

// The budget of a mirror names its four inputs, and their shares make one.
func TestBudgetOfAMirror(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, doubtful)
	for _, answer := range []string{"R", "T"} {
		b := resultOf[*Budget](t, s, "budget "+answer)
		sum, inputs := 0.0, map[string]bool{}
		for _, row := range b.Rows {
			sum += row.Part
			inputs[row.Input] = true
		}
		if len(b.Rows) != 4 || !inputs["d"] || !inputs["g"] || !inputs["sigma"] || !inputs["density"] {
			t.Errorf("budget %s: inputs %v", answer, inputs)
		}
		near.Rel(t, "shares of "+answer, sum, 1, 1e-6)
	}
}

// Propagation agrees with an independent loop over the typed functions: other
// random numbers, other code, within four standard errors of either.
func TestPropagationOfAMirror(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, doubtful)
	for _, c := range []struct {
		name   string
		f      func(testing.TB, [4]float64) float64
		trials int
	}{{"R", typedR, 20_000}, {"T", typedT, 2_000}} {
		rng := rand.New(rand.NewPCG(3, 4))
		sum, squares := 0.0, 0.0
		for range c.trials {
			x := middles
			for i, u := range spread {
				x[i] += u * rng.NormFloat64()
			}
			y := c.f(t, x)
			sum += y
			squares += y * y
		}
		n := float64(c.trials)
		mean := sum / n
		u := math.Sqrt((squares - n*mean*mean) / (n - 1))
		d := resultOf[*Distribution](t, s, "propagate "+c.name+" : trials = 4e4, seed = 7")
		near.Abs(t, "mean of "+c.name, d.Mean.SI, mean, 4*u*math.Sqrt(1/n+1/4e4))
		near.Rel(t, "spread of "+c.name, d.Mean.U, u, 4*1.5*math.Sqrt(1/(2*n)+1/8e4)) // heavier tails than normal
	}
}

// Sweeps, roots and best places of a thickness: the same as one by one.
func TestExploringAMirror(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, doubtful)
	sweep := resultOf[*SweepTable](t, s, "sweep d = 6.8 nm .. 7.1 nm by 0.05 nm : R, T [% at WAFER/IF], W [nm]")
	if len(sweep.Rows) != 7 {
		t.Fatalf("%d rows", len(sweep.Rows))
	}
	for _, row := range numbersOf(sweep.Rows) {
		x := middles
		x[0] = row[0] * 1e-9
		near.Rel(t, "R", row[1], typedR(t, x), 1e-9)
		near.Rel(t, "T in per cent", row[2], 100*typedT(t, x), 1e-9)
		near.Rel(t, "W in nm", row[3], 1e9*typedW(t, x), 1e-7)
	}
	roots := numbersOf(resultOf[*Found](t, s, "solve R = 60 % for d in 6.8 nm .. 7.1 nm").Rows)
	if len(roots) != 2 {
		t.Fatalf("%d periods reflect 60 %%", len(roots))
	}
	for _, root := range roots {
		x := middles
		x[0] = root[0] * 1e-9
		near.Rel(t, "R at a root", typedR(t, x), 0.6, 1e-9)
	}
	best := numbersOf(resultOf[*Found](t, s, "maximise T for d in 6.8 nm .. 7.1 nm").Rows)[0]
	x := middles
	x[0] = best[0] * 1e-9
	top := typedT(t, x)
	near.Rel(t, "best T", best[1], top, 1e-9)
	for _, off := range []float64{-0.01e-9, 0.01e-9} {
		beside := x
		beside[0] += off
		if y := typedT(t, beside); !(y < top) {
			t.Errorf("T is %g at %g m, more than %g at the best place", y, beside[0], top)
		}
	}
	// the roughness that still leaves 65 %
	sigma := numbersOf(resultOf[*Found](t, s, "solve R = 65 % for sigma in 0 nm .. 1 nm").Rows)
	x = middles
	x[2] = sigma[0][0] * 1e-9
	near.Rel(t, "R at that roughness", typedR(t, x), 0.65, 1e-9)
}

// A long propagation over a chain can be called off.
func TestPropagationOfAChainIsCancelled(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, doubtful)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if r := s.Feed(ctx, "propagate T : trials = 1e6"); r.Err == nil {
		if d, ok := r.Results[0].(*Distribution); !ok || d.Trials >= 1_000_000 {
			t.Error("a million trials were run after they were called off")
		}
	}
}
