package terminal

import (
	"bufio"
	"errors"
	"io"
	"strings"
)

// Bounds of a line: of one that is read as it is, in bytes, and of one that is
// edited, in characters, since each change of it draws it anew.
const (
	maxLine   = 1 << 20
	maxEdited = 64 << 10
)

// lines reads a stream line by line in bounded memory.
type lines struct {
	in    *bufio.Reader
	limit int // bytes of a line, without its end
}

func newLines(in io.Reader, limit int) *lines {
	return &lines{in: bufio.NewReader(in), limit: limit}
}

// next gives the next line without its end (LF or CRLF). A line over the limit
// is read to its end and reported as errTooLong; the one after it can be read.
// A last line without an end is a line, and io.EOF follows.
func (l *lines) next() (string, error) {
	var line []byte
	long, some := false, false
	for {
		part, err := l.in.ReadSlice('\n')
		some = some || len(part) > 0
		whole := err == nil
		if whole {
			part = part[:len(part)-1]
		}
		if long = long || len(line)+len(part) > l.limit+len("\r"); long {
			line = nil
		} else {
			line = append(line, part...)
		}
		switch {
		case whole, errors.Is(err, io.EOF) && some:
			return l.finish(line, long)
		case !errors.Is(err, bufio.ErrBufferFull):
			return "", err
		}
	}
}

func (l *lines) finish(line []byte, long bool) (string, error) {
	text := strings.TrimSuffix(string(line), "\r")
	if long || len(text) > l.limit {
		return "", errTooLong
	}
	return text, nil
}
