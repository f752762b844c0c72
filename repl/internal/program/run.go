package program

import (
	"errors"
	"fmt"
	"math"

	"example.com/dosewright/repl/internal/syntax"
)

// Frame holds the numbers of one run.
type Frame struct {
	v        []float64
	done     []uint64 // run in which a place computed on demand was computed
	run      uint64
	err      error
	nested   []*nestedBlock // of in-band factors
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

// Outputs is how many formulas p computes.
func (p *Program) Outputs() int { return len(p.roots) }

// NewFrame makes a frame in which p may run any number of times.
func (p *Program) NewFrame() *Frame {
	return &Frame{v: make([]float64, p.size), done: make([]uint64, p.lazy)}
}

// Run computes the value for the given inputs: those of the names, then those
// of the sources. The error is a *RunError.
func (p *Program) Run(f *Frame, inputs ...float64) (float64, error) {
	if err := p.start(f, inputs); err != nil {
		return 0, err
	}
	return p.value(f, 0)
}

// RunAll computes the value of each formula into out.
func (p *Program) RunAll(f *Frame, inputs, out []float64) error {
	if err := p.start(f, inputs); err != nil {
		return err
	}
	for i := range p.roots {
		var err error
		if out[i], err = p.value(f, i); err != nil {
			return err
		}
	}
	return nil
}

// RunOne computes the value of formula k alone into out[k].
func (p *Program) RunOne(f *Frame, inputs, out []float64, k int) error {
	err := p.start(f, inputs)
	if err == nil {
		out[k], err = p.value(f, k)
	}
	return err
}

// start fills the inputs and computes what is shared.
func (p *Program) start(f *Frame, inputs []float64) error {
	copy(f.v[:len(p.Inputs)+len(p.Sources)], inputs)
	if f.err != nil {
		f.err = nil
	}
	f.run++
	for _, s := range p.steps {
		f.v[s.place] = s.run(f)
		if f.err != nil {
			return f.err
		}
	}
	return nil
}

func (p *Program) value(f *Frame, i int) (float64, error) {
	x := p.roots[i](f)
	if f.err != nil {
		return 0, f.err
	}
	if x-x != 0 {
		return 0, outOfRange(p.nodes[i])
	}
	return x, nil
}

func outOfRange(n *Node) error {
	return &RunError{Node: n, Err: fmt.Errorf("the result leaves the range of floating point, about 1e308: %w", ErrNotFinite)}
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
