package study

import "math"

// Tolerance tells how far the results of a propagation are settled: their
// standard uncertainties that come from the finite number of trials alone, found
// from the spread between its chunks (JCGM 101:2008, 7.9.4, asks twice these to
// be small beside the numerical tolerance wanted).
type Tolerance struct {
	Chunks              int // on which it rests; with fewer than 8 the rest is 0, for unknown
	Mean, SD, Low, High float64
}

const fewestChunks = 8

// settling gathers the results of whole chunks.
type settling struct {
	mean, sd, low, high moments
}

func (s *settling) add(c *trialChunk) {
	s.mean.add(c.moments.mean)
	s.sd.add(c.moments.sd())
	s.low.add(c.low)
	s.high.add(c.high)
}

// tolerance of what all the chunks give together. Means settle as the square root
// of the number of trials, the place of a shortest interval as its cube root
// (Kim, Pollard, Cube root asymptotics, Ann. Statist. 18, 191 (1990); from memory).
func (s *settling) tolerance() Tolerance {
	t := Tolerance{Chunks: int(s.mean.n)}
	if t.Chunks >= fewestChunks {
		root, cube := math.Sqrt(s.mean.n), math.Cbrt(s.mean.n)
		t.Mean, t.SD = s.mean.sd()/root, s.sd.sd()/root
		t.Low, t.High = s.low.sd()/cube, s.high.sd()/cube
	}
	return t
}
