package repl

import "example.com/dosewright/euv"

// maskRows: the mask's errors and angles, and what heat does to overlay.
func maskRows() []Function {
	const section = imagingSection
	const heat = "Planning arithmetic only: site rules, the applicable codes and licensed practice govern heat loads."
	reduction := "reduction: of the direction in question, written 4, not 1/4"
	meef := "MEEF: mask error enhancement factor"
	cone := []string{"NA: at the wafer", reduction, "chief_ray: angle from the mask's normal, as 6 deg"}
	return []Function{
		Bind3(Row{
			Name: "wafer_error_of_mask", Section: section, Summary: "error of a width on the wafer behind one on the mask",
			Args: []string{"mask_error: on the mask, with its sign", meef, reduction}, Formula: "MEEF · mask_error / M", Valid: "small errors", Source: "definition of MEEF (common practice, no source)",
			Example: "wafer_error_of_mask(1.5 nm, 1.8, 4)",
		}, euv.WaferErrorOfMask),
		Bind3(Row{
			Name: "mask_error_for", Section: section, Summary: "error of a width on the mask that makes one on the wafer",
			Args: []string{"wafer_error: on the wafer, with its sign", meef, reduction}, Formula: "wafer_error · M / MEEF", Valid: "small errors", Source: "as wafer_error_of_mask",
			Example: "mask_error_for(0.5 nm, 1.8, 4)",
		}, euv.MaskErrorFor),
		Bind4(Row{
			Name: "shadow", Section: section, Summary: "width that the slant of the chief ray hides behind the mask's absorber, on the wafer",
			Args: []string{
				"absorber_thickness", "chief_ray: angle from the mask's normal, as 6 deg", reduction,
				"passes: 1 for the way in alone, 2 where light passes the absorber in and out: 2x apart",
			},
			Formula: "passes · t · tan(chief_ray) / M", Valid: "geometry alone: no mask 3D effect", Source: "geometry",
			Example: "shadow(60 nm, 6 deg, 4, 2)",
		}, euv.Shadow),
		Bind3(Row{
			Name: "mask_angle_low", Section: section, Summary: "smallest angle of light on the mask, from its normal; negative beyond the normal",
			Args: cone, Unit: "deg", Formula: "chief_ray − asin(NA/M)", Valid: "the whole cone below 90°", Source: "geometry; sine condition",
			Example: "mask_angle_low(0.33, 4, 6 deg)",
		}, euv.MaskAngleLow),
		Bind3(Row{
			Name: "mask_angle_high", Section: section, Summary: "largest angle of light on the mask, from its normal",
			Args: cone, Unit: "deg", Formula: "chief_ray + asin(NA/M)", Valid: "the whole cone below 90°", Source: "geometry; sine condition",
			Example: "mask_angle_high(0.33, 4, 6 deg)",
		}, euv.MaskAngleHigh),
		Bind3(Row{
			Name: "expansion", Section: section, Summary: "change of a length with temperature",
			Args: []string{"length: the whole length, or the half of it from a centre that stays", "cte: linear expansion coefficient, in 1/K", "rise: temperature difference, in K"}, Formula: "α L ΔT", Valid: "cte taken as constant", Source: "definition of the coefficient",
			Example: "expansion(36 mm, 0.5 ppm/K, 0.5 K)",
		}, euv.Expansion),
		Bind1(Row{
			Name: "silicon_cte", Section: section, Summary: "linear expansion coefficient of silicon",
			Args: []string{"temperature: a point"}, Formula: "(3.725 (1 − exp(−5.88e-3 (T − 124))) + 5.548e-4 T) · 1e-6/K, T in K", Valid: "120 K to 1500 K", Source: "Okada & Tokumaru, J. Appl. Phys. 56, 314 (1984)",
			Example: "silicon_cte(22 degC)",
		}, euv.SiliconCTE),
		BindWarned3(Row{
			Name: "wafer_heating", Section: section, Summary: "rise in temperature of a silicon wafer that keeps all heat of an exposure: a ceiling",
			Args:    []string{"dose at WAFER: incident, over the whole surface", "absorbed = 1: part that turns to heat", "thickness = 0.775 mm: of the wafer"},
			Formula: "absorbed · D / (ρ c t), ρ = 2330 kg/m³, c = 702 J/(kg·K)", Valid: "adiabatic", Source: "energy balance; ρ and c of silicon near 20 °C (handbook, from memory)",
			Example: "wafer_heating(30 mJ/cm^2)", Caution: heat,
		}, euv.WaferHeating),
		Bind4(Row{
			Name: "radiative_temperature", Section: section, Summary: "temperature at which a thin body radiates what it absorbs, as a pellicle in vacuum does",
			Args:    []string{"absorbed_flux: absorbed power per area of one face", "emissivity: of each face", "faces = 2: that radiate, 1 or 2", "surroundings = 293.15 K: a point"},
			Formula: "flux = faces · ε σ (T⁴ − T₀⁴)", Valid: "grey body; no conduction, no gas", Source: "law of Stefan and Boltzmann",
			Example: "radiative_temperature(3 W/cm^2, 0.4)", Caution: heat,
		}, euv.RadiativeTemperature),
	}
}
