package chart

import (
	"slices"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

const (
	sampleWidth vg.Length = 30 // of a line beside its name
	nameGap     vg.Length = 4
	nameHeight  vg.Length = 14
	dotRadius   vg.Length = 2.2
)

// drawCurves draws a chart of lines. Two curves or more are named beside it,
// in the order in which they end, the highest first.
func drawCurves(c draw.Canvas, f frame, curves []curve) {
	var right vg.Length
	if len(curves) > 1 {
		right = namesWidth(curves, (c.Max.X-c.Min.X)/3)
	}
	between := []plot.Plotter{mesh{}}
	for i, curve := range curves {
		between = append(between, plotter(func(c draw.Canvas) { drawCurve(c, curve, curveStyle(i)) }))
	}
	inner := framed(c, f, right, between...)
	if len(curves) > 1 {
		drawNames(c, inner, curves)
	}
}

// drawCurve draws the runs of a curve, a point alone as a dot.
func drawCurve(c draw.Canvas, curve curve, style draw.LineStyle) {
	for _, run := range curve.runs {
		if points := path(c, run); len(points) > 1 {
			c.StrokeLines(style, points)
		} else {
			c.DrawGlyphNoClip(draw.GlyphStyle{Color: style.Color, Radius: dotRadius, Shape: draw.CircleGlyph{}}, points[0])
		}
	}
}

func nameStyle() text.Style {
	style := letters(tickSize)
	style.XAlign = draw.XLeft
	return style
}

// namesWidth is the room for the longest name, up to a limit.
func namesWidth(curves []curve, limit vg.Length) vg.Length {
	style := nameStyle()
	var width vg.Length
	for _, c := range curves {
		width = max(width, style.Width(label(c.name)))
	}
	return min(width+sampleWidth+2*nameGap, limit)
}

func drawNames(c, inner draw.Canvas, curves []curve) {
	order := make([]int, len(curves))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		switch x, y := curves[a].end(), curves[b].end(); {
		case x > y:
			return -1
		case x < y:
			return 1
		}
		return 0
	})
	style := nameStyle()
	x := inner.Max.X + nameGap + 4
	y := inner.Max.Y - nameHeight/2
	for _, i := range order {
		c.StrokeLine2(curveStyle(i), x, y, x+sampleWidth, y)
		left := x + sampleWidth + nameGap
		write(c, style, vg.Point{X: left, Y: y}, fit(style, label(curves[i].name), c.Max.X-left))
		y -= nameHeight
	}
}
