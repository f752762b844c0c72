package repl

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"
)

// drawnBodies writes random statements about materials, stacks and chains: most
// make sense, some do not.
func drawnBodies(rng *rand.Rand) []string {
	one := func(words ...string) string { return words[rng.IntN(len(words))] }
	mostly := func(sense, nonsense []string) string {
		if rng.IntN(12) == 0 {
			return one(nonsense...)
		}
		return one(sense...)
	}
	formula := func() string {
		return mostly([]string{"Si", "Mo", "Ru", "SiO2", "B4C", "C8H8O", "MoSi2", "Ca(OH)2", "H2", "U"}, []string{"Xx", "si", "Si999999999", "((((C))))", "O0"})
	}
	number := func() string {
		return mostly([]string{"2.33", "0.5", "0.1", "0.9", "g"}, []string{"0", "7", "1", "1e-3", "1e-300", "1e300", "-1", "(d/nm_)", "1/0"})
	}
	length := func() string {
		return mostly([]string{"4.15 nm", "2.85 nm", "(0.4*d)", "d", "(3 nm ± 0.1 nm)", "40 nm", "1 pm"}, []string{"0 nm", "1 m", "(-1 nm)", "1e-300 m", "10 µm", "3 W", "1e300 m", "(d*g)"})
	}
	material := func() string {
		return mostly([]string{"Si", "Mo", "Ru", "glass", "thin", "C"}, []string{"Xx", "B4C", "stack1"})
	}
	layer := func() string {
		text := material() + " " + length()
		if rng.IntN(4) == 0 {
			text += " rough " + length()
		}
		return text
	}
	list := []string{
		"material glass = " + formula() + " " + number() + " g/cm^3",
		"material thin = " + formula() + " " + one("2.2", "0.1", "20", "30", "1e-9") + " g/cm^3",
		"d = " + length(), "g = " + number(),
	}
	for i := range 2 {
		lines := []string{fmt.Sprintf("stack stack%d", i+1)}
		for k := range 1 + rng.IntN(4) {
			times := mostly([]string{"", "", " x2", " x50", " x(n)"}, []string{" x(g)", " x200", " x1e9"})
			parts := make([]string, 1+rng.IntN(4))
			for p := range parts {
				parts[p] = layer()
			}
			lines = append(lines, fmt.Sprintf("  %s%s: %s", mostly([]string{fmt.Sprintf("l%d", k)}, []string{"a", "roughness", "at"}), times, strings.Join(parts, ", ")))
		}
		if rng.IntN(2) == 0 {
			lines = append(lines, "  roughness: "+one("0.4 nm", "0 nm", "5 nm", "d", "50 nm", length()))
		}
		if rng.IntN(2) == 0 {
			lines = append(lines, "  substrate: "+material())
		}
		list = append(list, strings.Join(append(lines, "end"), "\n"))
	}
	element := fmt.Sprintf("reflectivity(stack%d, %s, %s)", 1+rng.IntN(2), one("λ", "wavelength", "13.5 nm", "2*λ"), one("0 deg", "6 deg", "80 deg", "89.9999 deg"))
	return append(list,
		"chain line\n  band: "+mostly([]string{"13.5 nm, 2 %", "13 nm, 1 nm"}, []string{"12.4 nm, 10 %", "5 nm, 60 %"})+"\n  at IF\n  m x"+one("1", "2", "11")+": "+
			one(element, "transmittance(film(Si, d), λ)", "curve({13 nm, 13.4 nm, 14 nm}, {0.5, 0.9, 0.1}, λ)", element+" * g")+"\n  at WAFER\nend")
}

