package repl

import (
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

func (s *Session) help(j job) ([]Result, error) {
	word := j.do.(*syntax.Command).Text
	if lines := s.helpOn(word); lines != nil {
		return []Result{&Text{content: lines}}, nil
	}
	found := s.mentions(word)
	if len(found) == 0 {
		hint := "help lists the topics"
		if near := s.near(word); len(near) > 0 {
			hint = "did you mean " + strings.Join(near, " or ") + "?"
		}
		return nil, syntax.Fail(j.do.(*syntax.Command).TextAt, "there is no help on "+shortened(word), hint)
	}
	return []Result{&Text{content: append([]string{"what mentions " + shortened(word) + ":"}, found...)}}, nil
}

// Help returns the help on a topic, nil when there is none; "" is the way in.
func (s *Session) Help(topic string) []string { return s.helpOn(topic) }

func (s *Session) helpOn(word string) []string {
	switch word {
	case "":
		return overview()
	case "statements":
		return statementList()
	case "functions":
		return s.functionList()
	case "topics":
		return topicList()
	}
	for _, t := range topics() {
		if t.name == word {
			return t.lines()
		}
	}
	for _, st := range statements() {
		if st.word == word {
			return st.lines()
		}
	}
	if f := s.rows[word]; f != nil {
		return s.functionHelp(f)
	}
	if k, ok := s.constants[word]; ok {
		return []string{word + " = " + k.text(s) + ", " + k.doc}
	}
	if d := s.store.defs[word]; d != nil {
		return []string{strings.TrimSpace(s.formula(d) + "  " + remarks(d)), "why " + word + " shows what it rests on"}
	}
	if slices.Contains(planeNames(scope{s}.Planes()), word) {
		return append([]string{word + " is a plane."}, topic{text: planesPage}.lines()...)
	}
	if u, err := s.sys.Parse(word); err == nil {
		lines := []string{s.unitHelp(word, u)}
		if found := s.mentions(word); len(found) > 0 && u.Dimension().IsNumber() {
			lines = append(append(lines, "what mentions "+word+":"), found...)
		}
		return lines
	}
	return nil
}

func overview() []string {
	return append([]string{
		"A line is an expression, a definition or a statement; help WORD explains them.",
		"  30 mJ/cm^2 * 8.58 cm^2              a unit stands right behind its number",
		"  P = 250 W at IF  # a note           a definition, live; IF is its plane",
		"  photon_count(30 mJ/cm^2, 400 nm^2)  a named function",
		"  P / 3 [W]                           a bracket states the answer in that unit",
		"",
	}, topicList()...)
}

func topicList() []string {
	rows := [][]string{
		{"help statements", "every statement in one line"},
		{"help functions", "every named function in one line"},
	}
	for _, t := range topics() {
		rows = append(rows, []string{"help " + t.name, t.summary})
	}
	return aligned(rows)
}

func statementList() []string {
	var rows [][]string
	for _, st := range statements() {
		usage, _, _ := strings.Cut(st.usage, "  or  ")
		rows = append(rows, []string{usage, st.summary})
	}
	return foldedAll(aligned(rows))
}

func (st statement) lines() []string {
	out := []string{st.usage, "  " + st.summary}
	if st.more != "" {
		for _, l := range strings.Split(st.more, "\n") {
			out = append(out, "  "+l)
		}
	}
	if st.example != "" {
		out = append(out, "example:")
		for _, l := range strings.Split(st.example, "\n") {
			out = append(out, "  "+l)
		}
	}
	return out
}

// functionList has the functions by section, in the order of the catalogue.
func (s *Session) functionList() []string {
	bySection := map[string][][]string{}
	var order []string
	for _, f := range s.functionsByName() {
		if bySection[f.Section] == nil {
			order = append(order, f.Section)
		}
		bySection[f.Section] = append(bySection[f.Section], []string{"  " + f.Name, f.Summary})
	}
	slices.Sort(order)
	var out []string
	for _, section := range order {
		out = append(out, section)
		out = append(out, foldedAll(aligned(bySection[section]))...)
	}
	return out
}

func (s *Session) functionHelp(f *program.Function) []string {
	lines := []string{f.Signature(), "  " + f.Summary}
	var rows [][]string
	for _, p := range f.Params {
		rows = append(rows, []string{"  " + p.Name, s.paramKind(f, p), p.Doc})
	}
	rows = append(rows, []string{"  result", s.resultKind(f), f.Result.Doc})
	lines = append(lines, aligned(rows)...)
	for _, part := range [][2]string{{"formula", f.Formula}, {"valid", f.Valid}, {"source", f.Source}, {"example", f.Example}, {"caution", f.Caution}} {
		if part[1] != "" {
			lines = append(lines, "  "+part[0]+": "+part[1])
		}
	}
	return foldedAll(lines)
}

// paramKind says in a few words what an argument is.
func (s *Session) paramKind(f *program.Function, p program.Param) string {
	text := ""
	switch {
	case len(p.Words) > 0:
		text = strings.Join(p.Words, " or ")
	case p.IsPlane:
		text = "a plane"
	case p.Kind == program.ChainKind:
		text = "a chain"
	case f.Variadic():
		text = "values of one dimension, or a list"
	case f.Rule != nil || f.Build != nil:
		text = "any quantity that fits"
	case p.Kind == program.Point:
		text = "a temperature"
	default:
		text = s.kindOf(p.Dim)
	}
	if p.Plane != "" {
		text += " at " + string(p.Plane)
	}
	if p.Default != "" {
		text += ", default " + p.Default
	}
	return text
}

func (s *Session) resultKind(f *program.Function) string {
	text := s.kindOf(f.Result.Dim)
	switch {
	case f.Rule != nil || f.Build != nil:
		text = "as its arguments say"
	case f.Result.Kind == program.Point:
		text = "a temperature"
	case f.Result.Unit != "":
		text = "stated in " + f.Result.Unit
	case f.Result.Plane != "":
		text += " at " + string(f.Result.Plane)
	case f.Result.Follows > 0:
		text += ", at the plane of " + f.Params[f.Result.Follows-1].Name
	}
	return text
}

// mentions lists what mentions a word, or one that begins with it, a line each.
func (s *Session) mentions(word string) []string {
	word = strings.ToLower(word)
	var rows [][]string
	has := func(texts ...string) bool {
		before := ' '
		text := strings.ToLower(strings.Join(texts, " "))
		for i, r := range text {
			if !(unicode.IsLetter(before) || unicode.IsDigit(before)) && strings.HasPrefix(text[i:], word) && (len(word) > 2 || !startsWord(text[i+len(word):])) {
				return true
			}
			before = r
		}
		return false
	}
	for _, f := range s.functionsByName() {
		if has(f.Name, f.Summary, f.Section) {
			rows = append(rows, []string{"  help " + f.Name, f.Summary})
		}
	}
	for _, st := range statements() {
		if has(st.word, st.usage, st.summary, st.more) {
			rows = append(rows, []string{"  help " + st.word, st.summary})
		}
	}
	for _, t := range topics() {
		if has(t.name, t.summary, t.text) {
			rows = append(rows, []string{"  help " + t.name, t.summary})
		}
	}
	for _, d := range s.inOrder() {
		if has(d.name, d.note) {
			rows = append(rows, []string{"  why " + d.name, d.note})
		}
	}
	return aligned(rows)
}

// startsWord says whether a text goes on with a letter or a digit.
func startsWord(text string) bool {
	r, _ := utf8.DecodeRuneInString(text)
	return unicode.IsLetter(r) || unicode.IsDigit(r)
}

func (t topic) lines() []string { return strings.Split(strings.Trim(t.text, "\n"), "\n") }
