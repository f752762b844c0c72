package program

import "math"

// power compiles a constant exponent: whole ones by multiplication.
func (c *compiler) power(n *Node) operand {
	x, p := c.emit(n.args[0]), n.value
	if x.place >= 0 && isWhole(p) && p > 0 {
		r := raised{x.place, int(p)}
		return operand{place: -1, raised: &r, run: func(f *Frame) float64 { return powInt(f.v[r.place], r.power) }}
	}
	return closed(powerOf(n, x.eval(), p))
}

func powerOf(n *Node, a eval, p float64) eval {
	switch {
	case p == 2:
		return func(f *Frame) float64 { x := a(f); return x * x }
	case p == 0.5:
		return func(f *Frame) float64 { return f.checked(n, math.Sqrt(a(f))) }
	case isWhole(p) && p > 0:
		k := int(p)
		return func(f *Frame) float64 { return powInt(a(f), k) }
	case isWhole(p):
		return wholeBelow(n, a, p)
	}
	return func(f *Frame) float64 { return f.raised(n, a(f), p, realPower) }
}

// wholeBelow is one over a power by multiplication, unless that leaves the
// range.
func wholeBelow(n *Node, a eval, p float64) eval {
	k := int(-p)
	return func(f *Frame) float64 {
		x := a(f)
		if y := powInt(x, k); y != 0 && y-y == 0 && x-x == 0 {
			return 1 / y
		}
		return f.raised(n, x, p, realPower)
	}
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

// powInt raises to a whole power of 0 or more by multiplications.
func powInt(x float64, n int) float64 {
	y := 1.0
	if n&1 != 0 {
		y = x
	}
	for n >>= 1; n > 0; n >>= 1 {
		x *= x
		if n&1 != 0 {
			y *= x
		}
	}
	return y
}

func (c *compiler) pow(n *Node) eval {
	a, b := c.emit(n.args[0]).eval(), c.emit(n.args[1]).eval()
	return func(f *Frame) float64 { return f.raised(n, a(f), b(f), math.Pow) }
}
