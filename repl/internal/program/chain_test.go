package program

import (
	"testing"

	"example.com/dosewright/internal/near"
)

const lineChain = `
T_pell = 0.9
n_mirrors = 6
chain line3
  at IF
  illuminator x4: 66 %
  pellicle_in: T_pell
  at MASK
  mask: 65 %
  pellicle_out: T_pell
  reduction: 4, 8
  projection x(n_mirrors): 67 %
  at WAFER
end
`

func TestChains(t *testing.T) {
	d := newDesk()
	holds(t, d, lineChain+`
# 0.66^4·0.9 = 0.170772624; 0.65·0.9·0.67^6 = 0.0529181...
transmission(line3, IF, MASK) => 0.170773 at MASK/IF
transmission(line3, MASK, WAFER) => 0.0529182 at WAFER/MASK
transmission(line3, IF, WAFER) => 0.00903697 at WAFER/IF
transmission(line3, WAFER, IF) => 110.657 at IF/WAFER
transmission(line3, IF, IF) => 1
250 W at IF * transmission(line3, IF, WAFER) => 2.25924 kg·m²·s⁻³ at WAFER
carry(250 W at IF, line3, WAFER) => 2.25924 kg·m²·s⁻³ at WAFER
carry(2.25924475 W at WAFER, line3, IF) => 250.000 kg·m²·s⁻³ at IF
carry(250 W at IF, line3, IF) => 250 kg·m²·s⁻³ at IF
carry(5 mJ/pulse at IF, line3, MASK) => 0.000853863 kg·m²·s⁻²·pulse⁻¹ at MASK
carry(1e14 photon/s at IF, line3, MASK) => 1.70773e13 s⁻¹ at MASK
carry(100 at IF, line3, MASK) => 17.0773 at MASK
# per area: between MASK and WAFER alone; 4·8 concentrates
carry(1 mJ/cm^2 at MASK, line3, WAFER) => 16.9338 kg·s⁻² at WAFER
carry(16.933808 J/m^2 at WAFER, line3, MASK) => 10.0000 kg·s⁻² at MASK
carry(30 mJ/cm^2 at WAFER, line3, WAFER) => 300 kg·s⁻² at WAFER
carry(1 W/m^2 at MASK, line3, WAFER) => 1.69338 kg·s⁻³ at WAFER
carry(30 mJ/cm^2 at WAFER, line3, IF) ! 30 mJ/cm^2 at WAFER: fluence (mJ/cm²) at WAFER is per area, and the beam's area at IF is not known; fluence and irradiance go between MASK and WAFER; carry a power elsewhere
carry(30 mJ/cm^2 at IF, line3, WAFER) ! 30 mJ/cm^2 at IF: fluence (mJ/cm²) at IF is per area, and the beam's area at WAFER is not known; fluence and irradiance go between MASK and WAFER; carry a power elsewhere
carry(30 mJ/cm^2, line3, WAFER) ! 30 mJ/cm^2: 30 mJ/cm^2 stands at no single plane to be carried from; say where it stands: 30 mJ/cm^2 at IF
carry(0.5 at WAFER/IF, line3, WAFER) ! 0.5 at WAFER/IF: 0.5 at WAFER/IF stands at no single plane to be carried from; carry takes what stands at one plane, such as 250 W at IF
carry((4 W at IF)^2, line3, WAFER) ! (4 W at IF)^2: (4 W at IF)^2 stands at no single plane to be carried from; carry takes what stands at one plane, such as 250 W at IF
carry(250 W at SOURCE, line3, WAFER) ! carry(250 W at SOURCE, line3, WAFER): line3 has no plane SOURCE; it has IF, MASK, WAFER; a chain's line at NAME makes a plane
carry(250 W at IF, line3, SOURCE) ! carry(250 W at IF, line3, SOURCE): line3 has no plane SOURCE; it has IF, MASK, WAFER; a chain's line at NAME makes a plane
carry(250 W at IF, line4, WAFER) ! line4: line4 is no name that is known here; define it first: line4 = …
carry(250 W at IF, T_pell, WAFER) ! T_pell: T_pell is no chain; a chain is defined by the lines chain NAME … end; see: help chain
carry(250 W at IF, line3, here) ! here: here is no plane that is known here; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
carry(250 W at IF, line3, 5) ! 5: 5 is no plane that is known here; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
line3 + 1 ! line3: line3 is a chain, not a value; transmission(line3, IF, WAFER) is its factor between two planes
T_pell = 1.2
transmission(line3, IF, MASK) ! at T_pell: pellicle_in is 1.2000; the factor of an element lies between 0 and 1
T_pell = 0.9
n_mirrors = 2.5
transmission(line3, IF, WAFER) ! at 67 %: light crosses projection 2.5000 times; that is a whole number from 1 to 1000
n_mirrors = 6
transmission(line3, IF, WAFER) => 0.00903697 at WAFER/IF
`)
}

