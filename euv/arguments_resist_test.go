package euv

import (
	"errors"
	"go/ast"
	"go/parser"
	"go/token"
	"math"
	"testing"

	"example.com/dosewright/units"
)

// tried is an argument: its name, a value that is fine, and values that are
// not, besides NaN and the infinities.
type tried struct {
	name string
	fine float64
	bad  []float64
}

// plain and doubted bring results to one form.
func plain[R units.Kind](r R, err error) (float64, error) { return float64(r), err }

func doubted[R units.Kind](w Warned[R], err error) (float64, error) {
	return float64(w.Value), err
}

type (
	count  = units.Count
	ratio  = units.Ratio
	length = units.Length
)

// refusals has a row for every function of resist and stochastics, imaging, mask
// and overlay.
var refusals = []struct {
	function string
	call     func(a []float64) (float64, error)
	args     []tried
}{
	{"AbsorbedFraction", func(a []float64) (float64, error) {
		return plain(AbsorbedFraction(units.AttenuationCoefficient(a[0]), length(a[1])))
	}, []tried{{"attenuation", 5e6, below0}, {"thickness", 3e-8, below0}}},
	{"AbsorbedPhotons", func(a []float64) (float64, error) {
		return plain(AbsorbedPhotons(units.Fluence(a[0]), units.AttenuationCoefficient(a[1]), length(a[2]), units.Area(a[3]), length(a[4])))
	}, []tried{{"dose", 300, below0}, {"attenuation", 5e6, below0}, {"thickness", 3e-8, below0}, {"area", 1e-16, upTo0}, {"wavelength", 13.5e-9, upTo0}}},
	{"AbsorbedEnergyDensity", func(a []float64) (float64, error) {
		return plain(AbsorbedEnergyDensity(units.Fluence(a[0]), units.AttenuationCoefficient(a[1])))
	}, []tried{{"dose", 300, below0}, {"attenuation", 5e6, below0}}},
	{
		"ShotNoise", func(a []float64) (float64, error) { return plain(ShotNoise(count(a[0]))) },
		[]tried{{"count", 20, upTo0}},
	},
	{"YieldNoise", func(a []float64) (float64, error) {
		return plain(YieldNoise(count(a[0]), count(a[1]), count(a[2])))
	}, []tried{{"count", 20, upTo0}, {"mean", 2, upTo0}, {"variance", 1, below0}}},
	{"EdgeRoughness", func(a []float64) (float64, error) {
		return doubted(EdgeRoughness(length(a[0]), ratio(a[1]), count(a[2])))
	}, []tried{{"CD", 1e-8, upTo0}, {"NILS", 2, upTo0}, {"count_in_cell", 100, upTo0}}},
	{
		"LWROfLER", func(a []float64) (float64, error) { return plain(LWROfLER(length(a[0]), ratio(a[1]))) },
		[]tried{{"ler", 1e-9, below0}, {"correlation", 0.2, []float64{-1.01, 1.01}}},
	},
	{
		"LEROfLWR", func(a []float64) (float64, error) { return plain(LEROfLWR(length(a[0]), ratio(a[1]))) },
		[]tried{{"lwr", 1e-9, below0}, {"correlation", 0.2, []float64{-1.01, 1, 1.01}}},
	},
	{"DoseForRoughness", func(a []float64) (float64, error) {
		return doubted(DoseForRoughness(length(a[0]), length(a[1]), units.Fluence(a[2])))
	}, []tried{{"now", 2e-9, upTo0}, {"target", 1e-9, upTo0}, {"dose", 300, upTo0}}},
	{"ZFactor", func(a []float64) (float64, error) {
		return doubted(ZFactor(length(a[0]), length(a[1]), units.Fluence(a[2]), RoughnessOf(word(a[3])), count(a[4])))
	}, []tried{{"half_pitch", 1e-8, upTo0}, {"roughness", 1e-9, upTo0}, {"dose", 300, upTo0}, {"of", 1, []float64{-1, 2}}, {"sigmas", 3, []float64{0, -1, 2, 1.5, 6}}}},
	{"LineAverage", func(a []float64) (float64, error) {
		return plain(LineAverage(length(a[0]), length(a[1]), length(a[2])))
	}, []tried{{"sigma", 1e-9, below0}, {"correlation_length", 1e-8, upTo0}, {"length", 1e-6, upTo0}}},
	{
		"MissingProbability", func(a []float64) (float64, error) { return doubted(MissingProbability(count(a[0]), ratio(a[1]))) },
		[]tried{{"mean", 90, tooMany}, {"threshold", 0.7, []float64{-0.1, 1e16}}},
	},
	{
		"MergingProbability", func(a []float64) (float64, error) { return doubted(MergingProbability(count(a[0]), ratio(a[1]))) },
		[]tried{{"mean", 90, tooMany}, {"threshold", 1.2, []float64{-0.1, 1e16}}},
	},
	{"Log10MissingProbability", func(a []float64) (float64, error) {
		return plain(Log10MissingProbability(count(a[0]), ratio(a[1])))
	}, []tried{{"mean", 90, append(upTo0, tooMany...)}, {"threshold", 0.7, []float64{-0.1, 1e16}}}},
	{"Log10MergingProbability", func(a []float64) (float64, error) {
		return plain(Log10MergingProbability(count(a[0]), ratio(a[1])))
	}, []tried{{"mean", 90, append(upTo0, tooMany...)}, {"threshold", 1.2, []float64{-0.1, 1e16}}}},
	{
		"MeanForFailure", func(a []float64) (float64, error) { return plain(MeanForFailure(ratio(a[0]), ratio(a[1]))) },
		[]tried{{"threshold", 0.5, []float64{-0.1, 0.9991, 1, 2}}, {"probability", 1e-10, notBetween}},
	},
	{
		"PoissonAtMost", func(a []float64) (float64, error) { return doubted(PoissonAtMost(count(a[0]), count(a[1]))) },
		[]tried{{"count", 3, noWhole}, {"mean", 5, tooMany}},
	},
	{
		"PoissonAtLeast", func(a []float64) (float64, error) { return doubted(PoissonAtLeast(count(a[0]), count(a[1]))) },
		[]tried{{"count", 3, noWhole}, {"mean", 5, tooMany}},
	},
	{"BinomialAtLeast", func(a []float64) (float64, error) {
		return doubted(BinomialAtLeast(count(a[0]), count(a[1]), ratio(a[2])))
	}, []tried{{"count", 3, append([]float64{9}, noWhole...)}, {"trials", 8, noWhole}, {"p", 0.3, outside01}}},
	{
		"NormalAbove", func(a []float64) (float64, error) { return doubted(NormalAbove(ratio(a[0]))) },
		[]tried{{"z", 3, nil}},
	},
	{
		"NormalQuantile", func(a []float64) (float64, error) { return plain(NormalQuantile(ratio(a[0]))) },
		[]tried{{"p", 0.3, notBetween}},
	},
	{
		"Failures", func(a []float64) (float64, error) { return plain(Failures(ratio(a[0]), count(a[1]))) },
		[]tried{{"probability", 0.1, outside01}, {"features", 1e9, below0}},
	},
	{
		"NoFailure", func(a []float64) (float64, error) { return plain(NoFailure(ratio(a[0]), count(a[1]))) },
		[]tried{{"probability", 1e-9, outside01}, {"features", 1e9, below0}},
	},
	{
		"YieldOf", func(a []float64) (float64, error) { return plain(YieldOf(units.ArealDensity(a[0]), units.Area(a[1]))) },
		[]tried{{"defect_density", 1e3, below0}, {"area", 1e-4, below0}},
	},
	{"RateLimitLow", func(a []float64) (float64, error) {
		return plain(RateLimitLow(count(a[0]), count(a[1]), ratio(a[2]), count(a[3])))
	}, limitArguments},
	{"RateLimitHigh", func(a []float64) (float64, error) {
		return plain(RateLimitHigh(count(a[0]), count(a[1]), ratio(a[2]), count(a[3])))
	}, limitArguments},
	{"ResistContrast", func(a []float64) (float64, error) {
		return plain(ResistContrast(units.Fluence(a[0]), units.Fluence(a[1]), Tone(word(a[2]))))
	}, []tried{{"dose_half", 80, upTo0}, {"dose_end", 120, []float64{0, -1, 80, 79}}, {"tone", 0, []float64{-1, 2}}}},
	{"ResistContrast", func(a []float64) (float64, error) {
		return plain(ResistContrast(units.Fluence(a[0]), units.Fluence(a[1]), Negative))
	}, []tried{{"dose_half", 80, upTo0}, {"dose_end", 60, []float64{0, -1, 80, 81}}}},
	{
		"HalfPitch", func(a []float64) (float64, error) { return plain(HalfPitch(ratio(a[0]), ratio(a[1]), length(a[2]))) },
		[]tried{{"k1", 0.4, upTo0}, {"NA", 0.33, notBetween}, {"wavelength", 1e-8, upTo0}},
	},
	{
		"K1", func(a []float64) (float64, error) { return plain(K1(length(a[0]), ratio(a[1]), length(a[2]))) },
		[]tried{{"half_pitch", 1e-8, upTo0}, {"NA", 0.33, notBetween}, {"wavelength", 1e-8, upTo0}},
	},
	{"DepthOfFocus", func(a []float64) (float64, error) {
		return plain(DepthOfFocus(ratio(a[0]), ratio(a[1]), length(a[2])))
	}, []tried{{"NA", 0.33, notBetween}, {"k2", 1, upTo0}, {"wavelength", 1e-8, upTo0}}},
	{"DepthOfFocusExact", func(a []float64) (float64, error) {
		return plain(DepthOfFocusExact(ratio(a[0]), ratio(a[1]), length(a[2])))
	}, []tried{{"NA", 0.33, notBetween}, {"k3", 0.25, upTo0}, {"wavelength", 1e-8, upTo0}}},
	{"NILS", func(a []float64) (float64, error) {
		return plain(NILS(units.AttenuationCoefficient(a[0]), length(a[1])))
	}, []tried{{"slope", 1e8, below0}, {"CD", 1e-8, below0}}},
	{
		"TwoBeamNILS", func(a []float64) (float64, error) { return plain(TwoBeamNILS(ratio(a[0]))) },
		[]tried{{"contrast", 0.8, outside01}},
	},
	{
		"CDShift", func(a []float64) (float64, error) { return plain(CDShift(length(a[0]), ratio(a[1]), ratio(a[2]))) },
		[]tried{{"CD", 1e-8, upTo0}, {"NILS", 2, upTo0}, {"dose_error", 0.1, []float64{-1.1, 1.1}}},
	},
	{
		"ExposureLatitude", func(a []float64) (float64, error) { return plain(ExposureLatitude(ratio(a[0]), ratio(a[1]))) },
		[]tried{{"NILS", 2, below0}, {"cd_tolerance", 0.1, outside01}},
	},
	{"FlareShift", func(a []float64) (float64, error) {
		return plain(FlareShift(length(a[0]), ratio(a[1]), ratio(a[2]), ratio(a[3]), ratio(a[4])))
	}, []tried{{"CD", 1e-8, upTo0}, {"NILS", 2, upTo0}, {"flare", 0.05, outside01}, {"density", 0.5, outside01}, {"edge_intensity", 0.3, upTo0}}},
	{
		"BlurContrast", func(a []float64) (float64, error) { return plain(BlurContrast(length(a[0]), length(a[1]))) },
		[]tried{{"sigma", 1e-9, below0}, {"pitch", 1e-8, upTo0}},
	},
	{
		"SigmaOfFWHM", func(a []float64) (float64, error) { return plain(SigmaOfFWHM(length(a[0]))) },
		[]tried{{"x", 1e-9, below0}},
	},
	{
		"FWHMOfSigma", func(a []float64) (float64, error) { return plain(FWHMOfSigma(length(a[0]))) },
		[]tried{{"x", 1e-9, below0}},
	},
	{"WaferErrorOfMask", func(a []float64) (float64, error) {
		return plain(WaferErrorOfMask(length(a[0]), ratio(a[1]), ratio(a[2])))
	}, []tried{{"mask_error", 1e-9, nil}, {"MEEF", 1.5, upTo0}, {"reduction", 4, below1}}},
	{"MaskErrorFor", func(a []float64) (float64, error) {
		return plain(MaskErrorFor(length(a[0]), ratio(a[1]), ratio(a[2])))
	}, []tried{{"wafer_error", 1e-9, nil}, {"MEEF", 1.5, upTo0}, {"reduction", 4, below1}}},
	{"Shadow", func(a []float64) (float64, error) {
		return plain(Shadow(length(a[0]), units.Angle(a[1]), ratio(a[2]), count(a[3])))
	}, []tried{{"absorber_thickness", 6e-8, below0}, {"chief_ray", 0.1, noSlant}, {"reduction", 4, below1}, {"passes", 2, []float64{0, -1, 1.5, 3}}}},
	{"MaskAngleLow", func(a []float64) (float64, error) {
		return plain(MaskAngleLow(ratio(a[0]), ratio(a[1]), units.Angle(a[2])))
	}, []tried{{"NA", 0.33, notBetween}, {"reduction", 4, below1}, {"chief_ray", 0.1, append([]float64{1.5}, noSlant...)}}},
	{"MaskAngleHigh", func(a []float64) (float64, error) {
		return plain(MaskAngleHigh(ratio(a[0]), ratio(a[1]), units.Angle(a[2])))
	}, []tried{{"NA", 0.33, notBetween}, {"reduction", 4, below1}, {"chief_ray", 0.1, append([]float64{1.5}, noSlant...)}}},
	{"Expansion", func(a []float64) (float64, error) {
		return plain(Expansion(length(a[0]), units.ExpansionCoefficient(a[1]), units.TemperatureDifference(a[2])))
	}, []tried{{"length", 0.1, below0}, {"cte", 1e-6, nil}, {"rise", 1, nil}}},
	{
		"SiliconCTE", func(a []float64) (float64, error) { return plain(SiliconCTE(units.Temperature(a[0]))) },
		[]tried{{"temperature", 295, []float64{-1, 0, 119, 1501}}},
	},
	{"WaferHeating", func(a []float64) (float64, error) {
		return doubted(WaferHeating(units.Fluence(a[0]), ratio(a[1]), length(a[2])))
	}, []tried{{"dose", 300, below0}, {"absorbed", 0.7, outside01}, {"thickness", 1e-3, upTo0}}},
	{"RadiativeTemperature", func(a []float64) (float64, error) {
		return plain(RadiativeTemperature(units.Irradiance(a[0]), ratio(a[1]), count(a[2]), units.Temperature(a[3])))
	}, []tried{{"absorbed_flux", 5e4, below0}, {"emissivity", 0.4, []float64{-0.1, 0, 1.1}}, {"faces", 2, []float64{0, -1, 1.5, 3}}, {"surroundings", 293, below0}}},
}

