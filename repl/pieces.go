package repl

import (
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// Place is a line of a session file. File is "" for the session itself; Line 0
// is no place.
type Place struct {
	File string
	Line int
}

// Piece is a part of a statement. The texts of all pieces together are the
// statement, made visible where it held control codes.
type Piece struct {
	Text    string
	Place   Place // where the name that stands here is defined
	Defines bool  // it is the name that the statement defines
	Marked  bool  // the refusal marks it
	Note    bool  // it is a note behind the statement, with its #
}

// Definition is a definition of an imported file, as it is written there.
type Definition struct {
	Name  string
	Place Place
	Text  []Piece
}

// found says what a range of a statement is.
type found struct {
	at   syntax.Span
	what Piece // without its text
}

// names finds the names in a statement and where they are defined now. What
// cannot be read has none.
func (p *playing) names(text string) []found {
	st, bad := syntax.Parse(text)
	if bad != nil || st.Do == nil {
		return nil
	}
	var list []found
	if name, ok := syntax.Defined(st.Do); ok {
		list = append(list, found{name.Where, Piece{Defines: true}})
	}
	for _, u := range syntax.Uses(st.Do) {
		if at := p.place(u); at.Line > 0 {
			list = append(list, found{u.Where, Piece{Place: at}})
		}
	}
	return list
}

// place is where a name is defined, the zero Place for what is defined nowhere
// in the session: a function of the catalogue, a parameter, a local name.
func (p *playing) place(u syntax.Use) Place {
	name, defs := u.Name.Name, p.session.store.defs
	var d *definition
	switch u.Of {
	case syntax.OfCase:
		return Place{"", p.cases[name]}
	case syntax.OfFunction:
		if d = defs[name]; d != nil && d.own == nil {
			return Place{} // a value with the name of a function of the catalogue
		}
	case syntax.OfTable:
		if columns := p.session.tables[name]; len(columns) > 0 {
			d = defs[name+"."+columns[0]]
		}
	case syntax.OfMaterial:
		d = either(defs[program.MaterialKey(name)], defs[name])
	default:
		d = either(defs[name], defs[program.MaterialKey(name)])
	}
	if d == nil {
		return Place{}
	}
	return Place{d.file, d.line}
}

func either(a, b *definition) *definition {
	if a != nil {
		return a
	}
	return b
}

// pieces cuts a statement where something was found in it, and at its notes.
func pieces(text string, list []found) []Piece {
	paint := make([]Piece, len(text)+1) // of each byte, and of the end
	for _, f := range append(list, notesIn(text)...) {
		for i := min(f.at.Start, len(text)); i < max(f.at.End, f.at.Start+1) && i < len(paint); i++ {
			paint[i] = paint[i].with(f.what)
		}
	}
	var out []Piece
	add := func(from, to int) {
		if from < to {
			piece := paint[from]
			piece.Text = visibleLines(text[from:to])
			out = append(out, piece)
		}
	}
	from := 0
	for i := range text {
		if paint[i] != paint[from] {
			add(from, i)
			from = i
		}
	}
	add(from, len(text))
	if end := paint[len(text)]; end.Marked { // something is missing there
		end.Text = " "
		out = append(out, end)
	}
	return out
}

func (p Piece) with(q Piece) Piece {
	p.Defines, p.Marked, p.Note = p.Defines || q.Defines, p.Marked || q.Marked, p.Note || q.Note
	if q.Place.Line > 0 {
		p.Place = q.Place
	}
	return p
}

func visibleLines(text string) string {
	lines := strings.Split(text, "\n")
	for i, l := range lines {
		lines[i] = syntax.Visible(l)
	}
	return strings.Join(lines, "\n")
}

// notesIn finds the note behind each line of a statement.
func notesIn(text string) []found {
	var list []found
	start := 0
	for line := range strings.SplitSeq(text, "\n") {
		body := statementWithoutNote(line)
		from := strings.Index(line, body) + len(body)
		if n := strings.IndexByte(line[from:], '#'); n >= 0 {
			list = append(list, found{syntax.Span{Start: start + from + n, End: start + len(line)}, Piece{Note: true}})
		}
		start += len(line) + 1
	}
	return list
}
