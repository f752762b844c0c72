package euv

import "math"

// panelNodes is the number of nodes in a panel.
const panelNodes = 15

// The nodes of Gauss and Kronrod between −1 and 1, and the weights of both
// formulas over 2, so that they give means: R. Piessens et al., QUADPACK,
// Springer 1983, routine QK15. A test shows that they are exact for the
// polynomials for which they must be.
var (
	kronrodNodes = [panelNodes]float64{
		-0.991455371120812639206854697526329, -0.949107912342758524526189684047851,
		-0.864864423359769072789712788640926, -0.741531185599394439863864773280788,
		-0.586087235467691130294144691693013, -0.405845151377397166906606412076961,
		-0.207784955007898467600689403773245, 0,
		0.207784955007898467600689403773245, 0.405845151377397166906606412076961,
		0.586087235467691130294144691693013, 0.741531185599394439863864773280788,
		0.864864423359769072789712788640926, 0.949107912342758524526189684047851,
		0.991455371120812639206854697526329,
	}
	kronrodWeights = [8]float64{ // from an end to the middle
		0.022935322010529224963732008058970 / 2, 0.063092092629978553290700663189204 / 2,
		0.104790010322250183839876322541518 / 2, 0.140653259715525918745189590510238 / 2,
		0.169004726639267902826583426598550 / 2, 0.190350578064785409913256402421014 / 2,
		0.204432940075298892414161999234649 / 2, 0.209482141084727828012999174891714 / 2,
	}
	gaussWeights = [4]float64{ // of every second node
		0.129484966168869693270611432679082 / 2, 0.279705391489276667901467771423780 / 2,
		0.381830050505118944950369775488975 / 2, 0.417959183673469387755102040816327 / 2,
	}
)

// panelMean is the mean of a function over a panel from its values at the
// nodes, and how far the formula with 7 nodes lies from that.
func panelMean(values []float64) (mean, deviation float64) {
	const middle = panelNodes / 2
	mean = kronrodWeights[middle] * values[middle]
	gauss := gaussWeights[middle/2] * values[middle]
	for i := range middle {
		pair := values[i] + values[panelNodes-1-i]
		mean += kronrodWeights[i] * pair
		if i%2 == 1 {
			gauss += gaussWeights[i/2] * pair
		}
	}
	return mean, math.Abs(mean - gauss)
}
