package repl

import (
	"fmt"
	"strconv"
	"strings"

	"example.com/dosewright/units"
)

// topic is a page of help that belongs to no single word.
type topic struct{ name, summary, text string }

// topics are the pages in the order in which the overview lists them.
func topics() []topic {
	return []topic{
		{"language", "expressions, names, lists, notes", languagePage},
		{"units", "how units are written, and which are known", unitsPage + knownUnits()},
		{"planes", "where a quantity stands, and how it is carried", planesPage},
		{"counting", "wafers, fields, pulses: counted things are dimensions", countingPage},
		{"start", "a tour of five minutes, of real statements", startPage},
		{"uncertainty", "± literals, budgets, distributions", uncertaintyPage},
		{"exploring", "sweeps, roots, optima, cases, fits", exploringPage},
		{"temperatures", "points and differences", temperaturesPage},
		{"files", "session files, import, save, replay", filesPage},
		{"keys", "the keys at the prompt", keysPage},
		{"cautions", "what these numbers are not for", cautionsPage},
	}
}

const languagePage = `
+ - * / ^ and parentheses; ^ binds tightest and to the right, -3^2 is -9.
if(a < b, x, y) chooses. A product needs its sign: 2 * d; 2 d is two days.
name = formula  # note  a live definition: what rests on it follows
f(a, b) = formula       a function of the session
{1 nm, 2 nm}            a list; for sum, mean, sd, rss, median and quantile
photon_count(dose, area = 400 nm^2)  arguments by position, then by name
x [mJ]                  states the answer in that unit
Constants: pi planck_constant speed_of_light elementary_charge
boltzmann_constant avogadro_constant classical_electron_radius (CODATA 2022).
`

const unitsPage = `
A unit stands right behind its number and is one word: 30 mJ/cm^2, 5 /µm,
2 W/(m*K). With blanks, / and * are arithmetic.
Powers: ^2, ^-1, ^(1/2), 2, ², ⁻¹. Products: * or ·. W/m*K is refused.
A bracket states the unit of an answer and never gives one: dose * area [mJ].
Upper and lower case differ. µ, μ and u are micro.
70 % is 0.7, 40 ppm is 40e-6, exactly as written.
`

// knownUnits lists the symbols that the standard system reads.
func knownUnits() string {
	var line, all strings.Builder
	for _, w := range units.Standard().Words() {
		if line.Len()+len(w) > 76 {
			all.WriteString(line.String() + "\n")
			line.Reset()
		}
		if line.Len() > 0 {
			line.WriteByte(' ')
		}
		line.WriteString(w)
	}
	return "Known, with SI prefixes where the SI takes them:\n" + all.String() + line.String()
}

const planesPage = `
A power, energy, photon number or rate, irradiance or fluence may stand at
  SOURCE   in-band, into the half space
  IF       behind collector, gas and filter
  MASK     on the mask, before it reflects
  WAFER    on top of the resist
250 W at IF does not add to 2 W at WAFER. A ratio of planes leads from one to
the other, and so does a chain (see: help chain):
  250 W at IF * 0.9 % at WAFER/IF    is at WAFER
  carry(250 W at IF, line3, WAFER)   through a chain named line3
A quantity without a plane fits beside one with. A chain's lines "at NAME" add
planes.
`

const countingPage = `
wafer, field, die and pulse are dimensions: 96 field/wafer, 50 kpulse/s.
150 wafer/h does not add to 96 field/h, and 5 mJ/pulse * 50 kHz is no power.
counted lot declares another. number_of(x) drops counted things and planes on
purpose. photon, electron, mirror and bilayer are names for the number one.
`

