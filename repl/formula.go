package repl

import (
	"context"
	"fmt"
	"slices"
	"sync"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Formula is a compiled expression with open inputs. It never changes and is
// safe for concurrent use, as long as the functions of the host are. Uncertain
// values take part with their value alone. Every error is a *Refusal.
type Formula struct {
	session *Session
	checker *program.Checker
	program *program.Program
	inputs  []Input
	takes   []units.Dimension // of the inputs
	typ     program.Type
	unit    *units.Unit // nil for the usual one
	runs    sync.Pool   // of *Runner
	blocks  sync.Pool   // of *blockRun
}

// Compile makes a formula of an expression, perhaps with a unit in brackets
// behind it in which Value states the answer. Names other than the inputs are
// those of the frozen session.
func (z *Frozen) Compile(text string, inputs ...Input) (*Formula, error) {
	f, err := z.session.compiled(text, inputs)
	if err != nil {
		return nil, z.session.refusal(text, err).Err
	}
	return f, nil
}

func (s *Session) compiled(text string, inputs []Input) (*Formula, error) {
	x, stated, err := s.expression(text)
	if err != nil {
		return nil, err
	}
	c := s.checker(text, "")
	known, names, err := s.open(c, inputs)
	if err != nil {
		return nil, err
	}
	all, err := s.formulas(c, []syntax.Column{{X: x, Stated: stated}})
	if err != nil {
		return nil, err
	}
	p, err := program.CompileAll(all.nodes, once(s.opened(names, false)), program.Opening{Inputs: names})
	if err != nil {
		return nil, s.blame(err, c)
	}
	f := &Formula{session: s, checker: c, program: p, inputs: known, typ: all.types[0], unit: all.units[0]}
	for _, in := range known {
		f.takes = append(f.takes, in.Dimension)
	}
	f.runs.New = func() any { return f.Runner() }
	f.blocks.New = func() any { return f.blockRun() }
	return f, nil
}

// once keeps what names are, so that a program may ask for them again from any
// goroutine.
func once(resolve program.Resolve) program.Resolve {
	var mu sync.Mutex
	known := map[string]*program.Node{}
	return func(name string) (*program.Node, error) {
		mu.Lock()
		defer mu.Unlock()
		if n := known[name]; n != nil {
			return n, nil
		}
		n, err := resolve(name)
		if err == nil {
			known[name] = n
		}
		return n, err
	}
}

// Inputs are the inputs in the order of the values of a run, with the planes
// that they have.
func (f *Formula) Inputs() []Input { return slices.Clone(f.inputs) }

// Dimension returns the dimension of the result.
func (f *Formula) Dimension() units.Dimension { return f.typ.Dim }

// Plane returns where the result stands, "" for nowhere.
func (f *Formula) Plane() string { return string(f.typ.Plane) }

// Warnings returns the doubts about the formula itself; those about one result
// are in its Value.
func (f *Formula) Warnings() []string { return slices.Clone(f.checker.Warnings) }

// Run computes the formula for one value an input, in their order. It allocates
// nothing.
func (f *Formula) Run(values ...units.Quantity) (units.Quantity, error) {
	r := f.runs.Get().(*Runner)
	y, err := r.quantities(values)
	f.runs.Put(r)
	return units.New(y, f.typ.Dim), err
}

// Value is Run with the answer stated in its unit and with the doubts that it
// carries.
func (f *Formula) Value(values ...units.Quantity) (*Value, error) {
	r := f.runs.Get().(*Runner)
	defer f.runs.Put(r)
	r.frame.Warnings = nil
	y, err := r.quantities(values)
	if err != nil {
		return nil, err
	}
	return f.session.value(y, f.typ, f.unit, slices.Concat(f.checker.Warnings, r.frame.Warnings)), nil
}

// refused is the refusal of a run.
func (f *Formula) refused(err error) error {
	return f.session.refusal(f.checker.Source, f.session.blame(err, f.checker)).Err
}

// Runner runs a formula for one goroutine, without the little that sharing
// costs.
type Runner struct {
	formula *Formula
	frame   *program.Frame
	in      []float64
}

// Runner makes a runner, which is not safe for concurrent use.
func (f *Formula) Runner() *Runner {
	return &Runner{f, f.program.NewFrame(), make([]float64, len(f.inputs))}
}

// SI computes the formula in coherent SI units, temperatures in kelvin, from
// one value an input. It allocates nothing.
func (r *Runner) SI(values ...float64) (float64, error) {
	if len(values) != len(r.in) {
		return 0, r.formula.miscounted(len(values))
	}
	y, err := r.formula.program.Run(r.frame, values...)
	if err != nil {
		return 0, r.formula.refused(err)
	}
	return y, nil
}

func (r *Runner) quantities(values []units.Quantity) (float64, error) {
	if len(values) != len(r.in) {
		return 0, r.formula.miscounted(len(values))
	}
	takes := r.formula.takes
	for i, v := range values {
		if v.Dimension() != takes[i] {
			return 0, r.formula.mistaken(i, v.Dimension())
		}
		r.in[i] = v.SI()
	}
	return r.SI(r.in...)
}

func (f *Formula) miscounted(n int) error {
	return f.refused(&syntax.Error{Msg: fmt.Sprintf("%d values are given for %d inputs", n, len(f.inputs)), Hint: "give one value an input, in their order"})
}

func (f *Formula) mistaken(i int, have units.Dimension) error {
	in, s := f.inputs[i], f.session
	return f.refused(&syntax.Error{
		Msg:  fmt.Sprintf("the input %s is %s, not %s", in.Name, s.kindOf(in.Dimension), s.kindOf(have)),
		Hint: "give it in " + s.sys.UnitText(in.Dimension), Cause: &units.DimensionError{Op: "take", Have: have, Rhs: in.Dimension},
	})
}

// blockRun is the work of one goroutine on rows.
type blockRun struct {
	run  func(in, out [][]float64) (int, error)
	rows [][]float64
	out  [][]float64
}

func (f *Formula) blockRun() *blockRun {
	return &blockRun{f.program.Block(), make([][]float64, len(f.inputs)), make([][]float64, 1)}
}

// RunSI computes many runs at once: dst[i] from inputs[0][i], inputs[1][i] and
// so on, all in coherent SI units, temperatures in kelvin. Every row is as long
// as dst. It computes in order and returns how many runs have a value; when that
// is n < len(dst), err says why run n has none, or that the context has ended,
// and dst is 0 from there on. The caller may go on behind it. It allocates
// nothing when all runs have a value.
func (f *Formula) RunSI(ctx context.Context, dst []float64, inputs [][]float64) (n int, err error) {
	if len(inputs) != len(f.inputs) {
		return 0, f.miscounted(len(inputs))
	}
	for i, row := range inputs {
		if len(row) != len(dst) {
			return 0, f.refused(&syntax.Error{Msg: fmt.Sprintf("the row of the input %s has %d values, dst has %d", f.inputs[i].Name, len(row), len(dst)), Hint: "make all rows equally long"})
		}
	}
	b := f.blocks.Get().(*blockRun)
	defer f.blocks.Put(b)
	for n < len(dst) {
		if err = ctx.Err(); err != nil {
			break
		}
		end := min(n+program.Lanes, len(dst))
		for i, row := range inputs {
			b.rows[i] = row[n:end]
		}
		b.out[0] = dst[n:end]
		var done int
		done, err = b.run(b.rows, b.out)
		if n += done; err != nil {
			break
		}
	}
	if err != nil {
		clear(dst[n:])
		return n, f.refused(err)
	}
	return n, nil
}
