package units

import (
	"errors"
	"math/rand/v2"
	"testing"
)

// randomDimension has exponents in sixths up to ±most in each lane, few of
// them not zero.
func randomDimension(random *rand.Rand, most int) Dimension {
	var d Dimension
	for b := Base(0); b <= lastBase; b++ {
		if random.IntN(3) == 0 {
			d = d.with(b, int8(random.IntN(2*most+1)-most))
		}
	}
	return d
}

func must(t testing.TB) func(d Dimension, err error) Dimension {
	return func(d Dimension, err error) Dimension {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return d
	}
}

func TestDimensionsAreAGroup(t *testing.T) {
	random := rand.New(rand.NewPCG(7, 7))
	ok := must(t)
	one := Dimension{}
	for range 20000 {
		a, b, c := randomDimension(random, 40), randomDimension(random, 40), randomDimension(random, 40)
		ab, bc := ok(a.Mul(b)), ok(b.Mul(c))
		switch {
		case ok(b.Mul(a)) != ab:
			t.Fatalf("%s · %s does not commute", a, b)
		case ok(ab.Mul(c)) != ok(a.Mul(bc)):
			t.Fatalf("%s, %s, %s do not associate", a, b, c)
		case ok(a.Mul(one)) != a || ok(a.Div(one)) != a:
			t.Fatalf("one is not neutral to %s", a)
		case ok(a.Div(a)) != one || ok(a.Mul(ok(one.Div(a)))) != one:
			t.Fatalf("%s has no inverse", a)
		case ok(ab.Div(b)) != a:
			t.Fatalf("%s · %s / %s is not %s", a, b, b, a)
		case ok(a.Pow(2, 1)) != ok(a.Mul(a)) || ok(a.Pow(-1, 1)) != ok(one.Div(a)) || ok(a.Pow(0, 1)) != one || ok(a.Pow(3, 3)) != a:
			t.Fatalf("powers of %s", a)
		case ok(ok(a.Pow(2, 1)).Pow(1, 2)) != a || ok(ok(a.Pow(3, 1)).Pow(-1, -3)) != a:
			t.Fatalf("roots of powers of %s", a)
		}
	}
}

// Every sum of exponents against plain integers, at the edges too.
func TestDimensionRange(t *testing.T) {
	random := rand.New(rand.NewPCG(8, 7))
	refused := 0
	for range 50000 {
		a, b := randomDimension(random, maxSixth), randomDimension(random, maxSixth)
		for _, sign := range []int{1, -1} {
			got, err := a.Mul(b)
			if sign < 0 {
				got, err = a.Div(b)
			}
			fits := true
			var want Dimension
			for base := Base(0); base <= lastBase; base++ {
				n := int(a.sixth(base)) + sign*int(b.sixth(base))
				if n > maxSixth || n < -maxSixth {
					fits = false
					break
				}
				want = want.with(base, int8(n))
			}
			switch {
			case !fits:
				refused++
				if !errors.Is(err, ErrExponent) || !got.IsNumber() {
					t.Fatalf("%s and %s, sign %d: %s, %v", a, b, sign, got, err)
				}
			case err != nil || got != want:
				t.Fatalf("%s and %s, sign %d: %s, %v, want %s", a, b, sign, got, err, want)
			}
		}
	}
	if refused == 0 {
		t.Error("no sum left the range")
	}
	for _, b := range []Base{TimeBase, LuminousBase, Wafer, Pulse, firstDeclared, lastBase} {
		for a := -maxSixth; a <= maxSixth; a++ {
			for c := -maxSixth; c <= maxSixth; c++ {
				_, err := Dimension{}.with(b, int8(a)).Mul(Dimension{}.with(b, int8(c)))
				if fits := a+c <= maxSixth && a+c >= -maxSixth; (err == nil) != fits {
					t.Fatalf("base %d: %d + %d sixths: %v", b, a, c, err)
				}
			}
		}
	}
}

func TestDimensionPow(t *testing.T) {
	length, area := dimLength, dimArea
	for _, c := range []struct {
		d        Dimension
		num, den int
		want     string
		err      error
	}{
		{area, 1, 2, "m", nil},
		{length, 1, 2, "m^(1/2)", nil},
		{length, 1, 3, "m^(1/3)", nil},
		{length, -1, 6, "m^(-1/6)", nil},
		{length, 1, 4, "1", ErrRoot},
		{length, 1, 5, "1", ErrRoot},
		{length, 1, 0, "1", ErrRoot},
		{Dimension{}, 1, 7, "1", nil},
		{length, 21, 1, "m²¹", nil},
		{length, 22, 1, "1", ErrExponent},
		{length, -21, 1, "m⁻²¹", nil},
		{length, -22, 1, "1", ErrExponent},
		{area, 21, 2, "m²¹", nil},
		{length, 1000, 1, "1", ErrExponent},
		{length, 1 << 40, 1 << 39, "m²", nil},
		{length, 3, -2, "m^(-3/2)", nil},
		{dimFluence, 2, 1, "kg²·s⁻⁴", nil},
		{length, 0, 5, "1", nil},
		{dimVolume, 1, 6, "m^(1/2)", nil},
		{dimVolume, 1, 12, "1", ErrRoot},
		{dimVolume, 2, 3, "m²", nil},
	} {
		got, err := c.d.Pow(c.num, c.den)
		if !errors.Is(err, c.err) || err != nil && c.err == nil || got.String() != c.want {
			t.Errorf("(%s)^(%d/%d) = %s, %v, want %s, %v", c.d, c.num, c.den, got, err, c.want, c.err)
		}
	}
}

func TestDimensionParts(t *testing.T) {
	d := dimWaferEnergy
	if num, den := d.Exponent(TimeBase); num != -2 || den != 1 {
		t.Errorf("time in %s: %d/%d", d, num, den)
	}
	root := must(t)(dimFluence.Pow(1, 2))
	if num, den := root.Exponent(MassBase); num != 1 || den != 2 {
		t.Errorf("mass in %s: %d/%d", root, num, den)
	}
	if num, den := d.Exponent(200); num != 0 || den != 1 || !Base(200).Of().IsNumber() {
		t.Errorf("a base that is none has the exponent %d/%d", num, den)
	}
	switch {
	case !d.HasCounted() || d.WithoutCounted() != dimEnergy || d.WithoutCounted().HasCounted():
		t.Errorf("%s without counted things is %s", d, d.WithoutCounted())
	case !Wafer.Counted() || !lastBase.Counted() || LuminousBase.Counted():
		t.Error("which bases are counted")
	case d.IsNumber() || !(Dimension{}).IsNumber():
		t.Error("which dimension is a number")
	}
	if got := (map[Dimension]string{dimEnergy: "energy"})[dimWaferEnergy.WithoutCounted()]; got != "energy" {
		t.Errorf("as a map key: %q", got)
	}
	for text, d := range map[string]Dimension{
		"1": {}, "kg·s⁻²": dimFluence, "kg·m²·s⁻³·A⁻¹": dimVoltage, "s⁻¹·wafer": dimThroughput,
		"thing1": firstDeclared.Of(), "thing12": lastBase.Of(), "wafer⁻¹·field": dimFieldsPer, "mol": AmountBase.Of(),
	} {
		if d.String() != text {
			t.Errorf("%s is written %s", text, d)
		}
	}
}
