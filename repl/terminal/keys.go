package terminal

import (
	"io"
	"sync/atomic"
	"unicode"
	"unicode/utf8"
)

// keys stands between the terminal and the line editor. It reads what keys
// send and gives only printable characters, the control characters that the
// editor handles well, and commands.
type keys struct {
	in      io.Reader
	texts   texts
	state   func(*keys, rune) // what the next rune is read as
	seq     []rune            // of an escape sequence
	run     []rune            // printable characters that belong together
	inPaste bool
	wasCR   bool   // a pasted carriage return came last
	undone  []byte // the first bytes of a rune
	out     []byte
	err     error
	stopped atomic.Bool // the input has ended
}

// Bounds: an escape sequence, a run of characters that is inserted at once
// although it was not marked as a paste, and a part of a paste.
const (
	maxSequence = 32
	minRun      = 64
	maxPart     = 64 << 10
)

func newKeys(in io.Reader) *keys { return &keys{in: in, state: (*keys).typed} }

// Read gives at least one byte or an error.
func (k *keys) Read(p []byte) (int, error) {
	chunk := make([]byte, 4096)
	for len(k.out) == 0 {
		if k.err != nil {
			k.stopped.Store(true)
			return 0, k.err
		}
		var n int
		n, k.err = k.in.Read(chunk)
		k.translate(chunk[:n])
	}
	n := copy(p, k.out)
	k.out = k.out[n:]
	return n, nil
}

// translate takes the next bytes, of which the last may be part of a rune.
func (k *keys) translate(chunk []byte) {
	text := append(k.undone, chunk...)
	for utf8.FullRune(text) {
		r, size := utf8.DecodeRune(text)
		text = text[size:]
		k.state(k, r)
	}
	k.undone = append([]byte(nil), text...)
	if !k.inPaste {
		k.flushRun()
	}
}

func (k *keys) emit(r rune) {
	if r != 0 {
		k.out = utf8.AppendRune(k.out, r)
	}
}

// printable holds for what may stand in a line.
func printable(r rune) bool {
	return !unicode.IsControl(r) && !reorders(r) && (r <= rune(noCommand) || r >= rune(lastCommand))
}

// typed reads a rune outside of sequences and pastes.
func (k *keys) typed(r rune) {
	if printable(r) {
		k.run = append(k.run, r)
		return
	}
	k.flushRun()
	if r == keyEscape {
		k.state = (*keys).escaped
		return
	}
	k.emit(control(r))
}

// flushRun hands typed characters on: one by one, or many at once, since the
// editor redraws the line for each.
func (k *keys) flushRun() {
	if len(k.run) >= minRun {
		k.flushPart()
		return
	}
	for _, r := range k.run {
		k.emit(r)
	}
	k.run = k.run[:0]
}

func (k *keys) flushPart() {
	if len(k.run) > 0 {
		k.texts.push(string(k.run))
		k.emit(rune(pastePart))
		k.run = k.run[:0]
	}
}

// escaped reads the rune behind an escape.
func (k *keys) escaped(r rune) {
	k.state = (*keys).typed
	k.seq = k.seq[:0]
	switch {
	case r == '[':
		k.state = (*keys).inSequence
	case r == 'O':
		k.state = (*keys).inShort
	case alt(r) != 0:
		k.emit(alt(r))
	default:
		k.typed(r)
	}
}

// inSequence reads a control sequence: parameters, then a final character.
func (k *keys) inSequence(r rune) {
	switch {
	case r == '[' && len(k.seq) == 0: // function keys of a text console: one more follows
		k.state = (*keys).ignored
	case r >= 0x20 && r < 0x40 && len(k.seq) < maxSequence:
		k.seq = append(k.seq, r)
	case r >= 0x40 && r < keyBackspace:
		k.endSequence(sequence(string(k.seq), r))
	default:
		k.state = (*keys).typed
		k.typed(r)
	}
}

func (k *keys) endSequence(meaning rune) {
	k.state = (*keys).typed
	k.emit(meaning)
	if meaning == rune(pasteStarts) {
		k.state, k.inPaste, k.wasCR = (*keys).pasted, true, false
	}
}

// inShort reads the one character of a short sequence (SS3).
func (k *keys) inShort(r rune) {
	k.state = (*keys).typed
	k.emit(sequence("", r))
}

func (k *keys) ignored(rune) { k.state = (*keys).typed }