var (
	below0         = []float64{-1e-30, -1}
	upTo0          = []float64{0, -1}
	below1         = []float64{0, -4, 0.25}
	outside01      = []float64{-0.1, 1.1, 70}
	notBetween     = []float64{-0.1, 0, 1, 1.35}
	noWhole        = []float64{-1, 2.5, 1e300}
	tooMany        = []float64{-1, 1e16}
	noSlant        = []float64{-0.1, math.Pi / 2, 6}
	limitArguments = []tried{
		{"events", 3, append([]float64{1001}, noWhole...)},
		{"trials", 1000, append([]float64{0}, noWhole...)},
		{"confidence", 0.95, notBetween},
		{"sides", 2, []float64{0, -1, 1.5, 3}},
	}
)

// word turns a number that is no index of a word into one out of range.
func word(x float64) int {
	if x != math.Trunc(x) || math.Abs(x) > 1e6 {
		return -1
	}
	return int(x)
}

func TestEveryArgumentIsChecked(t *testing.T) {
	never := []float64{math.NaN(), math.Inf(1), math.Inf(-1)}
	refused := 0
	for _, f := range refusals {
		fine := make([]float64, len(f.args))
		for i, arg := range f.args {
			fine[i] = arg.fine
		}
		if y, err := f.call(fine); err != nil || !isFinite(ratio(y)) {
			t.Errorf("%s: with arguments that are fine: %g, %v", f.function, y, err)
		}
		for i, arg := range f.args {
			for _, x := range append(append([]float64{}, never...), arg.bad...) {
				a := append([]float64{}, fine...)
				a[i] = x
				y, err := f.call(a)
				var at *ArgumentError
				if !errors.As(err, &at) || at.Argument != arg.name || at.Want == "" || y != 0 {
					t.Errorf("%s with %s = %g: got %g, error %v", f.function, arg.name, x, y, err)
				}
				refused++
			}
		}
	}
	t.Logf("%d refusals", refused)
}

