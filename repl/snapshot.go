package repl

import (
	"maps"
	"slices"
)

// snapshot copies all that statements change, so that an import which fails
// leaves nothing behind.
func (s *Session) snapshot() Session {
	c := *s
	c.store.defs = maps.Clone(s.store.defs)
	for name, d := range c.store.defs {
		own := *d
		c.store.defs[name] = &own
	}
	c.store.users = map[string]map[string]bool{}
	for name, users := range s.store.users {
		c.store.users[name] = maps.Clone(users)
	}
	c.planes = maps.Clone(s.planes)
	c.prefer = maps.Clone(s.prefer)
	c.counted = slices.Clone(s.counted)
	c.tables = maps.Clone(s.tables)
	c.cases = maps.Clone(s.cases)
	c.pairings = slices.Clone(s.pairings)
	c.imports = slices.Clone(s.imports)
	return c
}

// Clone returns a session of the same state, which goes its own way.
func (s *Session) Clone() *Session {
	c := s.snapshot()
	c.entries = slices.Clip(s.entries)
	c.block = slices.Clone(s.block)
	return &c
}

func (s *Session) restore(before Session) { *s = before }
