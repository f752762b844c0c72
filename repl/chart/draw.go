package chart

import (
	"bytes"
	"fmt"
	"io"

	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgsvg"

	"example.com/dosewright/repl"
)

// The size of a picture fits between the margins of A4. On the screen and in
// PNG it has two dots for each of 1/96 inch, about 1210 by 756 in all.
const (
	pictureWidth  = 16 * vg.Centimeter
	pictureHeight = 10 * vg.Centimeter
	dotsPerInch   = 192
)

// painter puts a checked picture on a canvas.
type painter func(draw.Canvas)

// Draw writes a picture in the format "svg" or "png". The picture holds
// curves (up to 12; a NaN or an infinity is a gap), or a grid (at least 2 by 2,
// up to a million values; what is not finite stays blank), or bars. All other
// numbers give an error with the cause [ErrPicture], such as values that a
// logarithmic axis cannot show. The drawing is the same, byte for byte, each
// time; nothing is written if there is an error.
func Draw(p *repl.Picture, format string, w io.Writer) error {
	write := writePNG
	switch format {
	case "svg":
		write = writeSVG
	case "png":
	default:
		return refuse("%q is no format: write svg or png", format)
	}
	paint, err := painterOf(p)
	if err != nil {
		return err
	}
	if err := write(paint, w); err != nil {
		return fmt.Errorf("writing the picture: %w", err)
	}
	return nil
}

// painterOf checks a picture and chooses how to draw it.
func painterOf(p *repl.Picture) (painter, error) {
	kind, err := kindOf(p)
	if err != nil {
		return nil, err
	}
	switch kind {
	case mapKind:
		f, grid, err := fieldOf(p)
		return func(c draw.Canvas) { drawMap(c, f, grid) }, err
	case barKind:
		f, b, err := barsOf(p)
		return func(c draw.Canvas) { drawBars(c, f, b) }, err
	default:
		const columns = 1000 // about the dots between the axes
		f, curves, err := curvesOf(p, columns)
		return func(c draw.Canvas) { drawCurves(c, f, curves) }, err
	}
}

// kind is what a picture holds.
type kind int

const (
	lineKind kind = iota
	mapKind
	barKind
)

// kindOf refuses a picture that holds nothing, or more than one kind.
func kindOf(p *repl.Picture) (kind, error) {
	if p == nil {
		return 0, refuse("there is nothing to draw")
	}
	switch lines, grid, bars := len(p.Lines) > 0, p.Grid != nil, p.Bars != nil; {
	case !lines && !grid && !bars:
		return 0, refuse("there is nothing to draw")
	case lines && grid || lines && bars || grid && bars:
		return 0, refuse("curves, a map and bars are drawn apart, one in a picture")
	case grid:
		return mapKind, nil
	case bars:
		return barKind, nil
	}
	return lineKind, nil
}

func writePNG(paint painter, w io.Writer) error {
	c := vgimg.NewWith(vgimg.UseWH(pictureWidth, pictureHeight), vgimg.UseDPI(dotsPerInch))
	paint(draw.New(c))
	_, err := vgimg.PngCanvas{Canvas: c}.WriteTo(w)
	return err
}

// writeSVG mends what the library writes: it names one font only, without a
// way on where that is missing; it calls a PNG inside by another name, and lets
// a viewer keep its proportions; and it begins with a note on itself.
func writeSVG(paint painter, w io.Writer) error {
	c := vgsvg.New(pictureWidth, pictureHeight)
	paint(draw.New(c))
	var b bytes.Buffer
	if _, err := c.WriteTo(&b); err != nil {
		return err
	}
	out := b.Bytes()
	if from, to := bytes.Index(out, []byte("<!--")), bytes.Index(out, []byte("-->\n")); from >= 0 && to > from {
		out = append(out[:from:from], out[to+len("-->\n"):]...)
	}
	// Words of the picture stand outside of tags, with their quotes escaped.
	out = bytes.ReplaceAll(out, []byte(`style="font-family:Liberation Sans;`),
		[]byte(`style="font-family:'Liberation Sans',Arimo,sans-serif;`))
	out = bytes.ReplaceAll(out, []byte(`xlink:href="data:image/jpg;`),
		[]byte(`preserveAspectRatio="none" xlink:href="data:image/png;`))
	_, err := w.Write(out)
	return err
}
