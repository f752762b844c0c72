package repl

import (
	"context"

	"example.com/dosewright/repl/internal/program"
)

// Frozen is a session as it stood when it was frozen. It never changes and is
// safe for concurrent use, as long as the functions in its Config are. Every
// error is a *Refusal.
type Frozen struct{ session *Session }

// Freeze computes what every name is worth and returns the session as it stands
// now; the session itself may go on.
func (s *Session) Freeze(ctx context.Context) (*Frozen, error) {
	c := s.Clone()
	c.entries, c.block = nil, nil
	for _, d := range c.inOrder() {
		if err := ctx.Err(); err != nil {
			return nil, c.refusal("", err).Err
		}
		if d.node != nil && (d.node.Type.Kind == program.Number || d.node.Type.Kind == program.Point) {
			_, _ = c.valueOf(d) // what has no value says so when it is asked for
		}
	}
	return &Frozen{c}, nil
}

// Session returns a session of that state, which goes its own way.
func (z *Frozen) Session() *Session { return z.session.Clone() }

// Eval is Session.Eval.
func (z *Frozen) Eval(ctx context.Context, text string) (*Value, error) {
	return z.session.Eval(ctx, text)
}

// Check is Session.Check.
func (z *Frozen) Check(ctx context.Context, text string) (*Verdict, error) {
	return z.session.Check(ctx, text)
}

// Explain is Session.Explain.
func (z *Frozen) Explain(ctx context.Context, name string) (*Explanation, error) {
	return z.session.Explain(ctx, name)
}

// Sweep is Session.Sweep.
func (z *Frozen) Sweep(ctx context.Context, text string) (*SweepTable, error) {
	return z.session.Sweep(ctx, text)
}

// Solve is Session.Solve.
func (z *Frozen) Solve(ctx context.Context, text string) (*Found, error) {
	return z.session.Solve(ctx, text)
}

// Maximise is Session.Maximise.
func (z *Frozen) Maximise(ctx context.Context, text string) (*Found, error) {
	return z.session.Maximise(ctx, text)
}

// Minimise is Session.Minimise.
func (z *Frozen) Minimise(ctx context.Context, text string) (*Found, error) {
	return z.session.Minimise(ctx, text)
}

// Compare is Session.Compare.
func (z *Frozen) Compare(ctx context.Context, text string) (*Table, error) {
	return z.session.Compare(ctx, text)
}

// Budget is Session.Budget.
func (z *Frozen) Budget(ctx context.Context, text string) (*Budget, error) {
	return z.session.Budget(ctx, text)
}

// Propagate is Session.Propagate.
func (z *Frozen) Propagate(ctx context.Context, text string) (*Distribution, error) {
	return z.session.Propagate(ctx, text)
}
