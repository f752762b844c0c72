package units

import (
	"errors"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

func TestQuantityArithmetic(t *testing.T) {
	dose, area, power := Of(Fluence(300)), Of(Area(26e-3*33e-3)), Of(Power(250))
	energy, err := dose.Mul(area)
	if err != nil || energy.Dimension() != dimEnergy {
		t.Fatalf("dose · area is %v, %v", energy, err)
	}
	near.Rel(t, "dose · area", energy.SI(), 0.2574, 1e-15)
	wait, err := energy.Div(power)
	if err != nil || wait.Dimension() != dimDuration {
		t.Fatalf("energy / power is %v, %v", wait, err)
	}
	near.Rel(t, "energy / power", wait.SI(), 0.0010296, 1e-15)
	sum, err := energy.Add(energy)
	if err != nil {
		t.Fatal(err)
	}
	rest, err := sum.Sub(energy)
	if err != nil || rest != energy {
		t.Errorf("e + e − e is %v, %v", rest, err)
	}
	side, err := area.Pow(1, 2)
	if err != nil || side.Dimension() != dimLength {
		t.Fatalf("√area is %v, %v", side, err)
	}
	near.Rel(t, "√area", side.SI(), math.Sqrt(858e-6), 1e-15)
	for _, c := range []struct {
		q, r Quantity
		want int
	}{{energy, sum, -1}, {sum, energy, 1}, {energy, energy, 0}} {
		if got, err := c.q.Compare(c.r); err != nil || got != c.want {
			t.Errorf("%v against %v: %d, %v", c.q, c.r, got, err)
		}
	}
}

func TestQuantityErrors(t *testing.T) {
	length, area, huge, zero := Of(Length(1)), Of(Area(1)), New(1e308, dimLength), New(0, dimLength)
	far := New(1, Dimension{}.with(LengthBase, maxSixth))
	keep := func(q Quantity, err error) error {
		t.Helper()
		if q != (Quantity{}) {
			t.Errorf("a refused result is %v", q)
		}
		return err
	}
	order := func(_ int, err error) error { return err }
	for _, c := range []struct {
		what string
		err  error
		want error
	}{
		{"m + m²", keep(length.Add(area)), ErrDimension},
		{"m − m²", keep(length.Sub(area)), ErrDimension},
		{"m < m²", order(length.Compare(area)), ErrDimension},
		{"huge + huge", keep(huge.Add(huge)), ErrNotFinite},
		{"−huge − huge", keep(New(-1e308, dimLength).Sub(huge)), ErrNotFinite},
		{"huge · huge", keep(huge.Mul(huge)), ErrNotFinite},
		{"m / 0", keep(length.Div(zero)), ErrNotFinite},
		{"0 / 0", keep(zero.Div(zero)), ErrNotFinite},
		{"m / −0", keep(length.Div(New(math.Copysign(0, -1), dimLength))), ErrNotFinite},
		{"0^-1", keep(zero.Pow(-1, 1)), ErrNotFinite},
		{"√−1", keep(New(-1, Dimension{}).Pow(1, 2)), ErrNotFinite},
		{"m^(1/4)", keep(length.Pow(1, 4)), ErrRoot},
		{"m^(1/0)", keep(length.Pow(1, 0)), ErrRoot},
		{"m²¹ · m", keep(far.Mul(length)), ErrExponent},
		{"m²¹ / m⁻¹", keep(far.Div(New(1, dimPerLength))), ErrExponent},
		{"m^22", keep(length.Pow(22, 1)), ErrExponent},
		{"huge²", keep(huge.Pow(2, 1)), ErrNotFinite},
		{"NaN + 1", keep(New(math.NaN(), Dimension{}).Add(New(1, Dimension{}))), ErrNotFinite},
	} {
		if !errors.Is(c.err, c.want) {
			t.Errorf("%s: %v, want %v", c.what, c.err, c.want)
		}
	}
	_, err := Of(Fluence(1)).Add(Of(Power(1)))
	var bad *DimensionError
	if !errors.As(err, &bad) || bad.Have != dimFluence || bad.Rhs != dimPower || bad.Op != "add" {
		t.Fatalf("the sides are not named: %#v", err)
	}
	if !strings.Contains(err.Error(), "kg·s⁻²") || !strings.Contains(err.Error(), "kg·m²·s⁻³") {
		t.Errorf("the text does not name both sides: %v", err)
	}
}
