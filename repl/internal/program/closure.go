package program

import (
	"fmt"
	"math"
)

// closure compiles one node; its operands first.
func (c *compiler) closure(n *Node) operand {
	switch n.op {
	case opConst:
		return operand{fixed: true, value: n.value, place: -1}
	case opSame:
		return c.emit(n.args[0])
	case opNeg:
		a := c.emit(n.args[0]).eval()
		return operand{run: func(f *Frame) float64 { return -a(f) }, place: -1}
	case opAdd, opSub, opMul, opDiv:
		return operand{run: c.binary(n), place: -1}
	case opPower:
		return operand{run: c.power(n), place: -1}
	case opPow:
		return operand{run: c.pow(n), place: -1}
	case opIf:
		return operand{run: c.branch(n), place: -1}
	case opCall:
		return operand{run: c.callOf(n), place: -1}
	}
	return operand{run: fails(n, fmt.Errorf("this is no single value")), place: -1}
}

// binary compiles + − * /. The forms whose right side is a place or a constant
// save a call, which is most of what such a node costs.
func (c *compiler) binary(n *Node) eval {
	x, y := c.emit(n.args[0]), c.emit(n.args[1])
	if (n.op == opAdd || n.op == opMul) && y.run != nil && x.run == nil {
		x, y = y, x
	}
	if n.op == opDiv {
		return divide(n, x.eval(), y.eval())
	}
	if x.place >= 0 && y.place >= 0 {
		return onPlaces(n.op, x.place, y.place)
	}
	a := x.eval()
	switch {
	case y.place >= 0:
		return onPlace(n.op, a, y.place)
	case y.fixed:
		return onConstant(n.op, a, y.value)
	}
	b := y.eval()
	switch n.op {
	case opAdd:
		return func(f *Frame) float64 { return a(f) + b(f) }
	case opSub:
		return func(f *Frame) float64 { return a(f) - b(f) }
	}
	return func(f *Frame) float64 { return a(f) * b(f) }
}

func onPlaces(o op, i, j int) eval {
	switch o {
	case opAdd:
		return func(f *Frame) float64 { return f.v[i] + f.v[j] }
	case opSub:
		return func(f *Frame) float64 { return f.v[i] - f.v[j] }
	}
	return func(f *Frame) float64 { return f.v[i] * f.v[j] }
}

func onPlace(o op, a eval, j int) eval {
	switch o {
	case opAdd:
		return func(f *Frame) float64 { return a(f) + f.v[j] }
	case opSub:
		return func(f *Frame) float64 { return a(f) - f.v[j] }
	}
	return func(f *Frame) float64 { return a(f) * f.v[j] }
}

func onConstant(o op, a eval, k float64) eval {
	switch o {
	case opAdd:
		return func(f *Frame) float64 { return a(f) + k }
	case opSub:
		return func(f *Frame) float64 { return a(f) - k }
	}
	return func(f *Frame) float64 { return a(f) * k }
}

func divide(n *Node, a, b eval) eval {
	return func(f *Frame) float64 {
		x, y := a(f), b(f)
		if y == 0 {
			return f.fail(n, ErrDivision)
		}
		if y-y != 0 { // an overflow must not vanish in a quotient
			return f.fail(n, ErrNotFinite)
		}
		return x / y
	}
}

// power compiles a constant exponent: whole ones by multiplication.
func (c *compiler) power(n *Node) eval {
	a, p := c.emit(n.args[0]).eval(), n.value
	switch {
	case p == 2:
		return func(f *Frame) float64 { x := a(f); return x * x }
	case p == 0.5:
		return func(f *Frame) float64 { return f.checked(n, math.Sqrt(a(f))) }
	case isWhole(p) && p > 0:
		k := int(p)
		return func(f *Frame) float64 { return powInt(a(f), k) }
	case isWhole(p):
		k := int(-p)
		return func(f *Frame) float64 {
			x := a(f)
			if y := powInt(x, k); y != 0 && y-y == 0 {
				return 1 / y
			}
			return f.raised(n, x, p, realPower)
		}
	}
	return func(f *Frame) float64 { return f.raised(n, a(f), p, realPower) }
}

