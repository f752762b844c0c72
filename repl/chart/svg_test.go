package chart

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"strings"
	"testing"

	"example.com/dosewright/repl"
)

// drawing is what a test reads out of an SVG.
type drawing struct {
	text   []byte
	words  []string
	paths  []string // their styles
	data   []string // their points
	images int
}

// drawn draws a picture as SVG and takes it apart.
func drawn(t testing.TB, p *repl.Picture) drawing {
	t.Helper()
	var b bytes.Buffer
	if err := Draw(p, "svg", &b); err != nil {
		t.Fatalf("Draw: %v", err)
	}
	d := drawing{text: b.Bytes()}
	decoder := xml.NewDecoder(bytes.NewReader(d.text))
	for inside := ""; ; {
		token, err := decoder.Token()
		if errors.Is(err, io.EOF) {
			return d
		}
		if err != nil {
			t.Fatalf("the SVG is no XML: %v", err)
		}
		switch e := token.(type) {
		case xml.StartElement:
			inside = e.Name.Local
			d.element(e)
		case xml.CharData:
			if inside == "text" && strings.TrimSpace(string(e)) != "" {
				d.words = append(d.words, string(e))
			}
		}
	}
}

func (d *drawing) element(e xml.StartElement) {
	attributes := map[string]string{}
	for _, a := range e.Attr {
		attributes[a.Name.Local] = a.Value
	}
	switch e.Name.Local {
	case "path":
		d.paths = append(d.paths, attributes["style"])
		d.data = append(d.data, attributes["d"])
	case "image":
		d.images++
	}
}

func (d drawing) says(word string) bool {
	for _, w := range d.words {
		if w == word {
			return true
		}
	}
	return false
}

// strokesOf counts the paths in the style of curve i.
func (d drawing) strokesOf(i int) int {
	c := curveColours[i]
	colour := fmt.Sprintf("stroke:#%02X%02X%02X", c.R, c.G, c.B)
	n := 0
	for _, style := range d.paths {
		if strings.Contains(style, colour) && strings.Contains(style, "stroke-width:1.4") {
			n++
		}
	}
	return n
}
