package terminal

import (
	"io"
	"unicode/utf8"
)

// filter sees each rune before the library does.
func (e *editor) filter(r rune) (rune, bool) {
	if r == keySubmit && e.drop {
		return 0, false
	}
	if c, ok := asCommand(r); ok {
		e.next = c
		return keyTab, true
	}
	return r, true
}

// changed sees the line behind each key. It carries out the command that the
// key stood for, and shows the hint.
func (e *editor) changed(text []rune, at int, key rune) (line []rune, cursor int, ok bool) {
	defer func() {
		if fault := recover(); fault != nil { // it would leave the terminal as it is
			line, cursor, ok = nil, 0, false
		}
	}()
	switch key {
	case 0, keyEnter, keySubmit, keyInterrupt, keyLeave: // the line is gone
		return nil, 0, false
	case keyTab:
		return e.command(edited{text, at})
	}
	_, _ = io.WriteString(e.screen, e.hint(edited{text, at}))
	return nil, 0, false
}

func (e *editor) command(line edited) (text []rune, cursor int, ok bool) {
	c := e.next
	e.next = noCommand
	next := e.carryOut(c, line)
	if e.canvas.below == "" {
		e.canvas.below = e.hint(next)
	}
	return next.text, next.at, true
}

func (e *editor) carryOut(c command, line edited) edited {
	switch c {
	case complete:
		return e.complete(line)
	case bringBack:
		return e.insert(line, e.gone)
	case pasteStarts:
		e.pasting = true
	case pasteEnds:
		e.endPaste()
	case pastePart:
		return e.insert(line, []rune(e.keys.texts.pop()))
	case suspend:
		e.suspend()
	default:
		next, gone := line.moveOrErase(c)
		if len(gone) > 0 {
			e.gone = gone
		}
		return next
	}
	return line
}

// insert keeps the line within its limit. One that grew over it is shown empty
// and refused when it is submitted, or when the paste ends.
func (e *editor) insert(line edited, text []rune) edited {
	if e.drop {
		return line
	}
	e.long = e.long || len(line.text)+len(text) > maxEdited
	if e.long {
		return edited{}
	}
	return line.insert(text)
}

func (e *editor) endPaste() {
	e.pasting, e.drop = false, false
	if e.long {
		e.long = false
		reply := e.replies.format(Answer{Lines: []Line{{Text: errTooLong.Error(), Kind: Refusal}}})
		_, _ = io.WriteString(e.library.Stdout(), reply)
	}
}

// complete puts what fits in the line, or lists it below.
func (e *editor) complete(line edited) edited {
	text, cursor := string(line.text), len(string(line.text[:line.at]))
	offered := offerAt(e.engine, text, cursor)
	if offered.insert == "" {
		place := e.place(line)
		rows := table(offered.list, place.width-len(margin)-1, place.rows())
		e.canvas.below = place.below(rows, e.replies.paint)
		return line
	}
	word := utf8.RuneCountInString(text[offered.start:cursor])
	next, _ := line.erase(line.at - word)
	return e.insert(next, []rune(offered.insert))
}

// hint is drawn below the line, unless a paste or a search is under way.
func (e *editor) hint(line edited) string {
	if e.pasting || e.library.Operation.IsSearchMode() {
		return ""
	}
	hint := hintAt(e.engine, string(line.text), len(string(line.text[:line.at])))
	place := e.place(line)
	return place.below(fold(hint, place.width-len(margin)-1), e.replies.paint)
}

func (e *editor) suspend() {
	e.library.Clean()
	_ = e.mode.leave()
	sleep()
	_ = e.mode.edit()
}
