package repl

import (
	"context"

	"example.com/dosewright/repl/internal/syntax"
)

// job is a statement on its way through the session.
type job struct {
	ctx  context.Context
	text string
	note string
	do   syntax.Action
}

// statement is one row of the language: what help says and what runs.
type statement struct {
	word    string // what begins it, or a name for those without a word
	usage   string
	summary string
	more    string // further lines of help
	example string // a statement that a test runs
	run     func(*Session, job) ([]Result, error)
}

// statements are all rows, in the order of help.
func statements() []statement {
	return []statement{
		{
			"value", "expr  or  expr [unit]", "prints a value, stated in a unit where one stands in brackets",
			"Without a stated unit the answer takes the trade's unit for its dimension, or\nthe one that prefer names. A bracket states a unit, it never gives one.",
			"30 mJ/cm^2 * 8.58 cm^2 [mJ]", (*Session).show,
		},
		{
			"definition", "name = expr  # note  or  name [unit] = expr", "gives a name a formula that stays live",
			"Change an input and everything that rests on it follows. A redefinition that\nwould break a dependent's dimension or plane, or close a circle, is refused.",
			"dose_nominal [mJ/cm^2] = 34 mJ/cm^2 at WAFER  # line 3, layer group A", (*Session).define,
		},
		{
			"function", "f(a, b) = expr  or  f(P [W at IF], t [s]) = expr", "makes a function of the session",
			"It is checked at each call; a unit behind a parameter declares it. No recursion.",
			"energy_in(P [W], t [s]) = P * t", (*Session).defineFunction,
		},
		{
			"chain", "chain NAME … end", "defines what light meets: planes, elements, reduction", chainHelp,
			"chain pair\n  at IF\n  mirror x2: 66 %\n  at WAFER\nend", (*Session).defineChain,
		},
		{
			"stack", "stack NAME … end", "defines a mirror or filter: layers in the order in which light meets them", stackHelp,
			"stack std\n  cap: Ru 2.5 nm\n  bilayer x50: Si 4.15 nm, Mo 2.85 nm\n  roughness: 0.4 nm\n  substrate: Si\nend", (*Session).defineStack,
		},
		{
			"material", "material NAME = C8H8O 1.17 g/cm^3", "names a material by formula and density",
			"Element symbols are known at the density of the solid. Materials are names of\ntheir own kind and do not meet values.", "material quartz = SiO2 2.2 g/cm^3", (*Session).defineMaterial,
		},
		{
			"counted", "counted lot", "declares a new counted thing, a dimension of its own",
			"wafer, field, die and pulse are known from the start.", "counted lot", (*Session).declareCounted,
		},
		{
			"check", "check a >= b  or  check a = b within 2 %", "says whether a comparison holds, with both sides",
			"< <= > >= compare as they stand; = needs within, which is relative to the right\nside or an absolute quantity.",
			"check 250 W at IF >= 214.6 W at IF", (*Session).check,
		},
		{
			"why", "why name", "shows what a name rests on, as a tree",
			"Each line has formula, value, note and the file and line that it came from.", "why pi", (*Session).why,
		},
		{
			"walk", "walk CHAIN 250 W at IF", "follows a power or energy through a chain, as a table",
			"Each line has what passes and what the element takes.", "walk pair 250 W at IF", (*Session).walk,
		},
		{
			"import", "import \"file\"", "brings in the definitions of another session",
			"The reply records each definition and a hash of the content, so that a replay\ntells which conventions have changed since. Paths are relative to the importing file.",
			"", (*Session).importFile,
		},
		{
			"budget", "budget expr", "shows which input decides: the uncertainty budget of a value",
			"First order, after JCGM 100: each uncertain input with its value x, standard\nuncertainty u(x), sensitivity c, share of u². One literal with ± is one source of\nerror, however often its name is used.",
			"budget normal(3 W, 0.1 W) * 2", (*Session).budget,
		},
		{
			"propagate", "propagate expr : trials = 1e6, seed = 1, plot", "propagates the distributions of the inputs by trials",
			"After JCGM 101: mean, standard uncertainty, skewness and the shortest 95 %\ncoverage interval, each with what is not yet settled. Options: trials (1e6),\nseed (1), coverage (95 %), plot, to \"file.svg\". Ctrl-C keeps what was computed.",
			"propagate rectangular(1 nm, 2 nm) ^ 2 : trials = 1e4", (*Session).propagate,
		},
		{
			"correlation", "correlation a, b = 0.8", "states how two uncertain inputs go together",
			"a and b are names of one uncertain literal each; 0 takes the statement back.", "", (*Session).correlation,
		},
		{
			"sweep", "sweep x = a .. b by s : expr, expr", "varies one name, or two, and shows a table",
			"Or so many points: sweep x = 1 nm .. 9 nm 41 points log : …; a second , y = … makes\na grid. At the end plot, to \"file.csv\", to \"file.svg\" or to \"file.png\". A name that\nexists is replaced for this run; a new one is local. Columns may be stated: x [mJ].",
			"sweep d = 10 nm .. 30 nm by 5 nm : hole_area(d), photon_count(30 mJ/cm^2, hole_area(d))", (*Session).sweep,
		},
		{
			"solve", "solve expr = expr for x in a .. b", "finds every x of a range for which two sides agree",
			"Says what the sides are at the ends when there is none; a jump is no root.",
			"solve photon_count(30 mJ/cm^2, hole_area(d)) = 5000 for d in 5 nm .. 50 nm", (*Session).search,
		},
		{
			"maximise", "maximise expr for x in a .. b", "finds the best places of a range, a boundary named as such", "",
			"maximise x * (3 - x) for x in 0 .. 3", (*Session).search,
		},
		{
			"minimise", "minimise expr for x in a .. b", "finds the least places of a range, a boundary named as such", "",
			"minimise (x - 1)^2 for x in 0 .. 3", (*Session).search,
		},
		{
			"data", "data NAME = \"file.csv\"", "reads a table: columns as lists NAME.column",
			"Heads are in the form of the SI: dose / (mJ/cm^2).", "", (*Session).data,
		},
		{
			"fit", "fit expr = expr over NAME for a, b", "finds names so that two sides agree over a table",
			"Least squares over the rows of a data table, whose columns stand for themselves.\na and b are defined before, near the expected values, and become inputs with\nuncertainty and correlation.", "", (*Session).fit,
		},
		{"case", "case NAME : x = expr, y = expr", "names a what-if: other formulas for some names", "", "", (*Session).defineCase},
		{
			"compare", "compare expr, expr : base, NAME", "shows values under several cases, with their ratio to base",
			"base is the session as it stands.", "", (*Session).compare,
		},
		{"names", "names  or  names pattern", "lists what is defined; * in a pattern stands for any letters", "", "names", (*Session).listNames},
		{"forget", "forget name", "drops a name that nothing rests on", "", "", (*Session).forget},
		{"prefer", "prefer [mJ/cm^2]", "states answers of that dimension in this unit from now on", "", "prefer [mJ/cm^2]", (*Session).preferUnit},
		{"digits", "digits 5", "sets how many significant digits answers show, 2 to 15", "", "digits 5", (*Session).setDigits},
		{"help", "help  or  help topic", "explains a function, a statement, a unit or a topic", "", "help units", (*Session).help},
		{"save", "save \"file\"", "writes what was said, with the replies, whole or not at all", "", "", (*Session).save},
		{"replay", "replay \"file\"", "runs a saved session apart from this one and compares the replies", "The command has options of its own: see help files.", "", (*Session).replayFile},
		{"quit", "quit", "ends the session", "", "", (*Session).quit},
	}
}

