package repl

import (
	"bufio"
	"encoding/csv"
	"io"
	"math"
	"strconv"

	"example.com/dosewright/units"
)

// tableWriter writes rows of numbers as comma-separated values, in full, with
// heads in the form of the SI, so that data reads them back.
type tableWriter struct {
	to   *bufio.Writer
	unit []units.Unit
	line []byte
}

func newTableWriter(to io.Writer, columns []Column, unit func(int) units.Unit) *tableWriter {
	t := &tableWriter{to: bufio.NewWriterSize(to, 1<<16)}
	var heads []string
	for k, c := range columns {
		heads = append(heads, c.head())
		t.unit = append(t.unit, unit(k))
	}
	w := csv.NewWriter(t.to)
	_ = w.Write(heads) // an error stays in t.to, which flush reports
	w.Flush()
	return t
}

// row writes one row; a value that is not there is left empty.
func (t *tableWriter) row(si []float64) error {
	line := t.line[:0]
	for k, v := range si {
		if k > 0 {
			line = append(line, ',')
		}
		if !math.IsNaN(v) {
			line = strconv.AppendFloat(line, t.unit[k].From(v), 'g', -1, 64)
		}
	}
	t.line = append(line, '\n')
	_, err := t.to.Write(t.line)
	return err
}

func (t *tableWriter) flush() error { return t.to.Flush() }
