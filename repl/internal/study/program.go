package study

// BlockSize is the largest number of lanes of one block.
const BlockSize = 512

// Eval is one run of a program: slots in, value out. It must not write to the
// slots. It is used by one goroutine at a time.
type Eval func(slots []float64) (float64, error)

// Block runs a program on several lanes: lanes[slot][lane] in,
// out[output][lane] out, every row as long as out[0], at most BlockSize. It must
// not write to the lanes.
//
// It computes the lanes in order and returns how many have a value. When that is
// fewer than all, err says why the next lane has none, and out from there on is
// of no meaning. A value that is not finite counts as none (ErrNotFinite).
type Block func(lanes, out [][]float64) (n int, err error)

// Program makes Blocks, one for each goroutine.
type Program func() Block

// Lanes makes a Block of scalar runs, one Eval for each output.
func Lanes(outputs ...Eval) Block {
	var slots []float64
	return func(lanes, out [][]float64) (int, error) {
		if len(slots) != len(lanes) {
			slots = make([]float64, len(lanes))
		}
		for lane := range out[0] {
			for s, row := range lanes {
				slots[s] = row[lane]
			}
			for k, f := range outputs {
				y, err := f.at(slots)
				if err != nil {
					return lane, err
				}
				out[k][lane] = y
			}
		}
		return len(out[0]), nil
	}
}

// at runs f and refuses what is not finite.
func (f Eval) at(slots []float64) (float64, error) {
	y, err := f(slots)
	if err == nil && !finite(y) {
		err = ErrNotFinite
	}
	return y, err
}

// runner goes on behind the lanes without a value. It belongs to one goroutine.
type runner struct {
	block     Block
	ins, outs [][]float64 // frames, used again
}

func newRunner(b Block, slots, outputs int) *runner {
	return &runner{b, make([][]float64, slots), make([][]float64, outputs)}
}

// run computes every lane and hands those without a value to fail, in order.
func (r *runner) run(lanes, out [][]float64, fail func(lane int, err error)) {
	width := len(out[0])
	for start := 0; start < width; start++ {
		n, err := r.block(cut(r.ins, lanes, start, width), cut(r.outs, out, start, width))
		if err == nil {
			n = width - start
		}
		for lane := start; lane < start+n; lane++ {
			if !finiteLane(out, lane) {
				fail(lane, ErrNotFinite)
			}
		}
		if start += n; err != nil {
			fail(start, err)
		}
	}
}

// cut puts the rows from lane a to lane b into the given frame.
func cut(frame, rows [][]float64, a, b int) [][]float64 {
	for i, row := range rows {
		frame[i] = row[a:b]
	}
	return frame
}

func finiteLane(rows [][]float64, lane int) bool {
	for _, row := range rows {
		if !finite(row[lane]) {
			return false
		}
	}
	return true
}

// grid makes rows of lanes in one piece of memory.
func grid(rows, width int) [][]float64 {
	all := make([]float64, rows*width)
	g := make([][]float64, rows)
	for i := range g {
		g[i] = all[i*width : (i+1)*width : (i+1)*width]
	}
	return g
}

func fill(row []float64, x float64) {
	for i := range row {
		row[i] = x
	}
}
