package repl

import (
	"context"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// Explanation is a name with what it rests on, as a tree.
type Explanation struct {
	Name     string
	Formula  string // the definition as written, without its note, a block on one line
	Value    *Value // nil for lists, chains, functions and where there is none
	Err      error  // why there is no value, nil where none is to be expected
	Note     string
	File     string // "" for what did not come from a file
	Line     int    // in File
	Children []*Explanation
	Folded   bool // the name stands in the tree before, with its children there
}

// Explain gives what a name rests on, each name of the tree with its children
// once.
func (s *Session) Explain(ctx context.Context, name string) (*Explanation, error) {
	if _, ok := s.constants[name]; ok {
		return s.explainConstant(name), nil
	}
	if s.store.defs[name] == nil {
		return nil, s.refusal(name, s.undefined(name, syntax.Span{End: len(name)})).Err
	}
	e := &explaining{ctx: ctx, session: s, seen: map[string]bool{}}
	root, err := e.grow(name)
	if err != nil {
		return nil, s.refusal(name, err).Err
	}
	return root, nil
}

func (s *Session) explainConstant(name string) *Explanation {
	k := s.constants[name]
	v := s.value(k.value, k.node.Type, nil, nil)
	return &Explanation{Name: name, Formula: name + " = " + k.text(s), Value: v, Note: k.doc}
}

// undefined refuses a name that nothing defines.
func (s *Session) undefined(name string, at syntax.Span) *syntax.Error {
	e := syntax.Fail(at, name+" is not defined", "names lists what is")
	e.Cause = ErrUnknown
	if s.rows[name] != nil {
		e.Msg, e.Hint = name+" is a function of the tool and rests on nothing", "see: help "+name
	} else if near := s.near(name); len(near) > 0 {
		e.Hint = "did you mean " + strings.Join(near, " or ") + "?"
	}
	return e
}

// explaining is a tree on its way.
type explaining struct {
	ctx     context.Context
	session *Session
	seen    map[string]bool
}

func (e *explaining) grow(name string) (*Explanation, error) {
	if err := e.ctx.Err(); err != nil {
		return nil, err
	}
	s := e.session
	d := s.store.defs[name]
	x := &Explanation{Name: name, Formula: s.formula(d), Note: d.note, File: d.file, Folded: e.seen[name]}
	if d.file != "" {
		x.Line = d.line
	}
	x.Value, x.Err = s.present(e.ctx, d)
	if x.Folded {
		return x, nil
	}
	e.seen[name] = true
	for _, u := range d.uses {
		if s.store.defs[u] == nil {
			continue
		}
		child, err := e.grow(u)
		if err != nil {
			return nil, err
		}
		x.Children = append(x.Children, child)
	}
	return x, nil
}

// present is the value of a definition as an answer, nil for what has no
// single one.
func (s *Session) present(ctx context.Context, d *definition) (*Value, error) {
	if d.node == nil || d.node.Type.Kind != program.Number && d.node.Type.Kind != program.Point {
		return nil, nil
	}
	v, err := s.valueOf(d)
	if err != nil {
		return nil, err
	}
	value := s.value(v, d.node.Type, d.unit, d.warning)
	return value, s.addUncertainty(ctx, value, d.node)
}
