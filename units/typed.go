package units

import "github.com/martinlindhe/unit"

// Typed quantities: plain float64 values in coherent SI units whose Go type
// says the dimension. Where the module github.com/martinlindhe/unit has the
// type, ours is an alias of it, so that programs that use it fit as they are.
// Its unit constants are not all exact; read values with a Unit of this
// package instead. The product of two Lengths is a Length to the compiler:
// form products of dimensions with a named function or on Quantities.
type (
	Acceleration = unit.Acceleration
	Angle        = unit.Angle
	Area         = unit.Area
	Current      = unit.ElectricCurrent
	Duration     = unit.Duration
	Energy       = unit.Energy
	Force        = unit.Force
	Frequency    = unit.Frequency
	Length       = unit.Length
	Mass         = unit.Mass
	Power        = unit.Power
	Pressure     = unit.Pressure
	Speed        = unit.Speed
	// Temperature is a thermodynamic temperature, a point on the scale.
	Temperature = unit.Temperature
	Voltage     = unit.Voltage
	Volume      = unit.Volume
)

// Typed quantities of this package, in coherent SI units.
type (
	// Ratio is a quantity of dimension one between 0 and 1, or any ratio.
	Ratio float64
	// Count is a number of photons, electrons, mirrors and the like.
	Count float64
	// SolidAngle is in steradian.
	SolidAngle float64
	// Fluence is energy per area, in J/m²; 1 mJ/cm² is 10 J/m².
	Fluence float64
	// Irradiance is power per area, in W/m².
	Irradiance float64
	// ArealDensity is a count per area, in m⁻².
	ArealDensity float64
	// NumberDensity is a count per volume, in m⁻³.
	NumberDensity float64
	// AttenuationCoefficient is per length, Napierian unless said, in m⁻¹.
	AttenuationCoefficient float64
	// Rate is a count per time, in s⁻¹.
	Rate float64
	// Density is mass per volume, in kg/m³.
	Density float64
	// EnergyDensity is energy per volume, in J/m³.
	EnergyDensity float64
	// EnergyVolume is energy times volume, in J·m³.
	EnergyVolume float64
	// ChargeDensity is charge per area, in C/m².
	ChargeDensity float64
	// TemperatureDifference is in kelvin; see Temperature for points.
	TemperatureDifference float64
	// ExpansionCoefficient is per temperature difference, in K⁻¹.
	ExpansionCoefficient float64
	// FlowRate is volume per time, in m³/s.
	FlowRate float64
	// Etendue is area times solid angle, in m²·sr.
	Etendue float64
	// Throughput is in wafer/s.
	Throughput float64
	// WaferTime is time per wafer, in s/wafer.
	WaferTime float64
	// WaferEnergy is energy per wafer, in J/wafer.
	WaferEnergy float64
	// FieldsPerWafer is in field/wafer.
	FieldsPerWafer float64
	// FieldArea is area per field, in m²/field.
	FieldArea float64
	// FieldTime is time per field, in s/field.
	FieldTime float64
	// PulseRate is in pulse/s.
	PulseRate float64
	// PulseCount is in pulse.
	PulseCount float64
	// PulseEnergy is energy per pulse, in J/pulse.
	PulseEnergy float64
	// PulseLoss is a relative loss per pulse, in pulse⁻¹.
	PulseLoss float64
)

// Kind is the set of types that carry a quantity: every typed quantity of this
// package, and a host's own float64 types with a method Dimension.
type Kind interface{ ~float64 | ~int }

// si builds a dimension from whole exponents of mass, length, time, current
// and temperature; things sets counted ones.
func si(mass, length, time, current, temperature int8) Dimension {
	return Dimension{}.with(MassBase, mass*sixths).with(LengthBase, length*sixths).with(TimeBase, time*sixths).
		with(CurrentBase, current*sixths).with(TemperatureBase, temperature*sixths)
}

func (d Dimension) per(b Base) Dimension { return d.with(b, -sixths) }
func (d Dimension) of(b Base) Dimension  { return d.with(b, sixths) }

