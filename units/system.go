package units

import (
	"errors"
	"fmt"
	"maps"
	"slices"
	"strings"
	"sync"
)

// System is a set of units with the words for them and the habits of the
// trade for printing. It is immutable and safe for concurrent use; declaring
// a counted thing makes a new one.
type System struct {
	words    map[string]*row // every spelling of every unit, without prefixes
	declared []string        // counted things beyond those that all systems know
	habits   func() map[Dimension]habit
}

// Standard returns the System with the units of the SI, those accepted with
// it, those of the trade, and the counted things wafer, field, die and pulse.
var Standard = sync.OnceValue(func() *System { return newSystem(newRows()) })

func newSystem(rows []row) *System {
	s := &System{words: map[string]*row{}}
	for i := range rows {
		s.enter(&rows[i])
	}
	s.habits = sync.OnceValue(func() map[Dimension]habit { return readHabits(s) })
	return s
}

func (s *System) enter(r *row) {
	s.words[r.symbol] = r
	for _, word := range r.also {
		s.words[word] = r
	}
}

// WithCounted returns a System that also knows a counted thing by its name,
// with its plural and prefixes, and the base that stands for it. It fails when
// the name is no word of letters, has a meaning already or is refused for
// having several, or when there are MaxDeclared.
func (s *System) WithCounted(name string) (*System, Base, error) {
	name = foldAll(name)
	if err := wordFor("a counted thing", name); err != nil {
		return nil, 0, err
	}
	if len(s.declared) == MaxDeclared {
		return nil, 0, fmt.Errorf("there are %d declared counted things, the most that fit", MaxDeclared)
	}
	for _, word := range []string{name, name + "s"} {
		if err := s.free(word); err != nil {
			return nil, 0, err
		}
	}
	base := firstDeclared + Base(len(s.declared))
	grown := &System{words: maps.Clone(s.words), declared: append(slices.Clone(s.declared), name), habits: s.habits}
	grown.enter(&row{name, also(name + "s"), factor{}, base.Of(), true, counting})
	return grown, base, nil
}

// maxName bounds the name of a counted thing or an own unit, so that a unit of several fits
// the length of a unit.
const maxName = 40

// free fails when a word has a meaning as a unit, or deliberately none.
func (s *System) free(word string) error {
	if u, err := s.Parse(word); err == nil {
		return fmt.Errorf("%s is a unit already (%s)", word, u)
	}
	if why, ok := refused[word]; ok {
		return errors.New(why[0])
	}
	if isPrefix(word) {
		return fmt.Errorf("%s is a prefix of units", word)
	}
	return nil
}

// lookup reads one symbol: a whole word first, then a prefix and a word.
func (s *System) lookup(symbol string) (part, bool) {
	if symbol == "kg" {
		return part{symbol, dimMass, factor{}, 1, 1}, true
	}
	if r, ok := s.words[symbol]; ok {
		return part{r.symbol, r.dim, r.scale, 1, 1}, true
	}
	for _, p := range prefixes {
		rest, cut := strings.CutPrefix(symbol, p.symbol)
		if !cut {
			continue
		}
		if r, ok := s.words[rest]; ok && r.prefix {
			return part{p.printed() + r.symbol, r.dim, r.scale.times(tens(p.ten)), 1, 1}, true
		}
	}
	return part{}, false
}

// Words lists the symbols of the units in alphabetical order, each in every
// spelling, without prefixes: what completion offers inside a bracket.
func (s *System) Words() []string {
	return slices.Sorted(maps.Keys(s.words))
}

// symbol is the printed name of a base in this System.
func (s *System) symbol(b Base) string {
	if b >= firstDeclared && int(b-firstDeclared) < len(s.declared) {
		return s.declared[b-firstDeclared]
	}
	return b.symbol()
}

// BaseText writes a dimension in base units, as "kg·s⁻²"; a pure number is
// "1".
func (s *System) BaseText(d Dimension) string { return d.text(s.symbol) }
