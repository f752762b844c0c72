package repl

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"strings"
	"testing"
	"testing/fstest"
)

// spoken says statements, none of which may be refused, and returns the last
// reply.
func spoken(t testing.TB, s *Session, statements ...string) *Reply {
	t.Helper()
	var r *Reply
	for _, text := range statements {
		for line := range strings.Lines(text) {
			if r = s.Feed(context.Background(), strings.TrimRight(line, "\n")); r.Err != nil {
				t.Fatalf("%s: %v", text, r.Err)
			}
		}
	}
	return r
}

// printed is a reply as it stands in a transcript, without the margin.
func printed(r *Reply) string {
	var lines []string
	for _, l := range r.Lines() {
		lines = append(lines, l.Text)
	}
	return strings.Join(lines, "\n")
}

// prints says a statement and compares what it prints, blanks at the line ends
// and the first line end aside.
func prints(t testing.TB, s *Session, statement, want string) {
	t.Helper()
	if got := printed(spoken(t, s, statement)); got != strings.Trim(want, "\n") {
		t.Errorf("%s\n got:\n%s\nwant:\n%s", statement, got, strings.Trim(want, "\n"))
	}
}

// refused says a statement that must be refused with this message and way on,
// and must leave all names as they are.
func refused(t testing.TB, s *Session, statement, message, wayOn string) {
	t.Helper()
	before := printed(spoken(t, s, "names"))
	r := s.Feed(context.Background(), statement)
	var bad *Refusal
	switch {
	case !errors.As(r.Err, &bad):
		t.Errorf("%s is not refused: %s", statement, printed(r))
	case bad.Message() != message || bad.WayOn() != wayOn:
		t.Errorf("%s\n got %s\n     %s\nwant %s\n     %s", statement, bad.Message(), bad.WayOn(), message, wayOn)
	case len(bad.Marks()) == 0:
		t.Errorf("%s: nothing is marked", statement)
	}
	if after := printed(spoken(t, s, "names")); after != before {
		t.Errorf("%s changed the session from\n%s\nto\n%s", statement, before, after)
	}
}

// valued is the one value that a statement prints.
func valued(t testing.TB, s *Session, statement string) *Value {
	t.Helper()
	r := spoken(t, s, statement)
	if len(r.Results) == 1 {
		if v, ok := r.Results[0].(*Value); ok {
			return v
		}
	}
	t.Fatalf("%s prints no value: %s", statement, printed(r))
	return nil
}

// uncertainty is the standard uncertainty of a value in its unit.
func (v *Value) uncertainty() float64 { return v.Unit.FromDifference(v.U) }

// resultOf is the one result of a statement.
func resultOf[R Result](t testing.TB, s *Session, statement string) R {
	t.Helper()
	r := spoken(t, s, statement)
	if len(r.Results) == 1 {
		if x, ok := r.Results[0].(R); ok {
			return x
		}
	}
	t.Fatalf("%s: %s", statement, printed(r))
	var none R
	return none
}

// numbersOf are the numbers of a table's rows, its texts left out.
func numbersOf(rows [][]Cell) [][]float64 {
	var out [][]float64
	for _, row := range rows {
		var line []float64
		for _, c := range row {
			if !c.IsText {
				line = append(line, c.Number)
			}
		}
		out = append(out, line)
	}
	return out
}

// folder is a folder of files in memory, in which a session reads and writes.
type folder struct {
	fstest.MapFS
	broken map[string]bool // files that cannot be finished
}

func (f *folder) config() Config {
	return Config{Files: f.MapFS, Create: f.create, Draw: drawn}
}

func (f *folder) create(name string) (File, error) {
	if strings.Contains(name, "/") {
		return nil, &fs.PathError{Op: "create", Path: name, Err: fs.ErrNotExist}
	}
	return &written{folder: f, name: name}, nil
}

// written is a file that appears in its folder when it is whole.
type written struct {
	folder *folder
	name   string
	text   []byte
}

func (w *written) Write(p []byte) (int, error) {
	w.text = append(w.text, p...)
	return len(p), nil
}

func (w *written) Commit() error {
	if w.folder.broken[w.name] {
		return &fs.PathError{Op: "write", Path: w.name, Err: errors.New("no space left")}
	}
	w.folder.MapFS[w.name] = &fstest.MapFile{Data: w.text}
	return nil
}

func (w *written) Abort() {}

func inFolder(files map[string]string) *folder {
	f := &folder{MapFS: fstest.MapFS{}, broken: map[string]bool{}}
	for name, text := range files {
		f.MapFS[name] = &fstest.MapFile{Data: []byte(text)}
	}
	return f
}

// drawn writes what a picture holds, as a file that a test can look into.
func drawn(p *Picture, format string, w io.Writer) error {
	_, err := fmt.Fprintf(w, "%s of %s against %s: %d curves", format, p.Y.Head(), p.X.Head(), len(p.Lines))
	return err
}
