package program

import (
	"fmt"

	"example.com/dosewright/repl/internal/syntax"
	"example.com/dosewright/units"
)

// Running is the name of the running wavelength in a chain.
const Running = "λ"

// Integrate gives the mean of a spectrum over a band, with an estimate of its
// error; kinks are wavelengths at which tables have points. The session knows
// how; checking hands it to the programs it makes.
type Integrate func(f func(dst, wavelengths []float64) error, center, width float64, kinks []float64) (mean, deviation float64, err error)

// spectral is what the node of an in-band factor holds.
type spectral struct {
	product   *Node // of the elements so far, at the running wavelength
	weight    *Node // of the source, nil for a flat one
	integrate Integrate
	kinks     func(low, high float64) []float64
	read      func(spectrum func(dst, wavelengths []float64) error, center float64) (float64, error) // in the place of a mean
}

// running makes the running wavelength known to the lines of a chain.
func (c *Checker) running() {
	t := Type{Dim: units.DimensionOf[units.Length]()}
	c.Local(Running, t)
	c.locals["wavelength"] = c.locals[Running]
}

// dependsOn says whether a formula has the running wavelength in it.
func (n *Node) runs() bool {
	found := false
	n.each(map[*Node]bool{}, func(n *Node) { found = found || n.op == opRef && n.name == Running })
	return found
}

// inBand makes the node of the in-band factor from the head of a chain to a
// place in it.
func (c *Checker) inBand(ch *Chain, steps []Step, at syntax.Span) *Node {
	sp := &spectral{product: c.product(steps, at), weight: ch.Weight, integrate: c.Scope.Integrate, kinks: ch.kinks}
	n := c.made(Node{op: opSpectral, spectral: sp, args: []*Node{ch.Center, ch.Width}}, at)
	n.inner = append(n.inner, sp.product)
	if sp.weight != nil {
		n.inner = append(n.inner, sp.weight)
	}
	return n
}

// product multiplies the factors of elements.
func (c *Checker) product(steps []Step, at syntax.Span) *Node {
	n := c.constant(1, Type{}, at)
	for _, s := range steps {
		if s.All != nil {
			n = c.made(Node{op: opMul, args: []*Node{n, s.All}}, at)
		}
	}
	return n
}

// kinks gathers where the tables behind a chain's elements have points.
func (ch *Chain) kinks(low, high float64) []float64 {
	var list []float64
	seen := map[*Node]bool{}
	for _, s := range ch.Steps {
		for _, n := range s.nodes() {
			n.each(seen, func(n *Node) {
				if n.op == opCall && n.fn.Kinks != nil {
					list = append(list, n.fn.Kinks(low, high)...)
				}
			})
		}
	}
	return list
}

// spectral compiles an in-band factor: the product is a program of its own over
// the running wavelength and all inputs of the outer one, run in blocks.
func (c *compiler) spectral(n *Node) eval {
	sub, err := CompileAll(n.inner, c.resolve, Opening{Inputs: append([]string{Running}, c.open.Inputs...), Sources: c.open.Sources})
	if err != nil {
		return fails(n, err)
	}
	center, width := c.emit(n.args[0]).eval(), c.emit(n.args[1]).eval()
	place := c.nestedPlaces(sub)
	index := c.nested
	c.nested++
	c.subs = append(c.subs, sub)
	sp := n.spectral
	return func(f *Frame) float64 {
		mid, wide := center(f), width(f)
		if f.err != nil {
			return 0
		}
		b := f.block(index, sub, place)
		mean, err := b.answer(f, sp, mid, wide)
		if err != nil {
			return f.fail(n, err)
		}
		return f.checked(n, mean)
	}
}

// nestedPlaces says where in the outer frame the inputs of an inner program
// stand, the running wavelength aside.
func (c *compiler) nestedPlaces(sub *Program) []int {
	var places []int
	for i := range c.open.Inputs {
		places = append(places, i)
	}
	for _, n := range sub.Sources {
		at := 0
		for i, own := range c.sources {
			if own == n {
				at = len(c.open.Inputs) + i
			}
		}
		places = append(places, at)
	}
	return places
}

// nestedBlock runs an inner program; it belongs to one frame.
type nestedBlock struct {
	program *Program
	run     func(in, out [][]float64) (int, error)
	asked   bool // for its doubts
	place   []int
	in      [][]float64
	out     [][]float64

	low, high float64   // the band at hand
	within    []float64 // kinks inside it
}

func (f *Frame) block(index int, sub *Program, place []int) *nestedBlock {
	for len(f.nested) <= index {
		f.nested = append(f.nested, nil)
	}
	if f.nested[index] == nil {
		b := &nestedBlock{program: sub, run: sub.Block(), place: place}
		for range len(place) + 1 {
			b.in = append(b.in, make([]float64, Lanes))
		}
		for range sub.Outputs() {
			b.out = append(b.out, make([]float64, Lanes))
		}
		f.nested[index] = b
	}
	return f.nested[index]
}

