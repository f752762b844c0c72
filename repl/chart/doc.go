// Package chart draws the pictures of package repl: curves, maps with contour
// lines, and histograms. [Draw] writes SVG or PNG for reports; [Sketch] gives
// lines of text for a terminal.
//
// Every axis is headed as the SI does it, quantity divided by unit. Curves
// differ in dash pattern and lightness as well as in colour, and the colours
// of a map grow evenly lighter, so that a grey print still reads. The same
// picture always gives the same bytes.
package chart

// For maintainers. Each kind of picture is first brought to the unit square:
// curvesOf, fieldOf and barsOf check the numbers, choose the stretch of each
// axis and map all values to 0…1, where 0 is the start of the axis. What draws
// them, ink or text, never sees a value again, hence never a logarithm of
// zero, an overflow or a NaN; the plot library is handed an axis from 0 to 1
// with ready ticks. Its own ticks, contours and legend are not used: the ticks
// fail for ranges below 1e-14, the contours leave a map in random order, and
// the legend covers the curves.
