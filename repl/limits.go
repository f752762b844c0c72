package repl

import (
	"fmt"

	"example.com/dosewright/repl/internal/study"
	"example.com/dosewright/repl/internal/syntax"
)

// Limits bound what the statements of one session may cost its host. A zero or
// less is the default of that limit, and so is what is above the default of
// Statement, Points and Trials, which are the language's own bounds. What
// exceeds a limit is refused with a [LimitError] and the way on; nothing has
// changed then.
//
// Fixed for every session are the depth of parentheses, 200, the lines of a
// block, 2000, the parts of a formula, 200 000, and the bytes of a file, 8 MiB.
// Time is bounded by the context.
type Limits struct {
	Statement   int   // bytes of a statement, of all lines of a block together; 65 536
	Definitions int   // names that are defined at a time; 1 000 000
	Imports     int   // files that import brings in; 500
	Data        int   // rows of a table that data reads; 100 000
	Rows        int   // rows of the table in a reply; 1000
	Points      int   // points of a sweep; 10 000 000
	Pictured    int   // points of a picture; 200 000
	Trials      int   // trials of propagate; 100 000 000
	Memory      int64 // bytes that the values of trials may take at a time, 8 a trial; 800 000 000
}

// usualTrials is how many trials propagate takes when it is not told and may.
const usualTrials = 1_000_000

// trialBytes is what one trial keeps until the end.
const trialBytes = 8

// filled puts the defaults in.
func (l Limits) filled() Limits {
	within(&l.Statement, syntax.MaxStatement, true)
	within(&l.Definitions, 1_000_000, false)
	within(&l.Imports, 500, false)
	within(&l.Data, 100_000, false)
	within(&l.Rows, 1000, false)
	within(&l.Points, study.DefaultPoints, true)
	within(&l.Pictured, 200_000, false)
	within(&l.Trials, study.MaxTrials, true)
	within(&l.Memory, int64(study.MaxTrials*trialBytes), false)
	return l
}

// within sets a limit to its default where it is not stated, or above a bound.
func within[N int | int64](limit *N, usual N, bound bool) {
	if *limit <= 0 || bound && *limit > usual {
		*limit = usual
	}
}

// usual is how many trials propagate takes when it is not told.
func (l Limits) usual() int {
	return min(usualTrials, l.Trials, int(l.Memory/trialBytes))
}

// LimitError says which limit a statement would exceed. It wraps ErrSize.
type LimitError struct {
	Limit string // the field of Limits: "Rows", "Trials", …
	Most  int64  // its value
	Asked int64  // what was asked for; more than Most
}

func (e *LimitError) Error() string {
	return fmt.Sprintf("%d is more than the limit of %s, %d", e.Asked, e.Limit, e.Most)
}

func (e *LimitError) Unwrap() error { return ErrSize }

// over refuses what exceeds a limit.
func over[A, M int | int64 | float64](at syntax.Span, limit string, asked A, most M, msg, hint string) *syntax.Error {
	e := syntax.Fail(at, msg, hint)
	e.Cause = &LimitError{limit, int64(most), int64(asked)}
	return e
}

// statementFits refuses a statement that is too long.
func (s *Session) statementFits(text string) *syntax.Error {
	most := s.limits.Statement
	if len(text) <= most {
		return nil
	}
	return over(syntax.Span{}, "Statement", len(text), most,
		fmt.Sprintf("this statement has %d bytes; it may have %d", len(text), most), "give parts of it names of their own")
}

// definitionsFit refuses one more definition than there may be.
func (s *Session) definitionsFit(name string, at syntax.Span) error {
	n, most := len(s.store.defs), s.limits.Definitions
	if n < most || s.store.defs[name] != nil {
		return nil
	}
	return over(at, "Definitions", n+1, most,
		fmt.Sprintf("there are %d definitions, the most that this session holds", n), "forget one first")
}

// trialsFit refuses more trials than the session allows, by their number or by
// the memory that they take.
func (s *Session) trialsFit(trials int, at syntax.Span) error {
	n, l := int64(trials), s.limits
	const hint = "write trials = %d or fewer"
	switch {
	case n > int64(l.Trials):
		return over(at, "Trials", n, l.Trials, fmt.Sprintf("%d trials are more than this session makes, %d", n, l.Trials), fmt.Sprintf(hint, l.Trials))
	case n*trialBytes > l.Memory:
		return over(at, "Memory", n*trialBytes, l.Memory,
			fmt.Sprintf("the values of %d trials take about %d bytes; this session gives them %d", n, n*trialBytes, l.Memory), fmt.Sprintf(hint, l.Memory/trialBytes))
	}
	return nil
}
