package syntax

import (
	"fmt"
	"strings"
)

func readCheck(p *parser, word Token) Action {
	c := &Check{X: p.expression()}
	c.Op, c.OpAt = p.tok.Text, p.tok.Span
	for _, op := range []string{"<", "<=", ">", ">=", "="} {
		if p.accept(op) {
			c.Y = p.expression()
			if p.acceptWord("within") {
				c.Within = p.expression()
			}
			return c
		}
	}
	p.unexpected("check compares: check a >= b, or check a = b within 2 %")
	return poisonAction
}

func readWalk(p *parser, word Token) Action {
	w := &Walk{}
	w.Chain, w.ChainAt = p.name("the name of a chain")
	w.X = p.expression()
	return w
}

func readPrefer(p *parser, word Token) Action {
	s := p.stated()
	if s == nil {
		p.unexpected("prefer takes a unit in brackets: prefer [mJ/cm^2]")
	}
	return &Prefer{s}
}

func readDigits(p *parser, word Token) Action {
	c := &Command{Word: word.Text, WordAt: word.Span, Number: p.tok.Text}
	if p.tok.Kind != Number {
		p.unexpected("digits takes a whole number: digits 5")
		return c
	}
	p.advance(false)
	return c
}

// names reads between least and most names.
func names(least, most int) func(*parser, Token) Action {
	return func(p *parser, word Token) Action {
		c := &Command{Word: word.Text, WordAt: word.Span}
		for more := p.tok.Kind != End && most > 0; more; more = len(c.Names) < most && p.tok.Kind != End {
			name, at := p.name("a name")
			c.Names = append(c.Names, Name{name, at})
			if p.accept(",") && p.tok.Kind == End {
				p.unexpected("a name is wanted behind the comma")
			}
		}
		if len(c.Names) < least {
			p.unexpected(fmt.Sprintf("%s takes a name: %s NAME", word.Text, word.Text))
		}
		return c
	}
}

// fileName reads one text.
func fileName(p *parser, word Token) Action {
	c := &Command{Word: word.Text, WordAt: word.Span, Text: p.tok.Text, TextAt: p.tok.Span}
	if p.tok.Kind != Text {
		p.unexpected(fmt.Sprintf("%s takes a file name in quotes: %s \"line3.budget\"", word.Text, word.Text))
		return c
	}
	p.advance(false)
	return c
}

// pattern takes the rest of the line as it stands, words of the language and
// unit marks included.
func pattern(p *parser, word Token) Action {
	c := &Command{Word: word.Text, WordAt: word.Span}
	c.Text, c.TextAt = p.rest()
	return c
}

// rest takes what is left of the line up to a note.
func (p *parser) rest() (string, Span) {
	start := p.tok.Span.Start
	if p.err != nil {
		// What the scanner could not read is text here.
		start, p.err = p.prev.End, nil
	}
	end := start
	for end < len(p.scan.src) && p.scan.src[end] != '#' {
		end++
	}
	text := trimBlanks(p.scan.src[start:end])
	start += strings.Index(p.scan.src[start:end], text)
	p.scan.pos = end
	p.tok = Token{Kind: End, Span: Span{end, end}}
	return text, Span{start, start + len(text)}
}

// alone stands for a heading that BlockHeading did not take.
func alone(p *parser, word Token) Action {
	p.unexpected(word.Text + " begins a block: " + word.Text + " NAME, lines of the form label: value, and end")
	return poisonAction
}
