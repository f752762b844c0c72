package euv_test

import (
	"fmt"
	"math"
	"math/big"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

const noiseBits = 1000

func long(x float64) *big.Float { return new(big.Float).SetPrec(noiseBits).SetFloat64(x) }

// doubleSum is the relative scatter of the mean of n values of which the i-th
// and j-th correlate as ρ^|i−j|: √(Σᵢ Σⱼ ρ^|i−j|)/n, added with 300 digits.
func doubleSum(n int, rho float64) float64 {
	sum, power := long(float64(n)), long(1)
	for k := 1; k < n; k++ {
		if power.Mul(power, long(rho)); gone(power) {
			break
		}
		sum.Add(sum, new(big.Float).Mul(power, long(float64(2*(n-k)))))
	}
	f, _ := sum.Sqrt(sum).Float64()
	return f / float64(n)
}

// gone says that a number adds nothing to 1, where an exact sum would only
// shift it by its whole exponent.
func gone(x *big.Float) bool { return x.Sign() == 0 || x.MantExp(nil) < -2*noiseBits }

// longForm is the closed form with 300 digits, ρⁿ by squaring, for n beyond
// what can be added.
func longForm(n uint64, rho float64) float64 {
	num := long(float64(n))
	power, square := long(1), long(rho)
	for e := n; e > 0; e >>= 1 {
		if e&1 == 1 {
			power.Mul(power, square)
		}
		if square.Mul(square, square); gone(square) {
			power = long(0)
			break
		}
	}
	one := long(1)
	minus := new(big.Float).Sub(one, long(rho))
	f := new(big.Float).Quo(new(big.Float).Add(one, long(rho)), minus)
	lag := new(big.Float).Mul(long(2*rho), new(big.Float).Sub(one, power))
	lag.Quo(lag, new(big.Float).Mul(num, new(big.Float).Mul(minus, minus)))
	f.Sub(f, lag).Quo(f, num)
	v, _ := f.Sqrt(f).Float64()
	return v
}

var correlations = []float64{
	0, 1e-300, 1e-12, 0.1, 0.3, 0.5, 0.5000001, 0.7, 0.9, 0.99, 0.9999, 1 - 1e-8, 1 - 1e-12, 1 - 0x1p-53,
	-1e-300, -1e-12, -0.1, -0.5, -0.7, -0.99, -0.9999, -1 + 1e-8, -1 + 1e-12, -1 + 0x1p-53,
}

func TestDoseNoiseAgainstDoubleSum(t *testing.T) {
	for _, rho := range correlations {
		for _, n := range []int{1, 2, 3, 4, 7, 10, 39, 40, 400, 1001} {
			got := sound[units.Ratio](t)(euv.DoseNoise(0.03, units.PulseCount(n), units.Ratio(rho)))
			near.Rel(t, fmt.Sprintf("ρ = %g, N = %d", rho, n), got, 0.03*doubleSum(n, rho), 2e-15)
		}
	}
}

func TestDoseNoiseOfManyPulses(t *testing.T) {
	near.Rel(t, "the two twins", longForm(1001, 0.99), doubleSum(1001, 0.99), 1e-15)
	for _, rho := range correlations {
		for _, n := range []uint64{1e5, 1e5 + 1, 1e9, 1e12 + 1, 1 << 52, 1<<52 + 1} {
			got := sound[units.Ratio](t)(euv.DoseNoise(1, units.PulseCount(n), units.Ratio(rho)))
			near.Rel(t, fmt.Sprintf("ρ = %g, N = %d", rho, n), got, longForm(n, rho), 4e-15)
		}
	}
}

func TestDoseNoiseLimits(t *testing.T) {
	for _, rho := range correlations {
		near.Rel(t, "one pulse", sound[units.Ratio](t)(euv.DoseNoise(0.03, 1, units.Ratio(rho))), 0.03, 4e-16)
		near.Rel(t, "no noise", sound[units.Ratio](t)(euv.DoseNoise(0, 400, units.Ratio(rho))), 0, 0)
	}
	near.Rel(t, "independent", sound[units.Ratio](t)(euv.DoseNoise(0.03, 390.625, 0)), 0.03/math.Sqrt(390.625), 1e-15)
	near.Rel(t, "more pulses than can be", sound[units.Ratio](t)(euv.DoseNoise(1, math.MaxFloat64, 0.5)), math.Sqrt(3/math.MaxFloat64), 1e-15)
}

// Between whole numbers the noise goes on without a jump.
func TestDoseNoiseBetweenWholeNumbers(t *testing.T) {
	for _, rho := range []units.Ratio{-0.99, -0.5, 0.3, 0.99} {
		for n := units.PulseCount(2); n < 50; n++ {
			at := sound[units.Ratio](t)(euv.DoseNoise(1, n, rho))
			for _, beside := range []units.PulseCount{n - 1e-9, n + 1e-9} {
				near.Rel(t, fmt.Sprintf("ρ = %g, N = %g", rho, n), sound[units.Ratio](t)(euv.DoseNoise(1, beside, rho)), at, 1e-8)
			}
		}
	}
}
