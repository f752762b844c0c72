package euv_test

import (
	"encoding/json"
	"math"
	"os"
	"testing"

	"example.com/dosewright/euv"
	"example.com/dosewright/internal/near"
	"example.com/dosewright/units"
)

// braggCase is case 82 or 85 of the computed optics cases: molybdenum and
// silicon from the tables of B. L. Henke, E. M. Gullikson, J. C. Davis, At.
// Data Nucl. Data Tables 54, 181 (1993), by an independent implementation.
func braggCase[In, Out any](t *testing.T, id int) (in In, out Out) {
	raw, err := os.ReadFile("../testdata/optics-cases.json")
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Cases []struct {
			ID              int
			Inputs, Outputs json.RawMessage
		}
	}
	if err := json.Unmarshal(raw, &file); err != nil {
		t.Fatal(err)
	}
	for _, c := range file.Cases {
		if c.ID != id {
			continue
		}
		if err := json.Unmarshal(c.Inputs, &in); err != nil {
			t.Fatal(err)
		}
		if err := json.Unmarshal(c.Outputs, &out); err != nil {
			t.Fatal(err)
		}
		return in, out
	}
	t.Fatalf("no case %d", id)
	return in, out
}

type braggPeak struct {
	MeanDelta   units.Ratio `json:"mean_delta"`
	Period      float64     `json:"bragg_period_nm"`
	Uncorrected float64     `json:"bragg_period_uncorrected_nm"`
}

func TestBraggPeriodOfCase82(t *testing.T) {
	in, out := braggCase[struct {
		Wavelength float64 `json:"wavelength_nm"`
	}, braggPeak](t, 82)
	wavelength := units.Length(in.Wavelength * nanometre)
	near.Rel(t, "period", sound[units.Length](t)(euv.BraggPeriod(wavelength, 0, 1, out.MeanDelta)), out.Period*nanometre, 1e-14)
	near.Rel(t, "kinematic", sound[units.Length](t)(euv.BraggPeriod(wavelength, 0, 1, 0)), out.Uncorrected*nanometre, 1e-14)
}

func TestBraggPeriodOfCase85(t *testing.T) {
	_, peak := braggCase[struct{}, braggPeak](t, 82)
	in, out := braggCase[struct {
		Wavelength float64   `json:"wavelength_nm"`
		Angles     []float64 `json:"angle_from_normal_deg"`
	}, struct {
		Periods []float64 `json:"bragg_period_nm"`
	}](t, 85)
	for i, degrees := range in.Angles {
		angle := units.Angle(degrees * math.Pi / 180)
		d := units.Length(sound[units.Length](t)(euv.BraggPeriod(units.Length(in.Wavelength*nanometre), angle, 1, peak.MeanDelta)))
		near.Rel(t, "period", float64(d), out.Periods[i]*nanometre, 1e-14)
		back := sound[units.Length](t)(euv.BraggWavelength(d, angle, 1, peak.MeanDelta))
		near.Rel(t, "wavelength", back, in.Wavelength*nanometre, 1e-14)
	}
}

// The phase between waves from neighbouring periods, by the refracted path: it
// must be the order times 2π.
func TestBraggPhase(t *testing.T) {
	for _, c := range []struct {
		degrees float64
		order   units.Count
		delta   units.Ratio
	}{{0, 1, 0}, {6, 1, 0.03}, {20, 2, 0.031}, {45, 3, 0.1}, {75, 1, 0.03}, {30, 1, -0.002}} {
		d := sound[units.Length](t)(euv.BraggPeriod(13.5e-9, units.Angle(c.degrees*math.Pi/180), c.order, c.delta))
		n := 1 - float64(c.delta)
		inner := math.Asin(math.Sin(c.degrees*math.Pi/180) / n)
		near.Rel(t, "phase", 2*n*d*math.Cos(inner)/13.5e-9, float64(c.order), 1e-13)
	}
}

func TestBraggPeriodNearGrazing(t *testing.T) {
	// cos(90° − 1e-7) is 1e-7 to first order; sin² alone would lose it
	d := sound[units.Length](t)(euv.BraggPeriod(13.5e-9, math.Pi/2-1e-7, 1, 0))
	near.Rel(t, "period", d, 13.5e-9/2e-7, 1e-8)
}
