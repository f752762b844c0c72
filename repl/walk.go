package repl

import (
	"fmt"
	"math"
	"slices"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// walk follows a power through a chain: what stands at every plane, what each
// element lets pass and takes. Behind the plane where the power is given it
// goes with the light, before it against the light.
func (s *Session) walk(j job) ([]Result, error) {
	a := j.do.(*syntax.Walk)
	d := s.store.defs[a.Chain]
	if d == nil || d.node == nil || d.node.Type.Kind != program.ChainKind {
		return nil, syntax.Fail(a.ChainAt, a.Chain+" is no chain", "a chain is defined by the lines chain NAME … end; see: help chain")
	}
	c := s.checker(j.text, "")
	x, err := s.single(j.ctx, a.X, c)
	if err != nil {
		return nil, err
	}
	ch := d.node.Chain()
	start := slices.IndexFunc(ch.Steps, func(st program.Step) bool { return x.Plane != "" && string(st.Plane) == x.Plane })
	if start < 0 {
		msg := "the start stands at no plane of " + a.Chain
		if x.Plane == "" {
			msg = "it is not said at which plane this stands"
		}
		return nil, syntax.Fail(a.X.Span(), msg, "write 250 W at "+string(ch.Planes()[0])+"; planes of "+a.Chain+": "+planeList(ch.Planes()))
	}
	if !slices.Contains(walkable(), x.Unit.Dimension().WithoutCounted()) {
		return nil, syntax.Fail(a.X.Span(), s.describe(program.Type{Dim: x.Unit.Dimension()})+" does not pass a chain unchanged by areas", "walk takes a power, an energy, a photon number or a photon rate")
	}
	return s.walkFrom(ch, start, x, c)
}

func walkable() []units.Dimension {
	return []units.Dimension{units.DimensionOf[units.Power](), units.DimensionOf[units.Energy](), units.DimensionOf[units.Count](), units.DimensionOf[units.Rate]()}
}

func planeList(planes []program.Plane) string {
	s := ""
	for i, p := range planes {
		if i > 0 {
			s += ", "
		}
		s += string(p)
	}
	return s
}

func (s *Session) walkFrom(ch *program.Chain, start int, x *Value, c *program.Checker) ([]Result, error) {
	factors := make([]float64, len(ch.Steps)) // 1 where nothing is taken
	var doubts []string
	for i, st := range ch.Steps {
		factors[i] = 1
		if st.All == nil {
			continue
		}
		f, warnings, err := s.compute(c.Factor(ch, i, st.All.At))
		if err != nil {
			return nil, s.blame(err, c)
		}
		factors[i] = f
		for _, w := range warnings {
			if !slices.Contains(doubts, w) {
				doubts = append(doubts, w)
			}
		}
	}
	behind := make([]float64, len(ch.Steps)) // what stands behind each step
	behind[start] = x.SI
	for i := start + 1; i < len(behind); i++ {
		behind[i] = behind[i-1] * factors[i]
	}
	for i := start - 1; i >= 0; i-- {
		behind[i] = behind[i+1] / factors[i+1]
	}
	if math.IsInf(behind[0], 0) || math.IsNaN(behind[0]) {
		return nil, &syntax.Error{Msg: "an element lets nothing pass, so that nothing is known of what stands before it", Hint: "start at the first plane", Cause: ErrDivision}
	}
	largest := slices.Max(behind)
	unit := s.display(largest, program.Type{Dim: x.Unit.Dimension()})
	t := walkTable(ch, factors, behind, unit, s.quantityName(x))
	t.Warnings = doubts
	if !ch.Spectral {
		return []Result{t}, nil
	}
	said, err := s.againstPeak(ch, c)
	if err != nil {
		return nil, s.blame(err, c)
	}
	return []Result{t, said}, nil
}

// againstPeak says how what a chain passes in its band differs from the product
// at its brightest wavelength.
func (s *Session) againstPeak(ch *program.Chain, c *program.Checker) (*Text, error) {
	planes := ch.Planes()
	from, to := planes[0], planes[len(planes)-1]
	n, err := c.Spectrum(ch, from, to, syntax.Span{})
	if err != nil {
		return nil, err
	}
	whole, err := c.Transmission(ch, from, to, syntax.Span{})
	if err != nil {
		return nil, err
	}
	mean, _, err := s.compute(whole)
	if err != nil {
		return nil, err
	}
	length := program.Type{Dim: units.DimensionOf[units.Length]()}
	peak, _, err := s.compute(brightest(c, ch, n, "", func(p euv.Peak) (float64, error) { return p.Value, nil }, program.Type{}))
	if err != nil {
		return &Text{content: []string{"in the band " + units.FormatNumber(mean, s.digits) + "; the product has no single brightest wavelength near it"}}, nil
	}
	at, _, err := s.compute(brightest(c, ch, n, "", func(p euv.Peak) (float64, error) { return float64(p.Wavelength), nil }, length))
	if err != nil {
		return nil, err
	}
	return &Text{content: []string{fmt.Sprintf("in the band %s; at the brightest wavelength, %s, %s: the band has %s %% of that",
		units.FormatNumber(mean, s.digits), s.sys.TextIn(at, s.display(at, length), s.digits), units.FormatNumber(peak, s.digits), units.FormatNumber(100*mean/peak, 3))}}, nil
}

func (s *Session) quantityName(x *Value) string {
	if name := s.sys.Name(x.Unit.Dimension()); name != "" && !x.Unit.Dimension().IsNumber() {
		return name
	}
	return "photons"
}

func walkTable(ch *program.Chain, factors, behind []float64, unit units.Unit, name string) *Table {
	u := unit.String()
	t := &Table{Columns: []Column{{"where", ""}, {"factor", ""}, {name, u}, {"taken", u}}}
	for i, st := range ch.Steps {
		switch {
		case st.Plane != "":
			t.Rows = append(t.Rows, []Cell{word("at " + string(st.Plane)), word(""), number(unit.From(behind[i])), word("")})
		case st.All != nil:
			before := behind[i] / factors[i]
			if i > 0 {
				before = behind[i-1]
			}
			t.Rows = append(t.Rows, []Cell{word("  " + st.Label), number(factors[i]), number(unit.From(behind[i])), number(unit.From(before - behind[i]))})
		}
	}
	return t
}
