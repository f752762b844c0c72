package study

import (
	"context"
	"math"
)

// Budget is the uncertainty budget of one output to first order (JCGM 100:2008,
// 5.1 and 5.2).
type Budget struct {
	Value float64        // of the output at the best estimates
	U     float64        // its combined standard uncertainty
	DoF   float64        // effective degrees of freedom, 0 for infinitely many
	Rows  []Contribution // of the uncertain inputs, in the order of the slots

	// Second tells what the first order leaves out.
	Second SecondOrder
}

// Contribution is what one input gives to a budget.
type Contribution struct {
	Slot     int
	C        float64 // sensitivity coefficient ∂f/∂x
	U        float64 // |C| u(x), in the unit of the output
	Share    float64 // of the squared uncertainty; the shares add up to 1, and one may be negative when inputs are correlated
	OneSided bool    // the model has values on one side of the input only
}

// FirstOrder states the budget of f. Errors: those of f at the estimates and
// around them, ErrNotFinite, and that of ctx.
//
// A correlated group counts as one source in the effective degrees of freedom
// (Welch–Satterthwaite, JCGM 100:2008, G.4.1, asks for independent ones), with
// the smallest number that one of its inputs has.
func FirstOrder(ctx context.Context, f Eval, s *Sources) (*Budget, error) {
	x := s.Values()
	value, err := f.at(x)
	if err != nil {
		return nil, err
	}
	b := &Budget{Value: value}
	noise := f.noise(s, value)
	parts := make([]float64, len(x)) // C·u(x) of every slot, signed
	for slot, in := range s.inputs {
		if !in.uncertain() {
			continue
		}
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		c, oneSided, err := f.slope(x, slot, in.U)
		if err != nil {
			return nil, err
		}
		if math.Abs(c*in.U) <= aboveNoise*noise {
			c = 0 // what rounding leaves of inputs that cancel
		}
		parts[slot] = c * in.U
		b.Rows = append(b.Rows, Contribution{Slot: slot, C: c, U: math.Abs(parts[slot]), OneSided: oneSided})
	}
	b.combine(s, parts, aboveNoise*noise)
	if !finite(b.U * b.U) {
		return nil, ErrNotFinite
	}
	b.Second, err = f.secondOrder(ctx, s, b, noise)
	return b, err
}

// combine works out the combined uncertainty, which is 0 when no more than
// rounding is left, the shares and the degrees of freedom.
func (b *Budget) combine(s *Sources, parts []float64, rounding float64) {
	shared := make([]float64, len(parts))
	variances := make([]float64, len(s.groups))
	var square float64
	for i, g := range s.groups {
		variances[i] = g.along(parts, shared)
		square += variances[i]
	}
	if square <= rounding*rounding {
		return
	}
	b.U = math.Sqrt(square)
	var inverse float64 // of the effective degrees of freedom
	for i, g := range s.groups {
		if share := variances[i] / square; g.dof > 0 {
			inverse += share * share / g.dof
		}
	}
	if inverse > 0 {
		b.DoF = 1 / inverse
	}
	for i := range b.Rows {
		slot := b.Rows[i].Slot
		b.Rows[i].Share = parts[slot] * shared[slot] / square
	}
}

// along is the variance of a group's sum of parts, as a sum of squares, which
// correlations of ±1 cannot make negative. It sets shared to R·parts.
func (g *group) along(parts, shared []float64) (variance float64) {
	if g.root == nil {
		slot := g.slots[0]
		shared[slot] = parts[slot]
		return parts[slot] * parts[slot]
	}
	for k := range g.slots {
		var v float64
		for i, slot := range g.slots {
			v += g.root[i][k] * parts[slot]
		}
		for i, slot := range g.slots {
			shared[slot] += g.root[i][k] * v
		}
		variance += v * v
	}
	return variance
}

// Expanded is the expanded uncertainty with its coverage factor, for the coverage
// probability p, 0 < p < 1 (JCGM 100:2008, G.6.4). Error: ErrRange.
func (b *Budget) Expanded(p float64) (u, k float64, err error) {
	if k, err = CoverageFactor(p, b.DoF); err != nil {
		return 0, 0, err
	}
	return k * b.U, k, nil
}

// Covariance of two outputs of the same sources, to first order (JCGM 100:2008,
// H.2.3, note 2).
func (s *Sources) Covariance(a, b *Budget) float64 {
	parts, shared := make([]float64, s.Len()), make([]float64, s.Len())
	for _, row := range a.Rows {
		parts[row.Slot] = row.C * s.inputs[row.Slot].U
	}
	for _, g := range s.groups {
		g.along(parts, shared)
	}
	var sum float64
	for _, row := range b.Rows {
		sum += shared[row.Slot] * row.C * s.inputs[row.Slot].U
	}
	return sum
}
