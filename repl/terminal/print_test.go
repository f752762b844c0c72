package terminal

import (
	"strings"
	"testing"
	"unicode"
)

func TestVisible(t *testing.T) {
	for _, c := range []struct{ text, want string }{
		{"dose (mJ/cm²) ± µ Å λ", "dose (mJ/cm²) ± µ Å λ"},
		{"a\x1b[2Jb\x00\x07\x7f", `a\x1b[2Jb\x00\x07\x7f`},
		{"a\u0085b\u009b1m", `a\x85b\x9b1m`},
		{"a\tb", "a b"},
		{"a\xb5b\xff", `a\xb5b\xff`},
		{"a\uFFFDb", "a\uFFFDb"},
		{"a\u202eb\u2028c\u2066", `a\u202eb\u2028c\u2066`},
		{"", ""},
	} {
		if got := visible(c.text); got != c.want {
			t.Errorf("%q: %q, want %q", c.text, got, c.want)
		}
	}
}

func TestFormat(t *testing.T) {
	reply := Answer{
		Lines: []Line{{Text: "3"}, {Text: "two\nlines\r\n"}, {Text: "\x1b[31mno", Kind: Refusal}},
		Chart: func(columns int) []string { return []string{strings.Repeat("*", columns)} },
	}
	p := &printer{columns: func() int { return 10 }}
	want := "| 3\n| two\n| lines\n| \n| \\x1b[31mno\n| ********\n"
	if got := p.format(reply); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

func TestColours(t *testing.T) {
	p := &printer{colours: true, columns: func() int { return 80 }}
	got := p.format(Answer{Lines: []Line{{Text: "yes", Kind: Good}, {Text: "plain"}}})
	want := "\x1b[2m| \x1b[0m\x1b[32myes\x1b[0m\n\x1b[2m| \x1b[0mplain\n"
	if got != want {
		t.Errorf("got %q, want %q", got, want)
	}
}

func FuzzFormat(f *testing.F) {
	f.Add("a\x1b[2J\nb\u202e")
	p := &printer{columns: func() int { return 80 }}
	f.Fuzz(func(t *testing.T, text string) {
		got := p.format(Answer{Lines: []Line{{Text: text, Kind: Bad}}})
		for line := range strings.Lines(got) {
			if !strings.HasPrefix(line, margin) || strings.ContainsFunc(strings.TrimSuffix(line, "\n"), unicode.IsControl) {
				t.Fatalf("%q is printed as %q", text, got)
			}
		}
	})
}

func TestCanvas(t *testing.T) {
	var b strings.Builder
	c := &canvas{to: &b}
	for _, part := range []string{"ab\b\b", "\b\x1b[A\r\x1b[80C\b\b\x1b[A\r\x1b[80C", "\b\x1b[B"} {
		if n, err := c.Write([]byte(part)); n != len(part) || err != nil {
			t.Errorf("wrote %d of %d: %v", n, len(part), err)
		}
	}
	if want := "ab\b\b\x1b[A\r\x1b[80C\b\x1b[A\r\x1b[80C\b\x1b[B"; b.String() != want {
		t.Errorf("got %q, want %q", b.String(), want)
	}
	b.Reset()
	c.below = "[below]"
	for _, part := range []string{"\x1b[J\x1b[2K\r", "dose> a", "dose> ab"} {
		if n, err := c.Write([]byte(part)); n != len(part) || err != nil {
			t.Errorf("wrote %d of %d: %v", n, len(part), err)
		}
	}
	if want := "\x1b[J\x1b[2K\rdose> a[below]dose> ab"; b.String() != want {
		t.Errorf("got %q, want %q", b.String(), want)
	}
}

func TestProgress(t *testing.T) {
	if NewProgress(&strings.Builder{}, "xterm") != nil {
		t.Error("a file is drawn on")
	}
	var none *Progress
	none.Show("nothing")
	none.Clear()
	var b strings.Builder
	p := &Progress{to: &b, width: func() int { return 8 }}
	p.Clear()
	p.Show("half\x1b of it")
	p.Show("dropped, since it comes too fast")
	p.Show("")
	p.Show("")
	if want := "\r\x1b[K\x1b[2mhalf\\x1\x1b[0m\r\x1b[K"; b.String() != want {
		t.Errorf("got %q, want %q", b.String(), want)
	}
}
