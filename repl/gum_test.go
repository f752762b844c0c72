package repl

import (
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// The worked examples of JCGM 100:2008 and JCGM 101:2008 as gum.json has them,
// said in the language. Each check names its clause.

// guide finds a published figure of gum.json with its tolerance.
func guide(t testing.TB, id, what string) (figures []float64, tolerance float64) {
	t.Helper()
	var file struct {
		Examples []struct {
			ID     string
			Checks []struct {
				What      string
				Published json.RawMessage
				Tolerance float64
			}
		}
	}
	readTestdata(t, "gum.json", &file)
	for _, e := range file.Examples {
		for _, c := range e.Checks {
			if e.ID != id || c.What != what {
				continue
			}
			var one float64
			if json.Unmarshal(c.Published, &one) == nil {
				return []float64{one}, c.Tolerance
			}
			if err := json.Unmarshal(c.Published, &figures); err != nil {
				t.Fatal(err)
			}
			return figures, c.Tolerance
		}
	}
	t.Fatalf("gum.json has no check %q of %s", what, id)
	return nil, 0
}

func readTestdata(t testing.TB, name string, into any) {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("..", "testdata", name))
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(text, into); err != nil {
		t.Fatal(err)
	}
}

// asPublished compares figures with those of a check, in order.
func asPublished(t testing.TB, id, what string, got ...float64) {
	t.Helper()
	want, tolerance := guide(t, id, what)
	if len(want) != len(got) {
		t.Fatalf("%s, %s: %d figures, %d published", id, what, len(got), len(want))
	}
	for i := range got {
		near.Abs(t, fmt.Sprintf("%s, %s [%d]", id, what, i), got[i], want[i], tolerance)
	}
}

// endGauge says H.1 with temperature differences in the given unit.
func endGauge(t testing.TB, kelvin string) *Session {
	s := NewSession(Config{})
	spoken(t, s,
		"l_S = 50000623 nm ± 25 nm (nu=18)  # standard, certificate",
		"d_mean = 215 nm ± 5.8 nm (nu=24)  # 13/sqrt(5): mean of five repetitions",
		"d_random = (0 ± 3.9) nm (nu=5)  # comparator, random",
		"d_systematic = (0 ± 6.7) nm (nu=8)  # comparator, systematic",
		"dalpha = (0 ± 0.58e-6) /"+kelvin+" (nu=50)  # difference of the expansion coefficients",
		"theta_mean = normal(-0.1 "+kelvin+", 0.2 "+kelvin+")  # bed, mean",
		"theta_cycle = (0 ± 0.353553) "+kelvin+"  # bed, amplitude 0.5, cyclic",
		"alpha_S = 11.5e-6 /"+kelvin+" ± 1.2e-6 /"+kelvin,
		"dtheta = (0 ± 0.029) "+kelvin+" (nu=2)  # difference of the temperatures",
		"d [nm] = d_mean + d_random + d_systematic",
		"theta = theta_mean + theta_cycle",
		"l [nm] = l_S + d - l_S*(dalpha*theta + alpha_S*dtheta)")
	return s
}

// JCGM 100:2008, H.1: estimates of zero, degrees of freedom, second order.
func TestEndGauge(t *testing.T) {
	s := endGauge(t, "K")
	l := valued(t, s, "l")
	asPublished(t, "GUM-H.1", "l / nm", l.Number())
	asPublished(t, "GUM-H.1", "u_c first order / nm", l.uncertainty())
	asPublished(t, "GUM-H.1", "nu_eff", l.DoF)
	asPublished(t, "GUM-H.1", "u(d) / nm", valued(t, s, "d").uncertainty())
	asPublished(t, "GUM-H.1", "u(theta) / °C", valued(t, s, "theta").uncertainty())
	if len(l.Warnings) != 1 || !strings.HasPrefix(l.Warnings[0], "second-order terms matter: with them the standard uncertainty is 34 nm") {
		t.Errorf("H.1.7 asks for the second order: %q", l.Warnings)
	}
	// H.1.6: k = t_99(16) = 2.92 and U = 93 nm; the language expands to 95 %.
	b := resultOf[*Budget](t, s, "budget l")
	near.Abs(t, "k = t_95 of 16.7", b.K, 2.113, 0.002) // Student's t, 95 %, 16: 2.120, 17: 2.110, from any table
	near.Rel(t, "U_95", b.Expanded, b.K*b.Of.U, 1e-12)
	asPublished(t, "GUM-H.1", "U_99 / nm", valued(t, s, "l").uncertainty()*2.9208)
	if b.Rows[0].Input != "l_S" || b.Rows[1].Input != "dtheta" {
		t.Errorf("the standard and dtheta decide: %s, %s", b.Rows[0].Input, b.Rows[1].Input)
	}
	var sum float64
	for _, r := range b.Rows {
		sum += r.Part
	}
	near.Rel(t, "sum of the shares", sum, 1, 1e-12)
	// The second-order terms of H.1.7, 11.7 nm and 1.7 nm, are in the distribution.
	for _, name := range []string{"l_S", "d_mean", "d_random", "d_systematic", "dalpha", "dtheta"} {
		withoutDegrees(t, s, name) // the published figure takes normal distributions
	}
	d := resultOf[*Distribution](t, s, "propagate l : trials = 2e6")
	asPublished(t, "GUM-H.1", "u_c with second-order terms / nm", d.Mean.uncertainty())
}

