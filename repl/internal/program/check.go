package program

import (
	"fmt"
	"maps"
	"math/big"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Scope is what checking may look up. A session implements it.
type Scope interface {
	Units() *units.System
	// Node returns the checked formula of a name, or nil.
	Node(name string) *Node
	// Constant returns the node of a named constant, or nil.
	Constant(name string) *Node
	// Function returns a row of the catalogue, or nil.
	Function(name string) *Function
	// Own returns a function of the session, or nil.
	Own(name string) *OwnFunction
	// Material returns the body of a material, nil when there is none, and
	// whether it is one of the session's own.
	Material(name string) (n *Node, own bool)
	// Integrate gives the mean of a spectrum over a band.
	Integrate(f func(dst, wavelengths []float64) error, center, width float64, kinks []float64) (mean, deviation float64, err error)
	// Planes lists the planes that chains declare.
	Planes() []Plane
	// Near returns known names and functions that are spelled like the word.
	Near(word string) []string
}

// OwnFunction is a function of the session: its body is checked at each call.
type OwnFunction struct {
	Name   string
	Params []syntax.Param
	Stated *syntax.Stated
	Body   syntax.Expr
	Source string // the text that Body's spans refer to
}

// Checker checks the expressions of one statement.
type Checker struct {
	Scope    Scope
	Source   string   // the statement's text
	Owner    string   // the name it defines, "" for none
	Warnings []string // each said once
	Uses     []string // names and session functions it rests on, each once

	locals map[string]*Node
	inside []string     // session functions being checked
	anchor *syntax.Span // where all parts of this text are said to stand; nil for their own places
	size   *int         // expressions checked so far, those of session functions at each call
}

// made finishes a node for the text at a place.
func (c *Checker) made(n Node, at syntax.Span) *Node {
	n.At, n.Owner = c.place(at), c.Owner
	return &n
}

func (c *Checker) constant(v float64, t Type, at syntax.Span) *Node {
	return c.made(Node{op: opConst, value: v, Type: t}, at)
}

// place is where a part of this text is said to stand.
func (c *Checker) place(at syntax.Span) syntax.Span {
	if c.anchor != nil {
		return *c.anchor
	}
	return at
}

// grown refuses a formula that becomes too large: session functions that call
// one another can double it at every step.
func (c *Checker) grown(at syntax.Span) error {
	if c.size == nil {
		c.size = new(int)
	}
	if *c.size++; *c.size <= MaxNodes {
		return nil
	}
	return &syntax.Error{
		Marks: []syntax.Span{at}, Cause: ErrSize,
		Msg: fmt.Sprintf("this formula has more than %d parts", MaxNodes), Hint: "give parts of it names of their own",
	}
}

// Check gives an expression its meaning. The error is a *syntax.Error.
func (c *Checker) Check(x syntax.Expr) (*Node, error) {
	n, err := c.check(x)
	if err != nil {
		return nil, err
	}
	return n, nil
}

func (c *Checker) check(x syntax.Expr) (*Node, error) {
	if err := c.grown(x.Span()); err != nil {
		return nil, err
	}
	switch x := x.(type) {
	case *syntax.Literal:
		return c.literal(x)
	case *syntax.Name:
		return c.name(x)
	case *syntax.String:
		return c.made(Node{op: opText, text: x.Text, Type: Type{Kind: Text}}, x.Where), nil
	case *syntax.Unary:
		return c.negate(x)
	case *syntax.Binary:
		return c.binary(x)
	case *syntax.At:
		return c.at(x)
	case *syntax.List:
		return c.list(x)
	case *syntax.Call:
		return c.call(x)
	case *syntax.Layer:
		return nil, syntax.Fail(x.Where, "a layer stands in a stack", "a product is written with *, and a unit stands right behind its number")
	}
	return nil, syntax.Fail(x.Span(), "this has no value", "see: help language")
}

// Local gives a name a type for this statement alone; whoever runs the program
// fills it as an input.
func (c *Checker) Local(name string, t Type) { c.Locals(map[string]Type{name: t}) }

// Locals is Local for several names.
func (c *Checker) Locals(types map[string]Type) {
	locals := make(map[string]*Node, len(c.locals)+len(types))
	maps.Copy(locals, c.locals)
	for name, t := range types {
		locals[name] = &Node{op: opRef, name: name, Type: t}
	}
	c.locals = locals
}

func (c *Checker) warn(text string) {
	if !slices.Contains(c.Warnings, text) {
		c.Warnings = append(c.Warnings, text)
	}
}

func (c *Checker) use(name string) {
	if !slices.Contains(c.Uses, name) {
		c.Uses = append(c.Uses, name)
	}
}

// longest is how many characters of a statement a message quotes.
const longest = 60

// text returns what stands at a span; what is long is cut.
func (c *Checker) text(at syntax.Span) string {
	if at.Start < 0 || at.End > len(c.Source) || at.Start > at.End {
		return ""
	}
	text := []rune(syntax.Visible(c.Source[at.Start:at.End]))
	if len(text) > longest {
		return string(text[:longest]) + "…"
	}
	return string(text)
}

// Said quotes an expression as it stands in the statement.
func (c *Checker) Said(x syntax.Expr) string { return c.text(x.Span()) }

// plain checks an expression that must be a number or a temperature point.
func (c *Checker) plain(x syntax.Expr) (*Node, error) {
	n, err := c.check(x)
	if err != nil {
		return nil, err
	}
	switch n.Type.Kind {
	case Number, Point:
		return n, nil
	case List:
		return nil, syntax.Fail(x.Span(), "a list is no single value", "take sum, mean, median, min, max or sd of it")
	case condition:
		return nil, syntax.Fail(x.Span(), "a condition is no value to calculate with", "if(a < b, x, y) takes one")
	case ChainKind:
		return nil, syntax.Fail(x.Span(), c.text(x.Span())+" is a chain, not a value", "transmission("+c.text(x.Span())+", IF, WAFER) is its factor between two planes")
	}
	if n.Type.Kind == BodyKind {
		return nil, syntax.Fail(x.Span(), c.text(x.Span())+" is a body, not a value", "reflectivity("+c.text(x.Span())+", 13.5 nm) is one; see: help reflectivity")
	}
	return nil, syntax.Fail(x.Span(), c.describe(n.Type)+" is no value to calculate with", "texts name files and labels only")
}

func (c *Checker) name(x *syntax.Name) (*Node, error) {
	if n := c.locals[x.Name]; n != nil {
		return n, nil
	}
	if n := c.Scope.Constant(x.Name); n != nil {
		return c.constant(n.value, n.Type, x.Where), nil
	}
	if n := c.Scope.Node(x.Name); n != nil {
		c.use(x.Name)
		if n.op == opChain || n.op == opBody {
			return n, nil
		}
		return c.made(Node{op: opRef, name: x.Name, Type: n.Type}, x.Where), nil
	}
	return nil, c.unknown(x)
}

// unknown refuses a name, with the likeliest reason.
func (c *Checker) unknown(x *syntax.Name) error {
	name := x.Name
	e := syntax.Fail(x.Where, name+" is no name that is known here", "define it first: "+name+" = …")
	e.Cause = ErrUnknown
	if c.Scope.Function(name) != nil || c.Scope.Own(name) != nil {
		e.Msg, e.Hint = name+" is a function; it takes its arguments in parentheses", "see: help "+name
	} else if c.knownPlane(Plane(name)) {
		e.Msg, e.Hint = name+" is a plane, no value", "a plane stands behind at, as in 250 W at "+name
	} else if _, err := c.Scope.Units().Parse(name); err == nil {
		e.Msg, e.Hint = name+" is a unit, and a unit stands right behind a number", "write 1 "+name
		if near := c.Scope.Near(name); len(near) > 0 {
			e.Hint += ", or did you mean " + strings.Join(near, " or ") + "?"
		}
	} else if n, _ := c.Scope.Material(name); n != nil {
		e.Msg, e.Hint = name+" is a material, not a value", "reflectivity("+name+", 13.5 nm) and attenuation("+name+") ask it"
	} else if near := c.Scope.Near(name); len(near) > 0 {
		e.Hint = "did you mean " + strings.Join(near, " or ") + "?"
	} else if name == "exit" || name == "bye" {
		e.Hint = "quit leaves"
	}
	return e
}

func (c *Checker) list(x *syntax.List) (*Node, error) {
	n := Node{op: opList, Type: Type{Kind: List}}
	for i, item := range x.Items {
		a, err := c.plain(item)
		if err != nil {
			return nil, err
		}
		if i == 0 {
			n.Type = Type{Kind: List, Dim: a.Type.Dim, Plane: a.Type.Plane, Points: a.Type.Kind == Point}
		} else if first := n.args[0].Type; a.Type != first {
			e := c.pair(x.Items[0], item, "a list holds one dimension at one plane: "+c.describe(first)+" and "+c.describe(a.Type)+" do not mix", "make two lists of it")
			e.Cause = Differ("list", first, a.Type)
			return nil, e
		}
		n.args = append(n.args, a)
	}
	if len(n.args) == 0 {
		return nil, syntax.Fail(x.Where, "this list is empty", "write at least one value: {1, 2, 3}")
	}
	return c.made(n, x.Where), nil
}

// exponent reads a constant rational exponent from the text, exactly.
func exponent(x syntax.Expr) (num, den int, ok bool) {
	r := rational(x, 0)
	if r == nil || !r.Num().IsInt64() || !r.Denom().IsInt64() {
		return 0, 0, false
	}
	n, d := r.Num().Int64(), r.Denom().Int64()
	if n > 1000 || n < -1000 || d > 1000 {
		return 0, 0, false
	}
	return int(n), int(d), true
}

func rational(x syntax.Expr, depth int) *big.Rat {
	if depth > 8 {
		return nil
	}
	switch x := x.(type) {
	case *syntax.Literal:
		if x.Unit != "" || x.Spread != nil || strings.ContainsAny(x.Number, "(eE") || len(x.Number) > 12 {
			return nil
		}
		r, _ := new(big.Rat).SetString(x.Number)
		return r
	case *syntax.Unary:
		if r := rational(x.X, depth+1); r != nil {
			return r.Neg(r)
		}
	case *syntax.Binary:
		a, b := rational(x.X, depth+1), rational(x.Y, depth+1)
		if a == nil || b == nil {
			return nil
		}
		switch {
		case x.Op == "/" && b.Sign() != 0:
			return a.Quo(a, b)
		case x.Op == "*":
			return a.Mul(a, b)
		}
	}
	return nil
}

// named says a count in words for messages.
func named(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return fmt.Sprintf("%d %ss", n, thing)
}
