package chart

import (
	"math"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

const (
	titleSize vg.Length = 11
	headSize  vg.Length = 10
	tickSize  vg.Length = 9
	margin    vg.Length = 6
)

var thinLine = draw.LineStyle{Color: ink, Width: 0.6}

// plotter lets a function draw between the axes; its canvas is the unit square.
type plotter func(draw.Canvas)

// Plot draws on the part of a canvas between the axes.
func (p plotter) Plot(c draw.Canvas, _ *plot.Plot) { p(c) }

// framed draws title and axes, and between them what is given, in turn. It
// leaves so much room at the right-hand side, and returns the canvas between
// the axes.
func framed(c draw.Canvas, f frame, right vg.Length, between ...plot.Plotter) draw.Canvas {
	c = draw.Crop(c, margin, -margin-right, margin, -margin)
	p := plot.New()
	p.BackgroundColor = nil
	p.Title.TextStyle = letters(titleSize)
	p.Title.TextStyle.YAlign = draw.YTop
	p.Title.Text = fit(p.Title.TextStyle, label(f.title), c.Max.X-c.Min.X)
	p.Title.Padding = 4
	width, height := c.Max.X-c.Min.X, c.Max.Y-c.Min.Y
	axis(&p.X, fit(letters(headSize), label(f.xHead), width))
	axis(&p.Y, fit(letters(headSize), label(f.yHead), height))
	p.X.Tick.Label.XAlign, p.X.Tick.Label.YAlign = draw.XCenter, draw.YTop
	p.Y.Tick.Label.XAlign, p.Y.Tick.Label.YAlign = draw.XRight, draw.YCenter
	p.X.Tick.Marker = marks(f.x, f.x.fitting(7, float64(width)*0.7, labelWidth))
	p.Y.Tick.Marker = marks(f.y, f.y.ticks(6))
	p.Add(between...)
	p.Add(plotter(outline))
	p.Draw(c)
	return p.DataCanvas(c)
}

// axis sets the style of an axis from 0 to 1.
func axis(a *plot.Axis, head string) {
	a.Min, a.Max = 0, 1
	a.Padding = 0
	a.LineStyle.Width = 0 // the outline stands there
	a.Label.Text = head
	a.Label.TextStyle = letters(headSize)
	a.Label.Padding = 3
	a.Tick.Label = letters(tickSize)
	a.Tick.LineStyle = thinLine
	a.Tick.Length = 5
}

// marks places ticks on an axis from 0 to 1.
func marks(s span, ticks []tick) plot.ConstantTicks {
	out := make(plot.ConstantTicks, len(ticks))
	for i, t := range ticks {
		out[i] = plot.Tick{Value: math.Min(math.Max(s.at(t.value), 0), 1), Label: t.label}
	}
	return out
}

func labelWidth(s string) float64 { return float64(letters(tickSize).Width(s)) }

// mesh draws faint lines from the labelled ticks.
type mesh struct{}

// Plot draws on the part of a canvas between the axes of p.
func (mesh) Plot(c draw.Canvas, p *plot.Plot) {
	style := draw.LineStyle{Color: faint, Width: 0.5}
	for _, m := range p.X.Tick.Marker.Ticks(0, 1) {
		if !m.IsMinor() {
			c.StrokeLine2(style, c.X(m.Value), c.Min.Y, c.X(m.Value), c.Max.Y)
		}
	}
	for _, m := range p.Y.Tick.Marker.Ticks(0, 1) {
		if !m.IsMinor() {
			c.StrokeLine2(style, c.Min.X, c.Y(m.Value), c.Max.X, c.Y(m.Value))
		}
	}
}

func outline(c draw.Canvas) {
	lo, hi := c.Min, c.Max
	c.StrokeLines(thinLine, []vg.Point{lo, {X: hi.X, Y: lo.Y}, hi, {X: lo.X, Y: hi.Y}, lo})
}

// path takes points of the unit square to the canvas.
func path(c draw.Canvas, points []point) []vg.Point {
	out := make([]vg.Point, len(points))
	for i, p := range points {
		out[i] = vg.Point{X: c.X(p.x), Y: c.Y(p.y)}
	}
	return out
}

// write puts a word with the middle of its line at a point.
func write(c draw.Canvas, style text.Style, at vg.Point, s string) {
	style.YAlign = draw.YCenter
	at.Y += style.FontExtents().Descent
	c.FillText(style, at, s)
}
