package repl

import (
	"context"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// How much of a replay is spent on finding what each change alone does.
const (
	mostEffects = 200 // drifts
	mostCauses  = 12  // changes behind one of them
)

// effects finds by how much each changed definition alone moves a value: all
// are set back to what was recorded, and each is then let in by itself.
func (p *player) effects(ctx context.Context, text string, d *Drift) {
	if len(d.MovedBy) == 0 || len(d.MovedBy) > mostCauses || len(p.out.Drifts) > mostEffects {
		return
	}
	st, bad := syntax.Parse(text)
	if bad != nil {
		return
	}
	before := p.session.Clone()
	for _, c := range d.MovedBy {
		if !before.apply(ctx, c.Was) {
			return
		}
	}
	was, ok := before.valueIn(st.Do)
	if !ok {
		return
	}
	for i, c := range d.MovedBy {
		alone := before.Clone()
		if !alone.apply(ctx, c.Now) {
			continue
		}
		if v, ok := alone.valueIn(st.Do); ok {
			step := v.Unit.FromDifference(v.SI - was.SI)
			d.MovedBy[i].Alone = v.Unit.Interval().Label(signed(units.FormatNumber(step, 3)))
		}
	}
}

func signed(number string) string {
	if strings.HasPrefix(number, "-") || number == "0" {
		return number
	}
	return "+" + number
}

// apply says again a definition that stands on one line, as an import records
// it.
func (s *Session) apply(ctx context.Context, line string) bool {
	if line == "" {
		return false
	}
	st, bad := syntax.Parse(unfolded(line))
	if bad != nil {
		return false
	}
	_, err := s.perform(ctx, unfolded(line), st)
	return err == nil
}

// unfolded turns "chain c: at IF; m: 66 %; at WAFER" into the lines of a block.
func unfolded(line string) string {
	head, rest, ok := strings.Cut(line, ": ")
	if _, block := syntax.BlockHeading(head); !ok || !block {
		return line
	}
	return head + "\n  " + strings.ReplaceAll(rest, "; ", "\n  ") + "\nend"
}

// valueIn is the value of the one expression of a statement; ok is false for
// statements that have none.
func (s *Session) valueIn(a syntax.Action) (*Value, bool) {
	var x syntax.Expr
	var stated *syntax.Stated
	switch a := a.(type) {
	case *syntax.Show:
		x, stated = a.X, a.Stated
	case *syntax.Define:
		x, stated = a.X, a.Stated
	default:
		return nil, false
	}
	c := s.checker("", "")
	n, err := c.Check(x)
	if err != nil || n.Type.Kind != program.Number && n.Type.Kind != program.Point {
		return nil, false
	}
	v, _, err := s.compute(n)
	if err != nil {
		return nil, false
	}
	var unit *units.Unit
	if stated != nil && stated.Unit != "" {
		if u, err := s.sys.Parse(stated.Unit); err == nil {
			unit = &u
		}
	}
	return s.value(v, n.Type, unit, nil), true
}
