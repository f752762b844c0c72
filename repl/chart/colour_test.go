package chart

import (
	"image/color"
	"math"
	"slices"
	"testing"

	"example.com/dosewright/internal/near"
)

// linear are the intensities of a colour of the screen, 0…1.
func linear(c color.RGBA) (out [3]float64) {
	for i, v := range [3]uint8{c.R, c.G, c.B} {
		f := float64(v) / 255
		if f <= 0.04045 {
			out[i] = f / 12.92
		} else {
			out[i] = math.Pow((f+0.055)/1.055, 2.4)
		}
	}
	return out
}

type matrix [3][3]float64

func (m matrix) times(v [3]float64) (out [3]float64) {
	for i := range out {
		for k := range v {
			out[i] += m[i][k] * v[k]
		}
	}
	return out
}

// lab is CIELAB for the white D65. The matrix of sRGB is from memory.
func lab(rgb [3]float64) [3]float64 {
	xyz := matrix{{0.4124564, 0.3575761, 0.1804375}, {0.2126729, 0.7151522, 0.0721750}, {0.0193339, 0.1191920, 0.9503041}}.times(rgb)
	f := func(v float64) float64 {
		if v > 216./24389 {
			return math.Cbrt(v)
		}
		return (24389./27*v + 16) / 116
	}
	x, y, z := f(xyz[0]/0.95047), f(xyz[1]), f(xyz[2]/1.08883)
	return [3]float64{116*y - 16, 500 * (x - y), 200 * (y - z)}
}

func apart(a, b [3]float64) float64 {
	return math.Hypot(math.Hypot(a[0]-b[0], a[1]-b[1]), a[2]-b[2])
}

// eyes are what is seen by people who lack one receptor, after G. M. Machado,
// M. M. Oliveira and L. A. F. Fernandes, IEEE Trans. Vis. Comput. Graph. 15
// (2009) 1291, severity 1; the numbers are from memory, and each row sums to 1.
var eyes = map[string]matrix{
	"common":        {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}},
	"without red":   {{0.152286, 1.052583, -0.204868}, {0.114503, 0.786281, 0.099216}, {-0.003882, -0.048116, 1.051998}},
	"without green": {{0.367322, 0.860646, -0.227968}, {0.280085, 0.672501, 0.047413}, {-0.011820, 0.042940, 0.968881}},
	"without blue":  {{1.255528, -0.076749, -0.178779}, {-0.078411, 0.930809, 0.147602}, {0.004733, 0.691367, 0.303900}},
	"grey":          {{0.2126, 0.7152, 0.0722}, {0.2126, 0.7152, 0.0722}, {0.2126, 0.7152, 0.0722}},
}

// TestCurvesApart holds that no two curves look alike to any eye, and none is
// lost on paper. A distance of 2.3 in CIELAB is just noticed (common practice);
// 20 is asked for where the dashes are the same, 3:1 against white.
func TestCurvesApart(t *testing.T) {
	for eye, seen := range eyes {
		for _, row := range seen {
			near.Abs(t, "sum of a row", row[0]+row[1]+row[2], 1, 2e-6)
		}
		for i := range MaxCurves {
			a := curveStyle(i)
			for k := range i {
				b := curveStyle(k)
				if !slices.Equal(a.Dashes, b.Dashes) {
					continue
				}
				d := apart(lab(seen.times(linear(a.Color.(color.RGBA)))), lab(seen.times(linear(b.Color.(color.RGBA)))))
				if d < 20 {
					t.Errorf("%s: curves %d and %d are %.1f apart", eye, k, i, d)
				}
			}
		}
	}
	for i, c := range curveColours {
		l := linear(c)
		if contrast := 1.05 / (0.2126*l[0] + 0.7152*l[1] + 0.0722*l[2] + 0.05); contrast < 3 {
			t.Errorf("curve %d has a contrast of %.2f against white", i, contrast)
		}
	}
}

// TestFirstCurvesApart holds the colours of the first five curves apart by
// themselves, to the common eye and to those without red or green.
func TestFirstCurvesApart(t *testing.T) {
	for _, eye := range []string{"common", "without red", "without green"} {
		for i := range 5 {
			for k := range i {
				a, b := linear(curveColours[i]), linear(curveColours[k])
				if d := apart(lab(eyes[eye].times(a)), lab(eyes[eye].times(b))); d < 15 {
					t.Errorf("%s: curves %d and %d are %.1f apart", eye, k, i, d)
				}
			}
		}
	}
}

// TestTones holds that lightness rises evenly along the palette of maps, and
// that its steps are equal, to what a byte per colour allows: no colour lies
// outside what the screen shows.
func TestTones(t *testing.T) {
	palette := tones()
	const every = 16
	for i := every; i < len(palette); i += every {
		a, b := lab(linear(palette[i-every])), lab(linear(palette[i]))
		near.Abs(t, "rise of lightness", b[0]-a[0], 74*every/float64(toneCount-1), 0.5)
		near.Abs(t, "step", apart(a, b), math.Hypot(74, 33*215*math.Pi/180)*every/float64(toneCount-1), 0.8)
	}
	near.Abs(t, "lightness of the first", lab(linear(palette[0]))[0], 20, 0.5)
	near.Abs(t, "lightness of the last", lab(linear(palette[toneCount-1]))[0], 94, 0.5)
	for i, c := range palette {
		for eye, seen := range eyes {
			if i == 0 || i%every != 0 {
				continue
			}
			before := lab(seen.times(linear(palette[i-every])))
			if d := apart(before, lab(seen.times(linear(c)))); d < 5 {
				t.Errorf("%s: tones %d and %d are %.1f apart", eye, i-every, i, d)
			}
		}
	}
}
