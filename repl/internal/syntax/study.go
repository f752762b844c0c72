package syntax

// Statements that run one formula many times.

type (
	// Column is an expression of a table, stated in a unit where one stands.
	Column struct {
		X      Expr
		Stated *Stated
	}
	// Axis is what a sweep varies: name = a .. b by s, or so many points.
	Axis struct {
		Name     string
		NameAt   Span
		From, To Expr
		By       Expr // nil when Points says how many
		Points   Expr
		Log      bool
	}
	// Option is trials = 1e6, or a word alone such as plot.
	Option struct {
		Name  string
		Where Span
		X     Expr // nil for a word alone
	}
	// Output is what is made of a result beside the reply.
	Output struct {
		Plot bool
		To   []String
	}
	// Budget asks for the uncertainty budget of a value.
	Budget struct{ Of Column }
	// Propagate asks for the distribution of a value.
	Propagate struct {
		Of      Column
		Options []Option
		Out     Output
	}
	// Correlation states how two inputs go together.
	Correlation struct {
		A, B Name
		X    Expr
	}
	// Sweep varies one or two names.
	Sweep struct {
		Axes    []Axis
		Columns []Column
		Out     Output
	}
	// Search is solve, maximise or minimise.
	Search struct {
		Word   string
		WordAt Span
		X, Y   Expr // Y is nil but for solve
		Axis   Axis
	}
	// Fit finds names so that two sides agree over a table.
	Fit struct {
		X, Y   Expr
		Data   Name
		Names  []Name
		WordAt Span
	}
	// Case is a named what-if.
	Case struct {
		Name   string
		NameAt Span
		Sets   []Setting
	}
	// Setting is x = expr inside a case.
	Setting struct {
		Name   string
		NameAt Span
		X      Expr
	}
	// Compare shows values under several cases.
	Compare struct {
		Columns []Column
		Cases   []Name
	}
	// Data reads a table from a file.
	Data struct {
		Name   string
		NameAt Span
		File   String
	}
)

func (*Budget) action()      {}
func (*Propagate) action()   {}
func (*Correlation) action() {}
func (*Sweep) action()       {}
func (*Search) action()      {}
func (*Fit) action()         {}
func (*Case) action()        {}
func (*Compare) action()     {}
func (*Data) action()        {}