// The dimensions of the types, computed once and never changed.
var (
	dimAcceleration  = si(0, 1, -2, 0, 0)
	dimArea          = si(0, 2, 0, 0, 0)
	dimCurrent       = si(0, 0, 0, 1, 0)
	dimDuration      = si(0, 0, 1, 0, 0)
	dimEnergy        = si(1, 2, -2, 0, 0)
	dimForce         = si(1, 1, -2, 0, 0)
	dimPerTime       = si(0, 0, -1, 0, 0)
	dimLength        = si(0, 1, 0, 0, 0)
	dimMass          = si(1, 0, 0, 0, 0)
	dimPower         = si(1, 2, -3, 0, 0)
	dimPressure      = si(1, -1, -2, 0, 0)
	dimSpeed         = si(0, 1, -1, 0, 0)
	dimTemperature   = si(0, 0, 0, 0, 1)
	dimVoltage       = si(1, 2, -3, -1, 0)
	dimVolume        = si(0, 3, 0, 0, 0)
	dimFluence       = si(1, 0, -2, 0, 0)
	dimIrradiance    = si(1, 0, -3, 0, 0)
	dimPerArea       = si(0, -2, 0, 0, 0)
	dimPerVolume     = si(0, -3, 0, 0, 0)
	dimPerLength     = si(0, -1, 0, 0, 0)
	dimDensity       = si(1, -3, 0, 0, 0)
	dimEnergyVolume  = si(1, 5, -2, 0, 0)
	dimChargeDensity = si(0, -2, 1, 1, 0)
	dimPerKelvin     = si(0, 0, 0, 0, -1)
	dimFlowRate      = si(0, 3, -1, 0, 0)
	dimThroughput    = dimPerTime.of(Wafer)
	dimWaferTime     = dimDuration.per(Wafer)
	dimWaferEnergy   = dimEnergy.per(Wafer)
	dimFieldsPer     = Dimension{}.of(Field).per(Wafer)
	dimFieldArea     = dimArea.per(Field)
	dimFieldTime     = dimDuration.per(Field)
	dimPulseRate     = dimPerTime.of(Pulse)
	dimPulseCount    = Dimension{}.of(Pulse)
	dimPulseEnergy   = dimEnergy.per(Pulse)
	dimPulseLoss     = Dimension{}.per(Pulse)
)

// DimensionOf returns the dimension that the type T carries. A plain float64
// is a pure number; a host's type says its dimension by a method.
func DimensionOf[T Kind]() Dimension {
	var zero T
	switch v := any(zero).(type) {
	case Ratio, Count, SolidAngle, Angle, float64:
		return Dimension{}
	case Length:
		return dimLength
	case Area, Etendue:
		return dimArea
	case Volume:
		return dimVolume
	case Duration:
		return dimDuration
	case Frequency, Rate:
		return dimPerTime
	case Energy:
		return dimEnergy
	case Power:
		return dimPower
	case Fluence:
		return dimFluence
	case Irradiance:
		return dimIrradiance
	case ArealDensity:
		return dimPerArea
	case NumberDensity:
		return dimPerVolume
	case AttenuationCoefficient:
		return dimPerLength
	case Temperature, TemperatureDifference:
		return dimTemperature
	case ExpansionCoefficient:
		return dimPerKelvin
	case Throughput:
		return dimThroughput
	case WaferTime:
		return dimWaferTime
	case WaferEnergy:
		return dimWaferEnergy
	case FieldsPerWafer:
		return dimFieldsPer
	case FieldArea:
		return dimFieldArea
	case FieldTime:
		return dimFieldTime
	case PulseRate:
		return dimPulseRate
	case PulseCount:
		return dimPulseCount
	case PulseEnergy:
		return dimPulseEnergy
	case PulseLoss:
		return dimPulseLoss
	case Density:
		return dimDensity
	case Pressure, EnergyDensity:
		return dimPressure
	case EnergyVolume:
		return dimEnergyVolume
	case ChargeDensity:
		return dimChargeDensity
	case FlowRate:
		return dimFlowRate
	case Mass:
		return dimMass
	case Speed:
		return dimSpeed
	case Acceleration:
		return dimAcceleration
	case Force:
		return dimForce
	case Voltage:
		return dimVoltage
	case Current:
		return dimCurrent
	case interface{ Dimension() Dimension }:
		return v.Dimension()
	}
	return Dimension{}
}

// Of returns the typed value as a Quantity.
func Of[T Kind](v T) Quantity { return Quantity{float64(v), DimensionOf[T]()} }

// As returns the quantity as the type T, or an error that wraps ErrDimension
// when the dimensions differ.
func As[T Kind](q Quantity) (T, error) {
	if want := DimensionOf[T](); q.dim != want {
		return 0, &DimensionError{"convert", q.dim, want}
	}
	return T(q.si), nil
}
