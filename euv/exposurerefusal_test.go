package euv_test

import (
	"errors"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/units"
)

// call is a function with its arguments and result as plain numbers.
type call func(x []float64) (float64, error)

func number[R units.Kind](v R, err error) (float64, error) { return float64(v), err }

func call1[A, R units.Kind](f func(A) (R, error)) call {
	return func(x []float64) (float64, error) { return number(f(A(x[0]))) }
}

func call2[A, B, R units.Kind](f func(A, B) (R, error)) call {
	return func(x []float64) (float64, error) { return number(f(A(x[0]), B(x[1]))) }
}

func call3[A, B, C, R units.Kind](f func(A, B, C) (R, error)) call {
	return func(x []float64) (float64, error) { return number(f(A(x[0]), B(x[1]), C(x[2]))) }
}

func call4[A, B, C, D, R units.Kind](f func(A, B, C, D) (R, error)) call {
	return func(x []float64) (float64, error) { return number(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]))) }
}

func call5[A, B, C, D, E, R units.Kind](f func(A, B, C, D, E) (R, error)) call {
	return func(x []float64) (float64, error) { return number(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]), E(x[4]))) }
}

func call6[A, B, C, D, E, F, R units.Kind](f func(A, B, C, D, E, F) (R, error)) call {
	return func(x []float64) (float64, error) {
		return number(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]), E(x[4]), F(x[5])))
	}
}

// argument is an argument's name, a value that is taken, and values that are
// not. NaN and the infinities are tried besides.
type argument struct {
	name string
	good float64
	bad  []float64
}

func above0(name string, good float64) argument { return argument{name, good, []float64{0, -good}} }
func from0(name string, good float64) argument  { return argument{name, good, []float64{-good}} }
func part(name string, good float64) argument {
	return argument{name, good, []float64{0, -good, 1 + 1e-15, 50}}
}

func fieldGeometry() []argument {
	return []argument{above0("width", 0.026), above0("height", 0.033), above0("diameter", 0.3), {"edge", 0.003, []float64{-0.003, 0.15, 1}}}
}

