package program

import (
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// quantities with their SI unit and the prefixes by which they are written;
// the decimal exponent moves with the prefix, so that each text is the same
// quantity exactly.
var prefixed = []struct {
	symbol string
	ten    int
}{{"n", -9}, {"µ", -6}, {"m", -3}, {"", 0}, {"k", 3}, {"M", 6}, {"G", 9}, {"c", -2}, {"h", 2}}

// Writing the inputs with other prefixes changes no answer, not even its last
// bit.
func TestPrefixesChangeNothing(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	for _, formula := range []string{
		"{250 W} * {2 s} / {0.7 m}^2",
		"{0.5 J} / {3 m}^3 + {2 J} / ({1 m} * {2 m} * {3 m})",
		"sqrt({2 m} * {3 m}) - {1 m}",
		"if({1.5 m} < {2.5 m}, {3 s}, {4 s}) * {2 Hz}",
		"({22 K} - {3 K}) / {7 K}",
		"max({1.5 m}, {1.4 m}, {1.6 m})",
		"count({300 J}/({1 m}*{2 m}), {3 m}*{1 m}, {5 m})",
		"({8 W} at IF)^(1/3) * {2 W}^(2/3)",
		"({2 m}/{3 m})^({4 m}/{1 m})",
	} {
		d := newDesk()
		plain := strings.NewReplacer("{", "(", "}", ")").Replace(formula)
		want, err := d.say(plain)
		if err != nil {
			t.Fatal(d.refusal(plain, err))
		}
		for range 50 {
			text := rewritten(formula, random)
			got, err := d.say(text)
			if err != nil {
				t.Fatal(d.refusal(text, err))
			}
			if got.value != want.value || got.node.Type != want.node.Type {
				t.Errorf("%s is %v, but %s is %v", text, got.value, plain, want.value)
			}
		}
	}
}

// rewritten writes each {number unit} with another prefix.
func rewritten(formula string, random *rand.Rand) string {
	var b strings.Builder
	for {
		before, rest, ok := strings.Cut(formula, "{")
		b.WriteString(before)
		if !ok {
			return b.String()
		}
		quantity, behind, _ := strings.Cut(rest, "}")
		number, unit, _ := strings.Cut(quantity, " ")
		p := prefixed[random.IntN(len(prefixed))]
		fmt.Fprintf(&b, "(%se%d %s%s)", number, -p.ten, p.symbol, unit)
		formula = behind
	}
}

// A sum has the plane of its terms: it never vanishes, and two never mix.
func TestPlanesNeverVanishBySums(t *testing.T) {
	random := rand.New(rand.NewPCG(3, 4))
	planes := []string{"", "", "IF", "MASK", "WAFER"}
	for range 3000 {
		d := newDesk()
		var terms, known []string
		for range 2 + random.IntN(5) {
			term := fmt.Sprintf("%d W", 1+random.IntN(9))
			if p := planes[random.IntN(len(planes))]; p != "" {
				term += " at " + p
				known = append(known, p)
			}
			terms = append(terms, term)
		}
		text := grouped(terms, random)
		slices.Sort(known)
		known = slices.Compact(known)
		a, err := d.say(text)
		switch {
		case len(known) > 1 && err == nil:
			t.Fatalf("%s mixes planes and is %s", text, d.text(a))
		case len(known) <= 1 && err != nil:
			t.Fatalf("%s: %s", text, d.refusal(text, err))
		case err == nil && string(a.node.Type.Plane) != strings.Join(known, ""):
			t.Fatalf("%s is %s", text, d.text(a))
		}
	}
}

// grouped joins terms by + and − in any grouping, or as arguments of sum.
func grouped(terms []string, random *rand.Rand) string {
	if len(terms) == 1 {
		return terms[0]
	}
	if random.IntN(4) == 0 {
		return "sum(" + strings.Join(terms, ", ") + ")"
	}
	cut := 1 + random.IntN(len(terms)-1)
	op := " + "
	if random.IntN(2) == 0 {
		op = " - "
	}
	return "(" + grouped(terms[:cut], random) + op + grouped(terms[cut:], random) + ")"
}

// A random formula over open inputs against an evaluation of its own.
func TestRandomFormulas(t *testing.T) {
	random := rand.New(rand.NewPCG(5, 6))
	names := []string{"a", "b", "c", "d"}
	for range 2000 {
		d := newDesk()
		holds(t, d, "a = 1\nb = 1\nc = 1\nd = 1")
		values := []float64{random.Float64()*4 - 2, random.Float64()*4 - 2, random.Float64()*4 - 2, random.Float64()*4 - 2}
		text, want := grown(random, names, values, 6)
		p, err := Compile(checked(t, d, text), d.resolve, names...)
		if err != nil {
			t.Fatal(err)
		}
		got, err := p.Run(p.NewFrame(), values...)
		if math.IsNaN(want) || math.IsInf(want, 0) {
			if err == nil {
				t.Errorf("%s at %v is %v, want a refusal", text, values, got)
			}
			continue
		}
		if err != nil {
			t.Errorf("%s at %v: %v, want %v", text, values, err, want)
			continue
		}
		near.Rel(t, fmt.Sprint(text, " at ", values), got, want, 1e-12)
	}
}

// grown makes a formula and what it is worth; NaN stands for a refusal and
// spreads.
func grown(random *rand.Rand, names []string, values []float64, depth int) (string, float64) {
	if depth == 0 || random.IntN(5) == 0 {
		if i := random.IntN(len(names) + 1); i < len(names) {
			return names[i], values[i]
		}
		return "1.5", 1.5
	}
	sub := func() (string, float64) { return grown(random, names, values, depth-1) }
	x, u := sub()
	switch random.IntN(8) {
	case 0:
		return "(-" + x + ")", -u
	case 1:
		k := random.IntN(6)
		v := math.Pow(u, float64(k))
		if u != u {
			v = u
		}
		return fmt.Sprintf("(%s)^%d", x, k), v
	case 2:
		y, v := sub()
		if v == 0 || math.IsInf(v, 0) {
			v = math.NaN()
		}
		return "(" + x + "/" + y + ")", u / v
	case 3:
		y, v := sub()
		s, a := sub()
		r, b := sub()
		z := b
		if u != u || v != v {
			z = math.NaN()
		} else if u < v {
			z = a
		}
		return fmt.Sprintf("if(%s < %s, %s, %s)", x, y, s, r), z
	case 4:
		y, v := sub()
		return fmt.Sprintf("max(%s, %s)", x, y), max(u, v)
	case 5, 6:
		y, v := sub()
		return "(" + x + "*" + y + ")", u * v
	}
	y, v := sub()
	return "(" + x + "-" + y + ")", u - v
}
