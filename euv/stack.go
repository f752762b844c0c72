package euv

import (
	"fmt"
	"slices"

	"example.com/dosewright/units"
)

// Layer is one film of a stack.
type Layer struct {
	Medium    Medium
	Thickness units.Length // greater than 0, at most 1 m
	// Roughness is the rms roughness of the interface that light meets first,
	// the layer's upper one. It is 0 or greater.
	Roughness units.Length
}

// Repeat is a sequence of layers, in the order in which light meets them, that
// stands Times times on top of itself: a cap once, a bilayer fifty times.
type Repeat struct {
	Times  int // 1 or greater
	Layers []Layer
}

// Stack is a mirror, a filter or any other pile of plane layers in vacuum.
// Without a substrate there is vacuum below too. The zero value has no layers
// and is refused.
type Stack struct {
	Repeats   []Repeat // from the top
	Substrate Medium   // nil: none
	// BottomRoughness is the rms roughness of the lowest interface, into the
	// substrate or into the vacuum below.
	BottomRoughness units.Length
}

// Bounds on what one stack may hold, so that time and memory are bounded.
const (
	maxLayers    = 10_000    // as written
	maxInterface = 1_000_000 // as repeated
	maxThickness = units.Length(1)
)

// Once makes a sequence that stands once, such as a cap or a single film.
func Once(layers ...Layer) Repeat { return Repeat{1, layers} }

// Periods makes a sequence that repeats, such as the bilayers of a mirror.
func Periods(times int, layers ...Layer) Repeat { return Repeat{times, layers} }

// WithRoughness returns a copy of the stack with the same rms roughness at
// every interface, the lowest included.
func (s Stack) WithRoughness(sigma units.Length) Stack {
	s.Repeats = slices.Clone(s.Repeats)
	for i, r := range s.Repeats {
		layers := slices.Clone(r.Layers)
		for j := range layers {
			layers[j].Roughness = sigma
		}
		s.Repeats[i].Layers = layers
	}
	s.BottomRoughness = sigma
	return s
}

// layers calls visit with every layer as written, until it says false.
func (s Stack) layers(visit func(l Layer) bool) {
	for _, r := range s.Repeats {
		for _, l := range r.Layers {
			if !visit(l) {
				return
			}
		}
	}
}

// media lists the media of the layers and of the substrate.
func (s Stack) media() []Medium {
	var out []Medium
	s.layers(func(l Layer) bool { out = append(out, l.Medium); return true })
	if s.Substrate != nil {
		out = append(out, s.Substrate)
	}
	return out
}

// check refuses stacks that make no sense; media are checked when their index
// is asked for.
func (s Stack) check() error {
	written, interfaces := 0, 1
	for _, r := range s.Repeats {
		if r.Times < 1 {
			return outside("times", units.Count(r.Times), "1 or greater")
		}
		written += len(r.Layers)
		if len(r.Layers) == 0 || written > maxLayers || r.Times > maxInterface/len(r.Layers) {
			return outside("layers", units.Count(written), fmt.Sprintf("between 1 and %d, and repeated at most %d layers", maxLayers, maxInterface))
		}
		if interfaces += r.Times * len(r.Layers); interfaces > maxInterface {
			return outside("layers", units.Count(interfaces), fmt.Sprintf("at most %d when repeated", maxInterface))
		}
		for i := range r.Layers {
			if err := r.Layers[i].check(); err != nil {
				return err
			}
		}
	}
	if written == 0 {
		return outside("layers", units.Count(0), "1 or more; a bare substrate is a surface")
	}
	return notNegative("roughness", s.BottomRoughness)
}

func (l *Layer) check() error {
	if l.Medium == nil {
		return &BodyError{Body: "a layer without a medium", Asked: "reflection", Why: "give a material or an index"}
	}
	if !(l.Thickness > 0 && l.Thickness <= maxThickness) {
		return outside("thickness", l.Thickness, "greater than 0 and at most 1 m")
	}
	return notNegative("roughness", l.Roughness)
}

// isRough says whether any interface is rough.
func (s Stack) isRough() bool {
	rough := s.BottomRoughness > 0
	s.layers(func(l Layer) bool { rough = rough || l.Roughness > 0; return !rough })
	return rough
}

// Kinks lists the wavelengths at which the tables of its media have points; see
// Body.
func (s Stack) Kinks(low, high units.Length) []units.Length { return kinksOf(s.media(), low, high) }

// String says how many layers the stack has.
func (s Stack) String() string {
	text := fmt.Sprintf("a stack of %d layers", s.count())
	if s.Substrate != nil {
		text += " on " + s.Substrate.String()
	}
	return text
}

// count is the number of layers, repeated ones counted each time.
func (s Stack) count() int {
	n := 0
	for _, r := range s.Repeats {
		n += r.Times * len(r.Layers)
	}
	return n
}

func (s Stack) reflect(e *Evaluator, dst []units.Ratio) error {
	if err := s.check(); err != nil {
		return err
	}
	return e.reflectStack(&s, dst)
}

// Warnings lists doubts about the stack: a roughness larger than the layer, a
// density far from the solid's.
func (s Stack) Warnings() []string {
	var out []string
	note := func(w string) {
		if !slices.Contains(out, w) {
			out = append(out, w)
		}
	}
	s.layers(func(l Layer) bool {
		if l.Roughness > l.Thickness {
			note(fmt.Sprintf("the roughness %.4g nm is larger than the layer of %s below it, %.4g nm",
				nanometres(l.Roughness), l.Medium, nanometres(l.Thickness)))
		}
		return true
	})
	for _, m := range s.media() {
		for _, w := range m.warnings() {
			note(w)
		}
	}
	return out
}

func nanometres(l units.Length) float64 { return float64(l) * 1e9 }

// sortedOnce sorts a list and drops what stands twice.
func sortedOnce(list []units.Length) []units.Length {
	slices.Sort(list)
	return slices.Compact(list)
}

// clampUnit brings what left 0…1 by rounding back; what left it by more, or is
// no number, is no answer of the model.
func clampUnit(what string, v units.Ratio) (units.Ratio, error) {
	const rounding = 1e-9
	const reason = "here a roughness is too large for the Névot–Croce factor, or an index too strange"
	switch {
	case !isFinite(v):
		return 0, &BodyError{Body: "this body", Asked: what, Why: reason}
	case v < -rounding || v > 1+rounding:
		return 0, outside(what, v, "between 0 and 1: "+reason)
	}
	return min(max(v, 0), 1), nil
}
