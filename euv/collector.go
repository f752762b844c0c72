package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// LossModel says how a collector loses reflectivity. The two models differ by
// 5 % of the rate at a loss of 10 %, so there is no default.
type LossModel int

const (
	Linear      LossModel = iota // every pulse takes the same part of the new mirror
	Exponential                  // every pulse takes the same part of what is left
)

// Words returns the words in order: linear, exponential.
func (LossModel) Words() []string { return []string{"linear", "exponential"} }

// String returns the word, or "LossModel(n)" for a value that has none.
func (m LossModel) String() string { return wordOf("LossModel", m.Words(), int(m)) }

// CollectorLoss is the part of its first reflectivity that a collector has lost
// after a number of pulses.
//
//	linear:      loss = rate · pulses
//	exponential: loss = 1 − exp(−rate · pulses)
//
// rate is the relative loss per pulse, 0 or greater; pulses is 0 or greater; in
// the linear model their product is at most 1. Errors: *ArgumentError. Source:
// common practice, no source.
func CollectorLoss(rate units.PulseLoss, pulses units.PulseCount, model LossModel) (units.Ratio, error) {
	wear, err := wearOf(rate, pulses, model)
	switch {
	case err != nil:
		return 0, err
	case model == Linear:
		return units.Ratio(wear), nil
	}
	return units.Ratio(-math.Expm1(-wear)), nil
}

// CollectorLifeAverage is the mean of a collector's reflectivity over a life of
// pulses, relative to the new one.
//
//	linear:      average = 1 − rate · pulses / 2
//	exponential: average = (1 − exp(−rate · pulses)) / (rate · pulses)
//
// The arguments are those of CollectorLoss. Errors: *ArgumentError. Source: the
// mean of 1 − CollectorLoss over the pulses.
func CollectorLifeAverage(rate units.PulseLoss, pulses units.PulseCount, model LossModel) (units.Ratio, error) {
	wear, err := wearOf(rate, pulses, model)
	switch {
	case err != nil:
		return 0, err
	case model == Linear:
		return units.Ratio(1 - wear/2), nil
	case wear == 0:
		return 1, nil
	}
	return units.Ratio(-math.Expm1(-wear) / wear), nil
}

// wearOf is rate · pulses. In the linear model it is at most 1, where the last
// digit is rounded off, since 0.01 per pulse and 100 pulses are all of it.
func wearOf(rate units.PulseLoss, pulses units.PulseCount, model LossModel) (float64, error) {
	err := first(notNegative("rate", rate), notNegative("pulses", pulses), known("model", model.Words(), int(model)))
	if err != nil {
		return 0, err
	}
	wear := float64(rate) * float64(pulses)
	if model == Linear {
		if wear > 1+1e-15 {
			return 0, outside("pulses", pulses, fmt.Sprintf(
				"at most %.5g pulse, after which the linear model leaves nothing", 1/float64(rate)))
		}
		wear = min(wear, 1)
	}
	return answer("rate · pulses", wear)
}
