package repl

import (
	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// peakRow is a row about the peak of a stack alone.
func peakRow(name, summary string, result program.Result, take func(euv.Peak) (float64, error)) *program.Function {
	f := &program.Function{
		Name: name, Section: bodySection, Summary: summary, Result: result,
		Params:  []program.Param{{Name: "stack", Kind: program.BodyKind}, angleParam(), lengthParam("near", "13.5 nm", "the peak is looked for within 10 % of it, up to the next absorption edge")},
		Formula: "the highest maximum of the reflectivity", Valid: "unpolarised light", Source: "as reflectivity", Example: name + "(std)",
	}
	f.Build = func(c *program.Checker, k *program.Call) (*program.Node, error) { return buildPeak(c, k, result, take) }
	return f
}

func buildPeak(c *program.Checker, k *program.Call, result program.Result, take func(euv.Peak) (float64, error)) (*program.Node, error) {
	b, ok := k.Args[0].Body().(*stackBody)
	if !ok {
		return nil, syntax.Fail(k.Exprs[0].Span(), k.Args[0].Body().Describe()+" is no stack", "a stack is defined by the lines stack NAME … end; see: help stack")
	}
	f := &program.Function{Name: k.Func.Name, Params: []program.Param{{Name: "angle"}, {Name: "near"}}, Call: func(x []float64) (float64, []string, error) {
		s, err := b.stack(x[2:])
		if err != nil {
			return 0, nil, err
		}
		p, err := s.Peak(units.Angle(x[0]), euv.Unpolarised, units.Length(x[1]))
		if err != nil {
			return 0, nil, fault(err)
		}
		v, err := take(p)
		return v, s.Warnings(), fault(err)
	}}
	return c.Made(f, append([]*program.Node{k.Args[1], k.Args[2]}, k.Args[0].Numbers()...), program.Type{Dim: result.Dim}, k.Tree.Where), nil
}

// peakRows ask where a stack or a chain reflects best, and how wide.
func peakRows() []Function {
	length := program.Result{Dim: units.DimensionOf[units.Length]()}
	where := func(p euv.Peak) (float64, error) { return float64(p.Wavelength), nil }
	width := func(p euv.Peak) (float64, error) { w, err := p.Bandwidth(); return float64(w), err }
	return []Function{
		{ofEither(peakRow("peak_wavelength", "wavelength at which a stack or a chain is brightest", length, where), length, where)},
		{ofEither(peakRow("bandwidth", "full width at half maximum of a stack or a chain", length, width), length, width)},
	}
}

// ofEither makes a row that takes a stack, an angle and a wavelength, or a
// chain and two planes.
func ofEither(f *program.Function, result program.Result, take func(euv.Peak) (float64, error)) *program.Function {
	stack := f.Build
	f.Params = []program.Param{{Name: "of", Kind: program.EitherKind, Doc: "a stack, then angle = 0 deg and near = 13.5 nm; or a chain, then two planes"}, {Name: "angle", Either: true, Default: "0 deg", Doc: "or the plane from"}, {Name: "near", Either: true, Dim: result.Dim, Default: "13.5 nm", Doc: "or the plane to"}}
	f.Build = func(c *program.Checker, k *program.Call) (*program.Node, error) {
		if k.Args[0].Type.Kind == program.BodyKind {
			return stack(c, k)
		}
		ch := k.Args[0].Chain()
		if k.Words[1] == "" || k.Words[2] == "" {
			return nil, syntax.Fail(k.Tree.Where, "a chain is bright between two planes", "write "+k.Func.Name+"("+ch.Name+", IF, WAFER)")
		}
		n, err := c.Spectrum(ch, program.Plane(k.Words[1]), program.Plane(k.Words[2]), k.Tree.Where)
		if err != nil {
			return nil, err
		}
		return brightest(c, ch, n, k.Func.Name, take, program.Type{Dim: result.Dim}), nil
	}
	return f
}

// brightest makes the node of a number read off the peak of a chain's product,
// looked for within 5 % of the middle of its band.
func brightest(c *program.Checker, ch *program.Chain, product *program.Node, name string, take func(euv.Peak) (float64, error), t program.Type) *program.Node {
	return c.Scanned(name, ch, product, func(spectrum func(dst, wavelengths []float64) error, center float64) (float64, error) {
		p, err := euv.FindPeak(spectrum, units.Length(center*0.95), units.Length(center*1.05), units.Length(center*2e-3))
		if err != nil {
			return 0, fault(err)
		}
		v, err := take(p)
		return v, fault(err)
	}, t, product.At)
}
