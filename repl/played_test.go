package repl

import (
	"context"
	"errors"
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/fstest"
)

// playedText writes what stands in a session, one line a thing: line, notes or
// statement with its pieces in marks, and what else is set.
func playedText(list []Played) []string {
	var out []string
	for _, p := range list {
		s := fmt.Sprintf("%d", p.Line)
		if p.Note != nil {
			s += " # " + strings.Join(p.Note, " / ")
		}
		for i, x := range p.Statement {
			if i == 0 {
				s += " "
			}
			s += pieceText(x)
		}
		if p.Picture != nil {
			s += " picture"
		}
		for _, d := range p.Imported {
			s += fmt.Sprintf(" %s@%s:%d", d.Name, d.Place.File, d.Place.Line)
		}
		if p.Recorded != nil {
			s += " was " + strings.Join(p.Recorded, "|")
		}
		out = append(out, s)
	}
	return out
}

func pieceText(x Piece) string {
	text := strings.ReplaceAll(x.Text, "\n", "/")
	switch {
	case x.Marked:
		text = "~" + text + "~"
	case x.Note:
		text = "(" + text + ")"
	case x.Defines:
		text = "*" + text + "*"
	}
	if x.Place.Line > 0 {
		text += fmt.Sprintf("→%s%d", x.Place.File, x.Place.Line)
	}
	return text
}

func TestPlay(t *testing.T) {
	files := fstest.MapFS{
		"a/day.budget": {Data: []byte(strings.Join([]string{
			"\uFEFF# one",                       // 1
			"# two",                             // 2
			"",                                  // 3
			"dose> # three # four",              // 4
			"dose> import \"c.budget\" # \"#\"", // 5
			"| whatever",                        // 6
			"x = 2*k # twice",                   // 7
			"| 2.0000 m",                        // 8
			"save \"b\"",                        // 9
			"chain line # n",                    // 10
			"  at IF",                           // 11
			"  wrong",                           // 12
			"| wrong",                           // 13
			"",                                  // 14
			"  # inside",                        // 15
			"  mirror: 0.5 # half",              // 16
			"  at WAFER",                        // 17
			"end",                               // 18
			"k = x",                             // 19: refused
			"sweep y = 1 .. 2 by 1 : y*x plot",  // 20
			"x",                                 // 21
			"| 2 m",                             // 22
			"# last",                            // 23
			"chain given",                       // 24
			"  at IF",                           // 25
			"dose> x",                           // 26
			"quit",                              // 27
			"chain open",                        // 28
			"  at IF",                           // 29
		}, "\r\n"))},
		"a/c.budget": {Data: []byte("# c\nk [m] = 1 m # a \"metre\"")},
	}
	list, err := Play(t.Context(), Config{Files: files}, "a/day.budget")
	if err != nil {
		t.Fatal(err)
	}
	want := []string{
		`1 # one / two`,
		`4 # three # four`,
		`5 import "c.budget" (# "#") k@a/c.budget:2 was whatever`,
		`7 *x* = 2*k→a/c.budget2 (# twice)`,
		`10 chain *line* (# n)/  at IF/  /  (# inside)/  mirror: 0.5 (# half)/  at WAFER/end`,
		`12 wrong~ ~ was wrong`,
		`19 ~k~ = x→7`,
		`20 sweep y = 1 .. 2 by 1 : y*x→7 plot picture`,
		`21 x→7`,
		`23 # last`,
		`26 x→7`,
		`28 ~chain open~/  at IF`,
	}
	got := playedText(list)
	for i := range max(len(got), len(want)) {
		if i >= len(got) || i >= len(want) || got[i] != want[i] {
			t.Fatalf("thing %d of\n%s\nis not that of\n%s", i+1, strings.Join(got, "\n"), strings.Join(want, "\n"))
		}
	}
}

