package page

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"html/template"
	"io"
	"slices"
	"strconv"
	"strings"

	"example.com/dosewright/repl"
	"example.com/dosewright/repl/chart"
)

// picture is a drawing inside the page, or why there is none.
type picture struct {
	SVG     template.HTML
	Caption string
	Problem string
}

// drawn draws a picture. The id sets those of its title and description apart.
func drawn(p *repl.Picture, id string) *picture {
	out := &picture{Caption: caption(p)}
	var b bytes.Buffer
	err := chart.Draw(p, "svg", &b)
	if err == nil {
		out.SVG, err = inline(b.Bytes(), id, out.Caption, description(p))
	}
	if err != nil {
		out.Problem = err.Error()
	}
	return out
}

// attributes are those of an element of a drawing that reach the page. Other
// elements do not.
func attributes(element string) (list []string, known bool) {
	switch element {
	case "svg":
		return []string{"viewBox"}, true
	case "g":
		return []string{"transform"}, true
	case "path":
		return []string{"d", "style"}, true
	case "text":
		return []string{"x", "y", "transform", "style"}, true
	case "image":
		return []string{"x", "y", "width", "height", "transform", "preserveAspectRatio", "href"}, true
	}
	return nil, false
}

// inline writes a drawing anew for the inside of a page, headed by a title and
// a description. An element that is not known is an error.
func inline(svg []byte, id, title, description string) (template.HTML, error) {
	d := xml.NewDecoder(bytes.NewReader(svg))
	var b strings.Builder
	for {
		t, err := d.Token()
		if errors.Is(err, io.EOF) {
			return template.HTML(b.String()), nil
		}
		if err != nil {
			return "", fmt.Errorf("the drawing is no XML: %w", err)
		}
		switch t := t.(type) {
		case xml.StartElement:
			if err := open(&b, t); err != nil {
				return "", err
			}
			if t.Name.Local == "svg" {
				fmt.Fprintf(&b, ` role="img" aria-labelledby="%[1]s-t %[1]s-d"><title id="%[1]s-t">%[2]s</title><desc id="%[1]s-d">%[3]s</desc>`,
					id, template.HTMLEscapeString(title), template.HTMLEscapeString(description))
			} else {
				b.WriteByte('>')
			}
		case xml.EndElement:
			b.WriteString("</" + t.Name.Local + ">")
		case xml.CharData:
			b.WriteString(template.HTMLEscapeString(string(t)))
		}
	}
}

// open writes the start of an element, without its closing mark.
func open(b *strings.Builder, e xml.StartElement) error {
	list, known := attributes(e.Name.Local)
	if !known {
		return fmt.Errorf("the drawing has an element %s, which a page does not take", e.Name.Local)
	}
	b.WriteString("<" + e.Name.Local)
	for _, a := range e.Attr {
		if !slices.Contains(list, a.Name.Local) {
			continue // sizes and namespaces, which a page sets itself
		}
		if a.Name.Local == "href" && !strings.HasPrefix(a.Value, "data:image/png;base64,") {
			return errors.New("the drawing refers to something outside")
		}
		fmt.Fprintf(b, ` %s="%s"`, a.Name.Local, template.HTMLEscapeString(a.Value))
	}
	return nil
}

// caption says in a few words what a picture shows.
func caption(p *repl.Picture) string {
	switch {
	case p.Title != "":
		return p.Title
	case p.Grid != nil:
		return p.Grid.Head + " over " + p.X.Head() + " and " + p.Y.Head()
	case p.Bars != nil:
		return "Distribution of " + p.X.Head()
	}
	var names []string
	for _, s := range p.Lines {
		names = append(names, repl.Axis{Name: s.Name, Unit: p.Y.Unit}.Head())
	}
	return strings.Join(names, ", ") + " over " + p.X.Head()
}

// description says it to who does not see the picture.
func description(p *repl.Picture) string {
	switch {
	case p.Grid != nil:
		return fmt.Sprintf("A map of %d by %d values. %s runs %s, %s %s.", len(p.Grid.X), len(p.Grid.Y), p.X.Head(), fromTo(p.Grid.X), p.Y.Head(), fromTo(p.Grid.Y))
	case p.Bars != nil:
		return fmt.Sprintf("A histogram of %d bars. %s runs %s; the interval that it marks, %s.", len(p.Bars.Density), p.X.Head(), fromTo(p.Bars.Edges), fromTo([]float64{p.Bars.Low, p.Bars.High}))
	}
	var b strings.Builder
	for i, s := range p.Lines {
		if i == 0 {
			fmt.Fprintf(&b, "%s runs %s.", p.X.Head(), fromTo(s.X))
		}
		fmt.Fprintf(&b, " %s goes %s.", repl.Axis{Name: s.Name, Unit: p.Y.Unit}.Head(), fromTo(s.Y))
	}
	return b.String()
}

// fromTo says where a row of numbers begins and ends; one that is no number is
// said to be none.
func fromTo(list []float64) string {
	if len(list) == 0 {
		return "nowhere"
	}
	say := func(v float64) string {
		if v-v != 0 {
			return "no value"
		}
		return strconv.FormatFloat(v, 'g', 4, 64)
	}
	return "from " + say(list[0]) + " to " + say(list[len(list)-1])
}
