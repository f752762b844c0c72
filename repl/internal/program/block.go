package program

// Lanes is how many runs a block holds at most.
const Lanes = 512

// Block returns a function that runs p on several lanes at once: in[slot][lane]
// for the inputs of Run, out[k][lane] for each formula, all rows equally long.
// It computes the lanes in order and returns how many have a value; when that is
// fewer than all, err says why the next has none. The function has buffers of
// its own: make one for each goroutine.
func (p *Program) Block() func(in, out [][]float64) (int, error) {
	b := &blocks{program: p, of: map[*Node]*lane{}, parents: map[*Node]int{}, frame: p.NewFrame()}
	b.scratch = make([]float64, len(p.Inputs)+len(p.Sources))
	b.values = make([]float64, len(p.roots))
	for i, name := range p.Inputs {
		b.inputs = append(b.inputs, &lane{slot: i})
		b.named = append(b.named, name)
	}
	for i, n := range p.Sources {
		l := &lane{slot: len(p.Inputs) + i}
		b.inputs = append(b.inputs, l)
		b.of[n] = l
	}
	for _, root := range p.nodes {
		b.count(root)
	}
	for _, root := range p.nodes {
		b.roots = append(b.roots, b.emit(root))
	}
	return b.run
}

// lane is a row of numbers, one a run, or one number for all runs.
type lane struct {
	row   []float64
	fixed bool
	value float64
	slot  int // of an input
}

// blocks holds the loops of a program, in order, each over all lanes.
type blocks struct {
	program *Program
	named   []string
	inputs  []*lane
	of      map[*Node]*lane
	parents map[*Node]int      // how often each node stands in the formulas
	loops   []func(n int) bool // false: some lane has no value
	roots   []*lane
	single  bool // something stands in the formula that runs one by one only
	frame   *Frame
	scratch []float64
	values  []float64
}

func (b *blocks) run(in, out [][]float64) (int, error) {
	n := len(out[0])
	if b.single || n > Lanes {
		return b.oneByOne(in, out)
	}
	for _, l := range b.inputs {
		l.row = in[l.slot][:n]
	}
	for _, loop := range b.loops {
		if !loop(n) {
			return b.oneByOne(in, out)
		}
	}
	for k, l := range b.roots {
		to, sum := out[k], 0.0
		if l.fixed {
			for i := range to {
				to[i] = l.value
			}
		} else {
			for i, x := range l.row[:n] {
				to[i] = x
				sum += x - x
			}
		}
		if sum != 0 {
			return b.oneByOne(in, out)
		}
	}
	return n, nil
}

// oneByOne runs the lanes as single runs, which know what is wrong with one.
func (b *blocks) oneByOne(in, out [][]float64) (int, error) {
	for i := range out[0] {
		for s := range b.scratch {
			b.scratch[s] = in[s][i]
		}
		if err := b.program.RunAll(b.frame, b.scratch, b.values); err != nil {
			return i, err
		}
		for k, v := range b.values {
			out[k][i] = v
		}
	}
	return len(out[0]), nil
}

// follow finds the node or the input behind a name.
func (b *blocks) follow(n *Node) (*Node, *lane) {
	for n.op == opRef || n.op == opSame {
		if n.op == opSame {
			n = n.args[0]
			continue
		}
		for i, name := range b.named {
			if name == n.name {
				return n, b.inputs[i]
			}
		}
		to, err := b.program.resolve(n.name)
		if err != nil {
			return n, nil
		}
		n = to
	}
	return n, nil
}

// emit makes the loops of a node, its operands first; what is shared is
// computed once.
func (b *blocks) emit(n *Node) *lane {
	n, input := b.follow(n)
	if input != nil {
		return input
	}
	if l := b.of[n]; l != nil {
		return l
	}
	l := b.loopOf(n)
	b.of[n] = l
	return l
}

func (b *blocks) loopOf(n *Node) *lane {
	to := &lane{}
	var args []*lane
	switch n.op {
	case opConst, opSource:
		return &lane{fixed: true, value: n.value}
	case opMul:
		return b.loop(to, multiplyAll(to, b.factors(n)))
	case opAdd:
		return b.loop(to, b.sum(to, n))
	case opNeg, opSub, opDiv, opPower, opPow, opCall:
		for _, a := range n.args {
			args = append(args, b.items(a)...)
		}
	default:
		b.single = true // branches are computed only where they are taken
		return &lane{fixed: true}
	}
	for _, a := range n.args {
		if a.Type.Kind == ChainKind || a.Type.Kind == BodyKind {
			b.single = true
			return &lane{fixed: true}
		}
	}
	return b.loop(to, loop(n, to, args))
}

func (b *blocks) loop(to *lane, run func(n int) bool) *lane {
	to.row = make([]float64, Lanes)
	b.loops = append(b.loops, run)
	return to
}

// items makes the loops of a list's items, or of the value itself.
func (b *blocks) items(n *Node) []*lane {
	list, input := b.follow(n)
	if input != nil || list.op != opList {
		return []*lane{b.emit(n)}
	}
	var all []*lane
	for _, item := range list.args {
		all = append(all, b.emit(item))
	}
	return all
}