// withoutDegrees defines an input again without its degrees of freedom.
func withoutDegrees(t testing.TB, s *Session, name string) {
	t.Helper()
	text, _, _ := strings.Cut(s.store.defs[name].text, "(nu=")
	spoken(t, s, text)
}

// A difference in °C is one in K: nothing changes, to the last bit.
func TestKelvinIsCelsius(t *testing.T) {
	kelvin, celsius := endGauge(t, "K"), endGauge(t, "K")
	spoken(t, celsius,
		"t_hot = 25.0 degC", "t_cold = 20.0 degC",
		"theta_mean = normal(-0.1 K, 0.2 K) + ((t_hot - t_cold) - 5 K)",
	)
	a, b := valued(t, kelvin, "l"), valued(t, celsius, "l")
	near.Rel(t, "l", b.SI, a.SI, 1e-15)
	near.Rel(t, "u(l)", b.U, a.U, 1e-12)
	s := NewSession(Config{})
	spoken(t, s, "t1 = 25.0(1) degC", "t2 = 20.0(1) degC", "T1 = 298.15(10) K", "T2 = 293.15(10) K", "c = 22 degC ± 0.5 K", "k = 22 degC ± 0.5 degC")
	prints(t, s, "t1 - t2", "5.00(14) K")
	prints(t, s, "T1 - T2", "5.00(14) K")
	prints(t, s, "c", "22.00(50) °C")
	prints(t, s, "k", "22.00(50) °C")
	prints(t, s, "(c - k) * 2", "0.0(14) K")
	near.Rel(t, "u of a temperature point", valued(t, s, "c").U, 0.5, 1e-15)
	// Relative expansion over a difference given either way.
	spoken(t, s, "x = 2.5(1) ppm/K")
	if a, b := valued(t, s, "x * (t1 - t2)"), valued(t, s, "x * (T1 - T2)"); math.Abs(a.SI-b.SI) > 1e-20 || math.Abs(a.U-b.U) > 1e-12*b.U {
		t.Errorf("%v(%v) in °C, %v(%v) in K", a.SI, a.U, b.SI, b.U)
	}
}