// answer fills the inputs and asks the spectrum.
func (b *nestedBlock) answer(f *Frame, sp *spectral, center, width float64) (float64, error) {
	for k, at := range b.place {
		row := b.in[k+1]
		for i := range row {
			row[i] = f.v[at]
		}
	}
	if !(center > 0) || !(width >= 0) || width >= 2*center {
		return 0, fmt.Errorf("the band has its centre at %s and the width %s; a width is 0 or greater and less than twice the centre", units.New(center, units.DimensionOf[units.Length]()), units.New(width, units.DimensionOf[units.Length]()))
	}
	b.doubts(f, center)
	switch {
	case sp.read != nil:
		return sp.read(b.spectrum(sp), center)
	case width == 0:
		return b.single(center)
	}
	return b.mean(f, sp, center, width)
}

// doubts passes on the warnings of the inner program, which blocks of lanes do
// not gather: those of a single run at the centre, the first time.
func (b *nestedBlock) doubts(f *Frame, center float64) {
	if b.asked {
		return
	}
	b.asked = true
	frame, in := b.program.NewFrame(), []float64{center}
	for _, at := range b.place {
		in = append(in, f.v[at])
	}
	if b.program.RunAll(frame, in, make([]float64, b.program.Outputs())) == nil {
		f.warn(frame.Warnings)
	}
}

// mean is the mean of the product over the band, weighted by the source.
func (b *nestedBlock) mean(f *Frame, sp *spectral, center, width float64) (float64, error) {
	kinks := b.kinks(sp, center-width/2, center+width/2)
	mean, off, err := sp.integrate(b.spectrum(sp), center, width, kinks)
	if err != nil {
		return 0, err
	}
	weight := 1.0
	if sp.weight != nil {
		if weight, _, err = sp.integrate(b.source, center, width, kinks); err != nil {
			return 0, err
		}
		if !(weight > 0) {
			return 0, fmt.Errorf("the source's spectrum has no light in the band")
		}
	}
	if off > 1e-6*mean {
		f.warn([]string{fmt.Sprintf("the mean over the band is settled to %.1g of it only", off/mean)})
	}
	return mean / weight, nil
}

// single is the product at one wavelength.
func (b *nestedBlock) single(wavelength float64) (float64, error) {
	y := [1]float64{}
	err := b.values(y[:], []float64{wavelength}, func(out [][]float64, i int) float64 { return out[0][i] })
	return y[0], err
}

// spectrum is the product, times the weight of the source where there is one.
func (b *nestedBlock) spectrum(sp *spectral) func(dst, wavelengths []float64) error {
	return func(dst, wavelengths []float64) error {
		return b.values(dst, wavelengths, func(out [][]float64, i int) float64 {
			if sp.weight != nil {
				return out[0][i] * out[1][i]
			}
			return out[0][i]
		})
	}
}

// source is the weight alone, which is nowhere negative.
func (b *nestedBlock) source(dst, wavelengths []float64) error {
	err := b.values(dst, wavelengths, func(out [][]float64, i int) float64 { return out[1][i] })
	for i := 0; i < len(dst) && err == nil; i++ {
		if dst[i] < 0 {
			err = fmt.Errorf("the source's spectrum is negative at %s", units.New(wavelengths[i], units.DimensionOf[units.Length]()))
		}
	}
	return err
}

// kinks remembers those of the last band, since the tables stay as they are.
func (b *nestedBlock) kinks(sp *spectral, low, high float64) []float64 {
	if b.low != low || b.high != high {
		b.low, b.high, b.within = low, high, sp.kinks(low, high)
	}
	return b.within
}

// values runs the inner program at many wavelengths.
func (b *nestedBlock) values(dst, wavelengths []float64, take func(out [][]float64, i int) float64) error {
	in, out := make([][]float64, len(b.in)), make([][]float64, len(b.out))
	for len(dst) > 0 {
		n := min(len(dst), Lanes)
		copy(b.in[0], wavelengths[:n])
		for k := range in {
			in[k] = b.in[k][:n]
		}
		for k := range out {
			out[k] = b.out[k][:n]
		}
		if _, err := b.run(in, out); err != nil {
			return err
		}
		for i := range n {
			dst[i] = take(out, i)
		}
		dst, wavelengths = dst[n:], wavelengths[n:]
	}
	return nil
}

// Scanned makes the node of a number that is read off a spectrum around the
// centre of a chain's band, such as its peak.
func (c *Checker) Scanned(name string, ch *Chain, product *Node, read func(spectrum func(dst, wavelengths []float64) error, center float64) (float64, error), t Type, at syntax.Span) *Node {
	sp := &spectral{product: product, read: read}
	return c.made(Node{op: opSpectral, spectral: sp, inner: []*Node{product}, args: []*Node{ch.Center, ch.Width}, Type: t, text: name}, at)
}
