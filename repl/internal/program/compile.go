package program

import (
	"errors"
	"fmt"
	"math"

	"example.com/dosewright/repl/internal/syntax"
)

// MaxNodes bounds the size of one program.
const MaxNodes = 200_000

// Program is a compiled formula. It is never changed and may be run by many
// goroutines at once, each with a Frame of its own.
type Program struct {
	node   *Node
	root   eval
	steps  []step
	size   int // places in a frame
	lazy   int // places that are computed on demand
	Inputs []string
}

// eval computes one value from a frame.
type eval func(*Frame) float64

// step computes a shared node into its place before the root runs.
type step struct {
	place int
	run   eval
}

// Frame holds the numbers of one run.
type Frame struct {
	v        []float64
	done     []uint64 // run in which a place computed on demand was computed
	run      uint64
	err      error
	Warnings []string
}

// RunError says which node of a program has no value, and why.
type RunError struct {
	Node *Node
	Err  error
}

func (e *RunError) Error() string { return e.Err.Error() }

// Function names the function of the catalogue that failed, "" for none.
func (e *RunError) Function() string {
	if e.Node == nil || e.Node.fn == nil {
		return ""
	}
	return e.Node.fn.Name
}

func (e *RunError) Unwrap() error { return e.Err }

// Resolve gives the node that stands for a name in a program.
type Resolve func(name string) (*Node, error)

// Compile makes a program of a checked formula. The named inputs are left
// open: Run takes their values in this order.
func Compile(root *Node, resolve Resolve, inputs ...string) (*Program, error) {
	c := &compiler{resolve: resolve, info: map[*Node]*nodeInfo{}, names: map[string]*Node{}}
	p := &Program{node: root, Inputs: inputs}
	for i, name := range inputs {
		n := &Node{op: opInput, name: name}
		c.names[name] = n
		c.info[n] = &nodeInfo{place: i, emitted: true}
	}
	c.size = len(inputs)
	if err := c.count(root, false); err != nil {
		return nil, err
	}
	o := c.emit(root)
	p.root, p.steps, p.size, p.lazy = o.eval(), c.steps, c.size, c.lazy
	return p, nil
}

// NewFrame makes a frame in which p may run any number of times.
func (p *Program) NewFrame() *Frame {
	return &Frame{v: make([]float64, p.size), done: make([]uint64, p.lazy)}
}

// Run computes the value for the given inputs. The error is a *RunError.
func (p *Program) Run(f *Frame, inputs ...float64) (float64, error) {
	copy(f.v[:len(p.Inputs)], inputs)
	f.err = nil
	f.run++
	for _, s := range p.steps {
		f.v[s.place] = s.run(f)
		if f.err != nil {
			return 0, f.err
		}
	}
	x := p.root(f)
	if f.err != nil {
		return 0, f.err
	}
	if x-x != 0 {
		return 0, &RunError{Node: p.node, Err: fmt.Errorf("the result leaves the range of floating point, about 1e308: %w", ErrNotFinite)}
	}
	return x, nil
}

// nodeInfo is what the compiler knows of a node.
type nodeInfo struct {
	parents int
	always  bool // computed in every run
	place   int  // −1 before it has one
	lazy    int
	emitted bool
	out     operand
}

type compiler struct {
	resolve Resolve
	info    map[*Node]*nodeInfo
	names   map[string]*Node
	steps   []step
	size    int
	lazy    int
	nodes   int
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
		i = &nodeInfo{place: -1}
		c.info[n] = i
	}
	i.parents++
	if i.parents > 1 && (i.always || branch) {
		return nil
	}
	i.always = i.always || !branch
	for k, a := range n.args {
		if err := c.count(a, branch || n.op == opIf && k > 0); err != nil {
			return err
		}
	}
	return nil
}

// operand is a compiled node: a constant, a place, or a closure.
type operand struct {
	run   eval
	place int // −1 when it has none
	value float64
	fixed bool
}

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
		return operand{run: fails(n, err), place: -1}
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
	i.out = operand{run: onDemand(o.run, place, c.lazy), place: -1}
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

// fail keeps the first error of a run.
func (f *Frame) fail(n *Node, err error) float64 {
	if f.err == nil {
		f.err = &RunError{Node: n, Err: err}
	}
	return math.NaN()
}

// At is where the part at fault stands: the argument where one is named, else
// the node.
func (e *RunError) At() syntax.Span {
	var fault *ArgumentFault
	if errors.As(e.Err, &fault) && e.Node.fn != nil {
		for i, p := range e.Node.fn.Params {
			if p.Name == fault.Param && i < len(e.Node.args) {
				return e.Node.args[i].At
			}
		}
	}
	return e.Node.At
}