// raised raises x to the power p and refuses what must not vanish in it.
func (f *Frame) raised(n *Node, x, p float64, power func(x, p float64) float64) float64 {
	switch {
	case x-x != 0 || p-p != 0:
		return f.fail(n, ErrNotFinite)
	case x == 0 && p < 0:
		return f.fail(n, ErrDivision)
	}
	return f.checked(n, power(x, p))
}

// realPower raises to a constant; the cube root of a negative number is real.
func realPower(x, p float64) float64 {
	if x < 0 && math.Abs(3*p-math.Round(3*p)) < 1e-15 && p != math.Trunc(p) {
		k := math.Round(3 * p)
		return math.Pow(math.Cbrt(x), k)
	}
	return math.Pow(x, p)
}

func powInt(x float64, n int) float64 {
	y := 1.0
	for n > 0 {
		if n&1 == 1 {
			y *= x
		}
		x *= x
		n >>= 1
	}
	return y
}

func (c *compiler) pow(n *Node) eval {
	a, b := c.emit(n.args[0]).eval(), c.emit(n.args[1]).eval()
	return func(f *Frame) float64 { return f.raised(n, a(f), b(f), math.Pow) }
}

// checked refuses what is no finite number at the node that made it.
func (f *Frame) checked(n *Node, x float64) float64 {
	if x-x != 0 {
		return f.fail(n, ErrNotFinite)
	}
	return x
}

func (c *compiler) branch(n *Node) eval {
	cond, a, b := n.args[0], c.emit(n.args[1]).eval(), c.emit(n.args[2]).eval()
	x, y := c.emit(cond.args[0]).eval(), c.emit(cond.args[1]).eval()
	holds := comparison(cond.cmp)
	return func(f *Frame) float64 {
		u, v := x(f), y(f)
		if u-u != 0 || v-v != 0 {
			return f.fail(cond, ErrNotFinite)
		}
		if holds(u, v) {
			return a(f)
		}
		return b(f)
	}
}

func comparison(op string) func(a, b float64) bool {
	switch op {
	case "<":
		return func(a, b float64) bool { return a < b }
	case "<=":
		return func(a, b float64) bool { return a <= b }
	case ">":
		return func(a, b float64) bool { return a > b }
	}
	return func(a, b float64) bool { return a >= b }
}

// callOf compiles a call of the catalogue; lists are laid out as arguments.
func (c *compiler) callOf(n *Node) eval {
	var args []eval
	var open []bool // a limit that is not there is +Inf; nothing else may be
	for _, a := range n.args {
		items := c.items(a)
		args = append(args, items...)
		for range items {
			open = append(open, a.op == opConst)
		}
	}
	base, end := c.place(len(args)), c.size
	fn := n.fn
	return func(f *Frame) float64 {
		for i, a := range args {
			x := a(f)
			if x-x != 0 && !open[i] {
				return f.fail(n, ErrNotFinite)
			}
			f.v[base+i] = x
		}
		x, warnings, err := fn.Call(f.v[base:end:end])
		if err != nil {
			return f.fail(n, err)
		}
		if len(warnings) > 0 {
			f.warn(warnings)
		}
		return f.checked(n, x)
	}
}

func (f *Frame) warn(warnings []string) {
	for _, w := range warnings {
		known := len(f.Warnings) > 20
		for _, k := range f.Warnings {
			known = known || k == w
		}
		if !known {
			f.Warnings = append(f.Warnings, w)
		}
	}
}

// items returns the evaluations of a list's items, or of the value itself.
func (c *compiler) items(n *Node) []eval {
	to, err := c.of(n)
	if err != nil || to.op != opList {
		return []eval{c.emit(n).eval()}
	}
	var all []eval
	for _, item := range to.args {
		all = append(all, c.emit(item).eval())
	}
	return all
}
