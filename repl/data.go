package repl

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// data reads the columns of a file as lists NAME.column.
func (s *Session) data(j job) ([]Result, error) {
	a := j.do.(*syntax.Data)
	if err := s.nameable(a.Name, a.NameAt, &syntax.Name{}); err != nil {
		return nil, err
	}
	if d := s.store.defs[a.Name]; d != nil {
		return nil, syntax.Fail(a.NameAt, a.Name+" is defined already", "choose another name for the table")
	}
	refuse := func(err error, hint string) ([]Result, error) {
		return nil, &syntax.Error{Marks: []syntax.Span{a.File.Where}, Msg: err.Error(), Hint: hint, Cause: err}
	}
	full, err := s.inside(a.File.Text)
	if err != nil {
		return refuse(err, "paths are relative to the session's file and stay below its folder")
	}
	text, err := readFile(s.config.Files, full)
	if err != nil {
		return refuse(err, "name a .csv file of this folder")
	}
	t, err := s.readTable(a.File.Text, text)
	if err != nil {
		return refuse(err, headsHint)
	}
	return s.keepTable(j, a, t)
}

const headsHint = "the first line has names with units, parted by commas: dose / (mJ/cm^2), throughput / (wafer/h); each line below it has as many numbers"

// tableRead is a table of numbers: a list a column.
type tableRead struct {
	names   []string
	lists   []*program.Node
	skipped []string
	rows    int
}

func (s *Session) readTable(name string, text []byte) (*tableRead, error) {
	r := csv.NewReader(bytes.NewReader(bytes.TrimPrefix(text, []byte("\uFEFF"))))
	r.TrimLeadingSpace = true
	heads, err := r.Read()
	if err != nil {
		return nil, fmt.Errorf("%s has no line of heads: %w", name, ErrFile)
	}
	t := &tableRead{}
	var columns []units.Unit
	var values [][]units.Quantity
	for _, h := range heads {
		column, unit, err := s.readHead(h)
		if err != nil {
			return nil, fmt.Errorf("%s:1: %w", name, err)
		}
		for _, known := range t.names {
			if known == column && column != "" {
				return nil, fmt.Errorf("%s:1: the column %s stands twice: %w", name, column, ErrFile)
			}
		}
		t.names, columns, values = append(t.names, column), append(columns, unit), append(values, nil)
		if column == "" {
			t.skipped = append(t.skipped, strings.TrimSpace(h))
		}
	}
	for {
		cells, err := r.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		var bad *csv.ParseError
		switch {
		case errors.Is(err, csv.ErrFieldCount) && errors.As(err, &bad):
			return nil, fmt.Errorf("%s:%d: %s under %s: %w", name, bad.Line, howMany(len(cells), "cell"), howMany(len(heads), "head"), ErrFile)
		case errors.As(err, &bad):
			return nil, fmt.Errorf("%s:%d: a quotation mark stands at the wrong place: %w", name, bad.Line, ErrFile)
		case err != nil:
			return nil, fmt.Errorf("%s: %w: %w", name, err, ErrFile)
		}
		if t.rows++; t.rows > s.limits.Data {
			most := s.limits.Data
			return nil, fmt.Errorf("%s has more than %d rows, take a part of them: %w: %w", name, most, ErrFile, &LimitError{"Data", int64(most), int64(most) + 1})
		}
		line, _ := r.FieldPos(0)
		for k, cell := range cells {
			if t.names[k] == "" {
				continue
			}
			v, err := columns[k].Read(strings.TrimSpace(cell))
			if err != nil {
				return nil, fmt.Errorf("%s:%d: %q in column %s: %w: %w", name, line, cell, t.names[k], err, ErrFile)
			}
			values[k] = append(values[k], units.New(v, columns[k].Dimension()))
		}
	}
	if t.rows == 0 {
		return nil, fmt.Errorf("%s has no rows: %w", name, ErrFile)
	}
	for k := range values {
		t.lists = append(t.lists, program.NewList(values[k], columns[k].Point()))
	}
	return t, nil
}

// readHead takes a head in the form of the SI apart: dose / (mJ/cm^2). A head
// that begins with no name gives "".
func (s *Session) readHead(head string) (string, units.Unit, error) {
	head = strings.TrimSpace(head)
	end := 0
	for i, r := range head {
		if !wordRune(r) {
			break
		}
		end = i + len(string(r))
	}
	name, rest := head[:end], strings.TrimSpace(head[end:])
	if name == "" || syntax.Reserved(name) || strings.Trim(name[:1], "0123456789") == "" {
		return "", units.Unit{}, nil
	}
	if rest == "" {
		return name, units.Unit{}, nil
	}
	unit, ok := strings.CutPrefix(rest, "/")
	if !ok {
		return "", units.Unit{}, nil
	}
	unit = strings.TrimSpace(unit)
	if strings.HasPrefix(unit, "(") && strings.HasSuffix(unit, ")") {
		unit = unit[1 : len(unit)-1]
	}
	u, err := s.sys.Parse(unit)
	if err != nil {
		return "", u, fmt.Errorf("the head %q: %w: %w", head, err, ErrFile)
	}
	return name, u, nil
}

// keepTable makes the columns names; those of a table that is read again are
// redefined, and what rests on them must keep its dimension.
func (s *Session) keepTable(j job, a *syntax.Data, t *tableRead) ([]Result, error) {
	before := s.snapshot()
	var columns []string
	for k, name := range t.names {
		if name == "" {
			continue
		}
		columns = append(columns, name)
		d := s.newDefinition(a.Name+"."+name, j)
		d.node, d.bare = t.lists[k], true
		if err := s.install(d, a.NameAt); err != nil {
			s.restore(before)
			return nil, err
		}
	}
	if len(columns) == 0 {
		return nil, syntax.Fail(a.File.Where, "no head of this table is a name", headsHint)
	}
	for _, old := range s.tables[a.Name] {
		name := a.Name + "." + old
		if slices.Contains(columns, old) {
			continue
		}
		if users := s.store.dependents(name); len(users) > 0 {
			s.restore(before)
			return nil, &syntax.Error{Marks: []syntax.Span{a.NameAt}, Msg: "this table has no column " + old + " any more, on which " + users[0] + " rests", Hint: "nothing has changed; give the new table another name", Cause: ErrDependent}
		}
		s.store.remove(name)
	}
	if s.tables == nil {
		s.tables = map[string][]string{}
	}
	s.tables[a.Name] = columns
	line := howMany(t.rows, "row") + " of " + strings.Join(columns, ", ")
	if len(t.skipped) > 0 {
		line += "; left out, since their heads are no names: " + strings.Join(t.skipped, ", ")
	}
	return []Result{&Text{content: []string{line}}}, nil
}
