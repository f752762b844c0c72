package program

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// desk is a small scope of real parts: the standard units and a few functions
// with the names and definitions that a test says.
type desk struct {
	sys    *units.System
	rows   map[string]*Function
	nodes  map[string]*Node
	owns   map[string]*OwnFunction
	texts  map[string]string // statement of each name, for spans
	planes []Plane
	calls  map[string]int // how often each function ran
}

func (d *desk) Units() *units.System           { return d.sys }
func (d *desk) Node(name string) *Node         { return d.nodes[name] }
func (d *desk) Function(name string) *Function { return d.rows[name] }
func (d *desk) Own(name string) *OwnFunction   { return d.owns[name] }
func (d *desk) Planes() []Plane                { return d.planes }

func (d *desk) Material(string) (*Node, bool) { return nil, false }

// Integrate is the midpoint rule on many points, enough for smooth spectra.
func (d *desk) Integrate(f func(dst, wavelengths []float64) error, center, width float64, _ []float64) (float64, float64, error) {
	const n = 4000
	x, y := make([]float64, n), make([]float64, n)
	for i := range x {
		x[i] = center + width*((float64(i)+0.5)/n-0.5)
	}
	if err := f(y, x); err != nil {
		return 0, 0, err
	}
	sum := 0.0
	for _, v := range y {
		sum += v
	}
	return sum / n, 0, nil
}

func (d *desk) Constant(name string) *Node {
	if name == "pi" {
		return NewConstant(units.New(math.Pi, units.Dimension{}))
	}
	return nil
}

func (d *desk) Near(word string) []string {
	var list []string
	for name := range d.nodes {
		if strings.EqualFold(name, word) && name != word {
			list = append(list, name)
		}
	}
	slices.Sort(list)
	return list
}

