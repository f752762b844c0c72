package chart

import (
	"bytes"
	"errors"
	"image/color"
	"image/png"
	"io"
	"math"
	"strconv"
	"strings"
	"sync"
	"testing"

	"example.com/dosewright/repl"
)

// TestHeads finds title, heads and names of curves in the drawings.
func TestHeads(t *testing.T) {
	cases := map[string][]string{
		"family5":  {"Transmission of a film", "thickness / nm", "transmission", "α = 5 µm^-1", "100"},
		"decades":  {"pressure / Pa", "rate / s^-1", "0.001", "1e-8", "first", "second"},
		"hill":     {"defocus / nm", "dose / (mJ/cm²)", "width / nm", "17", "22", "-50"},
		"bell":     {"density / (cm²/mJ)", "dose / (mJ/cm²)", "27.06 to 32.94", "0.2"},
		"small":    {"1.5e19", "2.0e-9"},
		"close":    {"13.500014"},
		"constant": {"250"},
	}
	all := samples()
	for name, words := range cases {
		d := drawn(t, all[name])
		for _, w := range words {
			if !d.says(w) {
				t.Errorf("%s: %q is missing among %q", name, w, d.words)
			}
		}
	}
}

// TestCurveCount finds one stroke per run of each curve, and a dot for a
// point that stands alone.
func TestCurveCount(t *testing.T) {
	d := drawn(t, family(MaxCurves))
	for i := range MaxCurves {
		if n := d.strokesOf(i); n != 2 { // the curve and its sample
			t.Errorf("curve %d is drawn in %d strokes, want 2", i, n)
		}
	}
	all := samples()
	if n := drawn(t, all["spectrum"]).strokesOf(0); n != 2 {
		t.Errorf("a curve with one gap is drawn in %d strokes, want 2", n)
	}
	round := 0
	for _, data := range drawn(t, all["gaps"]).data {
		if strings.Contains(data, "A") {
			round++
		}
	}
	if round != 2 {
		t.Errorf("%d dots stand for two points between gaps", round)
	}
}

// TestMapParts finds the tones of map and colour bar, and a line for each
// level on both.
func TestMapParts(t *testing.T) {
	p := hill(41, 31)
	d := drawn(t, p)
	if d.images != 2 {
		t.Errorf("%d images, want the map and its colour bar", d.images)
	}
	lines := 0
	for _, style := range d.paths {
		if strings.Contains(style, "stroke-width:0.7") {
			lines++
		}
	}
	_, grid, err := fieldOf(p)
	if err != nil {
		t.Fatal(err)
	}
	if levels := len(grid.span.ticks(8)); lines < 2*levels {
		t.Errorf("%d lines for %d levels on map and bar", lines, levels)
	}
}

// TestPNG finds the colours of each picture inside its axes.
func TestPNG(t *testing.T) {
	all := samples()
	for name, want := range map[string]color.RGBA{
		"family5": curveColours[4], "one-point": curveColours[0], "constant": curveColours[0],
		"bell": insideTone, "hill": tones()[tone(0.5)],
	} {
		var b bytes.Buffer
		if err := Draw(all[name], "png", &b); err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		img, err := png.Decode(&b)
		if err != nil {
			t.Fatalf("%s: %v", name, err)
		}
		size, count := img.Bounds().Size(), 0
		for y := size.Y / 10; y < size.Y*8/10; y++ {
			for x := size.X / 5; x < size.X*3/4; x++ {
				if color.RGBAModel.Convert(img.At(x, y)) == want {
					count++
				}
			}
		}
		if count < 30 {
			t.Errorf("%s: %d dots of %v inside the axes", name, count, want)
		}
	}
}

// TestBlank leaves the paper white where a map has no value.
func TestBlank(t *testing.T) {
	p := hill(41, 31)
	for _, row := range p.Grid.Z {
		for i := range row {
			if i > 20 {
				row[i] = math.NaN()
			}
		}
	}
	var b bytes.Buffer
	if err := Draw(p, "png", &b); err != nil {
		t.Fatal(err)
	}
	img, err := png.Decode(&b)
	if err != nil {
		t.Fatal(err)
	}
	size := img.Bounds().Size()
	white := color.RGBA{0xff, 0xff, 0xff, 0xff}
	if c := color.RGBAModel.Convert(img.At(size.X*3/4, size.Y/2)); c != white {
		t.Errorf("a blank place is %v", c)
	}
	if c := color.RGBAModel.Convert(img.At(size.X/4, size.Y/2)); c == white {
		t.Error("a place with a value is white")
	}
}

// TestSameBytes draws pictures twice at once, one of each kind as PNG.
func TestSameBytes(t *testing.T) {
	dotted := map[string]bool{"family5": true, "hill": true, "bell": true}
	for name, p := range samples() {
		for _, format := range []string{"svg", "png"} {
			if format == "png" && !dotted[name] {
				continue
			}
			var out [2]bytes.Buffer
			var errs [2]error
			var wait sync.WaitGroup
			for i := range out {
				wait.Go(func() { errs[i] = Draw(p, format, &out[i]) })
			}
			wait.Wait()
			if err := errors.Join(errs[:]...); err != nil {
				t.Fatalf("%s: %v", name, err)
			}
			if !bytes.Equal(out[0].Bytes(), out[1].Bytes()) {
				t.Errorf("%s.%s differs from time to time", name, format)
			}
		}
	}
}

// TestManyPoints keeps a drawing of a million points small, with its peak.
func TestManyPoints(t *testing.T) {
	s := repl.Series{Name: "noise"}
	for i := range MaxPoints {
		s.X = append(s.X, float64(i))
		s.Y = append(s.Y, math.Sin(float64(i)))
	}
	s.Y[777_777] = 50
	d := drawn(t, &repl.Picture{X: repl.Axis{Name: "x"}, Y: repl.Axis{Name: "y"}, Lines: []repl.Series{s}})
	if len(d.text) > 100_000 {
		t.Errorf("%d bytes for a million points", len(d.text))
	}
	highest := 0.0
	for i, style := range d.paths {
		if strings.Contains(style, "stroke-width:1.4") {
			for _, pair := range strings.FieldsFunc(d.data[i], func(r rune) bool { return r == 'M' || r == 'L' }) {
				_, y, _ := strings.Cut(pair, ",")
				v, err := strconv.ParseFloat(y, 64)
				if err != nil {
					t.Fatal(err)
				}
				highest = math.Max(highest, v)
			}
		}
	}
	if highest < float64(pictureHeight)*0.9 {
		t.Errorf("the peak is drawn at a height of %.0f of %.0f points", highest, float64(pictureHeight))
	}
}

// broken writes nothing.
type broken struct{}

var errBroken = errors.New("the disk is full")

func (broken) Write([]byte) (int, error) { return 0, errBroken }

func TestWriteError(t *testing.T) {
	for _, format := range []string{"svg", "png"} {
		if err := Draw(family(2), format, broken{}); !errors.Is(err, errBroken) || errors.Is(err, ErrPicture) {
			t.Errorf("%s: got %v", format, err)
		}
	}
	if err := Draw(family(2), "gif", io.Discard); !errors.Is(err, ErrPicture) {
		t.Errorf("gif: got %v", err)
	}
}
