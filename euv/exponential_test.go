package euv

import (
	"math"
	"math/big"
	"math/cmplx"
	"math/rand/v2"
	"testing"

	"example.com/dosewright/internal/near"
)

// exactExponential is exp(x + iy) by the power series, with so many digits that
// what its largest term, e^|z|, takes away is not missed.
func exactExponential(x, y float64) complex128 {
	const digits = 2400 // binary ones
	number := func(v float64) *big.Float { return new(big.Float).SetPrec(digits).SetFloat64(v) }
	times := func(a, b *big.Float) *big.Float { return new(big.Float).SetPrec(digits).Mul(a, b) }
	re, im := number(1), number(0)
	termRe, termIm := number(1), number(0)
	for n := 1; n < 4000; n++ {
		a := times(termRe, number(x))
		a.Sub(a, times(termIm, number(y)))
		b := times(termRe, number(y))
		b.Add(b, times(termIm, number(x)))
		termRe, termIm = a.Quo(a, number(float64(n))), b.Quo(b, number(float64(n)))
		re.Add(re, termRe)
		im.Add(im, termIm)
		small := func(v *big.Float) bool { return v.Sign() == 0 || v.MantExp(nil) < -1200 }
		if small(termRe) && small(termIm) {
			break
		}
	}
	r, _ := re.Float64()
	i, _ := im.Float64()
	return complex(r, i)
}

func TestExponentialsAreExact(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	worst := 0.0
	try := func(what string, x, y, tolerance float64) {
		z := []complex128{complex(x, y)}
		exponentials(z)
		want := exactExponential(x, y)
		off := cmplx.Abs(z[0]-want) / cmplx.Abs(want)
		near.Abs(t, what, off, 0, tolerance)
		worst = math.Max(worst, off)
	}
	for range 300 { // films and faces: hardly any absorption, some radians
		try("thin", -rng.Float64()/16, 14*rng.Float64()-7, 4e-16)
	}
	for range 100 {
		try("thick", -30*rng.Float64(), 200*rng.Float64()-100, 5e-16)
	}
	for range 20 { // as far as the polynomials go
		try("far", 1300*rng.Float64()-650, 1398*rng.Float64()-699, 1e-15)
	}
	for _, z := range []complex128{0, 1i, -1i, 1. / 16, -1. / 16, 1.0000001 / 16, math.Pi / 64 * 1i, math.Pi * 1i, -math.Pi / 2 * 1i, 1e-300, -1e-20i} {
		try("seam", real(z), imag(z), 4e-16)
	}
	t.Logf("largest error %.2g of the absolute value", worst)
}

// Beyond the polynomials stands the standard library.
func TestExponentialsFarOut(t *testing.T) {
	for _, z := range []complex128{-701, -745 + 3i, -800 + 1i, -3 + 1e5i, 5 - 1e9i, 650 + 800i} {
		got := []complex128{z}
		exponentials(got)
		want := cmplx.Exp(z)
		near.Abs(t, "real part", real(got[0]), real(want), 1e-15*cmplx.Abs(want))
		near.Abs(t, "imaginary part", imag(got[0]), imag(want), 1e-15*cmplx.Abs(want))
	}
	for _, z := range []complex128{complex(math.NaN(), 0), complex(0, math.NaN()), complex(0, math.Inf(1))} {
		got := []complex128{z}
		exponentials(got)
		if !cmplx.IsNaN(got[0]) {
			t.Errorf("exp(%g) is %g", z, got[0])
		}
	}
}
