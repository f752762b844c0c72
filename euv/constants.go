package euv

// Constants of nature in coherent SI units. All are exact by the definition of
// the SI (SI Brochure, 9th edition, table 1) save the last one.
const (
	PlanckConstant    = 6.62607015e-34  // J·s
	SpeedOfLight      = 299792458.0     // m/s, in vacuum
	ElementaryCharge  = 1.602176634e-19 // C
	BoltzmannConstant = 1.380649e-23    // J/K
	AvogadroConstant  = 6.02214076e23   // mol⁻¹
	// ClassicalElectronRadius is in m: CODATA 2022, standard uncertainty
	// 1.3e-24 m.
	ClassicalElectronRadius = 2.8179403205e-15
)

// hc is the energy of a photon times its vacuum wavelength, in J·m.
const hc = PlanckConstant * SpeedOfLight