// Arguments that are fine alone may leave the floating-point range together.
func TestResultsStayFinite(t *testing.T) {
	extremes := []float64{5e-324, 1e-300, 1e-9, 0.5, 1, 2, 1e9, 1e300, math.MaxFloat64}
	for _, f := range refusals {
		a := make([]float64, len(f.args))
		var walk func(i int)
		walk = func(i int) {
			if i < len(a) {
				for _, x := range extremes {
					a[i] = x
					walk(i + 1)
				}
				return
			}
			y, err := f.call(a)
			var at *ArgumentError
			if err != nil && (!errors.As(err, &at) || y != 0) || !isFinite(ratio(y)) {
				t.Errorf("%s%v: got %g, error %v", f.function, a, y, err)
			}
		}
		walk(0)
	}
}

// The table has every exported function of the files it speaks for.
func TestEveryFunctionHasARow(t *testing.T) {
	rows := map[string]bool{}
	for _, f := range refusals {
		rows[f.function] = true
	}
	for _, file := range []string{
		"absorption", "binomial", "blur", "contrast", "failure", "heating", "imaging", "latitude",
		"lineaverage", "lineedge", "mask", "meanforfailure", "normal", "poisson", "ratelimit", "shotnoise", "silicon", "yield",
	} {
		tree, err := parser.ParseFile(token.NewFileSet(), file+".go", nil, parser.SkipObjectResolution)
		if err != nil {
			t.Fatal(err)
		}
		for _, d := range tree.Decls {
			if f, ok := d.(*ast.FuncDecl); ok && f.Recv == nil && f.Name.IsExported() && !rows[f.Name.Name] {
				t.Errorf("%s.go: %s has no row", file, f.Name.Name)
			}
		}
	}
}
