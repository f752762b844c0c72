package repl

import (
	"flag"
	"os"
	"slices"
	"strings"
	"testing"
)

var update = flag.Bool("update", false, "write the recorded help anew")

// Every page of help is recorded, so that a change of it is seen.
func TestHelpTexts(t *testing.T) {
	s := NewSession(Config{})
	words := append([]string{""}, s.helpWords()...)
	var b strings.Builder
	for _, word := range words {
		lines := s.Help(word)
		if len(lines) == 0 {
			t.Errorf("help %s says nothing", word)
		}
		b.WriteString("== help " + word + "\n" + strings.Join(lines, "\n") + "\n\n")
		for _, l := range lines {
			if n := columns(l); n > 100 {
				t.Errorf("help %s: a line of %d columns: %s", word, n, l)
			}
		}
	}
	const file = "testdata/help.txt"
	if *update {
		if err := os.WriteFile(file, []byte(b.String()), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	got, recorded := strings.Split(b.String(), "\n"), strings.Split(string(want), "\n")
	for i := range got {
		if i >= len(recorded) || got[i] != recorded[i] {
			t.Fatalf("line %d of the help is\n%s\ngo test ./repl -run HelpTexts -update records it", i+1, got[i])
		}
	}
	if len(got) != len(recorded) {
		t.Errorf("the help has %d lines, %d are recorded", len(got), len(recorded))
	}
}

// Every statement has a usage, a summary, help and completion, and its example
// runs.
func TestStatementRows(t *testing.T) {
	offered := statementWords()
	for _, st := range statements() {
		if st.usage == "" || st.summary == "" || len(NewSession(Config{}).Help(st.word)) < 2 {
			t.Errorf("%s has no usage, summary or help", st.word)
		}
		named := !slices.Contains([]string{"value", "definition", "function"}, st.word)
		if named && !slices.Contains(offered, st.word+" ") {
			t.Errorf("%s is not completed", st.word)
		}
		if st.example == "" {
			continue
		}
		s := NewSession(Config{})
		for _, line := range []string{"chain pair", "at IF", "mirror x2: 66 %", "at WAFER", "end"} {
			if st.word != "chain" {
				s.Feed(t.Context(), line)
			}
		}
		for line := range strings.SplitSeq(st.example, "\n") {
			if r := s.Feed(t.Context(), line); r.Err != nil {
				t.Errorf("the example of %s: %s: %v", st.word, line, r.Err)
			}
		}
	}
}

// Every line of the tour is a statement that runs, but for the one that is
// refused to show how.
func TestTour(t *testing.T) {
	s := NewSession(Config{})
	ran := 0
	for line := range strings.Lines(startPage) {
		if !strings.HasPrefix(line, "  ") {
			continue
		}
		statement := strings.TrimSpace(line)
		r := s.Feed(t.Context(), statement)
		ran++
		refused := strings.Contains(line, "refused") || strings.HasPrefix(statement, "save")
		if (r.Err != nil) != refused {
			t.Errorf("%s: %v", statement, r.Err)
		}
	}
	if ran < 12 {
		t.Errorf("the tour has %d statements", ran)
	}
}
