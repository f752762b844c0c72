package program

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Call is a call whose arguments are matched with their parameters.
type Call struct {
	Tree  *syntax.Call
	Func  *Function
	Args  []*Node       // one a parameter; nil for words and planes
	Words []string      // the word or plane of each parameter, "" for others
	Exprs []syntax.Expr // what was written; nil where the default stands
}

func (c *Checker) call(x *syntax.Call) (*Node, error) {
	if x.Func == "if" {
		return c.branch(x)
	}
	if own := c.Scope.Own(x.Func); own != nil {
		return c.own(x, own)
	}
	f := c.Scope.Function(x.Func)
	if f == nil {
		return nil, c.unknownFunction(x)
	}
	k := &Call{Tree: x, Func: f}
	if f.Variadic() {
		return c.variadic(k)
	}
	if err := c.match(k); err != nil {
		return nil, err
	}
	if f.Build != nil {
		return f.Build(c, k)
	}
	return c.apply(k)
}

func (c *Checker) unknownFunction(x *syntax.Call) error {
	e := syntax.Fail(x.FuncAt, x.Func+" is no function that is known here", "help functions lists them")
	e.Cause = ErrUnknown
	if c.Scope.Node(x.Func) != nil || c.locals[x.Func] != nil {
		e.Msg = x.Func + " is a value, not a function"
		e.Hint = "a product is written with a sign: " + x.Func + " * (…)"
	} else if near := c.Scope.Near(x.Func); len(near) > 0 {
		e.Hint = "did you mean " + strings.Join(near, " or ") + "?"
	}
	return e
}

// branch checks if(cond, a, b).
func (c *Checker) branch(x *syntax.Call) (*Node, error) {
	if len(x.Args) != 3 || x.Args[0].Label+x.Args[1].Label+x.Args[2].Label != "" {
		return nil, syntax.Fail(x.Where, "if takes a condition and two values", "write if(a < b, x, y)")
	}
	cond, err := c.check(x.Args[0].X)
	if err != nil {
		return nil, err
	}
	if cond.Type.Kind != condition {
		return nil, syntax.Fail(x.Args[0].X.Span(), "the first argument of if is a condition", "write if(a < b, x, y)")
	}
	a, err := c.plain(x.Args[1].X)
	if err != nil {
		return nil, err
	}
	b, err := c.plain(x.Args[2].X)
	if err != nil {
		return nil, err
	}
	if err := c.comparable(x.Args[1].X, x.Args[2].X, a.Type, b.Type, "stand side by side in if"); err != nil {
		return nil, err
	}
	if a.Type != b.Type {
		return nil, c.pair(x.Args[1].X, x.Args[2].X, "both values of if are of one kind: "+c.describe(a.Type)+" and "+c.describe(b.Type)+" are not", "state both the same way")
	}
	return c.made(Node{op: opIf, args: []*Node{cond, a, b}, Type: a.Type}, x.Where), nil
}

// match fills the parameters from positional, then named arguments, then
// defaults.
func (c *Checker) match(k *Call) error {
	f := k.Func
	k.Args, k.Words = make([]*Node, len(f.Params)), make([]string, len(f.Params))
	k.Exprs = make([]syntax.Expr, len(f.Params))
	for i, a := range k.Tree.Args {
		at := i
		if a.Label != "" {
			at = slices.IndexFunc(f.Params, func(p Param) bool { return p.Name == a.Label })
			if at < 0 {
				return syntax.Fail(a.LabelAt, f.Name+" has no argument "+a.Label, "it takes "+f.Signature())
			}
		} else if i > 0 && k.Tree.Args[i-1].Label != "" {
			return syntax.Fail(a.X.Span(), "an argument without a name stands behind one with", "give this one its name too: "+f.Signature())
		}
		if at >= len(f.Params) {
			return syntax.Fail(a.X.Span(), fmt.Sprintf("%s takes %s", f.Name, named(len(f.Params), "argument")), f.Signature())
		}
		if k.Exprs[at] != nil {
			return syntax.Fail(a.X.Span(), f.Name+" has its argument "+f.Params[at].Name+" twice", "leave one of them out")
		}
		k.Exprs[at] = a.X
		if err := c.argument(k, at, a.X); err != nil {
			return err
		}
	}
	for i, p := range f.Params {
		if k.Exprs[i] != nil {
			continue
		}
		if p.Default == "" {
			hint := f.Signature()
			if len(p.Words) > 0 || p.Doc != "" {
				hint = p.Name + ": " + p.Doc
			}
			return syntax.Fail(k.Tree.Where, f.Name+" needs its argument "+p.Name, hint)
		}
		if err := c.fallback(k, i, p); err != nil {
			return err
		}
	}
	return nil
}

