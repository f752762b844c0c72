package repl

import (
	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/units"
)

// The functions BindWarned1 to BindWarned6 bind what Bind1 to Bind6 do, for
// results that carry warnings with them; an answer prints each of them in a
// line of its own.

// BindWarned1 binds a function of one argument whose result may carry warnings.
func BindWarned1[A, R units.Kind](row Row, f func(A) (euv.Warned[R], error)) Function {
	return bound(row, of[R](), []program.Param{of[A]()},
		func(x []float64) (float64, []string, error) { return doubts(f(A(x[0]))) })
}

// BindWarned2 binds a function of two arguments whose result may carry
// warnings.
func BindWarned2[A, B, R units.Kind](row Row, f func(A, B) (euv.Warned[R], error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B]()},
		func(x []float64) (float64, []string, error) { return doubts(f(A(x[0]), B(x[1]))) })
}

// BindWarned3 binds a function of three arguments whose result may carry
// warnings.
func BindWarned3[A, B, C, R units.Kind](row Row, f func(A, B, C) (euv.Warned[R], error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C]()},
		func(x []float64) (float64, []string, error) { return doubts(f(A(x[0]), B(x[1]), C(x[2]))) })
}

// BindWarned4 binds a function of four arguments whose result may carry
// warnings.
func BindWarned4[A, B, C, D, R units.Kind](row Row, f func(A, B, C, D) (euv.Warned[R], error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C](), of[D]()},
		func(x []float64) (float64, []string, error) { return doubts(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]))) })
}

// BindWarned5 binds a function of five arguments whose result may carry
// warnings.
func BindWarned5[A, B, C, D, E, R units.Kind](row Row, f func(A, B, C, D, E) (euv.Warned[R], error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C](), of[D](), of[E]()},
		func(x []float64) (float64, []string, error) {
			return doubts(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]), E(x[4])))
		})
}

// BindWarned6 binds a function of six arguments whose result may carry
// warnings.
func BindWarned6[A, B, C, D, E, F, R units.Kind](row Row, f func(A, B, C, D, E, F) (euv.Warned[R], error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C](), of[D](), of[E](), of[F]()},
		func(x []float64) (float64, []string, error) {
			return doubts(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]), E(x[4]), F(x[5])))
		})
}