// newDesk has the functions that the tests use; each counts its runs.
func newDesk() *desk {
	d := &desk{
		sys: units.Standard(), rows: map[string]*Function{}, nodes: map[string]*Node{},
		owns: map[string]*OwnFunction{}, texts: map[string]string{}, calls: map[string]int{},
	}
	same := func(t []Type) (Type, error) { return t[0], nil }
	pure := func(t []Type) (Type, error) {
		if !t[0].Pure() {
			return Type{}, errors.New("the argument is a pure number")
		}
		return Type{}, nil
	}
	d.add(Function{
		Name: "sqrt", Params: []Param{{Name: "x"}}, Rule: func(t []Type) (Type, error) { return t[0].Root(2) },
		Call: func(x []float64) (float64, []string, error) { return math.Sqrt(x[0]), nil, nil },
	})
	d.add(Function{
		Name: "ln", Params: []Param{{Name: "x"}}, Rule: pure,
		Call: func(x []float64) (float64, []string, error) { return math.Log(x[0]), nil, nil },
	})
	d.add(Function{
		Name: "max", Params: []Param{{Name: "values", Kind: List}}, Rule: same,
		Call: func(x []float64) (float64, []string, error) { return slices.Max(x), nil, nil },
	})
	d.add(Function{
		Name: "sum", Params: []Param{{Name: "values", Kind: List}},
		Rule: func(t []Type) (Type, error) {
			if t[0].Kind == Point {
				return t[0], errors.New("temperature points do not add up")
			}
			return t[0], nil
		},
		Call: func(x []float64) (float64, []string, error) {
			s := 0.0
			for _, v := range x {
				s += v
			}
			return s, nil, nil
		},
	})
	d.add(Function{
		Name: "quantile", Params: []Param{{Name: "values", Kind: List}, {Name: "p"}}, Rule: same,
		Call: func(x []float64) (float64, []string, error) {
			v := slices.Sorted(slices.Values(x[:len(x)-1]))
			return v[int(x[len(x)-1]*float64(len(v)-1))], nil, nil
		},
	})
	d.add(Function{
		Name: "number_of", Params: []Param{{Name: "x"}},
		Rule: func(t []Type) (Type, error) { return Type{Dim: t[0].Dim.WithoutCounted()}, nil },
		Call: func(x []float64) (float64, []string, error) { return x[0], nil, nil },
	})
	d.add(Function{
		Name: "count", Summary: "photons of 13.5 nm light", Params: []Param{
			{Name: "dose", Dim: units.DimensionOf[units.Fluence](), Plane: "WAFER"},
			{Name: "area", Dim: units.DimensionOf[units.Area](), Doc: "the area that is lit"},
			{Name: "wavelength", Dim: units.DimensionOf[units.Length](), Default: "13.5 nm"},
		},
		Result: Result{Follows: 1},
		Call: func(x []float64) (float64, []string, error) {
			if !(x[2] > 0) {
				return 0, nil, &ArgumentFault{"wavelength", errors.New("wavelength must be greater than 0")}
			}
			const hc = 6.62607015e-34 * 299792458 // exact in the SI
			return x[0] * x[1] * x[2] / hc, nil, nil
		},
	})
	d.add(Function{
		Name: "drift", Params: []Param{
			{Name: "temperature", Kind: Point, Dim: units.DimensionOf[units.Temperature]()},
			{Name: "change", Dim: units.DimensionOf[units.Temperature]()},
		},
		Result: Result{Kind: Point, Dim: units.DimensionOf[units.Temperature]()},
		Call:   func(x []float64) (float64, []string, error) { return x[0] + x[1], nil, nil },
	})
	d.add(Function{
		Name: "slope", Params: []Param{{Name: "x"}, {Name: "tone", Words: []string{"positive", "negative"}, Default: "positive"}},
		Call: func(x []float64) (float64, []string, error) { return x[0] * (1 - 2*x[1]), nil, nil },
	})
	d.add(Function{
		Name: "capped", Params: []Param{{Name: "x"}, {Name: "limit", Default: "none"}},
		Call: func(x []float64) (float64, []string, error) {
			if x[0] > x[1] {
				return x[1], []string{"the limit holds"}, nil
			}
			return x[0], nil, nil
		},
	})
	d.add(Function{
		Name: "transmission", Params: []Param{{Name: "chain", Kind: ChainKind}, {Name: "from", IsPlane: true}, {Name: "to", IsPlane: true}},
		Build: func(c *Checker, k *Call) (*Node, error) {
			return c.Transmission(k.Args[0].Chain(), Plane(k.Words[1]), Plane(k.Words[2]), k.Tree.Where)
		},
	})
	d.add(Function{
		Name: "carry", Params: []Param{{Name: "x", Any: true}, {Name: "chain", Kind: ChainKind}, {Name: "plane", IsPlane: true}},
		Build: func(c *Checker, k *Call) (*Node, error) {
			return c.Carry(k.Args[0], k.Exprs[0], k.Args[1].Chain(), Plane(k.Words[2]), k.Tree.Where)
		},
	})
	return d
}

func (d *desk) add(f Function) {
	if run := f.Call; run != nil {
		f.Call = func(x []float64) (float64, []string, error) {
			d.calls[f.Name]++
			return run(x)
		}
	}
	d.rows[f.Name] = &f
}

// say runs a statement: definitions are kept, a value is returned.
func (d *desk) say(text string) (*answer, error) {
	st, bad := syntax.Parse(text)
	if bad != nil {
		return nil, bad
	}
	a := &answer{c: &Checker{Scope: d, Source: text}}
	var err error
	switch do := st.Do.(type) {
	case *syntax.Define:
		a.c.Owner = do.Name
		if a.node, err = a.c.Check(do.X); err == nil && do.Stated != nil {
			_, err = a.c.StatedUnit(do.Stated, a.node, do.X)
		}
		if err == nil {
			d.nodes[do.Name], d.texts[do.Name] = a.node, text
		}
		return a, err
	case *syntax.DefineFunction:
		d.owns[do.Name] = &OwnFunction{Name: do.Name, Params: do.Params, Stated: do.Stated, Body: do.X, Source: text}
		return a, nil
	case *syntax.Block:
		a.c.Owner = do.Name
		if a.node, err = a.c.ChainBlock(do); err == nil {
			d.nodes[do.Name], d.texts[do.Name] = a.node, text
			d.planes = append(d.planes, a.node.Chain().Planes()...)
		}
		return a, err
	case *syntax.Show:
		if a.node, err = a.c.Check(do.X); err != nil {
			return nil, err
		}
		if do.Stated != nil {
			if _, err = a.c.StatedUnit(do.Stated, a.node, do.X); err != nil {
				return nil, err
			}
		}
		return a, a.run(d)
	}
	return nil, fmt.Errorf("%T is not for this test", st.Do)
}

