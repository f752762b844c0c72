package dosewright_test

import (
	"go/ast"
	"go/parser"
	"go/token"
	"go/types"
	"io/fs"
	"maps"
	"path"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"sync"
	"testing"
)

const module = "example.com/dosewright"

// room is what one package may import.
type room struct {
	ours    []string // packages of this module
	outside []string // modules that others keep
}

// graph is the plan of the house: who may import whom. A new edge is a decision
// and begins here.
func graph() map[string]room {
	return map[string]room{
		"units":                 {outside: []string{"github.com/martinlindhe/unit"}},
		"internal/near":         {},
		"internal/num":          {outside: []string{"gonum.org/v1/gonum"}},
		"euv":                   {ours: []string{"units", "internal/num"}, outside: []string{"gonum.org/v1/gonum"}},
		"euv/tables/pack":       {},
		"repl/internal/syntax":  {},
		"repl/internal/program": {ours: []string{"repl/internal/syntax", "units"}, outside: []string{"gonum.org/v1/gonum"}},
		"repl/internal/study":   {ours: []string{"internal/num"}, outside: []string{"gonum.org/v1/gonum"}},
		"repl": {
			ours:    []string{"units", "euv", "internal/num", "repl/internal/syntax", "repl/internal/program", "repl/internal/study"},
			outside: []string{"gonum.org/v1/gonum"},
		},
		"repl/chart": {ours: []string{"repl"}, outside: []string{"gonum.org/v1/plot", "golang.org/x/image", "github.com/guptarohit/asciigraph"}},
		"repl/page":  {ours: []string{"repl", "repl/chart"}},
		"repl/terminal": {
			ours:    []string{"repl"},
			outside: []string{"github.com/chzyer/readline", "golang.org/x/term", "golang.org/x/sys"},
		},
		"cmd/dosewright": {
			ours:    []string{"repl", "repl/terminal", "repl/chart", "repl/page"},
			outside: []string{"golang.org/x/term"},
		},
		// A module of its own, which measures the public packages.
		"benchmarks": {ours: []string{"units", "euv", "repl"}, outside: []string{"github.com/expr-lang/expr"}},
	}
}

// public is what a host may build on, and so what the examples may use.
func public() room {
	return room{
		ours:    []string{"units", "euv", "repl", "repl/chart", "repl/page", "repl/terminal"},
		outside: []string{"github.com/martinlindhe/unit"},
	}
}

// A test may also import its own package, the tolerance helper, and what its
// package stands on.
func forTests(folder string, r room) room {
	r.ours = append(slices.Clone(r.ours), folder, "internal/near")
	return r
}

func TestImportGraph(t *testing.T) {
	plan := graph()
	for _, f := range house(t) {
		r, known := plan[f.folder()]
		switch {
		case f.folder() == ".":
			continue // the documents and the plan are tested from here
		case strings.HasPrefix(f.name, "examples/"):
			r = public()
		case !known:
			t.Errorf("%s: the folder is not in the plan of arch_test.go", f.name)
			continue
		}
		if f.test() {
			r = forTests(f.folder(), r)
		}
		for _, imp := range f.imports() {
			if !r.allows(imp) {
				t.Errorf("%s imports %s, an edge that the plan of arch_test.go does not have", f.name, imp)
			}
		}
	}
}

func (r room) allows(imp string) bool {
	if own, ok := strings.CutPrefix(imp, module+"/"); ok {
		return slices.Contains(r.ours, own)
	}
	if first, _, _ := strings.Cut(imp, "/"); !strings.Contains(first, ".") {
		return true // the standard library
	}
	return slices.ContainsFunc(r.outside, func(m string) bool {
		return imp == m || strings.HasPrefix(imp, m+"/")
	})
}

// The plan itself must catch what it forbids.
func TestPlanForbids(t *testing.T) {
	plan := graph()
	for _, c := range []struct{ from, imp string }{
		{"units", module + "/euv"},
		{"euv", module + "/repl"},
		{"euv", module + "/repl/internal/program"},
		{"repl", "github.com/chzyer/readline"},
		{"repl", "gonum.org/v1/plot"},
		{"repl", module + "/internal/near"},
		{"repl/internal/study", module + "/units"},
		{"repl/internal/syntax", module + "/units"},
		{"repl/terminal", module + "/repl/chart"},
		{"internal/num", "gonum.org/v1/gonumberless"},
	} {
		if plan[c.from].allows(c.imp) {
			t.Errorf("the plan lets %s import %s", c.from, c.imp)
		}
	}
}

const mostLines = 350

func TestFileSize(t *testing.T) {
	for _, f := range house(t) {
		if n := f.set.File(f.tree.Pos()).LineCount(); n > mostLines && !f.test() {
			t.Errorf("%s has %d lines, at most %d: make two files of two ideas", f.name, n, mostLines)
		}
	}
}

