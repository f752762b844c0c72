package program

import (
	"example.com/dosewright/units"
)

// Function is one row of the catalogue or one function of the host: what help
// says, what checking needs and what is run.
type Function struct {
	Name    string
	Section string
	Summary string  // one line
	Params  []Param // in order
	Result  Result
	Formula string
	Valid   string // range of validity, "" for everywhere
	Source  string
	Example string // a statement that a test runs
	Caution string // one line, "" for none

	// Rule gives the result's type from those of the arguments, for functions
	// that take any dimension; nil for functions whose Params say it.
	Rule func(args []Type) (Type, error)
	// Build makes the node of a call itself, for functions of chains and other
	// things that are no numbers; nil for all others.
	Build func(c *Checker, call *Call) (*Node, error)
	// Call computes the result, with warnings, from arguments in SI units.
	Call func(args []float64) (float64, []string, error)
	// Spectral makes a function that computes results for many values of the
	// first argument at once; nil for functions that gain nothing by it.
	Spectral func() func(first, others, out []float64) error
	// Kinks lists first arguments, between two, at which the result has a kink.
	Kinks func(low, high float64) []float64
}

// Param is one parameter of a Function.
type Param struct {
	Name    string
	Doc     string
	Dim     units.Dimension
	Kind    Kind     // Number, Point, List or ChainKind
	Plane   Plane    // the plane that the argument must not contradict
	Words   []string // the words it takes, for arguments that list words
	IsPlane bool     // takes the name of a plane
	Any     bool     // takes any dimension; the row's Build looks at it
	Either  bool     // takes a plane in the place of a quantity
	IsWord  bool     // takes a word that is kept as it stands, such as a formula
	Default string   // as the language writes it; "" for none
}

// Result is what a Function gives.
type Result struct {
	Dim   units.Dimension
	Kind  Kind
	Plane Plane
	// Follows is the number, counted from one, of the argument whose plane the
	// result keeps; 0 for none.
	Follows int
	Unit    string // in which a call that stands alone is stated; "" for the usual one
	Doc     string
}

// ArgumentFault is what Call returns when one argument is out of range, so
// that the refusal can mark it.
type ArgumentFault struct {
	Param string
	Err   error
}

func (f *ArgumentFault) Error() string { return f.Err.Error() }

func (f *ArgumentFault) Unwrap() error { return f.Err }

// Variadic says whether a function takes any number of arguments of one
// dimension, or one list.
func (f *Function) Variadic() bool { return len(f.Params) == 1 && f.Params[0].Kind == List }
