package study

import (
	"encoding/json"
	"os"
	"path/filepath"
	"strconv"
	"testing"
)

// published reads a file of the project's testdata, where its sources are named.
func published(t testing.TB, name string, into any) {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("..", "..", "..", "testdata", name))
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(text, into); err != nil {
		t.Fatal(err)
	}
}

// example is a worked example of gum.json, with the check that is looked for.
type example struct {
	ID     string `json:"id"`
	Checks []struct {
		What       string          `json:"what"`
		Published  json.RawMessage `json:"published"`
		Recomputed json.RawMessage `json:"recomputed"`
		Tolerance  float64         `json:"tolerance"`
	} `json:"checks"`
}

// figure is a published figure with its tolerance, and the recomputed one.
type figure struct {
	published, recomputed []float64
	tolerance             float64
}

func numbers(t testing.TB, raw json.RawMessage) []float64 {
	t.Helper()
	var one float64
	if json.Unmarshal(raw, &one) == nil {
		return []float64{one}
	}
	var many []float64
	if err := json.Unmarshal(raw, &many); err != nil {
		t.Fatal(err)
	}
	return many
}

// gum finds a figure of gum.json: JCGM 100:2008 and JCGM 101:2008.
func gum(t testing.TB, id, what string) figure {
	t.Helper()
	var file struct {
		Examples []example `json:"examples"`
	}
	published(t, "gum.json", &file)
	for _, e := range file.Examples {
		for _, c := range e.Checks {
			if e.ID == id && c.What == what {
				return figure{numbers(t, c.Published), numbers(t, c.Recomputed), c.Tolerance}
			}
		}
	}
	t.Fatalf("gum.json has no check %q of %s", what, id)
	return figure{}
}

func sources(t testing.TB, inputs []Input, pairs ...Correlation) *Sources {
	t.Helper()
	s, err := NewSources(inputs, pairs...)
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// eval is a model that always has a value.
func eval(f func(x []float64) float64) Eval {
	return func(x []float64) (float64, error) { return f(x), nil }
}

// program makes Blocks of scalar models.
func program(outputs ...Eval) Program { return func() Block { return Lanes(outputs...) } }

// decimal is a number written as text.
type decimal float64

func (d *decimal) UnmarshalText(text []byte) error {
	x, err := strconv.ParseFloat(string(text), 64)
	*d = decimal(x)
	return err
}
