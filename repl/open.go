package repl

import (
	"errors"
	"fmt"
	"maps"

	"example.com/dosewright/repl/internal/program"
	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// ErrName is the cause of Open's refusal of a name, for errors.Is.
var ErrName = errors.New("this name cannot be given")

// Constant is a named quantity of the host, beside those of the language.
type Constant struct {
	Name  string
	Doc   string // one line
	Value units.Quantity
}

// Open makes an empty session. It fails with an error that wraps ErrName when
// the name of one of the host's functions or constants is no name, stands
// twice, or has a meaning in the language; constants must be finite.
func Open(config Config) (*Session, error) {
	s := &Session{
		config: config, limits: config.Limits.filled(), sys: config.Units, store: newStore(), rows: catalogue(), constants: constants(),
		planes: map[string][]program.Plane{}, prefer: map[units.Dimension]units.Unit{}, digits: DefaultDigits,
	}
	if s.sys == nil {
		s.sys = units.Standard()
	}
	s.counted = s.sys.Declared()
	if s.config.Dir == "" {
		s.config.Dir = "."
	}
	if err := s.host(config); err != nil {
		return nil, err
	}
	return s, nil
}

// NewSession is Open for a configuration whose names are known to be good. With
// one that Open refuses, the session refuses every statement with that error.
func NewSession(config Config) *Session {
	s, err := Open(config)
	if err == nil {
		return s
	}
	config.Functions, config.Constants = nil, nil
	s, _ = Open(config) // only names are refused
	s.broken = err
	return s
}

// host takes in what the host gives beside the language.
func (s *Session) host(config Config) error {
	if len(config.Functions) > 0 {
		s.rows = maps.Clone(s.rows)
	}
	if len(config.Constants) > 0 {
		s.constants = maps.Clone(s.constants)
	}
	for _, f := range config.Functions {
		if f.row == nil {
			return fmt.Errorf("a function of the host was not made by one of the Bind functions: %w", ErrName)
		}
		if err := s.hostName("function", f.row.Name); err != nil {
			return err
		}
		s.rows[f.row.Name] = f.row
	}
	for _, k := range config.Constants {
		if err := s.hostName("constant", k.Name); err != nil {
			return err
		}
		if v := k.Value.SI(); v-v != 0 {
			return fmt.Errorf("the constant %s of the host is %v: %w", k.Name, v, ErrNotFinite)
		}
		s.constants[k.Name] = constantRow{name: k.Name, doc: k.Doc, unit: s.sys.DisplayUnit(k.Value).String(), value: k.Value.SI(), node: program.NewConstant(k.Value)}
	}
	return nil
}

// hostName refuses a name that the language or the host has given already, and
// what is no name.
func (s *Session) hostName(what, name string) error {
	meaning := ""
	switch _, constant := s.constants[name]; {
	case !isName(name):
		return fmt.Errorf("%q is no name for a %s of the host; a name has letters, digits and _: %w", name, what, ErrName)
	case syntax.Reserved(name) || name == "if" || name == baseCase:
		meaning = "a word of the language"
	case s.rows[name] != nil:
		meaning = "a function"
	case constant:
		meaning = "a constant"
	case program.KnownPlane(name):
		meaning = "a plane"
	default:
		return nil
	}
	return fmt.Errorf("the %s %s of the host cannot have this name, which is %s already: %w", what, name, meaning, ErrName)
}

// isName says whether the language reads a text as one name.
func isName(text string) bool {
	if plainName(text) || syntax.Reserved(text) {
		return true
	}
	st, bad := syntax.Parse(text)
	if bad != nil {
		return false
	}
	show, ok := st.Do.(*syntax.Show)
	if !ok {
		return false
	}
	n, ok := show.X.(*syntax.Name)
	return ok && n.Name == text
}

// plainName says the same of most names, fast.
func plainName(text string) bool {
	for i := range len(text) {
		c := text[i]
		letter := c == '_' || 'a' <= c|0x20 && c|0x20 <= 'z'
		if !letter && (i == 0 || c < '0' || c > '9') {
			return false
		}
	}
	return text != "" && len(text) <= syntax.MaxName
}