func TestChainRefusals(t *testing.T) {
	holds(t, newDesk(), `
chain c
  at IF
  mirror: 120 %
  at WAFER
end ! 120 %: mirror is 1.2000; a factor lies between 0 and 1; percent is written 65 %
chain c
  at IF
  mirror: 66
  at WAFER
end ! 66: mirror is 66; a factor lies between 0 and 1; percent is written 66 %
chain c
  at IF
  mirror: -0.1
  at WAFER
end ! -0.1: mirror is -0.10000; a factor lies between 0 and 1; percent is written 65 %
chain c
  at IF
  mirror: 5 m
  at WAFER
end ! 5 m: mirror is a factor between 0 and 1, not length (m); write mirror: 65 %
chain c
  at IF
  mirror: 22 degC
  at WAFER
end ! 22 degC: mirror is a factor between 0 and 1, not a temperature point; write mirror: 65 %
chain c
  at IF
  mirror x0: 0.5
  at WAFER
end ! 0: light crosses an element a whole number of times from 1 to 1000; write x6, or x(name) for a name that holds such a number
chain c
  at IF
  mirror x1001: 0.5
  at WAFER
end ! 1001: light crosses an element a whole number of times from 1 to 1000; write x6, or x(name) for a name that holds such a number
chain c
  at IF
  mirror x(2 m): 0.5
  at WAFER
end ! 2 m: light crosses an element a whole number of times from 1 to 1000; write x6, or x(name) for a name that holds such a number
chain c
  at IF
  mirror: 0.5, 0.6
  at WAFER
end ! mirror: mirror has 2 values; an element has one factor; write mirror: 65 %
chain c
  at IF
  mirror: 0.5
end ! c: c has 1 plane; it needs two or more to lead from one to the other; write at IF, then the elements, then at WAFER
chain c
  mirror: 0.5
end ! c: c has 0 planes; it needs two or more to lead from one to the other; write at IF, then the elements, then at WAFER
chain c
  at IF
  mirror: 0.5
  mirror: 0.6
  at WAFER
end ! mirror: the label mirror stands twice in this chain; give the second one another, such as mirror_2
chain c
  at IF
  mirror: 0.5
  at IF
end ! IF: the plane IF stands twice in this chain; give the second one another name
chain c
  at MASK
  reduction: 4
  at WAFER
end ! reduction: a reduction has two numbers: across the scan, then along it; write reduction: 4, 4
chain c
  at MASK
  reduction: 4, 0
  at WAFER
end ! 0: a reduction is a number greater than 0; write reduction: 4, 4
chain c
  at MASK
  reduction: 4, 4 m
  at WAFER
end ! 4 m: a reduction is a number greater than 0; write reduction: 4, 4
chain c
  at IF
  mirror: {0.5, 0.6}
  at WAFER
end ! {0.5, 0.6}: a list is no single value; take sum, mean, median, min, max or sd of it
chain c
  at IF
  mirror: "text"
  at WAFER
end ! "text": a text is no value to calculate with; texts name files and labels only
chain c
  at IF
  mirror: unheard
  at WAFER
end ! unheard: unheard is no name that is known here; define it first: unheard = …
chain c
  at IF
  optics: 0.5 at WAFER/IF
  at WAFER
end
transmission(c, IF, WAFER) => 0.500000 at WAFER/IF
chain c
  at IF
  optics: 0.5 at WAFER/MASK
  at WAFER
end ! 0.5 at WAFER/MASK: optics is a ratio at WAFER/MASK, and it stands between IF and WAFER; number_of(x) drops a plane on purpose
chain c
  at IF
  optics x2: 0.5 at WAFER/IF
  at WAFER
end ! 0.5 at WAFER/IF: optics is a ratio at WAFER/IF, and it stands between IF and WAFER; number_of(x) drops a plane on purpose
M = 4
chain c
  at MASK
  mask: 0.5
  reduction: M, M
  at NEAR
  last: 0.5
  at WAFER
end
carry(1 J/m^2 at MASK, c, WAFER) => 4 kg·s⁻² at WAFER
carry(1 W at MASK, c, NEAR) => 0.500000 kg·m²·s⁻³ at NEAR
M = -4
carry(1 J/m^2 at MASK, c, WAFER) ! at M: the reduction is -4; it is a number greater than 0
M = 0
carry(1 J/m^2 at WAFER, c, MASK) ! at M: the reduction is 0; it is a number greater than 0
chain dark
  at IF
  mirror: 0
  at WAFER
end
transmission(dark, IF, WAFER) => 0 at WAFER/IF
transmission(dark, WAFER, IF) ! at transmission(dark, WAFER, IF): division by zero
chain bare
  at MASK
  at WAFER
end
carry(1 J/m^2 at MASK, bare, WAFER) ! carry(1 J/m^2 at MASK, bare, WAFER): bare states no reduction, which gives the ratio of areas between MASK and WAFER; add the line reduction: 4, 4 to the chain
carry(1 W at MASK, bare, WAFER) => 1 kg·m²·s⁻³ at WAFER
`)
}

// Carrying there and back is the way itself, whatever is carried.
func TestCarryBothWays(t *testing.T) {
	d := newDesk()
	holds(t, d, lineChain)
	for _, pair := range []string{
		"carry(carry(250 W at IF, line3, WAFER), line3, IF) / (250 W at IF)",
		"carry(carry(250 W at WAFER, line3, MASK), line3, WAFER) / (250 W at WAFER)",
		"carry(carry(3 J/m^2 at MASK, line3, WAFER), line3, MASK) / (3 J/m^2 at MASK)",
		"transmission(line3, IF, MASK) * transmission(line3, MASK, WAFER) * transmission(line3, WAFER, IF)",
	} {
		a, err := d.say(pair)
		if err != nil {
			t.Fatal(d.refusal(pair, err))
		}
		if !a.node.Type.Pure() {
			t.Errorf("%s stands at %q", pair, a.node.Type.Plane)
		}
		near.Rel(t, pair, a.value, 1, 1e-14)
	}
}

func TestChainPlanesAndNames(t *testing.T) {
	d := newDesk()
	holds(t, d, lineChain)
	n := d.nodes["line3"]
	if got := joined(n.Chain().Planes()); got != "IF, MASK, WAFER" {
		t.Errorf("planes %s", got)
	}
	var names []string
	n.Names(func(name string) { names = append(names, name) })
	if len(names) != 3 || names[0] != "T_pell" || names[2] != "n_mirrors" {
		t.Errorf("names %q", names)
	}
}
