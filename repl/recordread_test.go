package repl_test

import (
	"encoding/json"
	"math/rand/v2"
	"os"
	"reflect"
	"strconv"
	"strings"
	"testing"
	"testing/fstest"

	"example.com/dosewright/repl"
)

// readsBack writes a record or a drift, reads it and compares.
func readsBack[T any](t *testing.T, v T) {
	t.Helper()
	text, err := json.Marshal(v)
	if err != nil {
		t.Fatalf("%+v: %v", v, err)
	}
	var back T
	if err := json.Unmarshal(text, &back); err != nil {
		t.Fatalf("%s: %v", text, err)
	}
	if !reflect.DeepEqual(back, v) {
		t.Fatalf("%s\nreads back as %+v\nfrom          %+v", text, back, v)
	}
}

// Every reply of the example sessions reads back without loss.
func TestRecordsOfSessionsReadBack(t *testing.T) {
	const folder = "../examples/fab-north"
	files, err := os.ReadDir(folder)
	if err != nil {
		t.Fatal(err)
	}
	kinds := map[repl.RecordKind]int{}
	for _, f := range files {
		if !strings.HasSuffix(f.Name(), ".budget") {
			continue
		}
		r, err := repl.Replay(t.Context(), repl.Config{Files: os.DirFS(folder)}, f.Name())
		if err != nil {
			t.Fatal(err)
		}
		for _, rec := range r.Records {
			kinds[rec.Kind]++
			readsBack(t, rec)
		}
	}
	for _, kind := range []repl.RecordKind{repl.TextRecord, repl.ValueRecord, repl.CheckRecord, repl.TableRecord, repl.ErrorRecord} {
		if kinds[kind] == 0 {
			t.Errorf("no record of kind %d in %v", kind, kinds)
		}
	}
}

// Any record reads back, with numbers and texts of every sort.
func TestAnyRecordReadsBack(t *testing.T) {
	random := rand.New(rand.NewPCG(9, 1))
	for range 20_000 {
		readsBack(t, anyRecord(random))
	}
}

func anyRecord(random *rand.Rand) repl.Record {
	r := repl.Record{Line: random.IntN(1000), Text: anyText(random)}
	if random.IntN(2) == 0 {
		r.Warnings = []string{anyText(random), anyText(random)}
	}
	switch r.Kind = repl.RecordKind(random.IntN(6)); r.Kind {
	case repl.DistributionRecord:
		r.Low, r.High, r.Coverage, r.Skewness, r.Trials = anyNumber(random), anyNumber(random), random.Float64(), random.NormFloat64(), random.IntN(1e6)
		fallthrough
	case repl.ValueRecord:
		r.Value, r.Unit, r.SI, r.Dimension, r.Plane = anyNumber(random), anyText(random), random.NormFloat64()*1e-20, anyText(random), anyText(random)
		if random.IntN(2) == 0 {
			u := anyNumber(random)
			r.Uncertainty = &u
		}
	case repl.CheckRecord:
		r.Holds = random.IntN(2) == 0
	case repl.TableRecord:
		for range random.IntN(4) {
			r.Columns = append(r.Columns, repl.Column{Name: anyText(random), Unit: anyText(random)})
		}
		for range random.IntN(4) {
			row := []repl.Cell{}
			for range r.Columns {
				if random.IntN(2) == 0 {
					row = append(row, repl.Cell{IsText: true, Text: anyText(random)})
				} else {
					row = append(row, repl.Cell{Number: random.NormFloat64() * 1e-9})
				}
			}
			r.Rows = append(r.Rows, row)
		}
	case repl.ErrorRecord:
		r = repl.Record{Kind: r.Kind, Line: r.Line, Error: anyText(random), Column: random.IntN(100)}
	}
	return r
}

func anyText(random *rand.Rand) string {
	signs := []rune("aZ09 \"\\\n\t<>&µ²·⁻±λ€\u2028\x01")
	var b strings.Builder
	for range random.IntN(8) {
		b.WriteRune(signs[random.IntN(len(signs))])
	}
	return b.String()
}

func anyNumber(random *rand.Rand) json.Number {
	return json.Number(strconv.FormatFloat(random.NormFloat64()*1e-12, 'g', -1, 64))
}

func TestDriftReadsBack(t *testing.T) {
	files := fstest.MapFS{
		"site.budget": {Data: []byte("T = 85 %\n")},
		"day.budget":  {Data: []byte("import \"site.budget\"\n| 1 name from site.budget, content 0\n|   T = 88 %\nx = T * 2 nm\n| 1.7600 nm\n\"x\" < y & z\n| 5 nm\n")},
	}
	r, err := repl.Replay(t.Context(), repl.Config{Files: files}, "day.budget")
	if err != nil || len(r.Drifts) < 2 {
		t.Fatalf("%d drifts, %v", len(r.Drifts), err)
	}
	moved := 0
	for _, d := range r.Drifts {
		d.Statement = "" // it is not written
		moved += len(d.MovedBy)
		readsBack(t, d)
	}
	if moved == 0 {
		t.Error("nothing is said to have moved a reply")
	}
}

func TestOtherObjectsAreRefused(t *testing.T) {
	for _, text := range []string{`{}`, `[]`, `{"line":1}`, `{"line":1,"recorded":[],"now":[]}`, `{"line":"one","text":""}`, `{"text":"","columns":[],"rows":[[true]]}`, `{"text":3}`} {
		var r repl.Record
		if err := json.Unmarshal([]byte(text), &r); err == nil {
			t.Errorf("%s is read as the record %+v", text, r)
		}
	}
	for _, text := range []string{`{}`, `{"line":1,"text":"","warnings":[]}`, `{"line":1,"recorded":[]}`, `{"recorded":[],"now":[]}`, `{"line":1,"recorded":[1],"now":[]}`} {
		var d repl.Drift
		if err := json.Unmarshal([]byte(text), &d); err == nil {
			t.Errorf("%s is read as the drift %+v", text, d)
		}
	}
}
