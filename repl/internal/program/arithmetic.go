package program

import (
	"fmt"
	"math"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

func (c *Checker) negate(x *syntax.Unary) (*Node, error) {
	a, err := c.plain(x.X)
	if err != nil {
		return nil, err
	}
	t := c.kelvin(a, "-")
	if v, ok := a.Constant(); ok {
		return c.constant(-v, t, x.Where), nil
	}
	return c.made(Node{op: opNeg, args: []*Node{a}, Type: t}, x.Where), nil
}

func (c *Checker) binary(x *syntax.Binary) (*Node, error) {
	if x.Op == "^" {
		return c.raise(x)
	}
	a, err := c.plain(x.X)
	if err != nil {
		return nil, err
	}
	b, err := c.plain(x.Y)
	if err != nil {
		return nil, err
	}
	n := c.made(Node{args: []*Node{a, b}}, x.Where)
	switch x.Op {
	case "+", "-":
		return c.sum(x, n)
	case "*", "/":
		return c.productOf(x, n)
	}
	n.op, n.cmp, n.Type = opCompare, x.Op, Type{Kind: condition}
	return n, c.comparable(x.X, x.Y, a.Type, b.Type, "compare")
}

// sum checks a + b and a − b: one dimension, one plane or one side without,
// and temperature points.
func (c *Checker) sum(x *syntax.Binary, n *Node) (*Node, error) {
	a, b := n.args[0].Type, n.args[1].Type
	verb := "add"
	n.op = opAdd
	if x.Op == "-" {
		verb, n.op = "subtract", opSub
	}
	if err := c.comparable(x.X, x.Y, a, b, verb); err != nil {
		return nil, err
	}
	n.Type = Type{Dim: a.Dim, Plane: a.Plane}
	if a.Plane == "" {
		n.Type.Plane = b.Plane
	}
	switch {
	case a.Kind == Point && b.Kind == Point && x.Op == "+":
		return nil, c.pair(x.X, x.Y, "two temperature points do not add",
			"a difference is in K: "+c.text(x.X.Span())+" + 5 K; the mean of points is mean(a, b)")
	case b.Kind == Point && a.Kind != Point && x.Op == "-":
		return nil, c.pair(x.X, x.Y, "a temperature point is not taken from a difference",
			"K beside a point is a difference; write both as points, or the point first")
	case a.Kind == Point && b.Kind == Point: // a difference
	case a.Kind == Point || b.Kind == Point:
		n.Type.Kind = Point
	}
	return n, nil
}

// comparable refuses operands that do not stand side by side.
func (c *Checker) comparable(x, y syntax.Expr, a, b Type, verb string) error {
	sys := c.Scope.Units()
	if a.Dim != b.Dim {
		msg := fmt.Sprintf("%s and %s do not %s", c.quantity(a.Dim), c.quantity(b.Dim), verb)
		hint := "one of them needs another factor; help units shows how units are written"
		if join := sys.Between(a.Dim, b.Dim); join != "" {
			msg += ": they differ by " + join
			hint = c.wayFrom(x, a.Dim, b.Dim, join)
		}
		return &syntax.Error{Marks: []syntax.Span{x.Span(), y.Span()}, Msg: msg, Hint: hint, Cause: &units.DimensionError{Op: verb, Have: a.Dim, Rhs: b.Dim}}
	}
	if a.Plane != b.Plane && a.Plane != "" && b.Plane != "" {
		e := c.pair(x, y, fmt.Sprintf("%s and %s do not %s: they stand at different planes", c.describe(a), c.describe(b), verb),
			fmt.Sprintf("carry(%s, CHAIN, %s) takes the second to the plane of the first", c.text(y.Span()), a.Plane))
		e.Cause = planesDiffer(verb, a.Plane, b.Plane)
		return e
	}
	return nil
}

// wayFrom shows by which factor one side would become the other.
func (c *Checker) wayFrom(x syntax.Expr, have, want units.Dimension, join string) string {
	if have.IsNumber() || want.IsNumber() {
		return "a pure number stands beside pure numbers only: write its unit behind it, or divide the other side by a reference value"
	}
	name, article := c.plainName(want), "a"
	if strings.ContainsAny(name[:1], "aeiou") {
		article = "an"
	}
	if ratio, err := want.Div(have); err == nil && ratio.HasCounted() && !strings.HasPrefix(join, "1/") {
		return c.word(x, have) + " times a value in " + join + " is " + article + " " + name
	}
	step := " * " + spaced(join)
	if below, ok := strings.CutPrefix(join, "1/"); ok {
		step = " / " + spaced(below)
	}
	return c.word(x, have) + step + " is " + article + " " + name
}

func (c *Checker) pair(x, y syntax.Expr, msg, hint string) *syntax.Error {
	return &syntax.Error{Marks: []syntax.Span{x.Span(), y.Span()}, Msg: msg, Hint: hint}
}

// word is what a quantity is called in a suggested formula: its name where it
// has one, else the trade's short word.
func (c *Checker) word(x syntax.Expr, d units.Dimension) string {
	if n, ok := x.(*syntax.Name); ok {
		return n.Name
	}
	name := c.Scope.Units().Name(d)
	switch name {
	case "fluence":
		return "dose"
	case "":
		return "the first"
	}
	return name
}

func (c *Checker) plainName(d units.Dimension) string {
	if name := c.Scope.Units().Name(d); name != "" {
		return name
	}
	return "quantity in " + c.Scope.Units().UnitText(d)
}

// spaced sets blanks around the signs of "area/time".
func spaced(join string) string {
	var b []rune
	for _, r := range join {
		if r == '/' || r == '*' {
			b = append(b, ' ', r, ' ')
			continue
		}
		b = append(b, r)
	}
	return string(b)
}

// kelvin turns a point into its kelvin value where it multiplies, with a
// warning.
func (c *Checker) kelvin(n *Node, op string) Type {
	t := n.Type
	if t.Kind == Point {
		c.warn("a temperature point beside " + op + " counts as its value in kelvin")
		t.Kind = Number
	}
	return t
}

func (c *Checker) productOf(x *syntax.Binary, n *Node) (*Node, error) {
	a, b := c.kelvin(n.args[0], x.Op), c.kelvin(n.args[1], x.Op)
	var err error
	n.op = opMul
	if x.Op == "*" {
		n.Type.Dim, err = a.Dim.Mul(b.Dim)
		n.Type.Plane = a.Plane.times(b.Plane, 1)
	} else {
		n.op = opDiv
		n.Type.Dim, err = a.Dim.Div(b.Dim)
		n.Type.Plane = a.Plane.times(b.Plane, -1)
	}
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{x.Span()}, Msg: err.Error(), Hint: "break the formula into named parts", Cause: err}
	}
	return n, nil
}

