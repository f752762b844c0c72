package euv

import (
	"fmt"
	"math"
	"math/big"
	"testing"

	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// bigNormalAbove is P(Z > z): one half less the Taylor series of the integral
// of exp(−x²/2), whose terms cancel, hence the many bits.
func bigNormalAbove(z float64) *big.Float {
	const prec = 2300
	at := func(x float64) *big.Float { return new(big.Float).SetPrec(prec).SetFloat64(x) }
	half := new(big.Float).Quo(new(big.Float).Mul(at(z), at(z)), at(-2))
	sum, power := at(0), at(z)
	for n := int64(0); power.MantExp(nil) > -prec && power.Sign() != 0; n++ {
		sum.Add(sum, new(big.Float).Quo(power, at(float64(2*n+1))))
		power.Mul(power, half)
		power.Quo(power, at(float64(n+1)))
	}
	sum.Quo(sum, new(big.Float).Sqrt(new(big.Float).Mul(at(2), bigPi(prec))))
	return sum.Sub(at(0.5), sum)
}

// bigPi by Machin's formula, 16 arctan(1/5) − 4 arctan(1/239).
func bigPi(prec uint) *big.Float {
	at := func(x int64) *big.Float { return new(big.Float).SetPrec(prec).SetInt64(x) }
	arctan := func(of int64) *big.Float {
		sum, power := at(0), new(big.Float).Quo(at(1), at(of))
		for n := int64(0); power.MantExp(nil) > -int(prec); n++ {
			sum.Add(sum, new(big.Float).Quo(power, at(2*n+1)))
			power.Quo(power, at(-of*of))
		}
		return sum
	}
	a, b := arctan(5), arctan(239)
	return a.Mul(a, at(16)).Sub(a, b.Mul(b, at(4)))
}

func TestNormalAboveAgainstExactSeries(t *testing.T) {
	for _, z := range []float64{-36, -5, -1, -1e-3, 0, 0.25, 1, 2.5, 6, 12.3, 20, 30.7, 37} {
		p, _ := bigNormalAbove(z).Float64()
		near.Rel(t, fmt.Sprintf("above %g", z), float64(good(NormalAbove(units.Ratio(z))).Value), p, 1e-12)
	}
	if w := good(NormalAbove(38)).Warnings; len(w) != 1 {
		t.Errorf("38 sigma: warnings %q", w)
	}
}

func TestNormalQuantileIsTheInverse(t *testing.T) {
	for _, p := range []float64{1e-300, 1e-250, 1e-100, 1e-15, 1e-6, 0.01, 0.2, 0.425, 0.5, 0.6, 0.925, 0.975, 1 - 1e-9} {
		z := float64(good(NormalQuantile(units.Ratio(p))))
		// P(Z < z) grows by density·dz, in size at most about (1+|z|) p dz
		back := float64(good(NormalAbove(units.Ratio(-z))).Value)
		near.Rel(t, fmt.Sprintf("quantile of %g and back", p), back, p, 1e-15*(4+z*z))
	}
	// Source: JCGM 100:2008, table G.2, infinite degrees of freedom.
	near.Abs(t, "97.5 %", float64(good(NormalQuantile(0.975))), 1.960, 0.5e-3)
	if z := good(NormalQuantile(0.5)); z != 0 || math.Signbit(float64(z)) {
		t.Errorf("the median is %g", z)
	}
}

func BenchmarkNormalAbove(b *testing.B) {
	for b.Loop() {
		if _, err := NormalAbove(6); err != nil {
			b.Fatal(err)
		}
	}
}
