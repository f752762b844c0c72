package page

import (
	"bytes"
	"encoding/xml"
	"errors"
	"io"
	"strings"
	"testing"
)

// element is one element of a page, with its text and that of all inside.
type element struct {
	name   string
	attr   map[string]string
	words  strings.Builder
	parent *element
}

// document is a page as a test reads it, in the order of the text.
type document struct{ elements []*element }

// read takes a page apart. A page is written so that it is XML too, which makes
// the strict reader of the standard library a judge of its form.
func read(t testing.TB, page []byte) *document {
	t.Helper()
	rest, ok := bytes.CutPrefix(page, []byte("<!DOCTYPE html>\n"))
	if !ok {
		t.Fatalf("the page begins with %.40q", page)
	}
	d := &document{}
	var open *element
	for r := xml.NewDecoder(bytes.NewReader(rest)); ; {
		token, err := r.Token()
		if errors.Is(err, io.EOF) {
			return d
		}
		if err != nil {
			t.Fatalf("the page is not well formed: %v", err)
		}
		switch x := token.(type) {
		case xml.StartElement:
			open = &element{name: x.Name.Local, attr: map[string]string{}, parent: open}
			for _, a := range x.Attr {
				if _, twice := open.attr[a.Name.Local]; twice {
					t.Errorf("%s has %s twice", open.name, a.Name.Local)
				}
				open.attr[a.Name.Local] = a.Value
			}
			d.elements = append(d.elements, open)
		case xml.EndElement:
			open = open.parent
		case xml.CharData:
			for e := open; e != nil; e = e.parent {
				e.words.Write(x)
			}
		case xml.Comment, xml.ProcInst, xml.Directive:
			t.Errorf("the page holds %T", x)
		}
	}
}

// all lists the elements of a name, or of a class with a point before it.
func (d *document) all(name string) []*element {
	var list []*element
	class, byClass := strings.CutPrefix(name, ".")
	for _, e := range d.elements {
		if e.name == name || byClass && strings.Contains(" "+e.attr["class"]+" ", " "+class+" ") {
			list = append(list, e)
		}
	}
	return list
}

// text lists what the elements of a name say.
func (d *document) text(name string) []string {
	var list []string
	for _, e := range d.all(name) {
		list = append(list, strings.TrimSpace(e.words.String()))
	}
	return list
}

// sound holds what is true of every page: unique ids, links that lead to one of
// them, headings in order, table heads, named pictures, nothing from outside,
// no script.
func (d *document) sound(t testing.TB) {
	t.Helper()
	ids := map[string]bool{}
	for _, e := range d.elements {
		if id, ok := e.attr["id"]; ok {
			if ids[id] || id == "" || strings.ContainsAny(id, " \t\n") {
				t.Errorf("the id %q is empty, not one word, or stands twice", id)
			}
			ids[id] = true
		}
	}
	level := 0
	for _, e := range d.elements {
		d.soundElement(t, e, ids)
		if len(e.name) == 2 && e.name[0] == 'h' && e.name[1] >= '1' && e.name[1] <= '6' {
			n := int(e.name[1] - '0')
			if n > level+1 || n == 1 && level > 0 {
				t.Errorf("a heading of level %d stands behind one of level %d: %s", n, level, e.words.String())
			}
			level = n
		}
	}
	if n := len(d.all("h1")); n != 1 {
		t.Errorf("%d titles", n)
	}
	if html := d.all("html"); len(html) != 1 || html[0].attr["lang"] != "en" {
		t.Error("the page does not say its language")
	}
}

func (d *document) soundElement(t testing.TB, e *element, ids map[string]bool) {
	t.Helper()
	if !strings.Contains(" html head meta title style body a header h1 h2 h3 p span nav ul li main section div pre code dfn mark details summary table thead tbody tr th td figure figcaption footer svg g path text image desc ", " "+e.name+" ") {
		t.Errorf("the page holds an element %s", e.name)
	}
	for name, value := range e.attr {
		switch {
		case strings.HasPrefix(name, "on") || name == "src" || name == "srcset" || name == "action":
			t.Errorf("%s has %s=%q", e.name, name, value)
		case name == "href" && e.name == "image" && strings.HasPrefix(value, "data:image/png;base64,"):
		case name == "href" && (!strings.HasPrefix(value, "#") || !ids[value[1:]]):
			t.Errorf("a link leads to %q, which is not on the page", value)
		case name == "aria-labelledby":
			for id := range strings.FieldsSeq(value) {
				if !ids[id] {
					t.Errorf("%s is named by %q, which is not on the page", e.name, id)
				}
			}
		case name == "style" && (strings.Contains(value, "url") || strings.Contains(value, "expression")):
			t.Errorf("%s has the style %q", e.name, value)
		}
	}
	switch e.name {
	case "th":
		if s := e.attr["scope"]; s != "col" && s != "row" {
			t.Errorf("the table head %q has the scope %q", e.words.String(), s)
		}
	case "svg":
		if e.attr["role"] != "img" || e.attr["aria-labelledby"] == "" {
			t.Error("a picture has no name")
		}
	}
}
