package main

import (
	"bytes"
	"encoding/json"
	"io"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// The objects of --json, field by field as the language page has them.
type (
	valueObject struct {
		Line        int      `json:"line"`
		Text        string   `json:"text"`
		Value       *float64 `json:"value"`
		Unit        *string  `json:"unit"`
		SI          *float64 `json:"si"`
		Dimension   *string  `json:"dimension"`
		Plane       *string  `json:"plane"`
		Uncertainty *float64 `json:"uncertainty"`
		Warnings    []string `json:"warnings"`
	}
	checkObject struct {
		Line     int      `json:"line"`
		Text     string   `json:"text"`
		Holds    *bool    `json:"holds"`
		Warnings []string `json:"warnings"`
	}
	column struct {
		Name string `json:"name"`
		Unit string `json:"unit"`
	}
	tableObject struct {
		Line     int      `json:"line"`
		Text     string   `json:"text"`
		Columns  []column `json:"columns"`
		Rows     [][]any  `json:"rows"`
		Warnings []string `json:"warnings"`
	}
	spreadObject struct {
		Line        int      `json:"line"`
		Text        string   `json:"text"`
		Value       *float64 `json:"value"`
		Unit        *string  `json:"unit"`
		SI          *float64 `json:"si"`
		Dimension   *string  `json:"dimension"`
		Plane       *string  `json:"plane"`
		Uncertainty *float64 `json:"uncertainty"`
		Low         *float64 `json:"low"`
		High        *float64 `json:"high"`
		Coverage    *float64 `json:"coverage"`
		Trials      *float64 `json:"trials"`
		Skewness    *float64 `json:"skewness"`
		Warnings    []string `json:"warnings"`
	}
	errorObject struct {
		Line   int    `json:"line"`
		Error  string `json:"error"`
		Column int    `json:"column"`
	}
	driftObject struct {
		Line     int      `json:"line"`
		Recorded []string `json:"recorded"`
		Now      []string `json:"now"`
		MovedBy  []struct {
			Name  string `json:"name"`
			Was   string `json:"was"`
			Now   string `json:"now"`
			Alone string `json:"alone"` // what this change alone moves
		} `json:"moved_by"`
	}
)

// objects cuts the output into its lines, each one object.
func objects(t *testing.T, out string) []string {
	t.Helper()
	lines := slices.Collect(strings.Lines(out))
	for _, l := range lines {
		if !strings.HasPrefix(l, "{") || !strings.HasSuffix(l, "}\n") {
			t.Fatalf("%q is no object on a line of its own", l)
		}
	}
	return lines
}

// strict reads one object and refuses any field that the type does not have,
// any that it has and the object has not, and anything behind the object.
func strict[T any](t *testing.T, line string) T {
	t.Helper()
	var v T
	d := json.NewDecoder(strings.NewReader(line))
	d.DisallowUnknownFields()
	if err := d.Decode(&v); err != nil {
		t.Fatalf("%s: %v", line, err)
	}
	if _, err := d.Token(); err != io.EOF {
		t.Fatalf("%s: something stands behind the object", line)
	}
	again, err := json.Marshal(v)
	if err != nil {
		t.Fatal(err)
	}
	if got, want := fields(t, []byte(line)), fields(t, again); !slices.Equal(got, want) {
		t.Fatalf("%s has the fields %q, want %q", line, got, want)
	}
	return v
}

func fields(t *testing.T, object []byte) []string {
	t.Helper()
	var m map[string]json.RawMessage
	if err := json.NewDecoder(bytes.NewReader(object)).Decode(&m); err != nil {
		t.Fatal(err)
	}
	var names []string
	for name := range m {
		names = append(names, name)
	}
	slices.Sort(names)
	return names
}

func TestJSONValue(t *testing.T) {
	o := call(t, "", "eval", "--json", "x = 2 nm", "photon_energy(13.5 nm)", "250 W at IF * 0.9 % at WAFER/IF", "0.25")
	o.complains(t, "")
	lines := objects(t, o.out)
	if o.status != 0 || len(lines) != 3 {
		t.Fatalf("status %d and %d objects, want 0 and 3: a bare definition gives none\n%s", o.status, len(lines), o.out)
	}
	v := strict[valueObject](t, lines[0])
	if v.Line != 2 || v.Text != "91.840 eV" || *v.Unit != "eV" || *v.Dimension != "kg·m²·s⁻²" || *v.Plane != "" {
		t.Errorf("got %s", lines[0])
	}
	// Exact SI constants: h c / 13.5 nm, SI Brochure, 9th edition, table 1.
	near.Rel(t, "photon energy in eV", *v.Value, 6.62607015e-34*299792458/1.602176634e-19/13.5e-9, 1e-15)
	near.Rel(t, "photon energy in J", *v.SI, 6.62607015e-34*299792458/13.5e-9, 1e-15)
	if v.Uncertainty != nil || v.Warnings == nil || len(v.Warnings) != 0 {
		t.Errorf("got %s, want uncertainty null and no warnings", lines[0])
	}
	v = strict[valueObject](t, lines[1])
	if v.Line != 3 || *v.Plane != "WAFER" || *v.Unit != "W" {
		t.Errorf("got %s", lines[1])
	}
	near.Rel(t, "power at the wafer", *v.Value, 2.25, 1e-15)
	v = strict[valueObject](t, lines[2])
	if *v.Dimension != "1" {
		t.Errorf("a pure number has the dimension %q, want 1", *v.Dimension)
	}
	near.Rel(t, "a pure number", *v.Value, 0.25, 0)
	near.Rel(t, "a pure number in base units", *v.SI, 0.25, 0)
}

func TestJSONWarning(t *testing.T) {
	o := call(t, "", "eval", "--json", "22 degC * 2")
	v := strict[valueObject](t, objects(t, o.out)[0])
	if o.status != 0 || len(v.Warnings) != 1 || strings.Contains(v.Text, v.Warnings[0]) {
		t.Errorf("status %d and %s, want one warning, apart from the text", o.status, o.out)
	}
	near.Rel(t, "twice a kelvin value", *v.SI, 2*295.15, 1e-15)
}

func TestJSONCheck(t *testing.T) {
	o := call(t, "", "eval", "--json", "check 3 nm >= 2 nm", "check 1 nm >= 2 nm")
	lines := objects(t, o.out)
	if o.status != 1 || len(lines) != 2 {
		t.Fatalf("status %d and %d objects, want 1 and 2", o.status, len(lines))
	}
	for i, want := range []checkObject{{Line: 1, Text: "holds: 3 nm >= 2 nm"}, {Line: 2, Text: "fails: 1 nm >= 2 nm"}} {
		v := strict[checkObject](t, lines[i])
		if v.Line != want.Line || v.Text != want.Text || *v.Holds != (i == 0) {
			t.Errorf("got %s", lines[i])
		}
	}
}

// The tables, each with one number of a row that is known beforehand.
func TestJSONTables(t *testing.T) {
	inFolder(t, map[string]string{"lots.csv": "dose / (mJ/cm^2), cd / nm\n30,20\n40,24\n50,28\n"})
	const dose = "d = 30 mJ/cm^2 ± 0.6 mJ/cm^2"
	for name, c := range map[string]struct {
		args      []string
		rows      int
		head      string
		unit      string
		row, cell int
		want      float64
	}{
		"walk":     {[]string{"chain pair\n  at IF\n  mirror x2: 50 %\n  at WAFER\nend", "walk pair 8 W at IF"}, 3, "power", "W", 2, 2, 2},
		"budget":   {[]string{dose, "budget 2 * d"}, 1, "|c| u(x)", "mJ/cm²", 0, 6, 1.2},
		"sweep":    {[]string{"sweep d = 20 mJ/cm^2 .. 40 mJ/cm^2 by 10 mJ/cm^2 : 2 * d"}, 3, "2 * d", "mJ/cm²", 2, 1, 80},
		"solve":    {[]string{"solve x * 30 nm = 60 nm for x in 1 .. 3"}, 1, "x", "", 0, 0, 2},
		"maximise": {[]string{"maximise 1 nm - (x - 2)^2 * 1 nm for x in 0 .. 3"}, 1, "x", "", 0, 0, 2},
		"compare":  {[]string{dose, "case hot : d = 40 mJ/cm^2", "compare 2 * d : base, hot"}, 2, "2 * d", "mJ/cm²", 1, 1, 80},
		"fit":      {[]string{"data lots = \"lots.csv\"", "a = 1 nm", "b = 1 nm/(mJ/cm^2)", "fit lots.cd = a + b * lots.dose over lots for a, b"}, 2, "value", "", 0, 1, 8},
	} {
		t.Run(name, func(t *testing.T) {
			o := call(t, "", append([]string{"eval", "--json"}, c.args...)...)
			lines := objects(t, o.out)
			if o.status != 0 || len(lines) == 0 {
				t.Fatalf("status %d\n%s%s", o.status, o.out, o.problems)
			}
			v := strict[tableObject](t, lines[len(lines)-1])
			i := slices.IndexFunc(v.Columns, func(k column) bool { return k.Name == c.head && k.Unit == c.unit })
			if len(v.Rows) != c.rows || i < 0 {
				t.Fatalf("got %s, want %d rows and a column %s in %q", lines[len(lines)-1], c.rows, c.head, c.unit)
			}
			for _, row := range v.Rows {
				if len(row) != len(v.Columns) {
					t.Errorf("a row of %d cells under %d columns", len(row), len(v.Columns))
				}
			}
			got, ok := v.Rows[c.row][c.cell].(float64)
			if !ok {
				t.Fatalf("got %v, want a number", v.Rows[c.row][c.cell])
			}
			near.Rel(t, "the cell", got, c.want, 1e-8)
		})
	}
}

// Twice a dose of 30 ± 0.6: the mean of 1e5 trials scatters by 0.4 % of the
// standard deviation, which is 1.2 by JCGM 101, 7.6 for a normal input.
func TestJSONPropagate(t *testing.T) {
	o := call(t, "", "eval", "--json", "d = 30 mJ/cm^2 ± 0.6 mJ/cm^2", "propagate 2 * d : trials = 100000")
	lines := objects(t, o.out)
	if o.status != 0 || len(lines) != 1 {
		t.Fatalf("status %d and %d objects, want 0 and 1\n%s", o.status, len(lines), o.problems)
	}
	v := strict[spreadObject](t, lines[0])
	if v.Line != 2 || *v.Unit != "mJ/cm²" || *v.Dimension != "kg·s⁻²" || *v.Plane != "" {
		t.Errorf("got %s", lines[0])
	}
	near.Abs(t, "mean", *v.Value, 60, 0.02)
	near.Rel(t, "mean in base units", *v.SI, 10**v.Value, 1e-14)
	near.Abs(t, "standard uncertainty", *v.Uncertainty, 1.2, 0.02)
	near.Abs(t, "low end of the shortest 95 % interval", *v.Low, 60-1.96*1.2, 0.1)
	near.Abs(t, "high end", *v.High, 60+1.96*1.2, 0.1)
	near.Abs(t, "skewness", *v.Skewness, 0, 0.05)
	near.Rel(t, "coverage", *v.Coverage, 0.95, 0)
	near.Rel(t, "trials", *v.Trials, 100000, 0)
}

func TestJSONUncertainty(t *testing.T) {
	o := call(t, "", "eval", "--json", "d = 30 mJ/cm^2 ± 2 %", "d", "d - d")
	lines := objects(t, o.out)
	if o.status != 0 || len(lines) != 2 {
		t.Fatalf("status %d and %d objects, want 0 and 2\n%s", o.status, len(lines), o.problems)
	}
	v := strict[valueObject](t, lines[0])
	near.Rel(t, "value", *v.Value, 30, 0)
	near.Rel(t, "uncertainty", *v.Uncertainty, 0.6, 1e-14)
	v = strict[valueObject](t, lines[1])
	near.Abs(t, "d - d", *v.Value, 0, 0)
	if v.Uncertainty != nil {
		near.Abs(t, "uncertainty of d - d", *v.Uncertainty, 0, 0)
	}
}

func TestJSONRefusal(t *testing.T) {
	o := call(t, "", "eval", "--json", "1 nm", "1 nm + 2 W + 3 nm", "4 nm")
	lines := objects(t, o.out)
	if o.status != 2 || len(lines) != 2 {
		t.Fatalf("status %d and %d objects, want 2 and 2: a refusal ends it", o.status, len(lines))
	}
	v := strict[errorObject](t, lines[1])
	if v.Line != 2 || v.Column != 1 || !strings.Contains(v.Error, "power") {
		t.Errorf("got %s", lines[1])
	}
}

func TestJSONReplay(t *testing.T) {
	inFolder(t, map[string]string{"day.budget": "x = 2 nm\ny = 3 * x\n| 5 nm\ny - x\n| 4 nm\n"})
	o := call(t, "", "replay", "--json", "day.budget")
	lines := objects(t, o.out)
	if o.status != 1 || len(lines) != 3 {
		t.Fatalf("status %d and %d objects, want 1 and 3\n%s", o.status, len(lines), o.out)
	}
	if v := strict[valueObject](t, lines[0]); v.Line != 2 {
		t.Errorf("got line %d, want 2", v.Line)
	}
	if v := strict[valueObject](t, lines[1]); v.Line != 4 {
		t.Errorf("got line %d, want 4", v.Line)
	}
	d := strict[driftObject](t, lines[2])
	if d.Line != 2 || !slices.Equal(d.Recorded, []string{"5 nm"}) || !slices.Equal(d.Now, []string{"6 nm"}) || d.MovedBy == nil {
		t.Errorf("got %s", lines[2])
	}
}
