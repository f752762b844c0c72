package repl

import (
	"bytes"
	"encoding/json"
)

// Record is a result as plain values, for JSON. Which fields it writes depends
// on what it is; numbers are in full, and Text alone is rounded.
type Record struct {
	Kind        RecordKind
	Line        int
	Text        string
	Value       json.Number  // in Unit
	Unit        string       // "" for a pure number
	SI          float64      // in SI base units
	Dimension   string       // in SI base units and counted things
	Plane       string       // "" for none
	Uncertainty *json.Number // in Unit, nil for none
	Holds       bool
	Columns     []Column
	Rows        [][]Cell
	Warnings    []string
	Error       string
	Column      int
	Low, High   json.Number // of a distribution, in Unit
	Coverage    float64
	Skewness    float64
	Trials      int
}

// RecordKind says what a record is.
type RecordKind int

// The kinds of records.
const (
	TextRecord RecordKind = iota
	ValueRecord
	CheckRecord
	TableRecord
	ErrorRecord
	DistributionRecord
)

// Column is the head of a column: a name, and the unit of its numbers, "" for
// pure numbers and texts.
type Column struct {
	Name string `json:"name"`
	Unit string `json:"unit"`
}

// Cell is a number in its column's unit, or a text.
type Cell struct {
	Number float64
	Text   string
	IsText bool
}

// MarshalJSON writes the number or the text.
func (c Cell) MarshalJSON() ([]byte, error) {
	if c.IsText {
		return plainJSON(c.Text)
	}
	return json.Marshal(c.Number)
}

// MarshalJSON writes the fields that belong to the record's kind.
func (r Record) MarshalJSON() ([]byte, error) {
	warnings := r.Warnings
	if warnings == nil {
		warnings = []string{}
	}
	if r.Columns == nil {
		r.Columns = []Column{}
	}
	if r.Rows == nil {
		r.Rows = [][]Cell{}
	}
	switch r.Kind {
	case ValueRecord:
		return plainJSON(struct {
			Line        int          `json:"line"`
			Text        string       `json:"text"`
			Value       json.Number  `json:"value"`
			Unit        string       `json:"unit"`
			SI          float64      `json:"si"`
			Dimension   string       `json:"dimension"`
			Plane       string       `json:"plane"`
			Uncertainty *json.Number `json:"uncertainty"`
			Warnings    []string     `json:"warnings"`
		}{r.Line, r.Text, r.Value, r.Unit, r.SI, r.Dimension, r.Plane, r.Uncertainty, warnings})
	case DistributionRecord:
		return plainJSON(struct {
			Line        int          `json:"line"`
			Text        string       `json:"text"`
			Value       json.Number  `json:"value"`
			Unit        string       `json:"unit"`
			SI          float64      `json:"si"`
			Dimension   string       `json:"dimension"`
			Plane       string       `json:"plane"`
			Uncertainty *json.Number `json:"uncertainty"`
			Low         json.Number  `json:"low"`
			High        json.Number  `json:"high"`
			Coverage    float64      `json:"coverage"`
			Trials      int          `json:"trials"`
			Skewness    float64      `json:"skewness"`
			Warnings    []string     `json:"warnings"`
		}{r.Line, r.Text, r.Value, r.Unit, r.SI, r.Dimension, r.Plane, r.Uncertainty, r.Low, r.High, r.Coverage, r.Trials, r.Skewness, warnings})
	case CheckRecord:
		return plainJSON(struct {
			Line     int      `json:"line"`
			Text     string   `json:"text"`
			Holds    bool     `json:"holds"`
			Warnings []string `json:"warnings"`
		}{r.Line, r.Text, r.Holds, warnings})
	case TableRecord:
		return plainJSON(struct {
			Line     int      `json:"line"`
			Text     string   `json:"text"`
			Columns  []Column `json:"columns"`
			Rows     [][]Cell `json:"rows"`
			Warnings []string `json:"warnings"`
		}{r.Line, r.Text, r.Columns, r.Rows, warnings})
	case ErrorRecord:
		return plainJSON(struct {
			Line   int    `json:"line"`
			Error  string `json:"error"`
			Column int    `json:"column"`
		}{r.Line, r.Error, r.Column})
	}
	return plainJSON(struct {
		Line     int      `json:"line"`
		Text     string   `json:"text"`
		Warnings []string `json:"warnings"`
	}{r.Line, r.Text, warnings})
}

// plainJSON leaves <, > and & as they are.
func plainJSON(v any) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	err := e.Encode(v)
	return bytes.TrimSpace(b.Bytes()), err
}
