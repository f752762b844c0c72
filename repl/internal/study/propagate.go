package study

import "context"

// Propagation says how distributions are to be propagated. The zero Propagation
// asks for a million trials, seed 0, a coverage of 95 % and 50 bins.
type Propagation struct {
	Trials   int // from 100/(1−Coverage) to MaxTrials
	Seed     uint64
	Coverage float64 // between 0 and 1
	Bins     int     // of the histogram, to 10 000

	// Watch, unless nil, is told now and then how far the work is; it runs on the
	// caller's goroutine.
	Watch func(Running)
}

// MaxTrials is the largest number of trials. All their values are kept until the
// end, 8 bytes each, 800 MB for this number: an exact coverage interval needs
// them. The result holds none of them.
const MaxTrials = 100_000_000

// Running is what is known while a propagation runs.
type Running struct {
	Trials   int
	Mean, SD float64
	Tolerance
}

// Distribution is the propagated distribution of one output (JCGM 101:2008, 7.6
// and 7.7).
type Distribution struct {
	Asked, Trials int   // Trials is less than Asked when the context ended early
	Failed        int   // trials without a value, which are left out
	Failure       error // of the first such trial

	Mean, SD, Skewness float64
	NoSpread           bool // an input has so few degrees of freedom, 2 or less, that no standard deviation exists

	Coverage        float64
	Low, High       float64 // shortest interval of that coverage
	SymLow, SymHigh float64 // the interval with as much probability below as above

	Tolerance Tolerance
	Histogram Histogram
}

const (
	chunkTrials = 16 * BlockSize
	mostFailed  = 1e-3 // of the trials; with more the distribution is not that of the output
)

// Propagate propagates the distributions of s through the first output of p, by
// trials. The result depends on the Propagation alone, not on the number of cores.
//
// When ctx ends, Distribution holds the trials of the chunks that were finished,
// from the first on, and the error is that of ctx; nil and the error when there
// are none. Other errors: ErrSize, ErrRange, ErrCorrelation (inputs that have no
// common distribution), ErrNotFinite, and that of the program when more than one
// trial in a thousand has no value.
func Propagate(ctx context.Context, p Program, s *Sources, asked Propagation) (*Distribution, error) {
	asked = asked.filled()
	if err := asked.refused(); err != nil {
		return nil, err
	}
	if err := s.drawable(); err != nil {
		return nil, err
	}
	t := &trials{Propagation: asked, sources: s, program: p, values: make([]float64, asked.Trials)}
	chunks := (asked.Trials + chunkTrials - 1) / chunkTrials
	err := inOrder(ctx, chunks, func() func(int, *trialChunk) error { return t.worker(ctx) },
		func() trialChunk { return trialChunk{} }, t.take)
	if err != nil && (ctx.Err() == nil || t.all.n == 0) {
		return nil, err
	}
	d, refused := t.distribution()
	if refused != nil {
		return nil, refused
	}
	return d, err
}

func (a Propagation) filled() Propagation {
	if a.Trials == 0 {
		a.Trials = 1_000_000
	}
	if a.Coverage == 0 {
		a.Coverage = 0.95
	}
	if a.Bins == 0 {
		a.Bins = 50
	}
	return a
}

func (a Propagation) refused() error {
	switch {
	case !(a.Coverage > 0 && a.Coverage < 1):
		return refuse(ErrRange, "%g is no coverage probability: it lies between 0 and 1", a.Coverage)
	case a.Trials > MaxTrials:
		return refuse(ErrSize, "%d trials are too many: at most %d, whose values fit into memory", a.Trials, MaxTrials)
	case float64(a.Trials)*(1-a.Coverage) < 99.999:
		return refuse(ErrRange, "%d trials are too few for a coverage of %g: take %.0f or more", a.Trials, a.Coverage, 100/(1-a.Coverage))
	case a.Bins < 1 || a.Bins > 10_000:
		return refuse(ErrSize, "a histogram of %d bins: it has 1 to 10000", a.Bins)
	}
	return nil
}
