package main

import (
	"context"
	"fmt"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// conventions are those of an invented line, in the language.
var conventions = []string{
	"field_area = 26 mm * 33 mm / 1 field",
	"overhead = 9.5 s/wafer  # time of a wafer in which nothing is exposed",
	"dose = 34 mJ/cm^2 at WAFER",
	"power = 2.1 W at WAFER",
	"fields = 96 field/wafer",
	"wph = throughput(dose, fields, field_area, power, overhead)",
	"heat = dose * field_area * fields  # that a wafer takes up",
}

// limits are what a lot must keep.
var limits = struct {
	throughput units.Throughput  // at least
	heat       units.WaferEnergy // at most
	dose       units.Fluence     // at least; what is below was written in another unit
}{throughput: 120. / 3600, heat: 29, dose: 50}

// budget holds the formulas that every lot is put through.
type budget struct{ throughput, heat *repl.Formula }

// newBudget compiles the formulas with what a lot says left open.
func newBudget(ctx context.Context) (*budget, error) {
	s, err := repl.Open(repl.Config{})
	if err != nil {
		return nil, err
	}
	for _, text := range conventions {
		if err := s.Define(ctx, text); err != nil {
			return nil, fmt.Errorf("%s: %w", text, err)
		}
	}
	z, err := s.Freeze(ctx)
	if err != nil {
		return nil, err
	}
	dose, fields := repl.InputOf[units.Fluence]("dose"), repl.InputOf[units.FieldsPerWafer]("fields")
	var b budget
	if b.throughput, err = z.Compile("wph", dose, repl.InputOf[units.Power]("power"), fields); err != nil {
		return nil, err
	}
	b.heat, err = z.Compile("heat", dose, fields)
	return &b, err
}

// verdict is what is to be said of a lot.
type verdict struct {
	throughput units.Throughput
	heat       units.WaferEnergy
	violations []string
}

// judge puts one lot through the budget.
func (b *budget) judge(l lot) (verdict, error) {
	var v verdict
	q, err := b.throughput.Run(units.Of(l.dose), units.Of(l.power), units.Of(l.fields))
	if err != nil {
		return v, err
	}
	if v.throughput, err = units.As[units.Throughput](q); err != nil {
		return v, err
	}
	if q, err = b.heat.Run(units.Of(l.dose), units.Of(l.fields)); err != nil {
		return v, err
	}
	if v.heat, err = units.As[units.WaferEnergy](q); err != nil {
		return v, err
	}
	v.violations = violations(l, v)
	return v, nil
}

// violations are the limits that a lot does not keep. Go compares quantities of
// one type only: a dose does not meet a power by mistake.
func violations(l lot, v verdict) []string {
	var list []string
	if v.throughput < limits.throughput {
		list = append(list, fmt.Sprintf("throughput below %s", units.Of(limits.throughput)))
	}
	if v.heat > limits.heat {
		list = append(list, fmt.Sprintf("heat above %s", units.Of(limits.heat)))
	}
	if l.dose < limits.dose {
		list = append(list, fmt.Sprintf("a dose of %s, below %s", units.Of(l.dose), units.Of(limits.dose)))
	}
	return list
}
