package main

import (
	"context"
	"errors"
	"io/fs"
	"os"
	"path/filepath"

	"example.com/dosewright/repl"
	"example.com/dosewright/repl/chart"
)

// folder is a session whose files lie in one folder and below.
type folder struct {
	*repl.Session
	dir string
}

// config is what a session in a folder starts from: it reads below the folder
// and writes there, whole or not at all. Links that lead outside are refused.
func config(dir string) (repl.Config, error) {
	root, err := os.OpenRoot(dir)
	if err != nil {
		return repl.Config{}, errors.New(dir + " cannot be opened: " + reason(err))
	}
	return repl.Config{
		Files:   root.FS(),
		Create:  func(name string) (repl.File, error) { return createBeside(root, name) },
		Draw:    chart.Draw,
		Sketch:  chart.Sketch,
		Version: version(),
	}, nil
}

// configFor is the configuration for a session file, and its name in there.
// With outside, imports may lead out of the file's folder.
func configFor(name string, outside bool) (repl.Config, string, error) {
	dir, base := filepath.Split(name)
	if !outside {
		c, err := config(filepath.Clean(dir))
		return c, base, err
	}
	full, err := filepath.Abs(name)
	if err != nil {
		return repl.Config{}, "", err
	}
	c, err := config(filepath.Clean(dir))
	top := filepath.VolumeName(full) + string(filepath.Separator)
	c.Files = os.DirFS(top)
	inside, e := filepath.Rel(top, full)
	if err == nil {
		err = e
	}
	return c, filepath.ToSlash(inside), err
}

func newSession(dir string) (*folder, error) {
	c, err := config(dir)
	if err != nil {
		return nil, err
	}
	return &folder{repl.NewSession(c), dir}, nil
}

// bring imports a file named on the command line.
func (f *folder) bring(ctx context.Context, name string) error {
	path, err := filepath.Rel(f.dir, name)
	if err != nil {
		return err
	}
	r := f.Feed(ctx, "import \""+filepath.ToSlash(path)+"\"")
	return r.Err
}

// reason is what an error of the file system says, without the path.
func reason(err error) string {
	var at *fs.PathError
	if errors.As(err, &at) {
		return at.Err.Error()
	}
	return err.Error()
}
