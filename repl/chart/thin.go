package chart

// thin leaves at most four points of a run for each visit to one of so many
// columns: the first, the lowest, the highest and the last. What is drawn
// stays the same to the width of a column, and no peak is lost.
func thin(run []point, columns int) []point {
	if len(run) <= 4*columns {
		return run
	}
	column := func(i int) int { return int(run[i].x * float64(columns)) }
	var out []point
	for first := 0; first < len(run); {
		low, high, last := first, first, first
		for last+1 < len(run) && column(last+1) == column(first) {
			last++
			if run[last].y < run[low].y {
				low = last
			}
			if run[last].y > run[high].y {
				high = last
			}
		}
		kept := -1
		for _, i := range [...]int{first, min(low, high), max(low, high), last} {
			if i != kept {
				out = append(out, run[i])
				kept = i
			}
		}
		first = last + 1
	}
	return out
}
