package main

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"path/filepath"
	"strings"

	"example.com/dosewright/repl"
)

// eval answers the statements of its arguments, in order.
func eval(ctx context.Context, args []string, std stdio) int {
	asJSON, imports := false, []string(nil)
	for len(args) > 0 && strings.HasPrefix(args[0], "--") {
		switch {
		case args[0] == "--json":
			asJSON = true
		case args[0] == "--import" && len(args) > 1:
			imports = append(imports, args[1])
			args = args[1:]
		case strings.HasPrefix(args[0], "--import="):
			imports = append(imports, strings.TrimPrefix(args[0], "--import="))
		default:
			return std.wrong(args[0] + " is no option of eval; they are --json and --import FILE")
		}
		args = args[1:]
	}
	if len(args) == 0 {
		return std.wrong("eval needs a statement: dosewright eval 'photon_energy(13.5 nm)'")
	}
	dir := "."
	if len(imports) > 0 {
		dir = filepath.Dir(imports[0])
	}
	s, err := newSession(dir)
	if err != nil {
		return std.wrong(err.Error())
	}
	for _, name := range imports {
		if err := s.bring(ctx, name); err != nil {
			return std.wrong(err.Error())
		}
	}
	return evalAll(ctx, s.Session, args, asJSON, std)
}

// evalAll feeds the lines of the arguments and prints the replies. The first
// refusal ends it.
func evalAll(ctx context.Context, s *repl.Session, args []string, asJSON bool, std stdio) int {
	status, number := statusFine, 0
	for _, arg := range args {
		for _, line := range strings.Split(arg, "\n") {
			number++
			r := s.Feed(ctx, line)
			print(r, number, asJSON, std)
			if r.Err != nil {
				return statusRefused
			}
			if r.Failed {
				status = statusMoved
			}
			if r.Quit {
				return status
			}
		}
	}
	if s.InBlock() {
		const why = "a block has no end: its last line is the word end"
		if asJSON {
			writeJSON(repl.Record{Kind: repl.ErrorRecord, Line: number, Error: why, Column: 1}, std)
		}
		return std.wrong(why)
	}
	return status
}

func print(r *repl.Reply, number int, asJSON bool, std stdio) {
	if !asJSON {
		for _, l := range r.Lines() {
			fmt.Fprintln(std.out, l.Text)
		}
		return
	}
	for _, rec := range r.Records() {
		rec.Line = number
		writeJSON(rec, std)
	}
}

// writeJSON writes one object on one line, with < > and & as they are.
func writeJSON(v any, std stdio) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		fmt.Fprintf(std.problems, "dosewright: %v\n", err)
		return
	}
	std.out.Write(b.Bytes())
}
