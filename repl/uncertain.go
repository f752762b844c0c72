package repl

import (
	"context"
	"fmt"
	"math"
	"slices"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
)

// pairing is a stated correlation of two inputs.
type pairing struct {
	a, b string
	r    float64
}

// opened resolves names for a program whose inputs are left open: what rests
// on one of them, or on an uncertain input when sources are open too, keeps
// its formula; all else is the number that it is now.
func (s *Session) opened(inputs []string, sources bool) program.Resolve {
	open := map[string]bool{}
	for _, name := range inputs {
		open[name] = true
	}
	var rests func(name string) bool
	rests = func(name string) bool {
		if yes, known := open[name]; known {
			return yes
		}
		open[name] = false
		d := s.store.defs[name]
		if d == nil {
			return false
		}
		yes := sources && d.source
		for _, u := range d.uses {
			yes = rests(u) || yes
		}
		open[name] = yes
		return yes
	}
	return func(name string) (*program.Node, error) {
		if d := s.store.defs[name]; d != nil && d.node != nil && rests(name) {
			return d.node, nil
		}
		return s.resolve(name)
	}
}

// unsure says whether a formula rests on an uncertain input.
func (s *Session) unsure(n *program.Node) bool {
	if program.Uncertain(n, func(string) bool { return false }) {
		return true
	}
	if s.store.sources == 0 {
		return false
	}
	var below []string
	n.Names(func(name string) { below = append(below, name) })
	for name := range s.store.ancestors(below) {
		if s.store.defs[name].source {
			return true
		}
	}
	return false
}

// inputs are the uncertain inputs of a program with their correlations, ready
// to be propagated.
type inputs struct {
	program *program.Program
	sources *study.Sources
	list    []study.Input       // of the sources
	pairs   []study.Correlation // by their places in the list
}

// inputsOf compiles formulas with their uncertain inputs left open.
func (s *Session) inputsOf(nodes ...*program.Node) (*inputs, error) {
	p, err := program.CompileAll(nodes, s.opened(nil, true), program.Opening{Sources: true})
	if err != nil {
		return nil, err
	}
	var list []study.Input
	place := map[*program.Node]int{}
	for i, n := range p.Sources {
		sp := n.Spread()
		list = append(list, study.Input{Value: n.Value(), U: sp.U, DoF: sp.DoF, Shape: study.Shape(sp.Shape), Low: sp.Low, High: sp.High})
		place[n] = i
	}
	var pairs []study.Correlation
	for _, c := range s.pairings {
		a, signA, okA := s.input(c.a)
		b, signB, okB := s.input(c.b)
		i, hasA := place[a]
		j, hasB := place[b]
		if okA && okB && hasA && hasB && list[i].U > 0 && list[j].U > 0 {
			pairs = append(pairs, study.Correlation{A: i, B: j, R: signA * signB * c.r})
		}
	}
	sources, err := study.NewSources(list, pairs...)
	if err != nil {
		return nil, err
	}
	return &inputs{p, sources, list, pairs}, nil
}

// input finds the one uncertain literal that a name is, with the sign before it.
func (s *Session) input(name string) (n *program.Node, sign float64, ok bool) {
	d := s.store.defs[name]
	if d == nil || d.node == nil {
		return nil, 0, false
	}
	return program.Source(d.node)
}

// eval runs the formula of that index; each call makes a frame of its own.
func (in *inputs) eval(k int) study.Eval {
	f := in.program.NewFrame()
	out := make([]float64, in.program.Outputs())
	return func(slots []float64) (float64, error) {
		err := in.program.RunAll(f, slots, out)
		return out[k], err
	}
}

// warnings are the doubts of one run at the inputs' values; blocks of lanes keep
// none.
func (in *inputs) warnings() []string {
	frame := in.program.NewFrame()
	_ = in.program.RunAll(frame, in.sources.Values(), make([]float64, in.program.Outputs())) // a refusal has been told
	return frame.Warnings
}

