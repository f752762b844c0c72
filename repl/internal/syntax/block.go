package syntax

import (
	"fmt"
	"strings"
)

// MaxBlockLines bounds a block.
const MaxBlockLines = 2000

// Block is a heading, lines and end. Spans are those of the whole text.
type Block struct {
	Kind   string // "chain" or "stack"
	Name   string
	NameAt Span
	Lines  []BlockLine
}

func (*Block) action() {}

// BlockLine is "at IF", or "label: a, b", or "label x4 independent: a".
type BlockLine struct {
	Plane       string // set for "at IF" only
	Label       string
	Times       Expr // nil for once
	Independent bool
	Items       []Expr
	Note        string
	Where       Span // of the label or plane
	Text        string
}

// BlockHeading says whether a line opens a block, and of which kind.
func BlockHeading(line string) (kind string, ok bool) {
	line, _, _ = strings.Cut(line, "\n")
	words := strings.Fields(line)
	if len(words) < 2 || words[0] != "chain" && words[0] != "stack" || words[1] == "=" {
		return "", false
	}
	return words[0], true
}

// BlockEnd says whether a line closes a block.
func BlockEnd(line string) bool {
	content, _, _ := strings.Cut(line, "#")
	return trimBlanks(content) == "end"
}

func trimBlanks(s string) string { return strings.TrimSpace(s) }

// ParseHeading reads the first line of a block, so that a prompt can refuse it
// before the lines are typed.
func ParseHeading(line string) (*Block, *Error) {
	if len(line) > MaxStatement {
		return nil, Fail(Span{}, "this heading is too long", "a heading is chain NAME")
	}
	p := newParser(line)
	b := &Block{Kind: p.tok.Text}
	p.advance(false)
	name := p.tok
	b.Name, b.NameAt = p.name("the name of a " + b.Kind)
	p.declares(name)
	if p.err == nil && p.tok.Kind == Word {
		p.unexpected("the heading is " + b.Kind + " " + b.Name + " alone; each line of the block stands below it")
	}
	p.finish()
	if p.err != nil {
		return nil, p.err
	}
	return b, nil
}

// ParseBlockLine reads one line of a block; it returns nil for a blank line or
// a note.
func ParseBlockLine(line string) (*BlockLine, *Error) {
	return parseLine(line, 0)
}

// parseLine reads the line of a block that stands in src from a place on.
func parseLine(src string, start int) (*BlockLine, *Error) {
	line := src[start:]
	if len(line) > MaxStatement {
		return nil, Fail(Span{start, start}, fmt.Sprintf("this line has %d bytes; a line may have %d", len(line), MaxStatement), "give parts of it names of their own")
	}
	p := parserAt(src, start)
	if p.err == nil && p.tok.Kind == End {
		return nil, nil
	}
	b := &BlockLine{Text: trimBlanks(line)}
	if p.acceptWord("at") {
		b.Plane, b.Where = p.name("a plane")
	} else {
		p.element(b)
	}
	p.finish()
	if p.err != nil {
		return nil, p.err
	}
	b.Note = p.note()
	return b, nil
}

// element reads label xN independent: a, b.
func (p *parser) element(b *BlockLine) {
	if p.tok.Kind != Word {
		p.unexpected("a line of a block is label: value, or at PLANE; end closes the block")
		return
	}
	b.Label, b.Where = p.tok.Text, p.tok.Span
	p.advance(false)
	p.times(b)
	b.Independent = p.acceptWord("independent")
	p.expect(":", "behind the label")
	for p.err == nil {
		b.Items = append(b.Items, p.item())
		if !p.accept(",") {
			return
		}
	}
}

// times reads x4 or x(n).
func (p *parser) times(b *BlockLine) {
	if p.tok.Kind != Word || !strings.HasPrefix(p.tok.Text, "x") {
		return
	}
	tok := p.tok
	if digits := tok.Text[1:]; digits != "" && strings.Trim(digits, "0123456789") == "" {
		at := Span{tok.Span.Start + 1, tok.Span.End}
		b.Times = &Literal{Number: digits, Where: at, NumberAt: at}
		p.advance(false)
		return
	}
	if tok.Text != "x" {
		return
	}
	p.advance(false)
	p.expect("(", "behind x: write x4 or x(name)")
	b.Times = p.expression()
	p.expect(")", "behind how often light crosses")
}

// parseBlock reads a whole block; each line's spans are moved to its place.
func parseBlock(src string) (*Statement, *Error) {
	lines := strings.Split(src, "\n")
	if len(lines) > MaxBlockLines {
		return nil, Fail(Span{}, fmt.Sprintf("this block has %d lines; a block may have %d", len(lines), MaxBlockLines), "make two of it")
	}
	head, err := ParseHeading(lines[0])
	if err != nil {
		return nil, err
	}
	s := &Statement{Do: head}
	if _, note, ok := strings.Cut(lines[0], "#"); ok {
		s.Note = trimBlanks(note)
	}
	offset := len(lines[0]) + 1
	for i, text := range lines[1:] {
		if BlockEnd(text) {
			if err := nothingBehind(lines[i+2:], offset+len(text)+1); err != nil {
				return nil, err
			}
			return s, nil
		}
		if offset+len(text) > MaxStatement {
			return nil, Fail(Span{offset, offset}, fmt.Sprintf("this block has more than %d bytes", MaxStatement), "make two of it")
		}
		line, err := parseLine(src[:offset+len(text)], offset)
		if err != nil {
			return nil, err
		}
		if line != nil {
			head.Lines = append(head.Lines, *line)
		}
		offset += len(text) + 1
	}
	return nil, Fail(Span{0, len(lines[0])}, "the block that begins here has no end", "its last line is the word end")
}

// nothingBehind refuses what stands behind the end of a block.
func nothingBehind(lines []string, offset int) *Error {
	for _, text := range lines {
		if trimBlanks(text) != "" {
			return Fail(Span{offset, offset + len(text)}, "this stands behind the end of the block", "give it as a statement of its own")
		}
		offset += len(text) + 1
	}
	return nil
}
