package euv

import (
	"math"

	"gonum.org/v1/gonum/mathext"

	"example.com/dosewright/units"
)

// NormalAbove is the probability that a normal deviate lies above z standard
// deviations.
//
//	P = ½ erfc(z/√2)
//
// z is any finite number. At least ten digits hold down to 1e-300; below that
// (z above 37) a warning says that digits are lost. Errors: *ArgumentError.
// Source: the definition of the distribution.
func NormalAbove(z units.Ratio) (Warned[units.Ratio], error) {
	if err := finite("z", z); err != nil {
		return Warned[units.Ratio]{}, err
	}
	return warnTiny(0.5 * math.Erfc(float64(z)/math.Sqrt2)), nil
}

// NormalQuantile is the number of standard deviations below which a normal
// deviate lies with probability p: negative for p below one half.
//
//	p = ½ erfc(−z/√2), solved for z
//
// p is greater than 0 and less than 1; the far upper tail is
// −NormalQuantile(1 − p) with the small number given exactly. Errors:
// *ArgumentError. Source: M. J. Wichura, Applied Statistics 37, 477 (1988).
func NormalQuantile(p units.Ratio) (units.Ratio, error) {
	if err := within("p", p); err != nil {
		return 0, err
	}
	return units.Ratio(mathext.NormalQuantile(float64(p))), nil
}