// none is the word for a limit that is not there.
const none = "none"

// fallback fills a parameter with its default, read as the language reads it.
func (c *Checker) fallback(k *Call, i int, p Param) error {
	if slices.Contains(p.Words, p.Default) {
		k.Words[i] = p.Default
		return nil
	}
	if p.Default == none {
		k.Args[i] = c.constant(math.Inf(1), Type{Dim: p.Dim}, k.Tree.Where)
		return nil
	}
	s, bad := syntax.Parse(p.Default)
	if bad != nil {
		return bad
	}
	show, ok := s.Do.(*syntax.Show)
	if !ok {
		return syntax.Fail(k.Tree.Where, "the default of "+p.Name+" has no value", "give "+p.Name)
	}
	here := c.place(k.Tree.Where)
	inner := &Checker{Scope: c.Scope, Source: p.Default, Owner: c.Owner, anchor: &here, size: c.size}
	n, err := inner.check(show.X)
	if err != nil {
		return inside(k.Func.Name, k.Tree.Where, err)
	}
	k.Args[i] = n
	return nil
}

func (c *Checker) argument(k *Call, i int, x syntax.Expr) error {
	p := k.Func.Params[i]
	if len(p.Words) > 0 {
		if name, ok := x.(*syntax.Name); ok && slices.Contains(p.Words, name.Name) {
			k.Words[i] = name.Name
			return nil
		}
		return syntax.Fail(x.Span(), p.Name+" is one of the words "+strings.Join(p.Words, ", "), k.Func.Signature())
	}
	if p.IsPlane {
		return c.planeArgument(k, i, x)
	}
	if p.IsWord {
		name, ok := x.(*syntax.Name)
		if !ok {
			return syntax.Fail(x.Span(), p.Name+" is one word, such as H2", k.Func.Signature())
		}
		k.Words[i] = name.Name
		return nil
	}
	if p.Either {
		if name, ok := x.(*syntax.Name); ok && c.knownPlane(Plane(name.Name)) {
			return c.planeArgument(k, i, x)
		}
	}
	if p.Kind == EitherKind {
		if name, ok := x.(*syntax.Name); ok {
			if n := c.Scope.Node(name.Name); n != nil && n.Type.Kind == ChainKind {
				c.use(name.Name)
				k.Args[i] = n
				return nil
			}
		}
		p.Kind = BodyKind
	}
	if p.Kind == BodyKind {
		var err error
		k.Args[i], err = c.body(p, x)
		return err
	}
	if name, ok := x.(*syntax.Name); ok && name.Name == none && p.Default == none {
		return c.fallback(k, i, p)
	}
	n, err := c.check(x)
	if err != nil {
		return err
	}
	k.Args[i] = n
	return c.fits(k.Func, p, n, x)
}

func (c *Checker) planeArgument(k *Call, i int, x syntax.Expr) error {
	name, ok := x.(*syntax.Name)
	if !ok || !c.knownPlane(Plane(name.Name)) {
		return syntax.Fail(x.Span(), c.text(x.Span())+" is no plane that is known here", c.planesHint(c.text(x.Span())))
	}
	k.Words[i] = name.Name
	return nil
}

