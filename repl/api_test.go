package repl_test

import (
	"context"
	"errors"
	"math"
	"strings"
	"testing"
	"testing/fstest"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// line3 is a small invented line: a chain, a dose, a throughput.
var line3 = []string{
	"chain pair\n  at IF\n  mirror x2: 50 %\n  at WAFER\nend",
	"P_IF = 250 W at IF  # mean of the month",
	"P = carry(P_IF, pair, WAFER)",
	"dose [mJ/cm^2] = 30 mJ/cm^2 at WAFER",
	"overhead = 9.5 s/wafer",
	"wph [wafer/h] = throughput(dose, 96 field/wafer, 8.58 cm^2/field, P * 2 %, overhead)",
}

func defined(t testing.TB, config repl.Config, texts ...string) *repl.Session {
	t.Helper()
	s, err := repl.Open(config)
	if err != nil {
		t.Fatal(err)
	}
	for _, text := range texts {
		if err := s.Define(t.Context(), text); err != nil {
			t.Fatalf("%s: %v", text, err)
		}
	}
	return s
}

// The throughput of line3 by hand, in wafer/s: 250 W · 0.25 · 0.02 at the wafer.
func line3ByHand(dose float64) float64 { return 1 / (9.5 + dose*96*8.58e-4/(250*0.25*0.02)) }

func TestAskingAPI(t *testing.T) {
	ctx, s := t.Context(), defined(t, repl.Config{}, line3...)
	v, err := s.Eval(ctx, "wph")
	if err != nil {
		t.Fatal(err)
	}
	near.Rel(t, "wph", v.SI, line3ByHand(300), 1e-14)

	c, err := s.Check(ctx, "wph >= 130 wafer/h")
	if err != nil || c.Holds {
		t.Errorf("check: %v, %v", c, err)
	}
	sweep, err := s.Sweep(ctx, "dose = 20 mJ/cm^2 .. 40 mJ/cm^2 3 points : wph")
	if err != nil || len(sweep.Rows) != 3 {
		t.Fatalf("sweep: %v, %v", sweep, err)
	}
	near.Rel(t, "wph at 40 mJ/cm²", sweep.Rows[2][1].Number, 3600*line3ByHand(400), 1e-14)

	found, err := s.Solve(ctx, "wph = 80 wafer/h for dose in 10 mJ/cm^2 .. 90 mJ/cm^2")
	if err != nil || len(found.Rows) != 1 {
		t.Fatalf("solve: %v, %v", found, err)
	}
	near.Rel(t, "dose for 80 wafer/h", 3600*line3ByHand(10*found.Rows[0][0].Number), 80, 1e-9)
	for name, ask := range map[string]func(context.Context, string) (*repl.Found, error){"2": s.Maximise, "0": s.Minimise} {
		best, err := ask(ctx, "4 - (x - 2)^2 for x in 0 .. 3")
		if err != nil || len(best.Rows) == 0 {
			t.Fatalf("optimum: %v, %v", best, err)
		}
		near.Abs(t, "place "+name, best.Rows[0][0].Number, map[string]float64{"2": 2, "0": 0}[name], 1e-6)
	}
}

func TestAskingUncertainAPI(t *testing.T) {
	ctx := t.Context()
	s := defined(t, repl.Config{Files: fstest.MapFS{"lots.csv": {Data: []byte("dose / (mJ/cm^2), cd / nm\n30,20\n40,24\n50,28\n")}}},
		"d = 30 mJ/cm^2 ± 0.6 mJ/cm^2", "E [mJ] = d * 2 cm^2", "case hot : d = 40 mJ/cm^2", "a = 1 nm", "b = 1 nm/(mJ/cm^2)")
	b, err := s.Budget(ctx, "E")
	if err != nil || len(b.Rows) != 1 {
		t.Fatalf("budget: %v, %v", b, err)
	}
	near.Rel(t, "u(E)", b.Rows[0].CU, 1.2, 1e-12)
	d, err := s.Propagate(ctx, "E : trials = 1e5, seed = 3")
	if err != nil || d.Trials != 100000 {
		t.Fatalf("propagate: %v, %v", d, err)
	}
	near.Rel(t, "mean of E", d.Mean.SI, 60e-3, 1e-3)
	table, err := s.Compare(ctx, "E : base, hot")
	if err != nil || len(table.Rows) != 2 {
		t.Fatalf("compare: %v, %v", table, err)
	}
	near.Rel(t, "E when hot", table.Rows[1][1].Number, 80, 1e-14)
	if r := s.Feed(ctx, `data lots = "lots.csv"`); r.Err != nil {
		t.Fatal(r.Err)
	}
	fit, err := s.Fit(ctx, "lots.cd = a + b * lots.dose over lots for a, b")
	if err != nil || len(fit.Found) != 2 {
		t.Fatalf("fit: %v, %v", fit, err)
	}
	near.Rel(t, "offset of the fit in nm", fit.Found[0].Number(), 8, 1e-8)
	if v, err := s.Eval(ctx, "a"); err != nil || !near.Within(v.Number(), 8, 1e-8) {
		t.Errorf("after the fit a is %v (%v)", v, err)
	}
}

// A question leaves nothing behind; what is defined and fitted is kept.
func TestWhatIsKept(t *testing.T) {
	var saved strings.Builder
	s := defined(t, repl.Config{Create: func(string) (repl.File, error) { return keeping{&saved}, nil }}, line3[:2]...)
	if _, err := s.Check(t.Context(), "P_IF > 1 W at IF"); err != nil {
		t.Fatal(err)
	}
	if r := s.Feed(t.Context(), `save "kept.budget"`); r.Err != nil {
		t.Fatal(r.Err)
	}
	if got := saved.String(); !strings.Contains(got, line3[1]) || !strings.Contains(got, "mirror x2") || strings.Contains(got, "check") {
		t.Errorf("saved is\n%s", got)
	}
}

type keeping struct{ *strings.Builder }

func (keeping) Commit() error { return nil }
func (keeping) Abort()        {}

func TestImportAPI(t *testing.T) {
	files := fstest.MapFS{
		"site/conventions.budget": {Data: []byte("x = 2 nm  # of the site\ny = 3 * x\n| 6 nm\n")},
		"site/broken.budget":      {Data: []byte("z = 2 nm + 1 W\n")},
	}
	s := defined(t, repl.Config{Files: files, Dir: "site"})
	im, err := s.Import(t.Context(), "conventions.budget")
	if err != nil || len(im.Definitions) != 2 {
		t.Fatalf("%v, %v", im, err)
	}
	if _, err := s.Import(t.Context(), "broken.budget"); !errors.Is(err, units.ErrDimension) {
		t.Errorf("the broken file: %v", err)
	}
	if _, err := s.Import(t.Context(), "none.budget"); !errors.Is(err, repl.ErrFile) {
		t.Errorf("no file: %v", err)
	}
	e, err := s.Explain(t.Context(), "y")
	if err != nil || len(e.Children) != 1 {
		t.Fatalf("%v, %v", e, err)
	}
	if x := e.Children[0]; x.File != "site/conventions.budget" || x.Line != 1 || x.Note != "of the site" || x.Formula != "x = 2 nm" {
		t.Errorf("x is explained as %+v", x)
	}
}

func TestExplainTree(t *testing.T) {
	s := defined(t, repl.Config{}, "a = 2 nm", "b = a + 1 nm", "c = b * a", "f(x) = x * c", "g = f(2)", "l = {a, b}")
	e, err := s.Explain(t.Context(), "g")
	if err != nil {
		t.Fatal(err)
	}
	var seen []string
	var walk func(e *repl.Explanation, depth int)
	walk = func(e *repl.Explanation, depth int) {
		line := strings.Repeat(" ", depth) + e.Formula
		if e.Value != nil {
			line += " -> " + e.Value.Text(5)
		}
		if e.Folded {
			line += " (above)"
		}
		seen = append(seen, line)
		if e.Err != nil || e.File != "" || e.Line != 0 || e.Folded && e.Children != nil {
			t.Errorf("%+v", e)
		}
		for _, c := range e.Children {
			walk(c, depth+1)
		}
	}
	walk(e, 0)
	got := strings.Join(seen, "\n")
	for _, line := range []string{"g = f(2) -> 12 nm²", "c = b * a -> 6 nm²", "b = a + 1 nm -> 3 nm", "a = 2 nm -> 2 nm", "a = 2 nm -> 2 nm (above)"} {
		if !strings.Contains(got, line) {
			t.Errorf("%q is not in\n%s", line, got)
		}
	}
	if l, err := s.Explain(t.Context(), "l"); err != nil || l.Value != nil || len(l.Children) != 2 {
		t.Errorf("the list is explained as %+v, %v", l, err)
	}
	if k, err := s.Explain(t.Context(), "speed_of_light"); err != nil || k.Value == nil || !near.Within(k.Value.SI, 299792458, 0) {
		t.Errorf("the constant is explained as %+v, %v", k, err)
	}
	if _, err := s.Explain(t.Context(), "gg"); !errors.Is(err, repl.ErrUnknown) || !strings.Contains(err.Error(), "did you mean") {
		t.Errorf("an unknown name: %v", err)
	}
}

// A chain of definitions is explained to its end, beyond what a screen shows.
func TestExplainDeep(t *testing.T) {
	s := defined(t, repl.Config{}, "x0 = 1 nm")
	const deep = 3000
	for i := range deep {
		if err := s.Define(t.Context(), "x"+itoa(i+1)+" = x"+itoa(i)+" + 1 nm"); err != nil {
			t.Fatal(err)
		}
	}
	e, err := s.Explain(t.Context(), "x"+itoa(deep))
	n := 0
	for ; err == nil && len(e.Children) > 0; e = e.Children[0] {
		n++
	}
	if err != nil || n != deep {
		t.Errorf("%d names deep, %v; want %d", n, err, deep)
	}
}

// Every cause can be told, with both sides and the place.
func TestTypedErrors(t *testing.T) {
	s := defined(t, repl.Config{}, append(line3, "zero = 0 nm", "one = 1", "user = one + 1")...)
	for _, c := range []struct {
		text  string
		cause error
		marks string // what the first mark covers
	}{
		{"1 nm + dose", units.ErrDimension, "1 nm"},
		{"P + P_IF", repl.ErrPlane, "P"},
		{"throughput(dose, 96 field/wafer, 8.58 cm^2/field, P_IF, overhead)", repl.ErrPlane, "P_IF"},
		{"P [W at IF]", repl.ErrPlane, "[W at IF]"},
		{"P at IF", repl.ErrPlane, "P"},
		{"{P, P_IF}", repl.ErrPlane, "P"},
		{"{1 nm, 1 W}", units.ErrDimension, "1 nm"},
		{"dose [nm]", units.ErrDimension, "dose"},
		{"3 nm ± 1 W", units.ErrDimension, ""},
		{"1 nm / zero", repl.ErrDivision, ""},
		{"exp(1e4)", repl.ErrNotFinite, "exp(1e4)"},
		{"nothing + 1", repl.ErrUnknown, "nothing"},
		{"nothing(1)", repl.ErrUnknown, "nothing"},
		{"(1 m)^30", units.ErrExponent, "(1 m)^30"},
		{"(1 m)^(1/7)", units.ErrRoot, "(1 m)^(1/7)"},
	} {
		_, err := s.Eval(t.Context(), c.text)
		wants(t, c.text, err, c.cause, c.marks)
	}
	for _, c := range []struct {
		text  string
		cause error
		marks string
	}{
		{"one = user * 2", repl.ErrCircle, "one"},
		{"q = q + 1", repl.ErrCircle, "q"},
		{"one = 3 nm", repl.ErrDependent, "one"},
		{"x = 3 nm + 1 W", units.ErrDimension, "3 nm"},
	} {
		wants(t, c.text, s.Define(t.Context(), c.text), c.cause, c.marks)
	}
	_, err := s.Check(t.Context(), "P > P_IF")
	wants(t, "check", err, repl.ErrPlane, "P")
	_, err = s.Check(t.Context(), "dose = 30 mJ/cm^2 within 1 nm")
	wants(t, "check within", err, units.ErrDimension, "1 nm")
	_, err = s.Sweep(t.Context(), "x = 1 nm .. 2 W 3 points : x")
	wants(t, "sweep", err, units.ErrDimension, "1 nm")
	_, err = s.Sweep(t.Context(), "dose = 1 nm .. 2 nm 3 points : wph")
	wants(t, "sweep of a name", err, units.ErrDimension, "1 nm")
	_, err = s.Sweep(t.Context(), "P = 1 W at IF .. 2 W at IF 3 points : P")
	wants(t, "sweep at a plane", err, repl.ErrPlane, "1 W at IF")
	wants(t, "case", s.Define(t.Context(), "case odd : dose = 3 W"), units.ErrDimension, "3 W")
}

func wants(t *testing.T, text string, err, cause error, mark string) {
	t.Helper()
	var bad *repl.Refusal
	if !errors.As(err, &bad) || !errors.Is(err, cause) {
		t.Errorf("%s: %v, want a refusal for %v", text, err, cause)
		return
	}
	if bad.Message() == "" || bad.WayOn() == "" {
		t.Errorf("%s: message %q, way on %q", text, bad.Message(), bad.WayOn())
	}
	if len(bad.Marks()) == 0 {
		t.Errorf("%s: nothing is marked", text)
		return
	}
	if m := bad.Marks()[0]; mark != "" && bad.Text[m[0]:m[1]] != mark {
		t.Errorf("%s: %q is marked, want %q", text, bad.Text[m[0]:m[1]], mark)
	}
}

func TestBothSidesOfErrors(t *testing.T) {
	s := defined(t, repl.Config{}, line3...)
	_, err := s.Eval(t.Context(), "1 nm + dose")
	var d *units.DimensionError
	if !errors.As(err, &d) || d.Have != units.DimensionOf[units.Length]() || d.Rhs != units.DimensionOf[units.Fluence]() {
		t.Errorf("dimensions: %+v", d)
	}
	for text, want := range map[string]repl.PlaneError{
		"P + P_IF":    {Op: "add", Have: "WAFER", Want: "IF"},
		"P [W at IF]": {Op: "state", Have: "WAFER", Want: "IF"},
		"P at MASK":   {Op: "move", Have: "WAFER", Want: "MASK"},
		"throughput(dose, 96 field/wafer, 8.58 cm^2/field, P_IF, overhead)": {Op: "take", Have: "IF", Want: "WAFER"},
	} {
		var p *repl.PlaneError
		if _, err := s.Eval(t.Context(), text); !errors.As(err, &p) || *p != want {
			t.Errorf("%s: %+v (%v), want %+v", text, p, err, want)
		}
	}
	var u *units.ParseError
	if _, err := s.Eval(t.Context(), "3 W/m*K"); !errors.As(err, &u) || u.Hint == "" {
		t.Errorf("unit: %+v", u)
	}
	var a *euv.ArgumentError
	if _, err := s.Eval(t.Context(), "photon_energy(-13.5 nm)"); !errors.As(err, &a) || a.Argument != "wavelength" {
		t.Errorf("argument: %+v", a)
	}
}

func TestAskingRefusesOtherStatements(t *testing.T) {
	s := defined(t, repl.Config{})
	for _, text := range []string{"", "x", "check 1 nm < 2 nm", "quit", "x = ", "# note", "sweep x = 1 .. 2 2 points : x", "x = 1\ny = 2"} {
		if err := s.Define(t.Context(), text); err == nil {
			t.Errorf("Define takes %q", text)
		}
		if _, err := s.Check(t.Context(), text); err == nil {
			t.Errorf("Check takes %q", text)
		}
		if _, err := s.Eval(t.Context(), "= "+text); err == nil {
			t.Errorf("Eval takes %q", "= "+text)
		}
	}
	if v, err := s.Eval(t.Context(), "x"); err == nil {
		t.Errorf("x is %v after refused definitions", v)
	}
}

// A context that has ended ends every question.
func TestEndedContextAPI(t *testing.T) {
	s := defined(t, repl.Config{Files: fstest.MapFS{"a.budget": {Data: []byte("x = 1\n")}}}, append(line3, "d = 3 nm ± 1 nm")...)
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	for name, err := range map[string]error{
		"Define":    s.Define(ctx, "x = 1"),
		"Import":    errOf(s.Import(ctx, "a.budget")),
		"Eval":      errOf(s.Eval(ctx, "1 + 1")),
		"Check":     errOf(s.Check(ctx, "1 < 2")),
		"Explain":   errOf(s.Explain(ctx, "wph")),
		"Sweep":     errOf(s.Sweep(ctx, "x = 1 .. 2 3 points : x")),
		"Solve":     errOf(s.Solve(ctx, "x = 1 for x in 0 .. 3")),
		"Maximise":  errOf(s.Maximise(ctx, "x for x in 0 .. 3")),
		"Minimise":  errOf(s.Minimise(ctx, "x for x in 0 .. 3")),
		"Propagate": errOf(s.Propagate(ctx, "d : trials = 1e4")),
		"Budget":    errOf(s.Budget(ctx, "d")),
		"Fit":       errOf(s.Fit(ctx, "a = b over c for d")),
		"Compare":   errOf(s.Compare(ctx, "wph : base")),
		"Freeze":    errOf(s.Freeze(ctx)),
	} {
		if !errors.Is(err, context.Canceled) {
			t.Errorf("%s: %v", name, err)
		}
	}
	if _, err := s.Eval(t.Context(), "x"); err == nil {
		t.Error("x is defined all the same")
	}
}

func errOf[T any](_ T, err error) error { return err }

func itoa(n int) string { return units.FormatNumber(float64(n), 15) }

func TestOpenHost(t *testing.T) {
	sys, err := units.Standard().WithUnit("shot", "3.5 mJ/cm^2")
	if err != nil {
		t.Fatal(err)
	}
	sys, _, err = sys.WithCounted("lot")
	if err != nil {
		t.Fatal(err)
	}
	half := repl.Bind1(repl.Row{Name: "halved", Args: []string{"x"}}, func(x units.Ratio) (units.Ratio, error) { return x / 2, nil })
	s, err := repl.Open(repl.Config{
		Units: sys, Functions: []repl.Function{half},
		Constants: []repl.Constant{{Name: "site_area", Doc: "field of our line", Value: units.Of(units.Area(8.58e-4))}},
	})
	if err != nil {
		t.Fatal(err)
	}
	for text, want := range map[string]float64{
		"2 shot": 70, "halved(3)": 1.5, "site_area * 2": 17.16e-4, "25 wafer/lot * 2 lot": 50, "site_area * 1 shot": 0.03003,
	} {
		v, err := s.Eval(t.Context(), text)
		if err != nil {
			t.Errorf("%s: %v", text, err)
			continue
		}
		near.Rel(t, text, v.SI, want, 1e-14)
	}
	if v, err := s.Eval(t.Context(), "70 mJ/cm^2 [shot]"); err != nil || v.Text(5) != "20 shot" {
		t.Errorf("70 mJ/cm² are %v (%v)", v, err)
	}
	for _, text := range []string{"site_area = 1", "halved(x) = x", "site_area(x) = x"} {
		if err := s.Define(t.Context(), text); err == nil {
			t.Errorf("%s is taken", text)
		}
	}
	if r := s.Feed(t.Context(), "counted lot"); r.Err != nil {
		t.Errorf("a thing that the host has declared: %v", r.Err)
	}
	for _, q := range []string{"help site_area", "why site_area"} {
		r := s.Feed(t.Context(), q)
		if r.Err != nil || !strings.Contains(r.Lines()[0].Text, "field of our line") {
			t.Errorf("%s: %v %v", q, r.Lines(), r.Err)
		}
	}
}

func TestOpenRefuses(t *testing.T) {
	f := func(name string) repl.Config {
		return repl.Config{Functions: []repl.Function{repl.Bind1(repl.Row{Name: name}, func(x units.Ratio) (units.Ratio, error) { return x, nil })}}
	}
	k := func(name string) repl.Config {
		return repl.Config{Constants: []repl.Constant{{Name: name, Value: units.Of(units.Ratio(1))}}}
	}
	both := f("mine")
	both.Constants = k("mine").Constants
	twice := k("mine")
	twice.Constants = append(twice.Constants, twice.Constants[0])
	for what, c := range map[string]repl.Config{
		"no name": k(""), "a number": k("2x"), "two words": k("my area"), "a sign": f("a+b"), "control": k("a\nb"), "long": k(strings.Repeat("x", 5000)),
		"a statement": k("sweep"), "a word": f("within"), "if": f("if"), "base": k("base"), "a function": k("throughput"), "its own": f("throughput"),
		"a constant": k("pi"), "as function": f("pi"), "a plane": k("WAFER"), "both": both, "twice": twice, "none": {Functions: []repl.Function{{}}},
	} {
		s, err := repl.Open(c)
		if !errors.Is(err, repl.ErrName) || s != nil {
			t.Errorf("%s: %v", what, err)
		}
		broken := repl.NewSession(c)
		if _, got := broken.Eval(t.Context(), "1 + 1"); !errors.Is(got, repl.ErrName) {
			t.Errorf("%s: a session that Open refuses says %v", what, got)
		}
		if r := broken.Feed(t.Context(), "1 + 1"); !errors.Is(r.Err, repl.ErrName) {
			t.Errorf("%s: a session that Open refuses says %v", what, r.Err)
		}
	}
	if _, err := repl.Open(repl.Config{Constants: []repl.Constant{{Name: "x", Value: units.New(math.Inf(1), units.Dimension{})}}}); !errors.Is(err, repl.ErrNotFinite) {
		t.Errorf("an infinite constant: %v", err)
	}
	for _, name := range []string{"größe", "x_1", "_x", "d", "W", "Å"} {
		if _, err := repl.Open(k(name)); err != nil {
			t.Errorf("%s: %v", name, err)
		}
	}
}
