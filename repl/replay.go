package repl

import (
	"bytes"
	"context"
	"path"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
)

// Replayed is what came of running a session file again.
type Replayed struct {
	File       string
	Statements int
	Compared   int // statements whose replies were recorded
	Drifts     []Drift
	Failed     []Remark // checks that do not hold
	Refused    []Remark // refusals where none is recorded
	Changed    []Change // imported definitions that are not those of the record
	Records    []Record // every reply as plain values, Line set
	Updated    []byte   // the file with the replies of this run
}

// Drift is a reply that differs from the recorded one.
type Drift struct {
	Line      int
	Statement string
	Was, Now  []string
	MovedBy   []Change // definitions that the reply rests on and that changed
}

// Change is a definition as it was recorded and as it is now; one of the two
// is "" for a definition that came or went.
type Change struct {
	Name, Was, Now string
	// Alone is by how much this change by itself moves a reply, "" when that is
	// not one number.
	Alone string
}

// Remark is a line of the file with what is to be said of it.
type Remark struct {
	Line int
	Text string
}

// Replay runs the session file of that name in a new session made from config
// and compares each recorded reply, at the digits with which it was written.
// It writes nothing. The error says that the file cannot be used; drifts,
// failed checks and refusals are in the result.
func Replay(ctx context.Context, config Config, name string) (*Replayed, error) {
	text, list, err := readSession(config.Files, name)
	if err != nil {
		return nil, err
	}
	config.Dir = path.Dir(name)
	p := &player{session: NewSession(config), out: &Replayed{File: name}}
	p.session.silent = true
	for _, l := range list {
		if err := ctx.Err(); err != nil {
			return nil, err
		}
		p.play(ctx, l)
	}
	if p.session.InBlock() {
		p.out.Refused = append(p.out.Refused, Remark{len(list), "the block that begins here has no end: " + p.session.block[0]})
	}
	p.out.Updated = []byte(p.text.String())
	if bytes.Contains(text, []byte("\r\n")) {
		p.out.Updated = bytes.ReplaceAll(p.out.Updated, []byte("\n"), []byte("\r\n"))
	}
	return p.out, nil
}

// Moved says whether something is not as it was recorded, or a check fails.
func (r *Replayed) Moved() bool { return len(r.Drifts)+len(r.Failed)+len(r.Changed) > 0 }

// player holds a replay on its way.
type player struct {
	session *Session
	out     *Replayed
	text    strings.Builder
}

// play runs one line of the file.
func (p *player) play(ctx context.Context, l said) {
	p.text.WriteString(l.line + "\n")
	statement := strings.TrimSpace(strings.TrimPrefix(l.line, Prompt))
	if passing(statement) && !p.session.InBlock() {
		p.record(l.recorded)
		return
	}
	r := p.session.Feed(ctx, l.line)
	if r.More && r.Err == nil || statement == "" {
		return
	}
	if !strings.HasPrefix(statement, "#") {
		p.out.Statements++
	}
	writeReply(&p.text, r)
	for _, rec := range r.Records() {
		rec.Line = l.number
		p.out.Records = append(p.out.Records, rec)
	}
	p.judge(ctx, l, r)
}

func (p *player) record(lines []string) {
	for _, l := range lines {
		p.text.WriteString(strings.TrimRight(Margin+l, " ") + "\n")
	}
}

// judge compares a reply with the record.
func (p *player) judge(ctx context.Context, l said, r *Reply) {
	if r.Failed {
		p.out.Failed = append(p.out.Failed, Remark{l.number, joinLines(r.Lines())})
	}
	if len(l.recorded) == 0 {
		if r.Err != nil {
			p.out.Refused = append(p.out.Refused, Remark{l.number, r.Err.Error()})
		}
		return
	}
	p.out.Compared++
	if p.agrees(l.recorded, r) {
		return
	}
	d := Drift{Line: l.number, Statement: r.Text, Was: l.recorded}
	for _, line := range r.Lines() {
		d.Now = append(d.Now, line.Text)
	}
	if im := importedOf(r); im != nil {
		p.changed(l.recorded, im)
	}
	d.MovedBy = p.movedBy(r.Text)
	p.effects(ctx, r.Text, &d)
	p.out.Drifts = append(p.out.Drifts, d)
	p.moves(r.Text, d)
}

