package repl

import (
	"context"
	"fmt"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// whyLines is how long a tree may grow before the rest is counted only.
const whyLines = 60

func (s *Session) why(j job) ([]Result, error) {
	name := j.do.(*syntax.Command).Names[0]
	if k, ok := s.constants[name.Name]; ok {
		return []Result{&Text{content: []string{name.Name + " = " + k.text(s) + "  # " + k.doc}}}, nil
	}
	if s.store.defs[name.Name] == nil && s.store.defs[program.MaterialKey(name.Name)] != nil {
		name.Name = program.MaterialKey(name.Name)
	}
	if s.store.defs[name.Name] == nil {
		return nil, s.undefined(name.Name, name.Where)
	}
	t := &tree{ctx: j.ctx, session: s, seen: map[string]bool{}}
	t.grow(name.Name, 0)
	return []Result{&Text{content: t.text()}}, nil
}

// tree collects the lines of a derivation.
type tree struct {
	ctx     context.Context
	session *Session
	seen    map[string]bool
	rows    [][]string
	folded  map[string]bool
}

func (t *tree) grow(name string, depth int) {
	d := t.session.store.defs[name]
	if d == nil {
		return
	}
	indent := strings.Repeat("  ", min(depth, 20))
	if t.seen[name] {
		t.add(indent+name, "", "(above)")
		return
	}
	if len(t.rows) >= whyLines {
		if t.folded == nil {
			t.folded = map[string]bool{}
		}
		for a := range t.session.store.ancestors([]string{name}) {
			if !t.seen[a] {
				t.folded[a] = true
			}
		}
		return
	}
	t.seen[name] = true
	t.add(indent+shortened(t.session.formula(d)), t.session.worth(t.ctx, d), remarks(d))
	for _, u := range d.uses {
		t.grow(u, depth+1)
	}
}

func (t *tree) add(cells ...string) { t.rows = append(t.rows, cells) }

// shortened keeps a formula from pushing the value off the screen; walk shows
// a chain in full.
func shortened(formula string) string {
	const most = 76
	if columns(formula) <= most {
		return formula
	}
	return string([]rune(formula)[:most-2]) + " …"
}

// text lines the parts up.
func (t *tree) text() []string {
	out := aligned(t.rows)
	if n := len(t.folded); n > 0 {
		out = append(out, fmt.Sprintf("… and %d more names below these; why on one of them goes on", n))
	}
	return out
}

// formula is a definition as one line of text, without its note.
func (s *Session) formula(d *definition) string {
	if b, ok := d.action.(*syntax.Block); ok {
		var parts []string
		for _, l := range b.Lines {
			content, _, _ := strings.Cut(l.Text, "#")
			parts = append(parts, strings.TrimSpace(content))
		}
		return b.Kind + " " + d.name + ": " + strings.Join(parts, "; ")
	}
	return statementWithoutNote(d.text)
}

// statementWithoutNote cuts a note off, but not a # inside a text.
func statementWithoutNote(text string) string {
	quoted := false
	for i, r := range text {
		switch {
		case r == '"':
			quoted = !quoted
		case r == '#' && !quoted:
			return strings.TrimSpace(text[:i])
		}
	}
	return strings.TrimSpace(text)
}

// worth is the value of a definition as text, "" for chains, functions and
// bare literals, whose text says it.
func (s *Session) worth(ctx context.Context, d *definition) string {
	if d.node == nil || d.bare || d.node.Type.Kind != program.Number && d.node.Type.Kind != program.Point {
		return ""
	}
	v, err := s.valueOf(d)
	if err != nil {
		return "has no value: " + err.Error()
	}
	value := s.value(v, d.node.Type, d.unit, nil)
	if err := s.addUncertainty(ctx, value, d.node); err != nil {
		return "has no uncertainty: " + err.Error()
	}
	return "= " + value.Text(s.digits)
}

func remarks(d *definition) string {
	var parts []string
	if d.note != "" {
		parts = append(parts, "# "+d.note)
	}
	if d.file != "" {
		parts = append(parts, fmt.Sprintf("(%s:%d)", d.file, d.line))
	}
	return strings.Join(parts, "  ")
}
