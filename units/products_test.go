package units

import (
	"go/ast"
	"go/build"
	"go/importer"
	"go/parser"
	"go/token"
	"go/types"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

// pure are the typed quantities that are numbers: their products and quotients
// are of the same kind.
var pure = map[string]bool{"Ratio": true, "Count": true, "Angle": true, "SolidAngle": true}

// The product of two Lengths is a Length to the compiler, and so is their
// quotient. In our own packages no product or quotient of two typed quantities
// is formed, save directly inside a conversion to float64. A number may scale:
// a constant, or a number or ratio that is converted on the spot, as in
// power * Power(ratio).
func TestNoProductsOfTypedQuantities(t *testing.T) {
	fset := token.NewFileSet()
	from := importer.ForCompiler(fset, "source", nil)
	for _, dir := range []string{".", "../euv", "../repl"} {
		files := parseDir(t, fset, dir)
		info := &types.Info{Types: map[ast.Expr]types.TypeAndValue{}}
		config := types.Config{Importer: from, FakeImportC: true}
		if _, err := config.Check(dir, fset, files, info); err != nil {
			t.Fatal(err)
		}
		products := 0
		for _, file := range files {
			for _, p := range typedProducts(file, info) {
				t.Errorf("%s: a product or quotient of two typed quantities", fset.Position(p))
			}
			ast.Inspect(file, func(n ast.Node) bool {
				if x, ok := n.(*ast.BinaryExpr); ok && (x.Op == token.MUL || x.Op == token.QUO) {
					products++
				}
				return true
			})
		}
		t.Logf("%s: %d products and quotients looked at", dir, products)
	}
}

// parseDir parses the files of a package that are built here, tests excepted.
func parseDir(t *testing.T, fset *token.FileSet, dir string) []*ast.File {
	t.Helper()
	found, err := build.ImportDir(dir, 0)
	if err != nil {
		t.Fatal(err)
	}
	var files []*ast.File
	for _, name := range found.GoFiles {
		file, err := parser.ParseFile(fset, filepath.Join(dir, name), nil, 0)
		if err != nil {
			t.Fatal(err)
		}
		files = append(files, file)
	}
	return files
}

// typedProducts lists the places where a product or quotient of two quantities
// with a dimension is formed outside of a conversion to float64.
func typedProducts(file *ast.File, info *types.Info) []token.Pos {
	var found []token.Pos
	converted := map[ast.Expr]bool{} // what stands directly in float64(…)
	ast.Inspect(file, func(n ast.Node) bool {
		switch x := n.(type) {
		case *ast.CallExpr:
			if f := info.Types[x.Fun]; f.IsType() && len(x.Args) == 1 && types.Identical(f.Type, types.Typ[types.Float64]) {
				converted[ast.Unparen(x.Args[0])] = true
			}
		case *ast.BinaryExpr:
			if (x.Op == token.MUL || x.Op == token.QUO) && dimensioned(info, x.X) && dimensioned(info, x.Y) && !converted[x] {
				found = append(found, x.OpPos)
			}
		case *ast.AssignStmt:
			if (x.Tok == token.MUL_ASSIGN || x.Tok == token.QUO_ASSIGN) && dimensioned(info, x.Lhs[0]) && dimensioned(info, x.Rhs[0]) {
				found = append(found, x.TokPos)
			}
		}
		return true
	})
	return found
}

// dimensioned says whether an expression is a variable value of a typed
// quantity that is not a pure number, nor a number converted to it.
func dimensioned(info *types.Info, x ast.Expr) bool {
	v := info.Types[x]
	named, ok := types.Unalias(v.Type).(*types.Named)
	if !ok || v.Value != nil || named.Obj().Pkg() == nil {
		return false
	}
	path := named.Obj().Pkg().Path()
	ours := path == "." || strings.HasSuffix(path, "/units") || path == "github.com/martinlindhe/unit"
	basic, isBasic := named.Underlying().(*types.Basic)
	if !ours || !isBasic || basic.Kind() != types.Float64 || pure[named.Obj().Name()] {
		return false
	}
	if call, ok := ast.Unparen(x).(*ast.CallExpr); ok && info.Types[call.Fun].IsType() {
		return dimensioned(info, call.Args[0])
	}
	return true
}

// The check finds what it is there for.
func TestProductsAreFound(t *testing.T) {
	const source = `package p
import "github.com/martinlindhe/unit"
type Length = unit.Length
func area(a, b Length) (float64, Length) {
	const two Length = 2
	c := float64(a * b)      // converted at once
	c += float64(a) * float64(b)
	c += float64(unit.Angle(1) * unit.Angle(c))
	d := unit.Angle(c)
	d = d * d                // pure
	a = two * a              // a constant scales
	a *= Length(c)           // so does a number
	a = a / Length(d)        // and a ratio
	a *= Length(unit.Area(a)) // found
	e := a * b               // found
	e /= a                   // found
	return c, e + (a / (b))  // found
}`
	fset := token.NewFileSet()
	file, err := parser.ParseFile(fset, "p.go", source, 0)
	if err != nil {
		t.Fatal(err)
	}
	info := &types.Info{Types: map[ast.Expr]types.TypeAndValue{}}
	config := types.Config{Importer: importer.ForCompiler(fset, "source", nil)}
	if _, err := config.Check("p", fset, []*ast.File{file}, info); err != nil {
		t.Fatal(err)
	}
	var lines []int
	for _, p := range typedProducts(file, info) {
		lines = append(lines, fset.Position(p).Line)
	}
	if want := []int{14, 15, 16, 17}; !slices.Equal(lines, want) {
		t.Errorf("found in lines %v, want %v", lines, want)
	}
}
