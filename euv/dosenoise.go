package euv

import (
	"math"

	"example.com/dosewright/units"
)

// DoseNoise is the relative scatter of the dose at a point, one sigma, that
// comes from the scatter of the pulses it is made of, without any control that
// would even it out.
//
//	noise = pulse_noise √(f/N)
//	f = (1+ρ)/(1−ρ) − 2ρ(1−ρᴺ)/(N(1−ρ)²)
//
// pulseNoise is the relative scatter of the pulse energy, one sigma, 0 or
// greater; pulses is N, at least 1; correlation is ρ, that of neighbouring
// pulses, greater than −1 and less than 1, and falls off as its powers for
// pulses further apart. For independent pulses the noise is pulse_noise/√N. N
// need not be whole; for a negative ρ, ρᴺ is then read as |ρ|ᴺ cos πN. All
// digits hold for every ρ and N. Errors: *ArgumentError. Source: variance of a
// mean of a first-order autocorrelated series.
func DoseNoise(pulseNoise units.Ratio, pulses units.PulseCount, correlation units.Ratio) (units.Ratio, error) {
	if err := notNegative("pulse_noise", pulseNoise); err != nil {
		return 0, err
	}
	if !isFinite(pulses) || pulses < 1 {
		return 0, outside("pulses", pulses, "1 pulse or more")
	}
	if !(correlation > -1 && correlation < 1) {
		return 0, outside("correlation", correlation, "greater than -1 and less than 1")
	}
	n := float64(pulses)
	return units.Ratio(float64(pulseNoise) * math.Sqrt(meanVariance(n, float64(correlation))/n)), nil
}

// meanVariance is f: N times the variance of the mean of n values, each of
// variance 1. Every branch adds terms of one sign only, or nearly so.
func meanVariance(n, rho float64) float64 {
	switch {
	case rho > 0.5:
		return closePulses(n, -math.Log1p(rho-1))
	case rho < 0:
		r := -rho
		y := n * math.Log1p(-(1 + rho)) // |ρ|ᴺ is exp(y)
		half := math.Sin(math.Pi / 2 * math.Mod(n, 2))
		lack := -math.Expm1(y) + 2*math.Exp(y)*half*half // 1 − ρᴺ
		return (1+rho)/(1+r) + 2*r*lack/(n*(1+r)*(1+r))
	}
	return (1+rho)/(1-rho) - 2*rho*(1-math.Pow(rho, n))/(n*(1-rho)*(1-rho))
}

// closePulses is f with ρ = exp(−q), where the two terms of f nearly cancel
// for small q. With sinh q − q and exp(−Nq) − 1 + Nq in their place,
//
//	f = [(sinh q − q) + (exp(−Nq) − 1 + Nq)/N] / (2 sinh²(q/2))
//
// nothing cancels.
func closePulses(n, q float64) float64 {
	odd, term := 0.0, q
	for k := 2.0; k < 20; k += 2 { // q is at most ln 2
		term *= q * q / (k * (k + 1))
		odd += term
	}
	y := n * q
	fall := math.Expm1(-y) + y
	if y < 1 {
		fall, term = 0, -y
		for k := 2.0; k < 20; k++ {
			term *= -y / k
			fall += term
		}
	}
	s := math.Sinh(q / 2)
	return (odd + fall/n) / (2 * s * s)
}
