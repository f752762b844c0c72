package syntax

import (
	"fmt"
	"strings"
	"testing"
)

// scanned cuts a text into tokens, asking for a unit behind numbers as the
// parser does.
func scanned(text string) string {
	s := scanner{src: text}
	var out []string
	number := false
	for {
		tok, err := s.next(number)
		if err != nil {
			return strings.Join(append(out, "! "+err.Msg), " ")
		}
		if tok.Kind == End {
			return strings.Join(out, " ")
		}
		if text[tok.Span.Start:tok.Span.End] == "" {
			return "an empty token"
		}
		number = tok.Kind == Number
		out = append(out, kinds[tok.Kind]+tok.Text)
	}
}

var kinds = map[Kind]string{Number: "n:", Unit: "u:", Word: "w:", Text: "t:", Bracket: "b:", Raised: "r:", Op: ""}

func TestTokens(t *testing.T) {
	for text, want := range map[string]string{
		"13.5 nm":               "n:13.5 u:nm",
		"13.5nm":                "n:13.5 u:nm",
		"10..90":                "n:10 .. n:90",
		"10 nm..90 nm":          "n:10 u:nm .. n:90 u:nm",
		"1.5..2.5":              "n:1.5 .. n:2.5",
		"1\u2009000.000\u202F5": "n:1000.0005",
		"1_000":                 "n:1000",
		"1__0":                  "n:1 w:__0", // one mark at a time
		"13.50(2)":              "n:13.50(2)",
		"13.50(0.02)e-3 m":      "n:13.50(0.02)e-3 u:m",
		"5(a)":                  "n:5 ( w:a )",
		"5(2":                   "n:5 ( n:2",
		"1e5":                   "n:1e5",
		"1e":                    "n:1 u:e",
		"1e+5":                  "n:1e+5",
		"1E−5":                  "n:1e-5",
		"1e--5":                 "n:1 u:e - - n:5",
		"2 d+d":                 "n:2 u:d + w:d",
		"m²":                    "w:m r:2",
		"3 m²·s⁻¹":              "n:3 u:m²·s⁻¹",
		"250/n":                 "n:250 / w:n",
		"250 /n":                "n:250 u:/n",
		"250 / n":               "n:250 / w:n",
		"5 at IF":               "n:5 w:at w:IF",
		"5 in":                  "n:5 w:in",
		"5 inch":                "n:5 u:inch",
		"5 W within 3":          "n:5 u:W w:within n:3",
		"a<=b>=c<d>e":           "w:a <= w:b >= w:c < w:d > w:e",
		"±+/-":                  "± ±",
		"a≤b≥c":                 "w:a <= w:b >= w:c",
		"− – - × · ⋅ *":         "- - - * * * *",
		"[ mJ/cm^2 ] [a b]":     "b:mJ/cm^2 b:a b",
		`"a b" ""`:              "t:a b t:",
		"a # b":                 "w:a",
		"λ_2 Δ x1 _y":           "w:λ_2 w:Δ w:x1 w:_y",
		"lots.dose a.5":         "w:lots.dose w:a ! a number has digits on both sides of its point",
		"A\u030A 5 A\u030A":     "w:A\u030A n:5 u:A\u030A",
		"5 m^(1/2)^2":           "n:5 u:m^(1/2)^2",
		"5 m^(a)":               "n:5 u:m ^ ( w:a )",
		"5 (m)":                 "n:5 ( w:m )",
		"5 J/(kg*K":             "n:5 u:J/(kg*K",
		"5 %*%":                 "n:5 u:%*%",
		"5 m\u200B s":           "n:5 u:m\u200B w:s",
	} {
		if got := scanned(text); got != want {
			t.Errorf("%q: got %s, want %s", text, got, want)
		}
	}
}

