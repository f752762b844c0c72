package units

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
)

// isSymbol says whether a rune belongs to the symbol of a unit.
func isSymbol(r rune) bool {
	return unicode.IsLetter(r) && !unicode.Is(unicode.Lm, r) || strings.ContainsRune("°%′″'℃℉_‰", r)
}

func isProduct(r rune) bool { return strings.ContainsRune("*·⋅∙•", r) }

// unseen marks are dropped: zero-width space, byte order mark, soft hyphen.
func unseen(r rune) bool { return r == '\u200B' || r == '\uFEFF' || r == '\u00AD' }

// ring is the combining mark that makes an A an Å.
const ring = '\u030A'

// folded gives the one spelling of a rune that Unicode has several of.
func folded(r rune) string {
	switch r {
	case 'μ':
		return "µ" // U+03BC to U+00B5
	case '\u212B':
		return "Å"
	case '\u2126':
		return "Ω"
	case '\u212A':
		return "K"
	case '℃':
		return celsius
	case '℉':
		return "°F"
	case 'º':
		return "°" // the ordinal sign, a frequent slip
	}
	return string(r)
}

func foldAll(word string) string {
	var b strings.Builder
	for _, r := range word {
		b.WriteString(folded(r))
	}
	return b.String()
}

// refused are words that have several meanings or none here, with the way on.
var refused = map[string][2]string{
	"sccm": {"sccm depends on a reference temperature and pressure that it does not say", "write the molar or volume flow that is meant, with its conditions, as in 1.5 L/min"},
	"slm":  {"slm depends on a reference temperature and pressure that it does not say", "write the molar or volume flow that is meant, with its conditions, as in 1.5 L/min"},
	"mil":  {"mil has several meanings: a thousandth of an inch, several angles", "write 0.001 inch, or an angle in mrad"},
	"in":   {"in is a word of the language", "write inch"},
	"cal":  {"cal has several values, 4.184 J (thermochemical) and 4.1868 J (international) among them", "write the energy in J"},
	"kcal": {"kcal has several values, 4184 J (thermochemical) and 4186.8 J (international) among them", "write the energy in kJ"},
	"Btu":  {"Btu has several values, around 1055 J", "write the energy in kJ"},
	"gal":  {"gal has several meanings: gallons of 3.785 L and of 4.546 L, an acceleration", "write the volume in L or the acceleration in m/s^2"},
	"ton":  {"ton has several meanings: 907.18 kg, 1000 kg, 1016.05 kg", "write t for the metric tonne, or the mass in kg"},
	"oz":   {"oz has several meanings, as a mass and as a volume", "write the mass in g or the volume in mL"},
	"hr":   {"hr is no symbol", "write h"},
	"hrs":  {"hrs is no symbol", "write h"},
	"sec":  {"sec is no symbol", "write s"},
	"a":    {"a is no unit here: it is read as year, are and atto", "write year"},
	"yr":   {"yr is no symbol here", "write year"},
	"ppt":  {"ppt has two meanings: 1e-12 and 1e-3", "write the number itself, as in 5e-12"},
	"u":    {"u alone is the micro prefix", "for the dalton write Da"},
	"G":    {"G is a prefix, or the gauss", "for the gauss write 1e-4 T"},
	"C°":   {"C° is no symbol", "write °C"},
	"degF": {"degF is no unit here", "write the temperature in degC or K"},
	"F°":   {"F° is no unit here", "write the temperature in degC or K"},
	"°F":   {"°F is no unit here", "write the temperature in °C or K"},
	"°K":   {"°K is no symbol", "write K"},
	"Nm":   {"Nm can be read as a newton metre or as a slip for nm", "write N*m or nm"},
	"nM":   {"nM can be read as nanomolar or as a slip for nm", "write nmol/L or nm"},
	"RAD":  {"RAD is no symbol", "for the angle write rad, for the absorbed dose Gy"},
	"Ao":   {"Ao is no symbol here", "write Å or angstrom"},
	"psig": {"psig is a gauge pressure, against a reference that it does not say", "write the absolute pressure in psi or Pa"},
	"barg": {"barg is a gauge pressure, against a reference that it does not say", "write the absolute pressure in bar or Pa"},
	"Cel":  {"Cel is no symbol here", "write °C or degC"},
	"dBm":  {"dBm is a logarithm", "write the power in W"},
	"dB":   {"dB is a logarithm", "write the ratio as a number"},
	"cc":   {"cc is no symbol", "write cm^3"},
	"micron": {
		"micron is no symbol here",
		"write µm or um",
	},
	"‰": {"‰ is no unit here", "write the number itself, as in 5e-3"},
}

// explain says why a word is no unit and one way on, when there is one.
func (s *System) explain(word string) (msg, hint string) {
	if m, ok := refused[word]; ok {
		return m[0], m[1]
	}
	for _, r := range word {
		if unicode.Is(unicode.Cyrillic, r) || unicode.Is(unicode.Greek, r) && !strings.ContainsRune("µμΩ", r) {
			return fmt.Sprintf("%s holds the letter %c (%U), which no unit has", word, r, r), "type the Latin letter, or a prefix and symbol"
		}
	}
	if isPrefix(word) {
		return word + " alone is a prefix, not a unit", ""
	}
	if near := s.near(word); len(near) > 0 {
		return word + " is no unit", "did you mean " + strings.Join(near, " or ") + "? Upper and lower case differ"
	}
	if whole := s.unprefixed(word); whole != "" {
		return word + " is no unit: " + whole + " takes no prefix", "write the number in " + whole
	}
	return word + " is no unit", ""
}

// unprefixed gives the unit in a word that is a prefix too much before it.
func (s *System) unprefixed(word string) string {
	for _, p := range prefixes {
		rest, cut := strings.CutPrefix(word, p.symbol)
		if _, ok := s.lookup(rest); cut && ok {
			return rest
		}
	}
	return ""
}

// near lists the spellings that differ from a word in case only.
func (s *System) near(word string) []string {
	var list []string
	consider := func(w string) {
		if strings.EqualFold(w, word) && !slices.Contains(list, w) {
			list = append(list, w)
		}
	}
	for w, r := range s.words {
		consider(w)
		for _, p := range prefixes {
			if r.prefix && len(p.symbol+w) == len(word) {
				consider(p.symbol + w)
			}
		}
	}
	consider("kg")
	slices.Sort(list)
	return list
}
