package terminal

import (
	"errors"
	"io"
	"sync"

	"golang.org/x/term"
)

// rawMode keeps the mode of a terminal. While a line is edited every key is
// read at once; while an answer is computed the keys wait unseen, and only
// those that send a signal (Ctrl-C, Ctrl-\, Ctrl-Z) act. The terminal's own
// editing would echo what is typed meanwhile into the reply, and swallow a
// Ctrl-D. Pastes are marked in both.
type rawMode struct {
	mu     sync.Mutex
	in     int // file descriptor
	out    io.Writer
	before *term.State
	on     bool
	ended  bool // the terminal was given back for good
}

func newRawMode(in int, out io.Writer) (*rawMode, error) {
	before, err := term.GetState(in)
	return &rawMode{in: in, out: out, before: before}, err
}

func (m *rawMode) edit() error { return m.enter(false) }

func (m *rawMode) compute() error { return m.enter(true) }

func (m *rawMode) enter(signals bool) error {
	m.mu.Lock()
	defer m.mu.Unlock()
	if m.ended {
		return nil
	}
	if err := singleKeys(m.in, signals); err != nil || m.on {
		return err
	}
	m.on = true
	_, err := io.WriteString(m.out, askForMarks)
	return err
}

// leave gives the terminal back as it was.
func (m *rawMode) leave() error {
	m.mu.Lock()
	defer m.mu.Unlock()
	if !m.on {
		return nil
	}
	m.on = false
	err := term.Restore(m.in, m.before)
	_, failed := io.WriteString(m.out, askForNone)
	return errors.Join(err, failed)
}

// end gives it back for good.
func (m *rawMode) end() {
	_ = m.leave()
	m.mu.Lock()
	defer m.mu.Unlock()
	m.ended = true
}
