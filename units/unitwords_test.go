package units

import (
	"errors"
	"math/big"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// unitWords is testdata/unit-words.json: cases of the UCUM functional tests
// (3 Feb 2021) and of ucum-essence 2.2, in plain SI spelling, with the verdict
// of a policy for technical text.
type unitWords struct {
	Validation []struct {
		Test_id, Ucum, Si, Ascii, Engineering_policy string
	}
	Conversion []struct {
		Test_id, Value, Ascii_from, Ascii_to, Si_from, Si_to, Exact_outcome string
	}
	Arithmetic []struct {
		Test_id, Op, V1, U1, V2, U2, Exact string
	}
	Edge_spellings []struct {
		Input, Engineering_policy, Meaning string
	}
}

func readUnitWords(t *testing.T) unitWords {
	var w unitWords
	readTable(t, "unit-words.json", &w)
	return w
}

// validationLeftOut is keyed by the UCUM spelling, since ids repeat.
var validationLeftOut = map[string]string{
	"m[H2O]": unknown("mH2O"), "[yd_i]": unknown("yd"), "[lb_av]": unknown("lb"), "[oz_av]": isSeveral,
	"[syd_i]": unknown("yd2"), "mm[Hg]": unknown("mmHg"), "dyn.s/cm5": unknown("dyn"), "cm[H2O]": unknown("cmH2O"),
	"[ppth]": unknown("‰"), "[in_i'Hg]": unknown("inHg"), "dB": unknown("dB"),
}

func TestValidation(t *testing.T) {
	var count rowCount
	for _, c := range readUnitWords(t).Validation {
		if _, out := validationLeftOut[c.Ucum]; out {
			count.leftOut++
			mustRefuse(t, c.Test_id, c.Ascii)
			continue
		}
		count.run++
		switch c.Engineering_policy {
		case "accept", "accept-hint":
			sameUnit(t, c.Test_id+" "+c.Ascii, parse(t, c.Ascii), parse(t, c.Si))
		case "accept-as-number":
			powerOfTen(t, c.Test_id, c.Ascii)
		case "reject":
			refuse(t, c.Test_id, c.Ucum, false)
		case "reject-hint":
			refuse(t, c.Test_id, c.Ascii, true)
			refuse(t, c.Test_id, c.Si, true)
		default:
			t.Errorf("%s: policy %q is not known to this test", c.Test_id, c.Engineering_policy)
		}
	}
	count.check(t, "unit-words.json, validation", rowCount{run: 139, leftOut: 11})
}

// refuse holds that a text is no unit, and that the refusal says a way on.
func refuse(t *testing.T, id, text string, hinted bool) {
	t.Helper()
	_, err := Standard().Parse(text)
	var bad *ParseError
	switch {
	case !errors.As(err, &bad):
		t.Errorf("%s: %s is not refused", id, text)
	case hinted && bad.Hint == "":
		t.Errorf("%s: %s is refused without a way on: %v", id, text, err)
	}
}

// powerOfTen reads 10^3/ul as the number 1e3 in the unit /ul, as the sentence
// “A unit stands right behind a number” has it; in a unit 10 is refused.
func powerOfTen(t *testing.T, id, text string) {
	t.Helper()
	number, rest := strings.Replace(text, "10^", "1e", 1), "1"
	if at := strings.IndexByte(text, '/'); at >= 0 {
		number, rest = strings.Replace(text[:at], "10^", "1e", 1), text[at:]
	}
	u := parse(t, rest)
	got, err := u.Read(number)
	if err != nil {
		t.Fatal(err)
	}
	want, _ := new(big.Rat).Mul(ratio(t, number), u.scale.rat()).Float64()
	near.Abs(t, id+" "+text, got, want, 0)
	refuse(t, id, text, true)
}

var wordConversionsLeftOut = map[string]string{
	"3-111a": isAmbiguous, "3-113": isSymbols, "3-114": isSymbols, "3-115": isSymbols, "3-118": isInch, "3-119": isInch,
	"3-121": isSymbols, "3-122": isSymbols, "3-123": isSymbols, "3-124": unknown("u0"), "3-125": unknown("mHg"),
	"3-127": unknown("ly"), "3-128": unknown("ly"),
}

func TestWordConversions(t *testing.T) {
	var count rowCount
	for _, c := range readUnitWords(t).Conversion {
		if _, out := wordConversionsLeftOut[c.Test_id]; out {
			count.leftOut++
			mustRefuse(t, c.Test_id, c.Ascii_from)
			continue
		}
		count.run++
		from, to := parse(t, c.Ascii_from), parse(t, c.Ascii_to)
		sameUnit(t, c.Test_id, from, parse(t, c.Si_from))
		sameUnit(t, c.Test_id, to, parse(t, c.Si_to))
		if from.dim != to.dim {
			t.Errorf("%s: %s is %s, %s is %s", c.Test_id, from, from.dim, to, to.dim)
			continue
		}
		exact := new(big.Rat).Mul(ratio(t, c.Value), new(big.Rat).Quo(from.scale.rat(), to.scale.rat()))
		if exact.Cmp(ratio(t, c.Exact_outcome)) != 0 {
			t.Errorf("%s: %s %s = %s %s, want %s", c.Test_id, c.Value, from, decimalText(exact), to, c.Exact_outcome)
		}
		si, err := from.Read(c.Value)
		if err != nil {
			t.Fatal(err)
		}
		want, _ := exact.Float64()
		near.Rel(t, c.Test_id, to.From(si), want, 4e-16)
	}
	count.check(t, "unit-words.json, conversion", rowCount{run: 17, leftOut: 13})
}

var arithmeticLeftOut = map[string]string{"div-4-103": unknown("[lb_av]")}

func TestWordArithmetic(t *testing.T) {
	read := func(value, unit string) Quantity {
		u := parse(t, unit)
		v, err := u.Read(value)
		if err != nil {
			t.Fatal(err)
		}
		return New(v, u.dim)
	}
	var count rowCount
	for _, c := range readUnitWords(t).Arithmetic {
		if _, out := arithmeticLeftOut[c.Test_id]; out {
			count.leftOut++
			mustRefuse(t, c.Test_id, c.U1)
			continue
		}
		count.run++
		q, err := read(c.V1, c.U1).Mul(read(c.V2, c.U2))
		if c.Op == "/" {
			q, err = read(c.V1, c.U1).Div(read(c.V2, c.U2))
		}
		if err != nil {
			t.Errorf("%s: %v", c.Test_id, err)
			continue
		}
		words := strings.Fields(c.Exact) // number, unit, and perhaps a remark
		want := read(words[0], words[1])
		near.Rel(t, c.Test_id, q.si, want.si, 4e-16)
		if q.dim != want.dim {
			t.Errorf("%s: dimension %s, want %s", c.Test_id, q.dim, want.dim)
		}
	}
	count.check(t, "unit-words.json, arithmetic", rowCount{run: 4, leftOut: 1})
}

var edgesLeftOut = map[string]string{
	"m**2": isOneWord, "m.s": isOneWord, "m s": isOneWord, "mJ per cm2": isOneWord, "W/(m2.K)": isOneWord,
	"u": isMicro, "G": unknown("G"), "ft": unknown("ft"), "mil": isSeveral, "10*3": isBehind,
}

// edgeMeanings spells in units the meanings that the table gives in words.
var edgeMeanings = map[string]string{
	"millisecond": "ms", "degree Celsius": "°C", "siemens": "S", "count/nm²": "photon/nm²", "π/180 rad": "deg",
	"1e-6/K": "1e-6 /K",
}

func TestEdgeSpellings(t *testing.T) {
	var count rowCount
	for _, c := range readUnitWords(t).Edge_spellings {
		if _, out := edgesLeftOut[c.Input]; out {
			count.leftOut++
			mustRefuse(t, c.Input, c.Input)
			continue
		}
		count.run++
		switch c.Engineering_policy {
		case "accept", "accept-hint", "accept-or-define":
			meaning(t, c.Input, c.Meaning)
		case "reject", "reject-or-special":
			refuse(t, "edge", c.Input, false)
		case "reject-hint":
			refuse(t, "edge", c.Input, true)
		case "number":
			v, err := Unit{}.Read(c.Input)
			want, _ := ratio(t, c.Meaning).Float64()
			if err != nil {
				t.Errorf("%s: %v", c.Input, err)
			}
			near.Abs(t, c.Input, v, want, 0)
		default:
			t.Errorf("%s: policy %q is not known to this test", c.Input, c.Engineering_policy)
		}
	}
	count.check(t, "unit-words.json, edge spellings", rowCount{run: 62, leftOut: 10})
}

// meaning holds that a spelling reads as what the table says: a unit, a number,
// or a number and a unit. Rows without a meaning need only be accepted.
func meaning(t *testing.T, text, means string) {
	t.Helper()
	u := parse(t, text)
	if other, ok := edgeMeanings[means]; ok {
		means = other
	}
	if means == "" {
		return
	}
	number, unit, both := strings.Cut(means, " ")
	factor, isNumber := new(big.Rat).SetString(number)
	switch {
	case !isNumber:
		sameUnit(t, text, u, parse(t, means))
		return
	case !both:
		unit = "1"
	}
	v := parse(t, unit)
	if u.dim != v.dim || u.scale.rat().Cmp(factor.Mul(factor, v.scale.rat())) != 0 {
		t.Errorf("%s reads as %s, %s in SI units, want %s", text, u, decimalText(u.scale.rat()), means)
	}
}
