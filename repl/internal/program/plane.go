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

// power returns p to the power num/den; ok is false when that has no sixths.
func (p Plane) power(num, den int) (Plane, bool) {
	e := p.exponents()
	for name, n := range e {
		if n*num%den != 0 {
			return "", false
		}
		e[name] = n * num / den
	}
	return planeOf(e), true
}

// exponents are in sixths, as those of dimensions.
func (p Plane) exponents() map[string]int {
	e := map[string]int{}
	over, under, _ := strings.Cut(string(p), "/")
	for sign, part := range map[int]string{6: over, -6: under} {
		for _, f := range strings.Split(part, "·") {
			name, power, raised := strings.Cut(f, "^")
			n := sign
			if raised {
				x, _ := strconv.ParseFloat(power, 64)
				n = int(x * float64(sign))
			}
			if name != "" && name != "1" {
				e[name] += n
			}
		}
	}
	return e
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
	if n == 6 {
		return name
	}
	return name + "^" + strconv.FormatFloat(float64(n)/6, 'g', 4, 64)
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

func (c *Checker) knownPlane(p Plane) bool {
	return slices.Contains(knownPlanes[:], p) || slices.Contains(c.Scope.Planes(), p)
}

func (c *Checker) planesHint() string {
	var names []string
	for _, p := range append(slices.Clone(knownPlanes[:]), c.Scope.Planes()...) {
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
