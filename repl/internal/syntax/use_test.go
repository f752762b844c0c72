package syntax

import (
	"fmt"
	"strings"
	"testing"
)

// Every name of a statement is found where it stands, in the order of the text,
// with the set that it belongs to; units, labels and words of the language are
// none.
func TestUses(t *testing.T) {
	of := map[UseKind]string{OfValue: "", OfFunction: "()", OfMaterial: "!", OfCase: "?", OfTable: "."}
	for text, want := range map[string]string{
		"a + f(b, c = d) at IF":                "a f() b d",
		"5 W / W [W at IF]  # W":               "W",
		"5 W/(m*K) * {a, b}":                   "a b",
		"x [W] = -a^b":                         "a b",
		"f(x, y [m]) = x * y + a + x(y)":       "a x()",
		"check a = b within c":                 "a b c",
		"walk line3 P at IF":                   "line3 P",
		"why a":                                "a",
		"forget a, b":                          "a b",
		"import \"a\"":                         "",
		"digits 5":                             "",
		"help a":                               "",
		"prefer [mJ]":                          "",
		"material q = SiO2 2.2 g/cm^3":         "",
		"material q = SiO2 rho":                "rho",
		"chain c\n  at IF\n  m x(n): T*R\nend": "n T R",
		"stack s\n  cap: Ru d\n  b x50: Si 4 nm rough r, Mo e\n  substrate: Si\nend": "Ru! d Si! r Mo! e Si",
		"budget a*b":                     "a b",
		"propagate a : trials = n, plot": "a n",
		"correlation a, b = r":           "a b r",
		"sweep x = a .. b by c, y = 1 .. 2 41 points log : x*d, e plot": "x a b c y x d e",
		"solve x = y for x in a .. b":                                   "x y x a b",
		"maximise x for x in a .. b":                                    "x x a b",
		"fit d.y = a*d.x over d for a, b":                               "d.y a d.x d. a b",
		"case low : x = y, z = 2":                                       "x y z",
		"compare a, b : base, low":                                      "a b base? low?",
		"data d = \"a.csv\"":                                            "",
		"if(a < b, c, d)":                                               "if() a b c d",
	} {
		st, bad := Parse(text)
		if bad != nil {
			t.Errorf("%s: %v", text, bad)
			continue
		}
		var got []string
		for _, u := range Uses(st.Do) {
			if s := text[u.Where.Start:u.Where.End]; s != u.Name.Name {
				t.Errorf("%s: the place of %s is that of %q", text, u.Name.Name, s)
			}
			got = append(got, u.Name.Name+of[u.Of])
		}
		if s := strings.Join(got, " "); s != want {
			t.Errorf("%s: uses %s, want %s", text, s, want)
		}
	}
}

// Uses finds what Names finds, parameters aside.
func TestUsesAsNames(t *testing.T) {
	for _, text := range []string{
		"a + f(b)", "x = a*b", "check a < b", "walk c P", "why a", "budget a", "correlation a, b = 0.8", "compare a : base, low",
		"solve x = y for x in a .. b", "fit d.y = a*d.x over d for a", "chain c\n  m x(n): T\nend", "case low : x = y",
	} {
		st, bad := Parse(text)
		if bad != nil {
			t.Fatal(bad)
		}
		count := map[string]int{}
		for _, u := range Uses(st.Do) {
			count[u.Name.Name]++
		}
		for _, n := range Names(st.Do) {
			if count[n] == 0 {
				t.Errorf("%s: %s is a name and no use", text, n)
			}
		}
	}
}

func TestDefined(t *testing.T) {
	for text, want := range map[string]string{
		"a = 5": "a", "a [W] = b": "a", "f(x) = x": "f", "chain c\n  at IF\nend": "c", "stack s # n\n  substrate: Si\nend": "s",
		"material q = SiO2 2.2 g/cm^3": "q", "case low : x = 5": "low", "data d = \"a.csv\"": "d",
		"a": "", "check a < b": "", "fit y = a over d for a": "", "counted lot": "", "forget a": "",
	} {
		st, bad := Parse(text)
		if bad != nil {
			t.Errorf("%s: %v", text, bad)
			continue
		}
		n, ok := Defined(st.Do)
		if got := fmt.Sprint(n.Name, ok); got != fmt.Sprint(want, want != "") || text[n.Where.Start:n.Where.End] != want {
			t.Errorf("%s defines %s, want %s", text, got, want)
		}
	}
}
