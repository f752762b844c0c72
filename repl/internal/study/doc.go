// Package study runs one program many times: it states an uncertainty budget,
// propagates distributions, sweeps inputs, finds roots and optima, and fits.
//
// A program is a function over slots, one float64 each; package study knows no
// names and no units. Inputs and outputs are told by their index, and so are
// those that a message or an error is about.
package study

// Notes for maintainers.
//
// Two forms of a program are used. An Eval is one run; budget, solve and
// optimum take it, since each run depends on the one before. A Block runs up to
// BlockSize lanes at once; propagation, sweep and fit take it, so that the inner
// loops are plain loops over float64. Neither is safe for concurrent use, hence
// Program, which makes a Block for each goroutine.
//
// A run may have no value (a division by zero, an argument out of range). No NaN
// stands for that: a Block says at which lane it stopped and why, and is called
// again behind that lane.
//
// Parallel work is cut in chunks whose size depends on the task alone, each with
// its own random stream, and is put together in the order of the chunks
// (order.go). A result is therefore the same, bit for bit, on any number of
// cores, and what stands when the context ends is a prefix of the whole.

import (
	"errors"
	"fmt"
)

// The causes of a refusal, for errors.Is.
var (
	ErrNotFinite     = errors.New("the value is not finite")
	ErrInput         = errors.New("the input is not well formed")
	ErrCorrelation   = errors.New("the correlations do not fit together")
	ErrSize          = errors.New("too many runs")
	ErrRange         = errors.New("the range is not well formed")
	ErrNoConvergence = errors.New("the iteration did not settle")
	ErrUndetermined  = errors.New("the data do not determine the parameters")
)

// refuse makes an error that reads as its text and is its cause.
func refuse(cause error, format string, args ...any) error {
	return &refusal{fmt.Sprintf(format, args...), cause}
}

type refusal struct {
	text  string
	cause error
}

func (r *refusal) Error() string { return r.text }

func (r *refusal) Unwrap() error { return r.cause }

func finite(x float64) bool { return x-x == 0 }
