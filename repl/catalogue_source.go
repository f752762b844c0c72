package repl

import "example.com/dosewright/euv"

// sourceRows: source, collector, electricity.
func sourceRows() []Function {
	const section = "Source and electricity"
	return []Function{
		Bind6(Row{
			Name: "source_power", Section: section, Summary: "power at IF that carries a dose at a throughput",
			Args: []string{
				"dose at WAFER", "throughput", "fields_per_wafer", "field_area: in cm²/field",
				"overhead: time of a wafer in which nothing is exposed, in s/wafer", "transmission at WAFER/IF",
			},
			Plane: "IF", Formula: "P = D N A / (T (1/throughput − overhead))", Valid: "throughput < 1/overhead",
			Source:  "energy balance of the exposing time",
			Example: "source_power(34 mJ/cm^2, 150 wafer/h, 96 field/wafer, 8.58 cm^2/field, 9 s/wafer, 0.9 %)",
			Caution: electricCaution,
		}, euv.SourcePower),
		Bind1(Row{
			Name: "collected_fraction", Section: section, Summary: "part of a uniform emission into the half space that a solid angle collects",
			Args: []string{"solid_angle: in sr, at most 2π"}, Formula: "Ω / 2π", Valid: "0 < Ω ≤ 2π sr", Source: "geometry",
			Example: "collected_fraction(5 sr)",
		}, euv.CollectedFraction),
		Bind5(Row{
			Name: "laser_power", Section: section, Summary: "laser power behind a power at IF",
			Args: []string{
				"power at IF", "conversion_efficiency: in-band (2 % full width) into 2π sr", "solid_angle",
				"collector: mean in-band reflectivity of the collector", "path: transmission of gas and filter to IF",
			},
			Formula: "P / (CE · Ω/2π · collector · path)", Valid: "factors from 0 to 1", Source: "definition of conversion efficiency (common practice, no source)",
			Example: "laser_power(250 W at IF, 5.5 %, 5 sr, 41 %, 90 %) [kW]", Caution: laserCaution,
		}, euv.LaserPower),
		Bind2(Row{
			Name: "pulse_energy", Section: section, Summary: "energy of a pulse",
			Args: []string{"power", "repetition: in pulse/s, not in Hz"}, Plane: "as power", Formula: "P / f", Valid: "repetition > 0", Source: "definition",
			Example: "pulse_energy(250 W at IF, 50 kpulse/s) [mJ/pulse]", Caution: laserCaution,
		}, euv.PulseEnergy),
		Bind3(Row{
			Name: "collector_loss", Section: section, Summary: "relative loss of collector reflectivity after a number of pulses",
			Args: []string{"rate: in %/Gpulse", "pulses", "model: linear loses kN of the new mirror, exponential 1 − exp(−kN); they differ by 5 % at a loss of 10 %"}, Formula: "k N, or 1 − exp(−k N)", Valid: "linear: k N ≤ 1", Source: "common practice, no source",
			Example: "collector_loss(0.17 %/Gpulse, 60.48 Gpulse, linear)",
		}, euv.CollectorLoss),
		Bind3(Row{
			Name: "collector_life_average", Section: section, Summary: "mean of the relative reflectivity over a life of pulses",
			Args: []string{"rate: in %/Gpulse", "pulses", "model: linear or exponential loss, see collector_loss"}, Formula: "1 − k N / 2, or (1 − exp(−k N)) / (k N)", Valid: "linear: k N ≤ 1", Source: "mean of collector_loss",
			Example: "collector_life_average(0.17 %/Gpulse, 60.48 Gpulse, exponential)",
		}, euv.CollectorLifeAverage),
		Bind4(Row{
			Name: "etendue", Section: section, Summary: "etendue of a field at a numerical aperture",
			Args: []string{"width", "height", "NA", "fill = 1: part of the pupil that is filled"}, Formula: "w h π NA² · fill", Valid: "0 < NA < 1", Source: "definition, circular pupil",
			Example: "etendue(26 mm, 2 mm, 0.33, fill = 0.5) [mm^2*sr]",
		}, euv.Etendue),
		Bind4(Row{
			Name: "energy_per_pass", Section: section, Summary: "electrical energy of one wafer passing the tool",
			Args: []string{"power_exposing", "power_idle", "busy: part of the time in which the tool exposes", "throughput"}, Formula: "(P_e f + P_i (1 − f)) / (throughput · f)", Valid: "0 < busy ≤ 1", Source: "energy balance",
			Example: "energy_per_pass(1310 kW, 1310 kW, 100 %, 136 wafer/h) [kWh/wafer]", Caution: electricCaution,
		}, euv.EnergyPerPass),
		Bind2(Row{
			Name: "cooling_flow", Section: section, Summary: "flow of water that takes a power away",
			Args: []string{"power", "rise: temperature difference of the water"}, Formula: "P / (ρ c ΔT), ρ and c of water near 20 °C", Valid: "rise > 0", Source: "energy balance; ρ = 998.2 kg/m³, c = 4182 J/(kg·K) (handbook, from memory)",
			Example: "cooling_flow(1 MW, 8 K)", Caution: heatCaution,
		}, euv.CoolingFlow),
	}
}