func TestExposureRefusals(t *testing.T) {
	wavelength := above0("wavelength", 13.5e-9)
	dose, dose0 := above0("dose", 300), from0("dose", 300)
	power, power0 := above0("power", 2), from0("power", 250)
	fields, area, overhead := above0("fields_per_wafer", 96), above0("field_area", 8.58e-4), from0("overhead", 9.5)
	angle := argument{"angle", 0.1, []float64{-0.1, math.Pi / 2, 2}}
	order := argument{"order", 1, []float64{0, -1, 1.5, 1e300}}
	delta := argument{"delta", 0.03, []float64{1, -1, 2}}
	solid := argument{"solid_angle", 5, []float64{0, -1, 6.2832}}
	rate, pulses := from0("rate", 1.6e-12), from0("pulses", 60e9)
	for name, c := range map[string]struct {
		f    call
		args []argument
	}{
		"PhotonEnergy":         {call1(euv.PhotonEnergy), []argument{wavelength}},
		"PhotonWavelength":     {call1(euv.PhotonWavelength), []argument{above0("energy", 1.5e-17)}},
		"PhotonDensity":        {call2(euv.PhotonDensity), []argument{dose0, wavelength}},
		"PhotonCount":          {call3(euv.PhotonCount), []argument{dose0, above0("area", 4e-16), wavelength}},
		"PhotonRate":           {call2(euv.PhotonRate), []argument{power0, wavelength}},
		"DoseOf":               {call2(euv.DoseOf), []argument{from0("photons_per_area", 2e19), wavelength}},
		"HoleArea":             {call1(euv.HoleArea), []argument{above0("diameter", 2e-8)}},
		"RectangleArea":        {call2(euv.RectangleArea), []argument{above0("width", 0.026), above0("height", 0.033)}},
		"EllipseArea":          {call2(euv.EllipseArea), []argument{above0("a", 2e-8), above0("b", 3e-8)}},
		"BraggPeriod":          {call4(euv.BraggPeriod), []argument{wavelength, angle, order, delta}},
		"BraggWavelength":      {call4(euv.BraggWavelength), []argument{above0("period", 7e-9), angle, order, delta}},
		"SourcePower":          {call6(euv.SourcePower), []argument{dose, {"throughput", 1.0 / 24, []float64{0, -1, 1 / 9.5, 1}}, fields, area, overhead, part("transmission", 0.009)}},
		"CollectedFraction":    {call1(euv.CollectedFraction), []argument{solid}},
		"LaserPower":           {call5(euv.LaserPower), []argument{power0, part("conversion_efficiency", 0.055), solid, part("collector", 0.41), part("path", 0.9)}},
		"PulseEnergy":          {call2(euv.PulseEnergy), []argument{power0, above0("repetition", 5e4)}},
		"CollectorLoss":        {collector(euv.CollectorLoss, euv.Exponential), []argument{rate, pulses}},
		"CollectorLifeAverage": {collector(euv.CollectorLifeAverage, euv.Exponential), []argument{rate, pulses}},
		"CollectorLoss, linear": {collector(euv.CollectorLoss, euv.Linear), []argument{
			rate,
			{"pulses", 60e9, []float64{-1, 1e12}},
		}},
		"CollectorLifeAverage, linear": {collector(euv.CollectorLifeAverage, euv.Linear), []argument{
			rate,
			{"pulses", 60e9, []float64{-1, 1e12}},
		}},
		"Etendue":            {call4(euv.Etendue), []argument{above0("width", 0.026), above0("height", 0.002), {"NA", 0.33, []float64{0, -0.33, 1, 1.35}}, part("fill", 0.5)}},
		"EnergyPerPass":      {call4(euv.EnergyPerPass), []argument{from0("power_exposing", 1e6), from0("power_idle", 1e6), part("busy", 0.8), above0("throughput", 0.04)}},
		"CoolingFlow":        {call2(euv.CoolingFlow), []argument{power0, above0("rise", 8)}},
		"ScanDose":           {call3(euv.ScanDose), []argument{power0, above0("speed", 0.25), above0("slit_across", 0.026)}},
		"FieldTimeOf":        {call6(euv.FieldTimeOf), []argument{above0("field_along", 0.033), above0("slit_along", 0.002), above0("speed", 0.25), above0("acceleration", 15), from0("step", 0.02), from0("turn", 2)}},
		"WaferTimeOf":        {call5(euv.WaferTimeOf), []argument{dose, fields, area, power, overhead}},
		"ThroughputOf":       {call5(euv.ThroughputOf), []argument{dose, fields, area, power, overhead}},
		"CompleteFields":     {call4(euv.CompleteFields), fieldGeometry()},
		"TouchedFieldsLeast": {call4(euv.TouchedFieldsLeast), fieldGeometry()},
		"TouchedFieldsMost":  {call4(euv.TouchedFieldsMost), fieldGeometry()},
		"PulsesPerPoint":     {call3(euv.PulsesPerPoint), []argument{above0("repetition", 5e4), above0("slit_along", 0.002), above0("speed", 0.25)}},
		"DoseNoise":          {call3(euv.DoseNoise), []argument{from0("pulse_noise", 0.03), {"pulses", 400, []float64{0, 0.99, -400}}, {"correlation", 0.3, []float64{-1, 1, 2}}}},
		"MaskDose":           {call4(euv.MaskDose), []argument{dose0, above0("reduction_x", 4), above0("reduction_y", 4), part("transmission", 0.08)}},
	} {
		t.Run(name, func(t *testing.T) {
			x := make([]float64, len(c.args))
			for i, a := range c.args {
				x[i] = a.good
			}
			if y, err := c.f(x); err != nil || !(y > 0) {
				t.Fatalf("sound arguments: got %g, %v", y, err)
			}
			for i, a := range c.args {
				for _, bad := range append([]float64{math.NaN(), math.Inf(1), math.Inf(-1)}, a.bad...) {
					x[i] = bad
					y, err := c.f(x)
					checkRefusal(t, a.name, bad, y, err)
				}
				x[i] = a.good
			}
		})
	}
}

func collector(f func(units.PulseLoss, units.PulseCount, euv.LossModel) (units.Ratio, error), model euv.LossModel) call {
	return func(x []float64) (float64, error) {
		return number(f(units.PulseLoss(x[0]), units.PulseCount(x[1]), model))
	}
}

