package syntax

import "strings"

// Kind is the kind of a token.
type Kind int

// The kinds of tokens.
const (
	End     Kind = iota
	Number       // 13.5, 1.2e3, 13.50(2)
	Unit         // mJ/cm^2, only where a unit may stand
	Word         // names and words
	Text         // "…"
	Bracket      // [mJ/cm^2], the text between the brackets
	Raised       // ⁻² behind something: a power
	Op           // an operator or mark; Token.Text says which
)

// Token is one piece of a statement.
type Token struct {
	Kind Kind
	Text string // numbers without grouping, operators in ASCII, text without quotes
	Span Span
}

// reserved words are neither names nor units; before "=" in a call they may
// name an argument.
const reservedWords = " at by end for in log over plot points rough to within "

// Reserved says whether a word is kept for the grammar.
func Reserved(word string) bool {
	return strings.Contains(reservedWords, " "+word+" ") || StatementWord(word)
}

func inGrammar(word string) bool { return strings.Contains(reservedWords, " "+word+" ") }
