package repl

import (
	"io/fs"
	"path"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

func wordRune(r rune) bool { return unicode.IsLetter(r) || unicode.IsDigit(r) || r == '_' }

// Complete offers what may stand at the cursor, a byte offset in line: where
// the word being typed begins, and the words that may take its place.
func (s *Session) Complete(line string, cursor int) (start int, candidates []string) {
	text := line[:min(max(cursor, 0), len(line))]
	text, shift := strings.TrimPrefix(text, Prompt), 0
	if len(text) < len(line) && strings.HasPrefix(line, Prompt) {
		shift = len(Prompt)
	}
	start, candidates = s.offers(text)
	return start + shift, candidates
}

func (s *Session) offers(text string) (int, []string) {
	if open := strings.LastIndexByte(text, '"'); strings.Count(text, `"`)%2 == 1 {
		return open + 1, s.files(text[open+1:])
	}
	if open := strings.LastIndexByte(text, '['); open > strings.LastIndexByte(text, ']') {
		return s.unitOffers(text, open+1)
	}
	if from, ok := unitStart(text); ok {
		return s.unitOffers(text, from)
	}
	start := wordStart(text)
	word, before := text[start:], strings.TrimRight(text[:start], " ")
	first, _, spaced := strings.Cut(strings.TrimLeft(text, " "), " ")
	switch {
	case word != "" && unicode.IsDigit(rune(word[0])):
		return start, nil
	case strings.HasSuffix(before, " at") || before == "at":
		return start, beginning(word, planeNames(scope{s}.Planes()))
	case first == "help" && spaced:
		return start, beginning(word, s.helpWords())
	case slices.Contains([]string{"why", "forget", "names"}, first) && spaced:
		return start, beginning(word, s.definedNames(nil))
	case first == "walk" && spaced && before == "walk":
		return start, beginning(word, s.definedNames(func(d *definition) bool { return d.node != nil && d.node.Type.Kind == program.ChainKind }))
	}
	if c, ok := callAt(text); ok {
		return start, s.argumentOffers(c, word)
	}
	var list []string
	if before == "" {
		list = beginning(word, statementWords())
	}
	return start, append(list, beginning(word, s.expressionWords(nil))...)
}

// argumentOffers has, in this order: the words that the argument takes, names
// of its dimension, argument names, and all else.
func (s *Session) argumentOffers(c calling, word string) []string {
	var list []string
	f := s.rows[c.function]
	if f == nil {
		return beginning(word, s.expressionWords(nil))
	}
	p := c.parameter(f)
	if p != nil {
		list = append(list, p.Words...)
		if p.IsPlane {
			return beginning(word, planeNames(scope{s}.Planes()))
		}
		list = append(list, s.definedNames(func(d *definition) bool { return d.node != nil && suits(p, d.node.Type) })...)
	}
	if c.label == "" {
		for i, q := range f.Params {
			if i >= c.place && !f.Variadic() {
				list = append(list, q.Name+" = ")
			}
		}
	}
	return beginning(word, append(list, s.expressionWords(list)...))
}

func suits(p *program.Param, t program.Type) bool {
	if p.Kind == program.ChainKind {
		return t.Kind == program.ChainKind
	}
	return t.Dim == p.Dim && (t.Kind == p.Kind || p.Kind == program.Number && t.Kind == program.Number) &&
		(p.Plane == "" || t.Plane == "" || t.Plane == p.Plane)
}

// unitStart is where the unit begins that is being typed behind a number.
func unitStart(text string) (int, bool) {
	start := strings.LastIndexAny(text, " ([{,=+<>") + 1
	number := strings.TrimSuffix(text[:start], " ")
	if digits := strings.TrimLeft(text[start:], "0123456789._"); digits != text[start:] {
		start = len(text) - len(digits) // it touches its number
		number = text[:start]
	}
	i := strings.LastIndexFunc(number, func(r rune) bool { return !wordRune(r) && r != '.' }) + 1
	letters := strings.HasPrefix(text[start:], "/") || start < len(text) && (unicode.IsLetter(rune(text[start])) || text[start] >= utf8.RuneSelf)
	return start, letters && i < len(number) && unicode.IsDigit(rune(number[i]))
}

// unitOffers completes a unit that begins at start, in a bracket or behind a
// number.
func (s *Session) unitOffers(text string, start int) (int, []string) {
	inside := text[start:]
	if i := strings.LastIndex(inside, " at "); i >= 0 {
		at := start + i + len(" at ")
		return at, beginning(text[at:], planeNames(scope{s}.Planes()))
	}
	at := start
	for i, r := range inside {
		if strings.ContainsRune("/*·(", r) {
			at = start + i + utf8.RuneLen(r)
		}
	}
	word := text[at:]
	var list []string
	for _, w := range s.sys.Words() {
		list = append(list, w)
		for _, p := range []string{"n", "u", "m", "k", "M", "G", "c", "p", "f"} {
			if u, err := s.sys.Parse(p + w); err == nil && commonly(p, w, u) && word != "" && strings.HasPrefix(p+w, word) {
				list = append(list, p+w)
			}
		}
	}
	return at, beginning(word, list)
}

// commonly says whether a prefix is worth offering: centi before metres, and
// none that makes counted things smaller.
func commonly(prefix, word string, u units.Unit) bool {
	counted := u.Dimension().WithoutCounted() != u.Dimension() || u.Dimension().IsNumber()
	return (prefix != "c" || word == "m") && (!counted || prefix == "k" || prefix == "M" || prefix == "G")
}

func planeNames(list []program.Plane) []string {
	names := []string{"SOURCE", "IF", "MASK", "WAFER"}
	for _, p := range list {
		names = append(names, string(p))
	}
	return names
}

func beginning(word string, list []string) []string {
	var out []string
	for _, w := range list {
		if strings.HasPrefix(w, word) && !slices.Contains(out, w) {
			out = append(out, w)
		}
	}
	return out
}

func statementWords() []string {
	var list []string
	for _, st := range statements() {
		if syntax.StatementWord(st.word) {
			list = append(list, st.word+" ")
		}
	}
	slices.Sort(list)
	return list
}

func (s *Session) definedNames(keep func(*definition) bool) []string {
	var list []string
	for _, d := range s.inOrder() {
		if keep == nil || keep(d) {
			list = append(list, d.name)
		}
	}
	slices.Sort(list)
	return list
}

// expressionWords are names, functions and constants but for those listed.
func (s *Session) expressionWords(but []string) []string {
	var list []string
	for _, d := range s.inOrder() {
		word := d.name
		if d.own != nil {
			word += "("
		}
		list = append(list, word)
	}
	for _, f := range s.rows {
		list = append(list, f.Name+"(")
	}
	for name := range s.constants {
		list = append(list, name)
	}
	list = append(list, "if(")
	slices.Sort(list)
	return slices.DeleteFunc(list, func(w string) bool { return slices.Contains(but, w) })
}

func (s *Session) helpWords() []string {
	list := []string{"statements", "functions", "topics"}
	for _, t := range topics() {
		list = append(list, t.name)
	}
	for _, st := range statements() {
		list = append(list, st.word)
	}
	for name := range s.rows {
		list = append(list, name)
	}
	list = append(list, s.definedNames(nil)...)
	slices.Sort(list)
	return slices.Compact(list)
}

// files lists the session files and folders that a path may go on with.
func (s *Session) files(typed string) []string {
	if s.config.Files == nil {
		return nil
	}
	folder, _ := path.Split(typed)
	full, err := s.inside(path.Join(folder, "."))
	if err != nil {
		return nil
	}
	entries, err := fs.ReadDir(s.config.Files, full)
	if err != nil {
		return nil
	}
	var list []string
	for _, e := range entries[:min(len(entries), 1000)] {
		switch name := e.Name(); {
		case strings.HasPrefix(name, "."):
		case e.IsDir():
			list = append(list, folder+name+"/")
		default:
			list = append(list, folder+name)
		}
	}
	return beginning(typed, list)
}
