package euv_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// demoChain is made up; no tool stands behind its numbers.
func demoChain(t testing.TB) euv.Chain {
	c, err := euv.NewChain(
		euv.SourcePlane,
		euv.Element{Label: "collector", Factor: 0.41},
		euv.FocusPlane,
		euv.Element{Label: "illuminator", Factor: 0.7, Crossings: 4},
		euv.Element{Label: "pellicle", Factor: 0.9, Crossings: 1},
		euv.MaskPlane,
		euv.Element{Label: "mask", Factor: 0.65},
		euv.Element{Label: "pellicle, back", Factor: 0.9},
		euv.Reduction{X: 4, Y: 8},
		euv.Element{Label: "projection", Factor: 0.7, Crossings: 6},
		euv.Plane("LENS"),
		euv.WaferPlane,
	)
	if err != nil {
		t.Fatal(err)
	}
	return c
}

// Powers of 0.70: arithmetic; "about 2 % after 11 reflections" and "about 70 %
// per mirror" are common practice, no source.
func TestChainOfMirrors(t *testing.T) {
	for mirrors, want := range map[int]float64{9: 0.04035, 11: 0.01977, 12: 0.01384} {
		c, err := euv.NewChain(euv.FocusPlane, euv.Element{Label: "mirrors", Factor: 0.70, Crossings: mirrors}, euv.WaferPlane)
		if err != nil {
			t.Fatal(err)
		}
		got := sound[units.Ratio](t)(c.Transmission(euv.FocusPlane, euv.WaferPlane))
		near.Rel(t, "transmission", got, want, 3e-4)
		one := 1.0
		for range mirrors {
			one *= 0.70
		}
		near.Rel(t, "one by one", got, one, 1e-14)
	}
}

func TestChainCarries(t *testing.T) {
	c := demoChain(t)
	toWafer := 0.65 * 0.9 * math.Pow(0.7, 6)
	toMask := math.Pow(0.7, 4) * 0.9
	near.Rel(t, "IF to MASK", sound[units.Ratio](t)(c.Transmission(euv.FocusPlane, euv.MaskPlane)), toMask, 1e-15)
	near.Rel(t, "SOURCE to WAFER", sound[units.Ratio](t)(c.Transmission(euv.SourcePlane, euv.WaferPlane)), 0.41*toMask*toWafer, 1e-15)
	near.Rel(t, "against the light", sound[units.Ratio](t)(c.Transmission(euv.WaferPlane, euv.FocusPlane)), 1/(toMask*toWafer), 1e-15)
	near.Rel(t, "on the spot", sound[units.Ratio](t)(c.Transmission(euv.MaskPlane, euv.MaskPlane)), 1, 0)
	near.Rel(t, "own plane", sound[units.Ratio](t)(c.Transmission("LENS", euv.WaferPlane)), 1, 0)
	near.Rel(t, "power", sound[units.Power](t)(c.CarryPower(250, euv.FocusPlane, euv.WaferPlane)), 250*toMask*toWafer, 1e-15)

	dose := units.Fluence(30 * mJPerCm2)
	onMask := sound[units.Fluence](t)(c.CarryFluence(dose, euv.WaferPlane, euv.MaskPlane))
	near.Rel(t, "dose on the mask", onMask, float64(dose)/(32*toWafer), 1e-14)
	near.Rel(t, "and by the named function", sound[units.Fluence](t)(euv.MaskDose(dose, 4, 8, units.Ratio(toWafer))), onMask, 1e-14)
	near.Rel(t, "and back", sound[units.Fluence](t)(c.CarryFluence(units.Fluence(onMask), euv.MaskPlane, euv.WaferPlane)), float64(dose), 1e-14)
	near.Rel(t, "dose on the spot", sound[units.Fluence](t)(c.CarryFluence(7, euv.FocusPlane, euv.FocusPlane)), 7, 0)
}

func TestChainWalk(t *testing.T) {
	c := demoChain(t)
	walk, err := c.Walk(250, euv.FocusPlane)
	if err != nil {
		t.Fatal(err)
	}
	var order []string
	sum := 0.0
	for _, p := range walk {
		order = append(order, string(p.Plane)+p.Label)
		sum += float64(p.Taken)
		if p.Plane != "" {
			near.Rel(t, string(p.Plane), float64(p.Power), sound[units.Power](t)(c.CarryPower(250, euv.FocusPlane, p.Plane)), 1e-14)
		}
	}
	want := "SOURCE collector IF illuminator pellicle MASK mask pellicle, back projection LENS WAFER"
	if got := strings.Join(order, " "); got != want {
		t.Errorf("order: got %s, want %s", got, want)
	}
	near.Rel(t, "what is taken and what is left", sum+float64(walk[len(walk)-1].Power), 250/0.41, 1e-14)
	near.Rel(t, "at its own plane exactly", float64(walk[2].Power), 250, 0)
}

// A slice given to NewChain may change afterwards; the chain does not.
func TestChainIsImmutable(t *testing.T) {
	steps := []euv.Step{euv.MaskPlane, euv.Element{Label: "half", Factor: 0.5}, euv.WaferPlane}
	c, err := euv.NewChain(steps...)
	if err != nil {
		t.Fatal(err)
	}
	steps[1] = euv.Element{Label: "none", Factor: 0}
	near.Rel(t, "transmission", sound[units.Ratio](t)(c.Transmission(euv.MaskPlane, euv.WaferPlane)), 0.5, 0)
}

