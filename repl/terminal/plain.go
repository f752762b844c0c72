package terminal

import (
	"context"
	"io"
	"os"
)

// plain reads lines as they come: from a pipe or a file, or from a terminal on
// which nothing can be drawn.
type plain struct {
	ask        io.Writer        // where the prompt goes; nil without one
	interrupts <-chan os.Signal // Ctrl-C while a line is awaited; nil without
	lines      chan plainLine
	done       chan struct{}
}

type plainLine struct {
	text string
	err  error
}

func newPlain(in io.Reader, ask io.Writer, interrupts <-chan os.Signal) *plain {
	p := &plain{ask: ask, interrupts: interrupts, lines: make(chan plainLine), done: make(chan struct{})}
	go p.run(newLines(in, maxLine))
	return p
}

// run stands apart, since a read of a pipe cannot be called off.
func (p *plain) run(in *lines) {
	defer close(p.lines)
	for {
		text, err := in.next()
		select {
		case p.lines <- plainLine{text, err}:
		case <-p.done:
			return
		}
		if err != nil && err != errTooLong {
			return
		}
	}
}

func (p *plain) read(ctx context.Context, prompt string) (string, error) {
	p.forgetInterrupt()
	if err := p.put(prompt); err != nil {
		return "", err
	}
	select {
	case line, ok := <-p.lines:
		if !ok || line.err == io.EOF {
			return "", p.leave(io.EOF)
		}
		return line.text, line.err
	case <-p.interrupts:
		// The terminal itself has dropped what was typed.
		return "", p.leave(errCancelled)
	case <-ctx.Done():
		return "", context.Cause(ctx)
	}
}

// leave ends a line that nobody will end, and says why.
func (p *plain) leave(why error) error {
	if err := p.put("\n"); err != nil {
		return err
	}
	return why
}

// forgetInterrupt drops the interrupt that has stopped the last evaluation.
func (p *plain) forgetInterrupt() {
	select {
	case <-p.interrupts:
	default:
	}
}

func (p *plain) put(text string) error {
	if p.ask == nil {
		return nil
	}
	_, err := io.WriteString(p.ask, text)
	return err
}

func (p *plain) remember(string) {}

// discard ends the line in which the terminal has shown the ^C.
func (p *plain) discard() { _ = p.put("\n") }

func (p *plain) close() { close(p.done) }
