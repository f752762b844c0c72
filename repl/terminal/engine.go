package terminal

import "context"

// Engine is what the prompt talks to. Its methods are never called at the same
// time.
type Engine interface {
	// Feed takes one line of input and evaluates it when it completes a
	// statement. When ctx is cancelled it should return soon.
	Feed(ctx context.Context, line string) Answer
	// Complete offers what may stand at the cursor (a byte offset in line): the
	// offset at which the word being completed starts, and the words that may
	// replace line[start:cursor], in order.
	Complete(line string, cursor int) (start int, candidates []string)
	// Hint is a short text about the call being typed, such as its arguments, or
	// "". It is asked for after each key.
	Hint(line string, cursor int) string
	// Abandon forgets the block for whose end Feed waits.
	Abandon()
}

// Answer is the reply to one line of input.
type Answer struct {
	// Lines are printed behind the margin.
	Lines []Line
	// Chart draws the picture that goes with the reply, so many columns wide,
	// as lines; nil when there is none.
	Chart func(columns int) []string
	// More says that a block is open: the prompt becomes six blanks.
	More bool
	// Quit says that the session is over.
	Quit bool
}

// Line is one line of a reply, without the margin.
type Line struct {
	Text string
	Kind Kind
}

// Kind says what a line is, for its colour only.
type Kind int

// The kinds of lines. The zero is Plain.
const (
	Plain   Kind = iota // answers, tables, notes, the way on from a refusal
	Mark                // the marks under a refused statement
	Refusal             // why a statement was refused
	Warning             // a doubt about an answer
	Good                // a check that holds
	Bad                 // a check that fails
)
