package terminal

import (
	"io"
	"os"

	"golang.org/x/term"
)

// Options are the surroundings of a prompt.
type Options struct {
	// In, Out and Err are standard input, output and error. Editing, colour and
	// progress need an *os.File on a terminal.
	In       io.Reader
	Out, Err io.Writer
	// Term is the environment's TERM. With "dumb", nothing is drawn.
	Term string
	// NoColor turns colour off (the environment's NO_COLOR, when not empty).
	NoColor bool
	// Greeting is printed first, behind the margin, when there is a prompt; ""
	// prints nothing.
	Greeting string
	// HistoryFile keeps the lines from one run to the next; "" keeps none.
	HistoryFile string
	// Progress is cleared after each statement; nil when there is none.
	Progress *Progress
}

// terminalOf gives the file behind a stream when that is a terminal, else nil.
func terminalOf(stream any) *os.File {
	file, ok := stream.(*os.File)
	if !ok || file == nil || !term.IsTerminal(int(file.Fd())) {
		return nil
	}
	return file
}

// screen is where the editor draws: standard output, or standard error when
// the replies go to a file; nil when neither is a terminal.
func (o Options) screen() *os.File {
	if file := terminalOf(o.Out); file != nil {
		return file
	}
	return terminalOf(o.Err)
}

// edits tells whether lines can be edited.
func (o Options) edits() bool {
	return canEdit && o.Term != "dumb" && terminalOf(o.In) != nil && o.screen() != nil
}

// colours tells whether replies are coloured.
func (o Options) colours() bool {
	return !o.NoColor && o.Term != "dumb" && terminalOf(o.Out) != nil
}

// size is the width and height of a terminal, the width never less than the
// editor can bear; 80 and 24 when unknown.
func size(file *os.File) (columns, rows int) {
	if file == nil {
		return 80, 24
	}
	columns, rows, err := term.GetSize(int(file.Fd()))
	if err != nil || columns <= 0 || rows <= 0 {
		return 80, 24
	}
	return max(columns, leastColumns), rows
}

func columns(file *os.File) int {
	width, _ := size(file)
	return width
}

// leastColumns is above the length of the prompt: the line editor loops for
// ever when the width divides it.
const leastColumns = len(prompt) + 4
