package repl

import (
	"context"
	"errors"
	"fmt"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// line3 is what the studies below vary.
var line3 = []string{
	"P [W] = 250 W at IF", "T_line = 0.8 % at WAFER/IF", "P_wafer = P * T_line", "area = 85.8 cm^2/field", "fields = 96 field/wafer",
	"overhead [s/wafer] = 10 s/wafer", "dose = 30 mJ/cm^2 at WAFER", "wph [wafer/h] = throughput(dose, fields, area/10, P_wafer, overhead)",
	"T = 22 degC", "dT = 5 K",
}

func TestSweepTables(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, line3...)
	before := printed(spoken(t, s, "names"))
	for statement, want := range map[string]string{
		// a new name is local, stated in the unit that was written
		"sweep x = 1 nm .. 2 nm by 0.5 nm : x^2, 1/x [/nm]": `
x / nm  x^2 / nm²  1/x / nm⁻¹
1       1          1
1.5000  2.2500     0.66667
2       4          0.50000`,
		// one that exists is replaced for the run; the plane is taken over
		"sweep P = 100 W .. 300 W by 100 W : P_wafer, P_wafer/P [%]": `
P / W  P_wafer / W  P_wafer/P / %
100    0.80000      0.80000
200    1.6000       0.80000
300    2.4000       0.80000`,
		"sweep P = 0.1 kW at IF .. 0.3 kW at IF 3 points : P_wafer [mW at WAFER]": `
P / W  P_wafer / mW
100    800
200    1600
300    2400`,
		"sweep x = 1 .. 100 3 points log : x": `
x    x
1    1
10   10
100  100`,
		"sweep x = -100 .. -1 3 points log : x": `
x     x
-100  -100
-10   -10
-1    -1`,
		"sweep x = 2 .. 1 by 0.5 : x": `
x       x
2       2
1.5000  1.5000
1       1`,
		// a step that does not meet the end stops before it
		"sweep x = 0 .. 1 by 0.4 : x": `
x        x
0        0
0.40000  0.40000
0.80000  0.80000`,
		"sweep x = 1 .. 2 by 1, y = 3 .. 4 by 1 : x*y": `
x  y  x*y
1  3  3
1  4  4
2  3  6
2  4  8`,
		"sweep T = 20 degC .. 22 degC by 1 K : T, T - 20 degC": `
T / °C  T / °C  T - 20 degC / K
20      20      0
21      21      1
22      22      2`,
		// K is absolute where a temperature point is asked for
		"sweep T = 293.15 K .. 295.15 K by 1 K : T": `
T / K   T / °C
293.15  20
294.15  21
295.15  22`,
		"sweep T = 20 degC .. 21 degC by 1 K : T * 2": `
T / °C  T * 2 / K
20      586.30
21      588.30
note: a temperature point beside * counts as its value in kelvin`,
		// what has no value leaves a hole, the other columns stay
		"sweep x = -1 .. 1 by 1 : 1/x, x^2": `
x   1/x       x^2
-1  -1        1
0   no value  0
1   1         1
note: at 1 point a value is missing: division by zero`,
		"sweep x = -1 .. 1 by 0.5 : 1/sqrt(x)": `
x         1/sqrt(x)
-1        no value
-0.50000  no value
0         no value
0.50000   1.4142
1         1
note: at 3 points a value is missing; the first: sqrt has no finite value at -1: the result is not a finite number`,
		// ends are what they are as the session stands
		"sweep P = P .. 2*P by P : P_wafer": `
P / W  P_wafer / W
250    2
500    4`,
	} {
		prints(t, s, statement, want)
	}
	if after := printed(spoken(t, s, "names")); after != before {
		t.Errorf("sweeps changed the session to\n%s", after)
	}
	prints(t, s, "P", "250 W at IF")
}

// A sweep over an input is the redefinition of it, row by row.
func TestSweepIsRedefinition(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, line3...)
	table := resultOf[*SweepTable](t, s, "sweep dose = 20 mJ/cm^2 .. 50 mJ/cm^2 by 2.5 mJ/cm^2 : wph")
	if len(table.Rows) != 13 || table.Columns[0].Unit != "mJ/cm²" || table.Columns[1].Unit != "wafer/h" {
		t.Fatalf("%d rows under %v", len(table.Rows), table.Columns)
	}
	for _, row := range numbersOf(table.Rows) {
		spoken(t, s, fmt.Sprintf("dose = %g mJ/cm^2 at WAFER", row[0]))
		near.Rel(t, fmt.Sprint("wph at ", row[0]), row[1], valued(t, s, "wph").Number(), 1e-14)
	}
	// JSON has the numbers in full.
	r := s.Feed(context.Background(), "sweep x = 1 .. 2 by 1 : x/3").Records()[0]
	if r.Kind != TableRecord || len(r.Rows) != 2 || r.Rows[1][1].Number != 2.0/3 {
		t.Errorf("the record is %+v", r)
	}
	// An uncertain input is swept at its value, and others stand at theirs.
	spoken(t, s, "u = 3.0(1) W", "v = u * 2.0(1)")
	prints(t, s, "sweep u = 1 W .. 2 W by 1 W : v", "u / W  v / W\n1      2\n2      4")
}

