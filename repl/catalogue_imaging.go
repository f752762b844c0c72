package repl

import "example.com/dosewright/euv"

const imagingSection = "Imaging, mask, overlay"

// imagingRows: resolution, focus, the slope of the image and what dose, blur
// and flare do to a width.
func imagingRows() []Function {
	const section = imagingSection
	const rayleigh = "criterion of Lord Rayleigh (common practice, no source)"
	aperture := "NA: at the wafer"
	cd := "CD: width of the feature"
	slope := "NILS: normalised image log-slope, see nils"
	return []Function{
		Bind3(Row{
			Name: "half_pitch", Section: section, Summary: "half pitch that a process of a given k1 resolves",
			Args: []string{"k1: for the half pitch; for the pitch it would be twice that", aperture, "wavelength = 13.5 nm"}, Formula: "k1 λ / NA", Valid: "0 < NA < 1; the pitch is twice the result", Source: rayleigh,
			Example: "half_pitch(0.4, 0.33)",
		}, euv.HalfPitch),
		Bind3(Row{
			Name: "k1", Section: section, Summary: "factor of the process that a half pitch asks for",
			Args: []string{"half_pitch: not the pitch, which would give 2x", aperture, "wavelength = 13.5 nm"}, Formula: "half_pitch · NA / λ", Valid: "0 < NA < 1; below 0.25 no single exposure resolves lines", Source: rayleigh,
			Example: "k1(16 nm, 0.33)",
		}, euv.K1),
		Bind3(Row{
			Name: "depth_of_focus", Section: section, Summary: "whole range of focus, paraxial",
			Args: []string{aperture, "k2: for the whole range, 1 for a quarter wave; a k2 that states ± focus is half of it", "wavelength = 13.5 nm"}, Formula: "k2 λ / NA²", Valid: "small NA; see depth_of_focus_exact", Source: rayleigh,
			Example: "depth_of_focus(0.33, 1)",
		}, euv.DepthOfFocus),
		Bind3(Row{
			Name: "depth_of_focus_exact", Section: section, Summary: "whole range of focus, not paraxial",
			Args: []string{aperture, "k3 = 0.25: for the whole range, 0.25 for a quarter wave", "wavelength = 13.5 nm"}, Formula: "k3 λ / sin²(θ/2), sin θ = NA", Valid: "0 < NA < 1", Source: "Lin, J. Microlith. Microfab. Microsyst. 1, 7 (2002) (from memory)",
			Example: "depth_of_focus_exact(0.33)",
		}, euv.DepthOfFocusExact),
		Bind2(Row{
			Name: "nils", Section: section, Summary: "normalised image log-slope of an edge",
			Args: []string{"slope: d ln I/dx at the edge, natural logarithm; a decadic one is 2.3x smaller", "CD: width of the feature, not the pitch"}, Formula: "CD · d ln I/dx", Valid: "slope ≥ 0", Source: "definition (common practice, no source)",
			Example: "nils(140 /µm, 16 nm)",
		}, euv.NILS),
		Bind1(Row{
			Name: "two_beam_nils", Section: section, Summary: "normalised image log-slope of equal lines and spaces made by two beams",
			Args: []string{"contrast: (max − min)/(max + min) of the intensity"}, Formula: "π V", Valid: "I = 1 + V cos(2πx/p), at the middle of the slope", Source: "derivative of that image at p/4",
			Example: "two_beam_nils(70 %)",
		}, euv.TwoBeamNILS),
		Bind3(Row{
			Name: "cd_shift", Section: section, Summary: "change of a width with the dose, by both edges; positive: a bright feature grows",
			Args: []string{cd, slope, "dose_error: relative, with its sign"}, Formula: "2 CD/NILS · δD/D", Valid: "linear: errors small against 1; a dark feature changes the other way", Source: "definition of the log-slope",
			Example: "cd_shift(16 nm, 2.2, 1 %)",
		}, euv.CDShift),
		Bind2(Row{
			Name: "exposure_latitude", Section: section, Summary: "whole relative range of dose that keeps a width in its tolerance",
			Args: []string{slope, "cd_tolerance = 10 %: of the width, per side: 10 % is ± 10 %"}, Formula: "cd_tolerance · NILS", Valid: "linear: total, not per side; half of it is the ± dose", Source: "cd_shift, solved for the dose both ways",
			Example: "exposure_latitude(2.2) [%]",
		}, euv.ExposureLatitude),
		Bind2(Row{
			Name: "blur_contrast", Section: section, Summary: "factor by which a Gaussian blur lowers the contrast of a sinusoidal image",
			Args: []string{"sigma: standard deviation along one direction, not FWHM; see sigma_of_fwhm", "pitch: not the half pitch"}, Formula: "exp(−2π² σ²/p²)", Valid: "sigma ≥ 0, pitch > 0", Source: "Fourier transform of the Gaussian",
			Example: "blur_contrast(5 nm, 32 nm)",
		}, euv.BlurContrast),
		Bind1(Row{
			Name: "sigma_of_fwhm", Section: section, Summary: "standard deviation of a Gaussian with a full width at half maximum",
			Args: []string{"x: full width at half maximum"}, Formula: "x / √(8 ln 2)", Valid: "Gaussians only", Source: "definition of the Gaussian",
			Example: "sigma_of_fwhm(12 nm)",
		}, euv.SigmaOfFWHM),
		Bind1(Row{
			Name: "fwhm_of_sigma", Section: section, Summary: "full width at half maximum of a Gaussian with a standard deviation",
			Args: []string{"x: standard deviation, one sigma"}, Formula: "x √(8 ln 2)", Valid: "Gaussians only", Source: "definition of the Gaussian",
			Example: "fwhm_of_sigma(5 nm)",
		}, euv.FWHMOfSigma),
		Bind5(Row{
			Name: "flare_shift", Section: section, Summary: "change of a width by flare, by both edges; positive: a bright feature grows",
			Args:    []string{cd, slope, "flare: scattered part of the light", "density: bright part of the surroundings, 0 to 1", "edge_intensity: at the edge without flare, relative to a clear field"},
			Formula: "2 CD/NILS · F (ρ/I − 1)", Valid: "linear: small flare", Source: "image (1 − F) I + F ρ, and cd_shift",
			Example: "flare_shift(16 nm, 2.2, 3.5 %, 60 %, 0.3)",
		}, euv.FlareShift),
	}
}
