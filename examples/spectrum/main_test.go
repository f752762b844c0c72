package main

import (
	"encoding/csv"
	"math"
	"strconv"
	"strings"
	"testing"

	"example.com/dosewright/internal/near"
)

// The program prints a table that reads back: a hump of about 70 % near 13.5 nm
// (common practice, no source), and its eleventh power.
func TestSpectrum(t *testing.T) {
	var out strings.Builder
	if err := run(&out); err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(strings.NewReader(out.String())).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) != 102 || strings.Join(rows[0], ",") != "wavelength / nm,reflectivity,eleven mirrors" {
		t.Fatalf("%d rows below %q", len(rows)-1, rows[0])
	}
	top, at := 0.0, 0.0
	for i, row := range rows[1:] {
		var x [3]float64
		for k, text := range row {
			if x[k], err = strconv.ParseFloat(text, 64); err != nil {
				t.Fatal(err)
			}
		}
		near.Abs(t, "wavelength", x[0], 13+float64(i)/100, 1e-9)
		near.Abs(t, "eleven mirrors", x[2], math.Pow(x[1], 11), 1e-5)
		if x[1] > top {
			top, at = x[1], x[0]
		}
	}
	near.Abs(t, "peak", top, 0.72, 0.02)
	near.Abs(t, "its wavelength", at, 13.5, 0.1)
}
