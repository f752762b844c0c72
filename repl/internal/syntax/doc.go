// Package syntax reads the text of a statement into a tree. It knows the
// grammar alone: no name, no unit word, no function. It accepts more than is
// legal and leaves meaning to package program.
package syntax

// Notes for maintainers.
//
// The scanner works on demand, one token at a time, because the grammar lets a
// unit stand in one place only: right behind a number, or behind the closing
// parenthesis of "(x ± y)". The parser says so when it asks for the next
// token. A unit word is scanned as far as its spelling reaches and handed on
// as text; whether it is a unit is for others to say. That keeps every letter
// free to be a name elsewhere: 2 d is two days, 2*d uses the name.
//
// Spans are byte offsets into the text of the whole statement, which for a
// block is several lines.
