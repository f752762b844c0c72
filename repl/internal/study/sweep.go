package study

import (
	"context"
	"fmt"
	"strings"
)

// largestChunk keeps the handing over of chunks cheap; few points are cut smaller,
// since one may take milliseconds.
const largestChunk = 16 * BlockSize

// DefaultPoints is the largest number of points of a sweep that states no other.
const DefaultPoints = 10_000_000

// Sweep runs a program over one axis or a grid of several, of which the last
// varies fastest.
type Sweep struct {
	Slots   []float64 // the values of all slots; those of the axes are replaced
	Axes    []Axis
	Outputs int // of the program
	Limit   int // of points; 0 for DefaultPoints
}

// Row is one point of a sweep. Its slices are used again for the next.
type Row struct {
	Index int
	X     []float64 // a value for each axis
	Y     []float64 // a value for each output; of no meaning with an error
	Err   error     // why this point has no value
}

// Points is the number of points, as a float64, since it may be past any int.
func (s *Sweep) Points() float64 {
	n := 1.0
	for _, x := range s.Axes {
		n *= float64(x.n)
	}
	return n
}

// Run hands every point to take, in order, on the caller's goroutine, while
// others compute ahead. Memory does not grow with the number of points. Errors:
// ErrSize, ErrRange, that of take, that of ctx; the points taken before stand.
func (s *Sweep) Run(ctx context.Context, p Program, take func(Row) error) error {
	if err := s.refused(); err != nil {
		return err
	}
	total := int(s.Points())
	size := max(1, min(largestChunk, total/64))
	chunks := (total + size - 1) / size
	start := func() func(int, *sweepChunk) error { return s.worker(ctx, p, size, total) }
	row := Row{X: make([]float64, len(s.Axes)), Y: make([]float64, s.Outputs)}
	return inOrder(ctx, chunks, start, func() sweepChunk { return s.room(size) }, func(_ int, c *sweepChunk) error {
		for lane := range c.width {
			row.Index, row.Err = c.first+lane, c.errs[lane]
			for a, x := range c.x {
				row.X[a] = x[lane]
			}
			for k, y := range c.y {
				row.Y[k] = y[lane]
			}
			if err := take(row); err != nil {
				return err
			}
		}
		return nil
	})
}

func (s *Sweep) refused() error {
	limit := s.Limit
	if limit == 0 {
		limit = DefaultPoints
	}
	if len(s.Axes) == 0 || s.Outputs < 1 {
		return refuse(ErrRange, "a sweep needs an axis and an output")
	}
	for i, x := range s.Axes {
		if x.n < 1 || x.slot < 0 || x.slot >= len(s.Slots) {
			return refuse(ErrRange, "axis %d has no points or no slot", i)
		}
		for _, other := range s.Axes[:i] {
			if other.slot == x.slot {
				return refuse(ErrRange, "two axes vary slot %d", x.slot)
			}
		}
	}
	if n := s.Points(); n > float64(limit) {
		return refuse(ErrSize, "%s points are too many: at most %d", s.product(n), limit)
	}
	return nil
}

// product writes the number of points, with the factors of a grid.
func (s *Sweep) product(n float64) string {
	if len(s.Axes) == 1 {
		return fmt.Sprintf("%.10g", n)
	}
	var factors []string
	for _, x := range s.Axes {
		factors = append(factors, fmt.Sprint(x.n))
	}
	return fmt.Sprintf("%s = %.10g", strings.Join(factors, " × "), n)
}

// sweepChunk is what one chunk of points leaves.
type sweepChunk struct {
	first, width int
	x, y         [][]float64
	errs         []error
}

func (s *Sweep) room(size int) sweepChunk {
	return sweepChunk{x: grid(len(s.Axes), size), y: grid(s.Outputs, size), errs: make([]error, size)}
}

// worker makes the work of one goroutine.
func (s *Sweep) worker(ctx context.Context, p Program, size, total int) func(int, *sweepChunk) error {
	lanes := grid(len(s.Slots), min(size, BlockSize))
	for slot, v := range s.Slots {
		fill(lanes[slot], v)
	}
	run := newRunner(p(), len(s.Slots), s.Outputs)
	ins, outs := make([][]float64, len(s.Slots)), make([][]float64, s.Outputs)
	return func(chunk int, c *sweepChunk) error {
		c.first = chunk * size
		c.width = min(size, total-c.first)
		s.place(c)
		for start := 0; start < c.width; start += BlockSize {
			if err := ctx.Err(); err != nil {
				return err
			}
			end := min(start+BlockSize, c.width)
			for a, axis := range s.Axes {
				copy(lanes[axis.slot], c.x[a][start:end])
			}
			run.run(cut(ins, lanes, 0, end-start), cut(outs, c.y, start, end), func(lane int, err error) {
				c.errs[start+lane] = err
			})
		}
		return nil
	}
}

// place sets the axes of every point of a chunk.
func (s *Sweep) place(c *sweepChunk) {
	for lane := range c.width {
		c.errs[lane] = nil
		at := c.first + lane
		for a := len(s.Axes) - 1; a > 0; a-- {
			axis := s.Axes[a]
			c.x[a][lane] = axis.At(at % axis.n)
			at /= axis.n
		}
		c.x[0][lane] = s.Axes[0].At(at)
	}
}