func TestNoInit(t *testing.T) {
	for _, f := range house(t) {
		for _, d := range f.tree.Decls {
			if fn, ok := d.(*ast.FuncDecl); ok && fn.Recv == nil && fn.Name.Name == "init" {
				t.Errorf("%s: an init function", f.at(fn))
			}
		}
	}
}

// surroundings are what only a command may touch, and the files that have a
// reason of their own.
func surroundings() (names map[string][]string, reasons map[string]string) {
	return map[string][]string{
		"os":   {"Stdin", "Stdout", "Stderr", "Args", "Exit"},
		"time": {"Now", "Since", "Until"},
	}, map[string]string{
		"repl/terminal/progress.go": "a progress line is drawn ten times a second at most; no answer depends on it",
	}
}

func TestOnlyCommandsTouchTheSurroundings(t *testing.T) {
	names, reasons := surroundings()
	for _, f := range house(t) {
		if f.test() || f.tree.Name.Name == "main" || reasons[f.name] != "" {
			continue
		}
		ast.Inspect(f.tree, func(n ast.Node) bool {
			s, ok := n.(*ast.SelectorExpr)
			if !ok {
				return true
			}
			if x, ok := s.X.(*ast.Ident); ok && slices.Contains(names[x.Name], s.Sel.Name) {
				t.Errorf("%s: %s.%s belongs to a command", f.at(s), x.Name, s.Sel.Name)
			}
			return true
		})
	}
}

// Package variables are tables: no function changes them.
func TestPackageVariablesStay(t *testing.T) {
	for folder, files := range packages(t) {
		for _, place := range changed(folder, files) {
			t.Errorf("%s: a package variable is changed", place)
		}
	}
}

func TestPackageVariablesTestSees(t *testing.T) {
	const text = `package p
var table = map[string]int{"a": 1}
var list = []int{1}
var n int
func f() { table["b"] = 2; list[0]++; n = 3; delete(table, "a"); for n = range list {}; p := &n; _ = p }
func g() { table := map[string]int{}; table["b"] = 2; var list []int; list = append(list, 1); _ = list; n := 1; n++; _ = n }
`
	set := token.NewFileSet()
	tree, err := parser.ParseFile(set, "p.go", text, 0)
	if err != nil {
		t.Fatal(err)
	}
	got := changed("p", []*source{{"p.go", set, tree}})
	if len(got) != 6 || slices.ContainsFunc(got, func(s string) bool { return !strings.HasPrefix(s, "p.go:5") }) {
		t.Errorf("got %q, want six places in line 5 and none in line 6", got)
	}
}

// changed lists where functions assign to package variables, change what they
// hold, or take their address. Imports stay unresolved, since only names of
// the package itself matter.
func changed(folder string, files []*source) []string {
	info := &types.Info{Uses: map[*ast.Ident]types.Object{}}
	config := types.Config{Importer: nothing{}, Error: func(error) {}, FakeImportC: true}
	trees := make([]*ast.File, len(files))
	for i, f := range files {
		trees[i] = f.tree
	}
	own, _ := config.Check(folder, files[0].set, trees, info) // errors are those of the empty imports
	var places []string
	for _, f := range files {
		look := func(x ast.Expr) {
			if id := root(x); id != nil {
				if v, ok := info.Uses[id].(*types.Var); ok && v.Parent() == own.Scope() {
					places = append(places, f.at(x))
				}
			}
		}
		ast.Inspect(f.tree, func(n ast.Node) bool {
			switch n := n.(type) {
			case *ast.AssignStmt:
				for _, x := range n.Lhs {
					look(x)
				}
			case *ast.IncDecStmt:
				look(n.X)
			case *ast.RangeStmt:
				look(n.Key)
				look(n.Value)
			case *ast.UnaryExpr:
				if n.Op == token.AND {
					look(n.X)
				}
			case *ast.CallExpr:
				if id, ok := n.Fun.(*ast.Ident); ok && len(n.Args) > 0 && slices.Contains([]string{"delete", "clear", "copy"}, id.Name) {
					look(n.Args[0])
				}
			}
			return true
		})
	}
	return places
}

// root is the name at the bottom of an operand such as a[i].b.
func root(x ast.Expr) *ast.Ident {
	for {
		switch y := x.(type) {
		case *ast.Ident:
			return y
		case *ast.IndexExpr:
			x = y.X
		case *ast.SelectorExpr:
			x = y.X
		case *ast.StarExpr:
			x = y.X
		case *ast.ParenExpr:
			x = y.X
		case *ast.SliceExpr:
			x = y.X
		default:
			return nil
		}
	}
}

// nothing imports every package as an empty one.
type nothing struct{}

func (nothing) Import(name string) (*types.Package, error) {
	p := types.NewPackage(name, path.Base(name))
	p.MarkComplete()
	return p, nil
}

