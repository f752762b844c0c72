package terminal

import "sync"

// A terminal that was asked to marks a paste: ESC [ 200 ~ before it and
// ESC [ 201 ~ behind it.
const (
	askForMarks = "\x1b[?2004h"
	askForNone  = "\x1b[?2004l"
	endOfPaste  = "[201~" // behind the escape
)

// pasted reads a rune of a paste, in which no character acts as a key but
// Ctrl-C: it is the way out of a paste whose end never comes. Line breaks of any
// kind submit, tabs become blanks, other control characters are dropped.
func (k *keys) pasted(r rune) {
	afterCR := k.wasCR
	k.wasCR = r == '\r'
	switch {
	case r == keyEscape:
		k.seq = k.seq[:0]
		k.state = (*keys).pastedEscape
	case r == keyInterrupt:
		k.endPaste()
		k.emit(r)
	case r == '\n' && afterCR:
	case r == '\r', r == '\n':
		k.flushPart()
		k.emit(keySubmit)
	case r == '\t':
		k.run = append(k.run, ' ')
	case printable(r):
		k.run = append(k.run, r)
	}
	if len(k.run) >= maxPart {
		k.flushPart()
	}
}

// pastedEscape reads what follows an escape in a paste: its end, or text.
func (k *keys) pastedEscape(r rune) {
	k.seq = append(k.seq, r)
	text := string(k.seq)
	switch {
	case text == endOfPaste:
		k.endPaste()
	case text != endOfPaste[:min(len(text), len(endOfPaste))]:
		k.state = (*keys).pasted
		for _, r := range append([]rune(nil), k.seq...) {
			k.pasted(r)
		}
	}
}

func (k *keys) endPaste() {
	k.flushPart()
	k.emit(rune(pasteEnds))
	k.state, k.inPaste = (*keys).typed, false
}

// texts is the queue of parts that wait to be inserted. It is filled by the
// goroutine that reads and emptied by the one that edits.
type texts struct {
	mu    sync.Mutex
	parts []string
}

func (t *texts) push(part string) {
	t.mu.Lock()
	defer t.mu.Unlock()
	t.parts = append(t.parts, part)
}

func (t *texts) pop() string {
	t.mu.Lock()
	defer t.mu.Unlock()
	if len(t.parts) == 0 {
		return ""
	}
	part := t.parts[0]
	t.parts = t.parts[1:]
	return part
}
