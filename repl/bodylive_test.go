package repl

import (
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// A value follows its chain, the chain its stack, the stack its material and
// all the names in them.
func TestBodiesAreLive(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "d = 7 nm", "n = 50", "density = 2.2 g/cm^3", "material cap = SiO2 density",
		"stack mirror\n  top: cap 2 nm\n  bilayer x(n): Si (0.6*d), Mo (0.4*d)\n  roughness: 0.5 nm\n  substrate: cap\nend",
		"chain line\n  band: 13.5 nm, 2 %\n  at IF\n  m x6: reflectivity(mirror, λ)\n  at WAFER\nend",
		"T = transmission(line, IF, WAFER)", "P = carry(250 W at IF, line, WAFER)")
	// the same, all numbers written out, in a session that knows nothing else
	fresh := func(top, density, d, n, sigma string) float64 {
		other := NewSession(Config{})
		spoken(t, other, "material cap = SiO2 "+density, "d = "+d,
			"stack mirror\n  top: "+top+"\n  bilayer x"+n+": Si (0.6*d), Mo (0.4*d)\n  roughness: "+sigma+"\n  substrate: cap\nend",
			"chain line\n  band: 13.5 nm, 2 %\n  at IF\n  m x6: reflectivity(mirror, λ)\n  at WAFER\nend")
		return valued(t, other, "transmission(line, IF, WAFER)").SI
	}
	same := func(what string, want float64) {
		t.Helper()
		near.Rel(t, what, valued(t, s, "T").SI, want, 1e-13)
		near.Rel(t, what+", carried", valued(t, s, "P").SI, 250*want, 1e-13)
	}
	same("at first", fresh("cap 2 nm", "2.2 g/cm^3", "7 nm", "50", "0.5 nm"))
	spoken(t, s, "d = 6.9 nm")
	same("a period", fresh("cap 2 nm", "2.2 g/cm^3", "6.9 nm", "50", "0.5 nm"))
	spoken(t, s, "n = 40")
	same("the bilayers", fresh("cap 2 nm", "2.2 g/cm^3", "6.9 nm", "40", "0.5 nm"))
	spoken(t, s, "density = 2.6 g/cm^3")
	same("a name in a material", fresh("cap 2 nm", "2.6 g/cm^3", "6.9 nm", "40", "0.5 nm"))
	spoken(t, s, "stack mirror\n  top: cap 3 nm\n  bilayer x(n): Si (0.6*d), Mo (0.4*d)\n  roughness: 0.3 nm\n  substrate: cap\nend")
	same("the stack", fresh("cap 3 nm", "2.6 g/cm^3", "6.9 nm", "40", "0.3 nm"))
	spoken(t, s, "material cap = C 2.2 g/cm^3", "material other = C 2.2 g/cm^3")
	near.Rel(t, "the material", valued(t, s, "T").SI, func() float64 {
		spoken(t, s, "stack carbon\n  top: other 3 nm\n  bilayer x(n): Si (0.6*d), Mo (0.4*d)\n  roughness: 0.3 nm\n  substrate: other\nend",
			"chain other_line\n  band: 13.5 nm, 2 %\n  at IF\n  m x6: reflectivity(carbon, λ)\n  at WAFER\nend")
		return valued(t, s, "transmission(other_line, IF, WAFER)").SI
	}(), 1e-13)
}

// What would break something that rests on it is refused and names it; what
// makes no sense by itself is refused too; both leave everything as it was.
func TestBrokenBodiesChangeNothing(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "material cap = SiO2 2.2 g/cm^3", "d = 7 nm",
		"stack mirror\n  top: cap 2 nm\n  bilayer x50: Si (0.6*d), Mo (0.4*d)\n  substrate: cap\nend",
		"chain line\n  at IF\n  m x6: reflectivity(mirror, λ)\n  at WAFER\nend",
		"R = reflectivity(mirror, 13.5 nm)", "T = transmission(line, IF, WAFER)")
	before := []float64{valued(t, s, "R").SI, valued(t, s, "T").SI}
	unmoved := func(what string) {
		t.Helper()
		near.Rel(t, "R after "+what, valued(t, s, "R").SI, before[0], 0)
		near.Rel(t, "T after "+what, valued(t, s, "T").SI, before[1], 0)
	}
	for statement, message := range map[string]string{
		"material cap = SiO2 0 g/cm^3":                       "density is 0 g/cm³; it must be greater than 0 and at most 30 g/cm³",
		"material cap = SiO2 2.2 nm":                         "the density of a material is density (g/cm³), not length (m)",
		"material cap = Sio2 2.2 g/cm^3":                     "formula \"Sio2\"",
		"material cap = SiO2 nowhere":                        "nowhere is no name that is known here",
		"mirror = 5 nm":                                      "rest on mirror and would break",
		"d = 7 mJ":                                           "mirror",
		"forget mirror":                                      "others rest on mirror: ",
		"stack mirror\n  top: cap 0 nm\nend":                 "top of mirror: the layer of cap has the thickness 0 m; it must be greater than 0 and at most 1 m",
		"stack mirror\n  top: nothing 3 nm\nend":             "nothing is no material that is known here",
		"stack mirror\nend":                                  "mirror has no layers",
		"stack mirror\n  top: Si (3 nm * R)\nend":            "mirror would rest on itself",
		"stack mirror\n  top: Si (3 nm * number_of(T))\nend": "mirror would rest on itself",
		"stack mirror\n  top: Si (3 nm * T)\nend":            "a thickness stands at no plane, and this is at WAFER/IF",
		"chain line\n  at IF\n  m: 120 %\n  at WAFER\nend":   "m is 1.2000; a factor lies between 0 and 1",
		"chain line\n  at IF\n  m: T\n  at WAFER\nend":       "line would rest on itself",
		"chain line\n  at IF\n  m: 50 %\n  at MASK\nend":     "would break: line has no plane WAFER",
		"chain line\n  at IF\n  m: reflectivity(film(Si, 5 nm), λ)\n  at WAFER\nend": "a film here absorbs only",
	} {
		r := heard(s, statement)
		if r.Err == nil || !strings.Contains(r.Err.Error(), message) {
			t.Errorf("%s: %v, want %q", statement, r.Err, message)
		}
		unmoved(statement)
	}
}

