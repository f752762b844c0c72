package repl

import (
	"example.com/dosewright/euv"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

const bodySection = "Bodies: mirrors, films, gas"

const tablesSource = "Henke, Gullikson & Davis, At. Data Nucl. Data Tables 54, 181 (1993), with the compilers' later updates"

// The parameters that these rows share.
func bodyParam(doc string) program.Param {
	return program.Param{Name: "body", Kind: program.BodyKind, Doc: doc}
}

func lengthParam(name, fallback, doc string) program.Param {
	return program.Param{Name: name, Dim: units.DimensionOf[units.Length](), Default: fallback, Doc: doc}
}

func angleParam() program.Param {
	return program.Param{Name: "angle", Default: "0 deg", Doc: "from the normal, below 90 deg"}
}

func polarizationParam() program.Param {
	return program.Param{Name: "polarization", Words: []string{"unpolarised", "s", "p"}, Default: "unpolarised", Doc: "unpolarised is the mean of intensities"}
}

func bodyRows() []Function {
	return []Function{
		{&program.Function{
			Name: "film", Section: bodySection, Summary: "a layer that absorbs and does nothing else",
			Params: []program.Param{{Name: "material", Kind: program.BodyKind}, lengthParam("thickness", "", "")}, Result: program.Result{Doc: "a body"},
			Formula: "absorption along the straight path, once", Valid: "no reflection at its faces: for those, a stack", Source: "law of Beer and Lambert", Example: "transmittance(film(Si, 50 nm))", Build: buildFilm,
		}},
		{&program.Function{
			Name: "gas_column", Section: bodySection, Summary: "the gas that light goes through",
			Params: []program.Param{
				{Name: "formula", IsWord: true, Doc: "of the molecule, such as H2"},
				{Name: "pressure", Dim: units.DimensionOf[units.Pressure]()},
				lengthParam("path", "", ""),
				{Name: "temperature", Kind: program.Point, Dim: units.DimensionOf[units.Temperature](), Default: "293.15 K"},
				{Name: "cross_section", Dim: units.DimensionOf[units.Area](), Default: "none", Doc: "of one molecule; none takes it from the tables of the atoms"},
			},
			Result: program.Result{Doc: "a body"}, Formula: "exp(−σ p L / (k T))", Valid: "ideal gas; hydrogen molecules absorb about a fifth more than their atoms",
			Source: tablesSource, Example: "transmittance(gas_column(H2, 5 Pa, 2 m))", Caution: gasCaution, Build: buildGas,
		}},
		{&program.Function{
			Name: "reflectivity", Section: bodySection, Summary: "share of the power that a stack or a material's surface reflects",
			Params:  []program.Param{bodyParam("a stack, or a material for one surface"), lengthParam("wavelength", "", ""), angleParam(), polarizationParam(), lengthParam("roughness", "0 nm", "rms, of a material's surface; a stack has its own")},
			Formula: "recursion over the layers, each interface with its roughness (Névot–Croce)", Valid: "wavelengths of the tables, 25 to 300 eV",
			Source: "L. G. Parratt, Phys. Rev. 95, 359 (1954); L. Névot, P. Croce, Rev. Phys. Appl. 15, 761 (1980)", Example: "reflectivity(Ru, 13.5 nm, 80 deg)", Build: buildReflectivity,
		}},
		{&program.Function{
			Name: "transmittance", Section: bodySection, Summary: "share of the power that passes a film, a gas or a smooth stack, once",
			Params:  []program.Param{bodyParam("a film, a gas column, or a smooth stack without substrate"), lengthParam("wavelength", "13.5 nm", ""), angleParam()},
			Formula: "film: absorption along the path; gas: exp(−σ p L / (k T)); stack: exact", Valid: "rough stacks are refused", Source: tablesSource,
			Example: "transmittance(film(Si, 50 nm), 13.5 nm)", Build: buildTransmittance,
		}},
		{peakRow("peak_reflectivity", "highest reflectivity of a stack near a wavelength", program.Result{}, func(p euv.Peak) (float64, error) { return p.Value, nil })},
		{&program.Function{
			Name: "delta", Section: bodySection, Summary: "δ of the refractive index n = 1 − δ − iβ", Params: materialAt(""),
			Formula: "δ = r_e λ² Σ N f1 / 2π", Valid: "25 to 300 eV, where f1 is known", Source: tablesSource, Example: "delta(Mo, 13.5 nm)",
			Build: buildMaterial(units.Dimension{}, func(m euv.Material, l units.Length) (float64, error) {
				v, err := euv.Delta(m, l)
				return float64(v), err
			}),
		}},
		{&program.Function{
			Name: "beta", Section: bodySection, Summary: "β of the refractive index n = 1 − δ − iβ", Params: materialAt(""),
			Formula: "β = r_e λ² Σ N f2 / 2π", Valid: "25 to 300 eV", Source: tablesSource, Example: "beta(Si, 13.5 nm)",
			Build: buildMaterial(units.Dimension{}, func(m euv.Material, l units.Length) (float64, error) {
				v, err := euv.Beta(m, l)
				return float64(v), err
			}),
		}},
		{&program.Function{
			Name: "attenuation", Section: bodySection, Summary: "Napierian attenuation coefficient of a material", Params: materialAt("13.5 nm"),
			Formula: "α = 4πβ/λ", Valid: "25 to 300 eV", Source: tablesSource, Example: "attenuation(Si)",
			Build: buildMaterial(units.DimensionOf[units.AttenuationCoefficient](), func(m euv.Material, l units.Length) (float64, error) {
				v, err := euv.Attenuation(m, l)
				return float64(v), err
			}),
		}},
		{&program.Function{
			Name: "penetration_depth", Section: bodySection, Summary: "depth at which 1/e of the light is left", Params: materialAt("13.5 nm"),
			Formula: "λ/(4πβ)", Valid: "25 to 300 eV", Source: tablesSource, Example: "penetration_depth(Si)",
			Build: buildMaterial(units.DimensionOf[units.Length](), func(m euv.Material, l units.Length) (float64, error) {
				v, err := euv.PenetrationDepth(m, l)
				return float64(v), err
			}),
		}},
		{&program.Function{
			Name: "curve", Section: bodySection, Summary: "a measured table, read along straight lines",
			Params: []program.Param{{Name: "xs", Kind: program.List, Any: true}, {Name: "ys", Kind: program.List, Any: true}, {Name: "x", Any: true}}, Result: program.Result{Doc: "as ys"},
			Formula: "linear between the points", Valid: "refused outside the table", Source: "definition", Example: "curve({13 nm, 14 nm}, {60 %, 64 %}, 13.5 nm)", Build: buildCurve,
		}},
	}
}

const gasCaution = "Planning arithmetic only: site rules, the local hydrogen code and licensed practice govern hydrogen and vacuum."

func materialAt(fallback string) []program.Param {
	return []program.Param{{Name: "material", Kind: program.BodyKind, Doc: "an element, or a material of the session"}, lengthParam("wavelength", fallback, "")}
}

// materialOf is the material behind an argument.
func materialOf(k *program.Call, i int) (*materialBody, error) {
	m, ok := k.Args[i].Body().(*materialBody)
	if !ok {
		return nil, syntax.Fail(k.Exprs[i].Span(), k.Args[i].Body().Describe()+" is no material", "element symbols are known; others are named by material NAME = SiO2 2.2 g/cm^3")
	}
	return m, nil
}
