package page

import (
	"bytes"
	"strings"
	"testing"
	"testing/fstest"
)

// attacks are texts that would be markup, script, style or an end of what they
// stand in, if they were written down as they are.
func attacks() []string {
	return []string{
		`<script>x()</script>`, `</script>`, `<img src=x onerror=x()>`, `"><b>`, `' onclick='x()`, `</pre></code><b>`, `</title><b>`, `</style><b>`,
		`<!--`, `-->`, `<![CDATA[`, `]]>`, `<?php`, `&lt;b&gt;`, `&#60;b>`, `{{.Title}}`, `{{template "said" .}}`, `javascript:x()`, "`x`", `<svg onload=x()>`,
		`</desc></svg><script>`, `<\u003cb>`, `%3Cb%3E`, `</textarea>`, `*/}b{`, `</ script >`, `<b`, "a\u2028b", "\u202Eb",
	}
}

// No text of a session makes markup, wherever it stands: what is written is
// read again as words.
func TestNoTextMakesMarkup(t *testing.T) {
	for _, bad := range attacks() {
		quoted := strings.ReplaceAll(bad, `"`, `'`)
		files := fstest.MapFS{
			"day.budget": {Data: []byte(strings.Join([]string{
				"# " + bad,
				"# Then " + bad,
				"import \"a" + strings.ReplaceAll(quoted, "/", "") + ".budget\"",
				"# 1. " + bad,
				bad,
				"5 nm # " + bad,
				"a = 5 " + bad,
				bad + " = 5",
				"x = 5 nm  # " + bad,
				"why x",
				"names",
				"sweep x = 1 nm .. 9 nm 5 points : 2*x to \"" + quoted + ".svg\"",
				"data lots = \"" + quoted + "\"",
				"sweep " + bad + " = 1 .. 9 5 points : 2 plot",
				"x [" + bad + "]",
				"prefer [" + bad + "]",
				"chain " + bad,
				"chain c # " + bad,
				bad,
				"  at IF # " + bad,
				"  " + bad + ": 66 %",
				"end # " + bad,
				"help " + bad,
				"1 nm",
				"| " + bad,
			}, "\n"))},
			"a" + strings.ReplaceAll(quoted, "/", "") + ".budget": {Data: []byte("k = 1 # " + bad + "\n# " + bad)},
		}
		page := paged(t, files, "day.budget")
		d := read(t, page)
		d.sound(t)
		if strings.ContainsAny(bad, "\u2028\u202E") {
			continue // made visible instead
		}
		for _, where := range []string{"h1", ".text", ".formula", ".aside", "li", ".moved"} {
			if !strings.Contains(strings.Join(d.text(where), "\n"), strings.TrimSpace(bad)) {
				t.Errorf("%s: %s does not show it: %q", bad, where, d.text(where))
			}
		}
	}
}

// A hostile name of the session file and hostile words of the version.
func TestNoNameMakesMarkup(t *testing.T) {
	name := "a<b>&\"'{{.}}\x01.budget"
	c := configOf(fstest.MapFS{"sub/" + name: {Data: []byte("1 nm")}})
	c.Version = `<b>"1"`
	var b bytes.Buffer
	if err := Write(t.Context(), c, "sub/"+name, &b); err != nil {
		t.Fatal(err)
	}
	d := read(t, b.Bytes())
	d.sound(t)
	shown := strings.ReplaceAll(name, "\x01", "\uFFFD")
	if got := d.text("h1")[0]; got != shown {
		t.Errorf("the title is %q, want %q", got, shown)
	}
	if got := strings.Join(d.text("footer"), ""); !strings.Contains(got, c.Version) || !strings.Contains(got, shown) {
		t.Errorf("the foot reads %q", got)
	}
}

// A picture's words come from the session: heads, names of curves, and units.
func TestNoLabelMakesMarkup(t *testing.T) {
	page := paged(t, session(
		"counted lot",
		"d = 5 nm ± 1 %",
		"sweep d = 1 nm .. 9 nm 5 points : if(d < 3 nm, 1, 2), d*2 / 1 nm plot",
		"propagate if(d < 5 nm, d, 2*d) : trials = 2000, plot",
	), "day.budget")
	d := read(t, page)
	d.sound(t)
	captions := d.text("figcaption")
	if len(captions) != 2 || !strings.Contains(captions[0], "if(d < 3 nm, 1, 2)") || !strings.Contains(captions[1], "if(d < 5 nm, d, 2*d)") {
		t.Errorf("captions %q", captions)
	}
	if words := strings.Join(d.text("text"), "\n"); !strings.Contains(words, "if(d < 3 nm, 1, 2)") {
		t.Errorf("the picture says %q", words)
	}
}

// FuzzPage holds that any text gives a sound page.
func FuzzPage(f *testing.F) {
	f.Add("# a\n\n# 1. b\nx = 5 nm ± 1 %\ncheck x > 3 nm\n| no\npropagate x : trials = 100, plot")
	f.Add("chain c\n at IF\ndose> 1 nm\nchain d\n x\n| x\n| ~\n| no\nend\nend")
	f.Add("# " + strings.Join(attacks(), "\n# ") + "\n" + strings.Join(attacks(), "\n"))
	f.Add("x = 1 nm\n| \x14\n\x14 # \x14")
	f.Add("sweep x = 1 .. 3 5 points : x plot\nwhy x\nforget x\nx = x\nf(x) = x\nf(f)\n|\n||\n| |")
	f.Fuzz(func(t *testing.T, text string) {
		if len(text) > 4000 || strings.Contains(text, "trials") || strings.Contains(text, "sweep") && len(text) > 200 {
			t.Skip("takes long")
		}
		if strings.ContainsAny(text, "\uFFFE\uFFFF") {
			t.Skip("the reader of this test takes no such code")
		}
		files := fstest.MapFS{"day.budget": {Data: []byte(text)}}
		var b bytes.Buffer
		if err := Write(t.Context(), configOf(files), "day.budget", &b); err != nil {
			if b.Len() > 0 {
				t.Errorf("%d bytes and an error: %v", b.Len(), err)
			}
			return
		}
		read(t, b.Bytes()).sound(t)
	})
}
