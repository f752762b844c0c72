package repl_test

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"testing/fstest"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// session is where the examples start.
func session(texts ...string) *repl.Session {
	s := repl.NewSession(repl.Config{})
	for _, text := range texts {
		if err := s.Define(context.Background(), text); err != nil {
			fmt.Println(err)
		}
	}
	return s
}

func ExampleSession_Define() {
	s := repl.NewSession(repl.Config{})
	fmt.Println(s.Define(context.Background(), "dose = 34 mJ/cm^2 at WAFER  # incident"))
	fmt.Println(s.Define(context.Background(), "chain pair\n  at IF\n  mirror x2: 66 %\n  at WAFER\nend"))
	fmt.Println(s.Define(context.Background(), "dose = dose * 2"))
	// Output:
	// <nil>
	// <nil>
	// dose would rest on itself; a name stands for its formula; give the new value another name, such as dose_2
}

func ExampleSession_Eval() {
	s := session("dose = 34 mJ/cm^2", "area = 26 mm * 33 mm")
	v, err := s.Eval(context.Background(), "dose * area [mJ]")
	if err != nil {
		fmt.Println(err)
		return
	}
	energy, err := units.As[units.Energy](v.Quantity())
	fmt.Printf("%s, %.4f J, %v\n", v.Text(5), float64(energy), err)
	// Output: 291.72 mJ, 0.2917 J, <nil>
}

func ExampleSession_Import() {
	files := fstest.MapFS{"site.budget": {Data: []byte("T = 88 %  # one crossing\nboth = T^2\n")}}
	s := repl.NewSession(repl.Config{Files: files})
	im, err := s.Import(context.Background(), "site.budget")
	fmt.Println(im.Definitions, err)
	// Output: [T = 88 % both = T^2] <nil>
}

func ExampleSession_Check() {
	s := session("P = 2 W at WAFER")
	v, err := s.Check(context.Background(), "P >= 2.5 W")
	fmt.Println(v.Holds, v.Left.Text(5), v.Op, v.Right.Text(5), err)
	// Output: false 2 W at WAFER >= 2.5000 W <nil>
}

func ExampleSession_Explain() {
	s := session("R = 66 %  # one mirror", "pair = R^2", "line = pair^5 * R")
	e, err := s.Explain(context.Background(), "line")
	if err != nil {
		fmt.Println(err)
		return
	}
	var show func(e *repl.Explanation, indent string)
	show = func(e *repl.Explanation, indent string) {
		fmt.Printf("%s%s -> %s %v\n", indent, e.Formula, e.Value.Text(3), e.Folded)
		for _, c := range e.Children {
			show(c, indent+"  ")
		}
	}
	show(e, "")
	// Output:
	// line = pair^5 * R -> 0.0104 false
	//   pair = R^2 -> 0.436 false
	//     R = 66 % -> 0.660 false
	//   R = 66 % -> 0.660 true
}

func ExampleSession_Sweep() {
	s := session("dose = 34 mJ/cm^2")
	t, err := s.Sweep(context.Background(), "dose = 20 mJ/cm^2 .. 40 mJ/cm^2 by 10 mJ/cm^2 : dose * 2 cm^2 [mJ]")
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, row := range t.Rows {
		fmt.Printf("%.4g %s %.4g %s\n", row[0].Number, t.Columns[0].Unit, row[1].Number, t.Columns[1].Unit)
	}
	// Output:
	// 20 mJ/cm² 40 mJ
	// 30 mJ/cm² 60 mJ
	// 40 mJ/cm² 80 mJ
}

func ExampleSession_Solve() {
	f, err := session().Solve(context.Background(), "photon_count(30 mJ/cm^2, hole_area(d)) = 5000 for d in 5 nm .. 50 nm")
	fmt.Printf("%.3f %s %v\n", f.Rows[0][0].Number, f.Columns[0].Unit, err)
	// Output: 17.671 nm <nil>
}

func ExampleSession_Maximise() {
	f, err := session().Maximise(context.Background(), "x * (3 - x) for x in 0 .. 3")
	fmt.Printf("%.3f %.3f %s %v\n", f.Rows[0][0].Number, f.Rows[0][1].Number, f.Rows[0][2].Text, err)
	// Output: 1.500 2.250 inside <nil>
}

func ExampleSession_Minimise() {
	f, err := session().Minimise(context.Background(), "x * (3 - x) for x in 0 .. 2")
	fmt.Printf("%.3f %s %v\n", f.Rows[0][0].Number, f.Rows[0][2].Text, err)
	// Output: 0.000 at the lower end of the range <nil>
}

