package repl

import (
	"context"
	"path"
	"strings"

	"example.com/dosewright/repl/internal/syntax"
)

// Steps goes through a session file one statement at a time, to teach it. What
// is asked in between leaves the session as it is.
type Steps struct {
	session *Session
	list    []said
	next    int
	now     []string // lines of the statement at hand
}

// Step is a statement with the notes that stand before it.
type Step struct {
	Line      int // of the statement's first line
	Notes     []string
	Statement []string
}

// OpenSteps opens the session file of that name for stepping.
func OpenSteps(config Config, name string) (*Steps, error) {
	_, list, err := readSession(config.Files, name)
	if err != nil {
		return nil, err
	}
	config.Dir = path.Dir(name)
	s := &Steps{session: NewSession(config), list: list}
	s.session.silent = true
	return s, nil
}

// Next gives the next statement, without running it; ok is false behind the
// last.
func (s *Steps) Next() (step Step, ok bool) {
	s.now = nil
	open := false
	for ; s.next < len(s.list); s.next++ {
		line := s.list[s.next]
		text := strings.TrimSpace(strings.TrimPrefix(line.line, Prompt))
		switch {
		case open:
			s.now = append(s.now, line.line)
			if syntax.BlockEnd(text) {
				s.next++
				step.Statement = s.now
				return step, true
			}
		case text == "" || passing(text):
		case strings.HasPrefix(text, "#"):
			step.Notes = append(step.Notes, text)
		default:
			step.Line, s.now = line.number, []string{text}
			if _, open = syntax.BlockHeading(text); !open {
				s.next++
				step.Statement = s.now
				return step, true
			}
		}
	}
	step.Statement = s.now
	return step, len(s.now) > 0
}

// Run answers the statement that Next gave.
func (s *Steps) Run(ctx context.Context) *Reply {
	r := &Reply{}
	for _, line := range s.now {
		r = s.session.Feed(ctx, line)
	}
	s.session.Cancel()
	s.now = nil
	return r
}

// Ask answers a question with what is defined so far and leaves no trace.
func (s *Steps) Ask(ctx context.Context, line string) *Reply {
	return s.session.Clone().Feed(ctx, line)
}

// Session is what has been said so far, for completion and hints.
func (s *Steps) Session() *Session { return s.session }
