package units_test

import (
	"errors"
	"fmt"

	"example.com/dosewright/units"
)

func ExampleSystem_Parse() {
	s := units.Standard()
	u, err := s.Parse("mJ/cm^2")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(u, s.Name(u.Dimension()), s.BaseText(u.Dimension()))

	_, err = s.Parse("W/m*K")
	var bad *units.ParseError
	if errors.As(err, &bad) {
		fmt.Println(bad.Hint)
	}
	// Output:
	// mJ/cm² fluence kg·s⁻²
	// write W/(m*K) or W*K/m
}

func ExampleUnit_Read() {
	s := units.Standard()
	for _, q := range [][2]string{{"13.5", "nm"}, {"22", "degC"}, {"6", "deg"}} {
		u, err := s.Parse(q[1])
		if err != nil {
			fmt.Println(err)
			return
		}
		si, err := u.Read(q[0])
		fmt.Println(si, err, u.Label(u.Digits(si)))
	}
	// Output:
	// 1.35e-08 <nil> 13.5 nm
	// 295.15 <nil> 22 °C
	// 0.10471975511965978 <nil> 6°
}

func ExampleQuantity_Mul() {
	dose, area := units.Of(units.Fluence(300)), units.Of(units.Area(26e-3*33e-3))
	energy, err := dose.Mul(area)
	fmt.Println(energy, err)

	_, err = dose.Add(area)
	fmt.Println(errors.Is(err, units.ErrDimension))
	// Output:
	// 257.40 mJ <nil>
	// true
}

func ExampleAs() {
	energy, err := units.As[units.Energy](units.Of(units.Fluence(300)))
	fmt.Println(float64(energy), err)
	// Output: 0 cannot convert kg·s⁻² and kg·m²·s⁻²
}

func ExampleSystem_Between() {
	s := units.Standard()
	fmt.Println(s.Between(units.DimensionOf[units.Fluence](), units.DimensionOf[units.Power]()))
	// Output: area/time
}

func ExampleSystem_WithCounted() {
	s, lot, err := units.Standard().WithCounted("lot")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(s.Text(units.New(40, lot.Of()), 5))
	_, _, err = s.WithCounted("wafers")
	fmt.Println(err)
	// Output:
	// 40 lot
	// wafers is a unit already (wafer)
}

func ExampleSystem_TextIn() {
	s := units.Standard()
	inverse, err := s.Parse("/µm")
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(s.TextIn(5.2406e6, inverse, 5))
	fmt.Println(s.Text(units.Of(units.Energy(1.4714413757e-17)), 5))
	// Output:
	// 5.2406 µm⁻¹
	// 91.840 eV
}

func ExampleFormatNumber() {
	fmt.Println(units.FormatNumber(64, 5), units.FormatNumber(91.84015, 5), units.FormatNumber(1.699e19, 5))
	// Output: 64 91.840 1.6990e19
}
