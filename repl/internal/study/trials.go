package study

import (
	"context"
	"fmt"
)

// trials is a propagation at work.
type trials struct {
	Propagation
	sources *Sources
	program Program

	values   []float64 // chunk by chunk; those of chunks taken are packed at its head
	kept     int
	tried    int
	failure  error
	all      moments
	settling settling
}

// trialChunk is what one chunk leaves: its values, packed, in its part of
// trials.values, and this.
type trialChunk struct {
	values    []float64
	tried     int
	failure   error
	moments   moments
	low, high float64
}

// worker makes the work of one goroutine.
func (t *trials) worker(ctx context.Context) func(int, *trialChunk) error {
	d := newDrawer(t.sources)
	run := newRunner(t.program(), t.sources.Len(), 1)
	out, spare, lanes := make([][]float64, 1), make([]float64, chunkTrials), make([][]float64, t.sources.Len())
	return func(chunk int, c *trialChunk) error {
		start := chunk * chunkTrials
		end := min(start+chunkTrials, t.Trials)
		*c = trialChunk{values: t.values[start:start], tried: end - start}
		d.begin(t.Seed, uint64(chunk))
		for ; start < end; start += BlockSize {
			if err := ctx.Err(); err != nil {
				return err
			}
			width := min(BlockSize, end-start)
			d.draw(width)
			out[0] = t.values[start : start+width]
			c.pack(run, cut(lanes, d.lanes, 0, width), out)
		}
		c.sum(spare, t.Coverage)
		return nil
	}
}

// pack runs one block and closes the gaps of lanes without a value.
func (c *trialChunk) pack(run *runner, lanes, out [][]float64) {
	from := 0
	run.run(lanes, out, func(lane int, err error) {
		if c.failure == nil {
			c.failure = err
		}
		c.values = append(c.values, out[0][from:lane]...)
		from = lane + 1
	})
	c.values = append(c.values, out[0][from:]...)
}

// sum works out the chunk's own results, on a copy of its values.
func (c *trialChunk) sum(spare []float64, coverage float64) {
	c.moments = momentsOf(c.values)
	if n := copy(spare, c.values); n > 0 {
		c.low, c.high = sortEnds(spare[:n], tailFor(n, coverage)).shortest(coverage)
	}
}

// take adds a chunk to the whole.
func (t *trials) take(chunk int, c *trialChunk) error {
	t.kept += copy(t.values[t.kept:], c.values)
	t.tried += c.tried
	if t.failure == nil {
		t.failure = c.failure
	}
	if float64(t.tried-t.kept) > mostFailed*float64(t.Trials) {
		return t.tooManyFailed()
	}
	t.all.merge(c.moments)
	if len(c.values) == chunkTrials {
		t.settling.add(c)
	}
	if t.Watch != nil {
		t.Watch(Running{t.tried, t.all.mean, t.all.sd(), t.settling.tolerance()})
	}
	return nil
}

func (t *trials) tooManyFailed() error {
	return fmt.Errorf("%d of %d trials have no value: %w", t.tried-t.kept, t.tried, t.failure)
}

func (t *trials) distribution() (*Distribution, error) {
	if float64(t.tried-t.kept) > mostFailed*float64(t.tried) {
		return nil, t.tooManyFailed()
	}
	d := &Distribution{
		Asked: t.Trials, Trials: t.tried, Failed: t.tried - t.kept, Failure: t.failure,
		Mean: t.all.mean, SD: t.all.sd(), Skewness: t.all.skewness(), NoSpread: t.sources.noSpread(),
		Coverage: t.Coverage, Tolerance: t.settling.tolerance(),
	}
	tail := max(tailFor(t.kept, t.Coverage), 1+int(outside*float64(t.kept)))
	e := sortEnds(t.values[:t.kept], tail)
	d.Low, d.High = e.shortest(t.Coverage)
	d.SymLow, d.SymHigh = e.symmetric(t.Coverage)
	d.Histogram = e.histogram(t.Bins)
	if !finite(d.Mean) || !finite(d.SD) || !finite(d.Skewness) || !finite(d.High-d.Low) {
		return nil, ErrNotFinite
	}
	return d, nil
}

// noSpread says whether an input is drawn from a distribution without variance.
func (s *Sources) noSpread() bool {
	for _, g := range s.groups {
		if in := s.inputs[g.slots[0]]; in.Shape == Normal && g.dof > 0 && g.dof <= 2 {
			return true
		}
	}
	return false
}
