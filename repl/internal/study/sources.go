package study

import "math"

// Correlation is the correlation coefficient of two inputs, told by their slots.
type Correlation struct {
	A, B int
	R    float64 // from −1 to 1
}

// Sources are the inputs of a program, one for each slot, with what is known of
// them together. They are immutable and safe for concurrent use.
type Sources struct {
	inputs []Input
	groups []group
	in     []int // in[slot] is the slot's group, −1 for an exact input
}

// group is a set of inputs that are connected by correlations; an input that is
// correlated with no other is a group alone. root is the lower triangle L with
// L·Lᵀ = the correlation matrix; nil for an input alone.
type group struct {
	slots []int
	r     [][]float64
	root  [][]float64
	dof   float64 // of the group: the smallest, 0 for infinitely many
}

// NewSources checks the inputs and their correlations; pairs that are not
// mentioned are uncorrelated. Errors: ErrInput, ErrCorrelation, the latter also
// where coefficients contradict each other (the matrix must be positive
// semi-definite; coefficients of exactly ±1 are allowed).
func NewSources(inputs []Input, pairs ...Correlation) (*Sources, error) {
	s := &Sources{inputs: make([]Input, len(inputs)), in: make([]int, len(inputs))}
	for i, in := range inputs {
		var err error
		if s.inputs[i], err = in.settled(i); err != nil {
			return nil, err
		}
	}
	known := map[[2]int]float64{}
	for _, p := range pairs {
		if err := s.accept(known, p); err != nil {
			return nil, err
		}
	}
	s.connect(pairs)
	for i := range s.groups {
		if err := s.groups[i].factor(known); err != nil {
			return nil, err
		}
	}
	return s, nil
}

// accept checks one coefficient and notes it in both directions.
func (s *Sources) accept(known map[[2]int]float64, p Correlation) error {
	for _, i := range []int{p.A, p.B} {
		if i < 0 || i >= len(s.inputs) {
			return refuse(ErrCorrelation, "there is no input %d to be correlated", i)
		}
		if !s.inputs[i].uncertain() {
			return refuse(ErrCorrelation, "input %d has no uncertainty, so it is correlated with nothing", i)
		}
	}
	before, twice := known[[2]int{p.A, p.B}]
	switch {
	case p.A == p.B:
		return refuse(ErrCorrelation, "input %d cannot be correlated with itself", p.A)
	case !(math.Abs(p.R) <= 1):
		return refuse(ErrCorrelation, "%g is no correlation coefficient: it lies between -1 and 1", p.R)
	case twice && before != p.R:
		return refuse(ErrCorrelation, "inputs %d and %d have two correlation coefficients, %g and %g", p.A, p.B, before, p.R)
	}
	known[[2]int{p.A, p.B}], known[[2]int{p.B, p.A}] = p.R, p.R
	return nil
}

// connect gathers the groups, each in the order of its slots.
func (s *Sources) connect(pairs []Correlation) {
	lead := make([]int, len(s.inputs)) // the first slot of each one's group
	for i := range lead {
		lead[i] = i
	}
	for _, p := range pairs {
		low, high := min(lead[p.A], lead[p.B]), max(lead[p.A], lead[p.B])
		if p.R == 0 || low == high {
			continue
		}
		for k := range lead {
			if lead[k] == high {
				lead[k] = low
			}
		}
	}
	for i, in := range s.inputs {
		switch {
		case !in.uncertain():
			s.in[i] = -1
			continue
		case lead[i] == i:
			s.in[i] = len(s.groups)
			s.groups = append(s.groups, group{})
		default:
			s.in[i] = s.in[lead[i]]
		}
		s.groups[s.in[i]].add(i, in.DoF)
	}
}

func (g *group) add(slot int, dof float64) {
	g.slots = append(g.slots, slot)
	if dof > 0 && (g.dof == 0 || dof < g.dof) {
		g.dof = dof
	}
}

// R is the correlation coefficient of two inputs; an input goes with itself.
func (s *Sources) R(i, j int) float64 {
	switch {
	case i == j:
		return 1
	case s.in[i] < 0 || s.in[i] != s.in[j]:
		return 0
	}
	g := s.groups[s.in[i]]
	return g.r[g.place(i)][g.place(j)]
}

func (g *group) place(slot int) int {
	for k, s := range g.slots {
		if s == slot {
			return k
		}
	}
	return -1
}

// Input is the input of a slot, with Value and U worked out.
func (s *Sources) Input(slot int) Input { return s.inputs[slot] }

// Len is the number of slots.
func (s *Sources) Len() int { return len(s.inputs) }

// Values are the best estimates of all slots.
func (s *Sources) Values() []float64 {
	v := make([]float64, len(s.inputs))
	for i, in := range s.inputs {
		v[i] = in.Value
	}
	return v
}
