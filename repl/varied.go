package repl

import (
	"context"
	"fmt"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// varied is a name that a statement varies, with the ends of its range.
type varied struct {
	name     string
	typ      program.Type
	unit     units.Unit
	from, to float64
}

// vary reads the ends of a range, which are what they are as the session stands,
// and makes its name known to the checker: a new name is local to the statement,
// one that exists is replaced for this run and keeps its dimension and plane.
func (s *Session) vary(ctx context.Context, c *program.Checker, a syntax.Axis) (varied, error) {
	v := varied{name: a.Name}
	fixed := s.checker(c.Source, "")
	from, err := s.end(ctx, fixed, a.From)
	if err != nil {
		return v, err
	}
	to, err := s.end(ctx, fixed, a.To)
	if err != nil {
		return v, err
	}
	if err := fixed.Comparable(a.From, a.To); err != nil {
		return v, err
	}
	at := a.From.Span().Join(a.To.Span())
	if from.value.SI == to.value.SI {
		return v, syntax.Fail(at, "the two ends of this range are one place", "write two ends that differ, as in 1 nm .. 2 nm")
	}
	v.typ = from.typ
	if v.typ.Plane == "" {
		v.typ.Plane = to.typ.Plane
	}
	if v.typ.Kind != to.typ.Kind {
		return v, syntax.Fail(at, "the ends of a range are both temperature points or both differences", "write both in degC, or both in K")
	}
	v.from, v.to, v.unit = from.value.SI, to.value.SI, to.value.Unit
	return v, s.known(c, &v, a)
}

// end is one end of a range, with its type.
type end struct {
	value *Value
	typ   program.Type
}

func (s *Session) end(ctx context.Context, c *program.Checker, x syntax.Expr) (end, error) {
	v, err := s.single(ctx, x, c)
	if err != nil {
		return end{}, err
	}
	n, err := c.Check(x)
	if err != nil {
		return end{}, err
	}
	if lit, ok := x.(*syntax.Literal); ok {
		if u, e := s.sys.Parse(lit.Unit); e == nil {
			v.Unit = u // as it was written
		}
	}
	return end{v, n.Type}, nil
}

// known checks a varied name against a definition of that name.
func (s *Session) known(c *program.Checker, v *varied, a syntax.Axis) error {
	if _, ok := s.constants[v.name]; ok {
		return syntax.Fail(a.NameAt, v.name+" is a constant of the language", "choose another name")
	}
	d := s.store.defs[v.name]
	if d == nil {
		c.Local(v.name, v.typ)
		return nil
	}
	if d.node == nil || d.node.Type.Kind != program.Number && d.node.Type.Kind != program.Point {
		return syntax.Fail(a.NameAt, v.name+" is no single value that could be varied", "choose another name")
	}
	have, given := d.node.Type, v.typ
	var fits bool
	if v.typ, fits = inPlaceOf(have, given); !fits {
		return &syntax.Error{
			Marks: []syntax.Span{a.From.Span()}, Msg: fmt.Sprintf("%s is %s; this range is %s", v.name, s.pointOr(have), s.pointOr(given)),
			Hint: "give the range the dimension and plane of " + s.where(v.name) + ", or use a new name", Cause: program.Differ("vary", given, have),
		}
	}
	if d.unit != nil {
		v.unit = *d.unit
	}
	return nil
}

// inPlaceOf is the type that a value has in the place of a definition's: it takes
// over a plane when it states none, and kelvin count as a temperature point.
func inPlaceOf(have, given program.Type) (t program.Type, fits bool) {
	if given.Plane == "" {
		given.Plane = have.Plane
	}
	if have.Kind == program.Point && given.Kind == program.Number {
		given.Kind = program.Point
	}
	return given, given == have
}

// pointOr tells a temperature point from a difference.
func (s *Session) pointOr(t program.Type) string {
	if t.Kind == program.Point {
		return "a temperature point"
	}
	return s.describe(t)
}

// formulas are expressions of a statement, checked, with the units in which
// they are stated.
type formulas struct {
	nodes []*program.Node
	types []program.Type
	units []*units.Unit // nil until chosen
	names []string
}

func (s *Session) formulas(c *program.Checker, columns []syntax.Column) (*formulas, error) {
	f := &formulas{}
	for _, col := range columns {
		n, err := c.Check(col.X)
		if err == nil && n.Type.Kind != program.Number && n.Type.Kind != program.Point {
			err = syntax.Fail(col.X.Span(), "this has no single value", "take one of it, such as mean(…)")
		}
		if err != nil {
			return nil, err
		}
		unit := s.declared(col.X)
		if col.Stated != nil {
			u, err := c.StatedUnit(col.Stated, n, col.X)
			if err != nil {
				return nil, err
			}
			if col.Stated.Unit != "" {
				unit = &u
			}
		}
		f.nodes, f.types = append(f.nodes, n), append(f.types, n.Type)
		f.units, f.names = append(f.units, unit), append(f.names, c.Said(col.X))
	}
	return f, nil
}

// choose gives the columns without a unit the one that fits a typical value.
func (s *Session) choose(f *formulas, k int, typical float64) units.Unit {
	if f.units[k] == nil {
		u := s.display(typical, f.types[k])
		f.units[k] = &u
	}
	return *f.units[k]
}

// compileVaried makes one program of formulas with the varied names left open.
func (s *Session) compileVaried(f *formulas, vs ...varied) (*program.Program, error) {
	var names []string
	for _, v := range vs {
		names = append(names, v.name)
	}
	return program.CompileAll(f.nodes, s.opened(names, false), program.Opening{Inputs: names})
}

// evals runs each formula of a program on its own.
func evals(p *program.Program) []study.Eval {
	var list []study.Eval
	for k := range p.Outputs() {
		f, out := p.NewFrame(), make([]float64, p.Outputs())
		list = append(list, func(slots []float64) (float64, error) {
			err := p.RunOne(f, slots, out, k)
			return out[k], err
		})
	}
	return list
}
