package terminal

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"unicode/utf8"
)

// Bounds of the history: entries, bytes of one entry, bytes of the file that
// are looked at.
const (
	maxEntries      = 2000
	maxEntry        = 16 << 10
	maxHistoryBytes = 4 << 20
)

// history keeps what was said, one entry a line, in a file that only its owner
// may read. A file that cannot be used is reported and then left alone; the
// entries of the run are kept in memory all the same.
type history struct {
	path    string // "" keeps nothing on disk
	entries []string
	lines   int // entries in the file
}

// openHistory reads the file, or makes one. What is no entry in it (a line that
// is too long, no UTF-8, or has control characters) is left out, and the file
// is then written anew.
func openHistory(path string) (*history, error) {
	h := &history{path: path}
	if path == "" {
		return h, nil
	}
	if err := h.open(); err != nil {
		h.path = ""
		return h, fmt.Errorf("lines are not kept for the next session: %w", err)
	}
	return h, nil
}

func (h *history) open() error {
	info, err := os.Stat(h.path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		if err := os.MkdirAll(filepath.Dir(h.path), 0o700); err != nil {
			return err
		}
		return h.rewrite()
	case err != nil:
		return err
	case !info.Mode().IsRegular():
		return fmt.Errorf("%s is no regular file", h.path)
	}
	sound, err := h.load()
	if err != nil {
		return err
	}
	if sound && info.Mode().Perm() == 0o600 {
		return nil
	}
	return h.rewrite()
}

// load reads the entries at the end of the file and tells whether the whole
// file was sound and within its bounds.
func (h *history) load() (sound bool, err error) {
	file, err := os.Open(h.path)
	if err != nil {
		return false, err
	}
	defer file.Close()
	size, err := file.Seek(0, io.SeekEnd)
	if err != nil {
		return false, err
	}
	from := max(0, size-maxHistoryBytes)
	h.entries, sound, err = readEntries(io.NewSectionReader(file, from, size-from))
	if from > 0 && len(h.entries) > 0 {
		h.entries, sound = h.entries[1:], false // the first may be the end of a longer one
	}
	h.lines = len(h.entries)
	h.trim()
	return sound && h.lines == len(h.entries) && endsLine(file, size), err
}

func readEntries(in io.Reader) (entries []string, sound bool, err error) {
	sound = true
	from := newLines(in, maxEntry)
	for {
		line, err := from.next()
		switch {
		case errors.Is(err, io.EOF):
			return entries, sound, nil
		case err != nil && !errors.Is(err, errTooLong):
			return nil, false, err
		case err == nil && isEntry(line):
			entries = append(entries, line)
		default:
			sound = false
		}
	}
}

// endsLine tells whether the last byte ends a line; when not, an entry that is
// added would run into it.
func endsLine(file io.ReaderAt, size int64) bool {
	if size == 0 {
		return true
	}
	last := make([]byte, 1)
	_, err := file.ReadAt(last, size-1)
	return err == nil && last[0] == '\n'
}

func isEntry(line string) bool {
	return strings.TrimSpace(line) != "" && len(line) <= maxEntry && utf8.ValidString(line) &&
		!strings.ContainsFunc(line, hidden)
}

func (h *history) trim() {
	if over := len(h.entries) - maxEntries; over > 0 {
		h.entries = append([]string(nil), h.entries[over:]...)
	}
}

// add keeps an entry, unless it is none or repeats the one before.
func (h *history) add(entry string) error {
	entry = strings.ReplaceAll(entry, "\t", " ")
	if !isEntry(entry) || len(h.entries) > 0 && h.entries[len(h.entries)-1] == entry {
		return nil
	}
	h.entries = append(h.entries, entry)
	h.trim()
	if h.path == "" {
		return nil
	}
	if err := appendLine(h.path, entry); err != nil {
		return err
	}
	if h.lines++; h.lines <= 2*maxEntries {
		return nil
	}
	if _, err := h.load(); err != nil { // another session may have added to it
		return err
	}
	return h.rewrite()
}

// appendLine adds one line, or nothing: what a full disk left of it is cut off.
func appendLine(path, line string) error {
	file, err := os.OpenFile(path, os.O_WRONLY|os.O_APPEND|os.O_CREATE, 0o600)
	if err != nil {
		return err
	}
	defer file.Close()
	size, err := file.Seek(0, io.SeekEnd)
	if err != nil {
		return err
	}
	if _, err := io.WriteString(file, line+"\n"); err != nil {
		return errors.Join(err, file.Truncate(size))
	}
	return nil
}

// rewrite replaces the file by the entries, whole or not at all.
func (h *history) rewrite() error {
	path := h.path
	if real, err := filepath.EvalSymlinks(path); err == nil {
		path = real
	}
	file, err := os.CreateTemp(filepath.Dir(path), ".history-*") // made with mode 0600
	if err != nil {
		return err
	}
	defer os.Remove(file.Name())
	var text strings.Builder
	for _, entry := range h.entries {
		text.WriteString(entry + "\n")
	}
	_, err = io.WriteString(file, text.String())
	if err = errors.Join(err, file.Close()); err != nil {
		return err
	}
	h.lines = len(h.entries)
	return os.Rename(file.Name(), path)
}