const startPage = `
Type these lines one after the other, with or without what stands behind #.
  photon_energy(13.5 nm)                # in the unit of the trade
  dose = 30 mJ/cm^2 at WAFER            # a name, and the plane it stands at
  photon_count(dose, hole_area(20 nm))  # how many photons make a hole
  1 / sqrt(number_of(photon_count(dose, hole_area(20 nm)))) [%]  # scatter
  T = 0.9 % at WAFER/IF                 # what the mirrors leave
  P = 250 W at IF
  P + 2 W at WAFER                      # refused: why, and a way on
  P * T                                 # this is at the wafer
  wph = throughput(dose, 96 field/wafer, 8.58 cm^2/field, P * T, 9.5 s/wafer)
  dose = 40 mJ/cm^2 at WAFER            # change an input …
  wph                                   # … and what rests on it has followed
  why wph                               # what it rests on
  solve wph = 120 wafer/h for P in 100 W at IF .. 600 W at IF
  dose = 30 mJ/cm^2 ± 3 % at WAFER      # a value with its uncertainty
  wph
  budget wph                            # which input decides
  save "first.budget"                   # all of this, as a file that replays
`

const uncertaintyPage = `
A value with a standard uncertainty is written
  13.50(2) nm   30 mJ/cm^2 ± 2 %   30 mJ/cm^2 ± 0.6 mJ/cm^2   (66.0 ± 0.5) %
and (k=2), (p=95 %), (nu=4) behind it say more. A percentage behind ± is of
the value. Distributions: rectangular(a, b), triangular(a, b), normal(m, u).
Each literal is one source of error, owned by the name it stands in: x - x is
0(0).
  budget expr          first order, after JCGM 100: which input decides
  propagate expr       by trials, after JCGM 101: mean, interval, histogram
  correlation a, b = 0.8
Answers show two digits of the uncertainty, in brackets: 30.00(60) mJ/cm².
`

const exploringPage = `
  sweep d = 10 nm .. 30 nm by 5 nm : hole_area(d), plot, to "file.csv"
  solve a = b for x in 1 W .. 9 W    every x for which the two agree
  maximise expr for x in a .. b      the best places; minimise, the least
  case low : P = 200 W at IF, then compare wph : base, low
  data r = "rates.csv", then fit r.y = a * r.x + b over r for a, b
A name that exists is replaced for that run; a new one is local to the
statement.
`

const temperaturesPage = `
22 degC is a point on the scale, 295 K a point or a difference.
point - point is a difference, point + point is refused; beside a point K is a
difference. *, / and ^ count a point as its kelvin value, with a note.
`

const filesPage = `
A session file (*.budget) is text: statements, # notes, replies behind "| ".
Text copied from the prompt is a session file as it stands.
  import "conventions.budget"   brings in definitions; the reply records them
  save "today.budget"           writes what was said, whole or not at all
  replay "today.budget"         runs it again and compares what was recorded
Paths are relative to the file and stay below the session's folder.
On the command line:
  dosewright replay FILE            the same; status 1 when an answer moved
  dosewright replay --step FILE     goes through it, one statement at a time
  dosewright replay --update FILE   records the replies of this run in it
  dosewright replay --outside FILE  lets imports lead out of the file's folder
  dosewright page FILE -o OUT.html  makes a page of it
  dosewright eval --json 'x' 'y'    answers statements, a JSON object a line
`

const keysPage = `
Tab completes names, functions, arguments, units and files; inside a call it
first shows the arguments. Up and Down recall lines, Ctrl-R searches them.
Ctrl-C drops the line or the open block, or stops a computation. Ctrl-D on an
empty line leaves, as quit does.
`

const cautionsPage = `
Planning arithmetic only: nothing here sets an exposure limit, interlock or
clearance. Where laser power, hydrogen, vacuum, heat loads or electrical power
are touched, the site's rules, the applicable codes (IEC 60825-1, the local
hydrogen code and others) and licensed practice govern.
`

// unitHelp says what a unit is.
func (s *Session) unitHelp(word string, u units.Unit) string {
	name := s.sys.Name(u.Dimension())
	if name == "" {
		name = "no common name"
	}
	if u.Point() {
		return fmt.Sprintf("%s is a unit of temperature: %s = t/%s + 273.15 as T/K", word, u, u)
	}
	if u.Dimension().IsNumber() {
		return fmt.Sprintf("%s is a name for the number %s", word, strconv.FormatFloat(u.SI(1), 'g', 12, 64))
	}
	return fmt.Sprintf("%s is a unit (%s): 1 %s = %s %s in base units", word, name, u, strconv.FormatFloat(u.SI(1), 'g', 12, 64), s.sys.BaseText(u.Dimension()))
}
