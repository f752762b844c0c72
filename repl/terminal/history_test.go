package terminal

import (
	"fmt"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
)

func openedHistory(t *testing.T, path string) *history {
	t.Helper()
	h, err := openHistory(path)
	if err != nil {
		t.Fatal(err)
	}
	return h
}

// written gives the file, which must be for its owner only.
func written(t *testing.T, path string) string {
	t.Helper()
	info, err := os.Stat(path)
	if err != nil {
		t.Fatal(err)
	}
	if info.Mode().Perm() != 0o600 {
		t.Errorf("the mode is %v", info.Mode())
	}
	text, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

func add(t *testing.T, h *history, entries ...string) {
	t.Helper()
	for _, entry := range entries {
		if err := h.add(entry); err != nil {
			t.Fatal(err)
		}
	}
}

func TestHistory(t *testing.T) {
	path := filepath.Join(t.TempDir(), "new", "folder", "history")
	h := openedHistory(t, path)
	block := joinEntry([]string{"dose> chain a", "        at IF", "| a reply", "", "end "})
	add(t, h, "1 + 1", "1 + 1", "", "  ", "2\t+ 2", block, "bad \x1b[A", strings.Repeat("x", maxEntry+1))
	if got, want := written(t, path), "1 + 1\n2 + 2\nchain a ↵ at IF ↵  ↵ end\n"; got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
	again := openedHistory(t, path)
	if !reflect.DeepEqual(again.entries, h.entries) {
		t.Errorf("read back as %q, was %q", again.entries, h.entries)
	}
	lines := splitEntry(again.entries[2])
	if want := []string{"chain a", "at IF", "", "end"}; !reflect.DeepEqual(lines, want) {
		t.Errorf("the block became %q, want %q", lines, want)
	}
}

func TestHistoryTakesACorruptFile(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history")
	corrupt := "one\n\x00\x01\n\xff\xfe\n\n" + strings.Repeat("x", 5*maxEntry) + "\ntwo\x1b[2J\nthree\nfour"
	if err := os.WriteFile(path, []byte(corrupt), 0o644); err != nil {
		t.Fatal(err)
	}
	h := openedHistory(t, path)
	add(t, h, "five")
	if got, want := written(t, path), "one\nthree\nfour\nfive\n"; got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

func TestHistoryIsMadePrivate(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history")
	if err := os.WriteFile(path, []byte("one\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	openedHistory(t, path)
	if got := written(t, path); got != "one\n" {
		t.Errorf("got %q", got)
	}
}

func TestHistoryIsBounded(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history")
	h := openedHistory(t, path)
	for i := range 2*maxEntries + 1 {
		add(t, h, fmt.Sprint("entry ", i))
	}
	if len(h.entries) != maxEntries || h.entries[maxEntries-1] != fmt.Sprint("entry ", 2*maxEntries) {
		t.Errorf("%d entries, the last is %q", len(h.entries), h.entries[len(h.entries)-1])
	}
	if got := strings.Count(written(t, path), "\n"); got != maxEntries {
		t.Errorf("%d entries in the file, want %d", got, maxEntries)
	}
}

func TestHistoryReadsTheEndOfALargeFile(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history")
	line := strings.Repeat("1+", maxEntry/2-1) + "1\n"
	text := strings.Repeat(line, 2*maxHistoryBytes/len(line)) + "last\n"
	if err := os.WriteFile(path, []byte(text), 0o600); err != nil {
		t.Fatal(err)
	}
	h := openedHistory(t, path)
	if got := h.entries[len(h.entries)-1]; got != "last" {
		t.Errorf("the last entry is %q", got)
	}
	if got := len(written(t, path)); got > maxHistoryBytes {
		t.Errorf("%d bytes are left of the file", got)
	}
}

// Two prompts may share a file.
func TestHistoryIsShared(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history")
	a, b := openedHistory(t, path), openedHistory(t, path)
	add(t, a, "one")
	add(t, b, "two")
	add(t, a, "three")
	if got := written(t, path); got != "one\ntwo\nthree\n" {
		t.Errorf("got %q", got)
	}
}

func TestHistoryThatCannotBeKept(t *testing.T) {
	folder := t.TempDir()
	file := filepath.Join(folder, "file")
	if err := os.WriteFile(file, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	for _, path := range []string{folder, filepath.Join(file, "history"), os.DevNull} {
		h, err := openHistory(path)
		if err == nil {
			t.Errorf("%s was opened", path)
		}
		add(t, h, "one")
		if len(h.entries) != 1 {
			t.Errorf("%s: the entries of the run are %q", path, h.entries)
		}
	}
	h := openedHistory(t, "")
	add(t, h, "one")
}

func TestHistoryBehindALink(t *testing.T) {
	folder := t.TempDir()
	real, link := filepath.Join(folder, "real"), filepath.Join(folder, "link")
	if err := os.WriteFile(real, []byte("one"), 0o600); err != nil { // its end is missing, so it is written anew
		t.Fatal(err)
	}
	if err := os.Symlink(real, link); err != nil {
		t.Fatal(err)
	}
	openedHistory(t, link)
	if info, err := os.Lstat(link); err != nil || info.Mode()&os.ModeSymlink == 0 {
		t.Errorf("the link is gone: %v, %v", info, err)
	}
	if got := written(t, real); got != "one\n" {
		t.Errorf("got %q", got)
	}
}
