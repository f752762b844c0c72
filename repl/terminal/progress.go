package terminal

import (
	"io"
	"sync"
	"time"

	"golang.org/x/term"
)

// Progress draws one line that tells how far a long computation is. It is
// safe for concurrent use; a nil Progress draws nothing.
type Progress struct {
	mu    sync.Mutex
	to    io.Writer
	width func() int
	drawn bool
	last  time.Time
}

// often enough to look alive, seldom enough to cost nothing.
const redraw = 100 * time.Millisecond

// NewProgress draws on errs (standard error) when that is a terminal and TERM,
// the second argument, is not "dumb"; else it gives nil, which draws nothing.
func NewProgress(errs io.Writer, terminal string) *Progress {
	file := terminalOf(errs)
	if file == nil || terminal == "dumb" {
		return nil
	}
	return &Progress{to: file, width: func() int {
		width, _, err := term.GetSize(int(file.Fd()))
		if err != nil {
			return 0
		}
		return width
	}}
}

// Show replaces the line by text, cut to the width of the terminal; "" clears
// it. Calls that follow one another too fast are left out.
func (p *Progress) Show(text string) {
	if text == "" {
		p.Clear()
		return
	}
	if p == nil {
		return
	}
	p.mu.Lock()
	defer p.mu.Unlock()
	if p.drawn && time.Since(p.last) < redraw {
		return
	}
	p.last = time.Now()
	p.drawn = true
	p.put("\r\x1b[K\x1b[" + dim + "m" + cut(visible(text), p.width()) + "\x1b[0m")
}

// Clear removes the line.
func (p *Progress) Clear() {
	if p == nil {
		return
	}
	p.mu.Lock()
	defer p.mu.Unlock()
	if !p.drawn {
		return
	}
	p.drawn = false
	p.put("\r\x1b[K")
}

// put ignores the error of writing: progress is a courtesy.
func (p *Progress) put(text string) { _, _ = io.WriteString(p.to, text) }
