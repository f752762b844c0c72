package repl

import (
	"context"
	"errors"
	"maps"
	"math"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// preamble defines what the examples of chain functions use.
const preamble = `chain pair
  at IF
  mirrors x2: 66 %
  at WAFER
end
stack std
  bilayer x50: Si 4.17 nm, Mo 2.78 nm
  substrate: Si
end`

// prepared is a fresh session behind the preamble.
func prepared(t *testing.T) *Session {
	t.Helper()
	s := NewSession(Config{})
	for line := range strings.Lines(preamble) {
		if r := s.Feed(context.Background(), strings.TrimRight(line, "\n")); r.Err != nil {
			t.Fatalf("preamble: %v", r.Err)
		}
	}
	return s
}

// answered is the value that a statement prints.
func answered(t *testing.T, s *Session, statement string) *Value {
	t.Helper()
	r := s.Feed(context.Background(), statement)
	if r.Err != nil || len(r.Results) != 1 {
		t.Fatalf("%s: %d results, error %v", statement, len(r.Results), r.Err)
	}
	v, ok := r.Results[0].(*Value)
	if !ok {
		t.Fatalf("%s: prints a %T, not a value", statement, r.Results[0])
	}
	if math.IsNaN(v.SI) || math.IsInf(v.SI, 0) {
		t.Fatalf("%s: %g is not finite", statement, v.SI)
	}
	return v
}

// inOrderOfName lists the catalogue.
func inOrderOfName() []*program.Function {
	rows := catalogue()
	var list []*program.Function
	for _, name := range slices.Sorted(maps.Keys(rows)) {
		list = append(list, rows[name])
	}
	return list
}

// mathematical says whether a row is one of the functions of any dimension,
// whose formula and source are mathematics.
func mathematical(f *program.Function) bool { return f.Section == "Mathematics" }

// callIn finds the call of a row in its example: all of it, or an argument of
// another call.
func callIn(f *program.Function) *syntax.Call {
	st, bad := syntax.Parse(f.Example)
	if bad != nil {
		return nil
	}
	var found *syntax.Call
	if show, ok := st.Do.(*syntax.Show); ok {
		syntax.Each(show.X, func(x syntax.Expr) {
			if call, ok := x.(*syntax.Call); ok && call.Func == f.Name {
				found = call
			}
		})
	}
	return found
}

// arguments reads the example of a row: what it writes for each parameter, ""
// where a default stands.
func arguments(t *testing.T, f *program.Function) []string {
	t.Helper()
	call := callIn(f)
	if call == nil {
		t.Fatalf("the example of %s has no call of it: %s", f.Name, f.Example)
	}
	list := make([]string, len(f.Params))
	for i, a := range call.Args {
		if a.Label != "" {
			i = slices.IndexFunc(f.Params, func(p program.Param) bool { return p.Name == a.Label })
		}
		list[i] = f.Example[a.X.Span().Start:a.X.Span().End]
	}
	return list
}

// named writes the example of a row with every argument by its name, those that
// are "" left out.
func named(f *program.Function, args []string) string {
	var parts []string
	for i, p := range f.Params {
		if args[i] != "" {
			parts = append(parts, p.Name+" = "+args[i])
		}
	}
	at := callIn(f).Where
	return f.Example[:at.Start] + f.Name + "(" + strings.Join(parts, ", ") + ")" + f.Example[at.End:]
}

// with replaces one argument.
func with(args []string, i int, text string) []string {
	args = slices.Clone(args)
	args[i] = text
	return args
}

func TestRowsSayAll(t *testing.T) {
	for _, f := range inOrderOfName() {
		for what, text := range map[string]string{"summary": f.Summary, "section": f.Section, "example": f.Example} {
			if text == "" {
				t.Errorf("%s has no %s", f.Name, what)
			}
		}
		if !mathematical(f) && (f.Formula == "" || f.Source == "" || f.Valid == "") {
			t.Errorf("%s lacks its formula, its range or its source", f.Name)
		}
		for _, p := range f.Params {
			if p.Name == "" {
				t.Errorf("%s has an argument without a name", f.Name)
			}
			if (len(p.Words) > 0 || slices.Contains(conventions, p.Name)) && p.Doc == "" {
				t.Errorf("%s does not say what %s means", f.Name, p.Name)
			}
		}
		if u := f.Result.Unit; u != "" {
			if parsed, err := units.Standard().Parse(u); err != nil || parsed.Dimension() != f.Result.Dim {
				t.Errorf("%s: its answer cannot be stated in %s", f.Name, u)
			}
		}
	}
}

// conventions are arguments that people mean in more than one way: their row
// says which is meant, also where one is missing. The first six have no default.
var conventions = []string{
	"of", "sigmas", "tone", "model", "sides", "passes", "attenuation", "half_pitch", "pitch",
	"sigma", "roughness", "reduction", "k2", "confidence", "chief_ray",
}

func TestRowExamples(t *testing.T) {
	for _, f := range inOrderOfName() {
		t.Run(f.Name, func(t *testing.T) {
			v := answered(t, prepared(t), f.Example)
			if v.Text(DefaultDigits) == "" {
				t.Error("the answer prints nothing")
			}
			if f.Variadic() {
				return
			}
			call := named(f, arguments(t, f))
			near.Rel(t, call, answered(t, prepared(t), call).SI, v.SI, 0)
		})
	}
}

func TestRowDefaults(t *testing.T) {
	for _, f := range inOrderOfName() {
		if f.Variadic() {
			continue
		}
		args := arguments(t, f)
		optional := false
		for i, p := range f.Params {
			call := named(f, with(args, i, ""))
			r := prepared(t).Feed(context.Background(), call)
			switch {
			case p.Default != "":
				optional = true
				if r.Err != nil {
					t.Errorf("%s: %v", call, r.Err)
				}
			case optional:
				t.Errorf("%s: the required %s stands behind an optional argument", f.Name, p.Name)
			case r.Err == nil:
				t.Errorf("%s does without %s", f.Name, p.Name)
			default:
				refusal := r.Err.(*Refusal)
				if want := f.Name + " needs its argument " + p.Name; refusal.Message() != want {
					t.Errorf("%s: %q, want %q", call, refusal.Message(), want)
				}
				if p.Doc != "" && refusal.WayOn() != p.Name+": "+p.Doc || strings.Contains(refusal.WayOn(), "\n") {
					t.Errorf("%s: the way on is %q", call, refusal.WayOn())
				}
			}
		}
	}
}

func TestNoDefaultHidesAConvention(t *testing.T) {
	seen := map[string]bool{}
	for _, f := range inOrderOfName() {
		for _, p := range f.Params {
			seen[p.Name] = true
			if slices.Contains(conventions[:6], p.Name) && p.Default != "" {
				t.Errorf("%s: %s has the default %q", f.Name, p.Name, p.Default)
			}
		}
	}
	for _, name := range conventions {
		if !seen[name] {
			t.Errorf("no row has an argument %s", name)
		}
	}
}

func TestRowHelp(t *testing.T) {
	s := NewSession(Config{})
	for _, f := range inOrderOfName() {
		lines := s.Help(f.Name)
		text := strings.Join(lines, "\n")
		if len(lines) < 4 || !strings.HasPrefix(text, f.Name+"(") {
			t.Errorf("help %s: %q", f.Name, text)
		}
		for _, l := range lines {
			if utf8.RuneCountInString(l) > helpWidth {
				t.Errorf("help %s takes %d columns: %s", f.Name, utf8.RuneCountInString(l), l)
			}
		}
		flat := strings.Join(strings.Fields(text), " ")
		for _, p := range f.Params {
			if len(p.Words) > 0 && !strings.Contains(flat, strings.Join(p.Words, " or ")) {
				t.Errorf("help %s does not list the words of %s", f.Name, p.Name)
			}
			if p.Default != "" && !strings.Contains(flat, "default "+p.Default) {
				t.Errorf("help %s does not show the default of %s", f.Name, p.Name)
			}
		}
		for _, part := range []string{f.Example, f.Formula, f.Valid, f.Source, f.Caution} {
			if !strings.Contains(flat, strings.Join(strings.Fields(part), " ")) {
				t.Errorf("help %s does not show %q", f.Name, part)
			}
		}
	}
}

func TestRowCautions(t *testing.T) {
	want := []string{"cooling_flow", "energy_per_pass", "gas_column", "laser_power", "pulse_energy", "radiative_temperature", "source_power", "wafer_heating"}
	var have []string
	for _, f := range inOrderOfName() {
		if f.Caution != "" {
			have = append(have, f.Name)
		}
	}
	if !slices.Equal(have, want) {
		t.Errorf("rows with a caution: %v, want %v", have, want)
	}
}

// TestRowsRefuseOtherDimensions gives each argument a quantity of no use, and
// each list of words another word.
func TestRowsRefuseOtherDimensions(t *testing.T) {
	for _, f := range inOrderOfName() {
		if mathematical(f) {
			continue
		}
		args := arguments(t, f)
		for i, p := range f.Params {
			call := named(f, with(args, i, "7 kg*m^5"))
			r := prepared(t).Feed(context.Background(), call)
			if r.Err == nil {
				t.Errorf("%s is not refused", call)
				continue
			}
			if msg := r.Err.(*Refusal).Message(); len(p.Words) > 0 && !strings.Contains(msg, strings.Join(p.Words, ", ")) {
				t.Errorf("%s: %q does not list the words", call, msg)
			}
		}
	}
}

// TestRowsAtTheEdge gives each argument extreme numbers in turn. Some are
// refused and some are not; none makes a number that is none.
func TestRowsAtTheEdge(t *testing.T) {
	sys := units.Standard()
	for _, f := range inOrderOfName() {
		if mathematical(f) || f.Build != nil {
			continue
		}
		args := arguments(t, f)
		for i, p := range f.Params {
			if len(p.Words) > 0 {
				continue
			}
			unit := sys.UnitText(p.Dim)
			for _, number := range []string{"-1e300", "-1", "0", "1e-300", "0.999999999", "1", "2", "1e9", "1e16", "1e300"} {
				call := named(f, with(args, i, strings.TrimSpace(number+" "+unit)))
				r := prepared(t).Feed(context.Background(), call)
				if r.Err == nil {
					answered(t, prepared(t), call)
					continue
				}
				if msg := r.Err.(*Refusal).Message(); msg == "" || strings.Contains(msg, "NaN") {
					t.Errorf("%s: %q", call, msg)
				}
				var fault *program.ArgumentFault
				known := func(p program.Param) bool { return p.Name == fault.Param }
				if errors.As(r.Err, &fault) && catalogue()[fault.Param] == nil && !slices.ContainsFunc(f.Params, known) {
					t.Errorf("%s: the function calls its argument %s, the row does not", call, fault.Param)
				}
			}
		}
	}
}

// TestRowRefusals holds one call out of range for each row that is no
// mathematics: call = what the refusal says, … for what lies between.
func TestRowRefusals(t *testing.T) {
	refused := map[string]bool{}
	for line := range strings.Lines(strings.TrimSpace(outOfRange)) {
		end := strings.LastIndex(line, ") = ") + 1
		call, want := line[:end], strings.TrimSpace(line[end+3:])
		r := prepared(t).Feed(context.Background(), call)
		if r.Err == nil {
			t.Errorf("%s is not refused", call)
			continue
		}
		msg := r.Err.(*Refusal).Message()
		for _, part := range strings.Split(want, " … ") {
			if !strings.Contains(msg, part) {
				t.Errorf("%s: %q, want %q", call, msg, want)
			}
		}
		name, _, _ := strings.Cut(call, "(")
		refused[name] = true
	}
	for _, f := range inOrderOfName() {
		if !mathematical(f) && !refused[f.Name] {
			t.Errorf("no call of %s out of its range is tried", f.Name)
		}
	}
}

const outOfRange = `
photon_energy(0 nm) = wavelength is … it must be greater than 0
photon_wavelength(-92 eV) = energy is … it must be greater than 0
photon_density(-30 mJ/cm^2) = dose is … it must be 0 or greater
photon_count(30 mJ/cm^2, 0 nm^2) = area is … it must be greater than 0
photon_rate(-1 W) = power is … it must be 0 or greater
dose_of(-20 photon/nm^2) = photons_per_area is … it must be 0 or greater
hole_area(0 nm) = diameter is … it must be greater than 0
rectangle_area(26 mm, -33 mm) = height is … it must be greater than 0
ellipse_area(0 nm, 30 nm) = a is … it must be greater than 0
bragg_period(13.5 nm, 90 deg) = angle is … it must be at least 0 and less than 90°, from the normal
bragg_wavelength(7 nm, order = 1.5) = order is … it must be a whole number, at least 1
debye_waller(-0.3 nm, 13.5 nm) = roughness is … it must be 0 or greater
scatter(0.1 nm, mirrors = 5.5) = mirrors is … it must be a whole number between 0 and 9e15
napierian(-5 /µm) = decadic is … it must be 0 or greater
decadic(-5 /µm) = napierian is … it must be 0 or greater
transmission(pair, IF, NOWHERE) = NOWHERE is no plane that is known here
carry(250 W, pair, WAFER) = 250 W stands at no single plane to be carried from
source_power(34 mJ/cm^2, 400 wafer/h, 96 field/wafer, 8.58 cm^2/field, 9.5 s/wafer, 0.9 %) = throughput is … since the overhead alone takes
collected_fraction(7 sr) = solid_angle is … it must be greater than 0 and at most 2π sr
laser_power(250 W at IF, 55, 5 sr, 41 %, 90 %) = conversion_efficiency is … it must be greater than 0 and at most 1
pulse_energy(250 W, 0 pulse/s) = repetition is … it must be greater than 0
collector_loss(0.17 %/Gpulse, 700 Gpulse, linear) = pulses is … after which the linear model leaves nothing
collector_life_average(0.17 %/Gpulse, 60 Gpulse, quadratic) = model is one of the words linear, exponential
etendue(26 mm, 2 mm, 1) = NA is … it must be greater than 0 and less than 1
energy_per_pass(1310 kW, 700 kW, 0, 136 wafer/h) = busy is … it must be greater than 0 and at most 1
cooling_flow(1 MW, 0 K) = rise is … it must be greater than 0
scan_speed(2 W, 0 mJ/cm^2, 26 mm) = dose is … it must be greater than 0
scan_dose(2 W, 0 mm/s, 26 mm) = speed is … it must be greater than 0
field_time(33 mm, 2 mm, 250 mm/s, 0 m/s^2, 20 ms/field) = acceleration is … it must be greater than 0
wafer_time(34 mJ/cm^2, 96 field/wafer, 8.58 cm^2/field, 0 W, 9.5 s/wafer) = power is … it must be greater than 0
throughput(34 mJ/cm^2, 96 field/wafer, 8.58 cm^2/field, 0 W, 9.5 s/wafer) = power is … it must be greater than 0
complete_fields(26 mm, 33 mm, 300 mm, 150 mm) = edge is … less than half the diameter
touched_fields_least(0 mm, 33 mm) = width is … it must be greater than 0
touched_fields_most(1 µm, 1 µm) = width is … at most 1e5 are counted
pulses_per_point(50 kpulse/s, 2 mm, 0 mm/s) = speed is … it must be greater than 0
dose_noise(3 %, 400 pulse, 1) = correlation is … it must be greater than -1 and less than 1
mask_dose(30 mJ/cm^2, 4, 4, 120 %) = transmission is … it must be greater than 0 and at most 1
absorbed_fraction(-5 /µm, 30 nm) = attenuation is … it must be 0 or greater
absorbed_photons(30 mJ/cm^2, 5 /µm, -30 nm, 400 nm^2) = thickness is … it must be 0 or greater
absorbed_energy_density(-30 mJ/cm^2, 5 /µm) = dose is … it must be 0 or greater
shot_noise(0) = count is … it must be greater than 0
yield_noise(892, 0, 2.5) = mean is … it must be greater than 0
edge_roughness(16 nm, 0, 120) = NILS is … it must be greater than 0
lwr_of_ler(1.2 nm, 1.2) = correlation is … it must be between -1 and 1
ler_of_lwr(1.7 nm, 1) = correlation is … it must be at least -1 and less than 1
dose_for_roughness(2 nm, 0 nm, 34 mJ/cm^2) = target is … it must be greater than 0
z_factor(16 nm, 3.6 nm, 34 mJ/cm^2, LER, 2) = sigmas is … it must be 1 or 3
line_average(2.5 nm, 0 nm, 500 nm) = correlation_length is … it must be greater than 0
resist_contrast(12 mJ/cm^2, 8 mJ/cm^2, positive) = dose_end is … it must be greater than dose_half for a positive resist
missing_probability(-1, 0.5) = mean is … it must be between 0 and 9e15
log10_missing_probability(0, 0.5) = mean is … it must be greater than 0
merging_probability(200, -1.5) = threshold is … it must be 0 or greater
log10_merging_probability(1e16, 1.5) = mean is … it must be between 0 and 9e15
mean_for_failure(1, 1e-10) = threshold is … it must be between 0 and 0.999
poisson_at_most(2.5, 5) = count is … it must be a whole number between 0 and 9e15
poisson_at_least(3, -5) = mean is … it must be between 0 and 9e15
binomial_at_least(11, 10, 0.5) = count is … it must be at most the number of trials
normal_above(1e200 * 1e200) = the result is not a finite number
normal_quantile(1) = p is … it must be greater than 0 and less than 1
failures(1.2, 2e9) = probability is … it must be between 0 and 1
no_failure(-0.1, 2e9) = probability is … it must be between 0 and 1
yield_of(-0.1 /cm^2, 80 mm^2) = defect_density is … it must be 0 or greater
rate_limit_low(30, 20, 95 %, 2) = events is … it must be at most the number of trials
rate_limit_high(0, 20000, 95 %, 3) = sides is … it must be 1 or 2
half_pitch(0.4, 1.1) = NA is … it must be greater than 0 and less than 1
k1(0 nm, 0.33) = half_pitch is … it must be greater than 0
depth_of_focus(0.33, 0) = k2 is … it must be greater than 0
depth_of_focus_exact(1) = NA is … it must be greater than 0 and less than 1
nils(-0.14 /nm, 16 nm) = slope is … it must be 0 or greater
two_beam_nils(120 %) = contrast is … it must be between 0 and 1
cd_shift(16 nm, 2.2, 300 %) = dose_error is … it must be between -1 and 1
exposure_latitude(-2.2) = NILS is … it must be 0 or greater
blur_contrast(5 nm, 0 nm) = pitch is … it must be greater than 0
sigma_of_fwhm(-12 nm) = x is … it must be 0 or greater
fwhm_of_sigma(-5 nm) = x is … it must be 0 or greater
flare_shift(16 nm, 2.2, 3.5 %, 60 %, 0) = edge_intensity is … it must be greater than 0
wafer_error_of_mask(1.5 nm, 1.8, 1/4) = reduction is … it must be 1 or greater
mask_error_for(0.5 nm, 0, 4) = MEEF is … it must be greater than 0
shadow(60 nm, 6, 4, 2) = chief_ray is … it must be 0 or greater and less than 90 deg
mask_angle_low(0.33, 0.25, 6 deg) = reduction is … it must be 1 or greater
mask_angle_high(0.33, 1, 80 deg) = chief_ray is … it must be less than 90 deg by more than asin(NA/reduction)
expansion(-36 mm, 0.5 ppm/K, 0.5 K) = length is … it must be 0 or greater
silicon_cte(-200 degC) = temperature is … it must be between 120 K and 1500 K
wafer_heating(30 mJ/cm^2, absorbed = 120 %) = absorbed is … it must be between 0 and 1
radiative_temperature(3 W/cm^2, 0) = emissivity is … it must be greater than 0 and at most 1
delta(Si, 43 nm) = wavelength is … where delta of Si is tabulated
beta(Si, 60 nm) = wavelength is … where beta of Si is tabulated
attenuation(Si, 1 nm) = wavelength is … where beta of Si is tabulated
penetration_depth(Si, 0 nm) = wavelength is … it must be greater than 0
film(std, 5 nm) = std is no material
gas_column(h2, 5 Pa, 2 m) = element symbols start with a capital
reflectivity(std, 13.5 nm, 90 deg) = angle is … less than 90°
transmittance(std) = the light ends in the substrate
peak_reflectivity(std, 0 deg, 193 nm) = where delta of Si is tabulated
peak_wavelength(std, 91 deg) = angle is … less than 90°
bandwidth(std, 0 deg, 0 nm) = near is 0 m
curve({13 nm, 14 nm}, {60 %, 64 %}, 15 nm) = x is 15 nm; the table runs from 13 nm to 14 nm
rectangular(2 nm, 1 nm) = the lower limit is not below the upper one
triangular(2 nm, 1 nm) = the lower limit is not below the upper one
normal(3 W, -0.1 W) = a standard uncertainty is not negative
`

// TestCatalogueStands holds the names that the language promises.
func TestCatalogueStands(t *testing.T) {
	rows := catalogue()
	promised := strings.Fields(`
		photon_energy photon_wavelength photon_density photon_count photon_rate dose_of
		hole_area rectangle_area ellipse_area
		bragg_period bragg_wavelength napierian decadic debye_waller scatter
		transmission carry
		source_power collected_fraction laser_power pulse_energy collector_loss collector_life_average
		etendue energy_per_pass cooling_flow
		scan_speed scan_dose field_time wafer_time throughput complete_fields touched_fields_least
		touched_fields_most pulses_per_point dose_noise mask_dose
		absorbed_fraction absorbed_photons absorbed_energy_density shot_noise yield_noise edge_roughness
		lwr_of_ler ler_of_lwr dose_for_roughness z_factor line_average
		missing_probability merging_probability log10_missing_probability log10_merging_probability
		mean_for_failure poisson_at_most poisson_at_least binomial_at_least normal_above normal_quantile
		failures no_failure yield_of rate_limit_low rate_limit_high resist_contrast
		half_pitch k1 depth_of_focus depth_of_focus_exact nils two_beam_nils cd_shift exposure_latitude
		blur_contrast sigma_of_fwhm fwhm_of_sigma flare_shift
		wafer_error_of_mask mask_error_for shadow mask_angle_low mask_angle_high expansion silicon_cte
		wafer_heating radiative_temperature
		rectangular triangular normal
		delta beta attenuation penetration_depth film gas_column reflectivity transmittance
		peak_reflectivity peak_wavelength bandwidth curve`)
	for _, name := range promised {
		if rows[name] == nil {
			t.Errorf("%s is not there", name)
		}
	}
	for _, f := range inOrderOfName() {
		if !mathematical(f) && !slices.Contains(promised, f.Name) {
			t.Errorf("%s is promised nowhere", f.Name)
		}
	}
}

// TestPublishedThroughTheLanguage asks the outside's values in the language,
// to the last digit that is published: statement = number in the stated unit.
func TestPublishedThroughTheLanguage(t *testing.T) {
	for _, c := range []struct {
		statement string
		want, off float64
		source    string
	}{
		{"30 mJ/cm^2 * hole_area(300 mm) [J]", 21.2, 0.05, "arithmetic"},
		{"wafer_heating(30 mJ/cm^2)", 0.2367, 5e-5, "arithmetic; c = 0.702 J/(g K), ρ = 2.33 g/cm³ (handbook, from memory)"},
		{"10 nm / (36 mm * 0.5 ppm/K) [K]", 0.5556, 5e-5, "published exercise on the expansion of quartz"},
		{"expansion(36 mm, 0.5 ppm/K, 0.5556 K) [nm]", 10.00, 5e-3, "the same, the other way"},
		{"silicon_cte(295.15 K) [1/K]", 2.527e-6, 5e-10, "Okada & Tokumaru, J. Appl. Phys. 56, 314 (1984)"},
		{"depth_of_focus(0.33, 1) [nm]", 123.97, 5e-3, "Lin, JM3 1, 7 (2002), from memory"},
		{"depth_of_focus_exact(0.33) [nm]", 120.49, 5e-3, "the same"},
		{"absorbed_fraction(5 /µm, 30 nm) [%]", 13.929, 5e-4, "arithmetic"},
		{"absorbed_photons(30 mJ/cm^2, 5 /µm, 30 nm, 1 nm^2)", 2.840, 5e-4, "arithmetic, exact SI constants"},
		{"poisson_at_most(0, 5)", 0.0067, 5e-5, "any table of the Poisson distribution"},
		{"poisson_at_most(1, 5) - poisson_at_most(0, 5)", 0.0337, 5e-5, "the same"},
		{"poisson_at_most(2, 5) - poisson_at_most(1, 5)", 0.0842, 5e-5, "the same"},
		{"poisson_at_most(3, 5) - poisson_at_most(2, 5)", 0.1404, 5e-5, "the same"},
		{"missing_probability(200, 0.5)", 3.72e-15, 5e-18, "exact sum"},
		{"merging_probability(200, 1.5)", 2.71e-11, 5e-14, "exact sum"},
		{"normal_above(0.5 * sqrt(200))", 7.69e-13, 5e-16, "the Gaussian that is wrong both ways"},
		{"rate_limit_high(0, 1, 95 %, 2)", 3.6889, 5e-5, "exact; Gehrels, Astrophys. J. 303, 336 (1986)"},
		{"rate_limit_high(0, 1, 95 %, 1)", 2.9957, 5e-5, "the same"},
		{"mean_for_failure(0.5, 1e-10)", 135, 0, "exact"},
		{"if(missing_probability(133, 0.5) <= 1e-10, 1, 0)", 1, 0, "exact: 133 passes"},
		{"if(missing_probability(134, 0.5) <= 1e-10, 1, 0)", 0, 0, "exact: 134 fails"},
		{"line_average(2.5 nm, 35 nm, 500 nm) [nm]", 0.9021, 5e-5, "closed form of the exponential autocorrelation"},
		{"resist_contrast(8 mJ/cm^2, 12 mJ/cm^2, positive)", 2.8394, 5e-5, "IUPAC Gold Book 09460"},
	} {
		near.Abs(t, c.statement+" ("+c.source+")", answered(t, prepared(t), c.statement).Number(), c.want, c.off)
	}
}

// A row may name the unit of its answer, where the usual one of the dimension
// would be a pressure or a bare angle.
func TestRowUnits(t *testing.T) {
	s := prepared(t)
	for statement, want := range map[string]string{
		"absorbed_energy_density(30 mJ/cm^2, 5 /µm)":                "eV/nm³",
		"e = absorbed_energy_density(30 mJ/cm^2, 5 /µm)":            "eV/nm³",
		"absorbed_energy_density(30 mJ/cm^2, 5 /µm) [J/cm^3]":       "J/cm³",
		"f [GPa] = absorbed_energy_density(30 mJ/cm^2, 5 /µm)":      "GPa",
		"1 * absorbed_energy_density(30 mJ/cm^2, 5 /µm)":            "GPa",
		"mask_angle_low(0.55, 4, 6 deg)":                            "°",
		"z_factor(16 nm, 3.6 nm, 34 mJ/cm^2, of = LER, sigmas = 3)": "mJ·nm³",
	} {
		if v := answered(t, s, statement); v.Unit.String() != want {
			t.Errorf("%s is stated in %s, want %s", statement, v.Unit, want)
		}
	}
}

// Doubts come along with the answer, for rows of the catalogue and of a host.
func TestRowWarnings(t *testing.T) {
	half := func(x units.Ratio) (euv.Warned[units.Ratio], error) {
		return euv.Warned[units.Ratio]{Value: x / 2, Warnings: []string{"halves are a model"}}, nil
	}
	s := NewSession(Config{Functions: []Function{BindWarned1(Row{Name: "half", Args: []string{"x"}}, half)}})
	for statement, want := range map[string]string{
		"half(3)":                         "halves are a model",
		"edge_roughness(16 nm, 2.2, 120)": "shot noise alone",
		"wafer_heating(30 mJ/cm^2)":       "adiabatic",
		"dose_for_roughness(2 nm, 1 nm, 30 mJ/cm^2 at WAFER)": "factor of 4",
		"z_factor(16 nm, 3.6 nm, 34 mJ/cm^2, LWR, 1)":         "LWR at 1 sigma",
		"poisson_at_most(0, 700)":                             "1e-300",
	} {
		if v := answered(t, s, statement); len(v.Warnings) != 1 || !strings.Contains(v.Warnings[0], want) {
			t.Errorf("%s: warnings %q, want one with %q", statement, v.Warnings, want)
		}
	}
	if v := answered(t, s, "dose_for_roughness(2 nm, 1.6 nm, 30 mJ/cm^2 at WAFER)"); len(v.Warnings) != 0 || v.Plane != "WAFER" {
		t.Errorf("within 2x: warnings %q, plane %q", v.Warnings, v.Plane)
	}
}

// The dose of a resist is that on the wafer.
func TestRowPlanes(t *testing.T) {
	for _, call := range []string{
		"wafer_heating(30 mJ/cm^2 at MASK)", "dose_for_roughness(2 nm, 1.6 nm, 30 mJ/cm^2 at MASK)",
		"z_factor(16 nm, 3.6 nm, 34 mJ/cm^2 at MASK, LER, 3)", "resist_contrast(8 mJ/cm^2 at MASK, 12 mJ/cm^2, positive)",
	} {
		r := prepared(t).Feed(context.Background(), call)
		if r.Err == nil || !strings.Contains(r.Err.Error(), "stands at MASK") {
			t.Errorf("%s: %v", call, r.Err)
		}
	}
}