func ExampleSession_Propagate() {
	s := session("dose = 30 mJ/cm^2 ± 0.6 mJ/cm^2")
	d, err := s.Propagate(context.Background(), "dose * 2 : trials = 1e5, seed = 1")
	fmt.Println(d.Trials, d.Mean.Unit, d.Coverage, err)
	// Output: 100000 mJ/cm² 0.95 <nil>
}

func ExampleSession_Budget() {
	s := session("d = 30 mJ/cm^2 ± 3 %", "a = 2 cm^2 ± 4 %")
	b, err := s.Budget(context.Background(), "d * a")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(b.Of.Text(5))
	for _, r := range b.Rows {
		fmt.Printf("%s %.2f\n", r.Input, r.Part)
	}
	// Output:
	// 60.0(30) mJ
	// a 0.64
	// d 0.36
}

func ExampleSession_Fit() {
	files := fstest.MapFS{"lots.csv": {Data: []byte("dose / (mJ/cm^2), cd / nm\n30,20\n40,24\n50,28\n")}}
	s := repl.NewSession(repl.Config{Files: files})
	s.Feed(context.Background(), `data lots = "lots.csv"`)
	for _, text := range []string{"a = 1 nm", "b = 1 nm/(mJ/cm^2)"} {
		if err := s.Define(context.Background(), text); err != nil {
			fmt.Println(err)
		}
	}
	f, err := s.Fit(context.Background(), "lots.cd = a + b * lots.dose over lots for a, b")
	fmt.Printf("%s %.3f nm, %d rows, %v\n", f.Names[0], f.Found[0].SI*1e9, f.Rows, err)
	// Output: a 8.000 nm, 3 rows, <nil>
}

func ExampleSession_Compare() {
	s := session("dose = 30 mJ/cm^2", "case hot : dose = 45 mJ/cm^2")
	t, err := s.Compare(context.Background(), "dose * 2 cm^2 [mJ] : base, hot")
	fmt.Printf("%s %.4g %s %.4g %v\n", t.Rows[1][0].Text, t.Rows[1][1].Number, t.Columns[1].Unit, t.Rows[1][2].Number, err)
	// Output: hot 90 mJ 1.5 <nil>
}

func ExampleRefusal() {
	s := session("P_IF = 250 W at IF", "P = 2 W at WAFER")
	_, err := s.Eval(context.Background(), "3 nm * (P + P_IF)")
	var bad *repl.Refusal
	var planes *repl.PlaneError
	if errors.As(err, &bad) && errors.As(err, &planes) {
		at := bad.Marks()[1]
		fmt.Println(errors.Is(err, repl.ErrPlane), planes.Have, planes.Want, bad.Text[at[0]:at[1]])
	}
	_, err = s.Eval(context.Background(), "P_IF + 3 nm")
	var sides *units.DimensionError
	fmt.Println(errors.As(err, &sides), sides.Have, sides.Rhs)
	// Output:
	// true WAFER IF P_IF
	// true kg·m²·s⁻³ m
}

