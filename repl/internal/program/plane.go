package program

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"example.com/dosewright/units"
)

// Plane says where in the light's way a quantity stands: "IF", a ratio such
// as "WAFER/IF", or a power of it. "" is no plane. It counts like a dimension
// of its own: products add, quotients subtract.
type Plane string

// Known planes, in the order light meets them: SOURCE is in-band into 2π sr, IF
// behind collector, gas and filter, MASK on the mask before reflection, WAFER
// on top of the resist.
var knownPlanes = [...]Plane{"SOURCE", "IF", "MASK", "WAFER"}

// times returns p·q, or p/q with sign −1.
func (p Plane) times(q Plane, sign int) Plane {
	if q == "" {
		return p
	}
	if p == "" && sign > 0 {
		return q
	}
	e := p.exponents()
	for name, n := range q.exponents() {
		e[name] += sign * n
	}
	return planeOf(e)
}

// power returns p to the power num/den, with the errors that dimensions have.
func (p Plane) power(num, den int) (Plane, error) {
	if p == "" {
		return "", nil
	}
	e := p.exponents()
	for name, n := range e {
		if n*num%den != 0 {
			return "", units.ErrRoot
		}
		if e[name] = n * num / den; max(e[name], -e[name]) > largestExponent {
			return "", units.ErrExponent
		}
	}
	return planeOf(e), nil
}

const (
	sixths          = 6 // exponents are held in sixths, as those of dimensions
	largestExponent = 21 * sixths
)

// exponents are in sixths.
func (p Plane) exponents() map[string]int {
	e := map[string]int{}
	over, under := p.sides()
	for _, f := range strings.Split(over, "·") {
		name, n := planeFactor(f)
		e[name] += n
	}
	for _, f := range strings.Split(under, "·") {
		name, n := planeFactor(f)
		e[name] -= n
	}
	delete(e, "")
	delete(e, "1")
	return e
}

// sides cuts a plane at its solidus, which is none of those in parentheses.
func (p Plane) sides() (over, under string) {
	depth := 0
	for i, r := range p {
		switch r {
		case '(':
			depth++
		case ')':
			depth--
		case '/':
			if depth == 0 {
				return string(p[:i]), string(p[i+1:])
			}
		}
	}
	return string(p), ""
}

// planeFactor reads "IF", "IF^2" or "IF^(1/3)"; the exponent is in sixths.
func planeFactor(text string) (name string, n int) {
	name, power, raised := strings.Cut(text, "^")
	if !raised {
		return name, sixths
	}
	over, under, fraction := strings.Cut(strings.Trim(power, "()"), "/")
	n, _ = strconv.Atoi(over) // planePower wrote it
	if den, _ := strconv.Atoi(under); fraction && den > 0 {
		return name, n * sixths / den
	}
	return name, n * sixths
}

func planeOf(e map[string]int) Plane {
	var over, under []string
	for name, n := range e {
		switch {
		case n > 0:
			over = append(over, planePower(name, n))
		case n < 0:
			under = append(under, planePower(name, -n))
		}
	}
	slices.Sort(over)
	slices.Sort(under)
	if len(over) == 0 && len(under) > 0 {
		over = []string{"1"}
	}
	s := strings.Join(over, "·")
	if len(under) > 0 {
		s += "/" + strings.Join(under, "·")
	}
	return Plane(s)
}

func planePower(name string, n int) string {
	switch {
	case n == sixths:
		return name
	case n%sixths == 0:
		return fmt.Sprintf("%s^%d", name, n/sixths)
	case n%3 == 0:
		return fmt.Sprintf("%s^(%d/2)", name, n/3)
	case n%2 == 0:
		return fmt.Sprintf("%s^(%d/3)", name, n/2)
	}
	return fmt.Sprintf("%s^(%d/6)", name, n)
}

// plane reads "IF" or "WAFER/IF" and checks that its parts are known.
func (c *Checker) plane(text string) (Plane, error) {
	over, under, ratio := strings.Cut(text, "/")
	for _, name := range []string{over, under} {
		if name != "" && !c.knownPlane(Plane(name)) {
			return "", fmt.Errorf("%s is no plane that is known here", name)
		}
	}
	switch {
	case ratio && over == under:
		return "", fmt.Errorf("a ratio at one plane has none")
	case ratio && under == "" || over == "":
		return "", fmt.Errorf("%s is no plane", text)
	}
	return Plane(over).times(Plane(under), -1), nil
}

// KnownPlane says whether a name is a plane in every session.
func KnownPlane(name string) bool { return slices.Contains(knownPlanes[:], Plane(name)) }

func (c *Checker) knownPlane(p Plane) bool {
	return KnownPlane(string(p)) || slices.Contains(c.Scope.Planes(), p)
}

// planesHint is the way on from a text that names no known plane.
func (c *Checker) planesHint(text string) string {
	var names []string
	for _, p := range append(slices.Clone(knownPlanes[:]), c.Scope.Planes()...) {
		if strings.EqualFold(string(p), text) {
			return "did you mean " + string(p) + "? Upper and lower case differ"
		}
		if !slices.Contains(names, string(p)) {
			names = append(names, string(p))
		}
	}
	return "known are " + strings.Join(names, ", ") + "; a chain's line at NAME makes others"
}

// mayStand says whether a quantity of this dimension may be said to be at a
// plane: power, energy, photon number and rate, irradiance and fluence, each
// also per counted thing.
func mayStand(d units.Dimension) bool {
	d = d.WithoutCounted()
	for _, ok := range []units.Dimension{
		units.DimensionOf[units.Power](), units.DimensionOf[units.Energy](), units.DimensionOf[units.Count](),
		units.DimensionOf[units.Rate](), units.DimensionOf[units.Irradiance](), units.DimensionOf[units.Fluence](),
		units.DimensionOf[units.ArealDensity](),
	} {
		if d == ok {
			return true
		}
	}
	return false
}
