package program

import (
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Body is what a body is made of, apart from its numbers. The session makes
// bodies and knows how to ask them; checking passes them on.
type Body interface {
	// Describe names the body in messages.
	Describe() string
}

// NewBody makes the node of a body: what it is made of, and the numbers in it.
func (c *Checker) NewBody(body Body, numbers []*Node, at syntax.Span) *Node {
	return c.made(Node{op: opBody, body: body, args: numbers, Type: Type{Kind: BodyKind}}, at)
}

// Body returns what a body is made of; nil for other nodes.
func (n *Node) Body() Body { return n.body }

// Numbers returns the nodes of a body's numbers.
func (n *Node) Numbers() []*Node { return n.args }

// Made makes the node of a call of a function that a row built for one body.
func (c *Checker) Made(f *Function, args []*Node, t Type, at syntax.Span) *Node {
	return c.made(Node{op: opCall, fn: f, args: args, Type: t}, at)
}

// Quantity checks an expression that must have a dimension, inside a block.
func (c *Checker) Quantity(x syntax.Expr, want units.Dimension, what string) (*Node, error) {
	n, err := c.plain(x)
	if err != nil {
		return nil, err
	}
	if n.Type.Kind == Number && n.Type.Dim == want && n.Type.Plane != "" {
		e := syntax.Fail(x.Span(), what+" stands at no plane, and this is at "+string(n.Type.Plane), "number_of(x) drops a plane on purpose")
		e.Cause = ErrPlane
		return nil, e
	}
	if n.Type.Kind != Number || n.Type.Dim != want {
		return nil, &syntax.Error{
			Marks: []syntax.Span{x.Span()}, Msg: what + " is " + c.quantity(want) + ", not " + c.describe(n.Type),
			Hint: "give it in " + c.Scope.Units().UnitText(want), Cause: Differ("take", n.Type, Type{Dim: want}),
		}
	}
	return n, nil
}

// body checks an argument that takes a body: a stack or a name that holds one,
// then a material.
func (c *Checker) body(p Param, x syntax.Expr) (*Node, error) {
	name, ok := x.(*syntax.Name)
	if !ok {
		n, err := c.check(x)
		if err == nil && n.Type.Kind != BodyKind {
			err = c.noBody(p, x, c.describe(n.Type))
		}
		return n, err
	}
	if n := c.Scope.Node(name.Name); n != nil && n.Type.Kind == BodyKind {
		c.use(name.Name)
		return n, nil
	}
	if n := c.Material(name.Name); n != nil {
		return n, nil
	}
	if n := c.Scope.Node(name.Name); n != nil {
		return nil, c.noBody(p, x, c.describe(n.Type))
	}
	return nil, c.noBody(p, x, "a name that is not known")
}

func (c *Checker) noBody(p Param, x syntax.Expr, what string) error {
	e := syntax.Fail(x.Span(), c.text(x.Span())+" is "+what+"; "+p.Name+" is a body or a material", "element symbols are known; others are named by material NAME = SiO2 2.2 g/cm^3")
	e.Cause = ErrUnknown
	return e
}

// MaterialKey is the name under which a material is kept, apart from values.
func MaterialKey(name string) string { return "material " + name }

// Material finds a material by name, nil when there is none.
func (c *Checker) Material(name string) *Node {
	n, own := c.Scope.Material(name)
	if own {
		c.use(MaterialKey(name))
	}
	return n
}
