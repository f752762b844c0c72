package program

import "slices"

// binary compiles + − * /. A call is most of what such a node costs, so the
// forms on places and constants, and products of places, are one call each.
func (c *compiler) binary(n *Node) operand {
	x, y := c.emit(n.args[0]), c.emit(n.args[1])
	if (n.op == opAdd || n.op == opMul) && y.run != nil && x.run == nil {
		x, y = y, x
	}
	switch {
	case n.op == opDiv:
		return closed(divide(n, x.eval(), y.eval()))
	case n.op == opMul && x.place >= 0 && y.place >= 0:
		return product([]int{x.place, y.place})
	case n.op == opMul && x.product != nil && y.place >= 0:
		return product(append(slices.Clip(x.product), y.place))
	case n.op == opMul && y.raised != nil && y.scaled == nil:
		return scaled(x.eval(), *y.raised)
	case n.op == opMul && x.scaled != nil && y.place >= 0:
		a, r, k := x.scaled, *x.raised, y.place
		return closed(func(f *Frame) float64 { return a(f) * powInt(f.v[r.place], r.power) * f.v[k] })
	case n.op == opAdd && len(x.product) == 2 && y.place >= 0:
		i, j, k := x.product[0], x.product[1], y.place
		return closed(func(f *Frame) float64 { return float64(f.v[i]*f.v[j]) + f.v[k] })
	case x.place >= 0 && y.place >= 0:
		return closed(onPlaces(n.op, x.place, y.place))
	case y.place >= 0:
		return closed(onPlace(n.op, x.eval(), y.place))
	case y.fixed:
		return closed(onConstant(n.op, x.eval(), y.value))
	}
	return closed(onBoth(n.op, x.eval(), y.eval()))
}

// product multiplies places from the left, as the formula is written.
func product(places []int) operand {
	o := operand{place: -1, product: places}
	switch i, j := places[0], places[1]; len(places) {
	case 2:
		o.run = func(f *Frame) float64 { return f.v[i] * f.v[j] }
	case 3:
		k := places[2]
		o.run = func(f *Frame) float64 { return f.v[i] * f.v[j] * f.v[k] }
	default:
		o.run = func(f *Frame) float64 {
			x := f.v[i] * f.v[j]
			for _, k := range places[2:] {
				x *= f.v[k]
			}
			return x
		}
	}
	return o
}

// raised is a place to a whole power greater than 0.
type raised struct{ place, power int }

// scaled multiplies by a power of a place, which a further factor may join.
func scaled(a eval, r raised) operand {
	return operand{place: -1, scaled: a, raised: &r, run: func(f *Frame) float64 { return a(f) * powInt(f.v[r.place], r.power) }}
}

func onPlaces(o op, i, j int) eval {
	if o == opAdd {
		return func(f *Frame) float64 { return f.v[i] + f.v[j] }
	}
	return func(f *Frame) float64 { return f.v[i] - f.v[j] }
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

func onBoth(o op, a, b eval) eval {
	switch o {
	case opAdd:
		return func(f *Frame) float64 { return a(f) + b(f) }
	case opSub:
		return func(f *Frame) float64 { return a(f) - b(f) }
	}
	return func(f *Frame) float64 { return a(f) * b(f) }
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
