package terminal

// command is an edit that the line editor does not do itself. It travels
// through the editor as a rune of the last private-use plane.
type command rune

// The commands.
const (
	noCommand command = iota + 0x10FF00
	complete
	wordLeft
	wordRight
	eraseWordLeft
	eraseWordRight
	eraseToStart
	eraseToEnd
	eraseRight
	bringBack
	suspend
	pasteStarts
	pastePart // the next part of a paste or of another run of text
	pasteEnds
	lastCommand
)

// asCommand reads a rune back. No key and no paste gives such a rune, since
// keys.go drops them.
func asCommand(r rune) (command, bool) {
	if r <= rune(noCommand) || r >= rune(lastCommand) {
		return noCommand, false
	}
	return command(r), true
}

// The keys that the editor does itself, as control characters.
const (
	keyStart     = 'A' & 0x1f
	keyLeft      = 'B' & 0x1f
	keyInterrupt = 'C' & 0x1f
	keyLeave     = 'D' & 0x1f
	keyEnd       = 'E' & 0x1f
	keyRight     = 'F' & 0x1f
	keyTab       = '\t'
	keySubmit    = '\n' // the end of a pasted line
	keyEnter     = '\r'
	keyDown      = 'N' & 0x1f
	keyUp        = 'P' & 0x1f
	keyEscape    = 0x1b
	keyBackspace = 0x7f
)

// control gives what a control character means here: itself for the editor, a
// command, or 0 for nothing. Ctrl-T, NUL and whatever else would end up in the
// line mean nothing.
func control(r rune) rune {
	switch r {
	case '\n':
		return keyEnter
	case '\t':
		return rune(complete)
	case 'K' & 0x1f:
		return rune(eraseToEnd)
	case 'U' & 0x1f:
		return rune(eraseToStart)
	case 'W' & 0x1f:
		return rune(eraseWordLeft)
	case 'Y' & 0x1f:
		return rune(bringBack)
	case 'Z' & 0x1f:
		return rune(suspend)
	case keyStart, keyLeft, keyInterrupt, keyLeave, keyEnd, keyRight, keyEnter, keyDown, keyUp, keyBackspace,
		'G' & 0x1f, 'H' & 0x1f, 'L' & 0x1f, 'R' & 0x1f, 'S' & 0x1f:
		return r
	}
	return 0
}

// alt gives what a key pressed with Alt (sent behind an escape) means, or 0.
func alt(r rune) rune {
	switch r {
	case 'b':
		return rune(wordLeft)
	case 'f':
		return rune(wordRight)
	case 'd':
		return rune(eraseWordRight)
	case keyBackspace, 'H' & 0x1f:
		return rune(eraseWordLeft)
	}
	return 0
}

// sequence gives what a control sequence (ECMA-48, with the keys that
// terminals send by common practice) means, or 0. parameters is what stands
// between the introducer and the final character.
func sequence(parameters string, final rune) rune {
	byWord := parameters == "1;5" || parameters == "1;3" || parameters == "5" // with Ctrl or Alt
	switch {
	case final == 'A':
		return keyUp
	case final == 'B':
		return keyDown
	case final == 'C' && byWord:
		return rune(wordRight)
	case final == 'C':
		return keyRight
	case final == 'D' && byWord:
		return rune(wordLeft)
	case final == 'D':
		return keyLeft
	case final == 'H':
		return keyStart
	case final == 'F':
		return keyEnd
	case final == '~':
		return numbered(parameters)
	}
	return 0
}

func numbered(parameters string) rune {
	switch parameters {
	case "1", "7":
		return keyStart
	case "4", "8":
		return keyEnd
	case "3":
		return rune(eraseRight)
	case "200":
		return rune(pasteStarts)
	}
	return 0
}