// fits checks an argument against its parameter.
func (c *Checker) fits(f *Function, p Param, n *Node, x syntax.Expr) error {
	t := n.Type
	if f.Rule != nil && ((t.Kind == Number || t.Kind == Point) && p.Kind == Number || t.Kind == List && p.Kind == List) {
		return nil // the rule looks at the dimension
	}
	switch {
	case p.Kind == ChainKind && t.Kind != ChainKind:
		return syntax.Fail(x.Span(), c.text(x.Span())+" is no chain", "a chain is defined by the lines chain NAME … end; see: help chain")
	case p.Kind == ChainKind, p.Kind == List && t.Kind == List && (p.Any || t.Dim == p.Dim):
		return nil
	case p.Kind == List && t.Kind != List:
		return syntax.Fail(x.Span(), p.Name+" of "+f.Name+" is a list, not "+c.describe(t), "a list is written {1, 2, 3}")
	case t.Kind == List || t.Kind == Text || t.Kind == ChainKind || t.Kind == condition:
		return syntax.Fail(x.Span(), p.Name+" of "+f.Name+" is "+c.quantity(p.Dim)+", not "+c.describe(t), f.Signature())
	}
	if p.Any {
		return nil // the builder looks at the dimension itself
	}
	if t.Dim != p.Dim {
		hint := c.hertzHint(x)
		if hint == "" {
			hint = "give it in " + c.Scope.Units().UnitText(p.Dim)
			if p.Dim.IsNumber() {
				hint = f.Signature()
			}
		}
		msg := p.Name + " of " + f.Name + " is " + c.quantity(p.Dim) + ", not " + c.quantity(t.Dim)
		if join := c.Scope.Units().Between(t.Dim, p.Dim); join != "" {
			msg += ": they differ by " + join
		}
		return &syntax.Error{Marks: []syntax.Span{x.Span()}, Msg: msg, Hint: hint, Cause: &units.DimensionError{Op: "take", Have: t.Dim, Rhs: p.Dim}}
	}
	if p.Kind == Number && t.Kind == Point {
		return syntax.Fail(x.Span(), p.Name+" of "+f.Name+" is a temperature difference, not a point", "write a difference in K, such as 2 K, or subtract two points")
	}
	if p.Plane != "" && t.Plane != "" && p.Plane != t.Plane {
		return &syntax.Error{
			Marks: []syntax.Span{x.Span()}, Cause: planesDiffer("take", t.Plane, p.Plane),
			Msg:  fmt.Sprintf("%s of %s stands at %s, and %s stands at %s", p.Name, f.Name, p.Plane, c.text(x.Span()), t.Plane),
			Hint: c.planeWayOn(x, p.Plane, t),
		}
	}
	return nil
}

func (c *Checker) planeWayOn(x syntax.Expr, want Plane, t Type) string {
	if t.Dim.IsNumber() && strings.Contains(string(want), "/") {
		from, to := want.ends()
		return fmt.Sprintf("transmission(CHAIN, %s, %s) is such a ratio", from, to)
	}
	return fmt.Sprintf("carry(%s, CHAIN, %s) takes it there", c.text(x.Span()), want)
}

// ends returns the planes of a ratio: WAFER/IF runs from IF to WAFER.
func (p Plane) ends() (from, to string) {
	to, from = p.sides()
	return from, to
}

// Signature writes the function with its arguments and defaults.
func (f *Function) Signature() string {
	var parts []string
	for _, p := range f.Params {
		s := p.Name
		if p.Plane != "" {
			s += " at " + string(p.Plane)
		}
		if p.Default != "" {
			s += " = " + p.Default
		}
		parts = append(parts, s)
	}
	list := strings.Join(parts, ", ")
	if f.Variadic() {
		list += ", …"
	}
	return f.Name + "(" + list + ")"
}
