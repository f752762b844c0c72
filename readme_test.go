package dosewright_test

import (
	"bytes"
	"context"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/repl"
)

// documents are the files whose transcripts must be true.
func documents(t *testing.T) []string {
	t.Helper()
	var list []string
	for _, pattern := range []string{"*.md", "docs/*.md", "docs/*/*.md", "examples/*/*.md"} {
		found, err := filepath.Glob(pattern)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, found...)
	}
	if !slices.Contains(list, "README.md") || !slices.Contains(list, "DEVELOPERS.md") {
		t.Fatalf("README.md and DEVELOPERS.md are not among %q", list)
	}
	return list
}

// block is one fenced part of a document: what stands behind the opening
// fence, the line that it is on, and the text with all line ends.
type block struct {
	kind string
	line int
	text string
}

// blocks cuts a document into its fenced parts.
func blocks(t *testing.T, name string) []block {
	t.Helper()
	text, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	var list []block
	open := false
	for i, line := range strings.SplitAfter(string(text), "\n") {
		kind, fence := strings.CutPrefix(line, "```")
		switch {
		case fence && !open:
			list = append(list, block{kind: strings.TrimSpace(kind), line: i + 1})
			open = true
		case fence:
			open = false
		case open:
			list[len(list)-1].text += line
		}
	}
	if open {
		t.Errorf("%s:%d: this block is not closed", name, list[len(list)-1].line)
	}
	return list
}

// only gives the blocks of a kind.
func only(kind string, list []block) []block {
	return slices.DeleteFunc(slices.Clone(list), func(b block) bool { return b.kind != kind })
}

// Every session in every document says exactly what the prompt says.
func TestSessionsInDocuments(t *testing.T) {
	total := 0
	for _, name := range documents(t) {
		for _, b := range only("session", blocks(t, name)) {
			total++
			if got := said(b.text); got != b.text {
				t.Errorf("%s:%d: the session does not run as it is written; it runs as\n%s", name, b.line, got)
			}
		}
	}
	if total == 0 {
		t.Error("the documents hold no session")
	}
}

// said types the statements of a transcript again and writes down what a
// terminal would show.
func said(transcript string) string {
	s := repl.NewSession(repl.Config{})
	var out strings.Builder
	for line := range strings.Lines(transcript) {
		if strings.HasPrefix(line, repl.Margin) {
			continue
		}
		out.WriteString(line)
		for _, l := range s.Feed(context.Background(), strings.TrimSuffix(line, "\n")).Lines() {
			out.WriteString(repl.Margin + l.Text + "\n")
		}
	}
	return out.String()
}

// A transcript that lies must be found out.
func TestSaidNotices(t *testing.T) {
	const lie = "dose> 1 nm + 1 nm\n| 3 nm\n"
	if got, want := said(lie), "dose> 1 nm + 1 nm\n| 2 nm\n"; got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

// The commands for a fresh machine work as they are written.
func TestReadmeCommands(t *testing.T) {
	commands := only("sh", blocks(t, "README.md"))
	if len(commands) != 1 {
		t.Fatalf("README.md has %d blocks of commands, want the one of a fresh machine", len(commands))
	}
	lines := strings.Split(strings.TrimSpace(commands[0].text), "\n")
	if len(lines) != 2 || lines[1] != "go test ./..." {
		t.Fatalf("got %q, want a replay and go test ./...", lines)
	}
	words := strings.Fields(lines[0])
	out, err := exec.CommandContext(t.Context(), words[0], words[1:]...).CombinedOutput()
	if err != nil || !strings.Contains(string(out), "recorded replies hold") {
		t.Errorf("%s: %v\n%s", lines[0], err, out)
	}
}

// The drift that README.md shows is what a replay says after that change.
func TestReadmeDrift(t *testing.T) {
	shown := only("moved", blocks(t, "README.md"))
	if len(shown) != 1 {
		t.Fatalf("README.md shows %d drifts, want 1", len(shown))
	}
	dir := t.TempDir()
	if err := os.CopyFS(dir, os.DirFS("examples/fab-north")); err != nil {
		t.Fatal(err)
	}
	name := filepath.Join(dir, "conventions.budget")
	before, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	after := bytes.Replace(before, []byte("T_pell = 88 %"), []byte("T_pell = 85 %"), 1)
	if err := os.WriteFile(name, after, 0o644); err != nil {
		t.Fatal(err)
	}
	r, err := repl.Replay(t.Context(), repl.Config{Files: os.DirFS(dir)}, "daily.budget")
	if err != nil {
		t.Fatal(err)
	}
	var report strings.Builder
	for _, l := range r.Lines() {
		report.WriteString(l.Text + "\n")
	}
	if !strings.Contains(report.String(), shown[0].text) {
		t.Errorf("README.md:%d: the replay says\n%s", shown[0].line, report.String())
	}
}

// The program of README.md builds in a module of its own, with nothing but what
// this module has fetched, and prints what is written under it.
func TestReadmeProgram(t *testing.T) {
	list := blocks(t, "README.md")
	at := slices.IndexFunc(list, func(b block) bool { return b.kind == "go" })
	if at < 0 || at+1 >= len(list) || list[at+1].kind != "text" {
		t.Fatal("README.md has no Go program with its output in the block behind it")
	}
	got, err := elsewhere(t, list[at].text)
	if err != nil {
		t.Fatalf("README.md:%d: %v\n%s", list[at].line, err, got)
	}
	if want := list[at+1].text; got != want {
		t.Errorf("README.md:%d: the program prints\n%swant\n%s", list[at+1].line, got, want)
	}
}

// elsewhere runs a program in a new module that finds this one by replace.
func elsewhere(t *testing.T, program string) (string, error) {
	t.Helper()
	home, err := os.Getwd()
	if err != nil {
		t.Fatal(err)
	}
	ours, err := os.ReadFile("go.mod")
	if err != nil {
		t.Fatal(err)
	}
	sums, err := os.ReadFile("go.sum")
	if err != nil {
		t.Fatal(err)
	}
	theirs := bytes.Replace(ours, []byte("module "+module), []byte("module host"), 1)
	theirs = append(theirs, "\nrequire "+module+" v0.0.0\nreplace "+module+" => "+filepath.ToSlash(home)+"\n"...)
	dir := t.TempDir()
	for name, text := range map[string][]byte{"go.mod": theirs, "go.sum": sums, "main.go": []byte(program)} {
		if err := os.WriteFile(filepath.Join(dir, name), text, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	run := exec.CommandContext(t.Context(), "go", "run", "-mod=mod", ".")
	run.Dir = dir
	run.Env = append(os.Environ(), "GOPROXY=off", "GOWORK=off", "GOFLAGS=")
	out, err := run.CombinedOutput()
	return string(out), err
}

// The test helper must say so when a program does not build.
func TestElsewhereNotices(t *testing.T) {
	if testing.Short() {
		t.Skip("builds a program")
	}
	out, err := elsewhere(t, "package main\n\nimport _ \""+module+"/repl/internal/syntax\"\n\nfunc main() {}\n")
	if err == nil || !strings.Contains(out, "internal") {
		t.Errorf("got %v, want a refusal of the internal package\n%s", err, out)
	}
}