// A unit stands behind a number alone: any other word is a name.
func TestUnitsStandBehindNumbers(t *testing.T) {
	for _, before := range []string{"", "(", "a*", "-", "f(", "{", "2*", "2/", "2^", "x = ", "2 m + "} {
		text := before + "d"
		s := scanner{src: text}
		var last Token
		for number := false; ; number = last.Kind == Number {
			tok, err := s.next(number)
			if err != nil || tok.Kind == End {
				break
			}
			last = tok
		}
		if last.Kind != Word {
			t.Errorf("%s: d is no name", text)
		}
	}
}

// Every word that begins a statement is read, or refused as one for later; the
// words of the design are all here.
func TestStatementWords(t *testing.T) {
	examples := map[string]string{
		"chain": "chain c\n at IF\nend", "stack": "stack s\n cap: Ru 2.5 nm\nend", "material": "material m = SiO2 2.2 g/cm^3", "counted": "counted lot", "data": `data d = "f.csv"`,
		"check": "check a < b", "why": "why a", "walk": "walk c 250 W at IF", "budget": "budget a",
		"propagate": "propagate a : trials = 1e6", "correlation": "correlation a, b = 0.8",
		"sweep": "sweep x = 1 .. 2 by 1 : x", "solve": "solve x = 3 for x in 1 .. 4",
		"maximise": "maximise x for x in 1 .. 2", "minimise": "minimise x for x in 1 .. 2",
		"fit": "fit y = a*x over d for a", "case": "case c : x = 3", "compare": "compare a : base, c",
		"import": `import "f"`, "names": "names", "forget": "forget x", "prefer": "prefer [mJ]",
		"digits": "digits 5", "help": "help", "save": `save "f"`, "replay": `replay "f"`, "quit": "quit",
	}
	for _, word := range strings.Fields("chain stack material counted data check why walk budget propagate correlation sweep solve " +
		"maximise minimise fit case compare import names forget prefer digits help save replay quit") {
		if !StatementWord(word) || !Reserved(word) {
			t.Errorf("%s is no word of the language", word)
		}
		if examples[word] == "" {
			t.Errorf("%s has no example", word)
			continue
		}
		st, err := Parse(examples[word])
		if err != nil {
			t.Errorf("%s: %v", examples[word], err)
		} else if said(st.Do) == "show "+word {
			t.Errorf("%s is an expression", examples[word])
		}
		if reader(word) == nil {
			t.Errorf("%s has no reader", word)
		}
	}
	for _, word := range strings.Fields("at by end for in log over plot points rough to within") {
		if !Reserved(word) || StatementWord(word) {
			t.Errorf("%s is reserved: %v, begins a statement: %v", word, Reserved(word), StatementWord(word))
		}
		if _, err := Parse(word + " = 3"); err == nil {
			t.Errorf("%s = 3 is read", word)
		}
		if _, err := Parse("f(" + word + " = 3)"); err != nil {
			t.Errorf("f(%s = 3): %v", word, err)
		}
	}
	for _, word := range []string{"d", "h", "t", "N", "R", "W", "x", "if", "ends", "At", "logs"} {
		if Reserved(word) {
			t.Errorf("%s is reserved", word)
		}
	}
}

func TestNamesOfActions(t *testing.T) {
	for text, want := range map[string]string{
		"a + f(b, c = d) at IF":                 "a f b d",
		"x = {a, b}":                            "a b",
		"f(x) = x + a":                          "x a",
		"check a < b":                           "a b",
		"check a = b within c":                  "a b c",
		"walk line3 P at IF":                    "line3 P",
		"forget a, b":                           "a b",
		"why a":                                 "a",
		"digits 5":                              "",
		"chain c\n m x(n): T*R\n at WAFER\nend": "n T R",
		"budget a*b":                            "a b",
		"propagate a : trials = 5":              "a",
		"correlation a, b = 0.8":                "a b",
		"sweep x = a .. b by c : x*d, e":        "x d e a b c",
		"solve x = y for x in a .. b":           "x y a b",
		"maximise x for x in a .. b":            "x a b",
		"fit d.y = a*d.x over d for a":          "d d.y a d.x",
		"case low : x = y":                      "x y",
		"compare a, b : base, low":              "base low a b",
		"import \"f\"":                          "",
		"# note":                                "",
	} {
		st, err := Parse(text)
		if err != nil {
			t.Fatal(err)
		}
		if got := strings.Join(Names(st.Do), " "); got != want {
			t.Errorf("%s: names %s, want %s", text, got, want)
		}
	}
}

