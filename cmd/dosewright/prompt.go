package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"syscall"
	"time"

	"golang.org/x/term"

	"example.com/dosewright/repl"
	"example.com/dosewright/repl/terminal"
)

// prompt runs the session that is typed or piped in.
func prompt(ctx context.Context, std stdio) int {
	c, err := config(".")
	if err != nil {
		return std.wrong(err.Error())
	}
	progress := terminal.NewProgress(std.problems, os.Getenv("TERM"))
	c.Progress = showing(progress)
	e := &engine{session: repl.NewSession(c)}
	err = terminal.Run(ctx, e, terminal.Options{
		In: std.in, Out: std.screen, Err: std.problems,
		Term: os.Getenv("TERM"), NoColor: os.Getenv("NO_COLOR") != "",
		Greeting:    "dosewright " + version() + "; help shows the way in, quit leaves",
		HistoryFile: historyFile(std.in), Progress: progress,
	})
	var ended *terminal.Ended
	switch {
	case errors.As(err, &ended):
		return signalled(ended)
	case errors.Is(err, terminal.ErrLost):
		return statusRefused
	case err != nil:
		return std.wrong(err.Error())
	}
	if f, ok := std.in.(*os.File); ok && term.IsTerminal(int(f.Fd())) {
		return statusFine // what a person mistyped is no failure
	}
	return e.status
}

// showing draws how far a computation is, with the time left, once it has
// taken a second.
func showing(p *terminal.Progress) repl.Progress {
	var now pace
	return func(_ context.Context, done, total int, unit string) {
		gone := now.at(time.Now(), done, total)
		if gone < time.Second || done <= 0 {
			return
		}
		left := time.Duration(float64(gone) * float64(total-done) / float64(done)).Round(time.Second)
		p.Show(fmt.Sprintf("%d of %d %s, %s left; Ctrl-C stops", done, total, unit, left))
	}
}

// pace knows since when a computation runs, from how far it was last.
type pace struct {
	start       time.Time
	done, total int
}

// at takes how far the computation is and returns how long it has run. One that
// is no further than before, or has another total, is the next one.
func (p *pace) at(now time.Time, done, total int) time.Duration {
	if p.start.IsZero() || done <= p.done || total != p.total {
		p.start = now
	}
	p.done, p.total = done, total
	return now.Sub(p.start)
}

// signalled is the status that shells give to a program that a signal ended.
func signalled(ended *terminal.Ended) int {
	if s, ok := ended.Signal.(syscall.Signal); ok {
		return 128 + int(s)
	}
	return statusRefused
}

// historyFile is where lines are kept from one run to the next, "" when the
// system names no place or nobody types.
func historyFile(in io.Reader) string {
	if f, ok := in.(*os.File); !ok || !term.IsTerminal(int(f.Fd())) {
		return ""
	}
	dir, err := os.UserConfigDir()
	if err != nil {
		return ""
	}
	dir = filepath.Join(dir, "dosewright")
	if os.MkdirAll(dir, 0o700) != nil {
		return ""
	}
	return filepath.Join(dir, "history")
}

// engine joins a session to the terminal.
type engine struct {
	session *repl.Session
	status  int
}

func (e *engine) Feed(ctx context.Context, line string) terminal.Answer {
	r := e.session.Feed(ctx, line)
	switch {
	case r.Err != nil:
		e.status = statusRefused
	case r.Failed:
		e.status = max(e.status, statusMoved)
	}
	return answerOf(r)
}

// answerOf is a reply as the terminal prints it.
func answerOf(r *repl.Reply) terminal.Answer {
	a := terminal.Answer{More: r.More, Quit: r.Quit}
	for _, l := range r.Lines() {
		a.Lines = append(a.Lines, terminal.Line{Text: l.Text, Kind: kinds[l.Tone]})
	}
	return a
}

func (e *engine) Complete(line string, cursor int) (int, []string) {
	return e.session.Complete(line, cursor)
}

func (e *engine) Hint(line string, cursor int) string { return e.session.Hint(line, cursor) }

func (e *engine) Abandon() {
	e.session.Cancel()
	e.status = statusRefused // of a pipe that ends inside a block
}

var kinds = map[repl.Tone]terminal.Kind{
	repl.Plain: terminal.Plain, repl.Marks: terminal.Mark, repl.Refused: terminal.Refusal,
	repl.WayOn: terminal.Plain, repl.Warning: terminal.Warning, repl.Good: terminal.Good, repl.Bad: terminal.Bad,
}
