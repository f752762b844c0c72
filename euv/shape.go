package euv

import (
	"math"

	"example.com/dosewright/units"
)

// HoleArea is the area of a round hole.
//
//	area = π diameter² / 4
//
// diameter is in m, greater than 0; the result is in m². Errors:
// *ArgumentError. Source: geometry.
func HoleArea(diameter units.Length) (units.Area, error) {
	if err := positive("diameter", diameter); err != nil {
		return 0, err
	}
	return answer("hole_area", units.Area(math.Pi/4*float64(diameter)*float64(diameter)))
}

// RectangleArea is the area of a rectangle.
//
//	area = width · height
//
// width and height are in m, greater than 0; the result is in m². Errors:
// *ArgumentError. Source: geometry.
func RectangleArea(width, height units.Length) (units.Area, error) {
	if err := first(positive("width", width), positive("height", height)); err != nil {
		return 0, err
	}
	return answer("rectangle_area", units.Area(float64(width)*float64(height)))
}

// EllipseArea is the area of an ellipse.
//
//	area = π a b / 4
//
// a and b are the full axes, not their halves, in m, greater than 0; the result
// is in m². Errors: *ArgumentError. Source: geometry.
func EllipseArea(a, b units.Length) (units.Area, error) {
	if err := first(positive("a", a), positive("b", b)); err != nil {
		return 0, err
	}
	return answer("ellipse_area", units.Area(math.Pi/4*float64(a)*float64(b)))
}