func TestVisible(t *testing.T) {
	for text, want := range map[string]string{
		"a\tb\x00\x1b[2J":      "a b<U+0000><U+001B>[2J",
		"\u202Ex\u2028\u0085":  "<U+202E>x<U+2028><U+0085>",
		"\xffé\uFFFD":          "<not UTF-8>é\uFFFD",
		"13.5 nm · 2 °C — “µ”": "13.5 nm · 2 °C — “µ”",
	} {
		if got := Visible(text); got != want {
			t.Errorf("%q is shown as %q, want %q", text, got, want)
		}
	}
}

// What opens and closes a block, and what stands alone.
func TestHeadings(t *testing.T) {
	for line, want := range map[string]bool{
		"chain c": true, " chain c # n": true, "chain\tc": true, "chain c d": true, "chain 5": true, "stack c": true,
		"chain": false, "chain ": false, "chains c": false, "chain = 5": false, "x = 3": false, "": false,
	} {
		if kind, ok := BlockHeading(line); ok != want || ok && kind != strings.Fields(line)[0] {
			t.Errorf("%q: %q, %v", line, kind, ok)
		}
	}
	for line, want := range map[string]bool{
		"end": true, "  end  ": true, "end # done": true, "\tend": true, "ends": false, "end 5": false, "end: 5": false, "": false, "# end": false,
	} {
		if got := BlockEnd(line); got != want {
			t.Errorf("%q ends a block: %v", line, got)
		}
	}
	for line, want := range map[string]string{
		"chain c": "c", "chain c # n": "c", "chain": "! the name of a chain is wanted", "chain 5": "! the name of a chain is wanted",
		"chain " + strings.Repeat("c", MaxName+1): "! choose a shorter name",
	} {
		got := ""
		if b, err := ParseHeading(line); err == nil {
			got = b.Name
		} else {
			got = "! " + err.Hint
		}
		if got != want {
			t.Errorf("%.20q: %s, want %s", line, got, want)
		}
	}
	if line, err := ParseBlockLine("  # note"); line != nil || err != nil {
		t.Errorf("a note in a block: %v, %v", line, err)
	}
	if line, err := ParseBlockLine("m: 5 # note"); err != nil || line.Text != "m: 5 # note" || line.Note != "note" {
		t.Errorf("a line of a block: %+v, %v", line, err)
	}
}

// Spans of a block count from its first byte.
func TestSpansOfBlocks(t *testing.T) {
	text := "chain c\n  at IF\n  m x(n): T*R # note\nend"
	st, err := Parse(text)
	if err != nil {
		t.Fatal(err)
	}
	lines := st.Do.(*Block).Lines
	for want, at := range map[string]Span{
		"IF": lines[0].Where, "m": lines[1].Where, "n": lines[1].Times.Span(), "T*R": lines[1].Items[0].Span(),
	} {
		if got := text[at.Start:at.End]; got != want {
			t.Errorf("the span of %s is that of %q", want, got)
		}
	}
}

func BenchmarkParse(b *testing.B) {
	for _, text := range []string{
		"p*t1*t2*r^10*a/(d*s+b)",
		"dose_nominal [mJ/cm^2] = 34 mJ/cm^2 at WAFER  # line 3, layer group A",
		"x = " + strings.Repeat("1.5 nm + ", 5000) + "2 nm",
	} {
		b.Run(fmt.Sprint(len(text), " bytes"), func(b *testing.B) {
			b.SetBytes(int64(len(text)))
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Parse(text); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