func TestSweepRefusals(t *testing.T) {
	f := inFolder(nil)
	f.broken["full.csv"] = true
	s := NewSession(f.config())
	spoken(t, s, line3...)
	spoken(t, s, "f(x) = 2*x", "list = {1, 2}")
	for _, c := range [][3]string{
		{"sweep x = 1 nm .. 1 nm by 1 nm : x", "the two ends of this range are one place", "write two ends that differ, as in 1 nm .. 2 nm"},
		{"sweep x = 1 nm .. 2 s by 1 s : x", "length (m) and time (s) do not compare: they differ by time/length", "length * time / length is a time"},
		{"sweep x = 1 nm .. 2 nm by 1 s : x", "the step is time (s), the range length (m)", "write the step in nm"},
		{"sweep x = 1 .. 2 by 1 s : x", "the step is time (s), the range a pure number", "write the step as a plain number"},
		{"sweep x = 1 nm .. 2 nm by 0 nm : x", "a step of zero leads nowhere", "write a step, or so many points: 41 points"},
		{"sweep x = 1 .. 2 by 1e-30 : x", "this step is lost in the rounding of the ends", "write a larger step, or so many points: 41 points"},
		{"sweep x = 0 .. 1 5 points log : x", "equal ratios need both ends above zero, or both below", "leave out log, or begin above zero"},
		{"sweep x = -1 nm .. 1 nm 5 points log : x", "equal ratios need both ends above zero, or both below", "leave out log, or begin above zero"},
		{"sweep x = 1 .. 2 1 points : x", "a range has a whole number of points from 2 on", "write 41 points"},
		{"sweep x = 1 .. 2 2.5 points : x", "a range has a whole number of points from 2 on", "write 41 points"},
		{"sweep x = 1 .. 2 by 1, x = 3 .. 4 by 1 : x", "x is varied twice", "vary two names"},
		{"sweep x = 1 .. 2 by 1, y = 1 .. 2 by 1, z = 1 .. 2 by 1 : x", "a sweep varies one or two names", "fix the others by definitions, or compare cases"},
		{"sweep x = 1 .. 2 by 1, y = x .. 3 by 1 : x", "x is no name that is known here", "define it first: x = …"},
		{"sweep pi = 1 .. 2 by 1 : pi", "pi is a constant of the language", "choose another name"},
		{"sweep f = 1 .. 2 by 1 : f", "f is no single value that could be varied", "choose another name"},
		{"sweep list = 1 .. 2 by 1 : list", "list is no single value that could be varied", "choose another name"},
		{"sweep x = list .. 2 by 1 : x", "this has no single value", "take one of it, such as mean(…)"},
		{"sweep x = 1 .. 2 by 1 : list", "this has no single value", "take one of it, such as mean(…)"},
		{"sweep P = 100 nm .. 200 nm by 1 nm : P", "P is power (W) at IF; this range is length (m)", "give the range the dimension and plane of P, or use a new name"},
		{"sweep P = 1 W at WAFER .. 2 W at WAFER by 1 W : P", "P is power (W) at IF; this range is power (W) at WAFER", "give the range the dimension and plane of P, or use a new name"},
		{"sweep P = 1 W at WAFER .. 2 W at IF by 1 W : P", "power (W) at WAFER and power (W) at IF do not compare: they stand at different planes", "carry(2 W at IF, CHAIN, WAFER) takes the second to the plane of the first"},
		{"sweep P = 1 W .. 2 W by 1 W : P_wafer [W at IF]", "the answer stands at WAFER, not at IF", "carry(…, CHAIN, IF) takes it there"},
		{"sweep P = 1 W .. 2 W by 1 W : P_wafer [nm]", "power (W) is not stated in nm, which is length (m)", "state it in W, or change the formula"},
		{"sweep dT = 20 degC .. 22 degC by 1 K : dT", "dT is temperature (K); this range is a temperature point", "give the range the dimension and plane of dT, or use a new name"},
		{"sweep T = 20 degC .. 295 K by 1 K : T", "the ends of a range are both temperature points or both differences", "write both in degC, or both in K"},
		{"sweep T = 20 degC .. 22 degC by 1 degC : T", "a step is a difference, not a temperature point", "write the step in K"},
		{`sweep x = 1 .. 2 by 1 : x to "x.txt"`, `"x.txt" is no kind of file that this statement writes`, "end the name in .csv, .svg or .png"},
		{`sweep x = 1 .. 2 by 1 : x to "a.csv", to "b.csv"`, "one statement writes one table", "leave out one of the .csv files"},
		{`sweep x = 1 .. 2 by 1 : x to "nowhere/a.csv"`, "create nowhere/a.csv: file does not exist", "nothing was written; choose another name or place"},
		{`sweep x = 1 .. 2 by 1 : x to "full.csv"`, "write full.csv: no space left", "nothing was written; choose another name or place"},
		{`sweep x = 1 .. 2 by 1 : x, x * 1 nm to "a.csv" plot`, "x * 1 nm is stated in nm, the curves before it are a pure number", "curves of one picture share a unit: state them alike, or draw two pictures"},
		{`sweep x = 1 .. 2 by 1, y = 1 .. 2 by 1 : x, y to "a.svg"`, "a map shows one value over two names", "leave one expression, or vary one name"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
	if len(f.MapFS) > 0 {
		t.Errorf("refused sweeps left files: %v", f.MapFS)
	}
	if r := NewSession(Config{}).Feed(context.Background(), `sweep x = 1 .. 2 by 1 : x to "a.csv"`); !errors.Is(r.Err, ErrFile) {
		t.Errorf("a session without a place to write: %v", r.Err)
	}
	if r := NewSession(Config{Create: f.create}).Feed(context.Background(), `sweep x = 1 .. 2 by 1 : x to "a.svg"`); !errors.Is(r.Err, ErrFile) {
		t.Errorf("a session that draws nothing: %v", r.Err)
	}
	// A cause is there to be asked for.
	if r := s.Feed(context.Background(), "sweep x = 1 nm .. 2 s by 1 s : x"); !errors.Is(r.Err, units.ErrDimension) {
		t.Errorf("the cause is %v", r.Err)
	}
}

// A table that is written reads back as data, to the last bit.
func TestSweepFiles(t *testing.T) {
	f := inFolder(nil)
	s := NewSession(f.config())
	spoken(t, s, line3...)
	prints(t, s, `sweep dose = 20 mJ/cm^2 .. 50 mJ/cm^2 4 points : wph to "wph.csv", to "wph.svg"`, "4 points\nwritten: wph.csv\nwritten: wph.svg")
	if got := string(f.MapFS["wph.svg"].Data); got != "svg of wph / (wafer/h) against dose / (mJ/cm²): 1 curves" {
		t.Errorf("the picture has %s", got)
	}
	lines := strings.Split(string(f.MapFS["wph.csv"].Data), "\n")
	if lines[0] != "dose / (mJ/cm²),wph / (wafer/h)" || len(lines) != 6 || !strings.HasPrefix(lines[1], "20,") {
		t.Errorf("the table is %q", lines)
	}
	spoken(t, s, `data W = "wph.csv"`)
	table := resultOf[*SweepTable](t, s, "sweep dose = 20 mJ/cm^2 .. 50 mJ/cm^2 4 points : wph")
	back := resultOf[*ListValue](t, s, "W.wph")
	for i, row := range numbersOf(table.Rows) {
		if got := back.Unit.From(back.Values[i]); got != row[1] {
			t.Errorf("row %d was %v and reads back as %v", i, row[1], got)
		}
	}
	// A hole is an empty cell.
	spoken(t, s, `sweep x = -1 .. 1 by 1 : 1/x to "holes.csv"`)
	if got := string(f.MapFS["holes.csv"].Data); got != "x,1/x\n-1,-1\n0,\n1,1\n" {
		t.Errorf("the table with a hole is %q", got)
	}
	// A reply with plot holds the chart instead of the table.
	config := f.config()
	config.Sketch = func(p *Picture, _ int) []string { return []string{fmt.Sprint("chart of ", len(p.Lines[0].X))} }
	prints(t, NewSession(config), "sweep x = 1 .. 2 by 0.5 : x plot", "chart of 3")
	prints(t, NewSession(config), "sweep x = 1 .. 2 by 0.5 : 1/(x - 1) plot", "chart of 3\nnote: at 1 point a value is missing: division by zero")
	// A grid becomes a map, whose second name runs upwards.
	var grid *Grid
	config.Sketch = func(p *Picture, _ int) []string { grid = p.Grid; return nil }
	spoken(t, NewSession(config), "sweep x = 1 .. 3 by 1, y = 10 .. 20 by 10 : x + y plot")
	if fmt.Sprint(grid.X, grid.Y, grid.Z) != "[1 2 3] [10 20] [[11 12 13] [21 22 23]]" {
		t.Errorf("the map is %v %v %v", grid.X, grid.Y, grid.Z)
	}
}

// A replay runs the sweep and writes nothing.
func TestReplayWritesNoFiles(t *testing.T) {
	text := "sweep x = 1 .. 2 by 1 : x^2 to \"x.csv\"\n| 2 points\n| written: x.csv\nsweep x = 1 .. 2 by 1 : x^2 to \"x.svg\"\n| 2 points\n| written: x.svg\n"
	f := inFolder(map[string]string{"a.budget": text})
	r, err := Replay(context.Background(), f.config(), "a.budget")
	if err != nil || r.Moved() || len(r.Refused) > 0 || r.Compared != 2 {
		t.Errorf("%+v %v", r, err)
	}
	if len(f.MapFS) != 1 {
		t.Errorf("the replay left %d files", len(f.MapFS))
	}
	// So a host that writes and draws nothing can replay it too.
	if r, err := Replay(context.Background(), Config{Files: f.MapFS}, "a.budget"); err != nil || r.Moved() || len(r.Refused) > 0 {
		t.Errorf("%+v %v", r, err)
	}
}
