package page

import (
	"cmp"
	"path"
	"slices"
	"strconv"
	"strings"
	"unicode"

	"example.com/dosewright/repl"
)

// sheet is a page as plain values.
type sheet struct {
	Title       string
	File        string // without its folders
	Version     string
	Tally       []string
	Contents    []heading
	Blocks      []block
	Conventions []convention
	Imports     []*repl.Imported
}

// heading is a heading of the page, and its entry in the contents.
type heading struct {
	ID, Text string
	Level    int // 2 or 3
}

// block is one of a heading, a paragraph and a statement.
type block struct {
	Heading *heading
	Text    string
	Said    *said
}

// convention is an imported file with what it defines.
type convention struct {
	ID, File    string
	Definitions []definition
}

// definition is a line of an imported file.
type definition struct {
	ID   string
	Line int
	Text []piece
}

// anchors are the ids of the places that stand on the page.
type anchors map[repl.Place]string

// sheetOf lays out a session.
func sheetOf(played []repl.Played, name, version string) *sheet {
	file := strings.Map(func(r rune) rune {
		if unicode.IsControl(r) {
			return unicode.ReplacementChar
		}
		return r
	}, path.Base(name))
	s := &sheet{Title: file, File: file, Version: cmp.Or(version, "(devel)")}
	at := anchors{}
	for _, p := range played {
		if p.Note != nil {
			continue
		}
		at[repl.Place{Line: p.Line}] = lineID(p.Line)
		for _, x := range p.Reply.Results {
			if im, ok := x.(*repl.Imported); ok && !im.Already {
				s.Imports = append(s.Imports, im)
			}
		}
	}
	s.conventions(played, at)
	for i, p := range played {
		if p.Note == nil {
			s.Blocks = append(s.Blocks, block{Said: saidOf(p, at)})
			continue
		}
		s.note(p, i == 0)
	}
	if len(s.Conventions) > 0 && len(s.Contents) > 0 {
		s.Contents = append(s.Contents, heading{"conventions", "Conventions", 2})
	}
	s.Tally = tally(s.Blocks)
	return s
}

func lineID(n int) string { return "L" + strconv.Itoa(n) }

// note adds the paragraphs of a note, or its heading and the paragraphs below.
func (s *sheet) note(p repl.Played, first bool) {
	paragraphs := paragraphsOf(p.Note)
	for i, lines := range paragraphs {
		switch head, rest := firstSentence(lines); {
		case first && i == 0:
			s.Title, lines = head, rest
		case i == 0:
			if level := levelOf(head, len(s.Contents) > 0); level > 0 {
				h := heading{lineID(p.Line), head, level}
				s.Contents = append(s.Contents, h)
				s.Blocks = append(s.Blocks, block{Heading: &h})
				lines = rest
			}
		}
		if text := joined(lines); text != "" {
			s.Blocks = append(s.Blocks, block{Text: text})
		}
	}
}

// conventions lists what was imported, file by file, and gives each line an id.
func (s *sheet) conventions(played []repl.Played, at anchors) {
	byFile := map[string]int{}
	var all [][]repl.Definition
	for _, p := range played {
		for _, d := range p.Imported {
			n, known := byFile[d.Place.File]
			if !known {
				n = len(all)
				byFile[d.Place.File] = n
				all = append(all, nil)
				s.Conventions = append(s.Conventions, convention{ID: "c" + strconv.Itoa(n+1), File: d.Place.File})
			}
			all[n] = append(all[n], d)
			at[d.Place] = s.Conventions[n].ID + "-" + strconv.Itoa(d.Place.Line)
		}
	}
	for n, list := range all {
		slices.SortStableFunc(list, func(a, b repl.Definition) int { return a.Place.Line - b.Place.Line })
		for _, d := range list {
			s.Conventions[n].Definitions = append(s.Conventions[n].Definitions, definition{at[d.Place], d.Place.Line, at.pieces(d.Text)})
		}
	}
}

// tally counts what a reader looks for first.
func tally(blocks []block) []string {
	var statements, hold, fail, refused, moved int
	for _, b := range blocks {
		if b.Said == nil {
			continue
		}
		statements++
		hold += b.Said.holds
		fail += b.Said.fails
		if b.Said.Refused {
			refused++
		}
		if b.Said.Recorded != nil {
			moved++
		}
	}
	list := []string{counted(statements, "statement", "statements")}
	add := func(n int, one, many string) {
		if n > 0 {
			list = append(list, counted(n, one, many))
		}
	}
	add(hold, "check holds", "checks hold")
	add(fail, "check fails", "checks fail")
	add(refused, "statement refused", "statements refused")
	add(moved, "reply is not the recorded one", "replies are not the recorded ones")
	return list
}

func counted(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return strconv.Itoa(n) + " " + many
}
