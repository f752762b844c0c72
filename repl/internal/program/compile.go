package program

import (
	"fmt"
)

// MaxNodes bounds the size of one program.
const MaxNodes = 200_000

// Program is a compiled formula. It is never changed and may be run by many
// goroutines at once, each with a Frame of its own.
type Program struct {
	nodes   []*Node // what was asked for
	roots   []eval
	steps   []step
	size    int // places in a frame
	lazy    int // places that are computed on demand
	Inputs  []string
	Sources []*Node // uncertain inputs; their places follow those of Inputs
	resolve Resolve
}

// Opening says which inputs of a program are left open, for Run to fill.
type Opening struct {
	Inputs  []string // names, in this order
	Sources bool     // uncertain inputs, in the order in which they are met
}

// eval computes one value from a frame.
type eval func(*Frame) float64

// step computes a shared node into its place before the root runs.
type step struct {
	place int
	run   eval
}

// Resolve gives the node that stands for a name in a program.
type Resolve func(name string) (*Node, error)

// Compile makes a program of a checked formula. The named inputs are left
// open: Run takes their values in this order.
func Compile(root *Node, resolve Resolve, inputs ...string) (*Program, error) {
	return CompileAll([]*Node{root}, resolve, Opening{Inputs: inputs})
}

// CompileAll makes one program of several formulas, which share what they have
// in common.
func CompileAll(roots []*Node, resolve Resolve, open Opening) (*Program, error) {
	c := &compiler{resolve: resolve, open: open, info: make(map[*Node]*nodeInfo, few), names: make(map[string]*Node, few)}
	for i, name := range open.Inputs {
		n := &Node{op: opInput, name: name}
		c.names[name] = n
		c.info[n] = &nodeInfo{place: i, emitted: true}
	}
	for _, root := range roots {
		if err := c.count(root, false); err != nil {
			return nil, err
		}
	}
	c.size = len(open.Inputs) + len(c.sources)
	for i, n := range c.sources {
		*c.info[n] = nodeInfo{place: len(open.Inputs) + i, emitted: true}
	}
	p := &Program{nodes: roots, Inputs: open.Inputs, Sources: c.sources, resolve: resolve}
	for _, root := range roots {
		p.roots = append(p.roots, c.emit(root).eval())
	}
	p.steps, p.size, p.lazy = c.steps, c.size, c.lazy
	return p, nil
}

// nodeInfo is what the compiler knows of a node.
type nodeInfo struct {
	parents int
	always  bool // computed in every run
	place   int  // −1 before it has one
	emitted bool
	out     operand
}

// few is how many nodes most formulas have, at the least.
const few = 16

// fresh makes the record of a node, many at a time.
func (c *compiler) fresh() *nodeInfo {
	if len(c.spare) == 0 {
		c.spare = make([]nodeInfo, few/2)
	}
	i := &c.spare[0]
	c.spare = c.spare[1:]
	i.place = -1
	return i
}

type compiler struct {
	spare   []nodeInfo
	resolve Resolve
	open    Opening
	sources []*Node
	info    map[*Node]*nodeInfo
	names   map[string]*Node
	steps   []step
	size    int
	lazy    int
	nodes   int
	nested  int
	subs    []*Program
}

// of follows references to the node that has the value.
func (c *compiler) of(n *Node) (*Node, error) {
	for n.op == opRef {
		to := c.names[n.name]
		if to == nil {
			var err error
			if to, err = c.resolve(n.name); err != nil {
				return nil, err
			}
			c.names[n.name] = to
		}
		n = to
	}
	return n, nil
}

// count finds what is shared and what stands in branches alone.
func (c *compiler) count(n *Node, branch bool) error {
	n, err := c.of(n)
	if err != nil {
		return err
	}
	i := c.info[n]
	if i == nil {
		if c.nodes++; c.nodes > MaxNodes {
			return &RunError{Node: n, Err: fmt.Errorf("this formula has more than %d parts: %w", MaxNodes, ErrSize)}
		}
		i = c.fresh()
		c.info[n] = i
		if n.op == opSource && c.open.Sources {
			c.sources = append(c.sources, n)
		}
	}
	i.parents++
	if i.parents > 1 && (i.always || branch) {
		return nil
	}
	i.always = i.always || !branch
	if n.op == opSpectral {
		if err := c.collect(n.inner, map[*Node]bool{}); err != nil {
			return err
		}
	}
	for k, a := range n.args {
		if err := c.count(a, branch || n.op == opIf && k > 0); err != nil {
			return err
		}
	}
	return nil
}

// collect finds the uncertain inputs of formulas that become programs of their
// own, so that they are open in the outer one too.
func (c *compiler) collect(list []*Node, seen map[*Node]bool) error {
	for _, n := range list {
		if n.op == opRef && n.name == Running {
			continue
		}
		n, err := c.of(n)
		if err != nil {
			return err
		}
		if seen[n] {
			continue
		}
		seen[n] = true
		if n.op == opSource && c.open.Sources && c.info[n] == nil {
			c.info[n] = &nodeInfo{place: -1}
			c.sources = append(c.sources, n)
		}
		if err := c.collect(n.args, seen); err != nil {
			return err
		}
		if err := c.collect(n.inner, seen); err != nil {
			return err
		}
	}
	return nil
}

// operand is a compiled node: a constant, a place, or a closure.
type operand struct {
	run     eval
	place   int // −1 when it has none
	value   float64
	fixed   bool
	product []int   // places that the closure multiplies
	raised  *raised // power of a place that the closure is, or by which it multiplies scaled
	scaled  eval
}

func closed(run eval) operand { return operand{run: run, place: -1} }

func (o operand) eval() eval {
	switch {
	case o.fixed:
		v := o.value
		return func(*Frame) float64 { return v }
	case o.place >= 0:
		p := o.place
		return func(f *Frame) float64 { return f.v[p] }
	}
	return o.run
}

func (c *compiler) emit(n *Node) operand {
	n, err := c.of(n)
	if err != nil {
		return closed(fails(n, err))
	}
	i := c.info[n]
	if i.emitted {
		if i.place >= 0 {
			return operand{place: i.place}
		}
		return i.out
	}
	o := c.closure(n)
	i.emitted = true
	if o.fixed || o.place >= 0 || i.parents < 2 {
		i.out = o
		return o
	}
	place := c.place(1)
	if i.always {
		c.steps = append(c.steps, step{place, o.run})
		i.place = place
		return operand{place: place}
	}
	i.out = closed(onDemand(o.run, place, c.lazy))
	c.lazy++
	return i.out
}

func (c *compiler) place(n int) int {
	c.size += n
	return c.size - n
}

// onDemand computes a shared node the first time a run needs it.
func onDemand(run eval, place, lazy int) eval {
	return func(f *Frame) float64 {
		if f.done[lazy] != f.run {
			f.v[place] = run(f)
			f.done[lazy] = f.run
		}
		return f.v[place]
	}
}

func fails(n *Node, err error) eval {
	return func(f *Frame) float64 { return f.fail(n, err) }
}
