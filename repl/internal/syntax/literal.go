package syntax

// literal reads number, unit, ± u and (k=n); the plane is for postfix.
func (p *parser) literal() Expr {
	x := &Literal{Number: p.tok.Text, Where: p.tok.Span, NumberAt: p.tok.Span}
	p.advance(true)
	p.unitOf(x)
	if p.is("±") {
		p.spread(x)
	}
	p.attributes(x)
	return x
}

func (p *parser) unitOf(x *Literal) {
	if p.tok.Kind == Unit {
		x.Unit, x.UnitAt = p.tok.Text, p.tok.Span
		x.Where = x.Where.Join(p.tok.Span)
		p.advance(false)
	}
}

func (p *parser) spread(x *Literal) {
	s := &Spread{Where: p.tok.Span}
	p.advance(false)
	if p.tok.Kind != Number {
		p.unexpected("behind ± stands a number, as in 30 mJ/cm^2 ± 2 %")
		return
	}
	s.Number = p.tok.Text
	s.Where = s.Where.Join(p.tok.Span)
	p.advance(true)
	if p.tok.Kind == Unit {
		s.Unit, s.UnitAt = p.tok.Text, p.tok.Span
		s.Where = s.Where.Join(p.tok.Span)
		p.advance(false)
	}
	x.Spread = s
	x.Where = x.Where.Join(s.Where)
}

// attributes reads (k=2, nu=4) behind an uncertain number.
func (p *parser) attributes(x *Literal) {
	if !p.is("(") || !p.startsAttribute() {
		return
	}
	if x.Spread == nil {
		x.Spread = &Spread{Where: x.NumberAt}
	}
	p.advance(false)
	for p.err == nil {
		x.Spread.Says = append(x.Spread.Says, p.attribute())
		if !p.accept(",") {
			break
		}
	}
	x.Where = x.Where.Join(p.tok.Span)
	p.expect(")", "behind what is said of the uncertainty")
}

// startsAttribute looks past the parenthesis for k=, p= or nu=.
func (p *parser) startsAttribute() bool {
	before := p.mark()
	defer p.back(before)
	p.advance(false)
	if p.tok.Kind != Word {
		return false
	}
	p.advance(false)
	return p.is("=")
}

func (p *parser) attribute() Attribute {
	a := Attribute{Name: p.tok.Text, Where: p.tok.Span}
	if p.tok.Kind != Word {
		p.unexpected("a word is wanted, as in (k=2), (p=95 %) or (nu=4)")
	}
	p.advance(false)
	p.expect("=", "as in (k=2)")
	if p.tok.Kind != Number {
		p.unexpected("a number is wanted, as in (k=2), (p=95 %) or (nu=4)")
		return a
	}
	a.Number = p.tok.Text
	a.Where = a.Where.Join(p.tok.Span)
	p.advance(true)
	if p.tok.Kind == Unit {
		a.Unit = p.tok.Text
		p.advance(false)
	}
	return a
}
