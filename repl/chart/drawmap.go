package chart

import (
	"image"
	"image/color"
	"math"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// The colour bar stands beside the map, then a short mark and the number at
// each level, then the head.
const (
	barGap   vg.Length = 12
	barWidth vg.Length = 12
	markGap  vg.Length = 5
	headGap  vg.Length = 6
)

// drawMap draws a grid in tones, with contour lines at the numbers of the
// colour bar beside it.
func drawMap(c draw.Canvas, f frame, grid *field) {
	palette := tones()
	levels := grid.span.ticks(8)
	numbers := numbersWidth(levels)
	inner := framed(c, f, barGap+barWidth+markGap+numbers+headGap+letters(headSize).Height("x"),
		plotter(func(c draw.Canvas) { shade(c, grid, palette) }),
		plotter(func(c draw.Canvas) { drawContours(c, grid, levels, palette) }))
	left := inner.Max.X + barGap
	bar := draw.Canvas{Canvas: c.Canvas, Rectangle: vg.Rectangle{
		Min: vg.Point{X: left, Y: inner.Min.Y}, Max: vg.Point{X: left + barWidth, Y: inner.Max.Y},
	}}
	drawScale(bar, grid.span, levels, palette)
	head := letters(headSize)
	head.YAlign, head.Rotation = draw.YTop, math.Pi/2
	at := vg.Point{X: bar.Max.X + markGap + numbers + headGap, Y: bar.Center().Y}
	c.FillText(head, at, fit(letters(headSize), label(grid.head), bar.Max.Y-bar.Min.Y))
}

func numbersWidth(levels []tick) vg.Length {
	var width vg.Length
	for _, l := range levels {
		width = max(width, letters(tickSize).Width(l.label))
	}
	return width
}

// shade fills the canvas with one dot of colour per dot of the picture.
func shade(c draw.Canvas, grid *field, palette []color.RGBA) {
	const perPoint = dotsPerInch / 72.0
	size := c.Size()
	columns := spots(grid.xs, int(math.Round(float64(size.X)*perPoint)))
	rows := spots(grid.ys, int(math.Round(float64(size.Y)*perPoint)))
	colours := color.Palette{color.RGBA{}} // blank, without ink
	for _, t := range palette {
		colours = append(colours, t)
	}
	img := image.NewPaletted(image.Rect(0, 0, len(columns), len(rows)), colours)
	for j, row := range rows {
		for i, column := range columns {
			if z := grid.value(column, row); !math.IsNaN(z) {
				img.SetColorIndex(i, len(rows)-1-j, uint8(1+tone(grid.span.at(z))))
			}
		}
	}
	c.DrawImage(c.Rectangle, img)
}

// levelLine is a line that shows against the tone around it.
func levelLine(at float64) draw.LineStyle {
	if at < 0.5 {
		return draw.LineStyle{Color: color.White, Width: 0.7}
	}
	return draw.LineStyle{Color: ink, Width: 0.7}
}

// drawScale draws the colour bar: its tones, a line and a number at each level.
func drawScale(c draw.Canvas, z span, levels []tick, palette []color.RGBA) {
	const wide = 8 // dots, so that no viewer fades the sides
	img := image.NewRGBA(image.Rect(0, 0, wide, len(palette)))
	for i, t := range palette {
		for k := range wide {
			img.SetRGBA(k, len(palette)-1-i, t)
		}
	}
	c.DrawImage(c.Rectangle, img)
	style := nameStyle()
	for _, l := range levels {
		at := z.at(l.value)
		y := c.Y(at)
		c.StrokeLine2(levelLine(at), c.Min.X, y, c.Max.X, y)
		c.StrokeLine2(thinLine, c.Max.X, y, c.Max.X+markGap-2, y)
		write(c, style, vg.Point{X: c.Max.X + markGap, Y: y}, l.label)
	}
	outline(c)
}

// drawContours draws the lines of each level, and its number on one of them.
func drawContours(c draw.Canvas, grid *field, levels []tick, palette []color.RGBA) {
	const shortest = 2 // of a line that is not a speck
	coarse := grid.coarse()
	var taken []vg.Rectangle
	for _, l := range levels {
		at := grid.span.at(l.value)
		style := levelLine(at)
		var longest []vg.Point
		for _, line := range coarse.contours(l.value) {
			points := path(c, line.points)
			if line.closed {
				points = append(points, points[0])
			}
			if length(points) > shortest {
				c.StrokeLines(style, points)
			}
			if length(points) > length(longest) {
				longest = points
			}
		}
		if box, ok := free(c, longest, l.label, taken); ok {
			taken = append(taken, box)
			middle := vg.Point{X: (box.Min.X + box.Max.X) / 2, Y: (box.Min.Y + box.Max.Y) / 2}
			plate(c, middle, (box.Max.X-box.Min.X)/2, palette[tone(at)])
			word := letters(tickSize)
			word.Color = style.Color
			write(c, word, middle, l.label)
		}
	}
}

func length(points []vg.Point) (sum vg.Length) {
	for i := 1; i < len(points); i++ {
		d := points[i].Sub(points[i-1])
		sum += vg.Length(math.Hypot(float64(d.X), float64(d.Y)))
	}
	return sum
}

// free finds a place for a word on a line: within the canvas and clear of the
// places that are taken. A line of less than five times its width gets none.
func free(c draw.Canvas, points []vg.Point, word string, taken []vg.Rectangle) (vg.Rectangle, bool) {
	const rise = tickSize/2 + 1
	half := letters(tickSize).Width(word)/2 + 2
	if length(points) < 10*half {
		return vg.Rectangle{}, false
	}
	for _, part := range []float64{0.5, 0.35, 0.65, 0.2, 0.8} {
		at := points[int(part*float64(len(points)-1))]
		box := vg.Rectangle{
			Min: vg.Point{X: at.X - half, Y: at.Y - rise},
			Max: vg.Point{X: at.X + half, Y: at.Y + rise},
		}
		fits := c.Contains(box.Min) && c.Contains(box.Max)
		for _, t := range taken {
			apart := box.Max.X < t.Min.X || t.Max.X < box.Min.X || box.Max.Y < t.Min.Y || t.Max.Y < box.Min.Y
			fits = fits && apart
		}
		if fits {
			return box, true
		}
	}
	return vg.Rectangle{}, false
}
