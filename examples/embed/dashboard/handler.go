package main

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"net/http"
	"time"

	"example.com/dosewright/repl"
)

const (
	atOnce   = 8               // questions that run at the same time
	patience = 2 * time.Second // for one question
	longest  = 500             // bytes of a question
)

// answerer computes what a request asks for.
type answerer func(ctx context.Context, r *http.Request) (any, error)

// handler is the dashboard over HTTP.
func (b *board) handler() http.Handler {
	mux := http.NewServeMux()
	for path, answer := range map[string]answerer{"/tiles": b.tiles, "/eval": b.eval, "/what-if": b.whatIfDose, "/why": b.why} {
		mux.Handle("GET "+path, b.bounded(answer))
	}
	return http.MaxBytesHandler(mux, 1<<10)
}

// bounded gives an answer a place and a time, and writes it as JSON.
func (b *board) bounded(answer answerer) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		if len(r.URL.RawQuery) > 3*longest {
			write(w, http.StatusRequestURITooLong, problem{Error: "this question is too long"})
			return
		}
		select {
		case b.slots <- struct{}{}:
			defer func() { <-b.slots }()
		default:
			w.Header().Set("Retry-After", "1")
			write(w, http.StatusServiceUnavailable, problem{Error: "too many questions at once"})
			return
		}
		ctx, stop := context.WithTimeout(r.Context(), patience)
		defer stop()
		v, err := answer(ctx, r)
		if err != nil {
			status, what := said(err)
			write(w, status, what)
			return
		}
		write(w, http.StatusOK, v)
	})
}

// problem is why there is no answer.
type problem struct {
	Error  string `json:"error"`
	Column int    `json:"column,omitempty"` // in the question, from 1
}

// said turns an error into a status and what the client may know of it.
func said(err error) (int, problem) {
	var bad *repl.Refusal
	var over *repl.LimitError
	switch {
	case errors.Is(err, context.DeadlineExceeded):
		return http.StatusServiceUnavailable, problem{Error: "this takes too long"}
	case errors.As(err, &over):
		return http.StatusRequestEntityTooLarge, problem{Error: err.Error()}
	case errors.As(err, &bad):
		return http.StatusUnprocessableEntity, problem{bad.Error(), bad.Column()}
	}
	return http.StatusInternalServerError, problem{Error: "something went wrong"}
}

func write(w http.ResponseWriter, status int, v any) {
	w.Header().Set("Content-Type", "application/json")
	w.Header().Set("X-Content-Type-Options", "nosniff")
	w.WriteHeader(status)
	_ = json.NewEncoder(w).Encode(v) // a client that has gone needs no answer
}

// shown is a value with the title of its tile.
type shown struct {
	Title string      `json:"title"`
	Value repl.Record `json:"value"`
}

func (b *board) tiles(ctx context.Context, _ *http.Request) (any, error) {
	var list []shown
	for _, t := range tiles() {
		v, err := b.frozen.Eval(ctx, t.formula)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", t.title, err)
		}
		list = append(list, shown{t.title, repl.RecordOf(v, repl.DefaultDigits)})
	}
	return list, nil
}

func (b *board) eval(ctx context.Context, r *http.Request) (any, error) {
	v, err := b.frozen.Eval(ctx, r.FormValue("q"))
	if err != nil {
		return nil, err
	}
	return repl.RecordOf(v, repl.DefaultDigits), nil
}

// whatIfDose is the throughput at another dose, through the compiled formula.
func (b *board) whatIfDose(ctx context.Context, r *http.Request) (any, error) {
	dose, err := b.frozen.Eval(ctx, r.FormValue("dose"))
	if err != nil {
		return nil, err
	}
	v, err := b.whatIf.Value(dose.Quantity())
	if err != nil {
		return nil, err
	}
	return repl.RecordOf(v, repl.DefaultDigits), nil
}

// reason is an explanation as plain values.
type reason struct {
	Name    string   `json:"name"`
	Formula string   `json:"formula"`
	Value   string   `json:"value"`
	Note    string   `json:"note"`
	File    string   `json:"file"`
	Line    int      `json:"line"`
	Folded  bool     `json:"folded"`
	Below   []reason `json:"below"`
}

func (b *board) why(ctx context.Context, r *http.Request) (any, error) {
	e, err := b.frozen.Explain(ctx, r.FormValue("name"))
	if err != nil {
		return nil, err
	}
	return plain(e), nil
}

func plain(e *repl.Explanation) reason {
	r := reason{Name: e.Name, Formula: e.Formula, Note: e.Note, File: e.File, Line: e.Line, Folded: e.Folded, Below: []reason{}}
	if e.Value != nil {
		r.Value = e.Value.Text(repl.DefaultDigits)
	}
	for _, c := range e.Children {
		r.Below = append(r.Below, plain(c))
	}
	return r
}
