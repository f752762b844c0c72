package repl

import (
	"errors"
	"strings"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/units"
)

// Row says of a function what its Go types cannot: names, planes, defaults and
// what help shows.
type Row struct {
	Name    string
	Section string
	Summary string
	// Args has an entry an argument: "name", "name at PLANE", "name = default",
	// each perhaps with ": what it is" behind it.
	Args []string
	// Plane of the result: "", "IF", or "as NAME" for that of an argument.
	Plane string
	// Unit in which an answer is stated when the call stands alone, "" for the
	// usual one of the dimension.
	Unit    string
	Formula string
	Valid   string
	Source  string
	Example string
	Caution string
}

// Function is a typed Go function bound to the language.
type Function struct{ row *program.Function }

// Name returns the function's name in the language.
func (f Function) Name() string { return f.row.Name }

// bound makes the row of a function from the parameters that its types say.
func bound(row Row, result program.Param, params []program.Param, call func([]float64) (float64, []string, error)) Function {
	f := &program.Function{
		Name: row.Name, Section: row.Section, Summary: row.Summary, Formula: row.Formula,
		Valid: row.Valid, Source: row.Source, Example: row.Example, Caution: row.Caution,
		Result: program.Result{Dim: result.Dim, Kind: result.Kind, Unit: row.Unit},
	}
	for i, p := range params {
		if i < len(row.Args) {
			argument(&p, row.Args[i])
		}
		f.Params = append(f.Params, p)
	}
	f.Result.Plane = program.Plane(row.Plane)
	if name, follows := strings.CutPrefix(row.Plane, "as "); follows {
		f.Result.Plane = ""
		for i, p := range f.Params {
			if p.Name == name {
				f.Result.Follows = i + 1
			}
		}
	}
	f.Call = func(x []float64) (float64, []string, error) {
		y, warnings, err := call(x)
		return y, warnings, fault(err)
	}
	return Function{f}
}

// argument reads "name at PLANE = default: doc" into a parameter.
func argument(p *program.Param, text string) {
	head, doc, _ := strings.Cut(text, ": ")
	head, fallback, _ := strings.Cut(head, " = ")
	name, plane, _ := strings.Cut(head, " at ")
	p.Name, p.Plane, p.Default, p.Doc = name, program.Plane(plane), fallback, doc
}

// fault names the argument at fault to the language.
func fault(err error) error {
	var bad *euv.ArgumentError
	if errors.As(err, &bad) {
		return &program.ArgumentFault{Param: bad.Argument, Err: err}
	}
	return err
}

// of reads a parameter off a Go type.
func of[T units.Kind]() program.Param {
	var zero T
	p := program.Param{Dim: units.DimensionOf[T]()}
	switch v := any(zero).(type) {
	case interface{ Words() []string }:
		p.Words = v.Words()
	case units.Temperature:
		p.Kind = program.Point
	}
	return p
}

// none is the result without warnings.
func none[R units.Kind](r R, err error) (float64, []string, error) { return float64(r), nil, err }

// doubts is the result with its warnings.
func doubts[R units.Kind](r euv.Warned[R], err error) (float64, []string, error) {
	return float64(r.Value), r.Warnings, err
}

// Bind1 binds a function of one argument.
func Bind1[A, R units.Kind](row Row, f func(A) (R, error)) Function {
	return bound(row, of[R](), []program.Param{of[A]()},
		func(x []float64) (float64, []string, error) { return none(f(A(x[0]))) })
}

// Bind2 binds a function of two arguments.
func Bind2[A, B, R units.Kind](row Row, f func(A, B) (R, error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B]()},
		func(x []float64) (float64, []string, error) { return none(f(A(x[0]), B(x[1]))) })
}

// Bind3 binds a function of three arguments.
func Bind3[A, B, C, R units.Kind](row Row, f func(A, B, C) (R, error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C]()},
		func(x []float64) (float64, []string, error) { return none(f(A(x[0]), B(x[1]), C(x[2]))) })
}

// Bind4 binds a function of four arguments.
func Bind4[A, B, C, D, R units.Kind](row Row, f func(A, B, C, D) (R, error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C](), of[D]()},
		func(x []float64) (float64, []string, error) { return none(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]))) })
}

// Bind5 binds a function of five arguments.
func Bind5[A, B, C, D, E, R units.Kind](row Row, f func(A, B, C, D, E) (R, error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C](), of[D](), of[E]()},
		func(x []float64) (float64, []string, error) {
			return none(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]), E(x[4])))
		})
}

// Bind6 binds a function of six arguments.
func Bind6[A, B, C, D, E, F, R units.Kind](row Row, f func(A, B, C, D, E, F) (R, error)) Function {
	return bound(row, of[R](), []program.Param{of[A](), of[B](), of[C](), of[D](), of[E](), of[F]()},
		func(x []float64) (float64, []string, error) {
			return none(f(A(x[0]), B(x[1]), C(x[2]), D(x[3]), E(x[4]), F(x[5])))
		})
}
