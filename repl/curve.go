package repl

import (
	"errors"
	"fmt"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

var errLists = errors.New("xs and ys of curve are lists of one length")

// buildCurve makes the node of a measured table that is read at x.
func buildCurve(c *program.Checker, k *program.Call) (*program.Node, error) {
	xs, ys, x := k.Args[0], k.Args[1], k.Args[2]
	if xs.Type.Dim != x.Type.Dim {
		return nil, &syntax.Error{Marks: []syntax.Span{k.Exprs[0].Span(), k.Exprs[2].Span()}, Msg: "xs and x of curve are of one dimension", Hint: k.Func.Signature(), Cause: &units.DimensionError{Op: "compare", Have: xs.Type.Dim, Rhs: x.Type.Dim}}
	}
	t := measured{x.Type.Dim}
	f := &program.Function{
		Name: "curve", Params: []program.Param{{Name: "x"}, {Name: "xs"}, {Name: "ys"}}, Call: t.call, Spectral: t.spectral,
		Kinks: func(low, high float64) []float64 { return pointsBetween(low, high, xs, c.Scope) },
	}
	return c.Made(f, []*program.Node{x, xs, ys}, program.Item(ys), k.Tree.Where), nil
}

// measured reads a table whose numbers are all of its xs, then all of its ys.
type measured struct{ of units.Dimension } // of the xs

func (t measured) call(v []float64) (float64, []string, error) {
	var y [1]float64
	err := t.read(v[:1], v[1:], y[:])
	return y[0], nil, err
}

func (t measured) spectral() func(first, others, out []float64) error { return t.read }

// read writes the ys at some xs.
func (t measured) read(at, table, out []float64) error {
	n := len(table) / 2
	if len(table) != 2*n || n == 0 {
		return errLists
	}
	xs, ys := make([]units.Ratio, n), make([]units.Ratio, n)
	low, high := table[0], table[0]
	for i := range n {
		xs[i], ys[i] = units.Ratio(table[i]), units.Ratio(table[n+i])
		low, high = min(low, table[i]), max(high, table[i])
	}
	curve, err := euv.NewMeasured(xs, ys)
	if err != nil {
		return fault(err)
	}
	for i, x := range at {
		if !(x >= low && x <= high) {
			return &program.ArgumentFault{Param: "x", Err: fmt.Errorf("x is %s; the table runs from %s to %s", units.New(x, t.of), units.New(low, t.of), units.New(high, t.of))}
		}
		y, err := curve.At(units.Ratio(x))
		if err != nil {
			return fault(err)
		}
		out[i] = float64(y)
	}
	return nil
}

// mostPoints is how many points of a table an integral stops at; where there
// are more, it finds its own places.
const mostPoints = 1000

// pointsBetween lists the numbers of a list between two.
func pointsBetween(low, high float64, list *program.Node, names program.Scope) []float64 {
	var points []float64
	resolve := func(name string) (*program.Node, error) {
		if n := names.Node(name); n != nil {
			return n, nil
		}
		return nil, ErrUnknown
	}
	for _, item := range program.Items(list, resolve) {
		if v, ok := item.Constant(); ok && v > low && v < high {
			points = append(points, v)
		}
	}
	if len(points) > mostPoints {
		return nil
	}
	return points
}
