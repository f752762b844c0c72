package chart

import (
	"bytes"
	"errors"
	"math"
	"strings"
	"testing"

	"example.com/dosewright/repl"
)

// TestRefusals holds the error of each picture that cannot be drawn; the
// sketch says the same.
func TestRefusals(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	curve := func(x, y []float64) *repl.Picture {
		return &repl.Picture{X: repl.Axis{Name: "x"}, Y: repl.Axis{Name: "y"}, Lines: []repl.Series{{Name: "c", X: x, Y: y}}}
	}
	grid := func(x, y []float64, z ...[]float64) *repl.Picture {
		return &repl.Picture{X: repl.Axis{Name: "x", Unit: "nm"}, Grid: &repl.Grid{X: x, Y: y, Z: z}}
	}
	bars := func(edges, density []float64) *repl.Picture {
		return &repl.Picture{Bars: &repl.Bars{Edges: edges, Density: density}}
	}
	logX, logY := curve([]float64{0, 1}, []float64{1, 2}), curve([]float64{1, 2}, []float64{1, -2})
	logX.X.Log, logY.Y.Log = true, true
	logBars, logMap := bell(4), hill(3, 3)
	logBars.Y.Log, logMap.X.Log = true, true
	both := family(2)
	both.Bars = bell(4).Bars
	two := []float64{1, 2}
	cases := []struct {
		p    *repl.Picture
		want string
	}{
		{nil, "nothing to draw"},
		{&repl.Picture{}, "nothing to draw"},
		{both, "drawn apart"},
		{curve(nil, nil), "no curve has a finite point"},
		{curve([]float64{nan, 1}, []float64{1, inf}), "no curve has a finite point"},
		{curve(two, two[:1]), `"c" has 2 values along the axis and 1 across`},
		{curve(two, []float64{1, 1e301}), `"y" cannot show 1e+301`},
		{family(13), "at most 12 curves, not 13"},
		{logX, `logarithmic axis "x" cannot show 0`},
		{logY, `logarithmic axis "y" cannot show -2`},
		{logMap, `logarithmic axis "defocus / nm" cannot show -80`},
		{logBars, "bars stand on zero"},
		{grid(two, two[:1], two), "not 2 and 1"},
		{grid(two, two, two), "2 rows has 1 rows"},
		{grid(two, two, two, two[:1]), "row 2 of a map has 1 values instead of 2"},
		{grid(two, two, []float64{nan, inf}, []float64{nan, nan}), "no place of the map has a value"},
		{grid([]float64{1, 2, 2}, two), `"x / nm" of a map turns at 2`},
		{grid([]float64{1, 2, 1}, two), `"x / nm" of a map turns at 1`},
		{grid([]float64{1, nan}, two), `"x / nm" of a map holds NaN`},
		{grid([]float64{1, 1 + 1e-15}, two, two, two), "lie too close together"},
		{grid(make([]float64, 1001), make([]float64, 1000)), "1001 by 1000 values is too large"},
		{bars(two, nil), "0 bars has 2 edges"},
		{bars(two, two), "2 bars has 2 edges"},
		{bars([]float64{1, 1}, []float64{1}), "edge 2 of the histogram is 1"},
		{bars(two, []float64{-1}), "bar 1 is -1"},
		{bars(two, []float64{nan}), "bar 1 is NaN"},
	}
	for _, c := range cases {
		var b bytes.Buffer
		err := Draw(c.p, "svg", &b)
		if err == nil || !errors.Is(err, ErrPicture) || !strings.Contains(err.Error(), c.want) || b.Len() > 0 {
			t.Errorf("Draw: error %v after %d bytes, want %q", err, b.Len(), c.want)
			continue
		}
		if lines := Sketch(c.p, MaxColumns); len(lines) != 1 || lines[0] != err.Error() {
			t.Errorf("Sketch: %q, want %q", lines, err)
		}
	}
}