// wordOf names the row of an action.
func wordOf(a syntax.Action) string {
	switch a := a.(type) {
	case *syntax.Show:
		return "value"
	case *syntax.Define:
		return "definition"
	case *syntax.DefineFunction:
		return "function"
	case *syntax.Block:
		return a.Kind
	case *syntax.Check:
		return "check"
	case *syntax.Walk:
		return "walk"
	case *syntax.Prefer:
		return "prefer"
	case *syntax.Material:
		return "material"
	case *syntax.Budget:
		return "budget"
	case *syntax.Propagate:
		return "propagate"
	case *syntax.Correlation:
		return "correlation"
	case *syntax.Sweep:
		return "sweep"
	case *syntax.Search:
		return a.Word
	case *syntax.Fit:
		return "fit"
	case *syntax.Case:
		return "case"
	case *syntax.Compare:
		return "compare"
	case *syntax.Data:
		return "data"
	case *syntax.Command:
		return a.Word
	}
	return ""
}

// perform finds the row of a statement and runs it.
func (s *Session) perform(ctx context.Context, text string, st *syntax.Statement) ([]Result, error) {
	if s.broken != nil {
		return nil, s.broken
	}
	if err := s.statementFits(text); err != nil {
		return nil, err
	}
	word := wordOf(st.Do)
	for _, row := range statements() {
		if row.word == word {
			return row.run(s, job{ctx, text, st.Note, st.Do})
		}
	}
	return nil, syntax.Fail(syntax.Span{Start: 0, End: len(text)}, word+" is no statement", "help statements lists them")
}

const stackHelp = `Lines in the order in which light meets them:
  cap: Ru 2.5 nm                          a layer
  bilayer x50: Si 4.15 nm, Mo 2.85 nm     layers that repeat; x(n) for a name
  Si 4.15 nm rough 0.6 nm                 the interface on top of that layer is rough
  roughness: 0.4 nm                       every interface that says no other
  substrate: Si                           without it there is vacuum below
A thickness is any expression, so that it can be swept and solved for.
reflectivity(NAME, 13.5 nm, 6 deg), peak_wavelength(NAME), bandwidth(NAME) ask it.`

const chainHelp = `Lines in the order in which light meets them:
  at IF                          a plane
  pellicle: 88 %                 an element (mirror, film, mask); a factor from 0 to 1
  illuminator x4: 66 %           crossed four times, with one error for all of them
  m x6 independent: (66 ± 1) %   six of one kind, each with an error of its own
  reduction: 4, 4                across the scan, then along it
  at WAFER
  band: 13.5 nm, 2 %             centre and full width; without it one wavelength
  mirror: reflectivity(std, λ)   λ is the running wavelength; the chain then takes
                                 the mean of the product over the band
  spectrum: f(λ)                 of the source, at the head of the chain; else flat
transmission(NAME, IF, WAFER) is the factor between two planes, carry(x, NAME, WAFER)
takes a power, energy, photon number or rate from its own plane to another, either
way; fluence and irradiance go between MASK and WAFER, where the reduction gives the
ratio of areas.`
