package terminal

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"os/signal"
	"strings"
)

// The prompts: of a statement, and of a line inside a block.
const (
	prompt      = "dose> "
	blockPrompt = "      "
)

// What a line reader may say instead of a line.
var (
	errCancelled = errors.New("the line was cancelled")
	errTooLong   = errors.New("the line is too long and was left out: make several lines of it")
)

// ErrLost is what Run returns when the input was no terminal and a line of it was
// too long and left out, which the replies say at its place.
var ErrLost = errors.New("a line was too long and was left out")

// lineReader is where lines come from: the editor or a plain stream.
type lineReader interface {
	// read gives the next line without its end; io.EOF, errCancelled and
	// errTooLong are its errors of daily life.
	read(ctx context.Context, prompt string) (string, error)
	// remember puts what was said in the history.
	remember(entry string)
	// discard drops the lines that are waiting, after an interrupt.
	discard()
	// close gives the terminal back as it was.
	close()
}

// Run reads lines until the input ends, the engine says quit, or ctx is
// cancelled. Ctrl-C drops a line or stops an evaluation, and does not leave.
//
// It returns nil when the session ended in an ordinary way, an *Ended when a
// signal ended it, the cause of ctx, or the error of reading or writing.
func Run(ctx context.Context, engine Engine, options Options) error {
	s := &session{engine: engine, printer: newPrinter(options), progress: options.Progress}
	switch {
	case options.edits():
		return s.edit(ctx, options)
	case terminalOf(options.In) != nil:
		return s.ask(ctx, options)
	}
	s.reader = newPlain(options.In, nil, nil)
	defer s.reader.close()
	return s.loop(ctx)
}

// edit runs the session with the line editor.
func (s *session) edit(ctx context.Context, options Options) error {
	ctx, stop := untilTold(ctx)
	defer stop()
	// Between two evaluations an interrupt must not kill the process either.
	defer signal.Stop(holdInterrupts())
	s.interrupts = true
	s.greet(options.screen(), options)
	editor, err := newEditor(ctx, s.engine, options)
	if err != nil {
		return err
	}
	s.reader = editor
	defer editor.close()
	return s.loop(ctx)
}

// ask runs the session on a terminal that cannot draw.
func (s *session) ask(ctx context.Context, options Options) error {
	interrupts := holdInterrupts()
	defer signal.Stop(interrupts)
	s.interrupts = true
	var screen io.Writer = io.Discard
	if file := options.screen(); file != nil {
		screen = file
	}
	s.greet(screen, options)
	s.reader = newPlain(options.In, screen, interrupts)
	defer s.reader.close()
	return s.loop(ctx)
}

// greet prints the greeting on the screen.
func (s *session) greet(screen io.Writer, options Options) {
	if options.Greeting != "" {
		options.Out = screen
		_ = newPrinter(options).print(Answer{Lines: []Line{{Text: options.Greeting}}})
	}
}

func holdInterrupts() chan os.Signal {
	held := make(chan os.Signal, 1)
	signal.Notify(held, os.Interrupt)
	return held
}

// session is one run of the prompt.
type session struct {
	engine     Engine
	reader     lineReader
	printer    *printer
	progress   *Progress
	interrupts bool     // Ctrl-C stops an evaluation, not the process
	lost       bool     // a line of a pipe was left out
	block      []string // the lines of the open block
}

func (s *session) loop(ctx context.Context) error {
	for ctx.Err() == nil {
		line, err := s.reader.read(ctx, s.prompt())
		switch {
		case errors.Is(err, errCancelled):
			err = s.cancel(line)
		case errors.Is(err, errTooLong):
			s.lost = s.lost || !s.interrupts
			err = s.say(Refusal, err.Error())
		case errors.Is(err, io.EOF):
			if err = s.end(ctx); err == nil && s.lost {
				err = ErrLost
			}
			return err
		case err == nil && ctx.Err() == nil:
			var over bool
			if over, err = s.submit(ctx, line); over {
				return err
			}
		}
		if err != nil {
			return err
		}
	}
	return context.Cause(ctx)
}

func (s *session) prompt() string {
	if len(s.block) > 0 {
		return blockPrompt
	}
	return prompt
}

// submit has one line evaluated and its reply printed.
func (s *session) submit(ctx context.Context, line string) (over bool, err error) {
	answer := s.evaluate(ctx, line)
	s.block = append(s.block, line)
	if !answer.More {
		s.reader.remember(joinEntry(s.block))
		s.block = nil
	}
	return answer.Quit, s.printer.print(answer)
}

// evaluate feeds the engine. An interrupt cancels the evaluation and what was
// waiting behind it.
func (s *session) evaluate(ctx context.Context, line string) Answer {
	running := ctx
	if s.interrupts {
		var stop context.CancelFunc
		running, stop = signal.NotifyContext(ctx, os.Interrupt)
		defer stop()
	}
	answer := s.feed(running, line)
	s.progress.Clear()
	if running.Err() != nil {
		s.reader.discard()
		if len(answer.Lines) == 0 {
			answer.Lines = []Line{{Text: "interrupted", Kind: Refusal}}
		}
	}
	return answer
}

// feed keeps a fault of the engine from taking the session along.
func (s *session) feed(ctx context.Context, line string) (answer Answer) {
	defer func() {
		if fault := recover(); fault != nil {
			answer = Answer{Lines: []Line{{Text: faultText(fault), Kind: Refusal}}}
		}
	}()
	return s.engine.Feed(ctx, line)
}

func faultText(fault any) string {
	return fmt.Sprintf("a fault of this program, not of the statement: %v; please report it with the line", fault)
}

// cancel answers Ctrl-C at the prompt: the first drops the line, one on an
// empty line drops the block.
func (s *session) cancel(line string) error {
	if len(s.block) == 0 || strings.TrimSpace(line) != "" {
		return nil
	}
	return s.abandon("the block was dropped")
}

// end closes the session at the end of the input.
func (s *session) end(ctx context.Context) error {
	if err := context.Cause(ctx); err != nil {
		return err
	}
	if len(s.block) == 0 {
		return nil
	}
	return s.abandon("the input ended inside a block, which was dropped")
}

// abandon drops the open block.
func (s *session) abandon(text string) error {
	s.block = nil
	s.engine.Abandon()
	return s.say(Refusal, text)
}

func (s *session) say(kind Kind, text string) error {
	return s.printer.print(Answer{Lines: []Line{{Text: text, Kind: kind}}})
}
