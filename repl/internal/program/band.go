package program

import (
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// band reads "band: 13.5 nm, 2 %": centre and full width, the width a part of
// the centre or a length.
func (c *Checker) band(ch *Chain, line syntax.BlockLine) error {
	length := units.DimensionOf[units.Length]()
	if len(line.Items) != 2 || line.Times != nil {
		return syntax.Fail(line.Where, "a band has a centre and a full width", "write band: 13.5 nm, 2 %")
	}
	center, err := c.Quantity(line.Items[0], length, "the centre of a band")
	if err != nil {
		return err
	}
	width, err := c.plain(line.Items[1])
	if err != nil {
		return err
	}
	at := line.Items[1].Span()
	switch t := width.Type; {
	case t.Kind == Number && t.Dim == length:
	case t.Pure():
		width = c.made(Node{op: opMul, args: []*Node{center, width}, Type: Type{Dim: length}}, at)
	default:
		return syntax.Fail(at, "the width of a band is a part of its centre or a length, not "+c.describe(t), "write band: 13.5 nm, 2 %")
	}
	if center.runs() || width.runs() {
		return syntax.Fail(line.Where, "a band does not depend on the running wavelength", "write band: 13.5 nm, 2 %")
	}
	ch.Center, ch.Width = center, width
	return nil
}

// weight reads "spectrum: f(λ)", the spectrum of the source in any unit.
func (c *Checker) weight(ch *Chain, line syntax.BlockLine) error {
	if len(line.Items) != 1 || line.Times != nil {
		return syntax.Fail(line.Where, "the source has one spectrum", "write spectrum: f(λ)")
	}
	n, err := c.plain(line.Items[0])
	if err != nil {
		return err
	}
	ch.Weight = n
	ch.Spectral = ch.Spectral || n.runs()
	return nil
}
