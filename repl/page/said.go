package page

import (
	"strings"

	"example.com/dosewright/repl"
)

// said is a statement with its answer.
type said struct {
	ID       string
	Line     int
	Text     []piece
	Answer   []part
	Refused  bool
	Picture  *picture
	Recorded *string // the recorded reply, where the answer differs from it

	holds, fails int // checks
}

// piece is a part of a statement.
type piece struct {
	Text          string
	Link          string // the id of the line that defines the name
	Defines       bool
	Marked, Note  bool
	Plain, Absent bool // nothing of all this; a mark where something is missing
}

// part is a piece of an answer: one of its fields is set.
type part struct {
	Line  *line
	Lines []string // more than one, lined up
	Table *table
	Go    string // the file of an import, whose lines stand under Conventions
}

// line is a line of an answer. Kind is one of "value", "holds", "fails",
// "refused", "way", "note".
type line struct{ Kind, Text string }

// table is a table of an answer. Folded ones are opened on demand.
type table struct {
	Heads   []string
	Numbers []bool // by column
	Rows    [][]repl.Entry
	Folded  bool
	Alone   bool // nothing else shows it, so that paper does too
}

func (at anchors) pieces(list []repl.Piece) []piece {
	var out []piece
	for _, p := range list {
		q := piece{Text: p.Text, Link: at[p.Place], Defines: p.Defines, Marked: p.Marked, Note: p.Note, Absent: p.Marked && p.Text == " "}
		q.Plain = q.Link == "" && !q.Defines && !q.Marked && !q.Note
		out = append(out, q)
	}
	return out
}

func saidOf(p repl.Played, at anchors) *said {
	s := &said{ID: lineID(p.Line), Line: p.Line, Text: at.pieces(p.Statement), Refused: p.Reply.Err != nil}
	if p.Picture != nil {
		s.Picture = drawn(p.Picture, s.ID)
	}
	if p.Recorded != nil {
		text := strings.Join(p.Recorded, "\n")
		s.Recorded = &text
	}
	if len(p.Imported) > 0 {
		s.Answer = []part{imported(p.Reply)}
		return s
	}
	for _, x := range p.Reply.Parts() {
		if x.Table != nil {
			s.Answer = append(s.Answer, part{Table: tableOf(x.Table, s.Picture != nil && s.Picture.Problem == "")})
			continue
		}
		s.lines(x.Lines)
	}
	return s
}

// imported shows the first line of an import alone.
func imported(r *repl.Reply) part {
	return part{Go: r.Lines()[0].Text}
}

// lines adds lines of an answer: each one that has a tone of its own for
// itself, and plain ones that stand together lined up.
func (s *said) lines(list []repl.Line) {
	var run []string
	flush := func() {
		switch len(run) {
		case 0:
		case 1:
			s.Answer = append(s.Answer, part{Line: &line{"value", run[0]}})
		default:
			s.Answer = append(s.Answer, part{Lines: run})
		}
		run = nil
	}
	for _, l := range list {
		if l.Tone == repl.Plain || l.Tone == repl.Marks {
			run = append(run, l.Text)
			continue
		}
		flush()
		s.Answer = append(s.Answer, part{Line: &line{kindOf(l.Tone), l.Text}})
		switch l.Tone {
		case repl.Good:
			s.holds++
		case repl.Bad:
			s.fails++
		}
	}
	flush()
}

func kindOf(t repl.Tone) string {
	switch t {
	case repl.Good:
		return "holds"
	case repl.Bad:
		return "fails"
	case repl.Refused:
		return "refused"
	case repl.WayOn:
		return "way"
	}
	return "note"
}

// longest is how many rows of a table are shown without being asked for.
const longest = 60

// tableOf makes a table. What a picture shows too, or what is long, is folded.
func tableOf(t *repl.Sheet, pictured bool) *table {
	out := &table{Heads: t.Heads, Rows: t.Rows, Numbers: make([]bool, len(t.Heads))}
	out.Alone = !pictured && !t.Aside
	out.Folded = !out.Alone || len(t.Rows) > longest
	for _, row := range t.Rows {
		for k, e := range row {
			out.Numbers[k] = out.Numbers[k] || e.Number
		}
	}
	return out
}
