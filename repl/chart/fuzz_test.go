package chart

import (
	"bytes"
	"encoding/xml"
	"errors"
	"io"
	"math"
	"strings"
	"testing"
	"unicode/utf8"

	"example.com/dosewright/repl"
)

// dice makes numbers, words and pictures of bytes; it gives zeros when they
// run out.
type dice struct{ bytes []byte }

func (d *dice) next() byte {
	if len(d.bytes) == 0 {
		return 0
	}
	b := d.bytes[0]
	d.bytes = d.bytes[1:]
	return b
}

func (d *dice) number() float64 {
	b := d.next()
	switch b % 16 {
	case 0:
		return 0
	case 1:
		return math.NaN()
	case 2:
		return math.Inf(int(b) - 128)
	case 3:
		return math.Pow(10, 3*(float64(d.next())-128))
	case 4:
		return 5e-324
	case 5:
		return -math.MaxFloat64
	case 6:
		return 13.5 + 1e-14*float64(d.next())
	default:
		return float64(int(b)-100) + float64(d.next())/256
	}
}

func (d *dice) numbers() []float64 {
	out := make([]float64, d.next()%12)
	for i := range out {
		out[i] = d.number()
		if i > 0 && d.next()%4 > 0 {
			out[i] = out[i-1] + 0.25 // mostly rising, so that maps come about
		}
	}
	return out
}

func (d *dice) word() string {
	words := []string{"", "dose", "µm⁻¹", "<&\"'>", "\x00\xff\n", strings.Repeat("long ", 100), "漢字", "mJ/cm²"}
	return words[int(d.next())%len(words)]
}

func (d *dice) axis() repl.Axis {
	return repl.Axis{Name: d.word(), Unit: d.word(), Log: d.next()%4 == 0}
}

func (d *dice) picture() *repl.Picture {
	p := &repl.Picture{Title: d.word(), X: d.axis(), Y: d.axis()}
	switch d.next() % 4 {
	case 0:
		g := &repl.Grid{X: d.numbers(), Y: d.numbers(), Head: d.word()}
		for range g.Y {
			row := make([]float64, len(g.X))
			for i := range row {
				row[i] = d.number()
			}
			g.Z = append(g.Z, row)
		}
		p.Grid = g
	case 1:
		b := &repl.Bars{Edges: d.numbers(), Low: d.number(), High: d.number()}
		for range max(len(b.Edges)-1, 0) {
			b.Density = append(b.Density, math.Abs(d.number()))
		}
		p.Bars = b
	default:
		for range d.next() % 14 {
			s := repl.Series{Name: d.word(), X: d.numbers()}
			for range s.X {
				s.Y = append(s.Y, d.number())
			}
			p.Lines = append(p.Lines, s)
		}
	}
	return p
}

// FuzzPicture draws any picture: an error with its cause, or a drawing that is
// sound, in ink and in text alike.
func FuzzPicture(f *testing.F) {
	f.Add([]byte("\x01\x02\x03\x04\x05\x06\x07\x02\x03\x04\x77\x88\x99\xaa\xbb\xcc\xdd\xee\xff"))
	f.Add(bytes.Repeat([]byte{0x47, 0x90, 0x21}, 60))
	f.Add(bytes.Repeat([]byte{0xff, 0x17, 0x88, 0x09}, 100))
	for kind := range byte(4) {
		seed := append([]byte{1, 1, 1, 1, 1, 1, 1, kind}, bytes.Repeat([]byte{9, 121, 77, 200, 31, 8}, 60)...)
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, seed []byte) {
		d := &dice{seed}
		columns := 30 + int(d.next())
		dotted := d.next() == 0
		p := d.picture()
		var b bytes.Buffer
		err := Draw(p, "svg", &b)
		sketch := Sketch(p, columns)
		if err != nil {
			if !errors.Is(err, ErrPicture) || b.Len() > 0 {
				t.Fatalf("%v after %d bytes", err, b.Len())
			}
			if len(sketch) != 1 || !strings.HasPrefix(sketch[0], "no picture: ") {
				t.Fatalf("%v, but the sketch is %q", err, sketch)
			}
			return
		}
		for _, l := range sketch {
			if n := utf8.RuneCountInString(l); n > min(max(columns, MinColumns), MaxColumns) || strings.ContainsAny(l, "\n\x00") {
				t.Fatalf("%d columns: %q", columns, l)
			}
		}
		soundSVG(t, b.Bytes())
		if dotted {
			if err := Draw(p, "png", io.Discard); err != nil {
				t.Fatal(err)
			}
		}
	})
}

// soundSVG holds that a drawing is XML, and that its numbers are numbers.
func soundSVG(t *testing.T, text []byte) {
	t.Helper()
	decoder := xml.NewDecoder(bytes.NewReader(text))
	for {
		token, err := decoder.Token()
		if errors.Is(err, io.EOF) {
			return
		}
		if err != nil {
			t.Fatal(err)
		}
		e, ok := token.(xml.StartElement)
		if !ok {
			continue
		}
		for _, a := range e.Attr {
			if a.Name.Local != "href" && (strings.Contains(a.Value, "NaN") || strings.Contains(a.Value, "Inf")) {
				t.Fatalf("%s = %q", a.Name.Local, a.Value)
			}
		}
	}
}
