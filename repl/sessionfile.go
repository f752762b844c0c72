package repl

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"path"
	"strings"
	"unicode/utf8"

	"example.com/dosewright/repl/internal/syntax"
)

// MaxFile is how many bytes a session file may have.
const MaxFile = 8 << 20

// said is one line of a session file that was said, a statement or a line of a
// block, with the replies recorded behind it.
type said struct {
	number   int      // of the line, from 1
	line     string   // as it stands in the file
	recorded []string // without the margin
}

// readFile reads a session file whole, with bounds on its size.
func readFile(files fs.FS, name string) ([]byte, error) {
	if files == nil {
		return nil, fmt.Errorf("this session reads no files: %w", ErrFile)
	}
	if about, err := fs.Stat(files, name); err == nil && !about.Mode().IsRegular() {
		return nil, fmt.Errorf("%s cannot be read: it is no ordinary file: %w", name, ErrFile)
	}
	f, err := files.Open(name)
	if err != nil {
		var at *fs.PathError
		if errors.As(err, &at) {
			err = at.Err
		}
		return nil, fmt.Errorf("%s cannot be read: %w: %w", name, err, ErrFile)
	}
	defer f.Close()
	text, err := io.ReadAll(io.LimitReader(f, MaxFile+1))
	if err != nil {
		return nil, fmt.Errorf("%s cannot be read: %w: %w", name, err, ErrFile)
	}
	if len(text) > MaxFile {
		return nil, fmt.Errorf("%s has more than %d MiB; a session file may have that much: %w", name, MaxFile>>20, ErrFile)
	}
	return text, nil
}

// readSession reads a session file and cuts it into what was said.
func readSession(files fs.FS, name string) (text []byte, list []said, err error) {
	if text, err = readFile(files, name); err == nil {
		list, err = transcript(name, text)
	}
	return text, list, err
}

// transcript cuts a session file into what was said and what was answered.
// Replies before anything said are passed over. It refuses what is no text.
func transcript(name string, text []byte) ([]said, error) {
	text = bytes.TrimPrefix(text, []byte("\uFEFF"))
	var list []said
	number := 0
	for raw := range strings.SplitSeq(strings.TrimSuffix(string(text), "\n"), "\n") {
		number++
		line := strings.TrimRight(raw, "\r")
		switch {
		case !utf8.ValidString(line):
			return nil, fmt.Errorf("%s:%d is not UTF-8 text: %w", name, number, ErrFile)
		case strings.ContainsRune(line, 0):
			return nil, fmt.Errorf("%s:%d holds a NUL byte; a session file is text: %w", name, number, ErrFile)
		case len(line) > syntax.MaxStatement:
			return nil, fmt.Errorf("%s:%d has %d bytes; a line may have %d: %w", name, number, len(line), syntax.MaxStatement, ErrFile)
		case !strings.HasPrefix(line, "|"):
			list = append(list, said{number: number, line: line})
		case len(list) > 0:
			last := &list[len(list)-1]
			last.recorded = append(last.recorded, strings.TrimPrefix(strings.TrimPrefix(line, "|"), " "))
		}
	}
	return list, nil
}

// whole is a statement of a session file, the lines of a block joined.
type whole struct {
	number  int // of its first line
	text    string
	refused bool // its recorded reply is a refusal
}

// statementsOf joins the lines of blocks. A line of a block that was refused
// when it was said does not belong to it.
func statementsOf(list []said) []whole {
	var out []whole
	open := false
	for _, l := range list {
		text := strings.TrimSpace(strings.TrimPrefix(l.line, Prompt))
		if open && strings.HasPrefix(l.line, Prompt) {
			out, open = out[:len(out)-1], false // the block was given up
		}
		switch {
		case open && syntax.BlockEnd(text):
			out[len(out)-1].text += "\nend"
			out[len(out)-1].refused = saysRefused(l.recorded)
			open = false
		case open && len(l.recorded) == 0:
			out[len(out)-1].text += "\n  " + text
		case !open && text != "" && !strings.HasPrefix(text, "#"):
			out = append(out, whole{l.number, text, saysRefused(l.recorded)})
			_, open = syntax.BlockHeading(text)
		}
	}
	return out
}

// saysRefused says whether a recorded reply is that of a refused statement: its
// second line marks a place in the first.
func saysRefused(reply []string) bool {
	return len(reply) > 2 && strings.Contains(reply[1], "~") && strings.Trim(reply[1], " ~") == ""
}

// inside joins an import path to the folder of the file that names it and
// keeps it inside the session's folder.
func (s *Session) inside(name string) (string, error) {
	if strings.Contains(name, "\\") || strings.HasPrefix(name, "/") || name == "" {
		return "", fmt.Errorf("%q is no path inside this session's folder: %w", name, ErrFile)
	}
	dir := s.config.Dir
	if s.origin.file != "" {
		dir = path.Dir(s.origin.file)
	}
	full := path.Join(dir, name)
	if !fs.ValidPath(full) {
		return "", fmt.Errorf("%q leads outside this session's folder: %w", name, ErrFile)
	}
	return full, nil
}

// contentHash is a short fingerprint of definitions.
func contentHash(lines []string) string {
	sum := sha256.Sum256([]byte(strings.Join(lines, "\n")))
	return hex.EncodeToString(sum[:6])
}
