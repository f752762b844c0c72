package units

import (
	"errors"
	"fmt"
	"math"
	"math/big"
	"math/rand/v2"
	"strconv"
	"testing"

	"example.com/dosewright/internal/near"
)

// The checks of this file were found missing by small changes of the code that
// no other test noticed; docs/mutations.md lists them.

// The root of a factor is the float64 nearest to it: the value lies between the
// n-th powers of the two halfway points around it.
func TestRootsAreRoundedOnce(t *testing.T) {
	for _, root := range []int{2, 3, 6} {
		for n := uint64(2); n < 3000; n++ {
			v := whole(n, 0).power(1, root).float()
			low, high := halfway(v, math.Inf(-1)), halfway(v, math.Inf(1))
			value := new(big.Rat).SetInt(new(big.Int).SetUint64(n))
			if ratPower(low, root).Cmp(value) > 0 || ratPower(high, root).Cmp(value) < 0 {
				t.Errorf("root %d of %d is not %.17g", root, n, v)
			}
		}
	}
}

// halfway lies between v and its neighbour in a direction.
func halfway(v, towards float64) *big.Rat {
	a, b := new(big.Rat).SetFloat64(v), new(big.Rat).SetFloat64(math.Nextafter(v, towards))
	return a.Mul(a.Add(a, b), big.NewRat(1, 2))
}

// A unit whose size no float64 holds exactly divides with one rounding all the
// same.
func TestLargeSizesAreRoundedOnce(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	for _, size := range []uint64{1<<53 + 1, 1<<55 + 3, 1<<59 + 65} {
		s, err := Standard().WithUnit("tick", fmt.Sprintf("%d s", size))
		if err != nil {
			t.Fatal(err)
		}
		u, err := s.Parse("tick")
		if err != nil {
			t.Fatal(err)
		}
		for range 2000 {
			x := rng.Float64() * 1e20
			exact := new(big.Rat).SetFloat64(x)
			want, _ := exact.Quo(exact, new(big.Rat).SetInt(new(big.Int).SetUint64(size))).Float64()
			near.Rel(t, fmt.Sprintf("%g s in units of %d s", x, size), u.From(x), want, 0)
		}
	}
}

// Digits of a pure number are no more than the standard library needs.
func TestDigitsAreShortest(t *testing.T) {
	rng := rand.New(rand.NewPCG(7, 8))
	for range 3000 {
		v := rng.Float64()
		if rng.IntN(2) == 0 { // 16 digits, which often are enough
			v, _ = strconv.ParseFloat(strconv.FormatFloat(v, 'g', 16, 64), 64)
		}
		digits := func(text string) int {
			n := 0
			for _, r := range text {
				if r >= '1' && r <= '9' || r == '0' && n > 0 {
					n++
				}
			}
			return n
		}
		if got, want := (Unit{}).Digits(v), strconv.FormatFloat(v, 'f', -1, 64); digits(got) > digits(want) {
			t.Errorf("%s is written %s", want, got)
		}
	}
}

// A root exists for a dimension and for its inverse, or for neither.
func TestRootsOfInverses(t *testing.T) {
	for power := 1; power <= 21; power++ {
		for root := 1; root <= 12; root++ {
			up, err := LengthBase.Of().Pow(power, 1)
			if err != nil {
				t.Fatal(err)
			}
			down, err := up.Pow(-1, 1)
			if err != nil {
				t.Fatal(err)
			}
			exists := 6*power%root == 0
			_, errUp := up.Pow(1, root)
			_, errDown := down.Pow(1, root)
			if (errUp == nil) != exists || (errDown == nil) != exists || !exists && !errors.Is(errDown, ErrRoot) {
				t.Errorf("root %d of m^%d: %v, and of its inverse: %v", root, power, errUp, errDown)
			}
		}
	}
}
