//go:build linux || darwin

package main

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"
)

// A process that is killed while it saves leaves the old text or the new one.
// The process is the command itself, fed through a pipe with one more
// definition and a save, over and over.
func TestKilledWhileSaving(t *testing.T) {
	kills := 50
	if testing.Short() {
		kills = 5
	}
	inFolder(t, nil)
	random := rand.New(rand.NewPCG(13, 5))
	versions := map[int]bool{}
	for range kills {
		if err := os.RemoveAll("day.budget"); err != nil {
			t.Fatal(err)
		}
		saveUntilKilled(t, time.Duration(random.IntN(40_000))*time.Microsecond)
		n, err := wholeVersion(read(t, "day.budget"))
		if err != nil {
			t.Fatal(err)
		}
		versions[n] = true
	}
	if len(versions) < 2 {
		t.Errorf("%d kills met one version alone: they did not come at random moments", kills)
	}
	parts, err := filepath.Glob("day.budget.*.part")
	if err != nil {
		t.Fatal(err)
	}
	t.Logf("%d kills met %d versions, %d of them between the start and the end of a write", kills, len(versions), len(parts))
}

func TestWholeVersionNotices(t *testing.T) {
	whole := strings.Repeat(pad(), padding) + definition(1) + definition(2)
	if n, err := wholeVersion(whole); n != 2 || err != nil {
		t.Errorf("got %d, %v for a whole version of two", n, err)
	}
	for _, text := range []string{"", whole[:len(whole)/2], whole[:len(whole)-1], whole + "x3", whole[1:], strings.Replace(whole, "x1", "x7", 1)} {
		if n, err := wholeVersion(text); err == nil {
			t.Errorf("%d bytes pass as version %d", len(text), n)
		}
	}
}

// A version is the padding and so many definitions in order.
const padding = 40

func pad() string { return "# " + strings.Repeat("a long note, ", 160) + "end\n" }

func definition(n int) string { return fmt.Sprintf("x%d = %d nm\n", n, n) }

// saveUntilKilled starts the command, waits until it has saved once, lets it go
// on for a while, and kills it.
func saveUntilKilled(t *testing.T, after time.Duration) {
	t.Helper()
	c := apart(t, "")
	in, err := c.StdinPipe()
	if err != nil {
		t.Fatal(err)
	}
	out, err := c.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	go func() { // ends when the process is gone
		w := bufio.NewWriter(in)
		for range padding {
			w.WriteString(pad())
		}
		for n := 1; ; n++ {
			if _, err := w.WriteString(definition(n) + "save \"day.budget\"\n"); err != nil {
				return
			}
		}
	}()
	for lines := bufio.NewScanner(out); lines.Scan() && !strings.Contains(lines.Text(), "day.budget"); {
	}
	go io.Copy(io.Discard, out)
	time.Sleep(after)
	if err := c.Process.Kill(); err != nil {
		t.Fatal(err)
	}
	c.Wait() // says that it was killed
}

// wholeVersion counts the definitions of a file, and checks that it is the
// whole text up to there.
func wholeVersion(text string) (int, error) {
	n := strings.Count(text, " nm\n")
	var want strings.Builder
	want.WriteString(strings.Repeat(pad(), padding))
	for i := 1; i <= n; i++ {
		want.WriteString(definition(i))
	}
	if n == 0 || text != want.String() {
		return n, fmt.Errorf("%d bytes are no whole version; they end with %q", len(text), text[max(0, len(text)-200):])
	}
	return n, nil
}

// apart is the command in a process of its own, which may write files of so
// many bytes ("" for any).
func apart(t *testing.T, limit string, args ...string) *exec.Cmd {
	t.Helper()
	c := exec.CommandContext(t.Context(), os.Args[0], args...)
	c.Env = append(os.Environ(), child+"="+limit)
	return c
}

// On a full disk the old file stays as it was, nothing else is left, and the
// status says so.
func TestDiskFull(t *testing.T) {
	const old = "x = 1 nm\n2 * x\n| 3 nm\n"
	const limit = "4096"
	long := strings.Repeat("# "+strings.Repeat("a note ", 100)+"\n", 20)
	for name, c := range map[string]struct {
		file, old string
		piped     string
		args      []string
	}{
		"save":            {"day.budget", old, long + "1 nm\nsave \"day.budget\"\nsave \"day.budget\"\n", nil},
		"save a new file": {"day.budget", old, long + "1 nm\nsave \"new.budget\"\n", nil},
		"a table":         {"x.csv", "x\n1\n", "sweep x = 1 .. 2 999 points : x to \"x.csv\"\n", nil},
		"update":          {"day.budget", old + long, "", []string{"replay", "--update", "day.budget"}},
	} {
		t.Run(name, func(t *testing.T) {
			dir := inFolder(t, map[string]string{c.file: c.old})
			var out, problems bytes.Buffer
			cmd := apart(t, limit, c.args...)
			cmd.Stdin, cmd.Stdout, cmd.Stderr = strings.NewReader(c.piped), &out, &problems
			err := cmd.Run()
			if cmd.ProcessState == nil || cmd.ProcessState.ExitCode() != 2 {
				t.Errorf("%v, want status 2\n%s%s", err, out.String(), problems.String())
			}
			if all := out.String() + problems.String(); !strings.Contains(all, "cannot be written: file too large") {
				t.Errorf("says\n%swant that the file cannot be written", all)
			}
			if got := read(t, c.file); got != c.old {
				t.Errorf("the file is now\n%s", got)
			}
			if files := listing(t, dir); len(files) != 1 {
				t.Errorf("the folder holds %q, want what it held", files)
			}
		})
	}
}

// A rewritten file keeps its permissions, and a link or a folder is not
// replaced by a file.
func TestWriteWholeKeeps(t *testing.T) {
	inFolder(t, map[string]string{"day.budget": "1 nm\n| 2 nm\n"})
	if err := os.Chmod("day.budget", 0o600); err != nil {
		t.Fatal(err)
	}
	call(t, "", "replay", "--update", "day.budget")
	info, err := os.Stat("day.budget")
	if err != nil || info.Mode().Perm() != 0o600 {
		t.Errorf("got %v (%v), want a file for its owner alone", info.Mode(), err)
	}
	if got, want := read(t, "day.budget"), "1 nm\n| 1 nm\n"; got != want {
		t.Errorf("the file is %q, want %q", got, want)
	}
}