// The pieces of a statement are the statement, whatever is marked in it.
func TestPiecesAreTheStatement(t *testing.T) {
	texts := []string{
		"a = 5 nm # note", "a + b", "1 +", "(", "\"", "é + λ + 5 µm", "a + \u202E", "x = \"#\" # \"", strings.Repeat("a + ", 5000) + "a",
		"chain c\n  m: a # n\n  at IF\nend", "f(a, λ) = a*λ", "5 W/W*W",
	}
	p := &playing{session: NewSession(Config{})}
	p.session.Feed(t.Context(), "a = 5 nm")
	for _, text := range texts {
		r := p.session.Feed(t.Context(), strings.ReplaceAll(text, "\n", " "))
		names := p.names(text)
		for at := 0; at <= len(text); at += 1 + len(text)/50 {
			names = append(names, found{what: Piece{Marked: true}})
			names[len(names)-1].at.Start, names[len(names)-1].at.End = at, at
		}
		var b strings.Builder
		for _, x := range pieces(text, names) {
			if x.Text == "" {
				t.Errorf("%.20q has an empty piece", text)
			}
			b.WriteString(x.Text)
		}
		if got := strings.TrimSuffix(b.String(), " "); got != visibleLines(text) {
			t.Errorf("the pieces of %.40q are %.40q (%v)", text, got, r.Err)
		}
	}
}

// Pictures reach the host as they do in a session, and what the host says of
// them counts.
func TestPlayAsksTheHost(t *testing.T) {
	const text = "sweep x = 1 .. 3 by 1 : x plot\nsweep x = 1 .. 3 by 1 : x^2 to \"a.svg\"\nsweep x = 1 .. 3 by 1 : x^3 to \"a.csv\""
	files := fstest.MapFS{"day.budget": {Data: []byte(text)}}
	asked := ""
	c := Config{
		Files:  files,
		Create: func(string) (File, error) { return nil, errors.New("a file is asked for") },
		Sketch: func(p *Picture, _ int) []string { asked += "sketch " + p.Lines[0].Name + " "; return []string{"*"} },
		Draw: func(p *Picture, format string, _ io.Writer) error {
			asked += format + " " + p.Lines[0].Name + " "
			return nil
		},
	}
	list, err := Play(t.Context(), c, "day.budget")
	if err != nil {
		t.Fatal(err)
	}
	if asked != "sketch x svg x^2 " {
		t.Errorf("the host was asked for %s", asked)
	}
	for i, want := range []bool{true, true, false} {
		if p := list[i]; p.Picture != nil != want || p.Reply.Err != nil {
			t.Errorf("statement %d has a picture: %v, want %v (%v)", i+1, p.Picture != nil, want, p.Reply.Err)
		}
	}
	if lines := list[0].Reply.Lines(); len(lines) != 1 || lines[0].Text != "*" {
		t.Errorf("the reply is %v, want the host's chart", lines)
	}
	c.Draw = func(*Picture, string, io.Writer) error { return errors.New("no ink") }
	if list, err = Play(t.Context(), c, "day.budget"); err != nil || list[1].Reply.Err == nil || list[1].Picture != nil {
		t.Errorf("without ink: %v, %+v", err, list[1])
	}
}

// What Play answers, Replay counts.
func TestPlayAsReplay(t *testing.T) {
	const text = "a = 5 nm\n| no\na + 1 s\ncheck a > 6 nm\na\n| 5 nm\n1 nm\n| 2 nm"
	files := fstest.MapFS{"day.budget": {Data: []byte(text)}}
	list, err := Play(t.Context(), Config{Files: files}, "day.budget")
	if err != nil {
		t.Fatal(err)
	}
	r, err := Replay(t.Context(), Config{Files: files}, "day.budget")
	if err != nil {
		t.Fatal(err)
	}
	var refused, failed, moved int
	for _, p := range list {
		if p.Reply.Err != nil {
			refused++
		}
		if p.Reply.Failed {
			failed++
		}
		if p.Recorded != nil {
			moved++
		}
	}
	if len(list) != r.Statements || refused != len(r.Refused) || failed != len(r.Failed) || moved != len(r.Drifts) || moved != 2 {
		t.Errorf("%d statements, %d refused, %d fail, %d moved; replay says %d, %d, %d, %d", len(list), refused, failed, moved, r.Statements, len(r.Refused), len(r.Failed), len(r.Drifts))
	}
}

