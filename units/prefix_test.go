package units

import (
	"slices"
	"strings"
	"testing"
)

// Every prefix before every unit that takes prefixes reads as one unit of the
// right scale, in every spelling of both.
func TestEveryPrefixBeforeEveryUnit(t *testing.T) {
	pairs := 0
	for word, r := range Standard().words {
		if !r.prefix {
			continue
		}
		for _, p := range prefixes {
			if _, whole := Standard().words[p.symbol+word]; whole {
				continue // TestShadows
			}
			pairs++
			u := parse(t, p.symbol+word)
			want := r.scale.times(tens(p.ten)).rat()
			if u.dim != r.dim || u.scale.rat().Cmp(want) != 0 {
				t.Errorf("%s%s reads as %s, %s in SI units", p.symbol, word, u, decimalText(u.scale.rat()))
			}
			printed := parse(t, u.String())
			sameUnit(t, p.symbol+word, printed, u)
			if printed.String() != u.String() {
				t.Errorf("%s%s prints as %s, which prints as %s", p.symbol, word, u, printed)
			}
		}
	}
	t.Logf("%d pairs", pairs)
	if pairs < 24*40 {
		t.Errorf("only %d pairs were read", pairs)
	}
}

// No word is made of prefix and unit in two ways that mean different things.
func TestNoTwoPairsCollide(t *testing.T) {
	type pair struct {
		from string
		r    *row
		ten  int
	}
	seen := map[string]pair{}
	for word, r := range Standard().words {
		if !r.prefix {
			continue
		}
		for _, p := range prefixes {
			one := pair{p.symbol + "·" + word, r, p.ten}
			other, ok := seen[p.symbol+word]
			if ok && (other.r.dim != r.dim || other.ten != one.ten || other.r.scale.rat().Cmp(r.scale.rat()) != 0) {
				t.Errorf("%s%s is both %s and %s", p.symbol, word, one.from, other.from)
			}
			seen[p.symbol+word] = one
		}
	}
}

// The words that are a unit by themselves and could also be taken for a prefix
// and a unit: a whole symbol beats prefix and symbol. Those whose second half
// is no unit here at all (min as milli-inch, Pa as peta-year, ft, nmi, mol, T,
// ha, Gy, dB, rad) can be read in one way only.
func TestShadows(t *testing.T) {
	want := []string{"cd"} // candela, no centiday
	var got []string
	for word := range Standard().words {
		for _, p := range prefixes {
			if rest, cut := strings.CutPrefix(word, p.symbol); cut && Standard().words[rest] != nil {
				got = append(got, word)
			}
		}
	}
	slices.Sort(got)
	if !slices.Equal(got, want) {
		t.Errorf("whole symbols that beat a prefix and a symbol: %q, want %q", got, want)
	}
}

// The words that other systems of units read otherwise.
func TestWholeSymbols(t *testing.T) {
	for _, c := range []struct {
		word, same string
		not        string
	}{
		{"min", "s", "milli-inch"},
		{"cd", "lm/sr", "centi-day"},
		{"Pa", "N/m^2", "peta-year"},
		{"mol", "kat*s", "milli-ol"},
		{"T", "Wb/m^2", "tera"},
		{"mT", "mWb/m^2", "milli-tera"},
		{"h", "s", "hecto"},
		{"ha", "m^2", "hecto-year"},
		{"Gy", "J/kg", "giga-year"},
		{"rad", "m/m", "0.01 Gy"},
		{"meV", "J", "exponent e"},
		{"dam", "m", "deci-year"},
		{"as", "s", "arcsecond"},
		{"au", "m", "atto-dalton"},
		{"PS", "PA/V", "horse power"},
		{"mirror", "1", "milli-irror"},
		{"pulse", "pulse", "pico-ulse"},
		{"field", "field", "femto-ield"},
		{"die", "die", "deci-ie"},
	} {
		if got, want := parse(t, c.word).dim, parse(t, c.same).dim; got != want {
			t.Errorf("%s is %s, want %s (and not %s)", c.word, got, want, c.not)
		}
	}
	for _, word := range []string{"ft", "nmi", "mas", "da", "dB", "G", "mh", "kmin", "kd", "kt", "kha", "kau", "kdeg", "nmol2n"} {
		refuse(t, "word", word, false)
	}
}
