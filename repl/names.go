package repl

import (
	"context"
	"maps"
	"path"
	"slices"
	"strconv"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// inOrder lists the definitions in the order in which they came.
func (s *Session) inOrder() []*definition {
	list := slices.Collect(maps.Values(s.store.defs))
	slices.SortFunc(list, func(a, b *definition) int { return a.order - b.order })
	return list
}

func (s *Session) listNames(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	var rows [][]string
	for _, d := range s.inOrder() {
		if ok, err := path.Match(c.Text, d.name); err != nil {
			return nil, syntax.Fail(c.TextAt, c.Text+" is no pattern", "names do* lists what begins with do")
		} else if c.Text != "" && !ok {
			continue
		}
		rows = append(rows, []string{d.name, s.short(j.ctx, d), remarks(d)})
	}
	if len(rows) == 0 {
		what := "nothing is defined; name = formula defines"
		if c.Text != "" {
			what = "no name fits " + shortened(c.Text)
		}
		return []Result{&Text{content: []string{what}}}, nil
	}
	return []Result{&Text{content: aligned(rows)}}, nil
}

// short says what a name is, in a few words.
func (s *Session) short(ctx context.Context, d *definition) string {
	switch {
	case d.own != nil:
		return "function of " + strconv.Itoa(len(d.own.Params))
	case d.node.Type.Kind == program.BodyKind:
		return "body"
	case d.node.Type.Kind == program.ChainKind:
		return "chain " + planeList(d.node.Chain().Planes())
	case d.node.Type.Kind == program.List:
		return "list"
	}
	v, err := s.valueOf(d)
	if err != nil {
		return "no value: " + err.Error()
	}
	value := s.value(v, d.node.Type, d.unit, nil)
	if err := s.addUncertainty(ctx, value, d.node); err != nil {
		return "no uncertainty: " + err.Error()
	}
	return value.Text(s.digits)
}

// widest is how wide a text may be and still push its column.
const widest = 48

// aligned lines the columns of texts up. A text that is wider than its column
// moves what stands behind it in its own row only.
func aligned(rows [][]string) []string {
	var widths []int
	for _, r := range rows {
		for i, c := range r {
			if i == len(widths) {
				widths = append(widths, 0)
			}
			widths[i] = max(widths[i], min(columns(c), widest))
		}
	}
	var out []string
	for _, r := range rows {
		line := ""
		for i, c := range r {
			line += c + strings.Repeat(" ", max(0, widths[i]-columns(c))+2)
		}
		out = append(out, strings.TrimRight(line, " "))
	}
	return out
}

func (s *Session) forget(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	for i, n := range c.Names {
		if key := program.MaterialKey(n.Name); s.store.defs[n.Name] == nil && s.store.defs[key] != nil {
			c.Names[i].Name = key
			continue
		}
		if s.store.defs[n.Name] == nil {
			return nil, syntax.Fail(n.Where, n.Name+" is not defined", "names lists what is")
		}
	}
	going := map[string]bool{}
	for _, n := range c.Names {
		going[n.Name] = true
	}
	for _, n := range c.Names {
		var users []string
		for _, u := range s.store.dependents(n.Name) {
			if !going[u] {
				users = append(users, u)
			}
		}
		if len(users) > 0 {
			shown := strings.Join(users[:min(len(users), 8)], ", ")
			if n := len(users) - 8; n > 0 {
				shown += " and " + strconv.Itoa(n) + " more"
			}
			return nil, &syntax.Error{
				Marks: []syntax.Span{n.Where}, Msg: "others rest on " + n.Name + ": " + shown,
				Hint: "forget those first, or all together: forget " + n.Name + ", " + strings.Join(users[:min(len(users), 3)], ", "), Cause: ErrDependent,
			}
		}
	}
	for _, n := range c.Names {
		s.store.remove(n.Name)
		delete(s.planes, n.Name)
		s.part(n.Name)
	}
	return nil, nil
}