// answer is a checked expression and its value.
type answer struct {
	c     *Checker
	node  *Node
	value float64
}

func (a *answer) run(d *desk) error {
	p, err := Compile(a.node, d.resolve)
	if err != nil {
		return err
	}
	f := p.NewFrame()
	a.value, err = p.Run(f)
	a.c.Warnings = append(a.c.Warnings, f.Warnings...)
	return err
}

// resolve inlines every name.
func (d *desk) resolve(name string) (*Node, error) {
	if n := d.nodes[name]; n != nil {
		return n, nil
	}
	return nil, fmt.Errorf("%s has no value: %w", name, ErrUnknown)
}

// text writes an answer as "value unit at PLANE" in SI base units; a point is
// written in °C.
func (d *desk) text(a *answer) string {
	t := a.node.Type
	var s string
	switch {
	case t.Kind == Point:
		u, _ := d.sys.Parse("degC")
		s = d.sys.TextIn(a.value, u, 6)
	default:
		s = units.FormatNumber(a.value, 6)
		if !t.Dim.IsNumber() {
			s += " " + d.sys.BaseText(t.Dim)
		}
	}
	if t.Plane != "" {
		s += " at " + string(t.Plane)
	}
	return s
}

// refusal writes an error as "marked texts: message; hint".
// In a run it stands in the text of the name that owns the part at fault.
func (d *desk) refusal(text string, err error) string {
	var run *RunError
	if errors.As(err, &run) {
		if run.Node.Owner != "" {
			text = d.texts[run.Node.Owner]
		}
		return "at " + cut(text, run.At()) + ": " + run.Error()
	}
	var bad *syntax.Error
	if !errors.As(err, &bad) {
		return err.Error()
	}
	var marks []string
	for _, m := range bad.Marks {
		marks = append(marks, cut(text, m))
	}
	return strings.Join(marks, " | ") + ": " + bad.Error()
}

func cut(text string, s syntax.Span) string {
	if s.Start < 0 || s.Start > s.End || s.End > len(text) {
		return fmt.Sprintf("(%d to %d)", s.Start, s.End)
	}
	return text[s.Start:s.End]
}

// holds runs cases, a line each: "statement = answer", "statement ! refusal",
// or a statement alone, which is said and must not be refused. A line "chain …"
// begins a block, which ends with "end".
func holds(t *testing.T, d *desk, cases string) {
	t.Helper()
	lines := strings.Split(cases, "\n")
	for i := 0; i < len(lines); i++ {
		line := strings.TrimSpace(lines[i])
		if line == "" || strings.HasPrefix(line, "#") {
			continue
		}
		if strings.HasPrefix(line, "chain ") {
			for block := line; ; {
				i++
				next, refused, _ := strings.Cut(strings.TrimSpace(lines[i]), " ! ")
				block += "\n" + next
				if syntax.BlockEnd(next) {
					line = block
					if refused != "" {
						line += " ! " + refused
					}
					break
				}
			}
		}
		one(t, d, line)
	}
}

func one(t *testing.T, d *desk, line string) {
	t.Helper()
	text, want, answers := strings.Cut(line, " => ")
	said, message, refuses := strings.Cut(line, " ! ")
	if refuses {
		text = said
	}
	text = strings.TrimSpace(text)
	a, err := d.say(text)
	switch {
	case refuses && err == nil:
		t.Errorf("%s: not refused; want %s", text, message)
	case refuses:
		if got := d.refusal(text, err); got != strings.TrimSpace(message) {
			t.Errorf("%s\n got %s\nwant %s", text, got, strings.TrimSpace(message))
		}
	case err != nil:
		t.Errorf("%s: refused: %s", text, d.refusal(text, err))
	case answers:
		if got := d.text(a); got != strings.TrimSpace(want) {
			t.Errorf("%s\n got %s\nwant %s", text, got, strings.TrimSpace(want))
		}
	}
}
