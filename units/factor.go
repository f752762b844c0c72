package units

import (
	"math"
	"math/big"
	"strconv"
)

// factor is an exact positive scale: the root of num/den · 10^ten · π^pi. A
// nil num or den is 1, and so is a root of 0, so that the zero factor is one.
type factor struct {
	num, den *big.Int
	ten, pi  int
	root     int // 0, 2, 3 or 6
}

// The digits of π, from OEIS A000796.
const piDigits = "3.1415926535897932384626433832795028841971693993751058209749445923078164"

func whole(n uint64, ten int) factor { return factor{num: new(big.Int).SetUint64(n), ten: ten} }

func tens(n int) factor { return factor{ten: n} }

func (f factor) over(d uint64) factor {
	f.den = new(big.Int).SetUint64(d)
	return f
}

func (f factor) onlyTens() bool { return f.num == nil && f.den == nil && f.pi == 0 && f.root == 0 }

func (f factor) isOne() bool { return f.onlyTens() && f.ten == 0 }

// times multiplies under a common root.
func (f factor) times(g factor) factor {
	m, n := max(f.root, 1), max(g.root, 1)
	if m != n {
		_, both := reduce(m, n)
		m, f, g = m*both, f.raised(both), g.raised(m*both/n)
	}
	f.num, f.den = product(f.num, g.num), product(f.den, g.den)
	f.ten += g.ten
	f.pi += g.pi
	return f.under(m)
}

// power raises f to num/den.
func (f factor) power(num, den int) factor {
	num, den = reduce(num, den*max(f.root, 1))
	return f.raised(num).under(den)
}

// under sets the root of what stands in f; powers of ten are drawn at once.
func (f factor) under(root int) factor {
	f.root = 0
	switch {
	case root == 1:
	case f.onlyTens() && f.ten%root == 0:
		f.ten /= root
	default:
		f.root = root
	}
	return f
}

// raised raises what stands under the root to a whole power.
func (f factor) raised(n int) factor {
	if n < 0 {
		f = factor{num: f.den, den: f.num, ten: -f.ten, pi: -f.pi}
		n = -n
	}
	e := big.NewInt(int64(n))
	p := factor{ten: f.ten * n, pi: f.pi * n}
	if f.num != nil {
		p.num = new(big.Int).Exp(f.num, e, nil)
	}
	if f.den != nil {
		p.den = new(big.Int).Exp(f.den, e, nil)
	}
	return p
}

func product(a, b *big.Int) *big.Int {
	switch {
	case a == nil:
		return b
	case b == nil:
		return a
	}
	return new(big.Int).Mul(a, b)
}

// rat returns f as a rational: π by seventy digits, a root by about as many.
func (f factor) rat() *big.Rat {
	r := new(big.Rat).SetInt64(1)
	if f.num != nil {
		r.SetInt(f.num)
	}
	if f.den != nil {
		r.Quo(r, new(big.Rat).SetInt(f.den))
	}
	r.Mul(r, ratPower(big.NewRat(10, 1), f.ten))
	if f.pi != 0 {
		pi, _ := new(big.Rat).SetString(piDigits)
		r.Mul(r, ratPower(pi, f.pi))
	}
	if f.root != 0 {
		return ratRoot(r, f.root)
	}
	return r
}

func ratPower(r *big.Rat, n int) *big.Rat {
	e := big.NewInt(int64(max(n, -n)))
	p := new(big.Rat).SetFrac(new(big.Int).Exp(r.Num(), e, nil), new(big.Int).Exp(r.Denom(), e, nil))
	if n < 0 {
		p.Inv(p)
	}
	return p
}

// rootBits is how many bits of a root are drawn.
const rootBits = 256

// ratRoot draws the n-th root of r > 0, as a whole number of 2^-shift: the
// whole root of r · 2^(n·shift) by Newton's iteration from above.
func ratRoot(r *big.Rat, n int) *big.Rat {
	size := (r.Num().BitLen() - r.Denom().BitLen()) / n
	shift := uint(max(rootBits-size, 1))
	x := new(big.Int).Lsh(r.Num(), shift*uint(n))
	x.Quo(x, r.Denom())
	less, count := big.NewInt(int64(n-1)), big.NewInt(int64(n))
	y := new(big.Int).Lsh(big.NewInt(1), uint(x.BitLen()/n+1))
	for {
		next := new(big.Int).Exp(y, less, nil)
		next.Quo(x, next)
		next.Add(next, new(big.Int).Mul(y, less))
		next.Quo(next, count)
		if next.Cmp(y) >= 0 {
			return new(big.Rat).SetFrac(y, new(big.Int).Lsh(big.NewInt(1), shift))
		}
		y = next
	}
}

// magnitude is the decimal logarithm of f, right to one.
func (f factor) magnitude() float64 {
	bits := 0
	if f.num != nil {
		bits += f.num.BitLen()
	}
	if f.den != nil {
		bits -= f.den.BitLen()
	}
	log := float64(f.ten) + math.Log10(2)*float64(bits) + math.Log10(math.Pi)*float64(f.pi)
	return log / float64(max(f.root, 1))
}

// float returns f rounded once.
func (f factor) float() float64 {
	if f.onlyTens() {
		v, _ := strconv.ParseFloat("1e"+strconv.Itoa(f.ten), 64)
		return v
	}
	v, _ := f.rat().Float64()
	return v
}

// divide returns x/f rounded once; the common scales need no big numbers.
func (f factor) divide(x float64) float64 {
	switch {
	case f.pi != 0 || f.root != 0:
	case f.onlyTens() && f.ten >= 0 && f.ten < len(exactTens):
		return x / exactTens[f.ten]
	case f.onlyTens() && f.ten < 0 && -f.ten < len(exactTens):
		return x * exactTens[-f.ten]
	case f.ten == 0 && f.num == nil && exact(f.den):
		return x * float64(f.den.Uint64())
	case f.ten == 0 && f.den == nil && exact(f.num):
		return x / float64(f.num.Uint64())
	}
	r := new(big.Rat).SetFloat64(x)
	if r == nil {
		return x
	}
	v, _ := r.Quo(r, f.rat()).Float64()
	return v
}

// exact says whether float64 holds n exactly.
func exact(n *big.Int) bool { return n != nil && n.IsUint64() && n.Uint64() <= 1<<53 }

// exactTens are the powers of ten that float64 holds exactly.
var exactTens = [...]float64{
	1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11,
	1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22,
}
