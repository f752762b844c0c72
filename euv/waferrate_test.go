package euv

import (
	"testing"

	"gonum.org/v1/gonum/stat"

	"example.com/dosewright/internal/near"
)

// Check 27: throughput against dose gives the overhead and the time per dose by
// least squares. Source: the figures of the check are a published curve, the
// line through them is computed; below also by the normal equations.
func TestOverheadFromThroughputs(t *testing.T) {
	dose := []float64{20, 25, 30, 40, 50}        // mJ/cm²
	seconds := []float64{172, 151, 137, 113, 97} // wafer/h, turned to s/wafer
	for i, perHour := range seconds {
		seconds[i] = 3600 / perHour
	}
	overhead, slope := stat.LinearRegression(dose, seconds, nil, false)
	near.Abs(t, "overhead", overhead, 10.24, 0.005)
	near.Abs(t, "slope", slope, 0.538, 0.0005)

	var n, x, y, xx, xy float64
	for i := range dose {
		n, x, y = n+1, x+dose[i], y+seconds[i]
		xx, xy = xx+dose[i]*dose[i], xy+dose[i]*seconds[i]
	}
	near.Rel(t, "slope by the normal equations", slope, (n*xy-x*y)/(n*xx-x*x), 1e-12)
	near.Rel(t, "overhead by the normal equations", overhead, (xx*y-x*xy)/(n*xx-x*x), 1e-12)
}
