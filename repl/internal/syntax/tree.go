package syntax

// Expr is a node of an expression. Its kinds are in this file.
type Expr interface {
	Span() Span
	expr()
}

// Literal is a number with what belongs to it: unit and spread.
type Literal struct {
	Number   string // decimal text, perhaps with a concise uncertainty, perhaps with a minus
	Unit     string // "" for none
	Spread   *Spread
	Where    Span // all of it
	NumberAt Span
	UnitAt   Span
}

// Spread is what stands behind ±, or what (k=2) and the like say of a concise
// uncertainty.
type Spread struct {
	Number string // "" when the literal is in the concise form
	Unit   string // "" for the unit of the literal
	Inner  bool   // (30 ± 0.6) mJ/cm^2: both share the unit behind the parenthesis
	Says   []Attribute
	Where  Span
	UnitAt Span
}

// Attribute is one of k=2, p=95 %, nu=4.
type Attribute struct {
	Name   string
	Number string
	Unit   string
	Where  Span
}

// Name is a name, also of a data column ("lots.dose").
type Name struct {
	Name  string
	Where Span
}

// String is a text in quotes.
type String struct {
	Text  string
	Where Span
}

// Call is a function with its arguments.
type Call struct {
	Func   string
	FuncAt Span
	Args   []Arg
	Where  Span
}

// Arg is one argument; Label is "" for a positional one.
type Arg struct {
	Label   string
	LabelAt Span
	X       Expr
}

// Unary is a minus.
type Unary struct {
	X     Expr
	Where Span
}

// Binary is one of + - * / ^ and the comparisons < <= > >=.
type Binary struct {
	Op    string
	OpAt  Span
	X, Y  Expr
	Where Span // parentheses around X and Y included
}

// At sets a quantity at a plane or a ratio of planes.
type At struct {
	X       Expr
	Plane   string // "IF" or "WAFER/IF"
	PlaneAt Span
	Where   Span
}

// List is {a, b, c}.
type List struct {
	Items []Expr
	Where Span
}

// Span returns where the literal stands; likewise for the other nodes.
func (x *Literal) Span() Span { return x.Where }

// Span returns where the name stands.
func (x *Name) Span() Span { return x.Where }

// Span returns where the text stands.
func (x *String) Span() Span { return x.Where }

// Span returns where the call stands.
func (x *Call) Span() Span { return x.Where }

// Span returns where the term stands.
func (x *Unary) Span() Span { return x.Where }

// Span returns where both operands stand.
func (x *Binary) Span() Span { return x.Where }

// Span returns where the quantity and its plane stand.
func (x *At) Span() Span { return x.Where }

// Span returns where the list stands.
func (x *List) Span() Span { return x.Where }

func (*Literal) expr() {}
func (*Name) expr()    {}
func (*String) expr()  {}
func (*Call) expr()    {}
func (*Unary) expr()   {}
func (*Binary) expr()  {}
func (*At) expr()      {}
func (*List) expr()    {}

// Stated is a unit in brackets, with a plane where it names one.
type Stated struct {
	Unit  string
	Plane string // "" for none
	Where Span
}

// Each calls f for an expression and all its parts.
func Each(x Expr, f func(Expr)) {
	f(x)
	switch x := x.(type) {
	case *Unary:
		Each(x.X, f)
	case *Binary:
		Each(x.X, f)
		Each(x.Y, f)
	case *At:
		Each(x.X, f)
	case *List:
		for _, item := range x.Items {
			Each(item, f)
		}
	case *Call:
		for _, a := range x.Args {
			Each(a.X, f)
		}
	case *Layer:
		Each(x.X, f)
		if x.Rough != nil {
			Each(x.Rough, f)
		}
	}
}

// Names lists the names that an action uses, in the order of the text.
func Names(a Action) []string {
	var list []string
	add := func(xs ...Expr) {
		for _, x := range xs {
			if x == nil {
				continue
			}
			Each(x, func(x Expr) {
				switch x := x.(type) {
				case *Name:
					list = append(list, x.Name)
				case *Call:
					list = append(list, x.Func)
				}
			})
		}
	}
	switch a := a.(type) {
	case *Show:
		add(a.X)
	case *Define:
		add(a.X)
	case *Material:
		add(a.X)
	case *DefineFunction:
		add(a.X)
	case *Check:
		add(a.X, a.Y, a.Within)
	case *Walk:
		list = append(list, a.Chain)
		add(a.X)
	case *Command:
		for _, n := range a.Names {
			list = append(list, n.Name)
		}
	case *Block:
		for _, l := range a.Lines {
			add(l.Times)
			add(l.Items...)
		}
	default:
		names, parts := studied(a)
		list = append(list, names...)
		add(parts...)
	}
	return list
}