// JCGM 100:2008, H.2: correlated inputs, and the observations through lists.
func TestResistanceAndReactance(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s,
		"Vs = {5.007 V, 4.994 V, 5.005 V, 4.990 V, 4.999 V}",
		"Is = {19.663 mA, 19.639 mA, 19.640 mA, 19.685 mA, 19.678 mA}",
		"phis = {1.0456, 1.0438, 1.0468, 1.0428, 1.0433}")
	near.Abs(t, "mean of V", valued(t, s, "mean(Vs) [V]").Number(), 4.999, 1e-9)
	near.Abs(t, "mean of I", valued(t, s, "mean(Is) [mA]").Number(), 19.661, 1e-9)
	near.Abs(t, "mean of phi", valued(t, s, "mean(phis)").SI, 1.04446, 1e-9)
	asPublished(t, "GUM-H.2", "u(V) / V", valued(t, s, "sd(Vs)/sqrt(5) [V]").Number())
	asPublished(t, "GUM-H.2", "u(I) / mA", valued(t, s, "sd(Is)/sqrt(5) [mA]").Number())
	asPublished(t, "GUM-H.2", "u(phi) / rad", valued(t, s, "sd(phis)/sqrt(5)").SI)

	spoken(t, s,
		"V = 4.999 V ± 0.0032093613071761794 V", "I = 19.661 mA ± 9.471008394040896 uA", "phi = 1.04446 ± 0.0007520638270785368",
		"R [ohm] = V/I*cos(phi)", "X [ohm] = V/I*sin(phi)", "Z [ohm] = V/I")
	u := func() []float64 {
		var list []float64
		for _, name := range []string{"R", "X", "Z"} {
			list = append(list, valued(t, s, name).uncertainty())
		}
		return list
	}
	asPublished(t, "GUM-H.2", "R, X, Z / ohm", valued(t, s, "R").Number(), valued(t, s, "X").Number(), valued(t, s, "Z").Number())
	asPublished(t, "GUM-H.2", "if correlations are (wrongly) ignored: u(R),u(X),u(Z)", u()...)
	spoken(t, s, "correlation V, I = -0.3553112198174771", "correlation V, phi = 0.8576242108399619", "correlation I, phi = -0.6451112176892463")
	asPublished(t, "GUM-H.2", "u_c(R), u_c(X), u_c(Z) / ohm", u()...)
	// Z from R and X is Z again, with the uncertainty of Z and of nothing else.
	near.Abs(t, "u of the root of R² + X²", valued(t, s, "sqrt(R^2 + X^2) [ohm]").uncertainty(), 0.236, 0.0008)
	if d := valued(t, s, "Z - sqrt(R^2 + X^2)"); d.U > 1e-9 || math.Abs(d.SI) > 1e-9 {
		t.Errorf("Z - sqrt(R² + X²) is %v ± %v", d.SI, d.U)
	}
	// r(R,X) from the uncertainty of the sum.
	r := func(a, b string) float64 {
		ua, ub, us := valued(t, s, a).U, valued(t, s, b).U, valued(t, s, a+" + "+b).U
		return (us*us - ua*ua - ub*ub) / (2 * ua * ub)
	}
	asPublished(t, "GUM-H.2", "r(R,X), r(R,Z), r(X,Z)", r("R", "X"), r("R", "Z"), r("X", "Z"))
	// The order of the two names does not count, a correlation of 0 is none.
	spoken(t, s, "correlation phi, V = 0", "correlation phi, I = 0", "correlation I, V = 0")
	asPublished(t, "GUM-H.2", "if correlations are (wrongly) ignored: u(R),u(X),u(Z)", u()...)
	asPublished(t, "GUM-H.2", "and then r(R,X), r(R,Z), r(X,Z)", r("R", "X"), r("R", "Z"), r("X", "Z"))
}

// JCGM 100:2008, H.5 and 5.2.2: lists and shared errors.
func TestDailyMeans(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "day = {172, 116, 13, 144, 106, 31, 60, 125, 163, 41}", "inside = {60, 77, 111, 101, 67, 93, 80, 73, 88, 86}")
	asPublished(t, "GUM-H.5", "mean / uV above 10 V", valued(t, s, "mean(day)").SI)
	asPublished(t, "GUM-H.5", "s(V_j) / uV", valued(t, s, "sd(day)").SI)
	asPublished(t, "GUM-H.5", "u / uV", valued(t, s, "sd(day)/sqrt(10)").SI)
	asPublished(t, "GUM-H.5", "s_a / uV", valued(t, s, "sd(day)*sqrt(5)").SI)
	asPublished(t, "GUM-H.5", "s_b / uV", valued(t, s, "rss(inside)/sqrt(10)").SI)
}

// JCGM 100:2008, G.4.1: effective degrees of freedom of a product.
func TestEffectiveDegrees(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "x1 = 1 ± 0.25 % (nu=9)", "x2 = 2 W ± 0.57 % (nu=4)", "x3 = 3 s ± 0.82 % (nu=14)")
	b := resultOf[*Budget](t, s, "budget x1*x2*x3")
	asPublished(t, "GUM-G.4.1", "u_c(y)/y / %", 100*b.Of.U/b.Of.SI)
	asPublished(t, "GUM-G.4.1", "nu_eff", b.Of.DoF)
	asPublished(t, "GUM-G.4.1", "t_95(19)", b.K)
	asPublished(t, "GUM-G.4.1", "U_95 / %", 100*b.Expanded/b.Of.SI)
}

