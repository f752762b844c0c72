package syntax

import (
	"fmt"
	"strings"
)

// Bounds that keep a hostile text from costing much.
const (
	MaxStatement = 65_536 // bytes of one line
	MaxDepth     = 200    // parentheses, powers and signs inside one another
	MaxName      = 128    // bytes of one name
)

// parser holds one token of look-ahead. The first error is kept and every
// later token is End, so that one mistake gives one message.
type parser struct {
	scan  scanner
	tok   Token
	prev  Span // of the token before
	depth int
	err   *Error
}

func newParser(src string) *parser { return parserAt(src, 0) }

// parserAt reads what stands in src from a place on; its spans are those of
// src.
func parserAt(src string, start int) *parser {
	p := &parser{scan: scanner{src: src, pos: start}, prev: Span{start, start}, err: unreadable(src[start:])}
	if p.err != nil {
		p.err.Marks[0].Start += start
		p.err.Marks[0].End += start
	}
	p.advance(false)
	return p
}

// since is the span from a place to the end of the token before this one.
func (p *parser) since(start int) Span { return Span{min(start, p.prev.End), p.prev.End} }

func (p *parser) advance(unitHere bool) {
	p.prev = p.tok.Span
	if p.err != nil {
		p.tok = Token{Kind: End, Span: Span{len(p.scan.src), len(p.scan.src)}}
		return
	}
	tok, err := p.scan.next(unitHere || p.tok.Kind == Number)
	if err != nil {
		p.fail(err)
		return
	}
	p.tok = tok
}

func (p *parser) fail(err *Error) {
	if p.err == nil {
		p.err = err
	}
	p.tok = Token{Kind: End, Span: Span{len(p.scan.src), len(p.scan.src)}}
}

func (p *parser) is(op string) bool        { return p.tok.Kind == Op && p.tok.Text == op }
func (p *parser) isWord(w string) bool     { return p.tok.Kind == Word && p.tok.Text == w }
func (p *parser) mark() parser             { return *p }
func (p *parser) back(m parser)            { *p = m }
func (p *parser) accept(op string) bool    { return p.take(p.is(op)) }
func (p *parser) acceptWord(w string) bool { return p.take(p.isWord(w)) }

func (p *parser) take(yes bool) bool {
	if yes {
		p.advance(false)
	}
	return yes
}

func (p *parser) expect(op, why string) {
	if !p.accept(op) {
		p.unexpected(fmt.Sprintf("%s is missing %s", op, why))
	}
}

// unexpected refuses the current token, with what was wanted as the way on.
func (p *parser) unexpected(want string) {
	if p.err != nil {
		return
	}
	what := "the end of the line"
	if p.tok.Kind != End {
		what = Visible(p.scan.src[p.tok.Span.Start:p.tok.Span.End])
	}
	p.fail(Fail(p.tok.Span, what+" is not expected here", want))
}

// declares refuses what cannot be given a meaning: a word of the language, and
// a name with a point, which is a column of data.
func (p *parser) declares(tok Token) {
	if p.err != nil {
		return
	}
	if Reserved(tok.Text) {
		p.fail(Fail(tok.Span, tok.Text+" is a word of the language and cannot be a name", "choose another name, such as "+tok.Text+"_1"))
	} else if strings.Contains(tok.Text, ".") {
		p.fail(Fail(tok.Span, tok.Text+" has a point, and a name has none", "choose another name, such as "+strings.ReplaceAll(tok.Text, ".", "_")))
	}
}

// name takes a word that may be a name.
func (p *parser) name(what string) (string, Span) {
	tok := p.tok
	switch {
	case tok.Kind != Word:
		p.unexpected(what + " is wanted")
	case Reserved(tok.Text):
		p.fail(Fail(tok.Span, tok.Text+" is a word of the language and cannot be "+what, "choose another name, such as "+tok.Text+"_1"))
	default:
		p.advance(false)
	}
	return tok.Text, tok.Span
}

// finish refuses what is left of the line.
func (p *parser) finish() {
	if p.err != nil || p.tok.Kind == End {
		return
	}
	text := Visible(p.tok.Text)
	switch {
	case p.is("±") && p.prev.End > 0 && !strings.Contains(p.scan.src[:p.prev.End], "±"):
		p.fail(Fail(p.tok.Span, "± stands right behind its number and unit, before at", "write 250 W ± 3 % at IF, or (a ± b) W"))
	case p.is(")"), p.is("}"):
		p.fail(Fail(p.tok.Span, "nothing is open that "+text+" would close", "leave it out, or open it before"))
	case p.tok.Kind == Bracket:
		p.fail(Fail(p.tok.Span, "a bracket states the unit of the whole answer and stands once, at the end", "write the unit behind its number without a bracket"))
	case p.tok.Kind == Op && strings.Contains("< <= > >= =", text):
		p.fail(Fail(p.tok.Span, text+" compares nothing here", "write check a "+text+" b, or if(a < b, x, y)"))
	case p.is(":"):
		p.fail(Fail(p.tok.Span, ": is not expected here", "a line of the form label: value stands in a block, such as chain NAME … end"))
	case p.tok.Kind == Op && text != "(":
		p.unexpected("a value is wanted between two signs")
	case p.tok.Kind == Word && (p.tok.Text == "in" || p.tok.Text == "to"):
		p.unexpected("a bracket states the unit of an answer: photon_energy(13.5 nm) [J]")
	case p.tok.Kind == Word && inGrammar(p.tok.Text):
		p.unexpected(p.tok.Text + " is a word of some statements; see: help statements")
	default:
		p.fail(Fail(p.prev.Join(p.tok.Span), "two values stand side by side", "a product is written with *, and a unit stands right behind its number"))
	}
}

// enter counts nesting; leave must follow when it is true.
func (p *parser) enter() bool {
	if p.depth++; p.depth > MaxDepth {
		p.fail(Fail(p.tok.Span, fmt.Sprintf("this nests deeper than %d", MaxDepth), "give the inner part a name of its own"))
		p.depth--
		return false
	}
	return true
}

func (p *parser) leave() { p.depth-- }
