package main

import (
	"context"
	"io/fs"

	"example.com/dosewright/repl"
	"example.com/dosewright/units"
)

// board is the frozen session behind the dashboard, and what it shows.
type board struct {
	frozen *repl.Frozen
	whatIf *repl.Formula // of the dose
	slots  chan struct{} // one for each question that may run
}

// tile is a place of the dashboard.
type tile struct{ title, formula string }

func tiles() []tile {
	return []tile{
		{"throughput", "wph"},
		{"power at the wafer", "P_wafer"},
		{"power that the line passes", "P_wafer / P_IF [%]"},
		{"wafers of a day at 90 %", "wph * 24 h * 90 % [wafer]"},
	}
}

// limits bound what one question may cost. A dashboard needs no more.
func limits() repl.Limits {
	return repl.Limits{Statement: 500, Definitions: 500, Imports: 5, Rows: 200, Points: 10_000, Trials: 100_000, Memory: 1 << 20}
}

// newBoard reads the conventions of a file once.
func newBoard(ctx context.Context, files fs.FS, name string) (*board, error) {
	s, err := repl.Open(repl.Config{Files: files, Limits: limits()})
	if err != nil {
		return nil, err
	}
	if _, err := s.Import(ctx, name); err != nil {
		return nil, err
	}
	b := &board{slots: make(chan struct{}, atOnce)}
	if b.frozen, err = s.Freeze(ctx); err != nil {
		return nil, err
	}
	for _, t := range tiles() {
		if _, err := b.frozen.Eval(ctx, t.formula); err != nil {
			return nil, err
		}
	}
	b.whatIf, err = b.frozen.Compile("wph [wafer/h]", repl.InputOf[units.Fluence]("dose_nominal"))
	return b, err
}