// A refusal of what breaks names all that would.
func TestBreakingNamesWhatBreaks(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "stack mirror\n  top: Si 40 nm\nend", "R = reflectivity(mirror, 13.5 nm)", "b = mirror", "T = transmittance(b)",
		"chain line\n  at IF\n  m: reflectivity(mirror, λ)\n  at WAFER\nend")
	r := heard(s, "mirror = 5 nm")
	for _, name := range []string{"R", "b", "line"} {
		if r.Err == nil || !strings.Contains(r.Err.Error(), name) {
			t.Errorf("%v does not name %s", r.Err, name)
		}
	}
}

// Stacks may be called as units and elements are; a unit stays a unit, and a
// stack comes before a material.
func TestNamesOfStacks(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "bare = reflectivity(Si, 13.5 nm)", "stack W\n  one: Si 40 nm\nend", "stack Si\n  one: Mo 40 nm\nend", "stack m\n  one: Si 40 nm\nend")
	near.Rel(t, "5 W is a power", valued(t, s, "5 W").SI, 5, 0)
	near.Rel(t, "5 m is a length", valued(t, s, "5 m").SI, 5, 0)
	near.Rel(t, "W and m", valued(t, s, "reflectivity(W, 13.5 nm)").SI, valued(t, s, "reflectivity(m, 13.5 nm)").SI, 0)
	if stack, metal := valued(t, s, "reflectivity(Si, 13.5 nm)").SI, valued(t, s, "bare").SI; stack == metal {
		t.Errorf("the stack Si reflects %g, as silicon does", stack)
	}
	// in a layer, only materials are meant
	near.Rel(t, "Si in a layer", valued(t, s, "transmittance(film(Mo, 10 nm))").SI, valued(t, s, "exp(-attenuation(Mo) * 10 nm)").SI, 1e-12)
	refused(t, s, "film(Si, 5 nm)", "Si is no material", "element symbols are known; others are named by material NAME = SiO2 2.2 g/cm^3")
	spoken(t, s, "forget Si")
	near.Rel(t, "the element again", valued(t, s, "reflectivity(Si, 13.5 nm)").SI, valued(t, s, "bare").SI, 0)
}

// Names of materials and of values do not meet.
func TestNamesOfMaterials(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "glass = 5 nm", "material glass = SiO2 2.2 g/cm^3", "Mo = 3 nm")
	near.Rel(t, "a value", valued(t, s, "2*glass").SI, 10e-9, 1e-15)
	near.Rel(t, "the material at the value's thickness", valued(t, s, "transmittance(film(glass, glass))").SI, valued(t, s, "exp(-attenuation(glass)*glass)").SI, 1e-14)
	near.Rel(t, "an element beside a value", valued(t, s, "delta(Mo, 13.5 nm)").SI, 0.0762084, 1e-6)
	spoken(t, s, "forget glass")
	near.Rel(t, "the material stays", valued(t, s, "delta(glass, 13.5 nm)").SI, 0.02196858570639144, 1e-8)
	spoken(t, s, "film_of = film(glass, 50 nm)", "column = gas_column(H2, 5 Pa, 2 m)")
	near.Rel(t, "a name holds a film", valued(t, s, "transmittance(film_of)").SI, valued(t, s, "transmittance(film(glass, 50 nm))").SI, 0)
	near.Rel(t, "a name holds a gas", valued(t, s, "transmittance(column)").SI, valued(t, s, "transmittance(gas_column(H2, 5 Pa, 2 m))").SI, 0)
}
