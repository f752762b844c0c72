package page

import (
	"bytes"
	"context"
	"errors"
	"flag"
	"io/fs"
	"os"
	"strings"
	"testing"
	"testing/fstest"

	"example.com/dosewright/repl"
)

var update = flag.Bool("update", false, "write the golden page anew")

// paged makes the page of a session that lies among these files.
func paged(t testing.TB, files fs.FS, name string) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Write(t.Context(), configOf(files), name, &b); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// configOf reads these files; what a session writes would fail the test that
// looks, since it is never to be asked for.
func configOf(files fs.FS) repl.Config {
	return repl.Config{Files: files, Version: "v1", Create: func(string) (repl.File, error) {
		return nil, errors.New("a page writes no other file")
	}}
}

// session is a folder with one session in it.
func session(lines ...string) fs.FS {
	return fstest.MapFS{"day.budget": {Data: []byte(strings.Join(lines, "\n"))}}
}

func TestGolden(t *testing.T) {
	got := paged(t, os.DirFS("testdata"), "small.budget")
	if *update {
		if err := os.WriteFile("testdata/small.html", got, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile("testdata/small.html")
	if err != nil {
		t.Fatal(err)
	}
	if bytes.Equal(got, want) {
		return
	}
	a, b := strings.Split(string(got), "\n"), strings.Split(string(want), "\n")
	for i := range a {
		if i >= len(b) || a[i] != b[i] {
			t.Fatalf("line %d of the page is\n%s\nwant\n%s\ngo test -update writes the page anew", i+1, a[i], b[min(i, len(b)-1)])
		}
	}
	t.Fatalf("the page ends after %d lines, want %d", len(a), len(b))
}

// The same session gives the same bytes, pictures included.
func TestSameBytes(t *testing.T) {
	files := session("a = 3 W ± 1 %", "propagate a^2 : trials = 2000, plot", "sweep x = 1 .. 5 9 points, y = 1 .. 5 9 points : x*y plot")
	if a, b := paged(t, files, "day.budget"), paged(t, files, "day.budget"); !bytes.Equal(a, b) {
		t.Error("two pages of one session differ")
	}
}

// oneWrite takes the page and counts the calls.
type oneWrite struct {
	calls, bytes int
	err          error
}

func (w *oneWrite) Write(p []byte) (int, error) {
	w.calls++
	w.bytes += len(p)
	return len(p), w.err
}

func TestWholeOrNothing(t *testing.T) {
	full := errors.New("full")
	stopped, stop := context.WithCancel(t.Context())
	stop()
	for name, c := range map[string]struct {
		ctx   context.Context
		files fs.FS
		file  string
		fails error // of the writer
		want  error
		calls int
	}{
		"a page":             {t.Context(), session("1 nm"), "day.budget", nil, nil, 1},
		"a page of refusals": {t.Context(), session("1 nm + 1 s", "x", "import \"gone\""), "day.budget", nil, nil, 1},
		"a full disk":        {t.Context(), session("1 nm"), "day.budget", full, full, 1},
		"no file":            {t.Context(), session("1 nm"), "night.budget", nil, repl.ErrFile, 0},
		"no text":            {t.Context(), session("1 nm\xff"), "day.budget", nil, repl.ErrFile, 0},
		"no files at all":    {t.Context(), nil, "day.budget", nil, repl.ErrFile, 0},
		"interrupted":        {stopped, session("1 nm"), "day.budget", nil, context.Canceled, 0},
	} {
		w := &oneWrite{err: c.fails}
		if err := Write(c.ctx, configOf(c.files), c.file, w); !errors.Is(err, c.want) || c.want == nil && err != nil {
			t.Errorf("%s: error %v, want %v", name, err, c.want)
		}
		if w.calls != c.calls {
			t.Errorf("%s: %d writes, want %d", name, w.calls, c.calls)
		}
	}
}

// An empty session is a page too, under the name of its file.
func TestEmpty(t *testing.T) {
	d := read(t, paged(t, session(""), "day.budget"))
	if got := d.text("h1"); len(got) != 1 || got[0] != "day.budget" {
		t.Errorf("the title is %q, want the name of the file", got)
	}
	if n := len(d.all("nav")); n != 0 {
		t.Errorf("%d lists of contents on an empty page", n)
	}
}
