package repl

import (
	"context"
	"fmt"
	"slices"
	"strings"
	"testing"
)

// wrong holds statements that make no sense: a statement, the message and the
// way on, apart by "=>" and "|"; a block in one line has its lines apart by ";".
const wrong = `
material x = SiO3x 2 g/cm^3 => formula "SiO3x": 'x' stands where an element symbol is wanted; a formula is symbols, counts and parentheses | a formula is such as SiO2, C5H8O2 or Ca(OH)2; upper and lower case count
material x = siO2 2.2 g/cm^3 => formula "siO2": element symbols start with a capital: Si, not si | a formula is such as SiO2, C5H8O2 or Ca(OH)2; upper and lower case count
material x = Xx 2 g/cm^3 => formula "Xx": Xx is no element of the tables | a formula is such as SiO2, C5H8O2 or Ca(OH)2; upper and lower case count
material x = SiO2 0 g/cm^3 => density is 0 g/cm³; it must be greater than 0 and at most 30 g/cm³ | write material x = SiO2 2.2 g/cm^3
material x = SiO2 99 g/cm^3 => density is 99 g/cm³; it must be greater than 0 and at most 30 g/cm³ | write material x = SiO2 2.2 g/cm^3
material x = SiO2 2.2 => the density of a material is density (g/cm³), not a pure number | give it in g/cm³
stack x; cap: Xx 2 nm; end => Xx is no material that is known here | element symbols are known; others are named by material Xx = SiO2 2.2 g/cm^3, with its own density
stack x; cap: B4C 2 nm; end => B4C is no material that is known here | element symbols are known; others are named by material B4C = B4C 2.2 g/cm^3, with its own density
stack x; cap: Si 2 nm; substrate: glass; end => glass is no material that is known here | element symbols are known; others are named by material glass = SiO2 2.2 g/cm^3, with its own density
stack x; cap: Si 0 nm; end => cap of x: the layer of Si has the thickness 0 m; it must be greater than 0 and at most 1 m | see: help stack
stack x; cap: Si (-1 nm); end => cap of x: the layer of Si has the thickness -1 nm; it must be greater than 0 and at most 1 m | see: help stack
stack x; cap: Si -1 nm; end => a layer is a material and a thickness | write Si 4.15 nm, or Si 4.15 nm rough 0.6 nm
stack x; cap: Si 10 m; end => cap of x: the layer of Si has the thickness 10 m; it must be greater than 0 and at most 1 m | see: help stack
stack x; cap: Si 4 mJ; end => a thickness is length (m), not energy (J) | give it in m
stack x; cap: Si; end => a layer is a material and a thickness | write Si 4.15 nm, or Si 4.15 nm rough 0.6 nm
stack x; cap: 4 nm; end => a layer is a material and a thickness | write Si 4.15 nm, or Si 4.15 nm rough 0.6 nm
stack x; cap: Si 4 nm rough (-1 nm); end => roughness is -1 nm; it must be 0 or greater | see: help stack
stack x; cap: Si 4 nm; roughness: 1 nm, 2 nm; end => roughness has one length, for every interface | write roughness: 0.4 nm
stack x; cap: Si 4 nm; roughness: 4 %; end => a roughness is length (m), not a pure number | give it in m
stack x; bilayer x1000000000: Si 4 nm, Mo 3 nm; end => bilayer of x: its layers repeat 1.0000e9 times; that is a whole number from 1 to 10000 | see: help stack
stack x; bilayer x(2.5): Si 4 nm; end => bilayer of x: its layers repeat 2.5000 times; that is a whole number from 1 to 10000 | see: help stack
stack x; bilayer x(3 nm): Si 4 nm; end => how often layers repeat is a pure number, not length (m) | give it in 1
stack x; end => x has no layers | write a line such as cap: Ru 2.5 nm
stack x; substrate: Si; end => x has no layers | write a line such as cap: Ru 2.5 nm
stack x; cap: Si 4 nm; substrate: Si, Mo; end => a substrate is one material | write substrate: Si
stack x; cap: Si 4 nm; cap: Mo 3 nm; end => the label cap stands twice in this stack | give the second one another, such as cap_2
stack x; cap: Si 4 nm; roughness: 1 nm; roughness: 2 nm; end => the label roughness stands twice in this stack | give the second one another, such as roughness_2
stack x; at IF; cap: Si 4 nm; end => a stack has no planes | planes stand in a chain
stack x; cap x4 independent: Si 4 nm; end => independent belongs to the elements of a chain | leave it out
stack pi; cap: Si 4 nm; end => pi is a constant of the language | choose another name, such as pi_1
reflectivity(mirror, 13.5 nm, 90 deg) => angle is 90°; it must be from the normal, 0° or greater and less than 90° | help reflectivity shows the range of each argument
reflectivity(mirror, 13.5 nm, -1 deg) => angle is -1°; it must be from the normal, 0° or greater and less than 90° | help reflectivity shows the range of each argument
reflectivity(mirror, 1 nm) => wavelength is 1 nm; it must be between 4.1223 nm and 42.315 nm, where delta of Si is tabulated | help reflectivity shows the range of each argument
reflectivity(mirror, 193 nm) => wavelength is 193 nm; it must be between 4.1223 nm and 42.315 nm, where delta of Si is tabulated | help reflectivity shows the range of each argument
reflectivity(mirror, 13.5 nm, polarization = q) => polarization is one of the words unpolarised, s, p | reflectivity(body, wavelength, angle = 0 deg, polarization = unpolarised, roughness = 0 nm)
reflectivity(mirror, 13.5 nm, roughness = 1 nm) => roughness is for the surface of a material; mirror has its own | why and check show what the inputs are
reflectivity(nothing, 13.5 nm) => nothing is a name that is not known; body is a body or a material | element symbols are known; others are named by material NAME = SiO2 2.2 g/cm^3
reflectivity(3 nm, 13.5 nm) => 3 nm is length (m); body is a body or a material | element symbols are known; others are named by material NAME = SiO2 2.2 g/cm^3
reflectivity(film(Si, 50 nm), 13.5 nm) => reflectivity of a film of 50 nm Si 2.33 g/cm³: a film here absorbs only; ask for that of a stack of one layer | why and check show what the inputs are
reflectivity(gas_column(H2, 5 Pa, 2 m), 13.5 nm) => reflectivity of a column of 5 Pa H2 over 2 m: a gas does not reflect in this model | why and check show what the inputs are
transmittance(mirror) => transmittance of a stack of 100 layers on Si 2.33 g/cm³: the light ends in the substrate, which has no other side; leave the substrate out, or make it a layer | why and check show what the inputs are
transmittance(veil) => transmittance of a stack with rough interfaces: the roughness factor is known for reflection only; ask for that of the smooth stack | why and check show what the inputs are
transmittance(Si) => transmittance of a surface of Si 2.33 g/cm³: it is a half space without an end; ask for that of a film, which has a thickness | why and check show what the inputs are
transmittance(gas_column(H2, -5 Pa, 2 m)) => pressure is -5 Pa; it must be 0 or greater | help transmittance shows the range of each argument
transmittance(gas_column(H2, 5 Pa, 2 m), 13.5 nm, 5 deg) => transmittance at an angle of a column of 5 Pa H2 over 2 m: the path of a gas column is that of the light already; state that path and leave the angle at 0 | why and check show what the inputs are
transmittance(gas_column(Xq, 5 Pa, 2 m)) => formula "Xq": Xq is no element of the tables | a formula is such as H2 or CH4
transmittance(film(Si, -5 nm)) => thickness is -5 nm; it must be between 0 and 1 m | help transmittance shows the range of each argument
peak_reflectivity(film(Si, 50 nm)) => a film of Si is no stack | a stack is defined by the lines stack NAME … end; see: help stack
peak_reflectivity(Si) => Si is no stack | a stack is defined by the lines stack NAME … end; see: help stack
film(mirror, 5 nm) => mirror is no material | element symbols are known; others are named by material NAME = SiO2 2.2 g/cm^3
mirror + 1 => mirror is a body, not a value | reflectivity(mirror, 13.5 nm) is one; see: help reflectivity
curve({13 nm, 14 nm}, {60 %}, 13.5 nm) => xs and ys of curve are lists of one length | why and check show what the inputs are
curve({13 nm, 14 nm}, {60 %, 64 %}, 92 eV) => xs and x of curve are of one dimension | curve(xs, ys, x)
curve({13 nm, 14 nm, 13.5 nm}, {60 %, 64 %, 62 %}, 13.2 nm) => xs is 1.3500e-8; it must be strictly in order, rising or falling | help curve shows the range of each argument
`

