package study

// drawable refuses groups that have no common distribution: correlated inputs
// are drawn from the multivariate normal or t-distribution (JCGM 101:2008, 6.4.8;
// JCGM 102:2011, 5.3.2; the latter from memory).
func (s *Sources) drawable() error {
	for _, g := range s.groups {
		for _, slot := range g.slots {
			in := s.inputs[slot]
			switch {
			case g.root == nil:
			case in.Shape != Normal:
				return refuse(ErrCorrelation, "input %d is correlated, so it must be normal to be drawn together with %v", slot, g.slots)
			case in.DoF != g.dof:
				return refuse(ErrCorrelation, "the correlated inputs %v must have the same degrees of freedom to be drawn together: "+
					"input %d has %g, another has %g (0 for infinitely many)", g.slots, slot, in.DoF, g.dof)
			}
		}
	}
	return nil
}

// drawer fills blocks of lanes with samples of the sources. It belongs to one
// goroutine.
type drawer struct {
	*Sources
	stream
	lanes [][]float64
	spare []float64
}

func newDrawer(s *Sources) *drawer {
	d := &drawer{s, newStream(), grid(s.Len(), BlockSize), make([]float64, BlockSize)}
	for slot, in := range s.inputs {
		fill(d.lanes[slot], in.Value)
	}
	return d
}

// draw fills the first width lanes of every uncertain slot.
func (d *drawer) draw(width int) {
	for i := range d.groups {
		d.group(&d.groups[i], width)
	}
}

func (d *drawer) group(g *group, width int) {
	slot := g.slots[0]
	in, row := d.inputs[slot], d.lanes[slot][:width]
	switch {
	case in.Shape == Rectangular:
		d.rectangular(row, in.Low, in.High)
	case in.Shape == Triangular:
		d.triangular(row, in.Low, in.High)
	case g.root == nil && g.dof == 0:
		d.normal(row, in.Value, in.U)
	default:
		d.together(g, width)
	}
}

// together draws standard deviates, correlates them from the last row up, so
// that one place serves before and after, widens them to a t-distribution and
// sets them in place.
func (d *drawer) together(g *group, width int) {
	for _, slot := range g.slots {
		d.normals(d.lanes[slot][:width])
	}
	for i := len(g.root) - 1; i >= 0; i-- {
		row := d.lanes[g.slots[i]][:width]
		scale(row, g.root[i][i])
		for j, slot := range g.slots[:i] {
			addScaled(row, g.root[i][j], d.lanes[slot])
		}
	}
	spare := d.spare[:width]
	fill(spare, 1)
	if g.dof > 0 {
		d.widening(spare, g.dof)
	}
	for _, slot := range g.slots {
		in, row := d.inputs[slot], d.lanes[slot][:width]
		for i, z := range row {
			row[i] = in.Value + in.U*z*spare[i]
		}
	}
}

func scale(row []float64, by float64) {
	for i := range row {
		row[i] *= by
	}
}

// addScaled adds a multiple of other, which is at least as long.
func addScaled(row []float64, by float64, other []float64) {
	other = other[:len(row)]
	for i := range row {
		row[i] += by * other[i]
	}
}
