package program

import "math"

// loop makes the loop of one operation over all lanes. It returns false when a
// lane has no value; single runs then find out which and why.
func loop(n *Node, to *lane, args []*lane) func(int) bool {
	switch n.op {
	case opNeg:
		return each(to, args[0], func(x float64) float64 { return -x })
	case opSub:
		return subtract(to, args[0], args[1])
	case opDiv:
		return divideLanes(to, args[0], args[1])
	case opPower:
		return raise(to, args[0], n.value)
	case opPow:
		return pairs(to, args[0], args[1], math.Pow)
	}
	return callLanes(n.fn, to, args)
}

// rows fills a row with a constant, so that the rarer forms need one loop.
func (l *lane) rows(n int) []float64 {
	if l.fixed && l.row == nil {
		l.row = make([]float64, Lanes)
		for i := range l.row {
			l.row[i] = l.value
		}
	}
	return l.row[:n]
}

func each(to, x *lane, f func(float64) float64) func(int) bool {
	return func(n int) bool {
		a, out := x.rows(n), to.row[:n]
		for i, v := range a {
			out[i] = f(v)
		}
		return true
	}
}

func pairs(to, x, y *lane, f func(a, b float64) float64) func(int) bool {
	return func(n int) bool {
		a, b, out := x.rows(n), y.rows(n), to.row[:n]
		for i, v := range a {
			out[i] = f(v, b[i])
			if out[i]-out[i] != 0 || v-v != 0 || b[i]-b[i] != 0 {
				return false
			}
		}
		return true
	}
}

func add(to, x, y *lane) func(int) bool {
	return func(n int) bool {
		a, b, out := x.rows(n), y.rows(n), to.row[:n]
		for i, v := range a {
			out[i] = v + b[i]
		}
		return true
	}
}

func subtract(to, x, y *lane) func(int) bool {
	return func(n int) bool {
		a, b, out := x.rows(n), y.rows(n), to.row[:n]
		for i, v := range a {
			out[i] = v - b[i]
		}
		return true
	}
}

func multiply(to, x, y *lane) func(int) bool {
	if x.fixed {
		x, y = y, x
	}
	if y.fixed {
		k := y.value
		return func(n int) bool {
			a, out := x.rows(n), to.row[:n]
			for i, v := range a {
				out[i] = v * k
			}
			return true
		}
	}
	return func(n int) bool {
		a, b, out := x.rows(n), y.rows(n), to.row[:n]
		for i, v := range a {
			out[i] = v * b[i]
		}
		return true
	}
}

// divideLanes refuses zero, and an overflow that would vanish in a quotient.
func divideLanes(to, x, y *lane) func(int) bool {
	return func(n int) bool {
		a, b, out := x.rows(n), y.rows(n), to.row[:n]
		bad := false
		for i, v := range b {
			bad = bad || v == 0 || v-v != 0
			out[i] = a[i] / v
		}
		return !bad
	}
}

// raise multiplies whole powers out.
func raise(to, x *lane, p float64) func(int) bool {
	if isWhole(p) && p > 0 {
		k := int(p)
		return func(n int) bool {
			a, out := x.rows(n), to.row[:n]
			for i, v := range a {
				y, m := 1.0, k
				for m > 1 {
					if m&1 == 1 {
						y *= v
					}
					v *= v
					m >>= 1
				}
				out[i] = y * v
			}
			return true
		}
	}
	if isWhole(p) && p < 0 {
		k := int(-p)
		return func(n int) bool {
			a, out := x.rows(n), to.row[:n]
			for i, v := range a {
				y := powInt(v, k)
				if y == 0 || y-y != 0 {
					return false
				}
				out[i] = 1 / y
			}
			return true
		}
	}
	power := realPower
	if p == 0.5 {
		power = func(x, _ float64) float64 { return math.Sqrt(x) }
	}
	return func(n int) bool {
		a, out := x.rows(n), to.row[:n]
		for i, v := range a {
			if v == 0 && p < 0 || v-v != 0 {
				return false
			}
			if out[i] = power(v, p); out[i]-out[i] != 0 {
				return false
			}
		}
		return true
	}
}

// callLanes calls a function of the catalogue lane by lane.
func callLanes(f *Function, to *lane, args []*lane) func(int) bool {
	x := make([]float64, len(args))
	var many func(first, others, out []float64) error
	if f.Spectral != nil {
		many = f.Spectral()
	}
	return func(n int) bool {
		if many != nil && uniform(args[1:], x[1:], n) {
			out := to.row[:n]
			return many(args[0].rows(n), x[1:], out) == nil && allFinite(out)
		}
		for i := range n {
			for k, a := range args {
				if a.fixed {
					x[k] = a.value
				} else if x[k] = a.row[i]; x[k]-x[k] != 0 {
					return false
				}
			}
			y, _, err := f.Call(x)
			if err != nil || y-y != 0 {
				return false
			}
			to.row[i] = y
		}
		return true
	}
}

// uniform says whether each lane holds one number, and copies those.
func uniform(lanes []*lane, to []float64, n int) bool {
	for k, l := range lanes {
		if l.fixed {
			to[k] = l.value
			continue
		}
		to[k] = l.row[0]
		for _, v := range l.row[1:n] {
			if v != to[k] {
				return false
			}
		}
		if to[k]-to[k] != 0 {
			return false
		}
	}
	return true
}

func allFinite(row []float64) bool {
	for _, v := range row {
		if v-v != 0 {
			return false
		}
	}
	return true
}
