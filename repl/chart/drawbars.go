package chart

import (
	"image/color"
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

var (
	insideTone  = color.RGBA{0x7d, 0xa7, 0xd2, 0xff} // bars within the interval
	outsideTone = color.RGBA{0xdd, 0xe6, 0xf0, 0xff}
	limitLine   = draw.LineStyle{Color: ink, Width: 0.8, Dashes: []vg.Length{4, 2.5}}
)

// drawBars draws a histogram: darker within the coverage interval, which is
// measured above the bars.
func drawBars(c draw.Canvas, f frame, b *bars) {
	framed(c, f, 0, mesh{}, plotter(func(c draw.Canvas) {
		const columns = 1000
		whole := thin(b.outline(math.Inf(-1), math.Inf(1)), columns)
		c.FillPolygon(outsideTone, path(c, whole))
		if b.marked {
			c.FillPolygon(insideTone, path(c, thin(b.outline(b.low, b.high), columns)))
		}
		c.StrokeLines(draw.LineStyle{Color: ink, Width: 0.8}, path(c, whole))
		if b.marked {
			drawLimits(c, b)
		}
	}))
}

// drawLimits draws the limits and, between them, a measure with the numbers.
func drawLimits(c draw.Canvas, b *bars) {
	left, right := c.X(b.low), c.X(b.high)
	y := c.Y(0.94)
	c.StrokeLine2(limitLine, left, c.Min.Y, left, y+4)
	c.StrokeLine2(limitLine, right, c.Min.Y, right, y+4)
	c.StrokeLine2(thinLine, left, y, right, y)
	style := letters(tickSize)
	half := style.Width(b.limits)/2 + 3
	middle := min(max((left+right)/2, c.Min.X+half), c.Max.X-half)
	plate(c, vg.Point{X: middle, Y: y}, half, color.White)
	write(c, style, vg.Point{X: middle, Y: y}, b.limits)
}

// plate is the ground of a word, so that it reads over a line.
func plate(c draw.Canvas, at vg.Point, half vg.Length, ground color.Color) {
	const rise = tickSize/2 + 1
	c.FillPolygon(ground, []vg.Point{
		{X: at.X - half, Y: at.Y - rise},
		{X: at.X + half, Y: at.Y - rise},
		{X: at.X + half, Y: at.Y + rise},
		{X: at.X - half, Y: at.Y + rise},
	})
}