func (in *inputs) firstOrder(ctx context.Context) (*study.Budget, error) {
	return study.FirstOrder(ctx, in.eval(0), in.sources)
}

// addUncertainty gives a value its first-order uncertainty when its formula
// has an uncertain input.
func (s *Session) addUncertainty(ctx context.Context, v *Value, n *program.Node) error {
	if !s.unsure(n) {
		return nil
	}
	in, err := s.inputsOf(n)
	if err != nil {
		return err
	}
	b, err := in.firstOrder(ctx)
	if err != nil {
		return err
	}
	v.Uncertain, v.U, v.DoF = true, b.U, b.DoF
	if v.chosen && !v.Point && math.Abs(v.SI) < v.U {
		v.Unit = s.display(v.U, n.Type)
	}
	if b.Second.Matters {
		v.Warnings = append(v.Warnings, s.secondOrder(v, b))
	}
	return nil
}

// secondOrder is the warning that a first-order uncertainty is not all.
func (s *Session) secondOrder(v *Value, b *study.Budget) string {
	return fmt.Sprintf("second-order terms matter: with them the standard uncertainty is %s and the mean shifts by %s; propagate shows the distribution",
		s.sys.TextIn(b.Second.U, v.Unit.Interval(), 2), s.sys.TextIn(b.Second.Shift, v.Unit.Interval(), 2))
}

func (s *Session) correlation(j job) ([]Result, error) {
	a := j.do.(*syntax.Correlation)
	for _, n := range []syntax.Name{a.A, a.B} {
		if in, _, ok := s.input(n.Name); !ok || in.Spread().U == 0 {
			return nil, syntax.Fail(n.Where, n.Name+" is no name of one uncertain input", "a correlation joins two names such as "+n.Name+" = 3.0(1) W")
		}
	}
	if a.A.Name == a.B.Name {
		return nil, syntax.Fail(a.B.Where, "an input is correlated with itself already", "name two inputs")
	}
	c := s.checker(j.text, "")
	v, err := s.single(j.ctx, a.X, c)
	if err != nil {
		return nil, err
	}
	if !v.Unit.Dimension().IsNumber() || !(v.SI >= -1 && v.SI <= 1) {
		return nil, syntax.Fail(a.X.Span(), "a correlation coefficient is a number from -1 to 1", "write correlation "+a.A.Name+", "+a.B.Name+" = 0.8")
	}
	before := s.pairings
	s.pairings = slices.DeleteFunc(slices.Clone(before), func(p pairing) bool {
		return p.a == a.A.Name && p.b == a.B.Name || p.a == a.B.Name && p.b == a.A.Name
	})
	if v.SI != 0 {
		s.pairings = append(s.pairings, pairing{a.A.Name, a.B.Name, v.SI})
	}
	if err := s.fitTogether(); err != nil {
		s.pairings = before
		return nil, &syntax.Error{
			Marks: []syntax.Span{a.X.Span()}, Cause: err,
			Msg:  "this does not go with the other correlations of " + a.A.Name + " and " + a.B.Name + ": together they leave a variance below zero",
			Hint: "the coefficients of all pairs must allow one another; nothing has changed",
		}
	}
	return nil, nil
}

// part takes back the correlations of a name.
func (s *Session) part(name string) {
	s.pairings = slices.DeleteFunc(slices.Clone(s.pairings), func(p pairing) bool { return p.a == name || p.b == name })
}

// fitTogether checks all stated correlations against each other.
func (s *Session) fitTogether() error {
	var nodes []*program.Node
	seen := map[string]bool{}
	for _, p := range s.pairings {
		for _, name := range []string{p.a, p.b} {
			if d := s.store.defs[name]; d != nil && d.node != nil && !seen[name] {
				seen[name] = true
				nodes = append(nodes, d.node)
			}
		}
	}
	if len(nodes) == 0 {
		return nil
	}
	_, err := s.inputsOf(nodes...)
	return err
}