func (c *Checker) raise(x *syntax.Binary) (*Node, error) {
	a, err := c.plain(x.X)
	if err != nil {
		return nil, err
	}
	t := c.kelvin(a, "^")
	if num, den, ok := exponent(x.Y); ok {
		return c.rationalPower(x, a, t, num, den)
	}
	b, err := c.plain(x.Y)
	if err != nil {
		return nil, err
	}
	if !b.Type.Pure() {
		return nil, syntax.Fail(x.Y.Span(), "an exponent is a pure number, not "+c.describe(b.Type), "divide it by a reference value")
	}
	if !t.Pure() {
		return nil, c.pair(x.X, x.Y, c.describe(t)+" is raised to constant rational powers only", "write the exponent as a number, such as 2 or (1/2)")
	}
	return c.made(Node{op: opPow, args: []*Node{a, b}}, x.Where), nil
}

func (c *Checker) rationalPower(x *syntax.Binary, a *Node, t Type, num, den int) (*Node, error) {
	n := c.made(Node{op: opPower, args: []*Node{a}, value: float64(num) / float64(den)}, x.Where)
	var err error
	if n.Type.Dim, err = t.Dim.Pow(num, den); err != nil {
		return nil, c.powerRefused(x.Span(), t, err)
	}
	if n.Type.Plane, err = t.Plane.power(num, den); err != nil {
		return nil, c.powerRefused(x.Span(), t, err)
	}
	return n, nil
}

// powerRefused refuses a power or root whose exponents are none.
func (c *Checker) powerRefused(at syntax.Span, t Type, err error) *syntax.Error {
	e := &syntax.Error{
		Marks: []syntax.Span{at}, Msg: c.describe(t) + " has no such power: " + err.Error(), Cause: err,
		Hint: "exponents of units and planes are multiples of 1/6 from -21 to 21",
	}
	if t.Dim.HasCounted() || t.Plane != "" {
		e.Hint = "number_of(x) drops counted things and planes on purpose"
	}
	return e
}

func (c *Checker) at(x *syntax.At) (*Node, error) {
	a, err := c.plain(x.X)
	if err != nil {
		return nil, err
	}
	p, err := c.plane(x.Plane)
	if err != nil {
		return nil, syntax.Fail(x.PlaneAt, err.Error(), c.planesHint(x.Plane))
	}
	t := a.Type
	switch {
	case t.Plane == p:
		return a, nil
	case t.Plane != "":
		return nil, &syntax.Error{
			Marks: []syntax.Span{x.X.Span(), x.PlaneAt}, Cause: planesDiffer("move", t.Plane, p),
			Msg:  fmt.Sprintf("%s stands at %s already; at %s would move it without a chain", c.text(x.X.Span()), t.Plane, p),
			Hint: fmt.Sprintf("carry(%s, CHAIN, %s) takes it there", c.text(x.X.Span()), p),
		}
	case t.Kind == Point || !mayStand(t.Dim) || len(p.exponents()) > 1 && !t.Dim.WithoutCounted().IsNumber():
		return nil, syntax.Fail(x.Span(), c.describe(t)+" does not stand at a plane", "planes are for power, energy, photon number and rate, irradiance and fluence, and ratios of planes")
	}
	t.Plane = p
	return c.retyped(a, t, x.Span()), nil
}

// retyped is a node with another type: what costs nothing is copied, the rest
// is shared.
func (c *Checker) retyped(n *Node, t Type, at syntax.Span) *Node {
	if n.op == opConst || n.op == opRef {
		same := *n
		same.Type = t
		return c.made(same, at)
	}
	return c.made(Node{op: opSame, args: []*Node{n}, Type: t}, at)
}

// isWhole says whether an exponent is an integer that multiplications serve.
func isWhole(p float64) bool { return p == math.Trunc(p) && math.Abs(p) <= 64 }

// Comparable refuses two expressions that cannot be compared.
func (c *Checker) Comparable(x, y syntax.Expr) error {
	a, err := c.plain(x)
	if err != nil {
		return err
	}
	b, err := c.plain(y)
	if err != nil {
		return err
	}
	return c.comparable(x, y, a.Type, b.Type, "compare")
}

// Holds says whether a comparison holds.
func Holds(op string, a, b float64) bool { return comparison(op)(a, b) }
