package syntax

import (
	"fmt"
	"slices"
	"strings"
)

// Statement is one statement with its note. Do is nil for a blank line or a
// note alone.
type Statement struct {
	Do   Action
	Note string // the text behind #, without it
}

// Action is what a statement asks for. Its kinds are in this file and, for
// blocks, in block.go.
type Action interface{ action() }

type (
	// Show prints a value.
	Show struct {
		X      Expr
		Stated *Stated // nil for none
	}
	// Define gives a name a formula.
	Define struct {
		Name   string
		NameAt Span
		Stated *Stated
		X      Expr
	}
	// DefineFunction makes a function of the session.
	DefineFunction struct {
		Name   string
		NameAt Span
		Params []Param
		Stated *Stated
		X      Expr
	}
	// Param is a parameter, with the unit that it declares.
	Param struct {
		Name   string
		NameAt Span
		Stated *Stated
	}
	// Check compares; Within is nil except for "a = b within c".
	Check struct {
		Op     string
		OpAt   Span
		X, Y   Expr
		Within Expr
	}
	// Command is a statement word with names or one text behind it.
	Command struct {
		Word   string
		WordAt Span
		Names  []Name // why x, forget x, counted lot, names pattern, help topic
		Text   string // import "file", save "file", replay "file"
		TextAt Span
		Number string // digits 5
	}
	// Prefer states the unit in which answers of its dimension appear.
	Prefer struct{ Stated *Stated }
	// Walk follows a power or dose through a chain.
	Walk struct {
		Chain   string
		ChainAt Span
		X       Expr
	}
)

func (*Show) action()           {}
func (*Define) action()         {}
func (*DefineFunction) action() {}
func (*Check) action()          {}
func (*Command) action()        {}
func (*Prefer) action()         {}
func (*Walk) action()           {}

// reader gives the reader of a word that begins a statement, or nil.
func reader(word string) func(p *parser, word Token) Action {
	switch word {
	case "check":
		return readCheck
	case "why", "counted":
		return names(1, 1)
	case "forget":
		return names(1, 20)
	case "quit":
		return names(0, 0)
	case "walk":
		return readWalk
	case "import", "save", "replay":
		return fileName
	case "names", "help":
		return pattern
	case "prefer":
		return readPrefer
	case "digits":
		return readDigits
	case "chain", "stack":
		return alone
	case "material":
		return readMaterial
	}
	return studies(word)
}

// StatementWord says whether a word begins a statement.
func StatementWord(word string) bool {
	return reader(word) != nil
}

// Parse reads one statement: a line, or the lines of a block.
func Parse(src string) (*Statement, *Error) {
	if _, ok := BlockHeading(src); ok {
		return parseBlock(src)
	}
	if len(src) > MaxStatement {
		return nil, Fail(Span{0, 0}, fmt.Sprintf("this line has %d bytes; a line may have %d", len(src), MaxStatement),
			"give parts of it names of their own")
	}
	p := newParser(src)
	s := &Statement{}
	if p.tok.Kind != End {
		s.Do = p.action()
		p.finish()
	}
	if p.err != nil {
		return nil, p.err
	}
	s.Note = p.note()
	return s, nil
}

// note is the text behind #, once the statement is read.
func (p *parser) note() string {
	rest := p.scan.src[p.tok.Span.Start:]
	if text, ok := strings.CutPrefix(rest, "#"); ok {
		return strings.TrimSpace(text)
	}
	return ""
}

func (p *parser) action() Action {
	if p.tok.Kind != Word {
		return p.show()
	}
	first := p.tok
	if StatementWord(first.Text) {
		return p.worded(first)
	}
	if a := p.definition(); a != nil {
		return a
	}
	return p.show()
}

// worded reads a statement that begins with a word of its own.
func (p *parser) worded(word Token) Action {
	p.advance(false)
	if p.is("=") {
		p.declares(word)
		return poisonAction
	}
	return reader(word.Text)(p, word)
}

func (p *parser) show() Action {
	return &Show{X: p.expression(), Stated: p.stated()}
}

// stated takes a bracket where one stands.
func (p *parser) stated() *Stated {
	if p.tok.Kind != Bracket {
		return nil
	}
	s := &Stated{Unit: p.tok.Text, Where: p.tok.Span}
	words := strings.Fields(p.tok.Text)
	if i := slices.Index(words, "at"); i >= 0 {
		s.Unit, s.Plane = strings.Join(words[:i], " "), strings.Join(words[i+1:], " ")
	}
	switch {
	case len(words) == 0:
		p.fail(Fail(s.Where, "this bracket is empty", "a stated unit is written [mJ/cm^2]; leave the bracket out where none is meant"))
	case words[len(words)-1] == "at":
		p.fail(Fail(s.Where, "behind at stands a plane", "write [W at IF]"))
	}
	p.advance(false)
	return s
}

// definition reads name = x, name [unit] = x and f(a, b) = x, or nothing.
func (p *parser) definition() Action {
	before, first := p.mark(), p.tok
	p.advance(false)
	if p.is("(") {
		if f := p.functionHead(first); f != nil {
			p.declares(first)
			f.X = p.expression()
			return f
		}
		p.back(before)
		return nil
	}
	stated := p.stated()
	if !p.is("=") || p.err != nil {
		p.back(before)
		return nil
	}
	p.declares(first)
	p.advance(false)
	d := &Define{first.Text, first.Span, stated, p.expression()}
	if p.tok.Kind == Bracket {
		p.fail(Fail(p.tok.Span, "the unit of a definition stands behind its name", "write "+first.Text+" ["+Visible(p.tok.Text)+"] = …"))
	}
	return d
}

var poisonAction = &Show{X: poison}

// functionHead reads (a, b [unit]) = behind a name; it returns nil when the
// text is no such head.
func (p *parser) functionHead(name Token) *DefineFunction {
	f := &DefineFunction{Name: name.Text, NameAt: name.Span}
	p.advance(false)
	for p.tok.Kind == Word && !Reserved(p.tok.Text) && !strings.Contains(p.tok.Text, ".") {
		param := Param{Name: p.tok.Text, NameAt: p.tok.Span}
		p.advance(false)
		param.Stated = p.stated()
		f.Params = append(f.Params, param)
		if !p.accept(",") {
			break
		}
	}
	if !p.accept(")") || p.err != nil {
		return nil
	}
	f.Stated = p.stated()
	if !p.accept("=") || p.err != nil {
		return nil
	}
	return f
}
