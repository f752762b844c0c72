package page

import (
	"bytes"
	"context"
	"embed"
	"html/template"
	"io"
	"sync"

	"example.com/dosewright/repl"
	"example.com/dosewright/repl/chart"
)

//go:embed page.html page.css
var files embed.FS

// layout is the page with its style.
var layout = sync.OnceValue(func() *template.Template {
	together := template.FuncMap{"on": func(line int, t *table) placed { return placed{line, t} }}
	return template.Must(template.New("").Funcs(together).ParseFS(files, "page.html", "page.css"))
})

// placed is a table with the line that it answers.
type placed struct {
	Line  int
	Table *table
}

// Write runs the session file of that name in a new session made from config,
// as [repl.Replay] does, and writes the page of it. Files named in the session
// are read through config.Files and none is written; pictures are drawn by
// package chart. A statement that is refused is shown with its refusal. The
// error says that the file cannot be used, or that w took no more; the page
// comes whole, in one call of w.Write.
func Write(ctx context.Context, config repl.Config, name string, w io.Writer) error {
	if config.Draw == nil {
		config.Draw = chart.Draw
	}
	played, err := repl.Play(ctx, config, name)
	if err != nil {
		return err
	}
	var b bytes.Buffer
	if err := layout().ExecuteTemplate(&b, "page.html", sheetOf(played, name, config.Version)); err != nil {
		return err
	}
	_, err = w.Write(b.Bytes())
	return err
}
