package repl_test

import (
	"bytes"
	"encoding/json"
	"os"
	"strings"
	"testing"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// The page on JSON says what is written: its statements give its objects, byte
// for byte, and each reads back and is written as it stands.
func TestJSONPage(t *testing.T) {
	page, err := os.ReadFile("../docs/json.md")
	if err != nil {
		t.Fatal(err)
	}
	statements, tested := "", map[string]int{}
	for i, part := range strings.Split(string(page), "```") {
		if i%2 == 0 {
			continue
		}
		kind, text, _ := strings.Cut(part, "\n")
		for line := range strings.Lines(text) {
			tested[kind]++
			line = strings.TrimSuffix(line, "\n")
			switch kind {
			case "json":
				again(t, line, &repl.Record{})
			case "drift":
				again(t, line, &repl.Drift{})
			case "quantity":
				again(t, line, &units.Quantity{})
			case "eval":
			default:
				t.Errorf("a block of the kind %q", kind)
			}
		}
		switch kind {
		case "eval":
			statements = text
		case "json":
			if got := evaluated(t, statements); got != text {
				t.Errorf("%s gives\n%swant\n%s", statements, got, text)
			}
		}
	}
	for kind, least := range map[string]int{"json": 7, "drift": 1, "quantity": 3, "eval": 7} {
		if tested[kind] < least {
			t.Errorf("%d lines of %s, want %d", tested[kind], kind, least)
		}
	}
}

// evaluated are the objects of statements, a line each.
func evaluated(t *testing.T, statements string) string {
	t.Helper()
	var out bytes.Buffer
	s := repl.NewSession(repl.Config{})
	number := 0
	for line := range strings.Lines(statements) {
		number++
		for _, rec := range s.Feed(t.Context(), strings.TrimSuffix(line, "\n")).Records() {
			rec.Line = number
			write(t, &out, rec)
		}
	}
	return out.String()
}

func write(t *testing.T, to *bytes.Buffer, v any) {
	t.Helper()
	e := json.NewEncoder(to)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		t.Fatal(err)
	}
}

// again reads an object and writes it.
func again(t *testing.T, line string, v any) {
	t.Helper()
	if err := json.Unmarshal([]byte(line), v); err != nil {
		t.Errorf("%s: %v", line, err)
		return
	}
	var out bytes.Buffer
	write(t, &out, v)
	if got := strings.TrimSuffix(out.String(), "\n"); got != line {
		t.Errorf("%s\nis written again as\n%s", line, got)
	}
}

// The fields of a distribution are those of the page; its numbers are those of
// the trials.
func TestJSONDistribution(t *testing.T) {
	s := defined(t, repl.Config{}, "d = 30 mJ/cm^2 ± 2 %")
	d, err := s.Propagate(t.Context(), "d : trials = 1e4")
	if err != nil {
		t.Fatal(err)
	}
	text, err := json.Marshal(repl.RecordOf(d, repl.DefaultDigits))
	if err != nil {
		t.Fatal(err)
	}
	var fields map[string]any
	if err := json.Unmarshal(text, &fields); err != nil {
		t.Fatal(err)
	}
	for _, name := range []string{"line", "text", "value", "unit", "si", "dimension", "plane", "uncertainty", "low", "high", "coverage", "trials", "skewness", "warnings"} {
		if _, ok := fields[name]; !ok {
			t.Errorf("%s has no %s", text, name)
		}
		delete(fields, name)
	}
	if len(fields) > 0 {
		t.Errorf("the page does not have %v", fields)
	}
	readsBack(t, repl.RecordOf(d, repl.DefaultDigits))
}
