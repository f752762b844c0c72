package units

import "slices"

// Interval is the unit of differences: K for degrees Celsius, else u itself.
func (u Unit) Interval() Unit {
	if u.point {
		u.point, u.parts = false, []part{{symbol: "K", dim: u.dim, num: 1, den: 1}}
	}
	return u
}

// Over is the unit of a quotient, u per v, equal symbols taken together, with the errors of Dimension.Div.
func (u Unit) Over(v Unit) (Unit, error) {
	parts := slices.Clone(u.Interval().parts)
	for _, p := range v.Interval().parts {
		p.num = -p.num
		i := slices.IndexFunc(parts, func(q part) bool { return q.symbol == p.symbol })
		if i < 0 {
			parts = append(parts, p)
			continue
		}
		q := &parts[i]
		q.num, q.den = reduce(q.num*p.den+p.num*q.den, q.den*p.den)
		if q.num == 0 {
			parts = slices.Delete(parts, i, i+1)
		}
	}
	return compose(parts)
}
