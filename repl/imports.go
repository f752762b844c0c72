package repl

import (
	"context"
	"fmt"
	"path"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// imported is a file that was brought in, with what it defined.
type imported struct {
	file  string
	names []string
}

// Imported is the answer of an import: what came in, so that a later replay
// can tell what has changed since.
type Imported struct {
	File        string
	Hash        string
	Definitions []string // "name = formula", files of its own included
	Already     bool     // it was brought in before
}

func (v *Imported) lines(Style) []Line {
	if v.Already {
		return []Line{{path.Base(v.File) + " is here already", Plain}}
	}
	noun := "names"
	if len(v.Definitions) == 1 {
		noun = "name"
	}
	out := []Line{{fmt.Sprintf("%d %s from %s, content %s", len(v.Definitions), noun, path.Base(v.File), v.Hash), Plain}}
	for _, d := range v.Definitions {
		out = append(out, Line{"  " + d, Plain})
	}
	return out
}

func (v *Imported) record() Record { return Record{Kind: TextRecord} }

func (s *Session) importFile(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	full, err := s.inside(c.Text)
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{c.TextAt}, Msg: err.Error(), Hint: "paths are relative to the importing file and stay below the session's folder", Cause: err}
	}
	for _, im := range s.imports {
		if im.file == full {
			return []Result{&Imported{File: full, Already: true}}, nil
		}
	}
	before := s.snapshot()
	from := len(s.imports)
	if err := s.bringIn(j.ctx, full, nil); err != nil {
		s.restore(before)
		return nil, &syntax.Error{Marks: []syntax.Span{c.TextAt}, Msg: err.Error(), Hint: "nothing was brought in", Cause: err}
	}
	v := &Imported{File: full}
	for _, im := range s.imports[from:] {
		for _, name := range im.names {
			v.Definitions = append(v.Definitions, s.formula(s.store.defs[name]))
		}
	}
	v.Hash = contentHash(v.Definitions)
	return []Result{v}, nil
}

// bringIn runs the definitions of a file; trail holds the files that are being
// read, to find circles.
func (s *Session) bringIn(ctx context.Context, file string, trail []string) error {
	if slices.Contains(trail, file) {
		return fmt.Errorf("these files import one another in a circle: %s: %w", strings.Join(append(trail, file), " → "), ErrFile)
	}
	if most := s.limits.Imports; len(s.imports) >= most {
		return fmt.Errorf("more than %d files are brought in, join some of them: %w: %w", most, ErrFile, &LimitError{"Imports", int64(most), int64(most) + 1})
	}
	_, list, err := readSession(s.config.Files, file)
	if err != nil {
		return err
	}
	outer := s.origin
	defer func() { s.origin = outer }()
	var names []string
	for _, p := range statementsOf(list) {
		if err := ctx.Err(); err != nil {
			return err
		}
		s.origin = origin{file, p.number}
		name, err := s.bringPart(ctx, file, p, append(trail, file))
		if err != nil {
			return err
		}
		if name != "" && !slices.Contains(names, name) {
			names = append(names, name)
		}
	}
	s.imports = append(s.imports, imported{file, names})
	return nil
}

// bringPart runs one statement of an imported file when it defines something.
// What was refused when it was said, and is again, defines nothing.
func (s *Session) bringPart(ctx context.Context, file string, p whole, trail []string) (string, error) {
	if !p.refused {
		return s.bringDefinition(ctx, file, p, trail)
	}
	before := s.snapshot()
	name, err := s.bringDefinition(ctx, file, p, trail)
	if err != nil && ctx.Err() == nil {
		s.restore(before)
		return "", nil
	}
	return name, err
}

func (s *Session) bringDefinition(ctx context.Context, file string, p whole, trail []string) (string, error) {
	st, bad := syntax.Parse(p.text)
	if bad != nil {
		return "", fmt.Errorf("%s:%d: %w", file, p.number, bad)
	}
	name := ""
	switch a := st.Do.(type) {
	case *syntax.Define:
		name = a.Name
	case *syntax.DefineFunction:
		name = a.Name
	case *syntax.Block:
		name = a.Name
	case *syntax.Material:
		name = program.MaterialKey(a.Name)
	case *syntax.Data, *syntax.Case, *syntax.Correlation:
	case *syntax.Command:
		if a.Word == "import" {
			return "", s.nested(ctx, file, p.number, a.Text, trail)
		}
		if a.Word != "counted" {
			return "", nil
		}
	default:
		return "", nil // an import brings in definitions alone
	}
	if _, err := s.perform(ctx, p.text, st); err != nil {
		return "", fmt.Errorf("%s:%d: %w", file, p.number, err)
	}
	return name, nil
}

func (s *Session) nested(ctx context.Context, file string, line int, name string, trail []string) error {
	full, err := s.inside(name)
	if err != nil {
		return fmt.Errorf("%s:%d: %w", file, line, err)
	}
	if !slices.Contains(trail, full) {
		for _, im := range s.imports {
			if im.file == full {
				return nil
			}
		}
	}
	return s.bringIn(ctx, full, trail)
}
