package repl

import (
	"example.com/dosewright/repl/internal/program"
)

// chainRows are functions of a chain; their arguments are no numbers, so they
// make their nodes themselves.
func chainRows() []Function {
	const section = "Chain"
	chain := program.Param{Name: "chain", Kind: program.ChainKind}
	return []Function{
		{&program.Function{
			Name: "transmission", Section: section, Summary: "factor between two planes of a chain, either way",
			Params:  []program.Param{chain, {Name: "from", IsPlane: true}, {Name: "to", IsPlane: true}},
			Result:  program.Result{Doc: "a ratio at to/from"},
			Formula: "product of the elements between the planes, each as often as light crosses it",
			Valid:   "elements from 0 to 1", Source: "definition", Example: "transmission(pair, IF, WAFER)",
			Build: func(c *program.Checker, k *program.Call) (*program.Node, error) {
				return c.Transmission(k.Args[0].Chain(), program.Plane(k.Words[1]), program.Plane(k.Words[2]), k.Tree.Where)
			},
		}},
		{&program.Function{
			Name: "carry", Section: section, Summary: "takes a quantity from its own plane to another",
			Params:  []program.Param{{Name: "x", Any: true, Doc: "power, energy, photon number or rate; fluence and irradiance between MASK and WAFER"}, chain, {Name: "plane", IsPlane: true}},
			Result:  program.Result{Doc: "as x, at the plane"},
			Formula: "x · transmission; per area also · Mx My from MASK to WAFER",
			Valid:   "x stands at a plane of the chain", Source: "definition", Example: "carry(250 W at IF, pair, WAFER)",
			Build: func(c *program.Checker, k *program.Call) (*program.Node, error) {
				return c.Carry(k.Args[0], k.Exprs[0], k.Args[1].Chain(), program.Plane(k.Words[2]), k.Tree.Where)
			},
		}},
	}
}
