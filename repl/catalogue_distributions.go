package repl

import (
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// distributionRows make uncertain inputs; they build their nodes themselves,
// since each call is a source of error of its own.
func distributionRows() []Function {
	row := func(name, summary, valid, example string, shape program.Shape, args ...program.Param) Function {
		return Function{&program.Function{
			Name: name, Section: "Uncertain inputs", Summary: summary, Params: args,
			Result: program.Result{Doc: "an uncertain input"}, Formula: "JCGM 101:2008, 6.4", Valid: valid,
			Source: "JCGM 101:2008, 6.4.2, 6.4.5, 6.4.7", Example: example,
			Build: func(c *program.Checker, k *program.Call) (*program.Node, error) {
				return c.Distribution(shape, k)
			},
		}}
	}
	a, b := program.Param{Name: "low", Any: true, Doc: "lower limit"}, program.Param{Name: "high", Any: true, Doc: "upper limit"}
	return []Function{
		row("rectangular", "an input that lies anywhere between two limits", "low < high, both numbers", "rectangular(1 nm, 2 nm)", program.Rectangular, a, b),
		row("triangular", "an input between two limits, most likely in their middle", "low < high, both numbers", "triangular(1 nm, 2 nm)", program.Triangular, a, b),
		row("normal", "an input with a normal distribution", "uncertainty ≥ 0, both numbers", "normal(3 W, 0.1 W)", program.Normal,
			program.Param{Name: "mean", Any: true}, program.Param{Name: "uncertainty", Any: true, Doc: "standard uncertainty"}),
	}
}

// uncertainCall names the functions whose calls make an input.
func uncertainCall(x syntax.Expr) bool {
	c, ok := x.(*syntax.Call)
	return ok && (c.Func == "rectangular" || c.Func == "triangular" || c.Func == "normal")
}
