package units

import (
	"encoding/json"
	"errors"
	"math"
	"math/rand/v2"
	"strings"
	"testing"
)

// anyDimension has exponents of any base up to last, in sixths.
func anyDimension(random *rand.Rand, last Base) Dimension {
	var d Dimension
	for b := TimeBase; b <= last; b++ {
		if b != Wafer-1 && random.IntN(3) == 0 {
			d = d.with(b, int8(random.IntN(2*maxSixth+1)-maxSixth))
		}
	}
	return d
}

// What is written is read back without loss: the same bits, the same dimension.
func TestQuantityJSONReadsBack(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 1))
	s := Standard()
	for _, name := range []string{"lot", "reticle", strings.Repeat("l", maxName)} {
		s, _, _ = s.WithCounted(name)
	}
	for range 20000 {
		q := New(whatever(random), anyDimension(random, Pulse))
		text, err := json.Marshal(q)
		var back Quantity
		if err == nil {
			err = json.Unmarshal(text, &back)
		}
		if err != nil || back.dim != q.dim || math.Float64bits(back.si) != math.Float64bits(q.si) {
			t.Fatalf("%s reads back as %v %s, from %v %s: %v", text, back.si, back.dim, q.si, q.dim, err)
		}
		q.dim = anyDimension(random, firstDeclared+2)
		if text, err = s.MarshalQuantity(q); err == nil {
			back, err = s.UnmarshalQuantity(text)
		}
		if err != nil || back.dim != q.dim || math.Float64bits(back.si) != math.Float64bits(q.si) {
			t.Fatalf("%s reads back as %v %s, from %v %s: %v", text, back.si, back.dim, q.si, q.dim, err)
		}
	}
}

// Every base with a fraction as its exponent is the longest dimension.
func TestLongestDimensionReadsBack(t *testing.T) {
	s := Standard()
	for i := range MaxDeclared {
		s, _, _ = s.WithCounted(strings.Repeat("l", maxName-1) + string(rune('a'+i)))
	}
	var d Dimension
	for b := TimeBase; b <= lastBase; b++ {
		if b != Wafer-1 {
			d = d.with(b, -maxSixth+1)
		}
	}
	text, err := s.MarshalQuantity(New(1, d))
	if err != nil || len(text) > maxBase {
		t.Fatalf("%d bytes, %v", len(text), err)
	}
	if q, err := s.UnmarshalQuantity(text); err != nil || q.dim != d {
		t.Errorf("%s reads back as %s: %v", text, s.BaseText(q.dim), err)
	}
}

func TestQuantityJSONText(t *testing.T) {
	for want, q := range map[string]Quantity{
		`{"si":300,"dimension":"kg·s⁻²"}`:             Of(Fluence(300)),
		`{"si":0.9,"dimension":"1"}`:                  Of(Ratio(0.9)),
		`{"si":0.25,"dimension":"s⁻¹·wafer"}`:         Of(Throughput(0.25)),
		`{"si":1e-21,"dimension":"kg·m²·s⁻³"}`:        Of(Power(1e-21)),
		`{"si":1,"dimension":"m^(1/2)"}`:              New(1, must(t)(dimLength.Pow(1, 2))),
		`{"si":1.350000000000001e-8,"dimension":"m"}`: Of(Length(1.350000000000001e-08)),
	} {
		if got, err := json.Marshal(q); err != nil || string(got) != want {
			t.Errorf("got %s (%v), want %s", got, err, want)
		}
	}
}

func TestQuantityJSONOtherSpellings(t *testing.T) {
	for text, want := range map[string]Quantity{
		`{"dimension":"J/m^2","si":300}`:               Of(Fluence(300)),
		`{"si":2,"dimension":"W", "note":"passed by"}`: Of(Power(2)),
		`{"si":-0.0,"dimension":"1"}`:                  {},
		`null`:                                         {},
	} {
		var q Quantity
		if err := json.Unmarshal([]byte(text), &q); err != nil || q != want {
			t.Errorf("%s is %v (%v)", text, q, err)
		}
	}
}

func TestQuantityJSONRefusals(t *testing.T) {
	for text, why := range map[string]string{
		`{"si":1}`:                              "it is {",
		`{"dimension":"m"}`:                     "it is {",
		`{"si":1,"dimension":""}`:               "dimension 1",
		`{"si":1,"dimension":"mm"}`:             "scale other than one",
		`{"si":1,"dimension":"°C"}`:             "stands in K",
		`{"si":1,"dimension":"lot"}`:            "lot",
		`{"si":1,"dimension":"m))"}`:            "dimension",
		`{"si":1,"dimension":"m^21*m"}`:         "exponent",
		`{"si":"1","dimension":"m"}`:            "string",
		`{"si":1e400,"dimension":"m"}`:          "1e400",
		`[1,"m"]`:                               "array",
		`{"si":1,"dimension":"` + long() + `"}`: "more than 2000 bytes",
	} {
		var q Quantity
		if err := json.Unmarshal([]byte(text), &q); err == nil || !strings.Contains(err.Error(), why) {
			t.Errorf("%.60s: %v, want %q", text, err, why)
		} else if q != (Quantity{}) {
			t.Errorf("%.60s: refused, and yet %v", text, q)
		}
		if _, err := Standard().UnmarshalQuantity([]byte(text)); !errors.Is(err, ErrJSON) {
			t.Errorf("%.60s: %v does not wrap ErrJSON", text, err)
		}
	}
	s, lot, err := Standard().WithCounted("lot")
	if err != nil {
		t.Fatal(err)
	}
	for _, q := range []Quantity{New(math.NaN(), dimLength), New(math.Inf(-1), Dimension{}), New(1, lot.Of())} {
		if text, err := q.MarshalJSON(); !errors.Is(err, ErrJSON) {
			t.Errorf("%v is written as %s (%v)", q, text, err)
		}
	}
	if text, err := s.MarshalQuantity(New(1, (firstDeclared + 1).Of())); !errors.Is(err, ErrJSON) {
		t.Errorf("a thing that the system has not declared is written as %s (%v)", text, err)
	}
}

func long() string { return strings.Repeat("m·", 800) + "m" }
