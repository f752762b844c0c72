package repl

// Picture is what a statement wants drawn, as plain numbers. Package chart
// draws it; a host may do so in its own way.
type Picture struct {
	Title string
	X, Y  Axis
	// Lines are curves over X, for a chart of lines.
	Lines []Series
	// Grid holds Z over a grid, for a map with contours; nil for none.
	Grid *Grid
	// Bars hold a histogram, with the limits of an interval; nil for none.
	Bars *Bars
}

// Axis is a quantity in a unit: its head is "dose / (mJ/cm²)", or the name
// alone for a pure number.
type Axis struct {
	Name, Unit string
	Log        bool
}

// Head writes the axis in the form of the SI: quantity divided by unit.
func (a Axis) Head() string { return Column{a.Name, a.Unit}.head() }

// Series is one curve; both columns are equally long.
type Series struct {
	Name string
	X, Y []float64
}

// Grid holds the values Z[j][i] at X[i] and Y[j]; a NaN is a place without a
// value.
type Grid struct {
	X, Y []float64
	Z    [][]float64
	Head string // of Z
}

// Bars are the densities between edges; there is one edge more.
type Bars struct {
	Edges, Density []float64
	Low, High      float64 // the coverage interval
}
