package repl

import (
	"strings"
	"text/tabwriter"

	"example.com/dosewright/units"
)

// Table is an answer in rows. A column of numbers has one unit for all of
// them, which its head states as the SI does: power / W.
type Table struct {
	Columns  []Column
	Rows     [][]Cell
	Warnings []string
}

func (t *Table) lines(style Style) []Line {
	var b strings.Builder
	w := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	var heads []string
	for _, c := range t.Columns {
		heads = append(heads, c.head())
	}
	write(w, heads)
	for _, row := range t.Rows {
		var cells []string
		for _, c := range row {
			if c.IsText {
				cells = append(cells, c.Text)
			} else {
				cells = append(cells, units.FormatNumber(c.Number, style.Digits))
			}
		}
		write(w, cells)
	}
	w.Flush()
	var out []Line
	for _, l := range strings.Split(strings.TrimRight(b.String(), "\n"), "\n") {
		out = append(out, Line{strings.TrimRight(l, " "), Plain})
	}
	return append(out, warningLines(t.Warnings)...)
}

func write(w *tabwriter.Writer, cells []string) {
	line := strings.NewReplacer("\t", " ", "\n", " ").Replace(strings.Join(cells, "\v"))
	_, _ = w.Write([]byte(strings.ReplaceAll(line, "\v", "\t") + "\n")) // the buffer takes everything
}

// head writes a column's head after SI Brochure 5.4.1: name / unit, with
// parentheses where the unit has a sign of its own.
func (c Column) head() string {
	switch {
	case c.Unit == "":
		return c.Name
	case strings.ContainsAny(c.Unit, "/·"):
		return c.Name + " / (" + c.Unit + ")"
	}
	return c.Name + " / " + c.Unit
}

func (t *Table) record() Record {
	return Record{Kind: TableRecord, Columns: t.Columns, Rows: t.Rows, Warnings: t.Warnings}
}

func number(v float64) Cell { return Cell{Number: v} }

func word(s string) Cell { return Cell{Text: s, IsText: true} }
