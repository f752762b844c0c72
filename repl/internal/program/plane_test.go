package program

import "testing"

func TestPlanes(t *testing.T) {
	holds(t, newDesk(), `
# products add, quotients subtract, powers multiply
250 W at IF => 250 kg·m²·s⁻³ at IF
250 W at IF * 0.9 % at WAFER/IF => 2.25000 kg·m²·s⁻³ at WAFER
250 W at IF * 2 => 500 kg·m²·s⁻³ at IF
250 W at IF / (50 kpulse/s) => 0.00500000 kg·m²·s⁻²·pulse⁻¹ at IF
2 W at WAFER / (250 W at IF) => 0.00800000 at WAFER/IF
2 W at IF / (4 W at IF) => 0.500000
1 / (2 W at IF) => 0.500000 kg⁻¹·m⁻²·s³ at 1/IF
(2 W at IF)^2 => 4 kg²·m⁴·s⁻⁶ at IF^2
(4 W at IF)^(1/2) => 2 kg^(1/2)·m·s^(-3/2) at IF^(1/2)
((8 W at IF)^(1/3))^3 => 8 kg·m²·s⁻³ at IF
((8 W at IF)^(1/3))^2 => 4 kg^(2/3)·m^(4/3)·s⁻² at IF^(2/3)
((2 W at IF)^(5/6))^6 => 32 kg⁵·m¹⁰·s⁻¹⁵ at IF^5
(2 at WAFER/IF)^(1/6) => 1.12246 at WAFER^(1/6)/IF^(1/6)
((2 at WAFER/IF)^(1/6))^6 => 2 at WAFER/IF
(2 at WAFER/IF)^-1 => 0.500000 at IF/WAFER
sqrt(4 at WAFER/IF) => 2 at WAFER^(1/2)/IF^(1/2)
(2 at WAFER/IF)^(1/5) ! (2 at WAFER/IF)^(1/5): a pure number at WAFER/IF has no such power: the root of a dimension is no multiple of a sixth; number_of(x) drops counted things and planes on purpose
(2 at WAFER/IF)^21 => 2.09715e6 at WAFER^21/IF^21
(2 at WAFER/IF)^22 ! (2 at WAFER/IF)^22: a pure number at WAFER/IF has no such power: an exponent of a dimension leaves the range -21 to 21; number_of(x) drops counted things and planes on purpose
((((((1 at WAFER/IF)^20)^20)^20)^20)^20)^20 ! ((1 at WAFER/IF)^20)^20: a pure number at WAFER^20/IF^20 has no such power: an exponent of a dimension leaves the range -21 to 21; number_of(x) drops counted things and planes on purpose
# sums and comparisons: equal planes, or one side without
1 W at IF + 2 W at IF => 3 kg·m²·s⁻³ at IF
1 W at IF + 2 W => 3 kg·m²·s⁻³ at IF
1 W + 2 W at IF => 3 kg·m²·s⁻³ at IF
1 W + 2 W + 3 W at IF => 6 kg·m²·s⁻³ at IF
1 W at IF + 2 W at WAFER ! 1 W at IF | 2 W at WAFER: power (W) at IF and power (W) at WAFER do not add: they stand at different planes; carry(2 W at WAFER, CHAIN, IF) takes the second to the plane of the first
1 W at IF - 2 W at WAFER ! 1 W at IF | 2 W at WAFER: power (W) at IF and power (W) at WAFER do not subtract: they stand at different planes; carry(2 W at WAFER, CHAIN, IF) takes the second to the plane of the first
if(1 W at IF < 2 W at WAFER, 1, 2) ! 1 W at IF | 2 W at WAFER: power (W) at IF and power (W) at WAFER do not compare: they stand at different planes; carry(2 W at WAFER, CHAIN, IF) takes the second to the plane of the first
if(1 W at IF < 2 W, 1, 2) => 1
if(1 < 2, 1 W at IF, 2 W at WAFER) ! 1 W at IF | 2 W at WAFER: power (W) at IF and power (W) at WAFER do not stand side by side in if: they stand at different planes; carry(2 W at WAFER, CHAIN, IF) takes the second to the plane of the first
if(1 < 2, 1 W at IF, 2 W) ! 1 W at IF | 2 W: both values of if are of one kind: power (W) at IF and power (W) are not; state both the same way
sum(1 W, 2 W at IF, 3 W) => 6 kg·m²·s⁻³ at IF
sum(1 W, 2 W at IF, 3 W at MASK) ! 2 W at IF | 3 W at MASK: power (W) at IF and power (W) at MASK do not stand side by side in sum: they stand at different planes; carry(3 W at MASK, CHAIN, IF) takes the second to the plane of the first
sum({1 W at IF, 2 W at MASK}) ! 1 W at IF | 2 W at MASK: a list holds one dimension at one plane: power (W) at IF and power (W) at MASK do not mix; make two lists of it
sum({1 W at IF, 2 W at IF}) => 3 kg·m²·s⁻³ at IF
# what stands at a plane
5 nm at IF ! 5 nm at IF: length (m) does not stand at a plane; planes are for power, energy, photon number and rate, irradiance and fluence, and ratios of planes
30 mJ/cm^2 at WAFER => 300 kg·s⁻² at WAFER
1e14 photon/s at IF => 1.00000e14 s⁻¹ at IF
5 mJ/pulse at IF => 0.00500000 kg·m²·s⁻²·pulse⁻¹ at IF
0.5 at IF => 0.500000 at IF
5 W at WAFER/IF ! 5 W at WAFER/IF: power (W) does not stand at a plane; planes are for power, energy, photon number and rate, irradiance and fluence, and ratios of planes
0.5 at IF/IF ! IF/IF: a ratio at one plane has none; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
1 W at HERE ! HERE: HERE is no plane that is known here; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
1 W at IF/HERE ! IF/HERE: HERE is no plane that is known here; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
250 W at IF at IF => 250 kg·m²·s⁻³ at IF
250 W at IF at WAFER ! 250 W at IF | WAFER: 250 W at IF stands at IF already; at WAFER would move it without a chain; carry(250 W at IF, CHAIN, WAFER) takes it there
P = 250 W
P at IF => 250 kg·m²·s⁻³ at IF
(P + 1 W) at IF => 251 kg·m²·s⁻³ at IF
ln(0.5 at WAFER/IF) ! 0.5 at WAFER/IF: ln: the argument is a pure number, not a pure number at WAFER/IF; ln(x)
number_of(0.5 at WAFER/IF) => 0.500000
2^(0.5 at WAFER/IF) ! 0.5 at WAFER/IF: an exponent is a pure number, not a pure number at WAFER/IF; divide it by a reference value
# arguments that stand at a plane
count(30 mJ/cm^2 at WAFER, 400 nm^2) => 8155.27 at WAFER
count(30 mJ/cm^2, 400 nm^2) => 8155.27
count(30 mJ/cm^2 at MASK, 400 nm^2) ! 30 mJ/cm^2 at MASK: dose of count stands at WAFER, and 30 mJ/cm^2 at MASK stands at MASK; carry(30 mJ/cm^2 at MASK, CHAIN, WAFER) takes it there
# a bracket requires a plane, it attaches none
250 W at IF [W at IF] => 250 kg·m²·s⁻³ at IF
250 W at IF [at IF] => 250 kg·m²·s⁻³ at IF
250 W [W at IF] ! [W at IF]: the answer has no plane; a bracket requires one, it never attaches one; say where an input stands: x at IF
250 W at IF [W at WAFER] ! [W at WAFER]: the answer stands at IF, not at WAFER; carry(…, CHAIN, WAFER) takes it there
250 W at IF [W at HERE] ! [W at HERE]: HERE is no plane that is known here; known are SOURCE, IF, MASK, WAFER; a chain's line at NAME makes others
2 W at WAFER / (4 W at IF) [% at WAFER/IF] => 0.500000 at WAFER/IF
`)
}

// A plane reads back from its own spelling, whatever its exponents.
func TestPlaneSpelling(t *testing.T) {
	for n := -126; n <= 126; n++ {
		for m := -12; m <= 12; m++ {
			e := map[string]int{"IF": n, "WAFER": m, "FAR_2": 6}
			for name, k := range planeOf(e).exponents() {
				if e[name] != k {
					t.Fatalf("%v is spelled %s, which has %s^(%d/6)", e, planeOf(e), name, k)
				}
			}
		}
	}
}