func checkRefusal(t *testing.T, name string, bad, y float64, err error) {
	t.Helper()
	var fault *euv.ArgumentError
	switch {
	case !errors.As(err, &fault) || fault.Argument != name:
		t.Errorf("%s = %g: got error %v", name, bad, err)
	case y != 0:
		t.Errorf("%s = %g: got %g besides the error", name, bad, y)
	case !strings.Contains(err.Error(), name+" is ") || !strings.Contains(err.Error(), "must be "+fault.Want):
		t.Errorf("%s = %g: the message is %q", name, bad, err)
	}
}

// What the table above cannot say: a limit may be +Inf, a model is a word, a
// multilayer reflects totally near grazing.
func TestExposureRefusalsOfTheirOwn(t *testing.T) {
	for i, name := range []string{"power", "dose", "slit_across", "limit"} {
		for _, bad := range []float64{math.NaN(), math.Inf(-1), -1, 0, math.Inf(1)} {
			if name == "limit" && bad > 0 {
				continue
			}
			x := []float64{2, 300, 0.026, 1}
			x[i] = bad
			y, err := call4(euv.ScanSpeed)(x)
			checkRefusal(t, name, bad, y, err)
		}
	}
	for _, bad := range []euv.LossModel{-1, 2} {
		y, err := number(euv.CollectorLoss(1e-12, 1e9, bad))
		checkRefusal(t, "model", float64(bad), y, err)
		y, err = number(euv.CollectorLifeAverage(1e-12, 1e9, bad))
		checkRefusal(t, "model", float64(bad), y, err)
	}
	// the critical angle of δ = 0.03 is asin 0.97 = 75.93° (arithmetic)
	y, err := number(euv.BraggPeriod(13.5e-9, units.Angle(76*math.Pi/180), 1, 0.03))
	checkRefusal(t, "angle", 76, y, err)
	if !strings.Contains(err.Error(), "less than 75.93°") {
		t.Errorf("the message is %q", err)
	}
}

// Results beyond floating point are refused, not passed on.
func TestExposureOverflow(t *testing.T) {
	const huge, tiny = math.MaxFloat64, math.SmallestNonzeroFloat64
	for name, c := range map[string]struct {
		f call
		x []float64
	}{
		"PhotonRate":      {call2(euv.PhotonRate), []float64{huge, 1}},
		"PhotonCount":     {call3(euv.PhotonCount), []float64{huge, huge, 1}},
		"PhotonDensity":   {call2(euv.PhotonDensity), []float64{huge, 1}},
		"DoseOf":          {call2(euv.DoseOf), []float64{huge, 1e-300}},
		"HoleArea":        {call1(euv.HoleArea), []float64{1e200}},
		"BraggWavelength": {call4(euv.BraggWavelength), []float64{huge, 0, 1, 0}},
		"SourcePower":     {call6(euv.SourcePower), []float64{huge, 1, 1, huge, 0, 1}},
		"LaserPower":      {call5(euv.LaserPower), []float64{huge, 0.01, 1, 0.1, 0.1}},
		"CollectorLoss":   {collector(euv.CollectorLoss, euv.Exponential), []float64{huge, huge}},
		"WaferTimeOf":     {call5(euv.WaferTimeOf), []float64{huge, huge, 1, 1, 0}},
		"ThroughputOf":    {call5(euv.ThroughputOf), []float64{tiny, 1, 1, huge, 0}},
		"ScanSpeed":       {call4(euv.ScanSpeed), []float64{huge, tiny, 1, math.Inf(1)}},
		"ScanDose":        {call3(euv.ScanDose), []float64{huge, tiny, 1}},
		"MaskDose":        {call4(euv.MaskDose), []float64{huge, 0.1, 0.1, 1}},
		"EnergyPerPass":   {call4(euv.EnergyPerPass), []float64{1, 1, tiny, 1}},
	} {
		y, err := c.f(c.x)
		var fault *euv.ArgumentError
		if !errors.As(err, &fault) || y != 0 {
			t.Errorf("%s: got %g, %v", name, y, err)
		}
	}
}
