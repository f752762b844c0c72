package repl

// Text is an answer in lines: help, names, a tree.
type Text struct {
	content  []string
	warnings []string
}

func (t *Text) lines(Style) []Line {
	var out []Line
	for _, l := range t.content {
		out = append(out, Line{l, Plain})
	}
	return append(out, warningLines(t.warnings)...)
}

func (t *Text) record() Record { return Record{Kind: TextRecord, Warnings: t.warnings} }
