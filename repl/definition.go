package repl

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// definition is a name with its formula: a value, a list, a chain or a
// function of the session.
type definition struct {
	name    string
	text    string // the statement as written
	note    string
	file    string // "" for what was typed
	line    int
	order   int
	action  syntax.Action
	unit    *units.Unit // declared with name [unit] = …
	node    *program.Node
	own     *program.OwnFunction
	bare    bool // a literal alone, which prints nothing
	uses    []string
	warning []string
	source  bool // an uncertain input stands in its own formula

	known bool // value and err are those of the present definitions
	value float64
	err   error
}

// store holds the definitions of a session and who rests on whom.
type store struct {
	defs  map[string]*definition
	users map[string]map[string]bool // name → names that use it directly
	count int

	sources int // definitions with an uncertain input of their own
}

func newStore() store {
	return store{defs: map[string]*definition{}, users: map[string]map[string]bool{}}
}

func (st *store) put(d *definition) {
	if old := st.defs[d.name]; old != nil {
		st.unlink(old)
		d.order = old.order
	} else {
		st.count++
		d.order = st.count
	}
	st.defs[d.name] = d
	if d.source {
		st.sources++
	}
	for _, u := range d.uses {
		if st.users[u] == nil {
			st.users[u] = map[string]bool{}
		}
		st.users[u][d.name] = true
	}
}

func (st *store) unlink(d *definition) {
	if d.source {
		st.sources--
	}
	for _, u := range d.uses {
		delete(st.users[u], d.name)
	}
}

func (st *store) remove(name string) {
	if d := st.defs[name]; d != nil {
		st.unlink(d)
		delete(st.defs, name)
	}
}

// dependents lists all that rest on a name, each behind what it rests on.
func (st *store) dependents(name string) []string {
	seen := map[string]bool{name: true}
	var order []string
	var visit func(string)
	visit = func(n string) {
		for _, user := range slices.Sorted(maps.Keys(st.users[n])) {
			if !seen[user] {
				seen[user] = true
				visit(user)
				order = append(order, user)
			}
		}
	}
	visit(name)
	slices.Reverse(order)
	return order
}

// forgetValues marks what rests on a name as not computed. A value that is
// unknown already has only unknown dependents; chains, bodies, lists and
// functions have no value of their own and pass it on.
func (st *store) forgetValues(name string) {
	seen := map[string]bool{}
	var visit func(string)
	visit = func(n string) {
		for user := range st.users[n] {
			d := st.defs[user]
			if d == nil || seen[user] || !d.known && d.hasValue() {
				continue
			}
			seen[user] = true
			d.known = false
			visit(user)
		}
	}
	visit(name)
}

// hasValue says whether a definition is worth one number.
func (d *definition) hasValue() bool {
	return d.node != nil && (d.node.Type.Kind == program.Number || d.node.Type.Kind == program.Point)
}

// path finds how a name leads to another through what it uses.
func (st *store) path(from, to string) []string {
	seen := map[string]bool{}
	var visit func(string) []string
	visit = func(n string) []string {
		if n == to {
			return []string{n}
		}
		if seen[n] || st.defs[n] == nil {
			return nil
		}
		seen[n] = true
		for _, u := range st.defs[n].uses {
			if p := visit(u); p != nil {
				return append([]string{n}, p...)
			}
		}
		return nil
	}
	return visit(from)
}

// ancestors lists all that a set of names rests on, the names included.
func (st *store) ancestors(names []string) map[string]bool {
	seen := map[string]bool{}
	var visit func(string)
	visit = func(n string) {
		if d := st.defs[n]; d != nil && !seen[n] {
			seen[n] = true
			for _, u := range d.uses {
				visit(u)
			}
		}
	}
	for _, n := range names {
		visit(n)
	}
	return seen
}

// circle refuses a definition that would rest on itself.
func (st *store) circle(d *definition, at syntax.Span) *syntax.Error {
	if st.defs[d.name] == nil {
		return nil // nothing rests on a new name yet
	}
	for _, u := range d.uses {
		p := st.path(u, d.name)
		if p == nil {
			continue
		}
		e := syntax.Fail(at, d.name+" would rest on itself: "+d.name+" → "+strings.Join(p, " → "), "give the new value another name, such as "+d.name+"_2")
		if len(p) > 8 {
			e.Msg = fmt.Sprintf("%s would rest on itself: %s → %s → … → %s (%d names)", d.name, d.name, p[0], d.name, len(p))
		}
		e.Cause = ErrCircle
		return e
	}
	return nil
}
