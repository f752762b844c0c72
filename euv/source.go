package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// SourcePower is the power at intermediate focus that carries a dose at a
// throughput.
//
//	power = dose · fields_per_wafer · field_area /
//	        (transmission · (1/throughput − overhead))
//
// dose is at the wafer, in J/m²; throughput in wafer/s, fieldsPerWafer in
// field/wafer, fieldArea in m²/field: all greater than 0. overhead is the time
// of a wafer in which nothing is exposed, in s/wafer, 0 or greater.
// transmission is from intermediate focus to the wafer, greater than 0 and at
// most 1. The result is in W. A throughput that the overhead alone forbids is
// refused with its ceiling 1/overhead. Errors: *ArgumentError. Source: energy
// balance of the exposing time. For planning only: electrical work follows the
// site's rules, the applicable codes and licensed practice.
func SourcePower(dose units.Fluence, throughput units.Throughput, fieldsPerWafer units.FieldsPerWafer, fieldArea units.FieldArea, overhead units.WaferTime, transmission units.Ratio) (units.Power, error) {
	energy, err := exposureEnergy(dose, fieldsPerWafer, fieldArea)
	err = first(err, positive("throughput", throughput), notNegative("overhead", overhead), share("transmission", transmission))
	if err != nil {
		return 0, err
	}
	exposing := 1/float64(throughput) - float64(overhead)
	if !(exposing > 0) {
		return 0, outside("throughput", throughput, fmt.Sprintf(
			"less than %.5g wafer/h, since the overhead alone takes %.5g s/wafer", 3600/float64(overhead), float64(overhead)))
	}
	return answer("source_power", units.Power(energy/float64(transmission)/exposing))
}

// CollectedFraction is the part of a uniform emission into the half space that
// a solid angle collects.
//
//	fraction = solid_angle / 2π
//
// solidAngle is in sr, greater than 0 and at most 2π. Errors: *ArgumentError.
// Source: geometry.
func CollectedFraction(solidAngle units.SolidAngle) (units.Ratio, error) {
	if !(solidAngle > 0 && solidAngle <= 2*math.Pi) {
		return 0, outside("solid_angle", solidAngle, "greater than 0 and at most 2π sr")
	}
	return units.Ratio(float64(solidAngle) / (2 * math.Pi)), nil
}

// LaserPower is the laser power behind a power at intermediate focus.
//
//	laser power = power / (conversion_efficiency · solid_angle/2π · collector · path)
//
// power is at intermediate focus, in W, 0 or greater. conversionEfficiency is
// the in-band (2 % full width) energy emitted into 2π sr per laser energy;
// solidAngle is that of the collector, in sr, greater than 0 and at most 2π;
// collector is its mean in-band reflectivity; path is the transmission of gas
// and filter to intermediate focus. The three factors are greater than 0 and
// at most 1. The result is in W. Errors: *ArgumentError. Source: the definition
// of conversion efficiency (common practice, no source). For planning only:
// laser work follows IEC 60825-1, the site's rules and licensed practice.
func LaserPower(power units.Power, conversionEfficiency units.Ratio, solidAngle units.SolidAngle, collector, path units.Ratio) (units.Power, error) {
	collected, err := CollectedFraction(solidAngle)
	err = first(notNegative("power", power), share("conversion_efficiency", conversionEfficiency), err,
		share("collector", collector), share("path", path))
	if err != nil {
		return 0, err
	}
	return answer("laser_power", power/units.Power(conversionEfficiency)/units.Power(collected)/units.Power(collector)/units.Power(path))
}

// PulseEnergy is the energy of one pulse.
//
//	energy = power / repetition
//
// power is in W, 0 or greater, and repetition in pulse/s, greater than 0; the
// result is in J/pulse. Errors: *ArgumentError. Source: definition. For
// planning only: laser work follows IEC 60825-1, the site's rules and licensed
// practice.
func PulseEnergy(power units.Power, repetition units.PulseRate) (units.PulseEnergy, error) {
	if err := first(notNegative("power", power), positive("repetition", repetition)); err != nil {
		return 0, err
	}
	return answer("pulse_energy", units.PulseEnergy(float64(power)/float64(repetition)))
}

// Etendue is the product of area and solid angle of the light that a field
// takes at a numerical aperture.
//
//	etendue = width · height · π NA² · fill
//
// width and height are those of the field, in m, greater than 0; na is greater
// than 0 and less than 1; fill is the part of the pupil that is filled, greater
// than 0 and at most 1. The result is in m²·sr. Errors: *ArgumentError. Source:
// definition, for a round pupil.
func Etendue(width, height units.Length, na, fill units.Ratio) (units.Etendue, error) {
	err := first(positive("width", width), positive("height", height), within("NA", na), share("fill", fill))
	if err != nil {
		return 0, err
	}
	return answer("etendue", units.Etendue(float64(width)*float64(height)*math.Pi*float64(na*na*fill)))
}
