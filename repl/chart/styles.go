package chart

import (
	"image/color"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

var (
	ink   = color.RGBA{0x1a, 0x1a, 0x1a, 0xff} // words and frames
	faint = color.RGBA{0xe2, 0xe2, 0xe2, 0xff} // the grid behind curves
)

// curveColours are the colours of curves, dark and light in turn, all with a
// contrast of 3:1 at least against white. The second six repeat the dashes of
// the first with the other lightness, so that no two curves look alike in
// grey, or to an eye that lacks one of the three receptors.
var curveColours = [MaxCurves]color.RGBA{
	{0x0b, 0x4f, 0x9e, 0xff}, // blue
	{0xd1, 0x56, 0x1b, 0xff}, // vermilion
	{0x14, 0x5c, 0x38, 0xff}, // green
	{0xc0, 0x57, 0x9b, 0xff}, // pink
	{0x22, 0x22, 0x22, 0xff}, // black
	{0x2e, 0x8f, 0xb8, 0xff}, // sky
	{0xb8, 0x80, 0x10, 0xff}, // amber
	{0x5b, 0x1a, 0x6e, 0xff}, // purple
	{0x7f, 0x94, 0x26, 0xff}, // olive
	{0x6b, 0x15, 0x25, 0xff}, // wine
	{0x8a, 0x8a, 0x8a, 0xff}, // grey
	{0x1c, 0x3f, 0x52, 0xff}, // slate
}

// curveDashes are lengths of ink and gap in turn, in points.
var curveDashes = [MaxCurves / 2][]vg.Length{
	nil,
	{7, 3},
	{3, 2},
	{1, 1.6},
	{8, 2, 1.2, 2},
	{8, 2, 1.2, 2, 1.2, 2},
}

// curveStyle is the line of curve i.
func curveStyle(i int) draw.LineStyle {
	return draw.LineStyle{
		Color:  curveColours[i%len(curveColours)],
		Width:  1.4,
		Dashes: curveDashes[i%len(curveDashes)],
	}
}
