package repl

import (
	"errors"
	"strings"
	"unicode"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// The causes of refusals, for errors.Is. Units give units.ErrDimension.
var (
	ErrPlane     = program.ErrPlane
	ErrNotFinite = program.ErrNotFinite
	ErrDivision  = program.ErrDivision
	ErrUnknown   = program.ErrUnknown
	ErrSize      = program.ErrSize
	ErrCircle    = errors.New("a name would rest on itself")
	ErrDependent = errors.New("names that rest on this one would break")
	ErrFile      = errors.New("the file cannot be used")
)

// Refusal is the error of a statement that was refused. Nothing has changed.
//
// errors.Is tells why: ErrPlane, ErrCircle, ErrDependent, ErrDivision,
// ErrNotFinite, ErrUnknown, ErrSize, ErrFile, units.ErrDimension,
// units.ErrExponent, units.ErrRoot, or that the context has ended. errors.As
// finds a *units.DimensionError with both dimensions, a *PlaneError with both
// planes, a *LimitError, a *units.ParseError, or a *euv.ArgumentError with the
// argument that is out of range. Marks gives the places in Text.
type Refusal struct {
	Text string // the statement as it was written
	err  *syntax.Error
}

// refusal makes the reply of a refused statement.
func (s *Session) refusal(text string, err error) *Reply {
	var bad *syntax.Error
	if !errors.As(err, &bad) {
		bad = &syntax.Error{Msg: err.Error(), Cause: err}
	}
	return &Reply{Text: text, Err: &Refusal{text, bad}, style: s.style()}
}

// Error says what is wrong and one way on.
func (r *Refusal) Error() string { return syntax.Visible(r.err.Error()) }

// Unwrap returns the cause.
func (r *Refusal) Unwrap() error { return r.err }

// Message says what is wrong.
func (r *Refusal) Message() string { return r.err.Msg }

// WayOn says what to do.
func (r *Refusal) WayOn() string { return r.err.Hint }

// Marks returns where the statement is wrong, as byte ranges of Text.
func (r *Refusal) Marks() [][2]int {
	var list [][2]int
	for _, m := range r.err.Marks {
		list = append(list, [2]int{m.Start, m.End})
	}
	return list
}

// Column is where the first mark stands in its line, counted from one.
func (r *Refusal) Column() int {
	if len(r.err.Marks) == 0 {
		return 1
	}
	start := min(r.err.Marks[0].Start, len(r.Text))
	line := r.Text[strings.LastIndexByte(r.Text[:start], '\n')+1 : start]
	return len([]rune(line)) + 1
}

// window is how much of a long statement is shown around its first mark.
const window = 100

// Lines draws the statement, the marks, the message and the way on.
func (r *Refusal) Lines() []Line {
	text, marks := r.line()
	shown, under := draw(text, marks)
	out := []Line{{shown, Plain}, {under, Marks}, {r.err.Msg, Refused}}
	if r.err.Hint != "" {
		out = append(out, Line{r.err.Hint, WayOn})
	}
	return out
}

// line returns the line that holds the first mark, and its marks.
func (r *Refusal) line() (string, []syntax.Span) {
	marks := r.err.Marks
	if len(marks) == 0 {
		marks = []syntax.Span{{Start: 0, End: len(r.Text)}}
	}
	first := min(marks[0].Start, len(r.Text))
	start := strings.LastIndexByte(r.Text[:first], '\n') + 1
	end := len(r.Text)
	if n := strings.IndexByte(r.Text[start:], '\n'); n >= 0 {
		end = start + n
	}
	var inside []syntax.Span
	for _, m := range marks {
		if m.Start >= start && m.Start <= end {
			inside = append(inside, syntax.Span{Start: m.Start - start, End: min(m.End, end) - start})
		}
	}
	return r.Text[start:end], inside
}

// draw puts marks under a text. A long text is cut to a window.
func draw(text string, marks []syntax.Span) (string, string) {
	var shown, under strings.Builder
	from, cells := 0, 0
	if len(text) > window && len(marks) > 0 && marks[0].Start > window/2 {
		from = marks[0].Start - window/2
		shown.WriteString("… ")
		under.WriteString("  ")
	}
	for i, r := range text {
		if i < from {
			continue
		}
		if cells >= window {
			shown.WriteString(" …")
			break
		}
		piece := syntax.Visible(string(r))
		shown.WriteString(piece)
		n := columns(piece)
		cells += n
		under.WriteString(strings.Repeat(markAt(i, marks), n))
	}
	line := strings.TrimRight(under.String(), " ")
	if !strings.Contains(line, "~") {
		line = under.String() + "~" // the end of the line is what is wrong
	}
	return shown.String(), line
}

func markAt(i int, marks []syntax.Span) string {
	for _, m := range marks {
		if i >= m.Start && i < m.End {
			return "~"
		}
	}
	return " "
}

// columns is how many cells of a terminal a text takes, wide scripts aside.
func columns(s string) int {
	n := 0
	for _, r := range s {
		if !unicode.Is(unicode.Mn, r) {
			n++
		}
	}
	return n
}
