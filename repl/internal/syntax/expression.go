package syntax

import "strings"

// poison stands where no tree could be made; the parser holds the error.
var poison = &Name{Name: "?"}

// expression reads a sum.
func (p *parser) expression() Expr {
	return p.chainOf(p.product, "+", "-")
}

func (p *parser) product() Expr { return p.chainOf(p.signed, "*", "/") }

// chainOf reads operands joined from the left by one of two operators.
func (p *parser) chainOf(operand func() Expr, a, b string) Expr {
	start := p.tok.Span.Start
	x := operand()
	for p.is(a) || p.is(b) {
		x = p.joined(start, x, operand)
	}
	return x
}

// joined reads the operator at hand and what stands behind it.
func (p *parser) joined(start int, x Expr, operand func() Expr) Expr {
	b := &Binary{Op: p.tok.Text, OpAt: p.tok.Span, X: x}
	p.advance(false)
	b.Y = operand()
	b.Where = p.since(start)
	return b
}

// signed reads -x; the power binds tighter, so that -3^2 is −9.
func (p *parser) signed() Expr {
	if !p.is("-") && !p.is("+") {
		return p.power()
	}
	if !p.enter() {
		return poison
	}
	defer p.leave()
	sign := p.tok
	p.advance(false)
	x := p.signed()
	if sign.Text == "+" {
		return x
	}
	if lit, ok := x.(*Literal); ok && isPoint(lit) && lit.Where.Start == sign.Span.End {
		lit.Number = "-" + lit.Number
		lit.Where = lit.Where.Join(sign.Span)
		lit.NumberAt = lit.NumberAt.Join(sign.Span)
		return lit
	}
	return &Unary{X: x, Where: p.since(sign.Span.Start)}
}

// isPoint says whether a literal is spelled as a temperature point, the one
// place where a minus belongs to the number.
func isPoint(x *Literal) bool {
	return strings.Contains(" degC °C ℃ ºC ", " "+x.Unit+" ") && !strings.HasPrefix(x.Number, "-")
}

func (p *parser) power() Expr {
	start := p.tok.Span.Start
	x := p.postfix()
	if p.tok.Kind == Raised {
		n := &Literal{Number: p.tok.Text, Where: p.tok.Span, NumberAt: p.tok.Span}
		p.advance(false)
		return &Binary{Op: "^", OpAt: n.Where, X: x, Y: n, Where: p.since(start)}
	}
	if !p.is("^") {
		return x
	}
	if !p.enter() {
		return poison
	}
	defer p.leave()
	return p.joined(start, x, p.signed)
}

// postfix reads a primary and the planes behind it; that there is one plane at
// most is for others to say.
func (p *parser) postfix() Expr {
	start := p.tok.Span.Start
	x := p.primary()
	for p.acceptWord("at") {
		plane, at := p.plane()
		x = &At{X: x, Plane: plane, PlaneAt: at, Where: p.since(start)}
	}
	return x
}

// plane reads IF or WAFER/IF; the parts touch.
func (p *parser) plane() (string, Span) {
	plane, at := p.name("a plane")
	if p.is("/") && p.tok.Span.Start == at.End && p.scan.letterAt(p.tok.Span.End) {
		p.advance(false)
		over, end := p.name("a plane")
		return plane + "/" + over, at.Join(end)
	}
	return plane, at
}

func (p *parser) primary() Expr {
	tok := p.tok
	switch {
	case tok.Kind == Number:
		return p.literal()
	case tok.Kind == Text:
		p.advance(false)
		return &String{tok.Text, tok.Span}
	case tok.Kind == Word:
		return p.nameOrCall()
	case p.is("("):
		return p.parenthesis()
	case p.is("{"):
		return p.list()
	}
	p.unexpected("a number, a name or a parenthesis is wanted")
	return poison
}

func (p *parser) parenthesis() Expr {
	if !p.enter() {
		return poison
	}
	defer p.leave()
	open := p.tok.Span
	p.advance(false)
	x := p.expression()
	lit, _ := x.(*Literal)
	shared := lit != nil && lit.Spread != nil && lit.Unit == "" && lit.Spread.Unit == ""
	if !p.is(")") {
		p.unexpected(") is missing for the parenthesis that opens this part")
		return poison
	}
	end := p.tok.Span
	p.advance(shared)
	if shared {
		lit.Where = open.Join(end)
		lit.Spread.Inner = true
		p.unitOf(lit)
		p.attributes(lit)
	}
	return x
}

func (p *parser) list() Expr {
	if !p.enter() {
		return poison
	}
	defer p.leave()
	l := &List{Where: p.tok.Span}
	p.advance(false)
	for more := !p.is("}"); more; more = p.accept(",") {
		l.Items = append(l.Items, p.expression())
	}
	l.Where = l.Where.Join(p.tok.Span)
	p.expect("}", "behind the list")
	return l
}

func (p *parser) nameOrCall() Expr {
	tok := p.tok
	if Reserved(tok.Text) {
		p.fail(Fail(tok.Span, tok.Text+" is a word of the language, no value", "see: help statements"))
		return poison
	}
	p.advance(false)
	if !p.is("(") {
		return &Name{tok.Text, tok.Span}
	}
	return p.call(tok)
}

func (p *parser) call(name Token) Expr {
	if !p.enter() {
		return poison
	}
	defer p.leave()
	c := &Call{Func: name.Text, FuncAt: name.Span}
	p.advance(false)
	for more := !p.is(")"); more; more = p.accept(",") {
		c.Args = append(c.Args, p.argument())
	}
	c.Where = name.Span.Join(p.tok.Span)
	p.expect(")", "behind the arguments of "+name.Text)
	return c
}

// argument reads x, label = x, or a condition.
func (p *parser) argument() Arg {
	if p.tok.Kind == Word {
		before, label := p.mark(), p.tok
		p.advance(false)
		if p.accept("=") {
			return Arg{label.Text, label.Span, p.expression()}
		}
		p.back(before)
	}
	return Arg{X: p.condition()}
}

// condition reads a < b, or a value.
func (p *parser) condition() Expr {
	start := p.tok.Span.Start
	x := p.expression()
	for _, op := range []string{"<", "<=", ">", ">="} {
		if p.is(op) {
			return p.joined(start, x, p.expression)
		}
	}
	return x
}
