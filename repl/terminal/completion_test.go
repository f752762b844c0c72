package terminal

import (
	"reflect"
	"strings"
	"testing"
)

func TestOfferAt(t *testing.T) {
	for _, c := range []struct {
		line string
		want offer
	}{
		{"pho|", offer{insert: "photon_"}},
		{"2 + photon_e|", offer{start: 4, insert: "photon_energy"}},
		{"photon_|", offer{list: []string{"photon_count", "photon_energy"}}},
		{"photon_|(", offer{list: []string{"photon_count", "photon_energy"}}},
		{"λ|", offer{insert: "λ_"}},
		{"µ + λ_p|", offer{start: 5, insert: "λ_peak"}},
		{"zzz|", offer{}},
		{"|", offer{list: adderWords}},
		{"power|", offer{}},
		{"power(|", offer{list: adderWords}},
		{"open ↵ λ ↵ photon_c| ↵ end", offer{start: len("open ↵ λ ↵ "), insert: "photon_count"}},
	} {
		line := at(c.line)
		got := offerAt(&adder{}, string(line.text), len(string(line.text[:line.at])))
		if !reflect.DeepEqual(got, c.want) {
			t.Errorf("%s: %+v, want %+v", c.line, got, c.want)
		}
	}
}

func TestHintAt(t *testing.T) {
	for _, c := range []struct{ line, want string }{
		{"power(|", "power(wavelength)"},
		{"λ ↵ power(13 | ↵ end", " power(wavelength)"},
		{"power( ↵ zzz|", ""},
		{"power|(", ""},
		{"power()|", ""},
	} {
		line := at(c.line)
		if got := hintAt(&adder{}, string(line.text), len(string(line.text[:line.at]))); got != c.want {
			t.Errorf("%s: %q, want %q", c.line, got, c.want)
		}
	}
}

// wordsAt offers from a place of its own.
type wordsAt struct {
	adder
	start int
}

func (w *wordsAt) Complete(string, int) (int, []string) { return w.start, []string{"word"} }

func TestOfferFromNowhere(t *testing.T) {
	for _, start := range []int{-1, 1, 4} {
		if got := offerAt(&wordsAt{start: start}, "λab", 3); !reflect.DeepEqual(got, offer{}) {
			t.Errorf("start %d: %+v", start, got)
		}
	}
}

func TestCommonPrefix(t *testing.T) {
	for _, c := range []struct{ words, want string }{
		{"dose", "dose"},
		{"dose dose_x", "dose"},
		{"dose power", ""},
		{"µm µs", "µ"},
		{"αa βa", ""}, // their first bytes agree
	} {
		if got := commonPrefix(strings.Fields(c.words)); got != c.want {
			t.Errorf("%s: %q, want %q", c.words, got, c.want)
		}
	}
}

func TestTable(t *testing.T) {
	words := []string{"a", "bb", "λ", "dd", "ee"}
	for _, c := range []struct {
		words       []string
		width, rows int
		want        string
	}{
		{words, 10, 9, "a   λ   ee\nbb  dd"},
		{words, 10, 2, "a   λ   ee\nbb  dd"},
		{words, 6, 2, "a   bb\nand 3 more: type a letter of the word"},
		{words, 6, 1, "and 5 more: type a letter of the word"},
		{[]string{"a_long_word", "b"}, 4, 9, "a_long_word\nb"},
		{nil, 80, 9, ""},
	} {
		if got := strings.Join(table(c.words, c.width, c.rows), "\n"); got != c.want {
			t.Errorf("%d words in %d times %d give\n%s\nwant\n%s", len(c.words), c.width, c.rows, got, c.want)
		}
	}
}

func TestFold(t *testing.T) {
	for _, c := range []struct{ text, want string }{
		{"", ""},
		{"λ (a)", "λ (a)"},
		{"power(dose, area) µ", "power(dose,\narea) µ"},
		{"a_word_that_is_too_long b c", "a_word_that_is_too_long\nb c"},
	} {
		if got := strings.Join(fold(c.text, 11), "\n"); got != c.want {
			t.Errorf("%q: %q, want %q", c.text, got, c.want)
		}
	}
}
