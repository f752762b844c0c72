package study

import "math"

// moments gathers the mean and the central sums of a sample, in parts that are
// merged (Pébay, Formulas for robust, one-pass parallel computation of covariances
// and arbitrary-order statistical moments, Sandia SAND2008-6212, 2008, equations
// 2.1 and 3.1 for order 3; from memory).
type moments struct {
	n            float64
	mean, m2, m3 float64 // m2 = Σ(x−mean)², m3 = Σ(x−mean)³
}

// momentsOf goes over the sample twice, which keeps the digits of a spread that
// is small beside the mean.
func momentsOf(sample []float64) moments {
	m := moments{n: float64(len(sample))}
	if len(sample) == 0 {
		return m
	}
	var sum float64
	for _, x := range sample {
		sum += x
	}
	m.mean = sum / m.n
	sum = 0
	for _, x := range sample {
		d := x - m.mean
		sum += d
		m.m2 += d * d
		m.m3 += d * d * d
	}
	rest := sum / m.n // what rounding left in the mean
	m.mean += rest
	m.m3 -= 3 * rest * m.m2
	m.m2 -= sum * rest
	return m
}

// merge adds another sample's moments.
func (m *moments) merge(o moments) {
	if o.n == 0 {
		return
	}
	n, d := m.n+o.n, o.mean-m.mean
	step := d / n
	m.m3 += o.m3 + d*step*step*m.n*o.n*(m.n-o.n) + 3*step*(m.n*o.m2-o.n*m.m2)
	m.m2 += o.m2 + d*step*m.n*o.n
	m.mean += step * o.n
	m.n = n
}

func (m *moments) add(x float64) { m.merge(moments{n: 1, mean: x}) }

// sd is the experimental standard deviation, with n−1.
func (m *moments) sd() float64 {
	if m.n < 2 {
		return 0
	}
	return math.Sqrt(math.Max(0, m.m2) / (m.n - 1))
}

// skewness is the third central moment over the cube of the spread, 0 for a
// sample without spread.
func (m *moments) skewness() float64 {
	spread := math.Sqrt(math.Max(0, m.m2) / m.n)
	if !(spread > 0) {
		return 0
	}
	return m.m3 / m.n / spread / spread / spread
}
