package program

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"gonum.org/v1/gonum/stat/distuv"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Shape is the distribution of an uncertain input.
type Shape int

// The shapes after JCGM 101:2008, 6.4: normal, a scaled t where degrees of
// freedom are stated; rectangular and triangular between two limits.
const (
	Normal Shape = iota
	Rectangular
	Triangular
)

// Spread is what is known of an uncertain input beside its value.
type Spread struct {
	U         float64 // standard uncertainty, in SI units
	DoF       float64 // degrees of freedom, 0 for infinitely many
	Shape     Shape
	Low, High float64 // limits of the rectangle and the triangle
}

// source makes the node of an uncertain input: one source of error, however
// often the name that owns it is used.
func (c *Checker) source(v float64, t Type, s Spread, at syntax.Span) *Node {
	return c.made(Node{op: opSource, value: v, spread: &s, Type: t}, at)
}

// Source returns the uncertain input that a formula is, with a plane, another
// type or a minus (sign −1) at most; ok is false for all else.
func Source(n *Node) (input *Node, sign float64, ok bool) {
	for sign = 1; n.op == opSame || n.op == opNeg; n = n.args[0] {
		if n.op == opNeg {
			sign = -sign
		}
	}
	return n, sign, n.op == opSource
}

// Spread returns what is known of an uncertain input; nil for other nodes.
func (n *Node) Spread() *Spread { return n.spread }

// Value is the value of a constant or an uncertain input.
func (n *Node) Value() float64 { return n.value }

// Uncertain says whether an uncertain input stands in a formula itself or in a
// name that it rests on, which unsure tells.
func Uncertain(n *Node, unsure func(name string) bool) bool {
	found := false
	n.each(map[*Node]bool{}, func(n *Node) {
		found = found || n.op == opSource || n.op == opRef && unsure(n.name)
	})
	return found
}

// spread reads what stands behind ± of a literal of value v.
func (c *Checker) spread(x *syntax.Literal, unit units.Unit, v float64, concise string) (Spread, error) {
	var s Spread
	var err error
	switch at := x.Spread; {
	case at != nil && at.Number == "" && concise == "":
		number := strings.TrimSpace(x.Number + " " + x.Unit)
		return s, syntax.Fail(x.Where, "no uncertainty stands here of which this could be said", fmt.Sprintf("write it behind ±: %s ± 2 %% (%s=%s)", number, at.Says[0].Name, at.Says[0].Number))
	case at == nil || at.Number == "":
		s.U, err = unit.ReadDifference(concise)
	case concise != "":
		return s, syntax.Fail(at.Where, "the uncertainty stands twice", "write 13.50(2) nm or 13.50 nm ± 0.02 nm")
	case at.Inner || at.Unit == x.Unit && !ratioUnit(unit):
		s.U, err = unit.ReadDifference(at.Number)
	default:
		s.U, err = c.spreadWithUnit(x, unit, v)
	}
	if err != nil {
		if _, ok := err.(*syntax.Error); ok {
			return s, err
		}
		return s, syntax.Fail(x.Where, "this uncertainty: "+err.Error(), "choose a unit that brings the number closer to one")
	}
	if x.Spread != nil {
		err = c.says(x.Spread, &s)
	}
	return s, err
}

func ratioUnit(u units.Unit) bool { return !u.IsOne() && u.Dimension().IsNumber() && u.SI(1) < 0.5 }

// spreadWithUnit reads ± 2 % of the value, or ± 0.6 mJ/cm^2 in a unit of its
// own.
func (c *Checker) spreadWithUnit(x *syntax.Literal, unit units.Unit, v float64) (float64, error) {
	at := x.Spread
	if at.Unit == "" {
		return 0, syntax.Fail(at.Where, "the uncertainty has no unit", fmt.Sprintf("write %s %s ± %s %s, or (%s ± %s) %s", x.Number, x.Unit, at.Number, x.Unit, x.Number, at.Number, x.Unit))
	}
	own, err := c.unit(at.Unit, at.UnitAt)
	if err != nil {
		return 0, err
	}
	u, err := own.ReadDifference(at.Number)
	switch {
	case err != nil:
		return 0, err
	case ratioUnit(own) && ratioUnit(unit):
		return 0, syntax.Fail(x.Where, fmt.Sprintf("± %s %s can be meant of the value or in points of %s", at.Number, at.Unit, x.Unit),
			fmt.Sprintf("write (%s ± %s) %s for points, or %s ± %s %s for a part of the value",
				x.Number, strconv.FormatFloat(unit.FromDifference(u), 'g', -1, 64), x.Unit, strconv.FormatFloat(v, 'g', -1, 64), at.Number, at.Unit))
	case ratioUnit(own) && unit.Point():
		return 0, syntax.Fail(at.Where, "a percentage of a temperature point has no meaning", "write the uncertainty in K: "+x.Number+" "+x.Unit+" ± 0.5 K")
	case ratioUnit(own):
		return u * math.Abs(v), nil
	case own.Dimension() != unit.Dimension():
		way := "write it in " + x.Unit
		if x.Unit == "" {
			way = "write it as a plain number"
		}
		e := syntax.Fail(at.Where, "the uncertainty is "+c.quantity(own.Dimension())+", the value "+c.quantity(unit.Dimension()), way+", or as a percentage of the value")
		e.Cause = &units.DimensionError{Op: "compare", Have: own.Dimension(), Rhs: unit.Dimension()}
		return 0, e
	}
	return u, nil
}

