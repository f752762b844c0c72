package repl

import (
	"errors"
	"fmt"
	"math"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// stackBody is a pile of layers. Its numbers stand in one list; the layers say
// where in it theirs are.
type stackBody struct {
	name      string
	groups    []layerGroup
	substrate *materialBody // nil for none
	density   int           // of the substrate
	roughness int           // of every interface that has none of its own; -1 for none
}

// layerGroup is a line of the block: layers that repeat together.
type layerGroup struct {
	label  string
	at     syntax.Span // of the number of repeats
	times  int         // its place; -1 for once
	layers []layerPlace
}

type layerPlace struct {
	at                        syntax.Span
	material                  *materialBody
	density, thickness, rough int // rough is -1 for that of the stack
}

// Describe names the stack.
func (b *stackBody) Describe() string { return b.name }

// body builds the stack from its numbers.
func (b *stackBody) body(x []float64) (euv.Body, error) { return b.stack(x) }

func (b *stackBody) stack(x []float64) (euv.Stack, error) {
	var s euv.Stack
	rough := 0.0
	if b.roughness >= 0 {
		rough = x[b.roughness]
	}
	for _, g := range b.groups {
		r := euv.Repeat{Times: 1}
		if g.times >= 0 {
			n := x[g.times]
			if n < 1 || n > 10_000 || n != math.Trunc(n) {
				return s, b.fault(g.at, g.label, "its layers repeat "+units.FormatNumber(n, 5)+" times; that is a whole number from 1 to 10000")
			}
			r.Times = int(n)
		}
		for _, l := range g.layers {
			layer := l.layer(x, rough)
			if d := layer.Thickness; !(d > 0 && d <= 1) {
				return s, b.fault(l.at, g.label, fmt.Sprintf("the layer of %s has the thickness %s; it must be greater than 0 and at most 1 m", l.material.name, units.Of(d)))
			}
			r.Layers = append(r.Layers, layer)
		}
		s.Repeats = append(s.Repeats, r)
	}
	if b.substrate != nil {
		s.Substrate = b.substrate.at(x[b.density])
	}
	s.BottomRoughness = units.Length(rough)
	return s, nil
}

// layer is a layer with its numbers; rough is the roughness that the stack gives
// those without one.
func (l layerPlace) layer(x []float64, rough float64) euv.Layer {
	if l.rough >= 0 {
		rough = x[l.rough]
	}
	return euv.Layer{Medium: l.material.at(x[l.density]), Thickness: units.Length(x[l.thickness]), Roughness: units.Length(rough)}
}

// layerFault is a line of a stack that makes no sense with the numbers of now.
type layerFault struct {
	at  syntax.Span // in the block
	msg string
}

func (f *layerFault) Error() string { return f.msg }

func (b *stackBody) fault(at syntax.Span, label, why string) error {
	return &layerFault{at, label + " of " + b.name + ": " + why}
}

// stacking is a block of a stack that is being checked.
type stacking struct {
	c       *program.Checker
	body    *stackBody
	numbers []*program.Node
	labels  map[string]bool
}

// checkedStack gives the block of a stack its node.
func (s *Session) checkedStack(b *syntax.Block, c *program.Checker) (*program.Node, error) {
	w := &stacking{c: c, body: &stackBody{name: b.Name, roughness: -1}, labels: map[string]bool{}}
	for _, line := range b.Lines {
		if err := w.line(line); err != nil {
			return nil, err
		}
	}
	if len(w.body.groups) == 0 {
		return nil, syntax.Fail(b.NameAt, b.Name+" has no layers", "write a line such as cap: Ru 2.5 nm")
	}
	return c.NewBody(w.body, w.numbers, b.NameAt), nil
}

func (w *stacking) add(n *program.Node) int {
	w.numbers = append(w.numbers, n)
	return len(w.numbers) - 1
}

func (w *stacking) line(line syntax.BlockLine) error {
	switch {
	case line.Plane != "":
		return syntax.Fail(line.Where, "a stack has no planes", "planes stand in a chain")
	case w.labels[line.Label]:
		return syntax.Fail(line.Where, "the label "+line.Label+" stands twice in this stack", "give the second one another, such as "+line.Label+"_2")
	case line.Independent:
		return syntax.Fail(line.Where, "independent belongs to the elements of a chain", "leave it out")
	}
	w.labels[line.Label] = true
	switch line.Label {
	case "roughness":
		return w.roughness(line)
	case "substrate":
		return w.substrate(line)
	}
	return w.layers(line)
}

func (w *stacking) roughness(line syntax.BlockLine) error {
	if len(line.Items) != 1 || line.Times != nil {
		return syntax.Fail(line.Where, "roughness has one length, for every interface", "write roughness: 0.4 nm")
	}
	n, err := w.c.Quantity(line.Items[0], units.DimensionOf[units.Length](), "a roughness")
	if err == nil {
		w.body.roughness = w.add(n)
	}
	return err
}

func (w *stacking) substrate(line syntax.BlockLine) error {
	name, ok := syntax.Expr(nil), false
	if len(line.Items) == 1 && line.Times == nil {
		name, ok = line.Items[0], true
	}
	n, is := name.(*syntax.Name)
	if !ok || !is {
		return syntax.Fail(line.Where, "a substrate is one material", "write substrate: Si")
	}
	m, at, err := w.material(*n)
	w.body.substrate, w.body.density = m, at
	return err
}

// material finds a material and takes its density into the list.
func (w *stacking) material(name syntax.Name) (*materialBody, int, error) {
	n := w.c.Material(name.Name)
	if n == nil {
		return nil, 0, &syntax.Error{
			Marks: []syntax.Span{name.Where}, Msg: name.Name + " is no material that is known here",
			Hint: "element symbols are known; others are named by " + namingMaterial(name.Name), Cause: ErrUnknown,
		}
	}
	return n.Body().(*materialBody), w.add(n.Numbers()[0]), nil
}

// namingMaterial is a statement that would name a material.
func namingMaterial(name string) string {
	formula := "SiO2"
	if _, err := euv.ParseFormula(name); err == nil {
		formula = name
	}
	return "material " + name + " = " + formula + " 2.2 g/cm^3, with its own density"
}

func (w *stacking) layers(line syntax.BlockLine) error {
	g := layerGroup{label: line.Label, times: -1}
	if line.Times != nil {
		g.at = line.Times.Span()
		n, err := w.c.Quantity(line.Times, units.Dimension{}, "how often layers repeat")
		if err != nil {
			return err
		}
		g.times = w.add(n)
	}
	for _, x := range line.Items {
		l, err := w.layer(x)
		if err != nil {
			return err
		}
		g.layers = append(g.layers, l)
	}
	w.body.groups = append(w.body.groups, g)
	return nil
}

func (w *stacking) layer(x syntax.Expr) (layerPlace, error) {
	l, ok := x.(*syntax.Layer)
	if call, is := x.(*syntax.Call); is && len(call.Args) == 1 {
		l, ok = &syntax.Layer{Material: syntax.Name{Name: call.Func, Where: call.FuncAt}, X: call.Args[0].X, Where: call.Where}, true
	}
	if !ok {
		return layerPlace{}, syntax.Fail(x.Span(), "a layer is a material and a thickness", "write Si 4.15 nm, or Si 4.15 nm rough 0.6 nm")
	}
	p := layerPlace{at: l.Where, rough: -1}
	var err error
	if p.material, p.density, err = w.material(l.Material); err != nil {
		return p, err
	}
	length := units.DimensionOf[units.Length]()
	n, err := w.c.Quantity(l.X, length, "a thickness")
	if err != nil {
		return p, err
	}
	p.thickness = w.add(n)
	if l.Rough != nil {
		if n, err = w.c.Quantity(l.Rough, length, "a roughness"); err == nil {
			p.rough = w.add(n)
		}
	}
	return p, err
}

// defineStack keeps a stack and tries it once, so that what makes no sense is
// refused where it stands.
func (s *Session) defineStack(j job) ([]Result, error) {
	b := j.do.(*syntax.Block)
	if err := s.nameable(b.Name, b.NameAt, &syntax.Name{}); err != nil {
		return nil, err
	}
	d := s.newDefinition(b.Name, j)
	if err := s.checked(d); err != nil {
		return nil, err
	}
	warnings, err := s.tried(d)
	if err != nil {
		e := &syntax.Error{Marks: []syntax.Span{b.NameAt}, Msg: err.Error(), Hint: "see: help stack", Cause: err}
		var fault *layerFault
		if errors.As(err, &fault) {
			e.Marks[0] = fault.at
		}
		return nil, e
	}
	if err := s.install(d, b.NameAt); err != nil {
		return nil, err
	}
	return noteOnly(append(d.warning, warnings...)), nil
}

// tried builds a stack with the numbers of now and asks for its reflectivity.
func (s *Session) tried(d *definition) ([]string, error) {
	var x []float64
	for _, n := range d.node.Numbers() {
		v, _, err := s.compute(n)
		if err != nil {
			return nil, err
		}
		x = append(x, v)
	}
	b, err := d.node.Body().(*stackBody).stack(x)
	if err != nil {
		return nil, err
	}
	r, err := euv.Reflectivity(b, 13.5e-9, 0, euv.Unpolarised, 0)
	return r.Warnings, err
}
