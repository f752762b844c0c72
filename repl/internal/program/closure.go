package program

import (
	"fmt"
)

// closure compiles one node; its operands first.
func (c *compiler) closure(n *Node) operand {
	switch n.op {
	case opConst, opSource:
		return operand{fixed: true, value: n.value, place: -1}
	case opSame:
		return c.emit(n.args[0])
	case opNeg:
		a := c.emit(n.args[0]).eval()
		return closed(func(f *Frame) float64 { return -a(f) })
	case opAdd, opSub, opMul, opDiv:
		return c.binary(n)
	case opPower:
		return c.power(n)
	case opPow:
		return closed(c.pow(n))
	case opIf:
		return closed(c.branch(n))
	case opCall:
		return closed(c.callOf(n))
	case opSpectral:
		return closed(c.spectral(n))
	}
	return closed(fails(n, fmt.Errorf("this is no single value")))
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