// JCGM 100:2008, 4.3 (statements of others), 7.2 (forms) and table G.2 (t).
func TestStatementsOfUncertainty(t *testing.T) {
	s := NewSession(Config{})
	asPublished(t, "GUM-4.3", "240 ug quoted at three standard deviations -> u / ug", 1e9*valued(t, s, "1000.325 g ± 240 ug (k=3)").U)
	asPublished(t, "GUM-4.3", "129 uohm at 99 % normal -> u / uohm", 1e6*valued(t, s, "10.000742 ohm ± 129 uohm (p=99 %)").U)
	asPublished(t, "GUM-4.3", "±0.04 mm with 50:50 chance -> u / mm", 1e3*valued(t, s, "10.11 mm ± 0.04 mm (p=50 %)").U)
	asPublished(t, "GUM-4.3", "±0.40e-6 /°C rectangular -> u", valued(t, s, "rectangular(16.12e-6 /K, 16.92e-6 /K)").U)
	asPublished(t, "GUM-4.3", "-> u / uV", 1e6*valued(t, s, "rectangular(0.928556001 V, 0.928585999 V)").U)
	asPublished(t, "GUM-4.3", "resolution dx -> u/dx", valued(t, s, "rectangular(0, 1)").U)
	for _, form := range []string{
		"100.02147(35) g", "100.02147(0.00035) g", "(100.02147 ± 0.00035) g", "100.02147 g ± 0.35 mg",
		"(100.02147 ± 0.00070) g (k=2)", "100.02147 g ± 0.70 mg (k=2)", "100.02147 g ± 3.4992487 ppm",
	} {
		v := valued(t, s, form)
		near.Rel(t, form, v.SI, 0.10002147, 1e-15)
		near.Rel(t, "u of "+form, v.U, 0.35e-6, 1e-6)
	}
	// Table G.2: u = U/t_p(ν).
	for what, literal := range map[string]string{
		"t_68.27(1)": "1 ± 1 (p=68.27 %, nu=1)", "t_95(1)": "1 ± 1 (p=95 %, nu=1)", "t_95(9)": "1 ± 1 (p=95 %, nu=9)",
		"t_95.45(10)": "1 ± 1 (p=95.45 %, nu=10)", "t_99(16)": "1 ± 1 (p=99 %, nu=16)", "t_95(50)": "1 ± 1 (nu=50, p=95 %)",
		"t_99.73(20)": "1 ± 1 (p=99.73 %, nu=20)",
	} {
		asPublished(t, "GUM-G.2", what, 1/valued(t, s, literal).U)
	}
}

// JCGM 101:2008, 9.2: four inputs added.
func TestAdditiveModel(t *testing.T) {
	for _, c := range []struct{ id, interval, x123, x4 string }{
		{"S1-9.2.2", "95 % interval", "normal(0, 1)", "normal(0, 1)"},
		{"S1-9.2.3", "95 % interval, exact: ±2√3 (2 - (3/5)^(1/4))", "rectangular(-1.7320508075688772, 1.7320508075688772)", "rectangular(-1.7320508075688772, 1.7320508075688772)"},
		{"S1-9.2.4", "95 % interval (Monte Carlo)", "rectangular(-1.7320508075688772, 1.7320508075688772)", "rectangular(-17.320508075688772, 17.320508075688772)"},
	} {
		s := NewSession(Config{})
		spoken(t, s, "x1 = "+c.x123, "x2 = "+c.x123, "x3 = "+c.x123, "x4 = "+c.x4)
		want, tolerance := guide(t, c.id, "u")
		near.Abs(t, c.id+" u, first order", valued(t, s, "x1 + x2 + x3 + x4").U, want[0], math.Max(tolerance, 1e-9))
		d := resultOf[*Distribution](t, s, "propagate x1 + x2 + x3 + x4 : trials = 4e6")
		near.Abs(t, c.id+" mean", d.Mean.SI, 0, 6*d.Tolerance.Mean)
		near.Abs(t, c.id+" u", d.Mean.U, want[0], math.Max(tolerance, 6*d.Tolerance.U))
		ends, tolerance := guide(t, c.id, c.interval)
		near.Abs(t, c.id+" low", d.Low, ends[0], tolerance+5*d.Tolerance.Low)
		near.Abs(t, c.id+" high", d.High, ends[1], tolerance+5*d.Tolerance.High)
		near.Abs(t, c.id+" length", d.High-d.Low, ends[1]-ends[0], 4*tolerance)
	}
}

