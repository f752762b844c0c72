package repl

import (
	"context"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
)

// What a newcomer types, and the one way on that it is given.
func TestWayOn(t *testing.T) {
	s := NewSession(Config{})
	spoken(t, s, "bugle = 3 nm")
	for _, c := range [][3]string{
		{"maximize x * (3 - x) for x in 0 .. 3", "maximize begins no statement", "did you mean maximise?"},
		{"bugdet bugle", "bugdet begins no statement", "did you mean budget?"},
		{`improt "a.budget"`, "improt begins no statement", "did you mean import?"},
		{"hole_area 20 nm", "hole_area is a function; it takes its arguments in parentheses", "see: help hole_area"},
		{"bugle 2", "two values stand side by side", "a product is written with *, and a unit stands right behind its number"},
		{"26 mm * 33 mm / wafer", "wafer is a unit, and a unit stands right behind a number", "write 1 wafer"},
		{"1 + W", "W is a unit, and a unit stands right behind a number", "write 1 W"},
		{"exit", "exit is no name that is known here", "quit leaves"},
		{"why throughput", "throughput is a function of the tool and rests on nothing", "see: help throughput"},
		{"250 W at if", "if is no plane that is known here", "did you mean IF? Upper and lower case differ"},
		{"help me", "there is no help on me", "help lists the topics"},
	} {
		refused(t, s, c[0], c[1], c[2])
	}
}

// A conventions file may have slips of the keyboard in it, each with its
// refusal; one that was not refused when it was said still stops the import.
func TestImportPassesOverRefused(t *testing.T) {
	const slip = "R = 66 % ± 1 %\n"
	const reply = "| R = 66 % ± 1 %\n|     ~~~~~~~~~~\n| ± 1 % can be meant of the value or in points of %\n| write (66 ± 1) % for points\n"
	const block = "chain c\n  at IF\n  m: 66\n  at WAFER\nend\n|   m: 66\n|      ~~\n| m is 66; a factor lies between 0 and 1\n"
	files := fstest.MapFS{
		"good.budget": {Data: []byte(slip + reply + "import \"none.budget\"\n" + reply + "R = (66 ± 1) %\n" + block + "d = 4 nm\n")},
		"bad.budget":  {Data: []byte("d = 4 nm\n" + slip)},
	}
	s := NewSession(Config{Files: files})
	if got := printed(spoken(t, s, `import "good.budget"`)); !strings.HasPrefix(got, "2 names from good.budget") {
		t.Errorf("came in: %s", got)
	}
	prints(t, s, "names", "R  0.660(10)  (good.budget:11)\nd  4 nm       (good.budget:20)")
	other := NewSession(Config{Files: files})
	if r := other.Feed(context.Background(), `import "bad.budget"`); r.Err == nil {
		t.Errorf("bad.budget came in: %s", printed(r))
	}
	prints(t, other, "names", "nothing is defined; name = formula defines")
}

func TestCompletesUnitsBehindNumbers(t *testing.T) {
	s := NewSession(Config{})
	for _, c := range []struct {
		typed  string
		start  int
		offers []string // among others
		never  string
	}{
		{"30 mJ/c", 6, []string{"cm"}, "carry("},
		{"30 m", 3, []string{"mJ", "mm", "mW"}, "max("},
		{"hole_area(20 n", 13, []string{"nm"}, "nils("},
		{"x = 5e-3 k", 9, []string{"kW", "kpulse"}, "k1("},
		{"30mJ/c", 5, []string{"cm"}, "carry("},
		{"x * 2 [mJ/c", 10, []string{"cm"}, "cfields"},
		{"2 * ma", 4, []string{"max("}, "mA"},
		{"x2 ma", 3, []string{"max("}, "mA"},
		{"250 W a", 6, []string{"abs("}, "aW"},
	} {
		start, got := s.Complete(c.typed, len(c.typed))
		if start != c.start || slices.Contains(got, c.never) {
			t.Errorf("%q: from %d, with %s: %q", c.typed, start, c.never, got)
		}
		for _, want := range c.offers {
			if !slices.Contains(got, want) {
				t.Errorf("%q does not offer %s: %q", c.typed, want, got)
			}
		}
	}
}

func TestHelpFindsWords(t *testing.T) {
	s := NewSession(Config{})
	for word, want := range map[string][]string{
		"IF": {"IF is a plane."}, "pellicle": {"what mentions pellicle:", "help chain"}, "mirror": {"mirror is a name for the number 1", "help stack"},
		"nois": {"help shot_noise"}, "plot": {"help sweep"},
	} {
		got := printed(spoken(t, s, "help "+word))
		for _, w := range want {
			if !strings.Contains(got, w) {
				t.Errorf("help %s lacks %q:\n%s", word, w, got)
			}
		}
	}
	if got := printed(spoken(t, s, "help x")); strings.Contains(got, "help max ") || strings.Contains(got, "exposure") {
		t.Errorf("help x finds a letter inside words:\n%s", got)
	}
}

// Every page of help fits a terminal of 80 columns behind the margin, and the
// tour can be copied line by line, remarks and all.
func TestHelpPages(t *testing.T) {
	s := NewSession(Config{})
	for _, page := range append(topics(), topic{text: strings.Join(overview(), "\n")}) {
		for _, l := range page.lines() {
			if n := len([]rune(Margin + l)); n > 80 || l != strings.TrimRight(l, " ") {
				t.Errorf("help %s: %d columns: %q", page.name, n, l)
			}
		}
	}
	for _, l := range (topic{text: startPage}).lines()[1:] {
		r := s.Feed(context.Background(), strings.TrimSpace(l))
		wanted := strings.Contains(l, "# refused") || strings.Contains(l, "save")
		if (r.Err != nil) != wanted {
			t.Errorf("%s: %v", l, r.Err)
		}
	}
}
