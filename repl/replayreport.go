package repl

import (
	"fmt"
	"path"
	"strings"
)

// Lines returns the report of a replay, without the margin.
func (r *Replayed) Lines() []Line {
	var out []Line
	for _, d := range r.Drifts {
		out = append(out, d.lines(r.File)...)
	}
	for _, f := range r.Failed {
		out = append(out, Line{fmt.Sprintf("%s:%d  %s", r.File, f.Line, f.Text), Bad})
	}
	for _, f := range r.Refused {
		out = append(out, Line{fmt.Sprintf("%s:%d  refused, and no refusal is recorded: %s", r.File, f.Line, f.Text), Refused})
	}
	for _, c := range r.Changed {
		out = append(out, Line{"changed: " + c.text(), Warning})
	}
	total := fmt.Sprintf("%s: %d statements, %d of %d recorded replies hold", path.Base(r.File), r.Statements, r.Compared-len(r.Drifts), r.Compared)
	tone := Good
	if r.Moved() || len(r.Refused) > 0 {
		tone = Bad
		total += fmt.Sprintf("; %d moved, %d checks fail, %d refused", len(r.Drifts), len(r.Failed), len(r.Refused))
	}
	return append(out, Line{total, tone})
}

func (d Drift) lines(file string) []Line {
	statement, _, _ := strings.Cut(d.Statement, "\n")
	out := []Line{{fmt.Sprintf("%s:%d  %s", file, d.Line, statement), Plain}}
	was, now := differing(d.Was, d.Now)
	out = append(out, under("  recorded  ", Plain, was)...)
	out = append(out, under("  now       ", Bad, now)...)
	for _, c := range d.MovedBy {
		out = append(out, Line{"  moved by  " + c.text(), WayOn})
	}
	return out
}

// differing leaves of two replies the lines that differ, when they are as
// many.
func differing(was, now []string) (a, b []string) {
	if len(was) != len(now) {
		return was, now
	}
	for i := range was {
		if spaced(was[i]) != spaced(now[i]) {
			a, b = append(a, was[i]), append(b, now[i])
		}
	}
	return a, b
}

// under prints the first lines of a reply behind a head.
func under(head string, tone Tone, rows []string) []Line {
	const most = 12
	if len(rows) == 0 {
		return []Line{{head + "no reply", tone}}
	}
	var out []Line
	for i, l := range rows {
		if i == most-1 && len(rows) > most {
			return append(out, Line{fmt.Sprintf("%s… and %d more lines", head, len(rows)-i), tone})
		}
		out = append(out, Line{head + l, tone})
		head = strings.Repeat(" ", columns(head))
	}
	return out
}

func (c Change) text() string {
	switch {
	case c.Was == "":
		return c.Now + "  (new)"
	case c.Now == "":
		return c.Was + "  (gone)"
	}
	was := c.Was
	if head, _, ok := strings.Cut(c.Now, "= "); ok {
		was = strings.TrimPrefix(was, head+"= ")
	}
	text := c.Now + "  (was " + was + ")"
	if c.Alone != "" {
		text += "; alone " + c.Alone
	}
	return text
}
