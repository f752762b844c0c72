package main

import (
	"bytes"
	"context"
	"errors"
	"os"
	"path/filepath"
	"strings"

	"example.com/dosewright/repl/page"
)

// makePage writes a session file as one HTML page.
func makePage(ctx context.Context, args []string, std stdio) int {
	const call = "dosewright page daily.budget -o daily.html"
	var name, to string
	for i := 0; i < len(args); i++ {
		switch a := args[i]; {
		case a == "-o" && i+1 == len(args):
			return std.wrong("behind -o stands the name of the page: " + call)
		case a == "-o" && to != "":
			return std.wrong("page writes one file, and -o stands twice: " + call)
		case a == "-o":
			i++
			to = args[i]
		case strings.HasPrefix(a, "-"):
			return std.wrong(a + " is no option of page; it has -o FILE.html")
		case name != "":
			return std.wrong("page takes one session file: " + call)
		default:
			name = a
		}
	}
	switch ending := strings.ToLower(filepath.Ext(to)); {
	case name == "":
		return std.wrong("page needs a session file: " + call)
	case to == "":
		return std.wrong("page needs a name to write to: " + call)
	case ending != ".html" && ending != ".htm":
		return std.wrong(to + " is no name of a page: end it in .html")
	}
	if err := pageTo(ctx, name, to); err != nil {
		return std.wrong(err.Error())
	}
	return statusFine
}

// pageTo writes the page whole or not at all.
func pageTo(ctx context.Context, name, to string) error {
	c, base, err := configFor(name, false)
	if err != nil {
		return err
	}
	var b bytes.Buffer
	if err := page.Write(ctx, c, base, &b); err != nil {
		return err
	}
	dir, file := filepath.Split(to)
	root, err := os.OpenRoot(filepath.Clean(dir))
	if err != nil {
		return errors.New(dir + " cannot be opened: " + reason(err))
	}
	defer root.Close()
	return writeWhole(root, file, b.Bytes())
}
