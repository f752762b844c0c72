package repl

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/units"
)

// errPure is what a function of pure numbers says to others.
var errPure = errors.New("the argument is a pure number without a plane")

// The rules by which mathematical functions treat dimensions.
func pure(args []program.Type) (program.Type, error) {
	for _, t := range args {
		if !t.Pure() {
			return program.Type{}, errPure
		}
	}
	return program.Type{}, nil
}

func same(args []program.Type) (program.Type, error) { return args[0], nil }

func difference(args []program.Type) (program.Type, error) {
	t := args[0]
	t.Kind = program.Number
	return t, nil
}

func noPoint(args []program.Type) (program.Type, error) {
	if args[0].Kind == program.Point {
		return args[0], errors.New("temperature points do not add up: take mean, or subtract two of them")
	}
	return args[0], nil
}

func root(n int) func([]program.Type) (program.Type, error) {
	return func(args []program.Type) (program.Type, error) {
		t, err := args[0].Root(n)
		return t, err
	}
}

func ratio(args []program.Type) (program.Type, error) {
	if args[0].Dim != args[1].Dim || args[0].Plane != args[1].Plane {
		return program.Type{}, errors.New("both arguments are of one dimension at one plane")
	}
	if args[0].Kind == program.Point || args[1].Kind == program.Point {
		return program.Type{}, errors.New("temperature points have no ratio: subtract a reference first")
	}
	return program.Type{}, nil
}

func sides(args []program.Type) (program.Type, error) {
	_, err := ratio(args)
	return args[0], err
}

// domain turns what a function has no value for into an error.
func domain(name string, f func(float64) float64) func([]float64) (float64, []string, error) {
	return func(x []float64) (float64, []string, error) {
		y := f(x[0])
		if y-y != 0 {
			return 0, nil, fmt.Errorf("%s has no finite value at %s: %w", name, units.FormatNumber(x[0], 5), ErrNotFinite)
		}
		return y, nil, nil
	}
}

func plain(f func([]float64) float64) func([]float64) (float64, []string, error) {
	return func(x []float64) (float64, []string, error) { return f(x), nil, nil }
}

// mathsRow is one mathematical function.
type mathsRow struct {
	name, summary, params string
	rule                  func([]program.Type) (program.Type, error)
	call                  func([]float64) (float64, []string, error)
	example               string
}

func mathsRows() []mathsRow {
	one := func(name, summary string, f func(float64) float64, example string) mathsRow {
		return mathsRow{name, summary, "x", pure, domain(name, f), example}
	}
	return []mathsRow{
		{"sqrt", "square root, of the dimension too", "x", root(2), domain("sqrt", math.Sqrt), "sqrt(400 nm^2)"},
		{"cbrt", "cube root, of the dimension too", "x", root(3), domain("cbrt", math.Cbrt), "cbrt(8 nm^3)"},
		one("exp", "e to the power x", math.Exp, "exp(-0.15)"),
		one("ln", "natural logarithm of a pure number", math.Log, "ln(2)"),
		one("log10", "decadic logarithm of a pure number", math.Log10, "log10(250 W / 1 W)"),
		one("sin", "sine of an angle", math.Sin, "sin(6 deg)"),
		one("cos", "cosine of an angle", math.Cos, "cos(6 deg)"),
		one("tan", "tangent of an angle", math.Tan, "tan(6 deg)"),
		one("asin", "angle of a sine", math.Asin, "asin(0.33) [deg]"),
		one("acos", "angle of a cosine", math.Acos, "acos(0.5) [deg]"),
		one("atan", "angle of a tangent", math.Atan, "atan(1) [deg]"),
		{"atan2", "angle of the point (x, y): atan2(y, x)", "y x", ratio, plain(func(x []float64) float64 { return math.Atan2(x[0], x[1]) }), "atan2(1 nm, 2 nm) [deg]"},
		{"hypot", "square root of x² + y²", "x y", sides, plain(func(x []float64) float64 { return math.Hypot(x[0], x[1]) }), "hypot(3 nm, 4 nm)"},
		{"abs", "value without its sign", "x", difference, plain(func(x []float64) float64 { return math.Abs(x[0]) }), "abs(2 nm - 5 nm)"},
		one("floor", "largest whole number not above x", math.Floor, "floor(3600 / 9.5)"),
		one("ceil", "smallest whole number not below x", math.Ceil, "ceil(378.9)"),
		one("round", "nearest whole number, halves away from zero", math.Round, "round(378.9)"),
		one("erf", "error function", math.Erf, "erf(1)"),
		{"min", "smallest of its arguments", "values", same, plain(slices.Min[[]float64]), "min(2 nm, 1 nm)"},
		{"max", "largest of its arguments", "values", same, plain(slices.Max[[]float64]), "max(2 nm, 1 nm)"},
		{"sum", "sum of a list", "values", noPoint, plain(total), "sum({1 nm, 2 nm, 4 nm})"},
		{"mean", "arithmetic mean of a list", "values", same, plain(mean), "mean({1 nm, 2 nm, 4 nm})"},
		{"median", "middle of a sorted list, the mean of the two middle values for an even count", "values", same, plain(median), "median({1 nm, 2 nm, 4 nm})"},
		{"sd", "standard deviation of a list, divisor n − 1", "values", difference, deviation, "sd({1 nm, 2 nm, 4 nm})"},
		{"rss", "square root of the sum of squares of a list", "values", noPoint, plain(rss), "rss({3 nm, 4 nm})"},
		{"quantile", "value that the fraction p of a list does not exceed: inverse of the empirical distribution", "values p", quantileType, quantile, "quantile({1 nm, 2 nm, 4 nm}, 0.5)"},
		{"number_of", "drops counted things and planes on purpose; SI units must have cancelled", "x", counted, plain(func(x []float64) float64 { return x[0] }), "number_of(96 field/wafer)"},
	}
}

// counted lets what is a number but for counted things and planes pass as one.
func counted(args []program.Type) (program.Type, error) {
	t := args[0]
	if t.Kind != program.Number {
		return t, errors.New("the argument is no temperature point")
	}
	return program.Type{Dim: t.Dim.WithoutCounted()}, nil
}

func quantileType(args []program.Type) (program.Type, error) {
	t := args[0]
	if !args[1].Pure() {
		return t, errPure
	}
	if t.Kind == program.List {
		t.Kind = program.Number
	}
	return t, nil
}

func mathsFunctions() []*program.Function {
	var list []*program.Function
	for _, r := range mathsRows() {
		f := &program.Function{Name: r.name, Section: "Mathematics", Summary: r.summary, Rule: r.rule, Call: r.call, Example: r.example}
		for _, p := range strings.Fields(r.params) {
			kind := program.Number
			if p == "values" {
				kind = program.List
			}
			f.Params = append(f.Params, program.Param{Name: p, Kind: kind})
		}
		list = append(list, f)
	}
	return list
}
