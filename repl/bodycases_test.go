package repl

import (
	"fmt"
	"strconv"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// figures are the inputs or the outputs of a case.
type figures map[string]any

func (f figures) number(name string) float64 { return f[name].(float64) }

func (f figures) list(name string) []float64 {
	var out []float64
	for _, x := range f[name].([]any) {
		out = append(out, x.(float64))
	}
	return out
}

// sub are figures inside figures.
func (f figures) sub(name string) figures { return figures(f[name].(map[string]any)) }

// lightCase is one of the cases of testdata/optics-cases.json, which an
// independent implementation computed from the same tables; see its meta.
type lightCase struct {
	ID      int
	Group   string
	Inputs  figures
	Outputs figures

	t testing.TB
	s *Session
}

// decimal writes a number as the language reads it.
func decimal(x float64) string { return strconv.FormatFloat(x, 'f', -1, 64) }

func nm(x float64) string { return decimal(x) + " nm" }

func deg(x float64) string { return decimal(x) + " deg" }

// si is the value of a statement in SI units.
func (c *lightCase) si(format string, args ...any) float64 {
	c.t.Helper()
	return valued(c.t, c.s, fmt.Sprintf(format, args...)).SI
}

// abs compares a statement's value with an output, at an absolute tolerance.
func (c *lightCase) abs(want, tolerance float64, format string, args ...any) {
	c.t.Helper()
	near.Abs(c.t, fmt.Sprintf("case %d: "+format, append([]any{c.ID}, args...)...), c.si(format, args...), want, tolerance)
}

func (c *lightCase) rel(want, tolerance float64, format string, args ...any) {
	c.t.Helper()
	near.Rel(c.t, fmt.Sprintf("case %d: "+format, append([]any{c.ID}, args...)...), c.si(format, args...), want, tolerance)
}

// material says a material m.
func (c *lightCase) material() {
	spoken(c.t, c.s, fmt.Sprintf("material m = %s %s g/cm^3", c.Inputs["formula"], decimal(c.Inputs.number("density_g_cm3"))))
}

// mirror says a stack of a case, with more lines on top; the densities of the
// cases are those of the solids.
func (c *lightCase) mirror(in figures, name string, top ...string) {
	c.t.Helper()
	lines := append([]string{"stack " + name}, top...)
	if cap, ok := in["cap"].(map[string]any); ok {
		lines = append(lines, "cap: Ru "+nm(figures(cap).number("thickness_nm")))
	}
	if order, ok := in["period_from_vacuum"].([]any); ok {
		var layers []string
		for _, l := range order {
			layers = append(layers, l.([]any)[0].(string)+" "+nm(l.([]any)[1].(float64)))
		}
		lines = append(lines, fmt.Sprintf("period x%g: %s", in.number("periods"), strings.Join(layers, ", ")))
	} else {
		lines = append(lines, fmt.Sprintf("bilayer x%g: Si %s, Mo %s", in.number("bilayers"), nm(in.number("d_Si_nm")), nm(in.number("d_Mo_nm"))))
	}
	if sigma := in.number("sigma_nm_every_interface"); sigma > 0 {
		lines = append(lines, "roughness: "+nm(sigma))
	}
	spoken(c.t, c.s, append(lines, "substrate: Si", "end")...)
}

func TestOpticsCasesThroughTheLanguage(t *testing.T) {
	var file struct{ Cases []*lightCase }
	readTestdata(t, "optics-cases.json", &file)
	asked := 0
	for _, c := range file.Cases {
		ask := c.question()
		if ask == nil {
			continue
		}
		asked++
		t.Run(fmt.Sprint(c.ID), func(t *testing.T) {
			c.t, c.s = t, NewSession(Config{})
			ask(c)
		})
	}
	if asked < 42 {
		t.Errorf("%d cases were asked", asked)
	}
}

// question chooses how a case is put in the language; nil for cases about what
// the language has no word for: amplitudes, given indices, gas densities.
func (c *lightCase) question() func(*lightCase) {
	group := c.Group[0]
	switch {
	case c.ID == 31:
		return (*lightCase).thinFilm
	case c.ID == 32:
		return (*lightCase).noFactor
	case c.ID == 43:
		return (*lightCase).freeFilm
	case c.ID == 71:
		return (*lightCase).angles
	case c.ID == 72:
		return (*lightCase).bilayers
	case c.ID >= 80 && c.ID <= 82:
		return (*lightCase).bestPeriod
	case c.ID == 86 || c.ID == 87 || group == 'D' && c.ID < 70:
		return (*lightCase).peaks
	case c.ID == 95 || c.ID == 96:
		return (*lightCase).grazing
	case c.ID == 101 || c.ID == 102:
		return (*lightCase).absorber
	case c.ID == 106:
		return (*lightCase).thickTin
	case group == 'A':
		return (*lightCase).constants
	case group == 'B':
		return (*lightCase).film
	case c.ID == 46 || c.ID == 47:
		return (*lightCase).gas
	case group == 'E':
		return (*lightCase).train
	}
	return nil
}

func (c *lightCase) constants() {
	c.material()
	for _, l := range c.Inputs.list("wavelength_nm") {
		want := c.Outputs.sub(fmt.Sprintf("%g nm", l))
		c.rel(want.number("delta"), 1e-8, "delta(m, %s)", nm(l))
		c.rel(want.number("beta"), 1e-8, "beta(m, %s)", nm(l))
		c.rel(want.number("mu_per_um")*1e6, 1e-8, "attenuation(m, %s)", nm(l))
		c.rel(want.number("attenuation_length_nm")*1e-9, 1e-8, "penetration_depth(m, %s)", nm(l))
	}
}

func (c *lightCase) thinFilm() {
	c.material()
	c.rel(c.Outputs.number("delta"), 1e-8, "delta(m, 13.5 nm)")
	c.rel(c.Outputs.number("beta"), 1e-8, "beta(m, 13.5 nm)")
}

func (c *lightCase) noFactor() {
	refused(c.t, c.s, "delta(Si, 43 nm)", "wavelength is 43 nm; it must be between 4.1223 nm and 42.315 nm, where delta of Si is tabulated", "help delta shows the range of each argument")
	c.rel(c.Outputs.number("beta"), 1e-8, "beta(Si, 43 nm)")
}

func (c *lightCase) film() {
	c.material()
	d := nm(c.Inputs.number("thickness_nm"))
	c.rel(c.Outputs.number("mu_per_um")*1e6, 1e-8, "attenuation(m)")
	c.rel(c.Outputs.number("T_single_pass"), 1e-8, "transmittance(film(m, %s))", d)
	c.rel(c.Outputs.number("T_double_pass"), 1e-8, "transmittance(film(m, %s))^2", d)
	c.rel(c.Outputs.number("absorbed_fraction"), 1e-8, "absorbed_fraction(attenuation(m), %s)", d)
}

// freeFilm is a stack without a substrate; the language asks for the mean of
// both polarizations when something passes.
func (c *lightCase) freeFilm() {
	c.material()
	spoken(c.t, c.s, "stack free", "film: m "+nm(c.Inputs.number("thickness_nm")), "end")
	for _, angle := range c.Inputs.list("angles_deg") {
		s, p := c.Outputs.sub(fmt.Sprintf("%g deg s", angle)), c.Outputs.sub(fmt.Sprintf("%g deg p", angle))
		c.abs(s.number("R"), 1e-9, "reflectivity(free, 13.5 nm, %s, s)", deg(angle))
		c.abs(p.number("R"), 1e-9, "reflectivity(free, 13.5 nm, %s, p)", deg(angle))
		c.abs((s.number("T")+p.number("T"))/2, 1e-9, "transmittance(free, 13.5 nm, %s)", deg(angle))
	}
}

func (c *lightCase) gas() {
	path := decimal(c.Inputs.number("pressure_path_Pa_m")) + " m"
	c.rel(c.Outputs.number("transmission"), 1e-8, "transmittance(gas_column(H2, 1 Pa, %s))", path)
	sigma := strconv.FormatFloat(c.Outputs.number("cross_section_per_molecule_m2")*1e24, 'f', -1, 64) + "e-24 m^2"
	c.rel(c.Outputs.number("transmission"), 1e-8, "transmittance(gas_column(H2, 1 Pa, %s, cross_section = %s))", path, sigma)
}

func (c *lightCase) peaks() {
	for symbol, density := range c.Inputs.sub("densities_g_cm3") {
		if symbol == "B4C" || symbol == "MoSi2" {
			spoken(c.t, c.s, fmt.Sprintf("material %s = %s %s g/cm^3", symbol, symbol, decimal(density.(float64))))
		}
	}
	c.mirror(c.Inputs, "mirror")
	angle := deg(c.Inputs.number("angle_from_normal_deg"))
	for name, want := range c.Outputs {
		if at, ok := strings.CutPrefix(name, "R_at_"); ok {
			c.abs(want.(float64), 1e-8, "reflectivity(mirror, %s, %s, s)", strings.Replace(at, "_nm", " nm", 1), angle)
		}
	}
	if angle != "0 deg" {
		return // the peaks of the cases are those of s, the language has the mean
	}
	c.abs(c.Outputs.number("R_peak"), 1e-8, "peak_reflectivity(mirror)")
	c.abs(c.Outputs.number("lambda_peak_nm")*1e-9, 1e-15, "peak_wavelength(mirror)")
	c.abs(c.Outputs.number("fwhm_nm")*1e-9, 1e-15, "bandwidth(mirror)")
}

func (c *lightCase) angles() {
	c.mirror(c.Inputs, "mirror")
	for i, angle := range c.Inputs.list("angle_from_normal_deg") {
		s, p := c.Outputs.list("R_s")[i], c.Outputs.list("R_p")[i]
		c.abs(s, 1e-8, "reflectivity(mirror, 13.5 nm, %s, s)", deg(angle))
		c.abs(p, 1e-8, "reflectivity(mirror, 13.5 nm, %s, p)", deg(angle))
		c.abs((s+p)/2, 1e-8, "reflectivity(mirror, 13.5 nm, %s)", deg(angle))
	}
}

// bilayers holds the number of bilayers in a name, which is defined anew.
func (c *lightCase) bilayers() {
	spoken(c.t, c.s, "n = 50", "stack mirror", "bilayer x(n): Si "+nm(c.Inputs.number("d_Si_nm"))+", Mo "+nm(c.Inputs.number("d_Mo_nm")), "substrate: Si", "end")
	for i, n := range c.Inputs.list("bilayers") {
		spoken(c.t, c.s, "n = "+decimal(n))
		c.abs(c.Outputs.list("R_at_13.5_nm")[i], 1e-8, "reflectivity(mirror, 13.5 nm)")
		if peak, ok := c.Outputs["R_peak_12.5_to_14.5_nm"].([]any)[i].(float64); ok {
			c.abs(peak, 1e-8, "peak_reflectivity(mirror)")
		}
	}
}

func (c *lightCase) bestPeriod() {
	g := decimal(c.Inputs.number("gamma_Mo"))
	spoken(c.t, c.s, "g = "+g, "d = 6.9 nm", "stack mirror", "bilayer x50: Si ((1-g)*d), Mo (g*d)", "substrate: Si", "end",
		"mean_delta = g*delta(Mo, 13.5 nm) + (1-g)*delta(Si, 13.5 nm)")
	c.rel(c.Outputs.number("mean_delta"), 1e-8, "mean_delta")
	c.rel(c.Outputs.number("bragg_period_nm")*1e-9, 1e-8, "bragg_period(13.5 nm, delta = mean_delta)")
	best := resultOf[*Found](c.t, c.s, "maximise reflectivity(mirror, 13.5 nm) for d in 6.8 nm .. 7 nm")
	row := numbersOf(best.Rows)[0]
	near.Abs(c.t, "best period in nm", row[0], c.Outputs.number("best_period_nm"), 1e-5)
	near.Rel(c.t, "largest R", row[1], c.Outputs.number("R_max"), 1e-8)
}

func (c *lightCase) grazing() {
	c.material()
	for i, grazing := range c.Inputs.list("grazing_angle_deg") {
		for pol, name := range map[string]string{"s": "R_s", "p": "R_p"} {
			c.abs(c.Outputs.list(name)[i], 1e-8, "reflectivity(m, 13.5 nm, %s, %s, %s)", deg(90-grazing), pol, nm(c.Inputs.number("sigma_nm")))
		}
	}
}

func (c *lightCase) absorber() {
	spoken(c.t, c.s, fmt.Sprintf("material absorber = %s %s g/cm^3", c.Inputs["absorber"].([]any)[0], decimal(c.Inputs["absorber"].([]any)[1].(float64))))
	c.mirror(c.Inputs.sub("mirror"), "mirror")
	c.abs(c.Outputs.number("R_mirror"), 1e-9, "reflectivity(mirror, 13.5 nm, 6 deg, s)")
	for _, row := range c.Outputs["with_absorber"].([]any) {
		want := figures(row.(map[string]any))
		c.mirror(c.Inputs.sub("mirror"), "mask", "absorber: absorber "+nm(want.number("thickness_nm")))
		c.abs(want.number("R"), 1e-9, "reflectivity(mask, 13.5 nm, 6 deg, s)")
		c.abs(want.number("R_over_mirror"), 2e-9, "reflectivity(mask, 13.5 nm, 6 deg, s) / reflectivity(mirror, 13.5 nm, 6 deg, s)")
	}
}

func (c *lightCase) thickTin() {
	spoken(c.t, c.s, "stack plate", "all: Sn 1 mm", "end")
	c.abs(c.Outputs.number("R"), 1e-8, "reflectivity(plate, 13.5 nm)")
	c.abs(c.Outputs.number("T"), 1e-8, "transmittance(plate)")
	c.abs(c.Outputs.number("R_half_space"), 1e-8, "reflectivity(Sn, 13.5 nm)")
}

// train is a chain of equal mirrors: its mean over the band from 12.5 nm to
// 14.5 nm is the integral of the case over 2 nm.
func (c *lightCase) train() {
	c.mirror(c.Inputs, "mirror")
	for _, m := range c.Inputs.list("mirrors") {
		want := c.Outputs.sub(fmt.Sprintf("%g mirrors", m))
		for name, band := range map[string]string{"one": "", "all": "band: 13.5 nm, 2 nm"} {
			lines := []string{"chain " + name, "at IF", fmt.Sprintf("mirror x%g: reflectivity(mirror, λ)", m), "at WAFER", "end"}
			if band != "" {
				lines = append(lines[:1], append([]string{band}, lines[1:]...)...)
			}
			spoken(c.t, c.s, lines...)
		}
		c.rel(want.number("R^M_at_13.5_nm"), 1e-7, "transmission(one, IF, WAFER)")
		c.rel(want.number("integral_12.5_14.5_nm")/2, 1e-7, "transmission(all, IF, WAFER)")
		c.abs(want.number("fwhm_nm")*1e-9, 1e-15, "bandwidth(all, IF, WAFER)")
		c.abs(c.Outputs.number("lambda_peak_nm")*1e-9, 1e-14, "peak_wavelength(all, IF, WAFER)")
	}
}
