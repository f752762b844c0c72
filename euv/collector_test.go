package euv_test

import (
	"math"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

const perGpulse = percent / gigapulse // 1 %/Gpulse

// 50 kpulse/s for 14 days, and the rates that lose a tenth by then:
// arithmetic.
func TestCollectorChecks(t *testing.T) {
	pulses := units.PulseCount(50e3 * 14 * 86400)
	near.Rel(t, "pulses", float64(pulses)/gigapulse, 60.48, 1e-15)
	near.Rel(t, "linear rate", 0.1/float64(pulses)/perGpulse, 0.1653, 3e-4)
	near.Rel(t, "exponential rate", -math.Log(0.9)/float64(pulses)/perGpulse, 0.1742, 3e-4)
	near.Rel(t, "linear loss", sound[units.Ratio](t)(euv.CollectorLoss(0.1653*perGpulse, pulses, euv.Linear)), 0.1, 3e-4)
	near.Rel(t, "exponential loss", sound[units.Ratio](t)(euv.CollectorLoss(0.1742*perGpulse, pulses, euv.Exponential)), 0.1, 3e-4)
}

// A loss of many small steps, pulse by pulse.
func TestCollectorLossStepByStep(t *testing.T) {
	const steps = 1000000
	for _, wear := range []float64{1e-9, 0.01, 0.1, 0.9} {
		each := wear / steps
		log := 0.0
		linear := 0.0
		for range steps {
			linear += each
			log += math.Log1p(-each)
		}
		near.Rel(t, "linear", sound[units.Ratio](t)(euv.CollectorLoss(units.PulseLoss(each), steps, euv.Linear)), linear, 1e-9)
		near.Rel(t, "exponential", sound[units.Ratio](t)(euv.CollectorLoss(units.PulseLoss(each), steps, euv.Exponential)), -math.Expm1(log), 1e-6)
	}
}

// The mean over life is the integral of what is left.
func TestCollectorLifeAverageIsTheMean(t *testing.T) {
	for _, model := range []euv.LossModel{euv.Linear, euv.Exponential} {
		for _, wear := range []float64{0, 1e-12, 1e-6, 0.03, 0.1, 0.5, 1} {
			const life = 60.48 * gigapulse
			rate := units.PulseLoss(wear / life)
			mean := midpoints(0, life, func(n float64) float64 {
				return 1 - sound[units.Ratio](t)(euv.CollectorLoss(rate, units.PulseCount(n), model))
			}) / life
			near.Rel(t, model.String(), sound[units.Ratio](t)(euv.CollectorLifeAverage(rate, life, model)), mean, 1e-9)
		}
	}
	// small wear keeps its digits: 1 − x/2 + x²/6
	const x = 1e-9
	got := sound[units.Ratio](t)(euv.CollectorLifeAverage(x, 1, euv.Exponential))
	near.Abs(t, "small wear", (1-got)/x, 0.5, 1e-6)
	near.Rel(t, "all of it", sound[units.Ratio](t)(euv.CollectorLoss(0.07, 1/0.07, euv.Linear)), 1, 0)
	near.Rel(t, "long gone", sound[units.Ratio](t)(euv.CollectorLifeAverage(1, 1e6, euv.Exponential)), 1e-6, 1e-15)
}

func TestLossModelWords(t *testing.T) {
	for model, want := range map[euv.LossModel]string{euv.Linear: "linear", euv.Exponential: "exponential", 7: "LossModel(7)", -1: "LossModel(-1)"} {
		if got := model.String(); got != want {
			t.Errorf("got %s, want %s", got, want)
		}
	}
}
