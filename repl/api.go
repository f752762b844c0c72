package repl

import (
	"context"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// Below is the session for programs: a method a statement, which gives the
// result itself in the place of a Reply. What stands behind the word of a
// statement is given without the word: Check(ctx, "a < b"). Every error is a
// *Refusal.

// PlaneError says which two planes did not fit. It wraps ErrPlane.
type PlaneError = program.PlaneError

// Define takes in one definition: of a value, a function, a chain, a stack, a
// material, a counted thing, a correlation or a what-if case, with all lines of
// a block in one text. It is kept for save. When it is refused, nothing has
// changed.
func (s *Session) Define(ctx context.Context, text string) error {
	_, err := s.said(ctx, text, "a definition", "definition", "function", "chain", "stack", "material", "counted", "correlation", "case")
	return err
}

// Import brings in the definitions of a file of the session's folder, and is
// kept for save.
func (s *Session) Import(ctx context.Context, file string) (*Imported, error) {
	return the[*Imported](s.said(ctx, `import "`+file+`"`, "an import", "import"))
}

// Check says whether a comparison holds, as in "wph >= 150 wafer/h" or
// "a = b within 2 %".
func (s *Session) Check(ctx context.Context, text string) (*Verdict, error) {
	return oneAnswer[*Verdict](ctx, s, "check", text)
}

// Sweep varies one name or two, as in "x = 1 nm .. 9 nm 5 points : x^2".
func (s *Session) Sweep(ctx context.Context, text string) (*SweepTable, error) {
	return oneAnswer[*SweepTable](ctx, s, "sweep", text)
}

// Solve finds every value of a range for which two sides agree, as in
// "wph = 170 wafer/h for P_IF in 200 W at IF .. 400 W at IF".
func (s *Session) Solve(ctx context.Context, text string) (*Found, error) {
	return oneAnswer[*Found](ctx, s, "solve", text)
}

// Maximise finds the best places of a range, as in "x * (3 - x) for x in 0 .. 3".
func (s *Session) Maximise(ctx context.Context, text string) (*Found, error) {
	return oneAnswer[*Found](ctx, s, "maximise", text)
}

// Minimise finds the least places of a range, as Maximise finds the best.
func (s *Session) Minimise(ctx context.Context, text string) (*Found, error) {
	return oneAnswer[*Found](ctx, s, "minimise", text)
}

// Propagate propagates the distributions of the inputs by trials, as in
// "wph : trials = 1e5, seed = 7". When the context ends on the way, the result
// is what the trials until then gave.
func (s *Session) Propagate(ctx context.Context, text string) (*Distribution, error) {
	return oneAnswer[*Distribution](ctx, s, "propagate", text)
}

// Budget states the uncertainty budget of an expression.
func (s *Session) Budget(ctx context.Context, text string) (*Budget, error) {
	return oneAnswer[*Budget](ctx, s, "budget", text)
}

// Fit finds names so that two sides agree over a table of data, as in
// "lots.cd = a + b * lots.dose over lots for a, b". The names become inputs with
// what was found, and the statement is kept for save.
func (s *Session) Fit(ctx context.Context, text string) (*FitResult, error) {
	return the[*FitResult](s.said(ctx, "fit "+text, "a fit", "fit"))
}

// Compare shows values under several cases, as in "wph, cost : base, hot".
func (s *Session) Compare(ctx context.Context, text string) (*Table, error) {
	return oneAnswer[*Table](ctx, s, "compare", text)
}

// oneAnswer answers a question, which leaves the session as it is.
func oneAnswer[R Result](ctx context.Context, s *Session, word, text string) (R, error) {
	text = word + " " + text
	var none R
	st, err := s.read(ctx, text, word, word)
	if err != nil {
		return none, err
	}
	results, bad := s.perform(ctx, text, st)
	if bad != nil {
		return none, s.refusal(text, bad).Err
	}
	return the[R](results, nil)
}

// said takes in a statement that changes the session.
func (s *Session) said(ctx context.Context, text, what string, words ...string) ([]Result, error) {
	text = strings.TrimSpace(text)
	if _, err := s.read(ctx, text, what, words...); err != nil {
		return nil, err
	}
	r := s.run(ctx, text)
	return r.Results, r.Err
}

// read parses a statement and refuses it when it is none of those meant.
func (s *Session) read(ctx context.Context, text, what string, words ...string) (*syntax.Statement, error) {
	err := ctx.Err()
	if err == nil {
		st, bad := syntax.Parse(text)
		switch {
		case bad != nil:
			err = bad
		case st.Do == nil || !slices.Contains(words, wordOf(st.Do)):
			err = syntax.Fail(syntax.Span{Start: 0, End: len(text)}, "this is no statement of the kind "+what, "Feed takes statements of every kind")
		default:
			return st, nil
		}
	}
	return nil, s.refusal(text, err).Err
}

// the gives the one result of a kind.
func the[R Result](results []Result, err error) (R, error) {
	for _, x := range results {
		if r, ok := x.(R); ok {
			return r, err
		}
	}
	var none R
	return none, err
}
