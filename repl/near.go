package repl

import (
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
)

// near returns at most two known words that are spelled like this one.
func (s *Session) near(word string) []string {
	type guess struct {
		word string
		far  int
	}
	var list []guess
	consider := func(w string) {
		limit := min(1, len(word)-1) + len(word)/5
		if far := spelling(strings.ToLower(word), strings.ToLower(w), limit); far <= limit {
			list = append(list, guess{w, far})
		}
	}
	for name := range s.store.defs {
		consider(name)
	}
	for name := range s.rows {
		consider(name)
	}
	for name := range s.constants {
		consider(name)
	}
	slices.SortFunc(list, func(a, b guess) int {
		if a.far != b.far {
			return a.far - b.far
		}
		return strings.Compare(a.word, b.word)
	})
	var words []string
	for _, g := range list[:min(2, len(list))] {
		words = append(words, g.word)
	}
	return words
}

// misspelt refuses a line that could not be read for its first word, where that
// is a statement's in another spelling, or a function without parentheses.
func (s *Session) misspelt(text string, bad *syntax.Error) *syntax.Error {
	word, _, more := strings.Cut(text, " ")
	if !more || len(bad.Marks) == 0 || bad.Marks[0].Start > len(word)+1 || syntax.StatementWord(word) || s.store.defs[word] != nil {
		return bad
	}
	at := syntax.Span{End: len(word)}
	if s.rows[word] != nil {
		return syntax.Fail(at, word+" is a function; it takes its arguments in parentheses", "see: help "+word)
	}
	for _, st := range statements() {
		limit := 1 + len(word)/5
		if len(word) > 2 && syntax.StatementWord(st.word) && spelling(strings.ToLower(word), st.word, limit) <= limit {
			return syntax.Fail(at, word+" begins no statement", "did you mean "+st.word+"?")
		}
	}
	return bad
}

// spelling counts insertions, deletions, replacements and swaps of neighbours
// between two words, up to a limit.
func spelling(a, b string, limit int) int {
	x, y := []rune(a), []rune(b)
	if d := len(x) - len(y); d > limit || -d > limit || len(x) > 60 {
		return limit + 1
	}
	before, row := make([]int, len(y)+1), make([]int, len(y)+1)
	var two []int
	for j := range before {
		before[j] = j
	}
	for i := range x {
		row[0] = i + 1
		for j := range y {
			cost := 1
			if x[i] == y[j] {
				cost = 0
			}
			row[j+1] = min(before[j]+cost, before[j+1]+1, row[j]+1)
			if two != nil && j > 0 && x[i] == y[j-1] && x[i-1] == y[j] {
				row[j+1] = min(row[j+1], two[j-1]+1)
			}
		}
		two, before, row = before, row, make([]int, len(y)+1)
	}
	return before[len(y)]
}
