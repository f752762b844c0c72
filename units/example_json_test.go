package units_test

import (
	"encoding/json"
	"fmt"

	"example.com/dosewright/units"
)

func ExampleQuantity_MarshalJSON() {
	text, err := json.Marshal(map[string]units.Quantity{"dose": units.Of(units.Fluence(340))})
	fmt.Println(string(text), err)
	// Output: {"dose":{"si":340,"dimension":"kg·s⁻²"}} <nil>
}

func ExampleQuantity_UnmarshalJSON() {
	var q units.Quantity
	err := json.Unmarshal([]byte(`{"si": 340, "dimension": "J/m²"}`), &q)
	dose, wrong := units.As[units.Fluence](q)
	fmt.Println(q, err, float64(dose), wrong)
	// Output: 34 mJ/cm² <nil> 340 <nil>
}

func ExampleSystem_MarshalQuantity() {
	s, lot, err := units.Standard().WithCounted("lot")
	if err != nil {
		fmt.Println(err)
		return
	}
	text, err := s.MarshalQuantity(units.New(12, lot.Of()))
	fmt.Println(string(text), err)
	_, err = units.New(12, lot.Of()).MarshalJSON()
	fmt.Println(err)
	// Output:
	// {"si":12,"dimension":"lot"} <nil>
	// this quantity has no JSON: thing1 is a counted thing of another system, whose MarshalQuantity writes it
}

func ExampleSystem_UnmarshalQuantity() {
	s, _, err := units.Standard().WithCounted("lot")
	if err != nil {
		fmt.Println(err)
		return
	}
	q, err := s.UnmarshalQuantity([]byte(`{"si":25,"dimension":"wafer·lot⁻¹"}`))
	fmt.Println(s.Text(q, 5), err)
	// Output: 25 wafer/lot <nil>
}

func ExampleSystem_WithUnit() {
	s, err := units.Standard().WithUnit("cassette", "25 wafer")
	if err != nil {
		fmt.Println(err)
		return
	}
	u, err := s.Parse("cassette/h")
	fmt.Println(u.Label("6"), "=", s.Text(units.New(u.SI(6), u.Dimension()), 5), err)
	// Output: 6 cassette/h = 150 wafer/h <nil>
}

func ExampleSystem_Declared() {
	s, _, err := units.Standard().WithCounted("lot")
	fmt.Println(s.Declared(), err)
	// Output: [lot] <nil>
}
