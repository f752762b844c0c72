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
		{"value", "expr  or  expr [unit]", "prints a value, stated in a unit where one stands in brackets",
			"Without a stated unit the answer takes the trade's unit for its dimension, or\nthe one that prefer names. A bracket states a unit, it never gives one.",
			"30 mJ/cm^2 * 8.58 cm^2 [mJ]", (*Session).show},
		{"definition", "name = expr  # note  or  name [unit] = expr", "gives a name a formula that stays live",
			"Change an input and everything that rests on it follows. A redefinition that\nwould break a dependent's dimension or plane, or close a circle, is refused.",
			"dose_nominal [mJ/cm^2] = 34 mJ/cm^2 at WAFER  # line 3, layer group A", (*Session).define},
		{"function", "f(a, b) = expr  or  f(P [W at IF], t [s]) = expr", "makes a function of the session",
			"It is checked at each call; a unit behind a parameter declares it. No recursion.",
			"energy_in(P [W], t [s]) = P * t", (*Session).defineFunction},
		{"chain", "chain NAME … end", "defines what light meets: planes, elements, reduction", chainHelp,
			"chain pair\n  at IF\n  mirror x2: 66 %\n  at WAFER\nend", (*Session).defineChain},
		{"counted", "counted lot", "declares a new counted thing, a dimension of its own",
			"wafer, field, die and pulse are known from the start.", "counted lot", (*Session).declareCounted},
		{"check", "check a >= b  or  check a = b within 2 %", "says whether a comparison holds, with both sides",
			"< <= > >= compare as they stand; = needs within, which is relative to the right\nside or an absolute quantity.",
			"check 250 W at IF >= 214.6 W at IF", (*Session).check},
		{"why", "why name", "shows what a name rests on, as a tree",
			"Each line has formula, value, note and the file and line that it came from.", "why pi", (*Session).why},
		{"walk", "walk CHAIN 250 W at IF", "follows a power or energy through a chain, as a table",
			"Each line has what passes and what the element takes.", "walk pair 250 W at IF", (*Session).walk},
		{"import", "import \"file\"", "brings in the definitions of another session",
			"The reply records each definition and a hash of the content, so that a replay\ntells which conventions have changed since. Paths are relative to the importing file.",
			"", (*Session).importFile},
		{"names", "names  or  names pattern", "lists what is defined; * in a pattern stands for any letters", "", "names", (*Session).listNames},
		{"forget", "forget name", "drops a name that nothing rests on", "", "", (*Session).forget},
		{"prefer", "prefer [mJ/cm^2]", "states answers of that dimension in this unit from now on", "", "prefer [mJ/cm^2]", (*Session).preferUnit},
		{"digits", "digits 5", "sets how many significant digits answers show, 2 to 15", "", "digits 5", (*Session).setDigits},
		{"help", "help  or  help topic", "explains a function, a statement, a unit or a topic", "", "help units", (*Session).help},
		{"save", "save \"file\"", "writes what was said, with the replies, whole or not at all", "", "", (*Session).save},
		{"replay", "replay \"file\"", "runs a saved session apart from this one and compares the replies", "", "", (*Session).replayFile},
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
	case *syntax.Command:
		return a.Word
	}
	return ""
}

// perform finds the row of a statement and runs it.
func (s *Session) perform(ctx context.Context, text string, st *syntax.Statement) ([]Result, error) {
	word := wordOf(st.Do)
	for _, row := range statements() {
		if row.word == word {
			return row.run(s, job{ctx, text, st.Note, st.Do})
		}
	}
	return nil, syntax.Fail(syntax.Span{Start: 0, End: len(text)}, word+" is no statement", "help statements lists them")
}

const chainHelp = `Lines in the order in which light meets them:
  at IF                          a plane
  illuminator x4: 66 %           an element, crossed four times; a factor from 0 to 1
  reduction: 4, 4                across the scan, then along it
  at WAFER
transmission(NAME, IF, WAFER) is the factor between two planes, carry(x, NAME, WAFER)
takes a power, energy, photon number or rate from its own plane to another, either
way; fluence and irradiance go between MASK and WAFER, where the reduction gives the
ratio of areas.`