func TestPlayUnreadable(t *testing.T) {
	stopped, stop := context.WithCancel(t.Context())
	stop()
	files := fstest.MapFS{"day.budget": {Data: []byte("1 nm")}, "nul.budget": {Data: []byte("\x00")}}
	for name, c := range map[string]struct {
		ctx   context.Context
		files fstest.MapFS
		want  error
	}{
		"gone.budget": {t.Context(), files, ErrFile},
		"nul.budget":  {t.Context(), files, ErrFile},
		"day.budget":  {stopped, files, context.Canceled},
	} {
		if list, err := Play(c.ctx, Config{Files: c.files}, name); !errors.Is(err, c.want) || list != nil {
			t.Errorf("%s: %v, %v", name, list, err)
		}
	}
}

// partsText writes the parts of a reply: lines as they are, a table in <>.
func partsText(r *Reply) string {
	var out []string
	for _, p := range r.Parts() {
		for _, l := range p.Lines {
			out = append(out, spaced(l.Text))
		}
		if t := p.Table; t != nil {
			s := "<" + strings.Join(t.Heads, ",")
			for _, row := range t.Rows {
				var cells []string
				for _, e := range row {
					cells = append(cells, e.Text)
				}
				s += ";" + strings.Join(cells, ",")
			}
			if t.Aside {
				s += " aside"
			}
			out = append(out, s+">")
		}
	}
	return strings.Join(out, " | ")
}

func TestParts(t *testing.T) {
	nothing := func(*Picture, string, io.Writer) error { return nil }
	s := NewSession(Config{
		Sketch: func(*Picture, int) []string { return []string{"chart", "of characters"} }, Draw: nothing,
		Create: func(string) (File, error) { return nil, errors.New("unused") },
	})
	s.silent = true
	for _, line := range []string{"a = 3 W ± 0.1 W", "b = 2 W", "case low : b = 1 W"} {
		if r := s.Feed(t.Context(), line); r.Err != nil {
			t.Fatal(r.Err)
		}
	}
	for _, c := range []struct{ text, want string }{
		{"b", "2 W"},
		{"{1 W, 2 W}", "{1 W, 2 W}"},
		{"check b > 1 W", "holds: 2 W > 1 W"},
		{"b + 1 s", "power (W) and time (s) do not add…"},
		{"compare b : base, low", "<case,b / W,to base;base,2,1;low,1,0.50000>"},
		{"sweep x = 1 .. 2 by 1 : x^2", "<x,x^2;1,1;2,4>"},
		{"sweep x = 0 .. 1 by 1 : 1/x", "<x,1/x;0,no value;1,1> | note: …"},
		{"sweep x = 1 .. 2 by 1 : x^2 plot", "<x,x^2;1,1;2,4 aside>"},
		{"sweep x = 1 .. 2 by 1 : x^2 to \"a.csv\"", "2 points | written: a.csv | <x,x^2;1,1;2,4 aside>"},
		{"sweep x = 1 .. 2 2000 points : x^2 to \"a.csv\"", "2000 points | written: a.csv"},
		{"sweep x = 1 .. 2 2000 points : x^2 plot", ""},
		{"budget a", "3.00(10) W | <input,x,u(x),unit,c,unit of c,|c| u(x) / W,share of u²;a,3,0.10000,W,1,1,0.10000,1> | expanded: …"},
		{"propagate a : trials = 2000, plot", "mean …"},
	} {
		r := s.Feed(t.Context(), c.text)
		got := partsText(r)
		begin, open := strings.CutSuffix(c.want, "…")
		if got != c.want && (!open || !strings.HasPrefix(got, begin)) {
			t.Errorf("%s gives %s, want %s", c.text, got, c.want)
		}
		if strings.Contains(got, "characters") {
			t.Errorf("%s: the chart is left in %s", c.text, got)
		}
	}
}
