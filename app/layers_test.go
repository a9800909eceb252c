package app_test

import (
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"maps"
	"os"
	"path"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// module is the path of this module; root is its folder, seen from here.
const (
	module = "enfilade"
	root   = ".."
)

// layers says for each package which of our packages it may import: a path, or a folder for all that is in it. What stands
// here is the design; a change of it is a design decision and belongs in a commit of its own.
var layers = map[string][]string{
	"solver/exact":    {},
	"solver/plan":     {"solver/exact"},
	"solver/pulse":    {},
	"solver/mesh":     {"solver/exact", "solver/pulse"},
	"solver/arrange":  {"solver/exact", "solver/plan", "solver/mesh", "solver/pulse"},
	"solver/sight":    {"solver/exact", "solver/mesh"},
	"solver/walk":     {"solver/exact", "solver/mesh", "solver/sight", "solver/pulse"},
	"solver/study":    {"solver/exact", "solver/plan", "solver/mesh", "solver/arrange", "solver/sight", "solver/walk", "solver/pulse"},
	"solver/plantest": {"solver/exact", "solver/plan", "solver/mesh", "solver/arrange"},

	"solver/plantest/cgal": {"solver"}, // it compares every layer of the solver with CGAL

	"assets": {"testdata/plans"}, // which embeds the sample plans from their folder, and nothing else

	"canvas/view":   {"solver/exact"},
	"canvas/pick":   {"solver/exact", "solver/plan", "canvas/view"},
	"canvas/tool":   {"solver/exact", "solver/plan", "canvas/view", "canvas/pick"},
	"canvas/paint":  {"solver/exact", "solver/plan", "solver/arrange", "solver/study", "canvas/view", "assets"},
	"canvas/raster": {"solver/plan", "solver/study", "canvas/view", "canvas/paint", "assets"},

	"canvas/raster/golden": {}, // kept pictures, for tests

	"fileio/planfile": {"solver/exact", "solver/plan"},
	"fileio/report":   {"solver/exact", "solver/plan", "solver/study"},
	"fileio/store":    {},

	"app/session":  {"solver/exact", "solver/plan"},
	"app/live":     {"solver"},
	"app/verbs":    {"solver", "canvas", "fileio", "assets", "app/session", "app/live"},
	"app/gui":      {"solver", "canvas", "fileio", "assets", "app/session", "app/live", "app/verbs"},
	"app/enfilade": {"solver", "canvas", "fileio", "assets", "app"},
}

// testsMayUse is what the tests of any package may import besides what the package may: the text notation for plans and the
// slow answers, with what they are made of, and kept pictures.
var testsMayUse = append([]string{"solver/plantest", "canvas/raster/golden"}, layers["solver/plantest"]...)

// outside says which packages of other modules each folder may import, by prefix; a package has the sum of what stands for
// it and for the folders above. The standard library is free, but for cgo, which no code of ours uses.
var outside = map[string][]string{
	"assets":          {"golang.org/x/image"},
	"solver/study":    {"github.com/paulmach/orb"},
	"solver/plantest": {"pgregory.net/rapid"},
	"canvas":          {"github.com/paulmach/orb"},
	"canvas/raster":   {"github.com/fogleman/gg", "github.com/golang/freetype", "golang.org/x/image"},
	"fileio":          {"github.com/paulmach/orb"},
	"app":             {"github.com/paulmach/orb"},
	"app/verbs":       {"github.com/alecthomas/kong", "github.com/schollz/progressbar/v3", "golang.org/x/term"},
	"app/gui":         {"fyne.io/fyne/v2", "golang.org/x/image"},
	"app/enfilade":    {"fyne.io/fyne/v2", "github.com/go-gl/glfw/v3.4/glfw", "github.com/jezek/xgb"}, // the last in a test of the real window
}

// outsideInTests is what any test may import from other modules.
var outsideInTests = []string{"pgregory.net/rapid", "github.com/rogpeppe/go-internal", "github.com/paulmach/orb"}

// source is one parsed Go file of ours.
type source struct {
	name string // slashed path from the top of the repository
	pkg  string // its folder
	test bool
	file *ast.File
	fset *token.FileSet
}

// sources parses every Go file of the repository, whatever its build tags.
func sources(t *testing.T) []source {
	t.Helper()
	var all []source
	err := filepath.WalkDir(root, func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		base := d.Name()
		if d.IsDir() && name != root && (base == "testdata" || base == "bin" || base == "out" || strings.HasPrefix(base, ".")) {
			return fs.SkipDir
		}
		if d.IsDir() || !strings.HasSuffix(base, ".go") {
			return nil
		}
		rel, err := filepath.Rel(root, name)
		if err != nil {
			return err
		}
		rel = filepath.ToSlash(rel)
		fset := token.NewFileSet()
		file, err := parser.ParseFile(fset, name, nil, parser.ParseComments)
		if err != nil {
			return err
		}
		all = append(all, source{rel, path.Dir(rel), strings.HasSuffix(rel, "_test.go"), file, fset})
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	if len(all) < 50 {
		t.Fatalf("only %d Go files found: this test looks in the wrong place", len(all))
	}
	return all
}

// under reports whether a path is one of some paths or lies below one.
func under(p string, heads []string) bool {
	return slices.ContainsFunc(heads, func(h string) bool { return p == h || strings.HasPrefix(p, h+"/") })
}

// allowed reports whether a file may import the package of that path.
func allowed(s source, imported string) bool {
	if imported == "C" {
		return false
	}
	if own, ok := strings.CutPrefix(imported, module+"/"); ok {
		return under(own, layers[s.pkg]) || s.test && (own == s.pkg || under(own, testsMayUse))
	}
	first, _, _ := strings.Cut(imported, "/")
	if !strings.Contains(first, ".") {
		return true // the standard library
	}
	for folder, heads := range outside {
		if under(s.pkg, []string{folder}) && under(imported, heads) {
			return true
		}
	}
	return s.test && under(imported, outsideInTests)
}

func TestImportDirections(t *testing.T) {
	seen := map[string]bool{}
	for _, s := range sources(t) {
		seen[s.pkg] = true
		if _, ok := layers[s.pkg]; !ok && strings.Contains(s.pkg, "/") {
			t.Errorf("%s: the table of layers has no row for %s", s.name, s.pkg)
			continue
		}
		for _, spec := range s.file.Imports {
			imported, err := strconv.Unquote(spec.Path.Value)
			if err != nil {
				t.Fatal(err)
			}
			if !allowed(s, imported) {
				t.Errorf("%s: %s may not import %s", s.fset.Position(spec.Pos()), s.pkg, imported)
			}
		}
	}
	for _, pkg := range slices.Sorted(maps.Keys(layers)) {
		if !seen[pkg] {
			t.Errorf("the table of layers has a row for %s, which is not there", pkg)
		}
	}
}

// The table itself must have no way round: nothing below may reach what stands above it.
func TestLayersHaveNoCycle(t *testing.T) {
	const open, done = 1, 2
	state := map[string]int{}
	var visit func(pkg string, trail []string)
	visit = func(pkg string, trail []string) {
		if state[pkg] == open {
			t.Fatalf("import cycle in the table: %s", strings.Join(append(trail, pkg), " -> "))
		}
		if state[pkg] == done {
			return
		}
		state[pkg] = open
		for next := range layers {
			if next != pkg && under(next, layers[pkg]) {
				visit(next, append(trail, pkg))
			}
		}
		state[pkg] = done
	}
	for _, pkg := range slices.Sorted(maps.Keys(layers)) {
		visit(pkg, nil)
	}
}

// The table must be able to say no.
func TestImportDirectionsRefuse(t *testing.T) {
	for _, c := range []struct {
		file, imported string
		want           bool
	}{
		{"solver/sight/region.go", "enfilade/solver/plan", false},
		{"solver/sight/region_test.go", "enfilade/solver/plan", true},
		{"solver/sight/region_test.go", "enfilade/solver/study", false},
		{"solver/plan/edit.go", "enfilade/app/session", false},
		{"solver/mesh/mesh.go", "github.com/paulmach/orb", false},
		{"canvas/paint/base.go", "enfilade/fileio/planfile", false},
		{"fileio/report/text.go", "enfilade/canvas/view", false},
		{"app/verbs/study.go", "fyne.io/fyne/v2", false},
		{"app/verbs/study.go", "enfilade/app/gui", false},
		{"app/gui/window.go", "enfilade/app/enfilade", false},
		{"app/gui/window.go", "fyne.io/fyne/v2/widget", true},
		{"app/gui/window.go", "fyne.io/fyne/v2x", false},
		{"app/gui/window.go", "C", false},
		{"solver/exact/point.go", "math/bits", true},
	} {
		s := source{name: c.file, pkg: path.Dir(c.file), test: strings.HasSuffix(c.file, "_test.go")}
		if got := allowed(s, c.imported); got != c.want {
			t.Errorf("%s importing %s: allowed = %v, want %v", c.file, c.imported, got, c.want)
		}
	}
}

// Limits of size, beyond which a file or a function is no longer one idea.
const (
	maxFileLines     = 700
	maxFunctionLines = 80
)

func TestSizes(t *testing.T) {
	for _, s := range sources(t) {
		if n := s.fset.File(s.file.Pos()).LineCount(); n > maxFileLines {
			t.Errorf("%s has %d lines, more than %d", s.name, n, maxFileLines)
		}
		if s.test {
			continue // tables of cases may be long
		}
		for _, decl := range s.file.Decls {
			f, ok := decl.(*ast.FuncDecl)
			if !ok {
				continue
			}
			from, to := s.fset.Position(f.Pos()), s.fset.Position(f.End())
			if n := to.Line - from.Line + 1; n > maxFunctionLines {
				t.Errorf("%s: %s has %d lines, more than %d", from, f.Name.Name, n, maxFunctionLines)
			}
		}
	}
}

// Every package says in doc.go what it answers; everything exported says what it means, itself or at the head of its group
// of lines.
func TestDocs(t *testing.T) {
	documented, packages := map[string]bool{}, map[string]bool{}
	for _, s := range sources(t) {
		packages[s.pkg] = true
		if path.Base(s.name) == "doc.go" && s.file.Doc != nil {
			documented[s.pkg] = true
		}
		if s.test {
			continue
		}
		group := 0 // the line that a commented declaration, or one in its group, ends on
		for _, decl := range s.file.Decls {
			names, from := undocumented(decl), s.fset.Position(decl.Pos())
			if grouped := from.Line == group+1; !grouped {
				for _, name := range names {
					t.Errorf("%s: exported %s has no comment", from, name)
				}
			}
			group = s.fset.Position(decl.End()).Line
		}
	}
	for _, pkg := range slices.Sorted(maps.Keys(packages)) {
		if !documented[pkg] {
			t.Errorf("%s has no package comment in a doc.go", pkg)
		}
	}
}

// undocumented returns the exported names of a declaration that have no comment, neither their own nor that of their group.
func undocumented(decl ast.Decl) []string {
	var names []string
	switch d := decl.(type) {
	case *ast.FuncDecl:
		if d.Doc == nil && d.Name.IsExported() && exportedReceiver(d) && d.Name.Name != "String" && d.Name.Name != "Error" {
			names = append(names, d.Name.Name)
		}
	case *ast.GenDecl:
		for _, spec := range d.Specs {
			switch s := spec.(type) {
			case *ast.TypeSpec:
				if s.Name.IsExported() && s.Doc == nil && d.Doc == nil {
					names = append(names, s.Name.Name)
				}
			case *ast.ValueSpec:
				if s.Names[0].IsExported() && s.Doc == nil && s.Comment == nil && d.Doc == nil {
					names = append(names, s.Names[0].Name)
				}
			}
		}
	}
	return names
}

// exportedReceiver reports whether a function has no receiver or one of an exported type.
func exportedReceiver(f *ast.FuncDecl) bool {
	if f.Recv == nil {
		return true
	}
	t := f.Recv.List[0].Type
	for {
		switch x := t.(type) {
		case *ast.StarExpr:
			t = x.X
		case *ast.IndexExpr:
			t = x.X
		case *ast.Ident:
			return x.IsExported()
		default:
			return true
		}
	}
}

// The solver decides by exact numbers: no small float stands in its code. And nothing of ours says that it is unfinished.
func TestNoTolerances(t *testing.T) {
	unfinished := regexp.MustCompile(`\b(TO` + `DO|FIX` + `ME|XX` + `X)\b`)
	for _, s := range sources(t) {
		text, err := os.ReadFile(filepath.Join(root, filepath.FromSlash(s.name)))
		if err != nil {
			t.Fatal(err)
		}
		for i, line := range strings.Split(string(text), "\n") {
			if strings.HasPrefix(s.pkg, "solver/") && !s.test && strings.Contains(line, "1e-") {
				t.Errorf("%s:%d: a tolerance in solver code: %s", s.name, i+1, strings.TrimSpace(line))
			}
			if word := unfinished.FindString(line); word != "" {
				t.Errorf("%s:%d: says %s", s.name, i+1, word)
			}
		}
	}
}
