package repl

import "example.com/dosewright/euv"

// exposureRows: scanning, throughput, fields, dose noise.
func exposureRows() []Function {
	const section = "Exposure and throughput"
	return []Function{
		Bind4(Row{
			Name: "scan_speed", Section: section, Summary: "stage speed at which a power carries a dose",
			Args:    []string{"power at WAFER", "dose at WAFER", "slit_across: the slit's long side, across the scan", "limit = none: highest speed of the stage"},
			Formula: "v = P / (D w), at most limit", Valid: "the slit's height cancels", Source: "energy balance", Example: "scan_speed(2 W at WAFER, 30 mJ/cm^2 at WAFER, 26 mm)",
		}, euv.ScanSpeed),
		Bind3(Row{
			Name: "scan_dose", Section: section, Summary: "dose that a power leaves at a scan speed",
			Args: []string{"power at WAFER", "speed", "slit_across"}, Plane: "WAFER", Formula: "D = P / (v w)", Valid: "speed > 0", Source: "energy balance",
			Example: "scan_dose(2 W at WAFER, 256 mm/s, 26 mm)",
		}, euv.ScanDose),
		Bind6(Row{
			Name: "field_time", Section: section, Summary: "time of one field: scan, turn-round, step",
			Args:    []string{"field_along", "slit_along", "speed", "acceleration", "step: what the turn-round does not hide, in s/field", "turn = 2: accelerations a field"},
			Formula: "(L + h)/v + turn · v/a + step", Valid: "speed and acceleration > 0", Source: "kinematics",
			Example: "field_time(33 mm, 2 mm, 250 mm/s, 15 m/s^2, 20 ms/field)",
		}, euv.FieldTimeOf),
		Bind5(Row{
			Name: "wafer_time", Section: section, Summary: "time of one wafer",
			Args: []string{"dose at WAFER", "fields_per_wafer", "field_area", "power at WAFER", "overhead"}, Formula: "overhead + D N A / P", Valid: "power > 0", Source: "energy balance",
			Example: "wafer_time(34 mJ/cm^2, 96 field/wafer, 8.58 cm^2/field, 1.9 W at WAFER, 9.5 s/wafer)",
		}, euv.WaferTimeOf),
		Bind5(Row{
			Name: "throughput", Section: section, Summary: "wafers per time while the tool runs; overhead is a term of its own",
			Args: []string{"dose at WAFER", "fields_per_wafer", "field_area", "power at WAFER", "overhead"}, Formula: "1 / (overhead + D N A / P)", Valid: "power > 0; no idle time in it", Source: "energy balance",
			Example: "throughput(34 mJ/cm^2, 96 field/wafer, 8.58 cm^2/field, 1.9 W at WAFER, 9.5 s/wafer)",
		}, euv.ThroughputOf),
		Bind4(Row{
			Name: "complete_fields", Section: section, Summary: "most fields that lie whole on a wafer",
			Args: []string{"width", "height", "diameter = 300 mm", "edge = 3 mm: ring that does not count"}, Formula: "exact search over grid offsets", Valid: "at most 1e5 fields", Source: "geometry",
			Example: "complete_fields(26 mm, 33 mm)",
		}, euv.CompleteFields),
		Bind4(Row{
			Name: "touched_fields_least", Section: section, Summary: "fewest fields that cover a wafer less its edge",
			Args: []string{"width", "height", "diameter = 300 mm", "edge = 3 mm: ring that does not count"}, Formula: "exact search over grid offsets", Valid: "at most 1e5 fields", Source: "geometry",
			Example: "touched_fields_least(26 mm, 33 mm)",
		}, euv.TouchedFieldsLeast),
		Bind4(Row{
			Name: "touched_fields_most", Section: section, Summary: "most fields that touch a wafer less its edge",
			Args: []string{"width", "height", "diameter = 300 mm", "edge = 3 mm: ring that does not count"}, Formula: "exact search over grid offsets", Valid: "at most 1e5 fields", Source: "geometry",
			Example: "touched_fields_most(26 mm, 33 mm)",
		}, euv.TouchedFieldsMost),
		Bind3(Row{
			Name: "pulses_per_point", Section: section, Summary: "pulses that meet a point in the moving slit",
			Args: []string{"repetition: in pulse/s, not in Hz", "slit_along", "speed"}, Formula: "f h / v", Valid: "speed > 0", Source: "kinematics",
			Example: "pulses_per_point(50 kpulse/s, 2 mm, 250 mm/s)",
		}, euv.PulsesPerPoint),
		Bind3(Row{
			Name: "dose_noise", Section: section, Summary: "relative scatter of the dose from pulse noise, one sigma, open loop",
			Args: []string{"pulse_noise: relative, one sigma", "pulses", "correlation = 0: of neighbouring pulses"}, Formula: "σ √(((1+ρ)/(1−ρ) − 2ρ(1−ρᴺ)/(N(1−ρ)²))/N)", Valid: "first-order autocorrelation, −1 < ρ < 1", Source: "variance of a mean; twin: exact double sum",
			Example: "dose_noise(3 %, 400 pulse) [%]",
		}, euv.DoseNoise),
		Bind4(Row{
			Name: "mask_dose", Section: section, Summary: "dose on the mask behind a dose on the wafer",
			Args: []string{"dose at WAFER", "reduction_x", "reduction_y", "transmission at WAFER/MASK"}, Plane: "MASK", Formula: "D / (Mx My T)", Valid: "reductions > 0, 0 < T ≤ 1", Source: "energy balance",
			Example: "mask_dose(30 mJ/cm^2 at WAFER, 4, 4, 8 % at WAFER/MASK)",
		}, euv.MaskDose),
	}
}
