package study

import (
	"math"
	"math/rand/v2"
)

// stream draws random numbers for one chunk after the other.
type stream struct {
	*rand.Rand // over the generator
	generator  *generator
	ziggurat   *ziggurat
}

func newStream() stream {
	g := &generator{a: 1}
	return stream{rand.New(g), g, newZiggurat()}
}

// begin puts the stream at the start of a chunk. Seed and chunk are scrambled,
// so that streams which lie a small number apart have nothing in common.
func (s stream) begin(seed, chunk uint64) {
	x := scramble(scramble(seed) + chunk)
	*s.generator = generator{scramble(x), scramble(x + 1), scramble(x + 2), scramble(x + 3)}
}

// generator is the state of xoshiro256++, not all zero (Blackman, Vigna, Scrambled
// linear pseudorandom number generators, ACM Trans. Math. Softw. 47(4), 36 (2021);
// from memory). It is short enough to be compiled into a loop.
type generator struct{ a, b, c, d uint64 }

// Uint64 makes a rand.Source of it.
func (g *generator) Uint64() uint64 {
	sum := g.a + g.d
	out := (sum<<23 | sum>>41) + g.a
	t := g.b << 17
	g.c ^= g.a
	g.d ^= g.b
	g.b ^= g.c
	g.a ^= g.d
	g.c ^= t
	g.d = g.d<<45 | g.d>>19
	return out
}

// scramble is the output function of SplitMix64 (Steele, Lea, Flood, Fast
// splittable pseudorandom number generators, OOPSLA 2014, figure 17; from memory).
func scramble(x uint64) uint64 {
	x += 0x9e3779b97f4a7c15
	x = (x ^ x>>30) * 0xbf58476d1ce4e5b9
	x = (x ^ x>>27) * 0x94d049bb133111eb
	return x ^ x>>31
}

// normal draws from N(m, u²).
func (s stream) normal(row []float64, m, u float64) {
	s.normals(row)
	for i, z := range row {
		row[i] = m + u*z
	}
}

func (s stream) rectangular(row []float64, low, high float64) {
	for i := range row {
		row[i] = low + (high-low)*s.Float64()
	}
}

// triangular adds two rectangular halves (JCGM 101:2008, 6.4.5.3).
func (s stream) triangular(row []float64, low, high float64) {
	half := (high - low) / 2
	for i := range row {
		row[i] = low + half*(s.Float64()+s.Float64())
	}
}

// widening draws the factor √(ν/χ²) that makes a standard normal deviate one of
// the t-distribution with ν degrees of freedom.
func (s stream) widening(row []float64, dof float64) {
	shape, boost := dof/2, 1.0
	if shape < 1 {
		shape++
	}
	for i := range row {
		if dof < 2 {
			boost = math.Pow(1-s.Float64(), 2/dof)
		}
		row[i] = math.Sqrt(dof / (2 * s.gamma(shape) * boost))
	}
}

// gamma draws from the gamma distribution with scale 1 and a shape from 1 up
// (Marsaglia, Tsang, A simple method for generating gamma variables, ACM Trans.
// Math. Softw. 26, 363 (2000); from memory).
func (s stream) gamma(shape float64) float64 {
	d := shape - 1.0/3
	c := 1 / math.Sqrt(9*d)
	for {
		x := s.NormFloat64()
		v := 1 + c*x
		if v <= 0 {
			continue
		}
		v = v * v * v
		u := 1 - s.Float64() // never 0
		if math.Log(u) < x*x/2+d*(1-v+math.Log(v)) {
			return d * v
		}
	}
}
