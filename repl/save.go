package repl

import (
	"fmt"
	"io"
	"io/fs"
	"strings"
	"unicode/utf8"

	"example.com/dosewright/repl/internal/syntax"
)

// Transcript returns what was said so far with the replies, as the text of a
// session file. What only handled files, and quit, is left out.
func (s *Session) Transcript() []byte {
	var b strings.Builder
	for _, e := range s.entries {
		if passing(e.text) || !utf8.ValidString(e.text) || strings.ContainsRune(e.text, 0) {
			continue // what no session file may hold was refused
		}
		b.WriteString(e.text + "\n")
		writeReply(&b, e.reply)
	}
	return []byte(b.String())
}

// passing says whether a statement belongs to the moment and not to what a
// session holds.
func passing(text string) bool {
	word, _, _ := strings.Cut(text, " ")
	return word == "save" || word == "replay" || word == "quit"
}

func writeReply(b *strings.Builder, r *Reply) {
	for _, l := range r.Lines() {
		b.WriteString(strings.TrimRight(Margin+l.Text, " ") + "\n")
	}
}

func (s *Session) save(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	if s.config.Create == nil {
		return nil, &syntax.Error{Marks: []syntax.Span{c.TextAt}, Msg: "this session writes no files", Hint: "copy the transcript instead", Cause: ErrFile}
	}
	if err := s.replaces(c); err != nil {
		return nil, err
	}
	err := s.write(syntax.String{Text: c.Text, Where: c.TextAt}, func(w io.Writer) error {
		_, err := w.Write(s.Transcript())
		return err
	})
	if err != nil {
		return nil, err
	}
	n := 0
	for _, e := range s.entries {
		if !passing(e.text) {
			n++
		}
	}
	return []Result{&Text{content: []string{fmt.Sprintf("%d statements and notes are in %s", n, c.Text)}}}, nil
}

// replaces refuses once to write over a file that this session did not write.
func (s *Session) replaces(c *syntax.Command) error {
	full, err := s.inside(c.Text)
	if err != nil || s.config.Files == nil || s.silent {
		return nil // write says what is wrong
	}
	known := s.saved[full]
	if s.saved == nil {
		s.saved = map[string]bool{}
	}
	s.saved[full] = true
	if _, err := fs.Stat(s.config.Files, full); err != nil || known {
		return nil
	}
	return &syntax.Error{
		Marks: []syntax.Span{c.TextAt}, Msg: c.Text + " is there already, and this session did not write it",
		Hint: "choose another name, or say it again to replace the file", Cause: ErrFile,
	}
}
