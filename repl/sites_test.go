package repl_test

import (
	"context"
	"errors"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"example.com/dosewright/repl"
)

// sessions are the session files that come with the module, below the folders
// beside its root.
func sessions(t *testing.T) []string {
	t.Helper()
	var list []string
	for _, root := range []string{"../examples", "../testdata"} {
		err := filepath.WalkDir(root, func(name string, d os.DirEntry, err error) error {
			if err == nil && !d.IsDir() && filepath.Ext(name) == ".budget" {
				list = append(list, name)
			}
			return err
		})
		if err != nil {
			t.Fatal(err)
		}
	}
	return list
}

// reader is a host of sessions that reads the folder and makes no files; of a
// picture it writes the format alone, to where a replay throws it away.
func reader(folder string) repl.Config {
	return repl.Config{
		Files:  os.DirFS(folder),
		Create: func(name string) (repl.File, error) { return nil, errors.New("a replay makes no file " + name) },
		Draw: func(_ *repl.Picture, format string, w io.Writer) error {
			_, err := io.WriteString(w, format)
			return err
		},
	}
}

func replayed(t *testing.T, name string) *repl.Replayed {
	t.Helper()
	r, err := repl.Replay(context.Background(), reader(filepath.Dir(name)), filepath.Base(name))
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// Every session of the module says what it said when it was written down:
// nothing drifts, every check holds, every refusal is a recorded one.
func TestSites(t *testing.T) {
	list := sessions(t)
	for _, name := range []string{"../examples/fab-north/daily.budget", "../testdata/questions.budget"} {
		if !strings.Contains(strings.Join(list, "\n"), name) {
			t.Errorf("%s is not among %q", name, list)
		}
	}
	for _, name := range list {
		t.Run(filepath.Base(name), func(t *testing.T) {
			t.Parallel()
			r := replayed(t, name)
			if r.Statements == 0 {
				t.Error("no statement in it")
			}
			if r.Moved() || len(r.Refused) > 0 {
				for _, line := range r.Lines() {
					t.Error(line.Text)
				}
			}
		})
	}
}

// leastQuestions is how many questions, each with an answer worked out apart,
// the module promises.
const leastQuestions = 80

// Every question has its answer: a check, or a reply written down by hand.
func TestQuestions(t *testing.T) {
	const name = "../testdata/questions.budget"
	text, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	asked := strings.Count(string(text), "\n# by hand: ")
	written := strings.Count(string(text), "\ncheck ")
	held := 0
	for _, rec := range replayed(t, name).Records {
		if rec.Kind == repl.CheckRecord && rec.Holds {
			held++
		}
	}
	if held != written {
		t.Errorf("%d checks hold of %d", held, written)
	}
	if held < leastQuestions {
		t.Errorf("%d checks hold, want %d or more", held, leastQuestions)
	}
	if asked < held {
		t.Errorf("%d questions say how their answers were found, and there are %d checks", asked, held)
	}
}

// A session that lies must be found out, whatever it lies about.
func TestSitesNotice(t *testing.T) {
	for _, c := range []struct{ why, text string }{
		{"drift", "2 * 3 nm\n| 7 nm\n"},
		{"a check that fails", "check 2 nm >= 3 nm\n"},
		{"a refusal without record", "2 nm + 3 W\n"},
		{"a block without end", "chain pair\n  at IF\n"},
	} {
		folder := t.TempDir()
		if err := os.WriteFile(filepath.Join(folder, "lie.budget"), []byte(c.text), 0o644); err != nil {
			t.Fatal(err)
		}
		if r := replayed(t, filepath.Join(folder, "lie.budget")); !r.Moved() && len(r.Refused) == 0 {
			t.Errorf("%s is not found out", c.why)
		}
	}
}
