package repl

import (
	"context"
	"errors"
	"io"
	"path"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
)

// Played is one thing that stands in a session file: a note, or a statement
// with the answer that it got when the file was run.
type Played struct {
	Line      int          // where it begins, from 1
	Note      []string     // the lines of a note, without #; nil for a statement
	Statement []Piece      // nil for a note
	Reply     *Reply       // nil for a note
	Picture   *Picture     // what the statement draws, nil for none
	Imported  []Definition // what an import brought in
	Recorded  []string     // the recorded reply, where the reply differs from it
}

// Play runs a session file as [Replay] does, in a new session made from config,
// and returns what stands in it, in order. Pictures are kept, whether or not
// config draws them. It writes nothing. The error says that the file cannot be
// used; what was refused has the refusal in its reply.
func Play(ctx context.Context, config Config, name string) ([]Played, error) {
	_, list, err := readSession(config.Files, name)
	if err != nil {
		return nil, err
	}
	config.Dir = path.Dir(name)
	p := &playing{cases: map[string]int{}}
	p.session = NewSession(p.watched(config))
	p.session.silent = true
	for _, l := range list {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		p.play(ctx, l)
	}
	if s := p.session; s.InBlock() { // it has no end, and reading it says so
		p.keep(Played{Line: s.origin.line, Reply: s.run(ctx, strings.Join(s.block, "\n"))}, nil)
	}
	return p.out, nil
}

// playing is a file on its way.
type playing struct {
	session *Session
	out     []Played
	cases   map[string]int // the lines of what-ifs
	picture *Picture       // what the present statement draws
	noted   bool           // the line before is a note
}

// watched keeps the pictures that pass through a session to its host.
func (p *playing) watched(c Config) Config {
	draw, sketch := c.Draw, c.Sketch
	if draw != nil {
		c.Draw = func(pic *Picture, format string, w io.Writer) error {
			p.picture = pic
			return draw(pic, format, w)
		}
	}
	c.Sketch = func(pic *Picture, columns int) []string {
		p.picture = pic
		if sketch == nil {
			return nil
		}
		return sketch(pic, columns)
	}
	return c
}

// play runs one line of the file.
func (p *playing) play(ctx context.Context, l said) {
	s := p.session
	if !s.InBlock() || strings.HasPrefix(l.line, Prompt) {
		s.origin.line = l.number // of the first line of a block
	}
	text := strings.Trim(strings.TrimPrefix(l.line, Prompt), " \t\r")
	if passing(text) && !s.InBlock() {
		return
	}
	before, names := len(s.imports), p.names(text) // now: a fit gives its names new formulas
	p.picture = nil
	r := s.Feed(ctx, l.line)
	noted := p.noted
	p.noted = strings.HasPrefix(text, "#") && r.Err == nil && !r.More
	switch {
	case r.More && r.Err == nil || text == "":
	case p.noted && noted:
		last := &p.out[len(p.out)-1]
		last.Note = append(last.Note, noteOf(text))
	case p.noted:
		p.out = append(p.out, Played{Line: l.number, Note: []string{noteOf(text)}})
	default:
		item := Played{Line: s.origin.line, Reply: r, Picture: p.picture, Imported: p.brought(before)}
		if r.More {
			item.Line = l.number // a refused line inside a block
		}
		if len(l.recorded) > 0 && !(&player{}).agrees(l.recorded, r) {
			for _, was := range l.recorded {
				item.Recorded = append(item.Recorded, syntax.Visible(was))
			}
		}
		if r.Text != text {
			names = p.names(r.Text) // a block, which is whole now
		}
		p.keep(item, names)
	}
}

func noteOf(line string) string {
	return syntax.Visible(strings.TrimSpace(strings.TrimPrefix(line, "#")))
}

// keep adds a statement with its answer.
func (p *playing) keep(item Played, names []found) {
	var bad *Refusal
	if errors.As(item.Reply.Err, &bad) {
		for _, m := range bad.err.Marks {
			names = append(names, found{m, Piece{Marked: true}})
		}
		item.Picture = nil
	}
	item.Statement = pieces(item.Reply.Text, names)
	at := len(p.out)
	for at > 0 && p.out[at-1].Line > item.Line { // lines of its block that were refused
		at--
	}
	p.out = slices.Insert(p.out, at, item)
	if st, err := syntax.Parse(item.Reply.Text); err == nil && bad == nil {
		if c, ok := st.Do.(*syntax.Case); ok {
			p.cases[c.Name] = item.Line
		}
	}
}

// brought lists what the imports since a count of them defined.
func (p *playing) brought(since int) []Definition {
	var list []Definition
	s := p.session
	for _, im := range s.imports[min(since, len(s.imports)):] {
		for _, name := range im.names {
			if d := s.store.defs[name]; d != nil {
				list = append(list, Definition{Name: name, Place: Place{d.file, d.line}, Text: pieces(d.text, p.names(d.text))})
			}
		}
	}
	return list
}