// JCGM 101:2008, 9.4: comparison loss. At x1 = 0 the first order gives 0 ± 0; the
// truth is 50(50)e-6.
func TestComparisonLoss(t *testing.T) {
	for id, c := range map[string]struct {
		x1 string
		r  string
	}{
		"S1-9.4-r0-x0.0": {"0 ± 0.005", "0"}, "S1-9.4-r0-x0.01": {"0.01 ± 0.005", "0"}, "S1-9.4-r0-x0.05": {"0.05 ± 0.005", "0"},
		"S1-9.4-r0.9-x0.0": {"0 ± 0.005", "0.9"}, "S1-9.4-r0.9-x0.05": {"0.05 ± 0.005", "0.9"},
	} {
		s := NewSession(Config{})
		spoken(t, s, "X1 = "+c.x1, "X2 = 0 ± 0.005", "correlation X1, X2 = "+c.r, "loss = X1^2 + X2^2")
		v := valued(t, s, "loss")
		asPublished(t, id, "first-order u / 1e-6", 1e6*v.U)
		if len(v.Warnings) != 1 || !strings.HasPrefix(v.Warnings[0], "second-order terms matter") {
			t.Errorf("%s: the second order is not pointed at: %q", id, v.Warnings)
		}
		d := resultOf[*Distribution](t, s, "propagate loss : trials = 4e6")
		asPublished(t, id, "exact estimate / 1e-6", 1e6*d.Mean.SI)
		asPublished(t, id, "u / 1e-6", 1e6*d.Mean.U)
		asPublished(t, id, "shortest 95 % / 1e-6", 1e6*d.Low, 1e6*d.High)
	}
	s := NewSession(Config{})
	spoken(t, s, "X1 = 0 ± 0.005", "X2 = 0 ± 0.005")
	prints(t, s, "X1^2 + X2^2", `
0(0)
note: second-order terms matter: with them the standard uncertainty is 5.0e-5 and the mean shifts by 5.0e-5; propagate shows the distribution`)
}

// NIST StRD sets with certified means and standard deviations, through lists: 15
// certified digits, less what the conditioning of each set costs.
func TestCertifiedStatistics(t *testing.T) {
	var file struct {
		Univariate []struct {
			Name  string
			Data  []string
			Exact struct{ Mean, SD string } `json:"recomputed_exact"`
		}
	}
	readTestdata(t, "statistics.json", &file)
	seen := 0
	for _, set := range file.Univariate {
		data := set.Data
		if rule := ruled(set.Name); rule != nil {
			data = rule
		}
		if len(data) == 0 {
			continue // π's digits are not in the file
		}
		seen++
		s := NewSession(Config{Files: inFolder(map[string]string{"set.csv": "x\n" + strings.Join(data, "\n") + "\n"}).MapFS})
		spoken(t, s, `data S = "set.csv"`)
		near.Rel(t, set.Name+" mean", valued(t, s, "mean(S.x)").SI, parsed(t, set.Exact.Mean), 4e-16)
		near.Rel(t, set.Name+" sd", valued(t, s, "sd(S.x)").SI, parsed(t, set.Exact.SD), map[string]float64{
			"NumAcc2": 1e-14, "NumAcc3": 4e-10, "NumAcc4": 6e-9, // the data are not exact in binary: they are 12, 1e7 and 1e8 times the spread
			"Michelso": 4e-14, "Mavro": 2e-13,
		}[set.Name]+4e-16)
	}
	if seen < 8 {
		t.Errorf("only %d sets", seen)
	}
	// A short one as a list in the statement.
	prints(t, NewSession(Config{}), "sd({10000001, 10000003, 10000002})", "1")
}

// ruled are the sets that follow a rule: a first value, then 500 pairs.
func ruled(name string) []string {
	rule, ok := map[string][3]string{"NumAcc2": {"1.2", "1.1", "1.3"}, "NumAcc3": {"1000000.2", "1000000.1", "1000000.3"}, "NumAcc4": {"10000000.2", "10000000.1", "10000000.3"}}[name]
	if !ok {
		return nil
	}
	return append([]string{rule[0]}, slices.Repeat(rule[1:], 500)...)
}

func parsed(t testing.TB, text string) float64 {
	t.Helper()
	var x float64
	if err := json.Unmarshal([]byte(text), &x); err != nil {
		t.Fatal(err)
	}
	return x
}
