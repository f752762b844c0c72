package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// Plane names a place in the light's way at which power and dose are stated.
// A chain may name its own besides the known ones.
type Plane string

// The known planes, in the order in which light meets them.
const (
	SourcePlane Plane = "SOURCE" // in-band, into 2π sr
	FocusPlane  Plane = "IF"     // intermediate focus: behind collector, gas and filter
	MaskPlane   Plane = "MASK"   // on the mask, before it reflects
	WaferPlane  Plane = "WAFER"  // on top of the resist
)

// Element is what light loses power at: a mirror, a film, a gas.
type Element struct {
	Label     string
	Factor    units.Ratio // of one crossing, 0 to 1
	Crossings int         // how often light meets it; 0 counts as 1
}

// passing is the factor of all crossings.
func (e Element) passing() float64 { return math.Pow(float64(e.Factor), float64(max(1, e.Crossings))) }

// Reduction says how many times smaller the image on the wafer is, across the
// scan and along it. It stands between MASK and WAFER.
type Reduction struct{ X, Y units.Ratio }

// Step is a Plane, an Element or a Reduction.
type Step interface{ step() }

func (Plane) step()     {}
func (Element) step()   {}
func (Reduction) step() {}

// ChainError says why steps make no chain, or why a chain does not lead where
// it was asked to. A factor or reduction out of range is an *ArgumentError
// with the label as its argument.
type ChainError struct{ Why string }

func (e *ChainError) Error() string { return e.Why }

// Chain is what light meets, in order. It never changes once made, so that
// goroutines may share it. The zero Chain has no planes and leads nowhere.
type Chain struct{ steps []Step }

// NewChain makes a chain of steps in the order of the light: at least two
// planes, each once, elements with factors from 0 to 1, and at most one
// reduction, between MASK and WAFER. Errors: *ChainError, *ArgumentError.
func NewChain(steps ...Step) (Chain, error) {
	c := Chain{append([]Step(nil), steps...)}
	planes := map[Plane]int{}
	reduction := -1
	for i, s := range c.steps {
		switch s := s.(type) {
		case Plane:
			if _, twice := planes[s]; twice || s == "" {
				return Chain{}, &ChainError{fmt.Sprintf("plane %q must have a name of its own in the chain", s)}
			}
			planes[s] = i
		case Element:
			if err := first(fraction(s.Label, s.Factor), notNegative(s.Label+" crossings", units.Count(s.Crossings))); err != nil {
				return Chain{}, err
			}
		case Reduction:
			if err := first(positive("reduction x", s.X), positive("reduction y", s.Y)); err != nil {
				return Chain{}, err
			}
			if reduction >= 0 {
				return Chain{}, &ChainError{"a chain has one reduction at most"}
			}
			reduction = i
		default:
			return Chain{}, &ChainError{"a step is a Plane, an Element or a Reduction"}
		}
	}
	if len(planes) < 2 {
		return Chain{}, &ChainError{fmt.Sprintf("a chain needs two planes or more to lead from one to the other; this has %d", len(planes))}
	}
	if reduction >= 0 {
		mask, hasMask := planes[MaskPlane]
		wafer, hasWafer := planes[WaferPlane]
		if !hasMask || !hasWafer || reduction < mask || reduction > wafer {
			return Chain{}, &ChainError{"a reduction stands between the planes MASK and WAFER"}
		}
	}
	return c, nil
}

// Transmission is the power at one plane per power at another, in either
// direction: against the light it is the inverse, greater than 1, and refused
// where an element lets nothing through. Errors: *ChainError.
func (c Chain) Transmission(from, to Plane) (units.Ratio, error) {
	part, against, err := c.between(from, to)
	if err != nil {
		return 0, err
	}
	t := 1.0
	for _, s := range part {
		if e, ok := s.(Element); ok {
			t *= e.passing()
		}
	}
	if !against {
		return units.Ratio(t), nil
	}
	if t = 1 / t; !isFinite(t) {
		return 0, &ChainError{fmt.Sprintf("no light passes from %s to %s, so nothing at %[2]s tells of %[1]s", to, from)}
	}
	return units.Ratio(t), nil
}

// CarryPower takes a power from one plane to another, in either direction.
// power is in W, 0 or greater. Errors: *ChainError, *ArgumentError.
func (c Chain) CarryPower(power units.Power, from, to Plane) (units.Power, error) {
	if err := notNegative("power", power); err != nil {
		return 0, err
	}
	t, err := c.Transmission(from, to)
	if err != nil {
		return 0, err
	}
	return answer("power", power*units.Power(t))
}

// CarryFluence takes a dose from MASK to WAFER or back; no other planes have a
// known ratio of areas. dose is in J/m², 0 or greater.
//
//	dose at WAFER = dose at MASK · transmission · reduction_x · reduction_y
//
// Errors: *ChainError, also when the chain has no reduction; *ArgumentError.
func (c Chain) CarryFluence(dose units.Fluence, from, to Plane) (units.Fluence, error) {
	if err := notNegative("dose", dose); err != nil {
		return 0, err
	}
	t, err := c.Transmission(from, to)
	if err != nil {
		return 0, err
	}
	if from == to {
		return dose, nil
	}
	if from != MaskPlane && from != WaferPlane || to != MaskPlane && to != WaferPlane {
		return 0, &ChainError{fmt.Sprintf("a dose goes between MASK and WAFER only, not from %s to %s", from, to)}
	}
	part, against, _ := c.between(from, to)
	for _, s := range part {
		if r, ok := s.(Reduction); ok {
			areas := float64(r.X) * float64(r.Y)
			if against {
				areas = 1 / areas
			}
			return answer("dose", dose*units.Fluence(float64(t)*areas))
		}
	}
	return 0, &ChainError{"the chain has no reduction, which a dose between MASK and WAFER needs"}
}

// between returns the steps between two planes and whether they run against
// the light.
func (c Chain) between(from, to Plane) (part []Step, against bool, err error) {
	i, j := c.index(from), c.index(to)
	for _, p := range []struct {
		at    int
		plane Plane
	}{{i, from}, {j, to}} {
		if p.at < 0 {
			return nil, false, &ChainError{fmt.Sprintf("the chain has no plane %s", p.plane)}
		}
	}
	if i > j {
		return c.steps[j:i], true, nil
	}
	return c.steps[i:j], false, nil
}

func (c Chain) index(p Plane) int {
	for i, s := range c.steps {
		if s == Step(p) {
			return i
		}
	}
	return -1
}
