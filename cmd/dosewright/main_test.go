package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

// child is the variable of the environment that makes the test binary the
// command itself, for tests that need a process of its own.
const child = "DOSEWRIGHT_TEST_CHILD"

func TestMain(m *testing.M) {
	if limit, ok := os.LookupEnv(child); ok {
		if err := limitFiles(limit); err != nil {
			panic(err)
		}
		main()
	}
	os.Exit(m.Run())
}

// outcome is what one run of the command gives.
type outcome struct {
	status        int
	out, problems string
}

// call runs the command with what is piped in.
func call(t *testing.T, piped string, args ...string) outcome {
	t.Helper()
	var out, problems bytes.Buffer
	status := run(context.Background(), args, strings.NewReader(piped), &out, &problems)
	return outcome{status, out.String(), problems.String()}
}

// wants fails the test unless the run ended with the status, printed exactly
// the text ("…" at its end stands for anything more), and complained with words
// that contain what problems says ("" for no complaint).
func (o outcome) wants(t *testing.T, status int, out, problems string) {
	t.Helper()
	if o.status != status {
		t.Errorf("status %d, want %d\n%s%s", o.status, status, o.out, o.problems)
	}
	begin, open := strings.CutSuffix(out, "…")
	if open && !strings.HasPrefix(o.out, begin) || !open && o.out != out {
		t.Errorf("printed\n%swant\n%s", o.out, out)
	}
	o.complains(t, problems)
}

// complains fails the test unless the complaint is one line with the words in
// it, or none when there are no words.
func (o outcome) complains(t *testing.T, words string) {
	t.Helper()
	switch {
	case words == "" && o.problems != "":
		t.Errorf("complains %q, want no complaint", o.problems)
	case words != "" && (!strings.Contains(o.problems, words) || strings.Count(o.problems, "\n") != 1 || !strings.HasPrefix(o.problems, "dosewright: ")):
		t.Errorf("complains %q, want one line with %q", o.problems, words)
	}
}

// inFolder makes a folder with these files the working directory, and another
// one the place where the command keeps its own.
func inFolder(t *testing.T, files map[string]string) string {
	t.Helper()
	dir := t.TempDir()
	for name, text := range files {
		write(t, filepath.Join(dir, name), text)
	}
	t.Chdir(dir)
	own := t.TempDir()
	t.Setenv("HOME", own)
	t.Setenv("XDG_CONFIG_HOME", own)
	return dir
}

func write(t *testing.T, name, text string) {
	t.Helper()
	if err := os.WriteFile(name, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
}

func read(t *testing.T, name string) string {
	t.Helper()
	text, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// listing has the names in a folder.
func listing(t *testing.T, dir string) []string {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, e := range entries {
		names = append(names, e.Name())
	}
	return names
}

// fabNorth copies the example sessions into a folder, goes there, and gives
// their names.
func fabNorth(t *testing.T) []string {
	t.Helper()
	files := map[string]string{}
	tables, err := filepath.Glob("../../examples/fab-north/*.csv")
	if err != nil {
		t.Fatal(err)
	}
	for _, name := range append(examples(t), tables...) {
		files[filepath.Base(name)] = read(t, name)
	}
	return slices.DeleteFunc(listing(t, inFolder(t, files)), func(name string) bool { return filepath.Ext(name) != ".budget" })
}

// examples are the session files that come with the project.
func examples(t *testing.T) []string {
	t.Helper()
	list, err := filepath.Glob("../../examples/fab-north/*.budget")
	if err != nil || len(list) < 3 {
		t.Fatalf("%d example sessions found (%v), want at least 3", len(list), err)
	}
	return list
}
