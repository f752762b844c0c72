package repl

import "example.com/dosewright/euv"

const mirrorSection = "Mirrors, films, gas"

// mirrorRows: the Bragg condition, roughness and the two kinds of attenuation
// coefficients; all that needs no body.
func mirrorRows() []Function {
	const section = mirrorSection
	bragg := []string{"angle = 0 deg: from the normal", "order = 1: whole number", "delta = 0: mean of 1 − n over the period"}
	return []Function{
		Bind4(Row{
			Name: "bragg_period", Section: section, Summary: "period of a multilayer that reflects a wavelength at an angle from the normal",
			Args:    append([]string{"wavelength"}, bragg...),
			Formula: "m λ = 2 d √((1 − δ)² − sin²θ)", Valid: "angle below 90°; without delta the kinematic value, which is too short",
			Source: "Bragg condition with mean refraction; twin: computed stacks of the checks", Example: "bragg_period(13.5 nm, delta = 0.03108)",
		}, euv.BraggPeriod),
		Bind4(Row{
			Name: "bragg_wavelength", Section: section, Summary: "wavelength that a multilayer of a period reflects",
			Args:    append([]string{"period"}, bragg...),
			Formula: "m λ = 2 d √((1 − δ)² − sin²θ)", Valid: "as bragg_period", Source: "as bragg_period",
			Example: "bragg_wavelength(6.9665 nm, delta = 0.03108)",
		}, euv.BraggWavelength),
		Bind3(Row{
			Name: "debye_waller", Section: section, Summary: "factor by which roughness lowers the specular intensity of a mirror",
			Args:    []string{"roughness: rms, one sigma", "wavelength", "angle = 0 deg: from the normal, not grazing"},
			Formula: "exp(−(4π σ cos θ / λ)²)", Valid: "heights with a Gaussian distribution, as at one surface", Source: "factor of Debye and Waller; Névot & Croce, Rev. Phys. Appl. 15, 761 (1980), without refraction (from memory)",
			Example: "debye_waller(0.3 nm, 13.5 nm)",
		}, euv.DebyeWaller),
		Bind3(Row{
			Name: "scatter", Section: section, Summary: "part of the light that a train of mirrors scatters out of the specular beam",
			Args:    []string{"roughness: rms, one sigma, within the band of spatial frequencies that scatter out", "wavelength = 13.5 nm", "mirrors = 1: whole number"},
			Formula: "1 − exp(−M (4π σ / λ)²)", Valid: "near-normal incidence, equal mirrors", Source: "Harvey et al., Opt. Eng. 51, 013402 (2012) (from memory)",
			Example: "scatter(0.12 nm, mirrors = 6) [%]",
		}, euv.Scatter),
		Bind1(Row{
			Name: "napierian", Section: section, Summary: "Napierian attenuation coefficient of a decadic one",
			Args: []string{"decadic: a of intensity 10^(−a x)"}, Formula: "α = a ln 10", Valid: "a ≥ 0", Source: "IUPAC Gold Book, attenuation coefficient",
			Example: "napierian(2.2 /µm)",
		}, euv.Napierian),
		Bind1(Row{
			Name: "decadic", Section: section, Summary: "decadic attenuation coefficient of a Napierian one",
			Args: []string{"napierian: α of intensity exp(−α x)"}, Formula: "a = α / ln 10", Valid: "α ≥ 0", Source: "IUPAC Gold Book, attenuation coefficient",
			Example: "decadic(5 /µm)",
		}, euv.Decadic),
	}
}
