package euv

import (
	"math"
	"math/big"
	"testing"

	"example.com/dosewright/internal/near"
)

// Exact sums of big numbers, the slow oracle of the tails.

const exactBits = 400

func bigOf(x float64) *big.Float { return new(big.Float).SetPrec(exactBits).SetFloat64(x) }

// bigExp is e^x by halving and the Taylor series.
func bigExp(x *big.Float) *big.Float {
	prec := x.Prec() + 64
	halvings := max(0, x.MantExp(nil)+8)
	small := new(big.Float).SetPrec(prec).SetMantExp(x, -halvings)
	sum, term := new(big.Float).SetPrec(prec).SetInt64(1), new(big.Float).SetPrec(prec).SetInt64(1)
	for n := int64(1); n < 400; n++ {
		term.Mul(term, small)
		term.Quo(term, new(big.Float).SetPrec(prec).SetInt64(n))
		sum.Add(sum, term)
	}
	for range halvings {
		sum.Mul(sum, sum)
	}
	return sum
}

// bigPower is x^n by squaring.
func bigPower(x *big.Float, n int) *big.Float {
	out, square := bigOf(1), new(big.Float).SetPrec(exactBits).Set(x)
	for ; n > 0; n /= 2 {
		if n%2 == 1 {
			out.Mul(out, square)
		}
		square.Mul(square, square)
	}
	return out
}

// bigLog10 is log10 of a positive number, right to float64.
func bigLog10(x *big.Float) float64 {
	mant := new(big.Float)
	exp := x.MantExp(mant)
	m, _ := mant.Float64()
	return float64(exp)*math.Log10(2) + math.Log10(m)
}

// negligible says whether a term no longer counts in a sum of such terms.
func negligible(term, sum *big.Float) bool {
	return term.Sign() == 0 || sum.Sign() > 0 && term.MantExp(nil) < sum.MantExp(nil)-exactBits
}

// bigPoisson returns P(X ≤ k) and P(X ≥ k) by adding the terms.
func bigPoisson(k int, mean float64) (atMost, atLeast *big.Float) {
	m := bigOf(mean)
	atMost, atLeast = bigOf(0), bigOf(0)
	term := bigExp(bigOf(-mean))
	for j := 0; ; j++ {
		if j > 0 {
			term.Mul(term, m)
			term.Quo(term, bigOf(float64(j)))
		}
		if j <= k {
			atMost.Add(atMost, term)
		}
		if j >= k {
			atLeast.Add(atLeast, term)
		}
		if j > k && float64(j) > mean && negligible(term, atLeast) {
			return atMost, atLeast
		}
	}
}

// bigBinomial returns P(X ≥ k) in n trials, adding the terms of the far side.
func bigBinomial(k, n int, p float64) *big.Float {
	if float64(k) > float64(n)*p {
		return bigBinomialFrom(k, n, bigOf(p), new(big.Float).Sub(bigOf(1), bigOf(p)))
	}
	rest := bigBinomialFrom(n-k+1, n, new(big.Float).Sub(bigOf(1), bigOf(p)), bigOf(p))
	return rest.Sub(bigOf(1), rest)
}

// bigBinomialFrom adds the terms n, n−1, … k.
func bigBinomialFrom(k, n int, p, q *big.Float) *big.Float {
	term, sum := bigPower(p, n), bigOf(0)
	odds := new(big.Float).Quo(q, p)
	for j := n; j >= k; j-- {
		sum.Add(sum, term)
		term.Mul(term, odds)
		term.Mul(term, bigOf(float64(j)))
		term.Quo(term, bigOf(float64(n-j+1)))
	}
	return sum
}

// checkTail holds the digits of a logarithm of a probability: twelve of the
// probability above 1e-300 (ten are promised), thirteen of the logarithm.
// It returns the relative error, 0 below 1e-300.
func checkTail(t *testing.T, what string, log float64, want *big.Float) float64 {
	t.Helper()
	wantLog := bigLog10(want)
	near.Abs(t, what+", log10", log/math.Ln10, wantLog, 1e-13*math.Max(1, -wantLog))
	if wantLog <= -300 {
		return 0
	}
	w, _ := want.Float64()
	got := float64(tailOf(log).Value)
	near.Rel(t, what, got, w, 1e-12)
	return math.Abs(got-w) / w
}

// good unwraps the result of a call that must succeed.
func good[T any](v T, err error) T {
	if err != nil {
		panic(err)
	}
	return v
}
