package terminal

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"unicode/utf8"

	"github.com/chzyer/readline"
)

// editor reads lines from a terminal on which they can be edited.
type editor struct {
	engine  Engine
	screen  *os.File
	canvas  *canvas
	source  *readline.CancelableStdin
	keys    *keys
	mode    *rawMode
	library *readline.Instance
	history *history
	replies *printer // on the screen
	give    []func() // what close gives back, last first

	waiting []string // lines of a recalled block that are still to be read

	// What follows belongs to the library's goroutine while a line is read, and
	// to the caller of read otherwise.
	next    command
	gone    []rune // what was erased last
	pasting bool
	drop    bool // the rest of the paste
	long    bool // the line is over the limit
}

func newEditor(ctx context.Context, engine Engine, options Options) (*editor, error) {
	in, screen := terminalOf(options.In), options.screen()
	mode, err := newRawMode(int(in.Fd()), screen)
	if err != nil {
		return nil, err
	}
	options.Out = screen
	e := &editor{
		engine: engine, screen: screen, canvas: &canvas{to: screen}, mode: mode,
		source: readline.NewCancelableStdin(in), replies: newPrinter(options),
	}
	e.keys = newKeys(e.source)
	if e.library, err = readline.NewEx(e.config()); err != nil {
		return nil, err
	}
	// Whoever is told to leave gives the terminal back at once, even when the
	// engine does not return.
	unwatch := context.AfterFunc(ctx, func() { _ = e.source.Close(); mode.end() })
	e.give = append(e.give,
		mode.end,
		func() { _ = e.library.Close() },
		func() { _ = e.source.Close() }, // before the library, which would wait for a read
		func() { unwatch() })
	var trouble error
	if e.history, trouble = openHistory(options.HistoryFile); trouble != nil {
		e.warn(trouble)
	}
	e.loadHistory()
	return e, nil
}

func (e *editor) config() *readline.Config {
	return &readline.Config{
		Stdin:                  io.NopCloser(e.keys),
		Stdout:                 e.canvas,
		Stderr:                 e.canvas,
		Prompt:                 prompt,
		EOFPrompt:              "\n", // means none
		HistoryLimit:           2 * maxEntries,
		DisableAutoSaveHistory: true,
		AutoComplete:           nothing{},
		FuncFilterInputRune:    e.filter,
		Listener:               readline.FuncListener(e.changed),
		ForceUseInteractive:    true,
		FuncGetWidth:           func() int { return columns(e.screen) },
		FuncMakeRaw:            e.mode.edit,
		FuncExitRaw:            e.mode.compute,
		FuncOnWidthChanged:     func(f func()) { e.give = append(e.give, onResize(f)) },
	}
}

// nothing is the library's completer: Tab reaches it only in the place of a
// command, and must change nothing.
type nothing struct{}

func (nothing) Do([]rune, int) ([][]rune, int) { return nil, 0 }

// close gives the terminal back.
func (e *editor) close() {
	for i := len(e.give) - 1; i >= 0; i-- {
		e.give[i]()
	}
}

func (e *editor) read(ctx context.Context, prompt string) (string, error) {
	if len(e.waiting) > 0 {
		return e.readWaiting(prompt)
	}
	e.library.SetPrompt(prompt)
	e.long = false
	line, err := e.library.Readline()
	switch {
	case e.keys.stopped.Load(): // a line that was cut off is not a line
		return "", io.EOF
	case errors.Is(err, readline.ErrInterrupt):
		return line, errCancelled
	case err != nil:
		return "", err
	case e.long:
		return "", errTooLong
	}
	lines := splitEntry(line)
	if len(lines) == 1 {
		return line, nil
	}
	e.waiting = lines
	e.unprint(prompt, line)
	return e.readWaiting(prompt)
}

// unprint removes the line that was just submitted from the screen, so that
// the lines of a recalled block can stand there as they would have been typed.
func (e *editor) unprint(prompt, line string) {
	width := columns(e.screen)
	cells := utf8.RuneCountInString(prompt) + utf8.RuneCountInString(line)
	fmt.Fprintf(e.screen, "\r\x1b[%dA\x1b[J", max(1, (cells+width-1)/width))
}

func (e *editor) readWaiting(prompt string) (string, error) {
	line := e.waiting[0]
	e.waiting = e.waiting[1:]
	_, err := fmt.Fprintf(e.screen, "%s%s\n", prompt, visible(line))
	return line, err
}

func (e *editor) discard() {
	e.waiting = nil
	e.drop = e.pasting
}

func (e *editor) remember(entry string) {
	if err := e.history.add(entry); err != nil {
		e.history.path = ""
		e.warn(fmt.Errorf("lines are not kept for the next session: %w", err))
	}
	e.loadHistory()
}

// loadHistory hands all entries over anew: the library would otherwise put
// the recalled line in the place of the block that was made of it. An empty
// history gets an empty entry, since a search in none fails.
func (e *editor) loadHistory() {
	e.library.ResetHistory()
	for _, entry := range e.history.entries {
		_ = e.library.SaveHistory(entry)
	}
	if len(e.history.entries) == 0 {
		_ = e.library.SaveHistory("")
	}
}

func (e *editor) warn(err error) {
	_ = e.replies.print(Answer{Lines: []Line{{Text: err.Error(), Kind: Warning}}})
}
