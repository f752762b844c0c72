package program

import (
	"fmt"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Transmission makes the node of the factor between two planes of a chain; it
// stands at to/from.
func (c *Checker) Transmission(ch *Chain, from, to Plane, at syntax.Span) (*Node, error) {
	steps, against, err := ch.part(from, to)
	if err != nil {
		return nil, syntax.Fail(at, err.Error(), "a chain's line at NAME makes a plane")
	}
	n := c.between(ch, steps, at)
	if against {
		n = c.made(Node{op: opDiv, args: []*Node{c.constant(1, Type{}, at), n}}, at)
	}
	n.Type = Type{Plane: to.times(from, -1)}
	return n, nil
}

// between makes the node of the factor of neighbouring steps. In a chain with
// spectra it is the ratio of what is left in the band behind them to what was
// left before, so that factors multiply.
func (c *Checker) between(ch *Chain, steps []Step, at syntax.Span) *Node {
	if !ch.Spectral || len(steps) == 0 {
		return c.product(steps, at)
	}
	first := 0
	for i := range ch.Steps {
		if &ch.Steps[i] == &steps[0] {
			first = i
		}
	}
	behind := c.inBand(ch, ch.Steps[:first+len(steps)], at)
	if first == 0 {
		return behind
	}
	before := c.inBand(ch, ch.Steps[:first], at)
	return c.made(Node{op: opDiv, args: []*Node{behind, before}}, at)
}

// Factor makes the node of the factor of one step of a chain, in the band.
func (c *Checker) Factor(ch *Chain, i int, at syntax.Span) *Node {
	return c.between(ch, ch.Steps[i:i+1], at)
}

// Peak makes the node of the product of elements between two planes at one
// wavelength, as a function of it.
func (c *Checker) Spectrum(ch *Chain, from, to Plane, at syntax.Span) (*Node, error) {
	steps, _, err := ch.part(from, to)
	if err != nil {
		return nil, syntax.Fail(at, err.Error(), "a chain's line at NAME makes a plane")
	}
	return c.product(steps, at), nil
}

// Carry makes the node of a power, energy, photon number or rate taken from its
// own plane to another; fluence and irradiance go between MASK and WAFER alone,
// where the reduction gives the ratio of areas.
func (c *Checker) Carry(n *Node, x syntax.Expr, ch *Chain, to Plane, at syntax.Span) (*Node, error) {
	t := n.Type
	if t.Plane == "" || len(t.Plane.exponents()) != 1 || t.Plane.exponents()[string(t.Plane)] != 6 {
		hint := "say where it stands: " + c.text(x.Span()) + " at IF"
		if t.Plane != "" {
			hint = "carry takes what stands at one plane, such as 250 W at IF"
		}
		return nil, syntax.Fail(x.Span(), c.text(x.Span())+" stands at no single plane to be carried from", hint)
	}
	factor, err := c.Transmission(ch, t.Plane, to, at)
	if err != nil {
		return nil, err
	}
	areas, err := c.areaRatio(t, x, ch, to, at)
	if err != nil {
		return nil, err
	}
	out := c.made(Node{op: opMul, args: []*Node{n, factor}}, at)
	if areas != nil {
		out = c.made(Node{op: opMul, args: []*Node{out, areas}}, at)
	}
	out.Type = Type{Dim: t.Dim, Plane: to}
	return out, nil
}

// areaRatio is nil for what is not per area; else the factor by which the
// reduction concentrates, which exists between MASK and WAFER alone.
func (c *Checker) areaRatio(t Type, x syntax.Expr, ch *Chain, to Plane, at syntax.Span) (*Node, error) {
	switch d := t.Dim.WithoutCounted(); d {
	case units.DimensionOf[units.Power](), units.DimensionOf[units.Energy](), units.DimensionOf[units.Count](), units.DimensionOf[units.Rate]():
		return nil, nil
	case units.DimensionOf[units.Fluence](), units.DimensionOf[units.Irradiance](), units.DimensionOf[units.ArealDensity]():
	default:
		return nil, syntax.Fail(x.Span(), c.describe(t)+" is not carried by a chain", "carry takes power, energy, photon number and rate; fluence and irradiance between MASK and WAFER")
	}
	if t.Plane == to {
		return nil, nil
	}
	toWafer := t.Plane == "MASK" && to == "WAFER"
	if !toWafer && !(t.Plane == "WAFER" && to == "MASK") {
		return nil, syntax.Fail(x.Span(), fmt.Sprintf("%s is per area, and the beam's area at %s is not known", c.describe(t), to),
			"fluence and irradiance go between MASK and WAFER; carry a power elsewhere")
	}
	for _, s := range ch.Steps {
		if s.X == nil {
			continue
		}
		area := c.made(Node{op: opMul, args: []*Node{s.X, s.Y}}, at)
		if toWafer {
			return area, nil
		}
		return c.made(Node{op: opDiv, args: []*Node{c.constant(1, Type{}, at), area}}, at), nil
	}
	return nil, syntax.Fail(at, ch.Name+" states no reduction, which gives the ratio of areas between MASK and WAFER", "add the line reduction: 4, 4 to the chain")
}
