package main

import (
	"context"
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"example.com/dosewright/repl"
)

// replay runs session files again and compares their replies.
func replay(ctx context.Context, args []string, std stdio) int {
	asJSON, update, stepped, outside := false, false, false, false
	for len(args) > 0 && strings.HasPrefix(args[0], "-") {
		switch args[0] {
		case "--json":
			asJSON = true
		case "--update":
			update = true
		case "--step":
			stepped = true
		case "--outside":
			outside = true
		default:
			return std.wrong(args[0] + " is no option of replay; they are --json, --step, --update and --outside")
		}
		args = args[1:]
	}
	if len(args) == 0 {
		return std.wrong("replay needs a session file: dosewright replay daily.budget")
	}
	for _, name := range args {
		if strings.HasPrefix(name, "--") {
			return std.wrong("options stand before the files: dosewright replay " + name + " " + args[0])
		}
	}
	status := statusFine
	for _, name := range args {
		c, base, err := configFor(name, outside)
		if err != nil {
			return std.wrong(err.Error())
		}
		if stepped {
			status = max(status, step(ctx, c, base, std))
			continue
		}
		status = max(status, replayOne(ctx, c, name, base, asJSON, update, std))
	}
	return status
}

func replayOne(ctx context.Context, c repl.Config, name, base string, asJSON, update bool, std stdio) int {
	r, err := repl.Replay(ctx, c, base)
	if err != nil {
		return std.wrong(err.Error())
	}
	if asJSON {
		writeReplay(r, std)
	} else {
		for _, l := range r.Lines() {
			fmt.Fprintln(std.out, l.Text)
		}
	}
	if update {
		status := rewrite(name, r, asJSON, std)
		if len(r.Failed) > 0 {
			status = max(status, statusMoved)
		}
		return status
	}
	switch {
	case len(r.Refused) > 0:
		return statusRefused
	case r.Moved():
		return statusMoved
	}
	return statusFine
}

// rewrite puts the replies of this run in the place of the recorded ones.
func rewrite(name string, r *repl.Replayed, asJSON bool, std stdio) int {
	dir, base := filepath.Split(name)
	root, err := os.OpenRoot(filepath.Clean(dir))
	if err != nil {
		return std.wrong(err.Error())
	}
	defer root.Close()
	if err := writeWhole(root, base, r.Updated); err != nil {
		return std.wrong(err.Error())
	}
	if !asJSON {
		fmt.Fprintf(std.out, "%s: the replies of this run are recorded\n", base)
	}
	return statusFine
}

// writeReplay writes every reply, then every drift, one object a line.
func writeReplay(r *repl.Replayed, std stdio) {
	for _, rec := range r.Records {
		writeJSON(rec, std)
	}
	for _, d := range r.Drifts {
		writeJSON(d, std)
	}
}
