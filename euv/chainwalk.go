package euv

import "example.com/dosewright/units"

// Passage is a line of a walk along a chain: a plane, or an element with the
// power it takes.
type Passage struct {
	Plane Plane       // "" for an element
	Label string      // of the element; "" for a plane
	Power units.Power // at the plane, or behind the element, in W
	Taken units.Power // by the element, all crossings together, in W
}

// Walk lists the power at every plane of the chain and what each element takes,
// in the order of the light, for a power at one of the planes. power is in W, 0
// or greater. Elements before the first plane are left out, for no plane says
// what reaches them. Errors: *ChainError, *ArgumentError.
func (c Chain) Walk(power units.Power, at Plane) ([]Passage, error) {
	if err := notNegative("power", power); err != nil {
		return nil, err
	}
	if _, _, err := c.between(at, at); err != nil {
		return nil, err
	}
	start, steps := c.start()
	p, err := c.CarryPower(power, at, start)
	if err != nil {
		return nil, err
	}
	var walk []Passage
	for _, s := range steps {
		switch s := s.(type) {
		case Plane:
			if s == at {
				p = power
			}
			walk = append(walk, Passage{Plane: s, Power: p})
		case Element:
			behind := p * units.Power(s.passing())
			walk = append(walk, Passage{Label: s.Label, Power: behind, Taken: p - behind})
			p = behind
		}
	}
	return walk, nil
}

// start is the first plane and the steps from there on; a chain that has a
// plane has one.
func (c Chain) start() (Plane, []Step) {
	for i, s := range c.steps {
		if p, ok := s.(Plane); ok {
			return p, c.steps[i:]
		}
	}
	return "", nil
}
