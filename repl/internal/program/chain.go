package program

import (
	"fmt"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Chain is what light meets, in order: planes and elements.
type Chain struct {
	Name  string
	Steps []Step
	// Center and Width are the band, Weight the spectrum of the source or nil.
	// Without a band the chain stands at one wavelength.
	Center, Width, Weight *Node
	Spectral              bool // some element depends on the wavelength
}

// Step is a plane, a reduction or an element of a chain.
type Step struct {
	Plane     Plane // set for a plane only
	Label     string
	Text      string // the line as written
	Note      string
	Crossings *Node // how often light meets the element; nil for once
	Factor    *Node // of one crossing
	All       *Node // of all crossings, between 0 and 1 by its own check
	X, Y      *Node // reduction, for the step of that label
	Runs      bool  // the factor depends on the running wavelength
	Shared    bool  // all crossings share one factor; false for independent
}

func (s Step) nodes() []*Node {
	var list []*Node
	for _, n := range []*Node{s.Crossings, s.Factor, s.All, s.X, s.Y} {
		if n != nil {
			list = append(list, n)
		}
	}
	return list
}

// ChainBlock checks the block of a chain.
func (c *Checker) ChainBlock(b *syntax.Block) (*Node, error) {
	length := units.DimensionOf[units.Length]()
	ch := &Chain{Name: b.Name, Center: c.constant(13.5e-9, Type{Dim: length}, b.NameAt), Width: c.constant(0, Type{Dim: length}, b.NameAt)}
	c.running()
	for _, line := range b.Lines {
		step, err := c.step(ch, line)
		if err != nil {
			return nil, err
		}
		if step.Label != "band" && step.Label != "spectrum" {
			ch.Steps = append(ch.Steps, step)
		}
		ch.Spectral = ch.Spectral || step.Runs
	}
	if len(ch.planes()) < 2 {
		return nil, syntax.Fail(b.NameAt, fmt.Sprintf("%s has %s; it needs two or more to lead from one to the other", b.Name, named(len(ch.planes()), "plane")),
			"write at IF, then the elements, then at WAFER")
	}
	if err := c.factorPlanes(ch, b); err != nil {
		return nil, err
	}
	return c.made(Node{op: opChain, chain: ch, Type: Type{Kind: ChainKind}}, b.NameAt), nil
}

func (ch *Chain) planes() []Plane {
	var list []Plane
	for _, s := range ch.Steps {
		if s.Plane != "" {
			list = append(list, s.Plane)
		}
	}
	return list
}

// Planes lists the planes of the chain in the order of the light.
func (ch *Chain) Planes() []Plane { return ch.planes() }

func (c *Checker) step(ch *Chain, line syntax.BlockLine) (Step, error) {
	s := Step{Label: line.Label, Text: line.Text, Note: line.Note, Shared: !line.Independent}
	if line.Plane != "" {
		s.Plane = Plane(line.Plane)
		if slices.Contains(ch.planes(), s.Plane) {
			return s, syntax.Fail(line.Where, "the plane "+line.Plane+" stands twice in this chain", "give the second one another name")
		}
		return s, nil
	}
	for _, before := range ch.Steps {
		if before.Label == line.Label {
			return s, syntax.Fail(line.Where, "the label "+line.Label+" stands twice in this chain", "give the second one another, such as "+line.Label+"_2")
		}
	}
	switch line.Label {
	case "reduction":
		return c.reduction(s, line)
	case "band":
		return s, c.band(ch, line)
	case "spectrum":
		return s, c.weight(ch, line)
	}
	return c.elementStep(s, line)
}

// percent is how a factor that was meant in per cent is written.
func percent(v float64) string {
	if v >= 2 && v <= 100 {
		return units.FormatNumber(v, 5) + " %"
	}
	return "65 %"
}

func (c *Checker) elementStep(s Step, line syntax.BlockLine) (Step, error) {
	if len(line.Items) != 1 {
		return s, syntax.Fail(line.Where, s.Label+" has "+named(len(line.Items), "value")+"; an element has one factor", "write "+s.Label+": 65 %")
	}
	x := line.Items[0]
	var err error
	if s.Factor, err = c.plain(x); err != nil {
		return s, err
	}
	if t := s.Factor.Type; t.Kind != Number || !t.Dim.IsNumber() {
		return s, syntax.Fail(x.Span(), s.Label+" is a factor between 0 and 1, not "+c.describe(t), "write "+s.Label+": 65 %")
	}
	if v, ok := s.Factor.Constant(); ok && !(v >= 0 && v <= 1) {
		return s, syntax.Fail(x.Span(), fmt.Sprintf("%s is %s; a factor lies between 0 and 1", s.Label, units.FormatNumber(v, 5)), "percent is written "+percent(v))
	}
	s.Runs = s.Factor.runs()
	if line.Times != nil {
		if s.Crossings, err = c.crossings(line); err != nil {
			return s, err
		}
	}
	if !s.Shared {
		return c.independent(s, line)
	}
	s.All = passing(s)
	return s, nil
}

// independent gives each crossing an element with errors of its own: its
// uncertain inputs are made anew for each.
func (c *Checker) independent(s Step, line syntax.BlockLine) (Step, error) {
	n := 1.0
	if s.Crossings != nil {
		fixed := false
		if n, fixed = s.Crossings.Constant(); !fixed || n > 64 {
			return s, syntax.Fail(line.Where, "independent elements are counted by a number up to 64", "write "+s.Label+" x4 independent: …")
		}
	}
	if own := Uncertain(s.Factor, func(string) bool { return false }); !own && len(c.Uses) > 0 {
		return s, syntax.Fail(line.Items[0].Span(), "each crossing has an error of its own only when the uncertain value stands in this line; a name is one source of error", "write "+s.Label+" x4 independent: (66.0 ± 0.5) %")
	}
	one := s
	one.Crossings = nil
	s.All = passing(one)
	for range int(n) - 1 {
		var err error
		if one.Factor, err = c.plain(line.Items[0]); err != nil {
			return s, err
		}
		s.All = c.made(Node{op: opMul, args: []*Node{s.All, passing(one)}}, line.Items[0].Span())
	}
	return s, nil
}

func (c *Checker) crossings(line syntax.BlockLine) (*Node, error) {
	n, err := c.plain(line.Times)
	if err != nil {
		return nil, err
	}
	v, fixed := n.Constant()
	if !n.Type.Pure() || fixed && (v < 1 || v > 1000 || v != float64(int(v))) {
		return nil, syntax.Fail(line.Times.Span(), "light crosses an element a whole number of times from 1 to 1000", "write x6, or x(name) for a name that holds such a number")
	}
	return n, nil
}

// passing makes the node of factor^crossings that refuses what is no factor.
func passing(s Step) *Node {
	args := []*Node{s.Factor}
	if s.Crossings != nil {
		args = append(args, s.Crossings)
	}
	label := s.Label
	f := &Function{Name: label, Call: func(x []float64) (float64, []string, error) {
		if !(x[0] >= 0 && x[0] <= 1) {
			return 0, nil, fmt.Errorf("%s is %s; the factor of an element lies between 0 and 1", label, besideOne(x[0]))
		}
		if len(x) == 1 {
			return x[0], nil, nil
		}
		if n := x[1]; n < 1 || n > 1000 || n != float64(int(n)) {
			return 0, nil, fmt.Errorf("light crosses %s %s times; that is a whole number from 1 to 1000", label, units.FormatNumber(n, 5))
		}
		return powInt(x[0], int(x[1])), nil, nil
	}}
	return &Node{op: opCall, fn: f, args: args, At: s.Factor.At, Owner: s.Factor.Owner}
}

// besideOne writes a number that is not 1 so that it does not look like it.
func besideOne(x float64) string {
	text := units.FormatNumber(x, 5)
	if text == units.FormatNumber(1, 5) {
		return units.FormatNumber(x, 16)
	}
	return text
}

func (c *Checker) reduction(s Step, line syntax.BlockLine) (Step, error) {
	if len(line.Items) != 2 || line.Times != nil {
		return s, syntax.Fail(line.Where, "a reduction has two numbers: across the scan, then along it", "write reduction: 4, 4")
	}
	for i, to := range []**Node{&s.X, &s.Y} {
		n, err := c.plain(line.Items[i])
		if err != nil {
			return s, err
		}
		if v, ok := n.Constant(); !n.Type.Pure() || ok && !(v > 0) {
			return s, syntax.Fail(line.Items[i].Span(), "a reduction is a number greater than 0", "write reduction: 4, 4")
		}
		*to = positive(n)
	}
	return s, nil
}

// positive makes the node of a reduction that refuses what is none.
func positive(n *Node) *Node {
	f := &Function{Name: "reduction", Call: func(x []float64) (float64, []string, error) {
		if !(x[0] > 0) {
			return 0, nil, fmt.Errorf("the reduction is %s; it is a number greater than 0", units.FormatNumber(x[0], 5))
		}
		return x[0], nil, nil
	}}
	return &Node{op: opCall, fn: f, args: []*Node{n}, At: n.At, Owner: n.Owner}
}

// factorPlanes allows a factor that is a ratio of the planes around it.
func (c *Checker) factorPlanes(ch *Chain, b *syntax.Block) error {
	for i, s := range ch.Steps {
		if s.Factor == nil || s.Factor.Type.Plane == "" {
			continue
		}
		before, after := ch.around(i)
		if want := after.times(before, -1); s.Factor.Type.Plane != want || s.Crossings != nil {
			return syntax.Fail(s.Factor.At, fmt.Sprintf("%s is a ratio at %s, and it stands between %s and %s", s.Label, s.Factor.Type.Plane, before, after),
				"number_of(x) drops a plane on purpose")
		}
	}
	return nil
}

func (ch *Chain) around(i int) (before, after Plane) {
	for k, s := range ch.Steps {
		if s.Plane != "" && k < i {
			before = s.Plane
		}
		if s.Plane != "" && k > i && after == "" {
			after = s.Plane
		}
	}
	return before, after
}

// part returns the steps between two planes and whether they run against the
// light.
func (ch *Chain) part(from, to Plane) (steps []Step, against bool, err error) {
	i := slices.IndexFunc(ch.Steps, func(s Step) bool { return s.Plane == from && from != "" })
	j := slices.IndexFunc(ch.Steps, func(s Step) bool { return s.Plane == to && to != "" })
	for _, p := range []struct {
		at   int
		name Plane
	}{{i, from}, {j, to}} {
		if p.at < 0 {
			return nil, false, fmt.Errorf("%s has no plane %s; it has %s", ch.Name, p.name, joined(ch.planes()))
		}
	}
	if i > j {
		return ch.Steps[j:i], true, nil
	}
	return ch.Steps[i:j], false, nil
}

func joined(planes []Plane) string {
	var s []string
	for _, p := range planes {
		s = append(s, string(p))
	}
	return strings.Join(s, ", ")
}
