package program

import (
	"fmt"
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
	Stated   *units.Unit

	locals map[string]*Node
	inside []string // session functions being checked
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
	switch x := x.(type) {
	case *syntax.Literal:
		return c.literal(x)
	case *syntax.Name:
		return c.name(x)
	case *syntax.String:
		return &Node{op: opText, text: x.Text, Type: Type{Kind: Text}, At: x.Where, Owner: c.Owner}, nil
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
	}
	return nil, syntax.Fail(x.Span(), "this has no value", "see: help language")
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

// text returns what stands at a span.
func (c *Checker) text(at syntax.Span) string {
	if at.Start < 0 || at.End > len(c.Source) || at.Start > at.End {
		return ""
	}
	return syntax.Visible(c.Source[at.Start:at.End])
}

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
	case ChainKind:
		return nil, syntax.Fail(x.Span(), c.text(x.Span())+" is a chain, not a value", "transmission("+c.text(x.Span())+", IF, WAFER) is its factor between two planes")
	}
	return nil, syntax.Fail(x.Span(), c.describe(n.Type)+" is no value to calculate with", "texts name files and labels only")
}

func (c *Checker) name(x *syntax.Name) (*Node, error) {
	if n := c.locals[x.Name]; n != nil {
		return n, nil
	}
	if n := c.Scope.Constant(x.Name); n != nil {
		return constant(n.value, n.Type, x.Where, c.Owner), nil
	}
	if n := c.Scope.Node(x.Name); n != nil {
		c.use(x.Name)
		if n.op == opChain {
			return n, nil
		}
		return &Node{op: opRef, name: x.Name, Type: n.Type, At: x.Where, Owner: c.Owner}, nil
	}
	return nil, c.unknown(x)
}

// unknown refuses a name, with the likeliest reason.
func (c *Checker) unknown(x *syntax.Name) error {
	name := x.Name
	if c.Scope.Function(name) != nil || c.Scope.Own(name) != nil {
		return syntax.Fail(x.Where, name+" is a function; it takes its arguments in parentheses", "see: help "+name)
	}
	if near := c.Scope.Near(name); len(near) > 0 {
		return syntax.Fail(x.Where, name+" is no name that is known here", "did you mean "+strings.Join(near, " or ")+"?")
	}
	if _, err := c.Scope.Units().Parse(name); err == nil {
		return syntax.Fail(x.Where, name+" is a unit, and a unit stands right behind a number", "write 1 "+name)
	}
	if c.knownPlane(Plane(name)) {
		return syntax.Fail(x.Where, name+" is a plane, no value", "a plane stands behind at, as in 250 W at "+name)
	}
	return syntax.Fail(x.Where, name+" is no name that is known here", "define it first: "+name+" = …")
}

func (c *Checker) list(x *syntax.List) (*Node, error) {
	n := &Node{op: opList, Type: Type{Kind: List}, At: x.Where, Owner: c.Owner}
	for i, item := range x.Items {
		a, err := c.plain(item)
		if err != nil {
			return nil, err
		}
		if i == 0 {
			n.Type.Dim, n.Type.Plane = a.Type.Dim, a.Type.Plane
		}
		if a.Type.Dim != n.Type.Dim || a.Type.Plane != n.Type.Plane {
			return nil, &syntax.Error{
				Marks: []syntax.Span{x.Items[0].Span(), item.Span()},
				Msg:   "a list holds one dimension at one plane: " + c.describe(n.args[0].Type) + " and " + c.describe(a.Type) + " do not mix",
				Hint:  "make two lists of it", Cause: units.ErrDimension,
			}
		}
		n.args = append(n.args, a)
	}
	if len(n.args) == 0 {
		return nil, syntax.Fail(x.Where, "this list is empty", "write at least one value: {1, 2, 3}")
	}
	return n, nil
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
