package terminal

import (
	"fmt"
	"strings"
	"unicode/utf8"
)

// table sets words in columns that fit the width, read downwards. Words for
// which there are not enough rows are counted in the last.
func table(words []string, width, rows int) []string {
	widest := 0
	for _, word := range words {
		widest = max(widest, utf8.RuneCountInString(word))
	}
	across := max(1, (width+2)/(widest+2))
	more := 0
	if len(words) > across*rows {
		room := across * max(0, rows-1)
		words, more = words[:room], len(words)-room
	}
	down := (len(words) + across - 1) / across
	set := make([]string, down)
	for row := range set {
		var b strings.Builder
		for i := row; i < len(words); i += down {
			fmt.Fprintf(&b, "%-*s", widest+2, words[i])
		}
		set[row] = strings.TrimRight(b.String(), " ")
	}
	if more > 0 {
		set = append(set, fmt.Sprintf("and %d more: type a letter of the word", more))
	}
	return set
}