func TestBodiesRefuse(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "stack mirror\n  bilayer x50: Si 4.15 nm, Mo 2.85 nm\n  substrate: Si\nend", "stack veil\n  film: Si 40 nm\n  roughness: 0.5 nm\nend")
	for line := range strings.Lines(strings.TrimSpace(wrong)) {
		statement, reply, _ := strings.Cut(strings.TrimSpace(line), " => ")
		message, wayOn, _ := strings.Cut(reply, " | ")
		refusedBlock(t, s, strings.ReplaceAll(statement, "; ", "\n"), message, wayOn)
	}
}

// The refusal of a block marks the line at fault, not its head.
func TestRefusedLinesAreMarked(t *testing.T) {
	for block, marked := range map[string]string{
		"stack x\n  first: Si 4 nm\n  second: Mo 0 nm\n  substrate: Si\nend":    "  second: Mo 0 nm\n          ~~~~~~~",
		"stack x\n  first: Si 4 nm\n  second x20000: Mo 3 nm\nend":              "  second x20000: Mo 3 nm\n          ~~~~~",
		"stack x\n  first: Si 4 nm\n  second: Xx 3 nm\nend":                     "  second: Xx 3 nm\n          ~~",
		"chain x\n  at IF\n  band: 13.5 nm, 2 W\n  at WAFER\nend":               "  band: 13.5 nm, 2 W\n                 ~~~",
		"chain x\n  at IF\n  m: reflectivity(Si, λ, 95 deg)\n  at WAFER\nend":   "  m: reflectivity(Si, λ, 95 deg)",
		"chain x\n  at IF\n  m: transmittance(film(Xx, 3 nm))\n  at WAFER\nend": "  m: transmittance(film(Xx, 3 nm))\n                        ~~",
	} {
		if text := printed(heard(NewSession(Config{}), block)); !strings.HasPrefix(text, marked) {
			t.Errorf("%s\nprints\n%s\nwant first\n%s", block, text, marked)
		}
	}
}

