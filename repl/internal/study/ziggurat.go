package study

import "math"

// ziggurat draws standard normal deviates from layers of equal area under the
// density exp(−x²/2), most of them by one comparison and one multiplication
// (Marsaglia, Tsang, The ziggurat method for generating random variables, J. Stat.
// Softw. 5(8) (2000); from memory).
//
// Layer i reaches from 0 to edge[i]; all of it up to edge[i+1] lies under the
// density. The lowest layer, 0, holds the tail beyond edge[1] as well, as if it
// were that much wider.
type ziggurat struct {
	edge   [layers + 1]float64
	height [layers + 1]float64 // of the density at the edges
	width  [layers]float64     // edge[i] in steps of 2⁻⁵³
	inside [layers]uint64      // how many of those steps lie under the density for certain
}

const (
	layers   = 256
	tailFrom = 3.6541528853610088 // where the tail begins, so that the layers close at the top
	steps    = 1 << 53
)

func density(x float64) float64 { return math.Exp(-x * x / 2) }

func newZiggurat() *ziggurat {
	area := tailFrom*density(tailFrom) + math.Sqrt(math.Pi/2)*math.Erfc(tailFrom/math.Sqrt2)
	z := &ziggurat{}
	z.edge[0], z.edge[1] = area/density(tailFrom), tailFrom
	for i := 2; i < layers; i++ {
		z.edge[i] = math.Sqrt(-2 * math.Log(area/z.edge[i-1]+density(z.edge[i-1])))
	}
	for i, x := range z.edge {
		z.height[i] = density(x)
	}
	for i := range layers {
		z.width[i] = z.edge[i] / steps
		z.inside[i] = uint64(z.edge[i+1] / z.edge[i] * steps)
	}
	return z
}

// normals fills a row. Of the 64 random bits of a deviate the lowest 8 choose the
// layer, the next one the sign, and the highest 53 the place.
func (s stream) normals(row []float64) {
	z, g := s.ziggurat, *s.generator // a copy, which the loop keeps at hand
	for i := range row {
		n := g.Uint64()
		layer, place := n%layers, n>>11
		x := float64(place) * z.width[layer]
		if place >= z.inside[layer] {
			*s.generator = g
			x = s.edgeOf(int(layer), x)
			g = *s.generator
		}
		row[i] = math.Float64frombits(math.Float64bits(x) ^ n>>8<<63)
	}
	*s.generator = g
}

// edgeOf decides on a place that may lie outside of the density, and draws again
// when it does.
func (s stream) edgeOf(layer int, x float64) float64 {
	for z := s.ziggurat; ; {
		switch {
		case x < z.edge[layer+1]:
			return x
		case layer == 0:
			return s.tail()
		case z.height[layer]+s.Float64()*(z.height[layer+1]-z.height[layer]) < density(x):
			return x
		}
		n := s.Uint64()
		layer = int(n % layers)
		x = float64(n>>11) * z.width[layer]
	}
}

// tail draws from the density beyond tailFrom (Marsaglia 1964; from memory).
func (s stream) tail() float64 {
	for {
		x := -math.Log(1-s.Float64()) / tailFrom
		if y := -math.Log(1 - s.Float64()); 2*y > x*x {
			return tailFrom + x
		}
	}
}
