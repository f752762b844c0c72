package repl

import (
	"context"
	"fmt"
	"io"
	"io/fs"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Config is what a session starts from. The zero value is a session that
// reads no files and writes none.
type Config struct {
	// Files is where import, replay and data read; nil refuses them.
	Files fs.FS
	// Dir is the folder of the session inside Files, "." by default.
	Dir string
	// Create makes a file of the session's folder, which appears whole or not at
	// all; nil refuses save and whatever else writes.
	Create func(name string) (File, error)
	// Draw makes a picture file, format "svg" or "png"; nil refuses them.
	Draw func(p *Picture, format string, w io.Writer) error
	// Sketch draws a chart of characters, so many columns wide; nil draws none.
	Sketch func(p *Picture, columns int) []string
	// Progress is told how far long computations are; nil is not.
	Progress Progress
	// Functions of the host, beside those of the catalogue.
	Functions []Function
	// Constants of the host, beside those of the language.
	Constants []Constant
	// Units is what unit words mean, nil for units.Standard; a host makes its own
	// with units.System.WithUnit and WithCounted.
	Units *units.System
	// Limits bound what statements may cost; the zero value is their defaults.
	Limits Limits
	// Version is what the program that holds the session calls itself.
	Version string
}

// Session evaluates statements one after the other. It is not safe for
// concurrent use; make one a goroutine.
type Session struct {
	config    Config
	limits    Limits
	broken    error // why Open would refuse the configuration
	sys       *units.System
	store     store
	rows      map[string]*program.Function
	constants map[string]constantRow
	planes    map[string][]program.Plane // by chain
	prefer    map[units.Dimension]units.Unit
	counted   []string
	digits    int
	entries   []entry
	block     []string // lines of the block being typed
	origin    origin   // where statements come from now
	imports   []imported
	pairings  []pairing           // correlations of inputs
	tables    map[string][]string // columns of each data table
	cases     map[string]*whatIf
	saved     map[string]bool // files that this session wrote, or was asked twice to
	silent    bool            // a replay, which writes nothing
	steps     int             // statements run so far, those of imports included
}

// origin is the file and line of a statement; the zero value is the prompt.
type origin struct {
	file string
	line int
}

// entry is what was said and answered, for save.
type entry struct {
	text  string
	reply *Reply
}

// DefaultDigits is how many significant digits an answer shows.
const DefaultDigits = 5

// Prompt stands before a statement, and MorePrompt before a line of a block,
// in transcripts too; Margin begins every line that a session prints.
const (
	Prompt     = "dose> "
	MorePrompt = "      "
	Margin     = "| "
)

// Feed takes one line, without its line end. A line that completes a statement
// is run; a line inside a block is kept until the block ends. Lines that begin
// with the margin are replies that were copied along and are passed over.
func (s *Session) Feed(ctx context.Context, line string) *Reply {
	text := strings.TrimRight(strings.TrimPrefix(line, Prompt), " \t\r")
	if strings.HasPrefix(line, Prompt) {
		s.block = nil // a prompt inside a block: it was given up
	}
	if s.block == nil && (strings.HasPrefix(text, "|") || strings.TrimSpace(text) == "") {
		return &Reply{Text: text}
	}
	if len(s.block) > 0 {
		return s.feedBlock(ctx, text)
	}
	text = strings.TrimLeft(text, " \t")
	if _, ok := syntax.BlockHeading(text); ok {
		if _, err := syntax.ParseHeading(text); err != nil {
			return s.refusal(text, err)
		}
		s.block = []string{text}
		return &Reply{Text: text, More: true}
	}
	return s.run(ctx, text)
}

// feedBlock keeps a line of a block; a line that cannot be read is refused at
// once and not kept.
func (s *Session) feedBlock(ctx context.Context, line string) *Reply {
	if strings.HasPrefix(line, "|") {
		return &Reply{Text: line, More: true}
	}
	if syntax.BlockEnd(line) && len(s.block) >= syntax.MaxBlockLines {
		heading := s.block[0]
		s.block = nil
		return s.refusal(heading, syntax.Fail(syntax.Span{Start: 0, End: len(heading)}, fmt.Sprintf("this block has more than %d lines", syntax.MaxBlockLines), "make two of it"))
	}
	if syntax.BlockEnd(line) {
		text := strings.Join(append(s.block, "end"), "\n")
		s.block = nil
		return s.run(ctx, text)
	}
	if _, err := syntax.ParseBlockLine(line); err != nil {
		r := s.refusal(strings.TrimSpace(line), shift(err, len(line)-len(strings.TrimLeft(line, " \t"))))
		r.More = true
		return r
	}
	if len(s.block) >= syntax.MaxBlockLines {
		return &Reply{Text: line, More: true} // its end refuses it
	}
	s.block = append(s.block, "  "+strings.TrimSpace(line))
	return &Reply{Text: line, More: true}
}

func shift(e *syntax.Error, n int) *syntax.Error {
	moved := *e
	moved.Marks = nil
	for _, m := range e.Marks {
		moved.Marks = append(moved.Marks, syntax.Span{Start: max(0, m.Start-n), End: max(0, m.End-n)})
	}
	return &moved
}

// Cancel drops the block being typed.
func (s *Session) Cancel() { s.block = nil }

// InBlock says whether a block is being typed.
func (s *Session) InBlock() bool { return len(s.block) > 0 }

// run parses and runs one statement and keeps it for save.
func (s *Session) run(ctx context.Context, text string) *Reply {
	var r *Reply
	if st, bad := syntax.Parse(text); bad != nil {
		r = s.refusal(text, s.misspelt(text, bad))
	} else if st.Do == nil {
		r = &Reply{Text: text}
	} else {
		r = s.act(ctx, text, st)
	}
	s.entries = append(s.entries, entry{text, r})
	return r
}

// act runs a statement that could be read.
func (s *Session) act(ctx context.Context, text string, st *syntax.Statement) *Reply {
	s.steps++
	r := &Reply{Text: text, style: s.style()}
	results, err := s.perform(ctx, text, st)
	r.Results = results
	for _, x := range results {
		if v, ok := x.(*Verdict); ok && !v.Holds {
			r.Failed = true
		}
	}
	if err != nil {
		refused := s.refusal(text, err)
		refused.style = r.style
		return refused
	}
	if c, ok := st.Do.(*syntax.Command); ok && c.Word == "quit" {
		r.Quit = true
	}
	return r
}

func (s *Session) style() Style { return Style{Digits: s.digits} }

// Units returns the unit words of the session; with Node, Own and the others
// it makes the session a scope for the checker.
func (s *Session) Units() *units.System { return s.sys }

type scope struct{ s *Session }

func (c scope) Units() *units.System { return c.s.sys }

func (c scope) Node(name string) *program.Node {
	if d := c.s.store.defs[name]; d != nil {
		return d.node
	}
	return nil
}

func (c scope) Own(name string) *program.OwnFunction {
	if d := c.s.store.defs[name]; d != nil {
		return d.own
	}
	return nil
}

func (c scope) Constant(name string) *program.Node { return c.s.constants[name].node }

func (c scope) Function(name string) *program.Function { return c.s.rows[name] }

func (c scope) Planes() []program.Plane {
	var all []program.Plane
	for _, list := range c.s.planes {
		for _, p := range list {
			if !slices.Contains(all, p) {
				all = append(all, p)
			}
		}
	}
	slices.Sort(all)
	return all
}

func (c scope) Near(word string) []string { return c.s.near(word) }