// asks are questions about the bodies, with answers between 0 and 1 except where
// a unit stands.
func asks(rng *rand.Rand) []string {
	wave := []string{"13.5 nm", "13.5 nm", "4.2 nm", "42 nm", "12.4 nm", "1 nm"}[rng.IntN(6)]
	angle := []string{"0 deg", "6 deg", "45 deg", "89.999 deg"}[rng.IntN(4)]
	pol := []string{"s", "p", "unpolarised"}[rng.IntN(3)]
	ask := func(call string) string { return fmt.Sprintf(call, wave, angle) }
	return []string{
		ask("reflectivity(stack1, %s, %s, " + pol + ")"), ask("reflectivity(stack2, %s, %s, " + pol + ")"),
		ask("transmittance(stack1, %s, %s)"), ask("transmittance(stack2, %s, %s)"), ask("reflectivity(glass, %s, %s)"),
		ask("transmittance(film(thin, d), %s, %s)"), "peak_reflectivity(stack1)", "transmission(line, IF, WAFER)",
	}
}

// tryBodies says statements and asks: nothing may panic, be no number or lie
// outside 0…1; what is refused must say why.
func tryBodies(t *testing.T, statements, questions []string) (answers int) {
	t.Helper()
	s := NewSession(Config{})
	spoken(t, s, "nm_ = 1 nm", "n = 40", "d = 7 nm", "g = 0.4")
	check := func(statement string) {
		r := heard(s, statement)
		if r.Err != nil {
			if text := r.Err.Error(); text == "" || strings.Contains(text, "NaN") || strings.Contains(text, "Inf") {
				t.Errorf("%s\n%s: refused with %q", strings.Join(statements, "\n"), statement, text)
			}
			return
		}
		for _, x := range r.Results {
			v, ok := x.(*Value)
			if !ok {
				continue
			}
			answers++
			if math.IsNaN(v.U) || math.IsInf(v.U, 0) || !(v.SI >= 0 && v.SI <= 1) {
				t.Errorf("%s\n%s: %g ± %g", strings.Join(statements, "\n"), statement, v.SI, v.U)
			}
		}
	}
	for _, statement := range statements {
		if r := heard(s, statement); r.More {
			s.Cancel()
		}
	}
	for _, q := range questions {
		check(q)
	}
	return answers
}

func TestDrawnBodies(t *testing.T) {
	rng := rand.New(rand.NewPCG(5, 6))
	answers := 0
	for range 120 {
		answers += tryBodies(t, drawnBodies(rng), asks(rng))
	}
	if answers < 200 {
		t.Errorf("of 960 questions %d have an answer", answers)
	}
	t.Logf("%d of 960 questions have an answer", answers)
}

func FuzzBodies(f *testing.F) {
	for i := range uint64(8) {
		f.Add(i, i+1)
	}
	f.Fuzz(func(t *testing.T, a, b uint64) {
		rng := rand.New(rand.NewPCG(a, b))
		tryBodies(t, drawnBodies(rng), asks(rng))
	})
}

// FuzzStackLines feeds lines of any text inside a block, and a material.
func FuzzStackLines(f *testing.F) {
	for _, text := range []string{
		"cap: Ru 2.5 nm", "bilayer x50: Si 4.15 nm, Mo 2.85 nm rough 0.6 nm\nroughness: 0.4 nm\nsubstrate: Si", "a x(n): Si (d), Mo (g*d)",
		"a: Si 4 nm # note", "a: Si 4.15 nm ± 1 %", "roughness: d\na: C 1e3 nm", "substrate: Mo\nx1: Si 1/3 nm", "a: Si(3 nm), Mo(2 nm) rough 1 nm", "a x3 independent: Si 4 nm",
	} {
		f.Add(text, "SiO2 2.2 g/cm^3")
	}
	f.Fuzz(func(t *testing.T, lines, material string) {
		if strings.ContainsAny(material, "\n\r") || strings.Contains(lines, "dose> ") {
			return
		}
		tryBodies(t, []string{"material glass = " + material, "stack stack1\n" + lines + "\nend"},
			[]string{"reflectivity(stack1, 13.5 nm)", "reflectivity(stack1, 13.5 nm, 80 deg, p)", "transmittance(stack1)", "reflectivity(glass, 13.5 nm)"})
	})
}
