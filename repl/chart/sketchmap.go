package chart

import (
	"math"

	"example.com/dosewright/repl"
)

// shades are the tones of a sketched map, from low to high. A blank is a
// place without a value.
var shades = []rune("·:+░▒▓█")

// sketchMap draws a grid in tones, with their limits below.
func sketchMap(p *repl.Picture, columns int) ([]string, error) {
	f, grid, err := fieldOf(p)
	if err != nil {
		return nil, err
	}
	s := newSheet(f, columns)
	limits := shadeLimits(grid.span)
	across, up := spots(grid.xs, s.width()), spots(grid.ys, len(s.rows))
	for j, row := range s.rows {
		for i := range row {
			if z := grid.value(across[i], up[len(s.rows)-1-j]); !math.IsNaN(z) {
				row[i] = shades[shadeOf(z, limits)]
			}
		}
	}
	return append(s.lines(), wrapped(shadeKey(grid.head, limits), columns)...), nil
}

// shadeLimits are the round values between the tones, one fewer at most.
func shadeLimits(z span) []tick {
	var inside []tick
	for n := len(shades); n > 0; n-- {
		inside = inside[:0]
		for _, t := range z.ticks(n) {
			if t.value > z.lo && t.value < z.hi {
				inside = append(inside, t)
			}
		}
		if len(inside) < len(shades) {
			break
		}
	}
	return inside
}

func shadeOf(z float64, limits []tick) int {
	n := 0
	for n < len(limits) && z >= limits[n].value {
		n++
	}
	return n
}

// shadeKey names the limits of each tone: "· below 10", "░ 10 to 20", …
func shadeKey(head string, limits []tick) []string {
	var out []string
	if head != "" {
		out = append(out, head+":")
	}
	for i, t := range limits {
		word := " below " + t.label
		if i > 0 {
			word = " " + limits[i-1].label + " to " + t.label
		}
		out = append(out, string(shades[i])+word)
	}
	if n := len(limits); n > 0 {
		out = append(out, string(shades[n])+" from "+limits[n-1].label)
	}
	return out
}
