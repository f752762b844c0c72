package syntax

// studies gives the readers of these statements.
func studies(word string) func(*parser, Token) Action {
	switch word {
	case "budget":
		return func(p *parser, _ Token) Action { return &Budget{p.column()} }
	case "propagate":
		return readPropagate
	case "correlation":
		return readCorrelation
	case "sweep":
		return readSweep
	case "solve", "maximise", "minimise":
		return readSearch
	case "fit":
		return readFit
	case "case":
		return readCase
	case "compare":
		return readCompare
	case "data":
		return readData
	}
	return nil
}

func (p *parser) column() Column { return Column{p.expression(), p.stated()} }

func (p *parser) columns() []Column {
	list := []Column{p.column()}
	for !p.isWord("plot") && !p.isWord("to") && p.accept(",") {
		if p.isWord("plot") || p.isWord("to") {
			break
		}
		list = append(list, p.column())
	}
	return list
}

// output reads plot and to "file" at the end of a statement.
func (p *parser) output(out *Output) {
	for p.err == nil {
		switch {
		case p.acceptWord("plot"):
			out.Plot = true
		case p.acceptWord("to"):
			if p.tok.Kind != Text {
				p.unexpected("behind to stands a file name in quotes, such as \"sweep.csv\"")
				return
			}
			out.To = append(out.To, String{p.tok.Text, p.tok.Span})
			p.advance(false)
		default:
			return
		}
		p.accept(",")
	}
}

func readPropagate(p *parser, _ Token) Action {
	a := &Propagate{Of: p.column()}
	p.output(&a.Out)
	if !p.accept(":") {
		return a
	}
	for p.err == nil && p.tok.Kind != End {
		if p.isWord("plot") || p.isWord("to") {
			p.output(&a.Out)
			continue
		}
		name, at := p.name("an option such as trials = 1e6")
		p.expect("=", "as in trials = 1e6")
		a.Options = append(a.Options, Option{name, at, p.expression()})
		if !p.accept(",") && !p.isWord("plot") && !p.isWord("to") {
			break
		}
	}
	return a
}

func (p *parser) named(what string) Name {
	name, at := p.name(what)
	return Name{name, at}
}

func readCorrelation(p *parser, _ Token) Action {
	a := &Correlation{A: p.named("the name of an input")}
	p.expect(",", "between the two names")
	a.B = p.named("the name of an input")
	p.expect("=", "as in correlation a, b = 0.8")
	a.X = p.expression()
	return a
}

func readSweep(p *parser, _ Token) Action {
	a := &Sweep{Axes: []Axis{p.axis()}}
	for p.accept(",") {
		a.Axes = append(a.Axes, p.axis())
	}
	p.expect(":", "between what varies and what is wanted")
	a.Columns = p.columns()
	p.output(&a.Out)
	return a
}

// axis reads x = a .. b by s, or x = a .. b 41 points log.
func (p *parser) axis() Axis {
	var a Axis
	a.Name, a.NameAt = p.name("the name that varies")
	p.expect("=", "as in sweep x = 1 nm .. 2 nm by 0.1 nm : …")
	p.ends(&a)
	if p.acceptWord("by") {
		a.By = p.expression()
		return a
	}
	p.accept(",")
	if p.tok.Kind != Number {
		p.unexpected("behind a range stands its step, by 0.1 nm, or a number of points, 41 points")
		return a
	}
	a.Points = p.primary()
	if !p.acceptWord("points") {
		p.unexpected("write 41 points, or by and a step")
	}
	a.Log = p.acceptWord("log")
	return a
}

func (p *parser) ends(a *Axis) {
	a.From = p.expression()
	p.expect("..", "between the ends of a range, as in 1 nm .. 2 nm")
	a.To = p.expression()
}

func readSearch(p *parser, word Token) Action {
	a := &Search{Word: word.Text, WordAt: word.Span, X: p.expression()}
	if word.Text == "solve" {
		p.expect("=", "as in solve f = 3 W for x in 1 .. 2")
		a.Y = p.expression()
	}
	if !p.acceptWord("for") {
		p.unexpected("for is wanted: " + word.Text + " … for x in a .. b")
		return a
	}
	a.Axis.Name, a.Axis.NameAt = p.name("the name to look for")
	if !p.acceptWord("in") {
		p.unexpected("in is wanted: " + word.Text + " … for " + a.Axis.Name + " in a .. b")
		return a
	}
	p.ends(&a.Axis)
	return a
}

func readFit(p *parser, word Token) Action {
	a := &Fit{X: p.expression(), WordAt: word.Span}
	p.expect("=", "as in fit y = a*x + b over DATA for a, b")
	a.Y = p.expression()
	if !p.acceptWord("over") {
		p.unexpected("over is wanted: fit … over DATA for a, b")
		return a
	}
	a.Data = p.named("the name of a data table")
	if !p.acceptWord("for") {
		p.unexpected("for is wanted: fit … over " + a.Data.Name + " for a, b")
		return a
	}
	a.Names = p.nameList("a name to be found")
	return a
}

func (p *parser) nameList(what string) []Name {
	list := []Name{p.named(what)}
	for p.err == nil && p.accept(",") {
		list = append(list, p.named(what))
	}
	return list
}

func readCase(p *parser, _ Token) Action {
	a := &Case{}
	a.Name, a.NameAt = p.name("the name of the case")
	p.expect(":", "behind the name of the case")
	for p.err == nil {
		var s Setting
		s.Name, s.NameAt = p.name("a name that the case sets")
		p.expect("=", "as in case NAME : x = 3 W")
		s.X = p.expression()
		a.Sets = append(a.Sets, s)
		if !p.accept(",") {
			break
		}
	}
	return a
}

func readCompare(p *parser, _ Token) Action {
	a := &Compare{Columns: p.columns()}
	p.expect(":", "between the values and the cases, as in compare x, y : base, NAME")
	a.Cases = p.nameList("the name of a case")
	return a
}

func readData(p *parser, _ Token) Action {
	a := &Data{}
	a.Name, a.NameAt = p.name("the name of the table")
	p.expect("=", "as in data NAME = \"file.csv\"")
	a.File = String{p.tok.Text, p.tok.Span}
	if p.tok.Kind != Text {
		p.unexpected("a file name in quotes is wanted: data NAME = \"file.csv\"")
		return a
	}
	p.advance(false)
	return a
}

// studied gives the names and expressions that such a statement rests on.
func studied(a Action) (names []string, parts []Expr) {
	columns := func(list ...Column) {
		for _, c := range list {
			parts = append(parts, c.X)
		}
	}
	axes := func(list ...Axis) {
		for _, x := range list {
			parts = append(parts, x.From, x.To, x.By, x.Points)
		}
	}
	switch a := a.(type) {
	case *Budget:
		columns(a.Of)
	case *Propagate:
		columns(a.Of)
	case *Correlation:
		names = append(names, a.A.Name, a.B.Name)
	case *Sweep:
		columns(a.Columns...)
		axes(a.Axes...)
	case *Search:
		parts = append(parts, a.X, a.Y)
		axes(a.Axis)
	case *Fit:
		parts, names = append(parts, a.X, a.Y), append(names, a.Data.Name)
	case *Case:
		for _, s := range a.Sets {
			names, parts = append(names, s.Name), append(parts, s.X)
		}
	case *Compare:
		columns(a.Columns...)
		for _, c := range a.Cases {
			names = append(names, c.Name)
		}
	}
	return names, parts
}
