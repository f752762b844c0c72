package repl

import (
	"strconv"

	"example.com/dosewright/repl/internal/syntax"
)

func (s *Session) preferUnit(j job) ([]Result, error) {
	a := j.do.(*syntax.Prefer)
	if a.Stated.Plane != "" {
		return nil, syntax.Fail(a.Stated.Where, "prefer takes a unit without a plane", "write prefer ["+a.Stated.Unit+"]")
	}
	u, err := s.checker(j.text, "").StatedBare(a.Stated)
	if err != nil {
		return nil, err
	}
	s.prefer[u.Dimension()] = u
	return nil, nil
}

func (s *Session) setDigits(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	n, err := strconv.Atoi(c.Number)
	if err != nil || n < 2 || n > 15 {
		return nil, syntax.Fail(syntax.Span{Start: c.WordAt.End, End: len(j.text)}, c.Number+" is no count of digits from 2 to 15", "write digits 5")
	}
	s.digits = n
	return nil, nil
}

func (s *Session) quit(job) ([]Result, error) { return nil, nil }
