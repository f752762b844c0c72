package program

// A pass over the lanes costs as much as what it computes, so products of
// several factors, and a product with a term added, take one pass.

// count counts how often each node stands in the formulas.
func (b *blocks) count(n *Node) {
	n, input := b.follow(n)
	if b.parents[n]++; input != nil || b.parents[n] > 1 {
		return
	}
	for _, a := range n.args {
		b.count(a)
	}
}

// alone says whether n is a product that stands nowhere else.
func (b *blocks) alone(n *Node) (*Node, bool) {
	n, input := b.follow(n)
	return n, input == nil && n.op == opMul && b.parents[n] == 1
}

// factors lists the factors of a product from the left, as it is written.
func (b *blocks) factors(n *Node) []*lane {
	left := []*lane(nil)
	if x, alone := b.alone(n.args[0]); alone {
		left = b.factors(x)
	} else {
		left = append(left, b.emit(n.args[0]))
	}
	return append(left, b.emit(n.args[1]))
}

// sum is x + y, where one may be a product of two that stands nowhere else.
func (b *blocks) sum(to *lane, n *Node) func(int) bool {
	for i := range 2 {
		if x, alone := b.alone(n.args[i]); alone {
			if f := b.factors(x); len(f) == 2 {
				return multiplyAdd(to, f[0], f[1], b.emit(n.args[1-i]))
			}
		}
	}
	return add(to, b.emit(n.args[0]), b.emit(n.args[1]))
}

func multiplyAdd(to, x, y, z *lane) func(int) bool {
	return func(n int) bool {
		a, b, c, out := x.rows(n), y.rows(n), z.rows(n), to.row[:n]
		for i, v := range a {
			out[i] = float64(v*b[i]) + c[i]
		}
		return true
	}
}

// multiplyAll multiplies from the left, three factors a pass.
func multiplyAll(to *lane, list []*lane) func(int) bool {
	if len(list) == 2 {
		return multiply(to, list[0], list[1])
	}
	return func(n int) bool {
		out := to.row[:n]
		a, rest := list[0].rows(n), list[1:]
		for ; len(rest) > 1; a, rest = out, rest[2:] {
			b, c := rest[0].rows(n), rest[1].rows(n)
			for i, v := range a {
				out[i] = v * b[i] * c[i]
			}
		}
		if len(rest) == 1 {
			b := rest[0].rows(n)
			for i, v := range a {
				out[i] = v * b[i]
			}
		}
		return true
	}
}