func (p *player) agrees(recorded []string, r *Reply) bool {
	if sameText(recorded, r.Lines()) {
		return true
	}
	if r.Err != nil || refusedBefore(recorded) {
		return false
	}
	return sameNumbers(recorded, r.linesIn(Style{Digits: 15}))
}

// refusedBefore says whether what is recorded is a refusal: its second line
// holds the marks.
func refusedBefore(recorded []string) bool {
	return len(recorded) > 2 && strings.Contains(recorded[1], "~") && strings.Trim(recorded[1], "~ ") == ""
}

func importedOf(r *Reply) *Imported {
	for _, x := range r.Results {
		if im, ok := x.(*Imported); ok && !im.Already {
			return im
		}
	}
	return nil
}

// changed compares recorded definitions of an import with those of now.
func (p *player) changed(recorded []string, im *Imported) {
	was, now := map[string]string{}, map[string]string{}
	for _, line := range recorded {
		if d, ok := strings.CutPrefix(line, "  "); ok {
			was[definedName(d)] = d
		}
	}
	for _, d := range im.Definitions {
		name := definedName(d)
		now[name] = d
		if syntax.Visible(d) != was[name] {
			p.out.Changed = append(p.out.Changed, Change{Name: name, Was: was[name], Now: d})
		}
	}
	for _, line := range recorded {
		d, ok := strings.CutPrefix(line, "  ")
		if name := definedName(d); ok && now[name] == "" {
			p.out.Changed = append(p.out.Changed, Change{Name: name, Was: d})
		}
	}
}

// definedName is the name that a definition on one line gives.
func definedName(text string) string {
	if rest, ok := strings.CutPrefix(text, "material "); ok {
		name, _, _ := strings.Cut(rest, " ")
		return program.MaterialKey(name)
	}
	text = strings.TrimPrefix(strings.TrimPrefix(text, "chain "), "stack ")
	end := strings.IndexAny(text, " [=(:")
	if end < 0 {
		return text
	}
	return text[:end]
}

// movedBy finds the changed definitions on which a statement rests.
func (p *player) movedBy(text string) []Change {
	st, bad := syntax.Parse(text)
	if bad != nil {
		return nil
	}
	below := p.session.store.ancestors(syntax.Names(st.Do))
	var list []Change
	for _, c := range p.out.Changed {
		if below[c.Name] || c.Now == "" && slices.Contains(syntax.Names(st.Do), c.Name) {
			list = append(list, c)
		}
	}
	return list
}

// moves notes that a definition of this file has drifted and is therefore a
// cause for what rests on it, when nothing below it explains the drift.
func (p *player) moves(text string, d Drift) {
	st, bad := syntax.Parse(text)
	if bad != nil || len(d.MovedBy) > 0 {
		return
	}
	if def, ok := st.Do.(*syntax.Define); ok {
		p.out.Changed = append(p.out.Changed, Change{Name: def.Name, Was: def.Name + " " + strings.Join(d.Was, " "), Now: def.Name + " " + strings.Join(d.Now, " ")})
	}
}

func (s *Session) replayFile(j job) ([]Result, error) {
	c := j.do.(*syntax.Command)
	full, err := s.inside(c.Text)
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{c.TextAt}, Msg: err.Error(), Hint: "paths are relative and stay below the session's folder", Cause: err}
	}
	r, err := Replay(j.ctx, s.config, full)
	if err != nil {
		return nil, &syntax.Error{Marks: []syntax.Span{c.TextAt}, Msg: err.Error(), Hint: "name a session file of this folder", Cause: err}
	}
	t := &Text{}
	for _, l := range r.Lines() {
		t.content = append(t.content, l.Text)
	}
	return []Result{t}, nil
}