func TestExportedSymbolsAreDocumented(t *testing.T) {
	for folder, files := range packages(t) {
		if !slices.ContainsFunc(files, func(f *source) bool { return f.tree.Doc.Text() != "" }) {
			t.Errorf("%s: the package has no comment", folder)
		}
		for _, f := range files {
			for _, bare := range undocumented(f.tree) {
				t.Errorf("%s: %s has no doc comment", f.at(bare), bare.Name)
			}
		}
	}
}

func TestDocumentationTestSees(t *testing.T) {
	const text = `package p
type A struct{}
func (A) B() {}
func (*a) C() {}
func (A) Unwrap() error { return nil }
func D() {}
const E = 1
// Group.
const (
	F = 1
)
// G is documented.
func G() {}
type a struct{}
`
	tree, err := parser.ParseFile(token.NewFileSet(), "p.go", text, parser.ParseComments)
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for _, id := range undocumented(tree) {
		got = append(got, id.Name)
	}
	if want := []string{"A", "B", "D", "E"}; !slices.Equal(got, want) {
		t.Errorf("got %q, want %q", got, want)
	}
}

// undocumented lists the exported names without a comment, of their own or of
// their group. Methods of types that nobody outside can name do not count, nor
// do Error and Unwrap, whose meaning the package errors gives.
func undocumented(tree *ast.File) []*ast.Ident {
	var list []*ast.Ident
	check := func(id *ast.Ident, docs ...*ast.CommentGroup) {
		if id.IsExported() && !slices.ContainsFunc(docs, func(c *ast.CommentGroup) bool { return c.Text() != "" }) {
			list = append(list, id)
		}
	}
	for _, d := range tree.Decls {
		switch d := d.(type) {
		case *ast.FuncDecl:
			ofErrors := d.Name.Name == "Error" || d.Name.Name == "Unwrap"
			if d.Recv == nil || receiver(d).IsExported() && !ofErrors {
				check(d.Name, d.Doc)
			}
		case *ast.GenDecl:
			for _, s := range d.Specs {
				switch s := s.(type) {
				case *ast.TypeSpec:
					check(s.Name, d.Doc, s.Doc, s.Comment)
				case *ast.ValueSpec:
					for _, id := range s.Names {
						check(id, d.Doc, s.Doc, s.Comment)
					}
				}
			}
		}
	}
	return list
}

func receiver(d *ast.FuncDecl) *ast.Ident {
	if id := root(d.Recv.List[0].Type); id != nil {
		return id
	}
	return ast.NewIdent("_")
}

// source is one Go file of the module, its name with slashes from the root.
type source struct {
	name string
	set  *token.FileSet
	tree *ast.File
}

func (f *source) folder() string { return path.Dir(f.name) }

func (f *source) test() bool { return strings.HasSuffix(f.name, "_test.go") }

func (f *source) at(n ast.Node) string {
	return f.name + ":" + strconv.Itoa(f.set.Position(n.Pos()).Line)
}

func (f *source) imports() []string {
	var list []string
	for _, s := range f.tree.Imports {
		if name, err := strconv.Unquote(s.Path.Value); err == nil {
			list = append(list, name)
		}
	}
	return list
}

// house reads every Go file of the module. Folders that Go passes over are
// passed over; modules inside this one are read, since they are ours too.
func house(t *testing.T) []*source {
	t.Helper()
	files, err := readHouse()
	if err != nil {
		t.Fatal(err)
	}
	if len(files) < 50 {
		t.Fatalf("only %d Go files found: this test runs in the module's root", len(files))
	}
	return files
}

var readHouse = sync.OnceValues(func() ([]*source, error) {
	set := token.NewFileSet()
	var files []*source
	err := filepath.WalkDir(".", func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		base := d.Name()
		switch {
		case d.IsDir() && name != "." && (base == "testdata" || strings.HasPrefix(base, ".") || strings.HasPrefix(base, "_")):
			return fs.SkipDir
		case d.IsDir() || !strings.HasSuffix(base, ".go"):
			return nil
		}
		tree, err := parser.ParseFile(set, name, nil, parser.ParseComments|parser.SkipObjectResolution)
		files = append(files, &source{filepath.ToSlash(name), set, tree})
		return err
	})
	return files, err
})

// packages has the files of each package that are no tests, by folder.
func packages(t *testing.T) map[string][]*source {
	t.Helper()
	list := map[string][]*source{}
	for _, f := range house(t) {
		if !f.test() {
			list[f.folder()] = append(list[f.folder()], f)
		}
	}
	if len(list) < 8 || !slices.Contains(slices.Collect(maps.Keys(list)), "units") {
		t.Fatalf("only %d packages found: this test runs in the module's root", len(list))
	}
	return list
}
