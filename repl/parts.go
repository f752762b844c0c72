package repl

import (
	"errors"
	"slices"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Part is a piece of a reply: lines, or a table.
type Part struct {
	Lines []Line
	Table *Sheet // nil for lines
}

// Sheet is a table as it is printed. Heads are in the form of the SI, quantity
// divided by unit; each row has as many entries.
type Sheet struct {
	Heads []string
	Rows  [][]Entry
	Aside bool // the printed reply leaves it out: it is in a file or a picture
}

// Entry is one number or text of a table.
type Entry struct {
	Text   string
	Number bool
}

// Parts returns what [Reply.Lines] prints, with each table as a table and
// without charts made of characters, for hosts that set tables and draw
// pictures in their own way. Of a refusal it holds the message and the way on.
func (r *Reply) Parts() []Part {
	var out []Part
	for _, x := range r.Results {
		out = append(out, partsOf(x, r.style)...)
	}
	var bad *Refusal
	if errors.As(r.Err, &bad) {
		out = append(out, linesPart(bad.Lines()[2:])...)
	}
	return out
}

// partsOf takes one result apart: the lines before its table, the table, and
// those behind it.
func partsOf(x Result, style Style) []Part {
	printed, rec := withoutChart(x, style), x.record()
	if rec.Kind != TableRecord {
		return linesPart(printed)
	}
	t := &Table{Columns: rec.Columns, Rows: rec.Rows}
	rows := t.lines(style)
	sheet := Part{Table: t.sheet(style)}
	_, swept := x.(*SweepTable)
	switch at := indexOf(printed, rows); {
	case at >= 0 && len(t.Rows) == 0: // heads alone
		return linesPart(slices.Delete(printed, at, at+len(rows)))
	case at >= 0:
		return slices.Concat(linesPart(printed[:at]), []Part{sheet}, linesPart(printed[at+len(rows):]))
	case swept && len(t.Rows) > 0:
		sheet.Table.Aside = true
		return append(linesPart(printed), sheet)
	}
	return linesPart(printed)
}

// linesPart is a part of lines, or none.
func linesPart(list []Line) []Part {
	if len(list) == 0 {
		return nil
	}
	return []Part{{Lines: visible(list)}}
}

func visible(list []Line) []Line {
	out := slices.Clone(list)
	for i := range out {
		out[i].Text = syntax.Visible(out[i].Text)
	}
	return out
}

// withoutChart prints a result without its chart.
func withoutChart(x Result, style Style) []Line {
	switch x := x.(type) {
	case *SweepTable:
		bare := *x
		bare.chart = nil
		return bare.lines(style)
	case *Distribution:
		bare := *x
		bare.chart = nil
		return bare.lines(style)
	}
	return x.lines(style)
}

// indexOf finds a run of lines in others, -1 for none.
func indexOf(list, run []Line) int {
	for i := 0; i+len(run) <= len(list); i++ {
		if slices.Equal(list[i:i+len(run)], run) {
			return i
		}
	}
	return -1
}

func (t *Table) sheet(style Style) *Sheet {
	s := &Sheet{}
	for _, c := range t.Columns {
		s.Heads = append(s.Heads, syntax.Visible(c.head()))
	}
	for _, row := range t.Rows {
		var entries []Entry
		for _, c := range row {
			e := Entry{Text: syntax.Visible(c.Text)}
			if !c.IsText {
				e = Entry{Text: units.FormatNumber(c.Number, style.Digits), Number: true}
			}
			entries = append(entries, e)
		}
		s.Rows = append(s.Rows, entries)
	}
	return s
}
