package main

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"path/filepath"
	"strings"
	"testing"
)

// layers are the packages of the module in the direction data flows; a package
// may import packages above its own line only.
var layers = []string{
	"profile",
	"profile/internal/bisect",
	"profile/gauge",
	"profile/body",
	"profile/fit",
	"profile/mesh",
	"profile/label",
	"export",
	"export/fixed",
	"export/sheet",
	"export/dxf", "export/svg", "export/sidecar", "export/files",
	"cmd/flankwright/internal/table",
	"cmd/flankwright",
}

// outside says which packages alone may import a library.
var outside = map[string][]string{
	"github.com/yofu/dxf":      {"export/dxf"},
	"github.com/ajstarks/svgo": {"export/svg"},
	"github.com/spf13/pflag":   {"cmd/flankwright"},
	"github.com/spf13/cobra":   {"cmd/flankwright"},
	"github.com/goccy/go-json": {"export/sidecar"},
}

// TestDependenciesPointOneWay reads every source file's imports.
func TestDependenciesPointOneWay(t *testing.T) {
	rank := map[string]int{}
	for i, l := range layers {
		rank[l] = i
	}
	eachSource(t, func(pkg, path string, file *ast.File) {
		own, known := rank[pkg]
		if !known {
			if strings.HasSuffix(pkg, "test") || strings.Contains(pkg, "internal") {
				return // helpers of tests
			}
			t.Errorf("%s: package %s has no place in the layers", path, pkg)
			return
		}
		for _, spec := range file.Imports {
			name := strings.Trim(spec.Path.Value, `"`)
			if local, ok := strings.CutPrefix(name, "flankwright/"); ok {
				if r, known := rank[local]; !known || r >= own {
					t.Errorf("%s imports %s, which is not above it", path, name)
				}
			}
			for library, allowed := range outside {
				if !strings.HasPrefix(name, library) {
					continue
				}
				ok := false
				for _, a := range allowed {
					ok = ok || a == pkg
				}
				if !ok {
					t.Errorf("%s imports %s; only %v may", path, name, allowed)
				}
			}
		}
	})
}

// TestLibrariesKeepNoState forbids package variables below cmd, but for embedded
// files, and printing or exiting.
func TestLibrariesKeepNoState(t *testing.T) {
	eachSource(t, func(pkg, path string, file *ast.File) {
		if strings.HasPrefix(pkg, "cmd/") || strings.HasSuffix(pkg, "test") {
			return
		}
		for _, d := range file.Decls {
			g, ok := d.(*ast.GenDecl)
			if !ok || g.Tok != token.VAR {
				continue
			}
			embedded := g.Doc != nil && strings.Contains(g.Doc.List[len(g.Doc.List)-1].Text, "go:embed")
			interfaceCheck := true
			for _, s := range g.Specs {
				for _, n := range s.(*ast.ValueSpec).Names {
					interfaceCheck = interfaceCheck && n.Name == "_"
				}
			}
			if !embedded && !interfaceCheck {
				t.Errorf("%s: package variable %s", path, g.Specs[0].(*ast.ValueSpec).Names[0].Name)
			}
		}
		for _, spec := range file.Imports {
			if name := spec.Path.Value; name == `"log"` || name == `"flag"` {
				t.Errorf("%s imports %s", path, name)
			}
		}
		ast.Inspect(file, func(n ast.Node) bool {
			sel, ok := n.(*ast.SelectorExpr)
			if !ok {
				return true
			}
			if x, ok := sel.X.(*ast.Ident); ok {
				switch x.Name + "." + sel.Sel.Name {
				case "os.Exit", "fmt.Print", "fmt.Println", "fmt.Printf", "os.Stdout", "os.Stderr", "os.Getenv",
					// values the DXF library shares between drawings and writes to
					"table.LY_0", "table.LT_CONTINUOUS", "table.LT_BYLAYER", "table.LT_BYBLOCK", "table.ST_STANDARD", "table.New", "block.New":
					t.Errorf("%s uses %s.%s", path, x.Name, sel.Sel.Name)
				}
			}
			return true
		})
	})
}

// eachSource parses every Go file of the module that is not a test.
func eachSource(t *testing.T, visit func(pkg, path string, file *ast.File)) {
	t.Helper()
	root := filepath.Join("..", "..")
	seen := 0
	err := filepath.WalkDir(root, func(path string, d fs.DirEntry, err error) error {
		if err != nil || d.IsDir() || !strings.HasSuffix(path, ".go") || strings.HasSuffix(path, "_test.go") {
			return err
		}
		file, err := parser.ParseFile(token.NewFileSet(), path, nil, parser.ParseComments)
		if err != nil {
			return err
		}
		rel, err := filepath.Rel(root, filepath.Dir(path))
		if err != nil {
			return err
		}
		seen++
		visit(filepath.ToSlash(rel), path, file)
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	const atLeast = 20 // so that a wrong root cannot pass
	if seen < atLeast {
		t.Fatalf("only %d source files found below %s", seen, root)
	}
}
