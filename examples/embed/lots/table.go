package main

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"strings"

	"example.com/dosewright/units"
)

// lot is one row of the table, as typed quantities.
type lot struct {
	name   string
	dose   units.Fluence
	power  units.Power
	fields units.FieldsPerWafer
}

// mostLots bounds what is read.
const mostLots = 100_000

// readLots reads a table whose heads state the units, as in dose / (mJ/cm^2).
func readLots(r io.Reader) ([]lot, error) {
	table := csv.NewReader(r)
	table.TrimLeadingSpace = true
	heads, err := table.Read()
	if err != nil {
		return nil, err
	}
	columns := map[string]column{}
	for i, h := range heads {
		name, unit, _ := strings.Cut(h, "/")
		c := column{at: i}
		if unit = strings.Trim(unit, " ()"); unit != "" {
			if c.unit, err = units.Standard().Parse(unit); err != nil {
				return nil, fmt.Errorf("the head %q: %w", h, err)
			}
		}
		columns[strings.TrimSpace(name)] = c
	}
	var lots []lot
	for len(lots) < mostLots {
		cells, err := table.Read()
		if errors.Is(err, io.EOF) {
			return lots, nil
		}
		if err != nil {
			return nil, err
		}
		line, _ := table.FieldPos(0)
		l := lot{name: cells[0]}
		err = errors.Join(
			take(columns, "dose", cells, &l.dose), take(columns, "power", cells, &l.power), take(columns, "fields", cells, &l.fields),
		)
		if err != nil {
			return nil, fmt.Errorf("line %d: %w", line, err)
		}
		lots = append(lots, l)
	}
	return nil, fmt.Errorf("more than %d lots", mostLots)
}

// column is where a quantity stands, and in which unit.
type column struct {
	at   int
	unit units.Unit
}

// take reads a cell as a typed quantity; a head in a unit of another dimension
// is an error here, not a wrong number later.
func take[T units.Kind](columns map[string]column, name string, cells []string, to *T) error {
	c, ok := columns[name]
	if !ok {
		return fmt.Errorf("there is no column %s", name)
	}
	si, err := c.unit.Read(strings.TrimSpace(cells[c.at]))
	if err == nil {
		*to, err = units.As[T](units.New(si, c.unit.Dimension()))
	}
	if err != nil {
		return fmt.Errorf("%s: %w", name, err)
	}
	return nil
}