// Doubts come with the answer: at the definition, and wherever it is used.
func TestBodiesWarn(t *testing.T) {
	s := NewSession(Config{})
	for _, c := range []struct{ statement, warning string }{
		{"material light = Mo 1 g/cm^3", "Mo is given 1 g/cm³, the solid has about 10.22 g/cm³"},
		{"delta(light, 13.5 nm)", "Mo is given 1 g/cm³"},
		{"beta(light, 13.5 nm)", "Mo is given 1 g/cm³"},
		{"attenuation(light)", "Mo is given 1 g/cm³"},
		{"penetration_depth(light)", "Mo is given 1 g/cm³"},
		{"reflectivity(light, 13.5 nm)", "Mo is given 1 g/cm³"},
		{"transmittance(film(light, 10 nm))", "Mo is given 1 g/cm³"},
		{"stack rougher\n  bilayer x50: Si 4.15 nm rough 9 nm, Mo 2.85 nm\n  substrate: Si\nend", "the roughness 9 nm is larger than the layer of Si 2.33 g/cm³ below it, 4.15 nm"},
		{"reflectivity(rougher, 13.5 nm)", "the roughness 9 nm is larger than the layer"},
		{"R = reflectivity(rougher, 13.5 nm)", "the roughness 9 nm is larger than the layer"},
		{"transmittance(gas_column(H2, 5 Pa, 2 m))", "two atoms of the tables stand for the H2 molecule, which absorbs about 20 % more"},
	} {
		r := heard(s, c.statement)
		if r.Err != nil || strings.Count(printed(r), c.warning) != 1 {
			t.Errorf("%s prints %q, error %v, want %q once", c.statement, printed(r), r.Err, c.warning)
		}
	}
	for _, statement := range []string{
		"delta(Mo, 13.5 nm)", "transmittance(gas_column(H2, 5 Pa, 2 m, cross_section = 6e-24 m^2))", "transmittance(gas_column(CH4, 5 Pa, 2 m))",
		"material fine = Mo 9.5 g/cm^3",
	} {
		if r := heard(s, statement); r.Err != nil || strings.Contains(printed(r), "note:") {
			t.Errorf("%s prints %q, error %v", statement, printed(r), r.Err)
		}
	}
}