func TestNewChainRefuses(t *testing.T) {
	element := func(factor units.Ratio, crossings int) euv.Element {
		return euv.Element{Label: "window", Factor: factor, Crossings: crossings}
	}
	focus, mask, wafer := euv.FocusPlane, euv.MaskPlane, euv.WaferPlane
	for _, c := range []struct {
		argument, text string // argument is "" for a *ChainError
		steps          []euv.Step
	}{
		{"", "two planes", nil},
		{"", "two planes", []euv.Step{focus, element(0.5, 1)}},
		{"", "a name of its own", []euv.Step{focus, focus}},
		{"", "a name of its own", []euv.Step{focus, euv.Plane("")}},
		{"", "a step is", []euv.Step{focus, nil, wafer}},
		{"", "a step is", []euv.Step{focus, &euv.Element{Label: "pointer"}, wafer}},
		{"", "one reduction", []euv.Step{mask, euv.Reduction{X: 4, Y: 4}, euv.Reduction{X: 4, Y: 4}, wafer}},
		{"", "between", []euv.Step{focus, euv.Reduction{X: 4, Y: 4}, wafer}},
		{"", "between", []euv.Step{focus, euv.Reduction{X: 4, Y: 4}, mask, wafer}},
		{"", "between", []euv.Step{mask, wafer, euv.Reduction{X: 4, Y: 4}}},
		{"window", "between 0 and 1", []euv.Step{focus, element(1.2, 1), wafer}},
		{"window", "between 0 and 1", []euv.Step{focus, element(-0.1, 1), wafer}},
		{"window", "between 0 and 1", []euv.Step{focus, element(units.Ratio(math.NaN()), 1), wafer}},
		{"window crossings", "0 or greater", []euv.Step{focus, element(0.5, -1), wafer}},
		{"reduction x", "greater than 0", []euv.Step{mask, euv.Reduction{X: 0, Y: 4}, wafer}},
		{"reduction y", "greater than 0", []euv.Step{mask, euv.Reduction{X: 4, Y: units.Ratio(math.Inf(1))}, wafer}},
	} {
		_, err := euv.NewChain(c.steps...)
		checkChainError(t, err, c.argument, c.text)
	}
}

func checkChainError(t *testing.T, err error, argument, text string) {
	t.Helper()
	var bad *euv.ArgumentError
	var chain *euv.ChainError
	switch {
	case err == nil || !strings.Contains(err.Error(), text):
		t.Errorf("got error %v, want one with %q", err, text)
	case argument != "" && (!errors.As(err, &bad) || bad.Argument != argument):
		t.Errorf("got error %v, want an *ArgumentError of %s", err, argument)
	case argument == "" && !errors.As(err, &chain):
		t.Errorf("got error %T, want a *ChainError", err)
	}
}

func TestChainRefuses(t *testing.T) {
	dark, err := euv.NewChain(euv.FocusPlane, euv.MaskPlane, euv.Element{Label: "lid"}, euv.WaferPlane)
	if err != nil {
		t.Fatal(err)
	}
	c := demoChain(t)
	ratio := func(_ units.Ratio, err error) error { return err }
	power := func(_ units.Power, err error) error { return err }
	dose := func(_ units.Fluence, err error) error { return err }
	walk := func(_ []euv.Passage, err error) error { return err }
	for _, c := range []struct {
		err            error
		argument, text string
	}{
		{ratio(euv.Chain{}.Transmission(euv.FocusPlane, euv.WaferPlane)), "", "no plane IF"},
		{ratio(c.Transmission(euv.FocusPlane, "PUPIL")), "", "no plane PUPIL"},
		{ratio(dark.Transmission(euv.WaferPlane, euv.MaskPlane)), "", "no light passes from MASK to WAFER"},
		{power(c.CarryPower(1, "PUPIL", euv.WaferPlane)), "", "no plane PUPIL"},
		{power(c.CarryPower(-1, euv.FocusPlane, euv.WaferPlane)), "power", "0 or greater"},
		{power(c.CarryPower(units.Power(math.NaN()), euv.FocusPlane, euv.WaferPlane)), "power", "0 or greater"},
		{power(c.CarryPower(math.MaxFloat64, euv.WaferPlane, euv.FocusPlane)), "power", "finite"},
		{dose(c.CarryFluence(-1, euv.MaskPlane, euv.WaferPlane)), "dose", "0 or greater"},
		{dose(c.CarryFluence(1, euv.FocusPlane, euv.WaferPlane)), "", "between MASK and WAFER only"},
		{dose(c.CarryFluence(1, "PUPIL", euv.WaferPlane)), "", "no plane PUPIL"},
		{dose(dark.CarryFluence(1, euv.MaskPlane, euv.WaferPlane)), "", "no reduction"},
		{walk(c.Walk(-1, euv.FocusPlane)), "power", "0 or greater"},
		{walk(c.Walk(1, "PUPIL")), "", "no plane PUPIL"},
		{walk(dark.Walk(1, euv.WaferPlane)), "", "no light passes"},
		{walk(euv.Chain{}.Walk(1, euv.WaferPlane)), "", "no plane WAFER"},
	} {
		checkChainError(t, c.err, c.argument, c.text)
	}
}
