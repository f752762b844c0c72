package study

import (
	"context"
	"math/rand/v2"
	"testing"
	"time"
)

// The formula p·t1·t2·r^10·a/(d·s+b) of eight variables, as blocks and by hand.

var eight = []Input{
	{Value: 250, U: 5},
	{Value: 0.9, U: 0.01},
	{Value: 0.8, U: 0.01},
	{Value: 0.7, U: 0.005},
	{Value: 0.1, U: 0.001},
	{Value: 30, U: 0.6},
	{Value: 0.5, U: 0.01},
	{Value: 10, U: 0.2},
}

func formula(p, t1, t2, r, a, d, s, b float64) float64 {
	r2 := r * r
	r4 := r2 * r2
	return p * t1 * t2 * (r4 * r4 * r2) * a / (d*s + b)
}

// formulaBlock is the formula as a compiled program would run it: one plain loop
// for each operation.
func formulaBlock() Block {
	x, y := make([]float64, BlockSize), make([]float64, BlockSize)
	return func(in, out [][]float64) (int, error) {
		n := len(out[0])
		x, y := x[:n], y[:n]
		multiply(x, in[0], in[1])
		multiply(x, x, in[2])
		multiply(y, in[3], in[3])
		multiply(out[0], y, y)
		multiply(out[0], out[0], out[0])
		multiply(y, y, out[0])
		multiply(x, x, y)
		multiply(x, x, in[4])
		multiply(y, in[5], in[6])
		for i, b := range in[7] {
			y[i] += b
		}
		o := out[0]
		for i := range o {
			o[i] = x[i] / y[i]
		}
		return n, nil
	}
}

func multiply(to, a, b []float64) {
	a, b = a[:len(to)], b[:len(to)]
	for i := range to {
		to[i] = a[i] * b[i]
	}
}

func formulaEval(x []float64) (float64, error) {
	return formula(x[0], x[1], x[2], x[3], x[4], x[5], x[6], x[7]), nil
}

const benchTrials = 1_000_000

// byHand draws and sums on one core, and keeps the values, as a person would.
func byHand(values []float64) (sum float64) {
	r := rand.New(rand.NewPCG(1, 2))
	draw := func(i int) float64 { return eight[i].Value + eight[i].U*r.NormFloat64() }
	for k := range values {
		y := formula(draw(0), draw(1), draw(2), draw(3), draw(4), draw(5), draw(6), draw(7))
		values[k] = y
		sum += y
	}
	return sum
}

var sink float64

// timed runs both in turn and reports the first as nanoseconds a piece and as a
// ratio to the second.
func timed(b *testing.B, pieces int, ours, hand func()) {
	var a, h time.Duration
	for b.Loop() {
		start := time.Now()
		ours()
		middle := time.Now()
		hand()
		a, h = a+middle.Sub(start), h+time.Since(middle)
	}
	n := float64(pieces) * float64(b.N)
	b.ReportMetric(float64(a.Nanoseconds())/n, "ns/piece")
	b.ReportMetric(float64(h.Nanoseconds())/n, "ns/hand")
	b.ReportMetric(float64(a)/float64(h), "ratio")
	b.ReportMetric(0, "ns/op")
}

func BenchmarkPropagateBlocks(b *testing.B) { benchmarkPropagate(b, formulaBlock) }

func BenchmarkPropagateScalar(b *testing.B) { benchmarkPropagate(b, program(formulaEval)) }

func benchmarkPropagate(b *testing.B, p Program) {
	s := sources(b, eight)
	values := make([]float64, benchTrials)
	timed(b, benchTrials,
		func() { sink = propagate(b, p, s, Propagation{Trials: benchTrials}).Mean },
		func() { sink = byHand(values) })
}

// BenchmarkDraw is the part of a propagation that makes random numbers.
func BenchmarkDraw(b *testing.B) {
	d := newDrawer(sources(b, eight))
	r := rand.New(rand.NewPCG(1, 2))
	timed(b, 8*100*BlockSize,
		func() {
			for range 100 {
				d.draw(BlockSize)
			}
		},
		func() {
			for range 8 * 100 * BlockSize {
				sink += r.NormFloat64()
			}
		})
}

func BenchmarkSweep(b *testing.B) {
	const n = 1_000_000
	x, err := Spaced(5, 20, 50, n)
	if err != nil {
		b.Fatal(err)
	}
	s := &Sweep{Slots: sources(b, eight).Values(), Axes: []Axis{x}, Outputs: 1}
	v := s.Slots
	timed(b, n,
		func() {
			err := s.Run(context.Background(), formulaBlock, func(r Row) error { sink += r.Y[0]; return nil })
			if err != nil {
				b.Fatal(err)
			}
		},
		func() {
			for i := range n {
				sink += formula(v[0], v[1], v[2], v[3], v[4], 20+30*float64(i)/(n-1), v[6], v[7])
			}
		})
}

func BenchmarkFirstOrder(b *testing.B) {
	s := sources(b, eight)
	const evaluations = 1 + 4*8 + 4*8 + 4*28
	x := s.Values()
	timed(b, evaluations,
		func() {
			r, err := FirstOrder(context.Background(), formulaEval, s)
			if err != nil {
				b.Fatal(err)
			}
			sink = r.U
		},
		func() {
			for range evaluations {
				y, _ := formulaEval(x)
				sink += y
			}
		})
}