// A stack of thousands of lines is a stack; so are layers of a metre.
func TestLargeStacks(t *testing.T) {
	s := NewSession(Config{})
	lines := []string{"stack large"}
	for i := range 1500 {
		lines = append(lines, fmt.Sprintf("  l%d: Si 0.4 nm, Mo 0.3 nm", i))
	}
	spoken(t, s, slices.Concat(lines, []string{"end"})...)
	if r := valued(t, s, "reflectivity(large, 13.5 nm)").SI; !(r > 0 && r < 1) {
		t.Errorf("it reflects %g", r)
	}
	spoken(t, s, "chain line\n  band: 13.5 nm, 2 %\n  at IF\n  m: reflectivity(large, λ)\n  at WAFER\nend")
	if r := valued(t, s, "transmission(line, IF, WAFER)").SI; !(r > 0 && r < 1) {
		t.Errorf("in its band it reflects %g", r)
	}
	spoken(t, s, "stack plate\n  bilayer x10000: Si 1 m, Mo 1 m\n  substrate: Si\nend")
	if bare := valued(t, s, "reflectivity(Si, 13.5 nm) / reflectivity(plate, 13.5 nm)").SI; !(bare > 0.999 && bare < 1.001) {
		t.Errorf("kilometres of silicon reflect 1/%g of a surface", bare)
	}
	// a block that is left open keeps its lines and takes the next
	r := s.Feed(context.Background(), "stack open")
	if !r.More || !s.InBlock() {
		t.Fatal("the block does not wait")
	}
	if r = s.Feed(context.Background(), "  cap: Si 2 nm +"); r.Err == nil || !r.More {
		t.Error("a line that cannot be read ends the block")
	}
	spoken(t, s, "  cap: Si 2 nm", "end", "reflectivity(open, 13.5 nm)")
}

// Doubts about what stands in a chain reach its transmission and its walk, in a
// band too, each once.
func TestChainsPassDoubtsOn(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "material light = Mo 1 g/cm^3", "stack rougher\n  bilayer x50: Si 4.15 nm rough 9 nm, light 2.85 nm\n  substrate: Si\nend")
	for _, band := range []string{"", "  band: 13.5 nm, 2 %\n"} {
		spoken(t, s, "chain line\n"+band+"  at IF\n  gas: transmittance(gas_column(H2, 5 Pa, 2 m), λ)\n  at MASK\n  m x2: reflectivity(rougher, λ)\n  at WAFER\nend")
		for _, statement := range []string{"transmission(line, IF, WAFER)", "walk line 250 W at IF", "carry(2 W at WAFER, line, IF)", "peak_wavelength(line, IF, WAFER)"} {
			text := printed(spoken(t, s, statement))
			for _, doubt := range []string{"two atoms of the tables stand for the H2 molecule", "the roughness 9 nm is larger than the layer of Si", "Mo is given 1 g/cm³"} {
				if strings.Count(text, doubt) != 1 {
					t.Errorf("%s%s prints %q, want %q once", band, statement, text, doubt)
				}
			}
		}
	}
}
