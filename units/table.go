package units

// row is one unit: its printed symbol, other spellings, scale and dimension,
// whether it takes prefixes, and where the scale comes from.
type row struct {
	symbol string
	also   []string
	scale  factor
	dim    Dimension
	prefix bool
	source string
}

const (
	brochure = "SI Brochure, 9th edition, tables 2 to 5"
	accepted = "SI Brochure, 9th edition, table 8"
	sp811    = "NIST SP 811 (2008), B.8"
	counting = "a counted thing; no scale"
)

func also(words ...string) []string { return words }

// newRows returns the units that every System knows, one row each.
func newRows() []row {
	amount, candela := AmountBase.Of(), LuminousBase.Of()
	second, metre := dimDuration, dimLength
	return []row{
		{"s", nil, factor{}, second, true, brochure},
		{"m", nil, factor{}, metre, true, brochure},
		{"g", nil, tens(-3), dimMass, true, brochure},
		{"A", nil, factor{}, dimCurrent, true, brochure},
		{"K", nil, factor{}, dimTemperature, true, brochure},
		{"mol", nil, factor{}, amount, true, brochure},
		{"cd", nil, factor{}, candela, true, brochure},
		{"rad", nil, factor{}, Dimension{}, true, brochure},
		{"sr", nil, factor{}, Dimension{}, true, brochure},
		{"Hz", nil, factor{}, dimPerTime, true, brochure},
		{"N", nil, factor{}, dimForce, true, brochure},
		{"Pa", nil, factor{}, dimPressure, true, brochure},
		{"J", nil, factor{}, dimEnergy, true, brochure},
		{"W", nil, factor{}, dimPower, true, brochure},
		{"C", nil, factor{}, si(0, 0, 1, 1, 0), true, brochure},
		{"V", nil, factor{}, dimVoltage, true, brochure},
		{"F", nil, factor{}, si(-1, -2, 4, 2, 0), true, brochure},
		{"Ω", also("ohm", "Ohm"), factor{}, si(1, 2, -3, -2, 0), true, brochure},
		{"S", nil, factor{}, si(-1, -2, 3, 2, 0), true, brochure},
		{"Wb", nil, factor{}, si(1, 2, -2, -1, 0), true, brochure},
		{"T", nil, factor{}, si(1, 0, -2, -1, 0), true, brochure},
		{"H", nil, factor{}, si(1, 2, -2, -2, 0), true, brochure},
		{"lm", nil, factor{}, candela, true, brochure},
		{"lx", nil, factor{}, candela.with(LengthBase, -2*sixths), true, brochure},
		{"Bq", nil, factor{}, dimPerTime, true, brochure},
		{"Gy", nil, factor{}, si(0, 2, -2, 0, 0), true, brochure},
		{"Sv", nil, factor{}, si(0, 2, -2, 0, 0), true, brochure},
		{"kat", nil, factor{}, amount.with(TimeBase, -sixths), true, brochure},
		{celsius, also("degC"), factor{}, dimTemperature, false, brochure},

		{"min", nil, whole(60, 0), second, false, accepted},
		{"h", nil, whole(3600, 0), second, false, accepted},
		{"d", nil, whole(86400, 0), second, false, accepted},
		{"au", nil, whole(149597870700, 0), metre, false, accepted},
		{"°", also("deg"), factor{pi: 1}.over(180), Dimension{}, false, accepted},
		{"′", also("arcmin", "'"), factor{pi: 1}.over(10800), Dimension{}, false, accepted},
		{"″", also("arcsec", "''"), factor{pi: 1}.over(648000), Dimension{}, false, accepted},
		{"ha", nil, tens(4), dimArea, false, accepted},
		{"L", also("l"), tens(-3), dimVolume, true, accepted},
		{"t", nil, tens(3), dimMass, false, accepted},
		{"Da", nil, whole(166053906892, -38), dimMass, true, "CODATA 2022: 1.660 539 068 92(52)e-27 kg"},
		{"eV", nil, whole(1602176634, -28), dimEnergy, true, accepted},

		{"bar", nil, tens(5), dimPressure, true, sp811},
		{"atm", nil, whole(101325, 0), dimPressure, false, sp811},
		{"Torr", nil, whole(101325, 0).over(760), dimPressure, true, sp811},
		{"psi", nil, whole(44482216152605, -5).over(64516), dimPressure, false, "lbf/in²: 0.453 592 37 kg · 9.806 65 m/s² / (25.4 mm)², exact by definition; NIST SP 811 (2008), B.8"},
		{"Å", also("angstrom"), tens(-10), metre, false, sp811},
		{"inch", nil, whole(254, -4), metre, false, sp811},
		{"Wh", nil, whole(3600, 0), dimEnergy, true, sp811},
		{"year", also("years"), whole(31557600, 0), second, false, "365.25 d, the Julian year; IAU Style Manual (from memory)"},
		{"%", nil, tens(-2), Dimension{}, false, "SI Brochure, 9th edition, 5.4.7"},
		{"ppm", nil, tens(-6), Dimension{}, false, "SI Brochure, 9th edition, 5.4.7"},
		{"ppb", nil, tens(-9), Dimension{}, false, "SI Brochure, 9th edition, 5.4.7"},

		{"wafer", also("wafers"), factor{}, Wafer.Of(), true, counting},
		{"field", also("fields"), factor{}, Field.Of(), true, counting},
		{"die", also("dies"), factor{}, Die.Of(), true, counting},
		{"pulse", also("pulses"), factor{}, Pulse.Of(), true, counting},
		{"photon", also("photons"), factor{}, Dimension{}, true, "a name for the number one"},
		{"electron", also("electrons"), factor{}, Dimension{}, true, "a name for the number one"},
		{"mirror", also("mirrors"), factor{}, Dimension{}, true, "a name for the number one"},
		{"bilayer", also("bilayers"), factor{}, Dimension{}, true, "a name for the number one"},
	}
}

const celsius = "°C"
