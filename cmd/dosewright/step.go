package main

import (
	"context"
	"errors"
	"os"

	"example.com/dosewright/repl"
	"example.com/dosewright/repl/terminal"
)

// step goes through a session file with a reader: a note and a statement, and
// the reply when Enter is pressed.
func step(ctx context.Context, c repl.Config, name string, std stdio) int {
	steps, err := repl.OpenSteps(c, name)
	if err != nil {
		return std.wrong(err.Error())
	}
	e := &stepping{steps: steps}
	first := e.show()
	for _, l := range first {
		std.out.WriteString(repl.Margin + l.Text + "\n")
	}
	std.out.Flush()
	err = terminal.Run(ctx, e, terminal.Options{
		In: std.in, Out: std.screen, Err: std.problems,
		Term: os.Getenv("TERM"), NoColor: os.Getenv("NO_COLOR") != "",
	})
	var ended *terminal.Ended
	switch {
	case errors.As(err, &ended):
		return signalled(ended)
	case err != nil:
		return std.wrong(err.Error())
	}
	return statusFine
}

// stepping is the engine of a stepped session.
type stepping struct {
	steps *repl.Steps
	over  bool
}

// Feed runs the statement at hand on an empty line; anything else is a question
// that changes nothing.
func (e *stepping) Feed(ctx context.Context, line string) terminal.Answer {
	if line == "" {
		a := answerOf(e.steps.Run(ctx))
		a.Lines = append(a.Lines, e.show()...)
		a.Quit = e.over
		return a
	}
	a := answerOf(e.steps.Ask(ctx, line))
	a.More = false
	return a
}

// show gives the next note and statement.
func (e *stepping) show() []terminal.Line {
	s, ok := e.steps.Next()
	var out []terminal.Line
	for _, n := range s.Notes {
		out = append(out, terminal.Line{Text: n})
	}
	if !ok {
		e.over = true
		return append(out, terminal.Line{Text: "that was the last step", Kind: terminal.Good})
	}
	for i, l := range s.Statement {
		if i == 0 {
			l = repl.Prompt + l
		}
		out = append(out, terminal.Line{Text: l})
	}
	return append(out, terminal.Line{Text: "Enter shows the reply; ask anything; Ctrl-D leaves", Kind: terminal.Mark})
}

// Complete offers what fits in the session so far.
func (e *stepping) Complete(line string, cursor int) (int, []string) {
	return e.steps.Session().Complete(line, cursor)
}

// Hint is that of the session so far.
func (e *stepping) Hint(line string, cursor int) string {
	return e.steps.Session().Hint(line, cursor)
}

// Abandon does nothing: a question is one line.
func (e *stepping) Abandon() {}
