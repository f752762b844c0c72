package syntax

import (
	"fmt"
	"strings"
)

type (
	// Material names a material by formula and density.
	Material struct {
		Name      string
		NameAt    Span
		Formula   string
		FormulaAt Span
		X         Expr // the density
	}
	// Layer is a layer of a stack: a material, a thickness, perhaps a roughness
	// of the interface that light meets first.
	Layer struct {
		Material Name
		X        Expr
		Rough    Expr // nil for none of its own
		Where    Span
	}
)

func (*Material) action() {}

func (*Layer) expr() {}

// Span is all of the layer.
func (x *Layer) Span() Span { return x.Where }

// readMaterial reads material NAME = C8H8O 1.17 g/cm^3; a formula is one word
// of its own spelling.
func readMaterial(p *parser, _ Token) Action {
	m := &Material{}
	name := p.tok
	m.Name, m.NameAt = p.name("the name of the material")
	p.declares(name)
	if !p.is("=") {
		p.unexpected("= is wanted, as in material resist = C8H8O 1.17 g/cm^3")
		return m
	}
	rest := p.scan.src[p.tok.Span.End:]
	start := p.tok.Span.End + len(rest) - len(strings.TrimLeft(rest, " "))
	end := start
	for end < len(p.scan.src) && p.scan.src[end] != ' ' && p.scan.src[end] != '#' {
		end++
	}
	m.Formula, m.FormulaAt = p.scan.src[start:end], Span{start, end}
	p.scan.pos = end
	p.advance(false)
	if m.Formula == "" || p.tok.Kind == End {
		p.unexpected("a formula and a density are wanted, as in material resist = C8H8O 1.17 g/cm^3")
		return m
	}
	if n := len(m.Formula); n > MaxName {
		p.fail(Fail(m.FormulaAt, fmt.Sprintf("this formula has %d bytes; a formula may have %d", n, MaxName), "write it with fewer groups, as in C8H8O"))
	}
	m.X = p.expression()
	return m
}

// item reads what stands behind the label of a line: an expression, or a layer
// such as Si 4.15 nm rough 0.6 nm.
func (p *parser) item() Expr {
	if p.tok.Kind != Word || Reserved(p.tok.Text) {
		return p.expression()
	}
	before, first := p.mark(), p.tok
	p.advance(false)
	if p.tok.Kind != Number && (p.tok.Kind != Word || inGrammar(p.tok.Text)) {
		p.back(before)
		x := p.expression()
		if call, ok := x.(*Call); ok && len(call.Args) == 1 && p.isWord("rough") {
			return p.rough(&Layer{Material: Name{call.Func, call.FuncAt}, X: call.Args[0].X, Where: call.Where})
		}
		return x
	}
	l := &Layer{Material: Name{first.Text, first.Span}, X: p.expression()}
	l.Where = first.Span.Join(p.prev)
	return p.rough(l)
}

func (p *parser) rough(l *Layer) Expr {
	if p.acceptWord("rough") {
		l.Rough = p.expression()
		l.Where = l.Where.Join(p.prev)
	}
	return l
}
