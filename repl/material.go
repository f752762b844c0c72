package repl

import (
	"sync"

	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// materialBody is a material, whose one number is its density.
type materialBody struct {
	name    string
	formula euv.Formula
}

// Describe names the material.
func (m *materialBody) Describe() string { return m.name }

func (m *materialBody) at(density float64) euv.Material {
	return euv.Material{Formula: m.formula, Density: units.Density(density)}
}

func (m *materialBody) body(x []float64) (euv.Body, error) {
	return euv.Surface{Medium: m.at(x[0])}, nil
}

// elements are the solid elements that have been asked for, by symbol.
var elements = sync.OnceValue(func() *sync.Map { return &sync.Map{} })

// element is the body of an element at the density of its solid, nil for words
// that are no such element.
func element(symbol string) *program.Node {
	if n, ok := elements().Load(symbol); ok {
		return n.(*program.Node)
	}
	m, err := euv.SolidElement(symbol)
	if err != nil {
		return nil
	}
	density := program.NewConstant(units.Of(m.Density))
	n := (&program.Checker{}).NewBody(&materialBody{symbol, m.Formula}, []*program.Node{density}, syntax.Span{})
	elements().Store(symbol, n)
	return n
}

// Material finds a material of the session, then an element.
func (c scope) Material(name string) (*program.Node, bool) {
	if d := c.s.store.defs[program.MaterialKey(name)]; d != nil {
		return d.node, true
	}
	return element(name), false
}

// Integrate gives the mean of a spectrum over a band.
func (c scope) Integrate(f func(dst, wavelengths []float64) error, center, width float64, kinks []float64) (float64, float64, error) {
	var at []units.Length
	for _, k := range kinks {
		at = append(at, units.Length(k))
	}
	return euv.BandMean(f, units.Length(center), units.Length(width), at)
}

// defineMaterial keeps a material under a name of its own kind, when its density
// makes sense.
func (s *Session) defineMaterial(j job) ([]Result, error) {
	a := j.do.(*syntax.Material)
	d := s.newDefinition(program.MaterialKey(a.Name), j)
	if err := s.checked(d); err != nil {
		return nil, err
	}
	density, _, err := s.compute(d.node.Numbers()[0])
	if err != nil {
		return nil, s.blame(err, s.checker(d.text, d.name))
	}
	m, err := euv.NewMaterial(a.Formula, units.Density(density))
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{a.X.Span()}, Msg: err.Error(), Hint: "write material " + a.Name + " = " + a.Formula + " 2.2 g/cm^3", Cause: err}
	}
	if err := s.install(d, a.NameAt); err != nil {
		return nil, err
	}
	return noteOnly(append(d.warning, euv.Surface{Medium: m}.Warnings()...)), nil
}

// checkedMaterial gives a material its node.
func (s *Session) checkedMaterial(a *syntax.Material, c *program.Checker) (*program.Node, error) {
	f, err := euv.ParseFormula(a.Formula)
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{a.FormulaAt}, Msg: err.Error(), Hint: "a formula is such as SiO2, C5H8O2 or Ca(OH)2; upper and lower case count", Cause: err}
	}
	density, err := c.Quantity(a.X, units.DimensionOf[units.Density](), "the density of a material")
	if err != nil {
		return nil, err
	}
	return c.NewBody(&materialBody{a.Name, f}, []*program.Node{density}, a.NameAt), nil
}
