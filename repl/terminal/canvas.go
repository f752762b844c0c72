package terminal

import (
	"bytes"
	"io"
)

// canvas is what the line editor draws on. Each drawing of the line comes in
// one write, after another that clears from the cursor to the end of the
// screen.
//
// It mends how the editor moves the cursor to the left over the edge of a
// wrapped line. The editor sends a backspace at the first column and then
// cursor up; where a backspace at the first column goes up by itself, as in
// some terminal multiplexers, that is one line too many and erases what was
// printed above. The backspace is left out: cursor up, carriage return and
// cursor right say it all.
//
// Below a search in the history it puts words of its own for the editor's.
type canvas struct {
	to    io.Writer
	below string // drawn once, behind the next drawing of the line
}

func (c *canvas) Write(p []byte) (int, error) {
	mended := bytes.ReplaceAll(p, []byte("\b\x1b[A\r"), []byte("\x1b[A\r"))
	for _, w := range searchWords {
		mended = bytes.Replace(mended, []byte("\x1b[J"+w[0]), []byte("\x1b[J"+w[1]), 1)
	}
	if !bytes.HasPrefix(p, []byte("\x1b[J")) {
		mended = append(mended, c.below...)
		c.below = ""
	}
	if _, err := c.to.Write(mended); err != nil {
		return 0, err
	}
	return len(p), nil
}

// searchWords are what the editor says of a search and what stands there
// instead.
var searchWords = [...][2]string{
	{"bck-i-search: ", "said before: "},
	{"fwd-i-search: ", "said after: "},
	{"failing bck-i-search: ", "nowhere before: "},
	{"failing fwd-i-search: ", "nowhere after: "},
}