func ExampleOpen() {
	sys, err := units.Standard().WithUnit("shot", "3.5 mJ/cm^2")
	if err != nil {
		fmt.Println(err)
		return
	}
	s, err := repl.Open(repl.Config{
		Units:     sys,
		Constants: []repl.Constant{{Name: "slit_width", Doc: "across the scan", Value: units.Of(units.Length(26e-3))}},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	v, err := s.Eval(context.Background(), "10 shot * slit_width [mJ/cm]")
	fmt.Println(v.Text(5), err)
	_, err = repl.Open(repl.Config{Constants: []repl.Constant{{Name: "pi", Value: units.Of(units.Ratio(3))}}})
	fmt.Println(err)
	// Output:
	// 91 mJ/cm <nil>
	// the constant pi of the host cannot have this name, which is a constant already: this name cannot be given
}

func ExampleLimits() {
	s := repl.NewSession(repl.Config{Limits: repl.Limits{Rows: 20}})
	_, err := s.Sweep(context.Background(), "x = 1 .. 2 50 points : x^2")
	var over *repl.LimitError
	fmt.Println(errors.As(err, &over), over.Limit, over.Most, over.Asked)
	fmt.Println(err)
	// Output:
	// true Rows 20 50
	// this table has 50 rows; a reply holds 20; write it to a file: to "sweep.csv" at the end, or take fewer points
}

func ExampleSession_Freeze() {
	s := session("dose = 34 mJ/cm^2")
	z, err := s.Freeze(context.Background())
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(s.Define(context.Background(), "dose = 40 mJ/cm^2"))
	for _, ask := range []func(context.Context, string) (*repl.Value, error){s.Eval, z.Eval} {
		v, err := ask(context.Background(), "dose")
		fmt.Println(v.Text(5), err)
	}
	// Output:
	// <nil>
	// 40 mJ/cm² <nil>
	// 34 mJ/cm² <nil>
}

// compiledFormula is a formula of the field's dose, for the examples.
func compiledFormula() *repl.Formula {
	z, err := session("area = 8.58 cm^2").Freeze(context.Background())
	if err != nil {
		fmt.Println(err)
	}
	f, err := z.Compile("dose * area [mJ]", repl.InputOf[units.Fluence]("dose").At("WAFER"))
	if err != nil {
		fmt.Println(err)
	}
	return f
}

func ExampleFrozen_Compile() {
	z, err := session("P = 2 W at WAFER", "energy = P * 1 s").Freeze(context.Background())
	if err != nil {
		fmt.Println(err)
		return
	}
	f, err := z.Compile("energy / area", repl.InputOf[units.Power]("P"), repl.InputOf[units.Area]("area"))
	fmt.Println(f.Dimension(), f.Plane(), err)
	_, err = z.Compile("energy", repl.InputOf[units.Length]("P"))
	fmt.Println(err)
	// Output:
	// kg·s⁻² WAFER <nil>
	// P is power (W) at WAFER; this input is length (m); give the input the dimension and plane of P, or use a new name
}

func ExampleFormula_Run() {
	f := compiledFormula()
	q, err := f.Run(units.Of(units.Fluence(340)))
	fmt.Println(q, f.Plane(), err)
	_, err = f.Run(units.Of(units.Power(340)))
	fmt.Println(err)
	// Output:
	// 291.72 mJ WAFER <nil>
	// the input dose is fluence (mJ/cm²), not power (W); give it in mJ/cm²
}

func ExampleFormula_Value() {
	v, err := compiledFormula().Value(units.Of(units.Fluence(340)))
	fmt.Println(v.Text(5), err)
	// Output: 291.72 mJ at WAFER <nil>
}

func ExampleFormula_RunSI() {
	f := compiledFormula()
	dose := []float64{300, 340, 460} // J/m²
	energy := make([]float64, len(dose))
	n, err := f.RunSI(context.Background(), energy, [][]float64{dose})
	fmt.Printf("%d %.4f J %v\n", n, energy, err)
	// Output: 3 [0.2574 0.2917 0.3947] J <nil>
}

func ExampleFormula_Runner() {
	r := compiledFormula().Runner()
	for _, dose := range []float64{300, 340} {
		y, err := r.SI(dose)
		fmt.Printf("%.4f J %v\n", y, err)
	}
	// Output:
	// 0.2574 J <nil>
	// 0.2917 J <nil>
}

func ExampleFormula_Inputs() {
	for _, in := range compiledFormula().Inputs() {
		fmt.Println(in.Name, in.Dimension, in.Plane)
	}
	// Output: dose kg·s⁻² WAFER
}

func ExampleInputOf() {
	in := repl.InputOf[units.Power]("P").At("IF")
	fmt.Println(in.Name, in.Dimension, in.Plane, in.Point)
	// Output: P kg·m²·s⁻³ IF false
}

func ExampleRecordOf() {
	v, err := session().Eval(context.Background(), "250 W at IF * 2")
	if err != nil {
		fmt.Println(err)
		return
	}
	text, err := json.Marshal(repl.RecordOf(v, 5))
	fmt.Println(string(text), err)
	// Output: {"line":0,"text":"500 W at IF","value":500,"unit":"W","si":500,"dimension":"kg·m²·s⁻³","plane":"IF","uncertainty":null,"warnings":[]} <nil>
}

func ExampleRecord_UnmarshalJSON() {
	var r repl.Record
	err := json.Unmarshal([]byte(`{"line":3,"text":"holds: 3 nm >= 2 nm","holds":true,"warnings":[]}`), &r)
	fmt.Println(r.Kind == repl.CheckRecord, r.Holds, r.Line, err)
	// Output: true true 3 <nil>
}

func ExampleDrift_UnmarshalJSON() {
	var d repl.Drift
	err := json.Unmarshal([]byte(`{"line":2,"recorded":["5 nm"],"now":["6 nm"],"moved_by":[]}`), &d)
	fmt.Println(d.Line, d.Was, d.Now, err)
	// Output: 2 [5 nm] [6 nm] <nil>
}
