package euv

import (
	"fmt"
	"math"

	"example.com/dosewright/units"
)

// manyFields bounds the fields of the square around a wafer.
const manyFields = 100000

// CompleteFields is the largest number of fields that lie whole on a wafer less
// its edge: fields of one size on a regular grid without gaps, aligned with the
// axes, at the best of all positions of the grid.
//
// width and height are those of a field, diameter that of the wafer, edge the
// width of the ring that does not count; all in m, edge 0 or greater and less
// than half the diameter, the others greater than 0. At most 1e5 fields fit
// into the square around the wafer. Fields that fit to a part in 1e12 of the
// radius count as whole. Errors: *ArgumentError. Source: geometry.
func CompleteFields(width, height, diameter, edge units.Length) (units.FieldsPerWafer, error) {
	g, err := gridOf(width, height, diameter, edge)
	if err != nil {
		return 0, err
	}
	most := 0
	g.corners(func(v vertex) { most = max(most, g.complete(v.at)) })
	return units.FieldsPerWafer(most), nil
}

// TouchedFieldsLeast is the smallest number of fields that cover a wafer less
// its edge, at the best of all positions of the grid. A field counts when a
// part of it lies inside; one that only meets the circle does not. Arguments
// and errors are those of CompleteFields.
func TouchedFieldsLeast(width, height, diameter, edge units.Length) (units.FieldsPerWafer, error) {
	g, err := gridOf(width, height, diameter, edge)
	if err != nil {
		return 0, err
	}
	least := math.MaxInt
	g.vertices(func(v vertex) { least = min(least, g.touched(v.at, g.radius*(1-closeness))) })
	return units.FieldsPerWafer(least), nil
}

// TouchedFieldsMost is the largest number of fields of which a part lies inside
// a wafer less its edge, at the worst of all positions of the grid. Positions
// that hold only in a window narrower than a part in 1e9 of the radius may be
// missed. Arguments and errors are those of CompleteFields.
func TouchedFieldsMost(width, height, diameter, edge units.Length) (units.FieldsPerWafer, error) {
	g, err := gridOf(width, height, diameter, edge)
	if err != nil {
		return 0, err
	}
	most := 0
	g.vertices(func(v vertex) { most = max(most, g.touched(v.inside(aside*g.radius), g.radius)) })
	return units.FieldsPerWafer(most), nil
}

func gridOf(width, height, diameter, edge units.Length) (fieldGrid, error) {
	err := first(positive("width", width), positive("height", height), positive("diameter", diameter), notNegative("edge", edge))
	if err != nil {
		return fieldGrid{}, err
	}
	g := fieldGrid{width: float64(width), height: float64(height), radius: float64(diameter)/2 - float64(edge)}
	if !(g.radius > 0) {
		return fieldGrid{}, outside("edge", edge, fmt.Sprintf("less than half the diameter, %.5g mm", float64(diameter)*500))
	}
	across, along := 2*g.radius/g.width, 2*g.radius/g.height
	if fields := (across + 1) * (along + 1); !(fields <= manyFields) {
		return fieldGrid{}, outside("width", width, fmt.Sprintf(
			"greater, or the height: about %.2g fields meet the square around the wafer, and at most 1e5 are counted", fields))
	}
	if g.width < g.height { // the fewer columns the faster
		g.width, g.height = g.height, g.width
	}
	return g, nil
}
