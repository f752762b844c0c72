package units

import (
	"errors"
	"testing"

	"example.com/dosewright/internal/near"
	"github.com/martinlindhe/unit"
)

// The coherent SI unit of every type that is an alias is one of it, so that a
// value of the module means the same here. No other constant of the module is
// relied on.
func TestAliasesAreCoherent(t *testing.T) {
	for _, c := range []struct {
		unit string
		one  Quantity
	}{
		{"m/s^2", Of[Acceleration](unit.MeterPerSecondSquared)},
		{"rad", Of[Angle](unit.Radian)},
		{"m^2", Of[Area](unit.SquareMeter)},
		{"A", Of[Current](unit.Ampere)},
		{"s", Of[Duration](unit.Second)},
		{"J", Of[Energy](unit.Joule)},
		{"N", Of[Force](unit.Newton)},
		{"Hz", Of[Frequency](unit.Hertz)},
		{"m", Of[Length](unit.Meter)},
		{"kg", Of[Mass](unit.Kilogram)},
		{"W", Of[Power](unit.Watt)},
		{"Pa", Of[Pressure](unit.Pascal)},
		{"m/s", Of[Speed](unit.MetersPerSecond)},
		{"K", Of[Temperature](unit.Kelvin)},
		{"V", Of[Voltage](unit.Volt)},
		{"m^3", Of[Volume](unit.CubicMeter)},
	} {
		u := parse(t, c.unit)
		if c.one.Dimension() != u.dim || !u.scale.isOne() {
			t.Errorf("%s: the type is %s", c.unit, c.one.Dimension())
		}
		near.Abs(t, "1 "+c.unit, c.one.SI(), 1, 0)
	}
}

// Every typed quantity has the dimension of the unit that its comment names.
func TestDimensionOf(t *testing.T) {
	for _, c := range []struct {
		unit string
		got  Dimension
	}{
		{"1", DimensionOf[Ratio]()},
		{"1", DimensionOf[Count]()},
		{"sr", DimensionOf[SolidAngle]()},
		{"rad", DimensionOf[Angle]()},
		{"1", DimensionOf[float64]()},
		{"1", DimensionOf[int]()},
		{"J/m^2", DimensionOf[Fluence]()},
		{"W/m^2", DimensionOf[Irradiance]()},
		{"m^-2", DimensionOf[ArealDensity]()},
		{"m^-3", DimensionOf[NumberDensity]()},
		{"m^-1", DimensionOf[AttenuationCoefficient]()},
		{"s^-1", DimensionOf[Rate]()},
		{"s^-1", DimensionOf[Frequency]()},
		{"kg/m^3", DimensionOf[Density]()},
		{"J/m^3", DimensionOf[EnergyDensity]()},
		{"J*m^3", DimensionOf[EnergyVolume]()},
		{"C/m^2", DimensionOf[ChargeDensity]()},
		{"K", DimensionOf[TemperatureDifference]()},
		{"K^-1", DimensionOf[ExpansionCoefficient]()},
		{"m^3/s", DimensionOf[FlowRate]()},
		{"m^2*sr", DimensionOf[Etendue]()},
		{"wafer/s", DimensionOf[Throughput]()},
		{"s/wafer", DimensionOf[WaferTime]()},
		{"J/wafer", DimensionOf[WaferEnergy]()},
		{"field/wafer", DimensionOf[FieldsPerWafer]()},
		{"m^2/field", DimensionOf[FieldArea]()},
		{"s/field", DimensionOf[FieldTime]()},
		{"pulse/s", DimensionOf[PulseRate]()},
		{"pulse", DimensionOf[PulseCount]()},
		{"J/pulse", DimensionOf[PulseEnergy]()},
		{"pulse^-1", DimensionOf[PulseLoss]()},
		{"kg*m/s^2", DimensionOf[Force]()},
		{"K", DimensionOf[Temperature]()},
		{"V", DimensionOf[Voltage]()},
		{"A", DimensionOf[Current]()},
		{"m/s^2", DimensionOf[Acceleration]()},
		{"dpt", DimensionOf[dioptre]()},
	} {
		want := dimPerLength
		if c.unit != "dpt" {
			want = parse(t, c.unit).dim
		}
		if c.got != want {
			t.Errorf("%s: %s", c.unit, c.got)
		}
	}
}

// dioptre is a host's own type, which says its dimension by a method.
type dioptre float64

func (dioptre) Dimension() Dimension { return dimPerLength }

func TestOfAndAs(t *testing.T) {
	q, err := Of(Fluence(300)).Mul(Of(Area(2)))
	if err != nil {
		t.Fatal(err)
	}
	e, err := As[Energy](q)
	if err != nil {
		t.Fatal(err)
	}
	near.Abs(t, "300 J/m² · 2 m²", float64(e), 600, 0)
	if p, err := As[Power](q); !errors.Is(err, ErrDimension) || p != 0 {
		t.Errorf("an energy as a power: %g, %v", float64(p), err)
	}
	if d, err := As[dioptre](New(2, dimPerLength)); err != nil || d != 2 {
		t.Errorf("a host's type: %g, %v", float64(d), err)
	}
}
