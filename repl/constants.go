package repl

import (
	"math"
	"sync"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/units"
)

// constantRow is a named constant of the language.
type constantRow struct {
	name, doc, unit string
	value           float64
	node            *program.Node
}

// constants are CODATA 2022; those that define the SI are exact.
var constants = sync.OnceValue(func() map[string]constantRow {
	rows := map[string]constantRow{}
	for _, r := range []constantRow{
		{name: "pi", doc: "ratio of a circle's circumference to its diameter", value: math.Pi},
		{name: "planck_constant", doc: "Planck constant, exact in the SI", unit: "J·s", value: euv.PlanckConstant},
		{name: "speed_of_light", doc: "speed of light in vacuum, exact in the SI", unit: "m/s", value: euv.SpeedOfLight},
		{name: "elementary_charge", doc: "elementary charge, exact in the SI", unit: "C", value: euv.ElementaryCharge},
		{name: "boltzmann_constant", doc: "Boltzmann constant, exact in the SI", unit: "J/K", value: euv.BoltzmannConstant},
		{name: "avogadro_constant", doc: "Avogadro constant, exact in the SI", unit: "mol⁻¹", value: euv.AvogadroConstant},
		{name: "classical_electron_radius", doc: "classical electron radius, CODATA 2022", unit: "m", value: euv.ClassicalElectronRadius},
	} {
		u, err := units.Standard().Parse(r.unit)
		if r.unit != "" && err != nil {
			continue
		}
		r.node = program.NewConstant(units.New(r.value, u.Dimension()))
		rows[r.name] = r
	}
	return rows
})

func (r constantRow) text(s *Session) string {
	u, err := s.sys.Parse(r.unit)
	if r.unit == "" || err != nil {
		u = units.Unit{}
	}
	return s.sys.TextIn(r.value, u, 12)
}
