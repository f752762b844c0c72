package repl

import (
	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

func buildFilm(c *program.Checker, k *program.Call) (*program.Node, error) {
	m, err := materialOf(k, 0)
	if err != nil {
		return nil, err
	}
	return c.NewBody(&filmBody{m}, []*program.Node{k.Args[0].Numbers()[0], k.Args[1]}, k.Tree.Where), nil
}

func buildGas(c *program.Checker, k *program.Call) (*program.Node, error) {
	f, err := euv.ParseFormula(k.Words[0])
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{k.Exprs[0].Span()}, Msg: err.Error(), Hint: "a formula is such as H2 or CH4", Cause: err}
	}
	return c.NewBody(&gasBody{f}, k.Args[1:5], k.Tree.Where), nil
}

func buildReflectivity(c *program.Checker, k *program.Call) (*program.Node, error) {
	q := &asked{body: k.Args[0].Body().(builder), own: 3, pol: polarization(k.Words[3]), light: (*euv.Evaluator).Reflectivity}
	return question(c, k, q, []*program.Node{k.Args[1], k.Args[2], k.Args[4]}), nil
}

func buildTransmittance(c *program.Checker, k *program.Call) (*program.Node, error) {
	q := &asked{body: k.Args[0].Body().(builder), own: 2, light: (*euv.Evaluator).Transmittance}
	return question(c, k, q, []*program.Node{k.Args[1], k.Args[2]}), nil
}

func polarization(word string) euv.Polarization {
	switch word {
	case "s":
		return euv.PolarizationS
	case "p":
		return euv.PolarizationP
	}
	return euv.Unpolarised
}

// question makes the node of what a body does to light.
func question(c *program.Checker, k *program.Call, q *asked, own []*program.Node) *program.Node {
	q.numbers = len(k.Args[0].Numbers())
	f := &program.Function{
		Name: k.Func.Name, Params: []program.Param{{Name: "wavelength"}, {Name: "angle"}, {Name: "roughness"}},
		Call: q.call, Spectral: q.spectral, Kinks: q.kinks,
	}
	return c.Made(f, append(own, k.Args[0].Numbers()...), program.Type{}, k.Tree.Where)
}

// buildMaterial makes the node of what a material does at a wavelength.
func buildMaterial(d units.Dimension, ask func(euv.Material, units.Length) (float64, error)) func(*program.Checker, *program.Call) (*program.Node, error) {
	return func(c *program.Checker, k *program.Call) (*program.Node, error) {
		m, err := materialOf(k, 0)
		if err != nil {
			return nil, err
		}
		q := &asked{body: m, numbers: 1}
		f := &program.Function{
			Name: k.Func.Name, Params: []program.Param{{Name: "wavelength"}, {Name: "density"}}, Kinks: q.kinks,
			Call: func(x []float64) (float64, []string, error) {
				v, err := ask(m.at(x[1]), units.Length(x[0]))
				return v, euv.Surface{Medium: m.at(x[1])}.Warnings(), fault(err)
			},
		}
		return c.Made(f, []*program.Node{k.Args[1], k.Args[0].Numbers()[0]}, program.Type{Dim: d}, k.Tree.Where), nil
	}
}
