package repl

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
)

// errRecord is what UnmarshalJSON says of an object that no record is.
var errRecord = errors.New("no record of a result")

// recordObject has the fields of all kinds of records.
type recordObject struct {
	Line        int          `json:"line"`
	Text        *string      `json:"text"`
	Value       *json.Number `json:"value"`
	Unit        string       `json:"unit"`
	SI          float64      `json:"si"`
	Dimension   string       `json:"dimension"`
	Plane       string       `json:"plane"`
	Uncertainty *json.Number `json:"uncertainty"`
	Holds       *bool        `json:"holds"`
	Columns     []Column     `json:"columns"`
	Rows        [][]Cell     `json:"rows"`
	Warnings    []string     `json:"warnings"`
	Error       *string      `json:"error"`
	Column      int          `json:"column"`
	Low         json.Number  `json:"low"`
	High        json.Number  `json:"high"`
	Coverage    *float64     `json:"coverage"`
	Skewness    float64      `json:"skewness"`
	Trials      int          `json:"trials"`
}

// UnmarshalJSON reads what MarshalJSON writes, without loss: the kind is told
// by the fields, and empty lists are nil. Fields of later versions are passed
// over. An object that is no record, such as a Drift, is refused.
func (r *Record) UnmarshalJSON(data []byte) error {
	var o recordObject
	if err := json.Unmarshal(data, &o); err != nil {
		return fmt.Errorf("%w: %w", errRecord, err)
	}
	kind, ok := o.kind()
	if !ok {
		return fmt.Errorf("%w: %.80s has none of text and error", errRecord, data)
	}
	*r = Record{
		Kind: kind, Line: o.Line, Unit: o.Unit, SI: o.SI, Dimension: o.Dimension, Plane: o.Plane, Uncertainty: o.Uncertainty,
		Column: o.Column, Low: o.Low, High: o.High, Skewness: o.Skewness, Trials: o.Trials,
		Text: orNone(o.Text), Value: orNone(o.Value), Holds: orNone(o.Holds), Error: orNone(o.Error), Coverage: orNone(o.Coverage),
	}
	if len(o.Warnings) > 0 {
		r.Warnings = o.Warnings
	}
	if len(o.Columns) > 0 {
		r.Columns = o.Columns
	}
	if len(o.Rows) > 0 {
		r.Rows = o.Rows
	}
	return nil
}

// kind tells records apart.
func (o *recordObject) kind() (kind RecordKind, ok bool) {
	switch {
	case o.Error != nil:
		return ErrorRecord, true
	case o.Text == nil:
		return TextRecord, false
	case o.Coverage != nil:
		return DistributionRecord, true
	case o.Value != nil:
		return ValueRecord, true
	case o.Holds != nil:
		return CheckRecord, true
	case o.Columns != nil:
		return TableRecord, true
	}
	return TextRecord, true
}

// orNone is what a pointer points at, or nothing.
func orNone[T any](p *T) T {
	if p == nil {
		var none T
		return none
	}
	return *p
}

// UnmarshalJSON reads a number or a text.
func (c *Cell) UnmarshalJSON(data []byte) error {
	if bytes.HasPrefix(data, []byte(`"`)) {
		*c = Cell{IsText: true}
		return json.Unmarshal(data, &c.Text)
	}
	*c = Cell{}
	return json.Unmarshal(data, &c.Number)
}

// driftObject is the form of a drift in JSON.
type driftObject struct {
	Line     *int           `json:"line"`
	Recorded []string       `json:"recorded"`
	Now      []string       `json:"now"`
	MovedBy  []changeObject `json:"moved_by"`
}

type changeObject struct {
	Name  string `json:"name"`
	Was   string `json:"was"`
	Now   string `json:"now"`
	Alone string `json:"alone"`
}

// MarshalJSON writes where the reply stands, the two replies, and what moved
// it; the statement is the one in that line of the file.
func (d Drift) MarshalJSON() ([]byte, error) {
	o := driftObject{Line: &d.Line, Recorded: append([]string{}, d.Was...), Now: append([]string{}, d.Now...), MovedBy: []changeObject{}}
	for _, c := range d.MovedBy {
		o.MovedBy = append(o.MovedBy, changeObject(c))
	}
	return plainJSON(o)
}

// UnmarshalJSON reads what MarshalJSON writes, without loss but for Statement,
// which is not written.
func (d *Drift) UnmarshalJSON(data []byte) error {
	var o driftObject
	if err := json.Unmarshal(data, &o); err != nil {
		return fmt.Errorf("no drift: %w", err)
	}
	if o.Line == nil || o.Recorded == nil || o.Now == nil {
		return fmt.Errorf("no drift: %.80s has not all of line, recorded and now", data)
	}
	*d = Drift{Line: *o.Line}
	d.Was, d.Now = append(d.Was, o.Recorded...), append(d.Now, o.Now...)
	for _, c := range o.MovedBy {
		d.MovedBy = append(d.MovedBy, Change(c))
	}
	return nil
}

// RecordOf returns a result as plain values for JSON, its text at so many
// significant digits.
func RecordOf(r Result, digits int) Record {
	rec := r.record()
	rec.Text = joinLines(r.lines(Style{Digits: digits}))
	return rec
}
