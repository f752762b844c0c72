package study

import (
	"context"
	"math"
	"slices"
	"testing"

	"gonum.org/v1/gonum/mat"

	"example.com/dosewright/internal/near"
)

// TestCholeskyTwin: a matrix is accepted when its smallest eigenvalue is not
// below 0, and its root gives it back.
func TestCholeskyTwin(t *testing.T) {
	r := newStream()
	r.begin(7, 0)
	accepted, refused := 0, 0
	for range 2000 {
		n := 2 + r.IntN(4)
		inputs, m := make([]Input, n), mat.NewSymDense(n, nil)
		var pairs []Correlation
		for i := range n {
			inputs[i].U = 1
			m.SetSym(i, i, 1)
			for j := range i {
				c := 2*r.Float64() - 1
				pairs = append(pairs, Correlation{i, j, c})
				m.SetSym(i, j, c)
			}
		}
		var eigen mat.EigenSym
		if !eigen.Factorize(m, false) {
			t.Fatal("no eigenvalues")
		}
		smallest := slices.Min(eigen.Values(nil))
		s, err := NewSources(inputs, pairs...)
		if math.Abs(smallest) < 1e-6 {
			continue
		}
		if (err == nil) != (smallest > 0) {
			t.Fatalf("smallest eigenvalue %g: %v", smallest, err)
		}
		if err != nil {
			refused++
			continue
		}
		accepted++
		root := s.groups[0].root
		for i := range n {
			for j := range n {
				var product float64
				for k := range n {
					product += root[i][k] * root[j][k]
				}
				near.Abs(t, "L·Lᵀ", product, s.R(i, j), 1e-12)
			}
		}
	}
	if accepted < 200 || refused < 200 {
		t.Errorf("%d accepted, %d refused", accepted, refused)
	}
}

// TestSolveTwin: polynomials are solved at the roots that they were made of.
func TestSolveTwin(t *testing.T) {
	r := newStream()
	r.begin(8, 0)
	for range 300 {
		roots := make([]float64, 1+r.IntN(6))
		double := make([]bool, len(roots))
		at := 0.0
		for i := range roots {
			at += 0.05 + r.Float64()/float64(len(roots))
			roots[i], double[i] = at, r.IntN(3) == 0
		}
		p := eval(func(x []float64) float64 {
			y := 1.0
			for i, root := range roots {
				y *= x[0] - root
				if double[i] {
					y *= x[0] - root
				}
			}
			return y
		})
		got, err := Solve(context.Background(), p, eval(func([]float64) float64 { return 0 }), Range{Slots: []float64{0}, From: -0.1, To: at + 0.1})
		if err != nil || len(got.List) != len(roots) || len(got.Jumps) > 0 {
			t.Fatalf("roots %v, double %v: %+v, %v", roots, double, got, err)
		}
		for i, root := range got.List {
			tol := 1e-13
			if double[i] {
				tol = 1e-6
			}
			near.Abs(t, "root", root.X, roots[i], tol)
			if root.Touching != double[i] {
				t.Errorf("root %d touches: %t", i, root.Touching)
			}
		}
	}
}

// TestBudgetTwin: to first order a budget and a propagation of small, correlated
// uncertainties agree.
func TestBudgetTwin(t *testing.T) {
	s := sources(t, []Input{
		{Value: 3, U: 0.003}, {Value: 2, U: 0.004, DoF: 200}, {Shape: Triangular, Low: 0.99, High: 1.01}, {Value: 5, U: 0.01},
	}, Correlation{0, 3, 0.6})
	f := eval(func(x []float64) float64 { return x[0] * math.Exp(-x[1]) / (x[2] + x[3]*x[3]) })
	b := budget(t, f, s)
	d := propagate(t, program(f), s, Propagation{Trials: 1_000_000, Seed: 9})
	near.Rel(t, "u", b.U, d.SD, 0.005)
	near.Abs(t, "mean", b.Value+b.Second.Shift, d.Mean, 5*d.Tolerance.Mean)
	if b.Second.Matters || b.Second.Unknown {
		t.Errorf("%+v", b.Second)
	}
}