// says takes in (k=2), (p=95 %) and (nu=4).
func (c *Checker) says(at *syntax.Spread, s *Spread) error {
	k, p := 0.0, 0.0
	for _, a := range at.Says {
		v, err := c.said(a)
		if err != nil {
			return err
		}
		switch {
		case a.Name == "k" && v > 0 && k == 0:
			k = v
		case a.Name == "p" && v > 0 && v < 1 && p == 0:
			p = v
		case a.Name == "nu" && v >= leastDoF && v <= mostDoF && s.DoF == 0:
			s.DoF = v
		default:
			return syntax.Fail(a.Where, strings.TrimSpace(a.Name+" = "+a.Number+" "+a.Unit)+" says nothing here", "k is a factor above 0, p a probability such as 95 %, nu the degrees of freedom, from 0.5 to 1e9; each once")
		}
	}
	switch {
	case k > 0 && p > 0:
		return syntax.Fail(at.Where, "k and p both say how far the uncertainty is expanded", "give one of them")
	case p > 0 && s.DoF > 0:
		k = distuv.StudentsT{Mu: 0, Sigma: 1, Nu: s.DoF}.Quantile((1 + p) / 2)
	case p > 0:
		k = distuv.UnitNormal.Quantile((1 + p) / 2)
	case k == 0:
		k = 1
	}
	if s.U /= k; k-k != 0 || s.U-s.U != 0 {
		return syntax.Fail(at.Where, "the uncertainty leaves the range of floating point", "give a coverage and degrees of freedom that measurements have")
	}
	return nil
}

func (c *Checker) said(a syntax.Attribute) (float64, error) {
	u, err := c.unit(a.Unit, a.Where)
	if err == nil && !u.Dimension().IsNumber() || strings.Contains(a.Number, "(") {
		err = syntax.Fail(a.Where, a.Name+" is a pure number", "write (k=2), (p=95 %) or (nu=4)")
	}
	if err != nil {
		return 0, err
	}
	v, err := u.Read(a.Number)
	if err != nil {
		return 0, syntax.Fail(a.Where, err.Error(), "write (k=2), (p=95 %) or (nu=4)")
	}
	return v, nil
}

// Distribution makes the uncertain input of rectangular(a, b), triangular(a, b)
// or normal(m, u), whose arguments are numbers and not names.
func (c *Checker) Distribution(shape Shape, k *Call) (*Node, error) {
	a, b := k.Args[0], k.Args[1]
	if err := c.comparable(k.Exprs[0], k.Exprs[1], a.Type, b.Type, "stand side by side in "+k.Func.Name); err != nil {
		return nil, err
	}
	t := a.Type
	if t.Kind == Point && shape == Normal && b.Type.Kind != Number || t.Kind != b.Type.Kind && shape != Normal {
		return nil, c.pair(k.Exprs[0], k.Exprs[1], "a temperature point and a difference do not make this distribution", "limits are two points; a mean is a point and its uncertainty is in K")
	}
	if t.Kind != Number && t.Kind != Point {
		return nil, syntax.Fail(k.Exprs[0].Span(), c.describe(t)+" has no distribution", k.Func.Signature())
	}
	x, okX := a.Constant()
	y, okY := b.Constant()
	if !okX || !okY {
		return nil, syntax.Fail(k.Tree.Where, "the arguments of "+k.Func.Name+" are numbers with units, not names or formulas", "write "+k.Func.Example)
	}
	if shape == Normal {
		if y < 0 {
			return nil, syntax.Fail(k.Exprs[1].Span(), "a standard uncertainty is not negative", "write "+k.Func.Example)
		}
		return c.source(x, t, Spread{U: y, Shape: Normal}, k.Tree.Where), nil
	}
	if !(x < y) {
		return nil, syntax.Fail(k.Tree.Where, "the lower limit is not below the upper one", "write "+k.Func.Example)
	}
	s := Spread{Shape: shape, Low: x, High: y, U: (y - x) / math.Sqrt(12)}
	if shape == Triangular {
		s.U = (y - x) / math.Sqrt(24)
	}
	return c.source(x+(y-x)/2, t, s, k.Tree.Where), nil
}

// Between these degrees of freedom a t-distribution is more than rounding.
const (
	leastDoF = 0.5
	mostDoF  = 1e9
)
