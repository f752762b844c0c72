package chart

import (
	"image/color"
	"math"
)

// toneCount is the number of colours of a map.
const toneCount = 160

// tones is the palette of a map, from plum over blue and green to a light
// yellow. Its steps in CIELAB are equal: lightness rises evenly while the hue
// turns at the largest chroma that the screen shows all the way.
func tones() []color.RGBA {
	out := make([]color.RGBA, toneCount)
	for i := range out {
		part := float64(i) / (toneCount - 1)
		hue := (335 - 215*part) * math.Pi / 180
		const chroma = 33
		out[i] = fromLab(20+74*part, chroma*math.Cos(hue), chroma*math.Sin(hue))
	}
	return out
}

// tone is the number of the colour for a place on the axis of z.
func tone(at float64) int {
	return min(max(int(at*toneCount), 0), toneCount-1)
}

// fromLab is the colour of the screen (sRGB, IEC 61966-2-1) at lightness
// 0…100 and the two opponent axes of CIELAB, for the white D65. The numbers of
// both standards are from memory; a test holds them against the way back.
func fromLab(l, a, b float64) color.RGBA {
	fy := (l + 16) / 116
	x, y, z := 0.95047*cube(fy+a/500), cube(fy), 1.08883*cube(fy-b/200)
	return color.RGBA{
		screen(3.2404542*x - 1.5371385*y - 0.4985314*z),
		screen(-0.9692660*x + 1.8760108*y + 0.0415560*z),
		screen(0.0556434*x - 0.2040259*y + 1.0572252*z),
		0xff,
	}
}

func cube(f float64) float64 {
	if f > 6./29 {
		return f * f * f
	}
	return 3 * (6. / 29) * (6. / 29) * (f - 4./29)
}

// screen is the byte for a linear intensity of 0…1.
func screen(v float64) uint8 {
	v = math.Min(math.Max(v, 0), 1)
	if v <= 0.0031308 {
		v *= 12.92
	} else {
		v = 1.055*math.Pow(v, 1/2.4) - 0.055
	}
	return uint8(v*255 + 0.5)
}
