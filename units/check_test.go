package units

import (
	"encoding/json"
	"math/big"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// parse reads a unit that must be one.
func parse(t testing.TB, text string) Unit {
	t.Helper()
	u, err := Standard().Parse(text)
	if err != nil {
		t.Fatalf("Parse(%q): %v", text, err)
	}
	return u
}

// sameUnit fails unless two units have equal dimension, scale and zero.
func sameUnit(t testing.TB, what string, got, want Unit) {
	t.Helper()
	switch {
	case got.dim != want.dim:
		t.Errorf("%s: dimension %s, want %s", what, got.dim, want.dim)
	case got.scale.rat().Cmp(want.scale.rat()) != 0:
		t.Errorf("%s: scale %s, want %s", what, decimalText(got.scale.rat()), decimalText(want.scale.rat()))
	case got.point != want.point:
		t.Errorf("%s: point %v, want %v", what, got.point, want.point)
	}
}

func decimalText(r *big.Rat) string { return new(big.Float).SetPrec(200).SetRat(r).Text('g', 40) }

// ratio reads a rational or decimal text, such as 5/18 or 1.6E-19.
func ratio(t testing.TB, text string) *big.Rat {
	t.Helper()
	r, ok := new(big.Rat).SetString(text)
	if !ok {
		t.Fatalf("%q is no rational", text)
	}
	return r
}

// closeRat says whether two rationals agree to the relative tolerance.
func closeRat(got, want *big.Rat, tolerance string) bool {
	tol, _ := new(big.Rat).SetString(tolerance)
	diff := new(big.Rat).Sub(got, want)
	return diff.Abs(diff).Cmp(tol.Mul(tol, new(big.Rat).Abs(want))) <= 0
}

func readTable(t testing.TB, name string, into any) {
	t.Helper()
	data, err := os.ReadFile(filepath.Join("..", "testdata", name))
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(data, into); err != nil {
		t.Fatal(err)
	}
}

// rowCount holds how many rows of a published table were run and left out, so
// that neither changes unseen.
type rowCount struct{ run, leftOut int }

func (c rowCount) check(t *testing.T, what string, want rowCount) {
	t.Helper()
	t.Logf("%s: %d rows run, %d left out", what, c.run, c.leftOut)
	if c != want {
		t.Errorf("%s: %d rows run and %d left out, want %d and %d", what, c.run, c.leftOut, want.run, want.leftOut)
	}
}

// The sentences of the language contract by which rows of published tables
// are left out.
const (
	isInch      = "the trade's own (bar, mbar, Torr, atm, psi, Å, inch, …): `in` is a word of statements, and those “are neither names nor units”"
	isSeveral   = "“`mil` and other words with several meanings are refused with the list of them”"
	isOneWord   = "“`**`, a point between symbols, or a blank as product are refused with the spelling to write”"
	isAmbiguous = "“`W/m*K` is refused as ambiguous (SI Brochure 5.2)”"
	isSymbols   = "“A unit is one word, without blanks: symbols (letters, °, %, ′, ″) joined by `/`, `*` or `·`”: it holds no number"
	isBehind    = "“right behind a bare number, `/` or `*` is arithmetic”"
	isWrongDim  = "“A wrong dimension is an error”: an equivalence is a function of the catalogue"
	isRadian    = "“angle; rad = 1 (SI)”"
	isTradeUnit = "“Without a stated unit an answer takes the trade's unit for its dimension”: one name a dimension"
	isPoint     = "“`degC` is a temperature point, `K` a point or a difference”: a point takes no prefix"
	isMicro     = "“`µ` (U+00B5), `μ` (U+03BC) and `u` are one prefix”"
)

// unknown is the reason of a row with a symbol that is not in the list “Known”
// of the language contract.
func unknown(symbol string) string { return symbol + " is not in the list “Known”" }

// mustRefuse holds that a spelling that is left out is no unit here, so that
// no row is left out that could run.
func mustRefuse(t testing.TB, id, text string) {
	t.Helper()
	if u, err := Standard().Parse(text); err == nil {
		t.Errorf("%s: %s is left out, but reads as %s", id, text, u)
	}
}

// oneWordSI joins symbols that a published table sets apart by blanks.
func oneWordSI(text string) string {
	return strings.ReplaceAll(strings.TrimSuffix(text, " (difference)"), " ", "*")
}
