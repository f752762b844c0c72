package repl

import "example.com/dosewright/euv"

const resistSection = "Resist and stochastics"

// resistRows: what resist absorbs, how the count of it scatters, roughness and
// contrast.
func resistRows() []Function {
	const section = resistSection
	const beer = "law of Beer and Lambert (IUPAC Gold Book)"
	napierian := "attenuation: Napierian, base e; napierian(x) turns a decadic one into it"
	correlation := "correlation = 0: of the line's two edges, 1 where both move together"
	return []Function{
		Bind2(Row{
			Name: "absorbed_fraction", Section: section, Summary: "part of the incident light that a film absorbs in one crossing",
			Args: []string{napierian, "thickness"}, Formula: "1 − exp(−α t)", Valid: "no reflection at the faces", Source: beer,
			Example: "absorbed_fraction(5 /µm, 30 nm) [%]",
		}, euv.AbsorbedFraction),
		Bind5(Row{
			Name: "absorbed_photons", Section: section, Summary: "mean number of photons that a patch of resist absorbs in its thickness",
			Args:    []string{"dose: incident, not absorbed", napierian, "thickness", "area", "wavelength = 13.5 nm"},
			Formula: "D A λ / (h c) · (1 − exp(−α t))", Valid: "no reflection at the faces", Source: beer + ", photon energy h c/λ",
			Example: "absorbed_photons(30 mJ/cm^2, 5 /µm, 30 nm, hole_area(20 nm))",
		}, euv.AbsorbedPhotons),
		Bind2(Row{
			Name: "absorbed_energy_density", Section: section, Summary: "energy that resist absorbs per volume at its top",
			Args: []string{"dose: incident, not absorbed", napierian}, Unit: "eV/nm^3", Formula: "D α", Valid: "at the top, where the light is not yet weakened", Source: beer + ", its derivative at the surface",
			Example: "absorbed_energy_density(30 mJ/cm^2, 5 /µm)",
		}, euv.AbsorbedEnergyDensity),
		Bind1(Row{
			Name: "shot_noise", Section: section, Summary: "relative scatter of a photon count, one sigma",
			Args: []string{"count: mean number of absorbed photons, not of incident ones"}, Formula: "1/√N", Valid: "count > 0", Source: "variance of a Poisson count",
			Example: "shot_noise(892) [%]",
		}, euv.ShotNoise),
		Bind3(Row{
			Name: "yield_noise", Section: section, Summary: "relative scatter of the events that absorbed photons make, one sigma",
			Args:    []string{"count: mean number of absorbed photons", "mean: of the events (electrons, acids) a photon makes", "variance: of the events a photon makes: the square of their standard deviation"},
			Formula: "√((1 + σ²/g²) / N)", Valid: "photons act independently", Source: "variance of a random sum (Burgess; van der Ziel, Noise in Measurements, 1976, from memory)",
			Example: "yield_noise(892, 3, 2.5) [%]",
		}, euv.YieldNoise),
		BindWarned3(Row{
			Name: "edge_roughness", Section: section, Summary: "deviation of an edge by the shot noise of the light alone, one sigma",
			Args:    []string{"CD: width of the feature", "NILS: normalised image log-slope, see nils", "count_in_cell: mean number of photons absorbed in the cell over which the resist averages"},
			Formula: "(CD/NILS) / √N", Valid: "a model of shot noise: no chemistry, blur or development", Source: "error propagation through the slope of the image",
			Example: "edge_roughness(16 nm, 2.2, 120)",
		}, euv.EdgeRoughness),
		Bind2(Row{
			Name: "lwr_of_ler", Section: section, Summary: "line width roughness (LWR) behind a line edge roughness (LER)",
			Args: []string{"ler: of one edge; the result is of the same multiple of sigma", correlation}, Formula: "LWR = √(2 (1 − c)) · LER", Valid: "−1 ≤ c ≤ 1", Source: "variance of a difference; terms of the IUPAC glossary of 2020",
			Example: "lwr_of_ler(1.2 nm)",
		}, euv.LWROfLER),
		Bind2(Row{
			Name: "ler_of_lwr", Section: section, Summary: "line edge roughness (LER) behind a line width roughness (LWR)",
			Args: []string{"lwr: of the width; the result is of the same multiple of sigma", correlation}, Formula: "LER = LWR / √(2 (1 − c))", Valid: "−1 ≤ c < 1", Source: "as lwr_of_ler",
			Example: "ler_of_lwr(1.7 nm)",
		}, euv.LEROfLWR),
		BindWarned3(Row{
			Name: "dose_for_roughness", Section: section, Summary: "dose that takes a roughness from now to target, all else unchanged",
			Args: []string{"now: roughness at the dose", "target: roughness wanted, of the same kind and sigma multiple as now", "dose at WAFER"}, Plane: "as dose",
			Formula: "D (now/target)²", Valid: "where shot noise rules; a warning past 2x", Source: "1/√N of shot noise",
			Example: "dose_for_roughness(2.0 nm, 1.7 nm, 34 mJ/cm^2)",
		}, euv.DoseForRoughness),
		BindWarned5(Row{
			Name: "z_factor", Section: section, Summary: "figure of merit of a resist: resolution, roughness, dose; smaller is better",
			Args: []string{
				"half_pitch: not the pitch, which would give 8x", "roughness: of the kind and sigma multiple that of and sigmas say", "dose at WAFER",
				"of: LER is of one edge, LWR of the width: about √2 apart in nm, 2x apart in Z", "sigmas: 1 or 3, the multiple that roughness states: 9x apart in Z",
			},
			Formula: "half_pitch³ · roughness² · dose", Valid: "nothing is converted: compare values of one kind only", Source: "Wallow et al., Proc. SPIE 6921 (2008) (from memory)",
			Example: "z_factor(16 nm, 3.6 nm, 34 mJ/cm^2, LER, 3)",
		}, euv.ZFactor),
		Bind3(Row{
			Name: "line_average", Section: section, Summary: "scatter of the mean width (or edge) along a length of line",
			Args:    []string{"sigma: of a single place; the result is of the same multiple", "correlation_length: where the correlation has fallen to 1/e", "length: over which the mean is taken"},
			Formula: "σ √(2 (x − 1 + e⁻ˣ)/x²), x = length/correlation_length", Valid: "exponential autocorrelation", Source: "double integral of the autocorrelation over the line",
			Example: "line_average(2.5 nm, 35 nm, 500 nm)",
		}, euv.LineAverage),
		Bind3(Row{
			Name: "resist_contrast", Section: section, Summary: "steepness of the remaining thickness over the decadic logarithm of the dose",
			Args: []string{
				"dose_half at WAFER: leaves half of the thickness", "dose_end at WAFER: where the tangent there meets no thickness, from above or below",
				"tone: positive dissolves where exposed (dose_end above dose_half), negative stays (below)",
			},
			Formula: "1/(2 log10(D_end/D_half)); negative: 1/(2 log10(D_half/D_end))", Valid: "doses > 0", Source: "IUPAC Gold Book, term 09460",
			Example: "resist_contrast(8 mJ/cm^2, 12 mJ/cm^2, positive)",
		}, euv.ResistContrast),
	}
}
