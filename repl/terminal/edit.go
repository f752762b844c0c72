package terminal

import (
	"slices"
	"unicode"
)

// edited is a line and the place of the cursor in it, in runes.
type edited struct {
	text []rune
	at   int
}

// insert puts a text at the cursor.
func (e edited) insert(text []rune) edited {
	return edited{slices.Insert(slices.Clone(e.text), e.at, text...), e.at + len(text)}
}

// erase takes out what stands between the cursor and a place before or behind
// it, and gives it.
func (e edited) erase(to int) (edited, []rune) {
	from, end := min(e.at, to), max(e.at, to)
	gone := slices.Clone(e.text[from:end])
	return edited{slices.Delete(slices.Clone(e.text), from, end), from}, gone
}

// wordStart is where the word before the cursor starts: gaps are skipped, then
// the letters, digits and underscores before them.
func (e edited) wordStart() int {
	at := e.at
	for at > 0 && !inWord(e.text[at-1]) {
		at--
	}
	for at > 0 && inWord(e.text[at-1]) {
		at--
	}
	return at
}

// wordEnd is where the word behind the cursor ends.
func (e edited) wordEnd() int {
	at := e.at
	for at < len(e.text) && !inWord(e.text[at]) {
		at++
	}
	for at < len(e.text) && inWord(e.text[at]) {
		at++
	}
	return at
}

func inWord(r rune) bool {
	return r == '_' || unicode.IsLetter(r) || unicode.IsMark(r) || unicode.IsNumber(r)
}

// moveOrErase carries out the commands that need nothing but the line. What is
// erased by words or to an end is given, to be brought back.
func (e edited) moveOrErase(c command) (next edited, gone []rune) {
	switch c {
	case wordLeft:
		return edited{e.text, e.wordStart()}, nil
	case wordRight:
		return edited{e.text, e.wordEnd()}, nil
	case eraseWordLeft:
		return e.erase(e.wordStart())
	case eraseWordRight:
		return e.erase(e.wordEnd())
	case eraseToStart:
		return e.erase(0)
	case eraseToEnd:
		return e.erase(len(e.text))
	case eraseRight:
		next, _ = e.erase(min(e.at+1, len(e.text)))
		return next, nil
	}
	return e, nil
}
