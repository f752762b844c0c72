package repl_test

import (
	"errors"
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/fstest"

	"example.com/dosewright/repl"
)

// What exceeds a limit is refused with the limit, its value and the way on; what
// just fits is taken.
func TestLimits(t *testing.T) {
	files := fstest.MapFS{
		"three.csv": {Data: []byte("x / nm\n1\n2\n3\n")},
		"two.csv":   {Data: []byte("x / nm\n1\n2\n")},
		"a.budget":  {Data: []byte("a1 = 1\na2 = 2\n")},
		"b.budget":  {Data: []byte("b1 = 1\n")},
	}
	draw := func(*repl.Picture, string, io.Writer) error { return nil }
	create := func(string) (repl.File, error) { return keeping{&strings.Builder{}}, nil }
	for _, c := range []struct {
		limit        repl.Limits
		name         string
		before       []string
		fits, beyond string
		most, asked  int64
		wayOn        string
	}{
		{repl.Limits{Statement: 20}, "Statement", nil, "x = 123456789012345 ", "x = 1234567890123456 + 1", 20, 24, "names of their own"},
		{repl.Limits{Definitions: 2}, "Definitions", []string{"x = 1", "y = 2", "x = 3"}, "y = 4", "z = 5", 2, 3, "forget"},
		{repl.Limits{Definitions: 2}, "Definitions", []string{"x = 1"}, "f(x) = x", "chain c\n  at IF\n  m: 50 %\n  at WAFER\nend", 2, 3, "forget"},
		{repl.Limits{Imports: 1}, "Imports", nil, `import "a.budget"`, `import "b.budget"`, 1, 2, "join"},
		{repl.Limits{Definitions: 2}, "Definitions", []string{"x = 1"}, `import "b.budget"`, `import "a.budget"`, 2, 3, "forget"},
		{repl.Limits{Data: 2}, "Data", nil, `data t = "two.csv"`, `data u = "three.csv"`, 2, 3, "take a part"},
		{repl.Limits{Rows: 5}, "Rows", nil, "sweep x = 1 .. 2 5 points : x", "sweep x = 1 .. 2 6 points : x", 5, 6, "fewer points"},
		{repl.Limits{Points: 50}, "Points", nil, `sweep x = 1 .. 2 50 points : x to "t.csv"`, `sweep x = 1 .. 2 51 points : x to "t.csv"`, 50, 51, "larger steps"},
		{repl.Limits{Points: 50}, "Points", nil, "sweep x = 1 .. 2 5 points, y = 1 .. 2 10 points : x * y", "sweep x = 1 .. 2 5 points, y = 1 .. 2 11 points : x * y", 50, 55, "larger steps"},
		{repl.Limits{Pictured: 5}, "Pictured", nil, `sweep x = 1 .. 2 5 points : x to "p.svg"`, `sweep x = 1 .. 2 6 points : x to "p.svg"`, 5, 6, "larger steps"},
		{repl.Limits{Trials: 5000}, "Trials", []string{"d = 3 nm ± 1 nm"}, "propagate d : trials = 5000", "propagate d : trials = 5001", 5000, 5001, "trials = 5000"},
		{repl.Limits{Trials: 5000}, "Trials", []string{"d = 3 nm ± 1 nm"}, "propagate d", "propagate d : trials = 1e6", 5000, 1000000, "trials = 5000"},
		{repl.Limits{Memory: 80_000}, "Memory", []string{"d = 3 nm ± 1 nm"}, "propagate d : trials = 1e4", "propagate d : trials = 10001", 80_000, 80_008, "trials = 10000"},
		{repl.Limits{Memory: 80_000}, "Memory", []string{"d = 3 nm ± 1 nm"}, "propagate d", "propagate d : trials = 1e5", 80_000, 800_000, "trials = 10000"},
		{repl.Limits{Trials: -1}, "Trials", []string{"d = 3 nm ± 1 nm"}, "propagate d : trials = 1e4", "", 0, 0, ""},
	} {
		s := repl.NewSession(repl.Config{Files: files, Limits: c.limit, Draw: draw, Create: create})
		feed := func(text string) error {
			var r *repl.Reply
			for line := range strings.Lines(text) {
				if r = s.Feed(t.Context(), strings.TrimRight(line, "\n")); r.Err != nil {
					return r.Err
				}
			}
			return nil
		}
		for _, text := range append(c.before, c.fits) {
			if err := feed(text); err != nil {
				t.Errorf("%s, %s: %v", c.name, text, err)
			}
		}
		if c.beyond == "" {
			continue
		}
		err := feed(c.beyond)
		var over *repl.LimitError
		if !errors.As(err, &over) || !errors.Is(err, repl.ErrSize) {
			t.Errorf("%s, %s: %v", c.name, c.beyond, err)
			continue
		}
		if want := (repl.LimitError{Limit: c.name, Most: c.most, Asked: c.asked}); *over != want {
			t.Errorf("%s: %+v, want %+v", c.beyond, *over, want)
		}
		if text := err.Error(); !strings.Contains(text, c.wayOn) || !strings.Contains(text, fmt.Sprint(c.most)) {
			t.Errorf("%s: %q, want the limit %d and %q", c.beyond, text, c.most, c.wayOn)
		}
		if over.Error() == "" {
			t.Error("no text")
		}
	}
}

// The defaults are what sessions always had.
func TestDefaultLimits(t *testing.T) {
	for _, limits := range []repl.Limits{{}, {Statement: 1 << 30, Points: 1 << 40, Trials: 1 << 40}} {
		s := defined(t, repl.Config{Limits: limits}, "d = 3 nm ± 1 nm")
		for text, want := range map[string]repl.LimitError{
			"sweep x = 1 .. 2 1001 points : x":                                 {Limit: "Rows", Most: 1000, Asked: 1001},
			"sweep x = 1 .. 2 1e4 points, y = 1 .. 2 1001 points : x * y":      {Limit: "Points", Most: 10_000_000, Asked: 10_010_000},
			"sweep x = 1 .. 2 1001 points, y = 1 .. 2 200 points : x * y plot": {Limit: "Pictured", Most: 200_000, Asked: 200_200},
		} {
			var over *repl.LimitError
			if r := s.Feed(t.Context(), text); !errors.As(r.Err, &over) || *over != want {
				t.Errorf("%s: %v, want %+v", text, r.Err, want)
			}
		}
		if r := s.Feed(t.Context(), "propagate d : trials = 100000001"); r.Err == nil {
			t.Error("more trials than study makes are taken")
		}
		if _, err := s.Eval(t.Context(), "1"+strings.Repeat(" + 1", 20_000)); err == nil {
			t.Error("a statement of 80 000 bytes is taken")
		}
	}
}

// A frozen session keeps its limits.
func TestFrozenLimits(t *testing.T) {
	z := frozen(t, repl.Config{Limits: repl.Limits{Statement: 20, Rows: 5}})
	var over *repl.LimitError
	if _, err := z.Eval(t.Context(), "1 + 1 + 1 + 1 + 1 + 1"); !errors.As(err, &over) || over.Limit != "Statement" {
		t.Errorf("Eval: %v", err)
	}
	if _, err := z.Compile("1 + 1 + 1 + 1 + 1 + 1"); !errors.As(err, &over) || over.Limit != "Statement" {
		t.Errorf("Compile: %v", err)
	}
	if v, err := z.Eval(t.Context(), "1 + 1 + 1 + 1 + 1"); err != nil {
		t.Errorf("what fits: %v, %v", v, err)
	}
}
