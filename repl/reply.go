package repl

import (
	"errors"

	"example.com/dosewright/repl/internal/syntax"
)

// Reply is the answer to one statement or to one line of a block.
type Reply struct {
	Text    string   // the statement
	Results []Result // what it prints, in order
	Err     error    // a *Refusal when the statement was refused
	More    bool     // a block is open: the next line belongs to it
	Quit    bool     // the session is to end
	Failed  bool     // a check does not hold
	style   Style
}

// Style is how numbers are shown.
type Style struct {
	Digits int // significant digits
}

// Tone says what a line is, for colour alone.
type Tone int

// The tones of a line.
const (
	Plain Tone = iota
	Marks
	Refused
	WayOn
	Warning
	Good
	Bad
)

// Line is one line of a reply, without its margin.
type Line struct {
	Text string
	Tone Tone
}

// Result is one thing that a statement prints.
type Result interface {
	lines(Style) []Line
	record() Record
}

// Lines returns the reply as it is printed, without the margin.
func (r *Reply) Lines() []Line { return r.linesIn(r.style) }

func (r *Reply) linesIn(style Style) []Line {
	var out []Line
	for _, x := range r.Results {
		out = append(out, x.lines(style)...)
	}
	var bad *Refusal
	if errors.As(r.Err, &bad) {
		out = append(out, bad.Lines()...)
	}
	for i := range out {
		out[i].Text = syntax.Visible(out[i].Text)
	}
	return out
}

// Records returns the reply as plain values for JSON, one a result; a
// statement that prints nothing gives none.
func (r *Reply) Records() []Record {
	var out []Record
	for _, x := range r.Results {
		out = append(out, RecordOf(x, r.style.Digits))
	}
	var bad *Refusal
	if errors.As(r.Err, &bad) {
		out = append(out, Record{Kind: ErrorRecord, Error: bad.Error(), Column: bad.Column()})
	}
	return out
}

func joinLines(lines []Line) string {
	s := ""
	for i, l := range lines {
		if l.Tone == Warning {
			continue
		}
		if i > 0 {
			s += "\n"
		}
		s += l.Text
	}
	return s
}

// Warnings returns the doubts that travel with the reply.
func (r *Reply) Warnings() []string {
	var all []string
	for _, x := range r.Results {
		all = append(all, x.record().Warnings...)
	}
	return all
}
