package repl

import (
	"context"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// waferData are the throughputs of check 27, against dose.
const waferData = "dose / (mJ/cm^2),wph / (wafer/h)\n20,172\n25,151\n30,137\n40,113\n50,97\n"

// Check 27: overhead and slope from throughputs by least squares, computed:
// 10.24 s and 0.538 s per mJ/cm².
func TestFitOfThroughput(t *testing.T) {
	s := NewSession(inFolder(map[string]string{"wph.csv": waferData}).config())
	spoken(t, s, `data T = "wph.csv"`, "overhead [s/wafer] = 9 s/wafer", "slope [s*cm^2/(mJ*wafer)] = 0.5 s*cm^2/(mJ*wafer)", "t(d) = overhead + slope*d")
	prints(t, s, "fit 1/wph = overhead + slope*dose over T for overhead, slope", `
name      value    u          unit              r with overhead  r with slope
overhead  10.236   0.18232    s/wafer           1                -0.95065
slope     0.53842  0.0052522  s·cm²/(mJ·wafer)  -0.95065         1
5 rows, 3 degrees of freedom, residual standard deviation 0.12649 s/wafer`)
	// The names are inputs now, correlated and with degrees of freedom.
	prints(t, s, "overhead", "10.24(18) s/wafer")
	v := valued(t, s, "t(30 mJ/cm^2)")
	if v.DoF != 3 {
		t.Errorf("%v degrees of freedom", v.DoF)
	}
	// The uncertainty of a fitted line, smallest at the mean dose of 33: s/√n there.
	near.Rel(t, "u at the mean dose", valued(t, s, "t(33 mJ/cm^2)").U, 0.12649/math.Sqrt(5), 1e-3)
	if d := s.store.defs["overhead"]; !strings.HasPrefix(d.text, "overhead [s/wafer] = (10.23626499655") || !strings.HasSuffix(d.text, " s/wafer (nu=3)  # found by: fit 1/wph = overhead + slope*dose over T for overhead, slope") {
		t.Errorf("the new definition is %s", d.text)
	}
	// A second fit starts from the first and changes nothing.
	again := resultOf[*FitResult](t, s, "fit 1/wph = overhead + slope*dose over T for overhead, slope")
	near.Rel(t, "overhead again", again.Found[0].Number(), 10.23626499655719, 1e-9)
	near.Rel(t, "its uncertainty again", again.Found[0].uncertainty(), 0.18232023694593, 1e-6)
	if len(s.pairings) != 1 {
		t.Errorf("%d correlations are kept", len(s.pairings))
	}
	// The same in other words: columns with the table's name, another form.
	spoken(t, s, "a = 5 s/wafer", "b = 1 s*cm^2/(mJ*wafer)")
	fit := resultOf[*FitResult](t, s, "fit a + b*T.dose = 1/T.wph over T for a, b")
	near.Rel(t, "a", fit.Found[0].Number(), 10.23626499655719, 1e-9)
	// Redefining a fitted name lets its correlation stand with the name; a new fit
	// of one of the two takes it away.
	spoken(t, s, "fit 1/wph = overhead + slope*dose over T for overhead")
	if len(s.pairings) != 1 || s.pairings[0].a != "a" {
		t.Errorf("correlations: %v", s.pairings)
	}
}

// NIST StRD, Norris: a line with certified values.
func TestFitNorris(t *testing.T) {
	var file struct {
		Linear []struct {
			Certified map[string]string
			DataX     []string `json:"data_x"`
			DataY     []string `json:"data_y"`
		}
	}
	readTestdata(t, "statistics.json", &file)
	set := file.Linear[0]
	table := "x,y\n"
	for i, x := range set.DataX {
		table += x + "," + set.DataY[i] + "\n"
	}
	s := NewSession(inFolder(map[string]string{"norris.csv": table}).config())
	spoken(t, s, `data N = "norris.csv"`, "b0 = 1", "b1 = 0.5")
	f := resultOf[*FitResult](t, s, "fit y = b0 + b1*x over N for b0, b1")
	certified := func(what string, got, tolerance float64) {
		t.Helper()
		near.Rel(t, what, got, parsed(t, strings.Replace(set.Certified[what], "E", "e", 1)), tolerance)
	}
	certified("B0", f.Found[0].SI, 1e-10)
	certified("B1", f.Found[1].SI, 1e-12)
	certified("u_B0", f.Found[0].U, 1e-9)
	certified("u_B1", f.Found[1].U, 1e-9)
	certified("residual_sd", f.Residual.SI, 1e-10)
	// b0 is negative: a minus before its literal, and still correlated.
	prints(t, s, "b0", "-0.26(23)")
	near.Rel(t, "u of the line at the mean of x", valued(t, s, fmt.Sprintf("b0 + b1*%v", 0.0)+" + b1*mean(N.x)").U, f.Residual.SI/6, 1e-6)
}

// The file that the examples use is that of check 27.
func TestExampleData(t *testing.T) {
	text, err := os.ReadFile(filepath.Join("..", "examples", "fab-north", "throughput.csv"))
	if err != nil {
		t.Fatal(err)
	}
	if string(text) != waferData {
		t.Errorf("the file holds %q", text)
	}
}

func TestFitForms(t *testing.T) {
	f := inFolder(map[string]string{
		"exact.csv": "x,y\n1,2\n2,4\n3,6\n", "two.csv": "x,y\n1,2\n2,5\n", "one.csv": "x,y\n1,2\n", "flat.csv": "x,y\n1,2\n1,4\n",
		"down.csv": "x / nm,y / %\n1,30\n2,21\n3,9\n", "hot.csv": "T / degC,R / ohm\n20,100\n40,108\n60,115.5\n",
	})
	s := NewSession(f.config())
	spoken(t, s, `data E = "exact.csv"`, `data W = "two.csv"`, `data O = "one.csv"`, `data F = "flat.csv"`, `data D = "down.csv"`, `data H = "hot.csv"`, "m = 1", "n = 0", "k = 2")
	// An exact fit has no uncertainty, and what rests on it works.
	fit := resultOf[*FitResult](t, s, "fit y = m*x + n over E for m, n")
	near.Rel(t, "m", fit.Found[0].SI, 2, 1e-14)
	near.Abs(t, "n", fit.Found[1].SI, 0, 1e-14)
	if fit.Found[0].U != 0 || fit.Found[1].U != 0 || fit.Residual.SI != 0 {
		t.Errorf("an exact fit has u %v, %v and residual %v", fit.Found[0].U, fit.Found[1].U, fit.Residual.SI)
	}
	prints(t, s, "m + n", "2(0)")
	prints(t, s, "m * 3", "6(0)")
	// As many rows as names: values without uncertainty.
	prints(t, s, "fit y = m*x + n over W for m, n", `
name  value  u  unit  r with m  r with n
m     3      0  1
n     -1     0  1
2 rows, none to spare: no uncertainty can be told`)
	prints(t, s, "m + n", "2")
	// Percentages, falling lines.
	spoken(t, s, "top [%] = 30 %", "fall [%/nm] = 1 %/nm")
	prints(t, s, "fit y = top + fall*x over D for top, fall", `
name  value    u        unit  r with top  r with fall
top   41       1.8708   %     1           -0.92582
fall  -10.500  0.86603  %/nm  -0.92582    1
3 rows, 1 degree of freedom, residual standard deviation 0.012247`)
	prints(t, s, "fall", "-10.50(87) %/nm")
	// A column of temperature points.
	spoken(t, s, "R0 [ohm] = 100 ohm", "alpha = 0.004 /K")
	fit = resultOf[*FitResult](t, s, "fit R = R0*(1 + alpha*(T - 20 degC)) over H for R0, alpha")
	near.Rel(t, "R0", fit.Found[0].Number(), 100.0833333, 1e-8) // by hand: mean 107.8333 at 40 °C, slope 0.3875
	near.Rel(t, "alpha", fit.Found[1].SI, 0.3875/100.0833333, 1e-8)

	for _, c := range [][3]string{
		{"fit y = m*x + n over O for m, n", "1 row cannot tell 2 names", "fit fewer names, or give more rows"},
		{"fit y = m*x + n + k over W for m, n, k", "2 rows cannot tell 3 names", "fit fewer names, or give more rows"},
		{"fit y = (m + n)*x over E for m, n", "the data do not determine m apart from the others", "nothing has changed; start nearer, fit fewer names, or give more rows"},
		{"fit y = m*x + n over F for m, n", "the data do not determine n apart from the others", "nothing has changed; start nearer, fit fewer names, or give more rows"},
		{"fit m = 2 over E for m", "no column of E stands in this equation", "its columns are E.x, E.y"},
		{"fit y = 2*x over E for m", "m moves neither side in any row: start elsewhere, or leave it out", "nothing has changed; start nearer, fit fewer names, or give more rows"},
		{"fit y = m*x over Z for m", "Z is no table of data", `read one first: data Z = "file.csv"`},
		{"fit y = m*x over E for m, m", "m stands twice", "name each once"},
		{"fit y = q*x over E for q", "q has no value to start from", "define it first, near the value that is expected: q = …"},
		{"fit y = m*x over E for E.x", "E.x has no value to start from", "define it first, near the value that is expected: E.x = …"},
		{"fit y*1 nm = m over E for m", "length (m) and a pure number do not compare: they differ by 1/length", "a pure number stands beside pure numbers only: write its unit behind it, or divide the other side by a reference value"},
		{"fit y = ln(-x) + m over E for m", "the result is not a finite number", "look at the range of each input, and at roots and logarithms of what is negative"},
		{"fit {1, 2} = m over E for m", "this has no single value", "take one of it, such as mean(…)"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
	if r := s.Feed(context.Background(), "fit y = m*x over E for m").Records()[0]; r.Kind != TableRecord || len(r.Rows) != 1 || r.Rows[0][1].Number != 2 {
		t.Errorf("the record is %+v", r)
	}
	// A column behind a name of the session is pointed at.
	spoken(t, s, "y = 7")
	if r := spoken(t, s, "fit y = m*x over E for m"); len(r.Warnings()) != 1 || r.Warnings()[0] != "y is the name of the session here; the column is E.y" {
		t.Errorf("a hidden column: %q", r.Warnings())
	}
	if fit := resultOf[*FitResult](t, s, "fit E.y = m*x over E for m"); len(fit.Warnings) > 0 || fit.Found[0].SI != 2 {
		t.Errorf("with the table's name: %v %q", fit.Found[0].SI, fit.Warnings)
	}
	spoken(t, s, "forget y")
	// A fitted name that others rest on keeps its dimension; one that cannot be
	// restores all.
	spoken(t, s, "m = 1", "mm = m * 2")
	before := printed(spoken(t, s, "names"))
	if r := s.Feed(context.Background(), "fit y = m*x + n over F for m, n"); r.Err == nil {
		t.Error("not refused")
	}
	if after := printed(spoken(t, s, "names")); after != before {
		t.Errorf("a refused fit left\n%s", after)
	}
}

func TestDataFiles(t *testing.T) {
	long := "x\n" + strings.Repeat("1\n", 100_001)
	f := inFolder(map[string]string{
		"good.csv": "\uFEFFdose / (mJ/cm^2), wph / wafer/h ,T / degC,name of tool,2nd\n20,172,22.5,A,1\n25,151,-3,B,2\n", "crlf.csv": "x,y\r\n1,2\r\n3,4\r\n",
		"cell.csv": "x,y\n1,2\n2,abc\n", "hole.csv": "x,y\n1,\n", "nan.csv": "x\nNaN\n", "inf.csv": "x\n+Inf\n", "big.csv": "x\n1e999\n", "comma.csv": "x\n\"1,5\"\n", "hex.csv": "x\n0x10\n",
		"head.csv": "x / foo\n1\n", "twice.csv": "x,x\n1,2\n", "ragged.csv": "x,y\n1,2\n3\n", "wide.csv": "x\n1,2\n", "quote.csv": "x\n\"1\n", "semi.csv": "x;y\n1;2\n",
		"numbers.csv": "1,2\n3,4\n", "empty.csv": "", "heads.csv": "x,y\n", "long.csv": long, "pm.csv": "x\n1.0(2)\n", "other.csv": "dose / (mJ/cm^2)\n30\n", "wrong.csv": "dose / s\n1\n",
	})
	s := NewSession(f.config())
	prints(t, s, `data G = "good.csv"`, "2 rows of dose, wph, T; left out, since their heads are no names: name of tool, 2nd")
	prints(t, s, "G.dose", "{20 mJ/cm², 25 mJ/cm²}")
	prints(t, s, "G.T", "{22.500 °C, -3 °C}")
	prints(t, s, "mean(G.wph)", "161.50 wafer/h")
	prints(t, s, "max(G.T) - min(G.T)", "25.500 K")
	prints(t, s, `data C = "crlf.csv"`, "2 rows of x, y")
	prints(t, s, "sum(C.x)", "4")
	const heads = headsHint
	for _, c := range [][3]string{
		{`data X = "cell.csv"`, `cell.csv:3: "abc" in column y: this is no decimal number: the file cannot be used`, heads},
		{`data X = "hole.csv"`, `hole.csv:2: "" in column y: this is no decimal number: the file cannot be used`, heads},
		{`data X = "nan.csv"`, `nan.csv:2: "NaN" in column x: this is no decimal number: the file cannot be used`, heads},
		{`data X = "inf.csv"`, `inf.csv:2: "+Inf" in column x: this is no decimal number: the file cannot be used`, heads},
		{`data X = "big.csv"`, `big.csv:2: "1e999" in column x: the number is larger than 1.8e308 in SI units: the file cannot be used`, heads},
		{`data X = "comma.csv"`, `comma.csv:2: "1,5" in column x: this is no decimal number: the file cannot be used`, heads},
		{`data X = "hex.csv"`, `hex.csv:2: "0x10" in column x: this is no decimal number: the file cannot be used`, heads},
		{`data X = "pm.csv"`, `pm.csv:2: "1.0(2)" in column x: this is no decimal number: the file cannot be used`, heads},
		{`data X = "head.csv"`, `head.csv:1: the head "x / foo": foo is no unit: the file cannot be used`, heads},
		{`data X = "twice.csv"`, "twice.csv:1: the column x stands twice: the file cannot be used", heads},
		{`data X = "ragged.csv"`, "ragged.csv:3: 1 cell under 2 heads: the file cannot be used", heads},
		{`data X = "wide.csv"`, "wide.csv:2: 2 cells under 1 head: the file cannot be used", heads},
		{`data X = "quote.csv"`, "quote.csv:2: a quotation mark stands at the wrong place: the file cannot be used", heads},
		{`data X = "semi.csv"`, "no head of this table is a name", heads},
		{`data X = "numbers.csv"`, "no head of this table is a name", heads},
		{`data X = "empty.csv"`, "empty.csv has no line of heads: the file cannot be used", heads},
		{`data X = "heads.csv"`, "heads.csv has no rows: the file cannot be used", heads},
		{`data X = "none.csv"`, "none.csv cannot be read: file does not exist: the file cannot be used", "name a .csv file of this folder"},
		{`data X = "../up.csv"`, `"../up.csv" leads outside this session's folder: the file cannot be used`, "paths are relative to the session's file and stay below its folder"},
		{`data pi = "good.csv"`, "pi is a constant of the language", "choose another name, such as pi_1"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
	if r := s.Feed(context.Background(), `data X = "none.csv"`); !errors.Is(r.Err, ErrFile) {
		t.Errorf("the cause is %v", r.Err)
	}
	if r := s.Feed(context.Background(), `data X = "long.csv"`); r.Err == nil || !strings.HasPrefix(r.Err.Error(), "long.csv has more than 100000 rows") {
		t.Errorf("a long table: %v", r.Err)
	}
	// A table that is read again replaces its columns, if what rests on them allows.
	spoken(t, s, "d = mean(G.dose)", "w = max(G.wph)")
	refused(t, s, `data G = "other.csv"`, "this table has no column wph any more, on which w rests", "nothing has changed; give the new table another name")
	refused(t, s, `data G = "wrong.csv"`, "d rests on G.dose and would break: d would be time (s) instead of fluence (mJ/cm²)", "nothing has changed; redefine d first, or use another name here")
	spoken(t, s, "forget w")
	prints(t, s, `data G = "other.csv"`, "1 row of dose")
	prints(t, s, "d", "30 mJ/cm²")
	if columns := s.tables["G"]; len(columns) != 1 {
		t.Errorf("G has the columns %v", columns)
	}
	spoken(t, s, "q = 3")
	refused(t, s, `data q = "crlf.csv"`, "q is defined already", "choose another name for the table")
}
