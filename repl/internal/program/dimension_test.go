package program

import "testing"

// Cases are "statement => answer in SI base units" or "statement ! marked
// texts: message; way on".
func TestDimensionRules(t *testing.T) {
	holds(t, newDesk(), `
# products and quotients
30 mJ/cm^2 * 2 cm^2 => 0.0600000 kg·m²·s⁻²
30 mJ/cm^2 / 2 => 150 kg·s⁻²
13.5 nm / 13.5 nm => 1
2 m * 3 m^-1 => 6
1/2 m => 0.500000 m⁻¹
3 nm^2 => 3.00000e-18 m²
(3 nm)^2 => 9.00000e-18 m²
2 d => 172800 s
# sums and comparisons need one dimension
1 m + 1 cm => 1.01000 m
1 h - 1 min => 3540 s
5 + 3 % => 5.03000
30 mJ/cm^2 + 250 W ! 30 mJ/cm^2 | 250 W: fluence (mJ/cm²) and power (W) do not add: they differ by area/time; dose * area / time is a power
30 mJ/cm^2 - 1 ! 30 mJ/cm^2 | 1: fluence (mJ/cm²) and a pure number do not subtract; one of them needs another factor; help units shows how units are written
if(1 m < 1 s, 1, 2) ! 1 m | 1 s: length (m) and time (s) do not compare: they differ by time/length; length * time / length is a time
if(1 < 2, 1 m, 1 s) ! 1 m | 1 s: length (m) and time (s) do not stand side by side in if: they differ by time/length; length * time / length is a time
if(2 < 1, 1 m, 1 cm) => 0.0100000 m
# powers and roots
(2 m)^3 => 8 m³
(4 m^2)^(1/2) => 2 m
(4 m^2)^0.5 => 2 m
(8 m^3)^(1/3) => 2 m
(8 m^3)^(-1/3) => 0.500000 m⁻¹
sqrt(400 nm^2) => 2.00000e-8 m
-3^2 => -9
2^3^2 => 512
2^-1 => 0.500000
(-8)^(1/3) => -2
(-8)^(2/3) => 4
2^0.5 => 1.41421
(1 m)^(1/5) ! (1 m)^(1/5): length (m) has no such power: the root of a dimension is no multiple of a sixth; exponents of units and planes are multiples of 1/6 from -21 to 21
(1 m)^(1/4) ! (1 m)^(1/4): length (m) has no such power: the root of a dimension is no multiple of a sixth; exponents of units and planes are multiples of 1/6 from -21 to 21
(1 m)^2.5 => 1 m^(5/2)
(1 m)^22 ! (1 m)^22: length (m) has no such power: an exponent of a dimension leaves the range -21 to 21; exponents of units and planes are multiples of 1/6 from -21 to 21
sqrt(1 m^(1/2)) ! sqrt(1 m^(1/2)): a quantity in m^(1/2) has no such power: the root of a dimension is no multiple of a sixth; exponents of units and planes are multiples of 1/6 from -21 to 21
(2 m)^(1 m) ! 1 m: an exponent is a pure number, not length (m); divide it by a reference value
2^(1 m) ! 1 m: an exponent is a pure number, not length (m); divide it by a reference value
(2 m)^pi ! 2 m | pi: length (m) is raised to constant rational powers only; write the exponent as a number, such as 2 or (1/2)
2^pi => 8.82498
# functions of pure numbers
ln(1 m) ! 1 m: ln: the argument is a pure number, not length (m); ln(x)
ln(2 m / 1 m) => 0.693147
# arguments of catalogue functions
count(30 mJ/cm^2, 400 nm^2) => 8155.27
count(30 mJ/cm^2, 400 nm^2, 13.5 nm) => 8155.27
count(30 mJ/cm^2, area = 400 nm^2, wavelength = 6.75 nm) => 4077.63
count(area = 400 nm^2, dose = 30 mJ/cm^2) => 8155.27
count(30 mJ/cm^2) ! count(30 mJ/cm^2): count needs its argument area; area: the area that is lit
count(30 mJ, 400 nm^2) ! 30 mJ: dose of count is fluence (mJ/cm²), not energy (J): they differ by 1/area; give it in mJ/cm²
count(30 mJ/cm^2, 400 nm^2, 13.5 nm, 1) ! 1: count takes 3 arguments; count(dose at WAFER, area, wavelength = 13.5 nm)
count(30 mJ/cm^2, aria = 400 nm^2) ! aria: count has no argument aria; it takes count(dose at WAFER, area, wavelength = 13.5 nm)
count(dose = 30 mJ/cm^2, 400 nm^2) ! 400 nm^2: an argument without a name stands behind one with; give this one its name too: count(dose at WAFER, area, wavelength = 13.5 nm)
count(30 mJ/cm^2, dose = 30 mJ/cm^2) ! 30 mJ/cm^2: count has its argument dose twice; leave one of them out
count(30 mJ/cm^2, 400 nm^2, 0 nm) ! at 0 nm: wavelength must be greater than 0
count("a", 400 nm^2) ! "a": dose of count is fluence (mJ/cm²), not a text; count(dose at WAFER, area, wavelength = 13.5 nm)
count({1 J/m^2, 2 J/m^2}, 400 nm^2) ! {1 J/m^2, 2 J/m^2}: dose of count is fluence (mJ/cm²), not a list of fluence (mJ/cm²); count(dose at WAFER, area, wavelength = 13.5 nm)
count(1 < 2, 400 nm^2) ! 1 < 2: dose of count is fluence (mJ/cm²), not a condition; count(dose at WAFER, area, wavelength = 13.5 nm)
slope(2) => 2
slope(2, negative) => -2
slope(2, tone = negative) => -2
slope(2, 1) ! 1: tone is one of the words positive, negative; slope(x, tone = positive)
slope(2, tone = 0.5) ! 0.5: tone is one of the words positive, negative; slope(x, tone = positive)
capped(2) => 2
capped(2, none) => 2
capped(2, 1) => 1
# lists
sum({1 m, 2 cm}) => 1.02000 m
sum(1 m, 2 cm) => 1.02000 m
max({1, 3, 2}) => 3
quantile({1 m, 2 m, 3 m}, 0.5) => 2 m
quantile(1 m, 0.5) ! 1 m: values of quantile is a list, not length (m); a list is written {1, 2, 3}
sum({1 m, 2 s}) ! 1 m | 2 s: a list holds one dimension at one plane: length (m) and time (s) do not mix; make two lists of it
sum(1 m, 2 s) ! 1 m | 2 s: length (m) and time (s) do not stand side by side in sum: they differ by time/length; length * time / length is a time
sum({}) ! {}: this list is empty; write at least one value: {1, 2, 3}
sum() ! sum(): sum needs at least one value; write sum({1, 2, 3})
sum({1}, {2}) ! {1}: sum takes numbers, or one list; sum(values, …)
sum(values = 1) ! values: sum has no argument values; sum(values, …)
{1, 2} + 1 ! {1, 2}: a list is no single value; take sum, mean, median, min, max or sd of it
"a" + 1 ! "a": a text is no value to calculate with; texts name files and labels only
lots = {1 m, 2 m}
sum(lots) => 3 m
lots * 2 ! lots: a list is no single value; take sum, mean, median, min, max or sd of it
# names
x ! x: x is no name that is known here; define it first: x = …
count ! count: count is a function; it takes its arguments in parentheses; see: help count
mJ ! mJ: mJ is a unit, and a unit stands right behind a number; write 1 mJ
IF ! IF: IF is a plane, no value; a plane stands behind at, as in 250 W at IF
nm = 3
5 nm => 5.00000e-9 m
5 * nm => 15
Nm(3) ! Nm: Nm is no function that is known here; did you mean nm?
nm(3) ! nm: nm is a value, not a function; a product is written with a sign: nm * (…)
frob(3) ! frob: frob is no function that is known here; help functions lists them
NM ! NM: NM is no name that is known here; did you mean nm?
# a unit that is none
5 W/nn ! nn: nn is no unit; did you mean nN? Upper and lower case differ
nn = 4
5 W/nn ! nn: nn is no unit; to divide by the name nn write 5 W / nn
5 W·nn ! nn: nn is no unit; to multiply by the name nn write 5 W * nn
5 W²·nn ! nn: nn is no unit; to multiply by the name nn write 5 W² * nn
5 W*nn ! nn: nn is no unit; to multiply by the name nn write 5 W * nn
5/nn => 1.25000
250 /nn ! nn: nn is no unit; to divide by the name nn write 250 / nn
5 W/(nn*nn) ! nn: nn is no unit; to divide by the name nn write 5 W / (nn*nn)
5 W/(m*nn) ! nn: nn is no unit; a name stands behind the unit, with blanks around / or *
5 mj ! mj: mj is no unit; did you mean MJ or mJ? Upper and lower case differ
1e400 m ! 1e400: 1e400: the number is larger than 1.8e308 in SI units; choose a prefix or unit that brings the number closer to one
1e-400 m ! 1e-400: 1e-400: the number is smaller than 5e-324 in SI units; choose a prefix or unit that brings the number closer to one
# stated units
5 m [cm] => 5 m
5 m [s] ! 5 m | [s]: length (m) is not stated in s, which is time (s): they differ by time/length; state it in m, or change the formula
5 [W] ! 5 | [W]: a bracket states the unit of an answer, it never gives one: 5 is a pure number; write 5 W
5 m [ mx ] ! mx: mx is no unit; see: help units
50 kHz [kpulse/s] ! 50 kHz | [kpulse/s]: rate (s⁻¹) is not stated in kpulse/s, which is pulse rate (kpulse/s): they differ by pulse; where pulses per time are meant, write 50 kpulse/s, not 50 kHz
area [cm^2] = 5 m ! 5 m | [cm^2]: length (m) is not stated in cm^2, which is area (m²): they differ by length; state it in m, or change the formula
area [cm^2] = 5 cm^2
`)
}

