package repl

import (
	"context"
	"fmt"
	"io"
	"path"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
)

// File is what a host gives to be written: nothing is seen of it under its
// name before Commit, and nothing at all after Abort.
type File interface {
	io.Writer
	Commit() error
	Abort()
}

// sketchColumns is how wide a chart made of characters is. It is fixed, so
// that a transcript replays on any terminal.
const sketchColumns = 76

// ending says what a file is to hold.
func ending(name string) string { return strings.ToLower(strings.TrimPrefix(path.Ext(name), ".")) }

// destinations checks the files that a statement names, before any work.
func (s *Session) destinations(out syntax.Output, tables bool) error {
	for i, to := range out.To {
		switch e := ending(to.Text); {
		case e == "csv" && slices.ContainsFunc(out.To[:i], func(b syntax.String) bool { return ending(b.Text) == "csv" }):
			return syntax.Fail(to.Where, "one statement writes one table", "leave out one of the .csv files")
		case s.config.Create == nil && !s.silent:
			return &syntax.Error{Marks: []syntax.Span{to.Where}, Msg: "this session writes no files", Hint: "leave out to, the reply holds the same", Cause: ErrFile}
		case e == "csv" && tables:
		case e == "svg" || e == "png":
			if s.config.Draw == nil && !s.silent {
				return &syntax.Error{Marks: []syntax.Span{to.Where}, Msg: "this session draws no pictures", Hint: "write a table to a .csv file", Cause: ErrFile}
			}
		default:
			hint := "end the name in .csv, .svg or .png"
			if !tables {
				hint = "end the name in .svg or .png"
			}
			return &syntax.Error{Marks: []syntax.Span{to.Where}, Msg: fmt.Sprintf("%q is no kind of file that this statement writes", to.Text), Hint: hint, Cause: ErrFile}
		}
		if _, err := s.inside(to.Text); err != nil {
			return &syntax.Error{Marks: []syntax.Span{to.Where}, Msg: err.Error(), Hint: "name a file of the session's folder", Cause: err}
		}
	}
	return nil
}

// write makes a file through the host, whole or not at all. During a replay
// nothing is written.
func (s *Session) write(to syntax.String, fill func(io.Writer) error) error {
	if s.silent {
		return fill(io.Discard)
	}
	full, err := s.inside(to.Text)
	if err != nil {
		return &syntax.Error{Marks: []syntax.Span{to.Where}, Msg: err.Error(), Hint: "name a file of the session's folder", Cause: err}
	}
	f, err := s.config.Create(full)
	if err == nil {
		if err = fill(f); err == nil {
			err = f.Commit()
		}
		if err != nil {
			f.Abort()
		}
	}
	if err != nil {
		return &syntax.Error{Marks: []syntax.Span{to.Where}, Msg: err.Error(), Hint: "nothing was written; choose another name or place", Cause: err}
	}
	return nil
}

// draw makes the pictures that a statement asks for and returns the chart of
// characters for plot.
func (s *Session) draw(out syntax.Output, p *Picture) ([]string, error) {
	for _, to := range out.To {
		e := ending(to.Text)
		if e != "svg" && e != "png" || s.silent && s.config.Draw == nil {
			continue
		}
		if err := s.write(to, func(w io.Writer) error { return s.config.Draw(p, e, w) }); err != nil {
			return nil, err
		}
	}
	if !out.Plot || s.config.Sketch == nil {
		return nil, nil
	}
	return s.config.Sketch(p, sketchColumns), nil
}

// made says which files were written.
func made(out syntax.Output) []Line {
	var lines []Line
	for _, to := range out.To {
		lines = append(lines, Line{"written: " + to.Text, Plain})
	}
	return lines
}

// Progress tells a host how far a long computation is: what was done of what
// is to be done, in a unit such as trials.
type Progress func(ctx context.Context, done, total int, unit string)
