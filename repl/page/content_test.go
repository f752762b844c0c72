package page

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
)

// Every page of the examples, of the golden session and of a session with all
// kinds of pictures is sound, and holds nothing from outside.
func TestPagesAreSound(t *testing.T) {
	names, err := filepath.Glob("../../examples/*/*.budget")
	if err != nil || len(names) < 5 {
		t.Fatalf("%d example sessions (%v)", len(names), err)
	}
	pages := map[string][]byte{"pictures": paged(t, pictures(), "day.budget")}
	for _, name := range append(names, "testdata/small.budget") {
		pages[name] = paged(t, os.DirFS(filepath.Dir(name)), filepath.Base(name))
	}
	for name, page := range pages {
		t.Run(filepath.Base(name), func(t *testing.T) {
			d := read(t, page)
			d.sound(t)
			for _, word := range []string{"http://", "https://", "@import", "url(", "<script"} {
				if bytes.Contains(page, []byte(word)) {
					t.Errorf("the page holds %s", word)
				}
			}
		})
	}
}

// pictures is a session with a chart, a map and a histogram, each of them asked
// for in another way.
func pictures() fstest.MapFS {
	return fstest.MapFS{"day.budget": {Data: []byte(strings.Join([]string{
		"a = 3 W ± 1 %",
		"propagate a*2 : trials = 2000, plot",
		"sweep x = 1 .. 5 9 points : x, x^2 plot",
		"sweep x = 1 .. 5 9 points, y = 1 .. 5 9 points : x*y to \"map.svg\"",
		"sweep x = 1 .. 5 9 points : x^3 to \"curve.png\"",
		"sweep x = 1 .. 5 9 points : x^4 to \"table.csv\"",
		"sweep x = 1 .. 5 9 points : x/0 plot",
	}, "\n"))}}
}

func TestPictures(t *testing.T) {
	d := read(t, paged(t, pictures(), "day.budget"))
	want := []string{"Distribution of a*2 / W", "x, x^2 over x", "x*y over x and y", "x^3 over x"}
	if got := d.text("figcaption"); !slices.Equal(got, want) {
		t.Errorf("pictures are %q, want %q", got, want)
	}
	var titles, descriptions []string
	for _, e := range d.elements {
		if e.parent != nil && e.parent.name == "svg" && e.name == "title" {
			titles = append(titles, e.words.String())
		}
		if e.name == "desc" {
			descriptions = append(descriptions, e.words.String())
		}
	}
	if !slices.Equal(titles, want) {
		t.Errorf("the pictures' titles are %q, want %q", titles, want)
	}
	if got, want := descriptions[1], "x runs from 1 to 5. x goes from 1 to 5. x^2 goes from 1 to 25."; got != want {
		t.Errorf("a picture is described as %q, want %q", got, want)
	}
	if n := len(d.all("image")); n == 0 {
		t.Error("a map without its colours")
	}
	if paths := len(d.all("path")); paths < 20 {
		t.Errorf("%d lines in four pictures", paths)
	}
	if notes := d.text(".note"); len(notes) != 2 || !strings.Contains(notes[0], "division by zero") || !strings.Contains(notes[1], "no picture") {
		t.Errorf("what has no values is noted as %q", notes)
	}
	// What a picture or a file holds is folded; the last table has neither.
	want = []string{"9 rows", "81 rows", "9 rows", "9 rows"}
	if got := d.text("summary"); !slices.Equal(got, want) {
		t.Errorf("folded are %q, want %q", got, want)
	}
}

// The words of a picture do not make a page: what is not a known element is an
// error, what is not a known attribute goes, and text is escaped.
func TestForeignDrawings(t *testing.T) {
	for svg, want := range map[string]string{
		`<svg viewBox="0 0 1 1" onload="x()" width="9"><path d="M0" onclick="x()" style="fill:#000"/></svg>`: `<svg viewBox="0 0 1 1" role="img" aria-labelledby="L1-t L1-d"><title id="L1-t">a&lt;b&gt;</title><desc id="L1-d">&#34;</desc><path d="M0" style="fill:#000"></path></svg>`,
		`<svg><text x="&quot;>">&lt;b>&amp;</text></svg>`:                                                    `<svg role="img" aria-labelledby="L1-t L1-d"><title id="L1-t">a&lt;b&gt;</title><desc id="L1-d">&#34;</desc><text x="&#34;&gt;">&lt;b&gt;&amp;</text></svg>`,
		`<svg><script>x()</script></svg>`:                                                                    "",
		`<svg><foreignObject/></svg>`:                                                                        "",
		`<svg><image href="https://example.com/a.png"/></svg>`:                                               "",
		`<svg xmlns:x="u"><image x:href="data:text/html,x"/></svg>`:                                          "",
		`<svg><g></svg>`: "",
	} {
		got, err := inline([]byte(svg), "L1", "a<b>", `"`)
		if string(got) != want || (err == nil) == (want == "") {
			t.Errorf("%s becomes\n%s (%v), want\n%s", svg, got, err, want)
		}
	}
}