// The number that holds a unit is counted in things of its own kind.
func TestCountedThings(t *testing.T) {
	holds(t, newDesk(), `
50 kpulse/s * 2 s => 100000 pulse
50 kHz * 2 s => 100000
50 kpulse/s + 1 kHz ! 50 kpulse/s | 1 kHz: pulse rate (kpulse/s) and rate (s⁻¹) do not add: they differ by 1/pulse; pulse rate / pulse is a rate
100 wafer/h * 96 field/wafer => 2.66667 s⁻¹·field
100 wafer/h * 96 field => 2.66667 s⁻¹·wafer·field
sqrt(9 field^2) => 3 field
sqrt(9 field) => 3 field^(1/2)
(9 die)^(1/7) ! (9 die)^(1/7): die count (die) has no such power: the root of a dimension is no multiple of a sixth; number_of(x) drops counted things and planes on purpose
number_of(96 field/wafer) => 96
number_of(5 m) => 5 m
ln(10 wafer) ! 10 wafer: ln: the argument is a pure number, not wafer count (wafer); ln(x)
ln(number_of(10 wafer)) => 2.30259
1 photon/nm^2 + 1 nm^-2 => 2.00000e18 m⁻²
`)
}

func TestTemperaturePoints(t *testing.T) {
	holds(t, newDesk(), `
22 degC => 22 °C
-5 degC => -5 °C
22 degC - 20 degC => 2 K
22 degC + 5 K => 27 °C
5 K + 22 degC => 27 °C
22 degC - 5 K => 17 °C
22 degC -5 degC => 17 K
22 degC + 5 degC ! 22 degC | 5 degC: two temperature points do not add; a difference is in K: 22 degC + 5 K; the mean of points is mean(a, b)
5 K - 22 degC ! 5 K | 22 degC: a temperature point is not taken from a difference; K beside a point is a difference; write both as points, or the point first
22 degC * 2 => 590.300 K
22 degC / 22 degC => 1
(22 degC)^2 => 87113.5 K²
-(22 degC) => -295.150 K
if(22 degC > 20 degC, 1, 2) => 1
if(1 < 2, 22 degC, 5 K) ! 22 degC | 5 K: both values of if are of one kind: a temperature point and temperature (K) are not; state both the same way
drift(22 degC, 2 K) => 24 °C
drift(295.15 K, 2 K) => 24 °C
drift(22 degC, 24 degC - 22 degC) => 24 °C
drift(22 degC, 24 degC) ! 24 degC: change of drift is a temperature difference, not a point; write a difference in K, such as 2 K, or subtract two points
drift(2 m, 1 K) ! 2 m: temperature of drift is temperature (K), not length (m): they differ by temperature/length; give it in K
sqrt(22 degC) ! sqrt(22 degC): a temperature point has no such power: the root of a dimension is no multiple of a sixth; exponents of units and planes are multiples of 1/6 from -21 to 21
max(22 degC, 24 degC) => 24 °C
max({22 degC, 24 degC}) => 24 °C
max(22 degC, 5 K) ! 22 degC | 5 K: temperature points and differences do not mix; write all of them in degC
sum(22 degC, 24 degC) ! 22 degC | 24 degC: sum: temperature points do not add up; sum(values, …)
sum({22 degC, 24 degC}) ! {22 degC, 24 degC}: sum: temperature points do not add up; sum(values, …)
sum({22 degC, 24 K}) ! 22 degC | 24 K: a list holds one dimension at one plane: a temperature point and temperature (K) do not mix; make two lists of it
quantile({22 degC, 24 degC}, 1) => 24 °C
22 degC at IF ! 22 degC at IF: a temperature point does not stand at a plane; planes are for power, energy, photon number and rate, irradiance and fluence, and ratios of planes
`)
	d := newDesk()
	for text, want := range map[string]int{"22 degC * 2": 1, "22 degC - 20 degC": 0, "22 degC * 2 + 20 degC * 3": 1} {
		a, err := d.say(text)
		if err != nil {
			t.Fatal(err)
		}
		if len(a.c.Warnings) != want {
			t.Errorf("%s: warnings %q, want %d", text, a.c.Warnings, want)
		}
	}
}
