package units

import (
	"strconv"
	"strings"
)

// habit is how the trade names a dimension and states its quantities.
type habit struct {
	name  string
	rungs []rung
}

// rung is a unit that is used from a magnitude on.
type rung struct {
	unit Unit
	from float64 // in SI units
}

// habitRows: a dimension's name and its units in rising order. A unit serves
// from one of it on, or from the number behind the colon; the first serves
// below too. "~x" stands for x with every engineering prefix.
const habitRows = `
length              pm nm:0.01 µm mm m km
area                nm² µm² mm² cm² m²
volume              nm³ µm³ mm³ cm³ L m³
time                ~s h:1 d:2 year:2
speed               nm/s µm/s mm/s m/s
acceleration        m/s²
mass                µg mg g kg t
density             g/cm³
force               ~N
pressure            ~Pa
energy              meV eV keV J:1e-15 fJ pJ nJ µJ mJ J kJ MJ GJ TJ
power               ~W
fluence             nJ/cm² µJ/cm² mJ/cm²:0.001 J/cm²:10
irradiance          µW/cm² mW/cm² W/cm² kW/cm²
energy·volume       mJ·nm³
charge              ~C
charge/area         µC/cm²
current             ~A
voltage             ~V
resistance          ~Ω
capacitance         ~F
magnetic·flux·density ~T
rate                s⁻¹
1/length            m⁻¹ µm⁻¹:0.001 nm⁻¹:10
areal·density       m⁻² cm⁻²:0.001 µm⁻²:0.001 nm⁻²:0.001
number·density      m⁻³ cm⁻³:0.001 µm⁻³:0.001 nm⁻³:0.001
temperature         mK K:0.1
1/temperature       ppm/K K⁻¹:0.01
amount·of·substance ~mol
volume/time         mL/min L/min
thermal·conductivity W/(m·K)
heat·capacity·per·mass J/(kg·K)
time/area           s/cm²
power/length        W/m
area·per·time       cm²/s
throughput          wafer/h
time/wafer          s/wafer
energy/wafer        J/wafer kJ/wafer kWh/wafer:0.277777777
field·count·per·wafer   field/wafer
field·rate           field/h
area/field          mm²/field cm²/field
area/wafer          cm²/wafer
energy/field        mJ/field J/field
time/field          ms/field s/field
die·count·per·wafer   die/wafer
wafer·count          wafer
field·count          field
die·count            die
pulse·count          pulse kpulse Mpulse Gpulse
pulse·rate          pulse/s kpulse/s Mpulse/s
energy/pulse        nJ/pulse µJ/pulse mJ/pulse J/pulse
fluence/pulse       µJ/(cm²·pulse) mJ/(cm²·pulse)
loss·per·pulse      %/Gpulse
`

// readHabits reads the table for the units of a System.
func readHabits(s *System) map[Dimension]habit {
	table := map[Dimension]habit{}
	for line := range strings.Lines(habitRows) {
		words := strings.Fields(line)
		if len(words) < 2 {
			continue
		}
		h := habit{name: strings.ReplaceAll(words[0], "·", " ")}
		if strings.Contains(words[0], "/") || words[0] == "energy·volume" {
			h.name = words[0]
		}
		for _, word := range words[1:] {
			h.rungs = append(h.rungs, s.readRungs(word)...)
		}
		table[h.rungs[0].unit.dim] = h
	}
	return table
}

func (s *System) readRungs(word string) []rung {
	if symbol, all := strings.CutPrefix(word, "~"); all {
		var list []rung
		for _, p := range engineering {
			list = append(list, s.readRungs(p+symbol)...)
		}
		return list
	}
	text, from, stated := strings.Cut(word, ":")
	u, err := s.Parse(text)
	if err != nil {
		return nil
	}
	n := 1.0
	if stated {
		n, _ = strconv.ParseFloat(from, 64)
	}
	return []rung{{u, n * u.scale.float()}}
}

// at chooses the rung for a magnitude; a hair below counts as on it, so that
// 999.9999999999999 nm is a micrometre.
func (h habit) at(si float64) Unit {
	if si < 0 {
		si = -si
	}
	chosen := h.rungs[0].unit
	if si == 0 {
		return h.middle()
	}
	for _, r := range h.rungs {
		if si >= r.from*(1-1e-12) {
			chosen = r.unit
		}
	}
	return chosen
}

// middle is the unit for zero and for naming the dimension: the one without a
// prefix where all prefixes serve, else the most usual, listed last but for
// the large ones.
func (h habit) middle() Unit {
	for _, r := range h.rungs {
		if r.unit.scale.isOne() && len(r.unit.parts) == 1 {
			return r.unit
		}
	}
	return h.rungs[len(h.rungs)/2].unit
}