// Every name leads to the line that defined it when the statement was said.
func TestLinks(t *testing.T) {
	files := fstest.MapFS{
		"lib/a.budget": {Data: []byte("# c\nk = 2\nimport \"b.budget\"\ng(x) = x * k")},
		"lib/b.budget": {Data: []byte("m = 3")},
		"day.budget": {Data: []byte(strings.Join([]string{
			"import \"lib/a.budget\"",           // 1
			"n = k * m",                         // 2
			"n + g(n)",                          // 3
			"n = 7",                             // 4: another n
			"n",                                 // 5
			"h(n, y) = n * y * k",               // 6: its own n
			"sweep n = 1 .. 3 by 1 : h(n, 2)",   // 7
			"W = 5",                             // 8
			"5 W / W",                           // 9: a unit and a name
			"case low : n = 1",                  // 10
			"compare n : base, low",             // 11
			"chain low",                         // 12: the name of a case too
			"  at IF",                           //
			"  mirror x(n): 1 / W  # n and W",   //
			"  at WAFER",                        //
			"end",                               //
			"walk low 5 W at IF",                // 17
			"material quartz = SiO2 2.2 g/cm^3", // 18
			"stack s",                           // 19
			"  cap: quartz 2 nm",                //
			"  substrate: Si",                   //
			"end",                               //
			"transmittance(quartz, 13.5 nm)",    // 23
			"forget s",                          // 24
			"s",                                 // 25: no more
			"why k",                             // 26
			"throughput = 3",                    // 27: also a function of the catalogue
			"throughput * sqrt(throughput)",     // 28
			"check n = m within 50 % # n is 7",  // 29
			"n + undefined_name",                // 30: refused, and n is known
			"budget n",                          // 31
		}, "\n"))},
	}
	want := map[int]string{
		2: "k>c2-2 m>c1-1", 3: "n>L2 g>c2-4 n>L2", 5: "n>L4", 6: "k>c2-2", 7: "n>L4 h>L6 n>L4", 9: "W>L8", 10: "n>L4", 11: "n>L4 low>L10",
		12: "n>L4 W>L8", 17: "low>L12", 19: "quartz>L18", 23: "quartz>L18", 24: "s>L19", 26: "k>c2-2", 28: "throughput>L27 throughput>L27",
		29: "n>L4 m>c1-1", 30: "n>L4", 31: "n>L4",
	}
	d := read(t, paged(t, files, "day.budget"))
	d.sound(t)
	got := map[string]string{}
	for _, e := range d.all("a") {
		if e.attr["class"] == "" && e.parent.name == "code" || e.parent.name == "mark" {
			for up := e.parent; up != nil; up = up.parent {
				if id := up.attr["id"]; id != "" {
					got[id] = strings.TrimSpace(got[id] + " " + e.words.String() + ">" + e.attr["href"][1:])
					break
				}
			}
		}
	}
	if s := got["c2-4"]; s != "k>c2-2" {
		t.Errorf("a convention links to %q, want its own file", s)
	}
	for line := 1; line <= 31; line++ {
		if s := got[fmt.Sprintf("L%d", line)]; s != want[line] {
			t.Errorf("line %d links to %q, want %q", line, s, want[line])
		}
	}
	if dfn := strings.Join(d.text("dfn"), " "); dfn != "n n h W low low quartz s throughput m k g" {
		t.Errorf("defined are %s", dfn)
	}
}

// Notes become title, headings and paragraphs.
func TestNotes(t *testing.T) {
	lines := []string{
		"# A title that", "# goes on below", "# Then a paragraph", "# of two lines", "#", "# and another.", "",
		"# 1. A question", "# Why: a reason", "1", "# plain", "2", "# 1.1) Below it", "# 3.5 W is no heading", "# 2) Another", "# in two lines", "# 12 wafers are none",
	}
	d := read(t, paged(t, session(lines...), "day.budget"))
	d.sound(t)
	for name, want := range map[string]string{
		"h1":    "A title that goes on below",
		"h2":    "Contents|1. A question",
		"h3":    "1.1) Below it",
		".text": "Then a paragraph of two lines|and another.|Why: a reason|plain|3.5 W is no heading 2) Another in two lines 12 wafers are none",
		"li":    "1. A question|1.1) Below it",
		"title": "A title that goes on below",
	} {
		if got := strings.Join(d.text(name), "|"); got != want {
			t.Errorf("%s: %q, want %q", name, got, want)
		}
	}
	// A heading below none is one of the second level; what is said first makes
	// the file's name the title.
	d = read(t, paged(t, session("1", "# 1.1. Below nothing", "# A note"), "day.budget"))
	d.sound(t)
	if got := strings.Join(append(d.text("h1"), d.text("h2")...), "|"); got != "day.budget|Contents|1.1. Below nothing" {
		t.Errorf("headings %q", got)
	}
}

// Checks and refusals are told by words and marks, not by colour alone.
func TestVerdictsInWords(t *testing.T) {
	d := read(t, paged(t, session("check 2 > 1", "check 1 > 2", "1 nm + 1 s", "1 +", "5 nm", "| 6 nm", "5 nm", "| 5.0 nm"), "day.budget"))
	d.sound(t)
	for name, want := range map[string]string{
		".holds":   "✓ holds: 2 > 1",
		".fails":   "✗ fails: 1 > 2",
		"mark":     "1 nm|1 s|",
		".moved":   "moved: the file records another reply\n6 nm",
		".tally":   "day.budget · 6 statements · 1 check holds · 1 check fails · 2 statements refused · 1 reply is not the recorded one",
		".value":   "5 nm|5 nm",
		".formula": "check 2 > 1|check 1 > 2|1 nm + 1 s|1 +|5 nm|5 nm",
	} {
		if got := strings.Join(d.text(name), "|"); got != want && strings.TrimSpace(got) != want {
			t.Errorf("%s: %q, want %q", name, got, want)
		}
	}
	for _, text := range d.text(".refused") {
		if !strings.HasPrefix(text, "refused: ") {
			t.Errorf("a refusal reads %q", text)
		}
	}
}
