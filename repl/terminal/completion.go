package terminal

import (
	"strings"
	"unicode/utf8"
)

// offer is what Tab does: put a text in the place of the word at the cursor,
// or list words. The zero does nothing.
type offer struct {
	start  int    // byte offset of the word
	insert string // replaces the word; "" leaves it
	list   []string
}

// offerAt asks the engine what may stand at the cursor, a byte offset. One
// candidate is inserted; of several, what they have in common; when that adds
// nothing they are listed.
func offerAt(engine Engine, entry string, cursor int) offer {
	line, before := lineAround(entry, cursor)
	cursor -= before
	start, candidates := engine.Complete(line, cursor)
	if start < 0 || start > cursor || !boundary(line, start) || len(candidates) == 0 {
		return offer{}
	}
	word, common := line[start:cursor], commonPrefix(candidates)
	switch {
	case len(candidates) == 1 && common == word:
		return offer{}
	case len(candidates) == 1, len(common) > len(word) && strings.HasPrefix(common, word):
		return offer{start: before + start, insert: common}
	}
	return offer{list: candidates}
}

// hintAt asks the engine for a hint on the call at the cursor.
func hintAt(engine Engine, entry string, cursor int) string {
	line, before := lineAround(entry, cursor)
	return engine.Hint(line, cursor-before)
}

// lineAround gives the line of a joined block in which the cursor stands, and
// where it starts.
func lineAround(entry string, cursor int) (line string, start int) {
	if i := strings.LastIndex(entry[:cursor], lineBreak); i >= 0 {
		start = i + len(lineBreak)
	}
	end := len(entry)
	if i := strings.Index(entry[cursor:], lineBreak); i >= 0 {
		end = cursor + i
	}
	return entry[start:end], start
}

func boundary(line string, at int) bool {
	return at == len(line) || utf8.RuneStart(line[at])
}

// commonPrefix is what all words start with, in whole runes.
func commonPrefix(words []string) string {
	common := words[0]
	for _, word := range words[1:] {
		n := 0
		for n < len(common) && n < len(word) && common[n] == word[n] {
			n++
		}
		for !boundary(common, n) {
			n--
		}
		common = common[:n]
	}
	return common
}
