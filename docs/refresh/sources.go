package main

import (
	"bytes"
	"fmt"
	"go/ast"
	"go/doc"
	"go/doc/comment"
	"go/parser"
	"go/token"
	"os"
	"path"
	"slices"
	"strings"
)

// readPackage reads the documentation of a package of this repository; mode 0 keeps
// what is exported.
func readPackage(dir string, mode doc.Mode) (*doc.Package, *token.FileSet, error) {
	entries, err := os.ReadDir(dir)
	if err != nil {
		return nil, nil, err
	}
	set := token.NewFileSet()
	var files []*ast.File
	for _, e := range entries {
		if e.IsDir() || !strings.HasSuffix(e.Name(), ".go") || strings.HasSuffix(e.Name(), "_test.go") {
			continue
		}
		f, err := parser.ParseFile(set, path.Join(dir, e.Name()), nil, parser.ParseComments)
		if err != nil {
			return nil, nil, err
		}
		files = append(files, f)
	}
	p, err := doc.NewFromFiles(set, files, "gloamwright/"+dir, mode)
	return p, set, err
}

// markdown turns a doc comment into Markdown whose headings stand below level.
func markdown(p *doc.Package, text string, level int) string {
	pr := p.Printer()
	pr.HeadingLevel = level
	pr.HeadingID = func(*comment.Heading) string { return "" }
	pr.DocLinkBaseURL = ""
	return strings.TrimSpace(string(pr.Markdown(p.Parser().Parse(text))))
}

// notMethods is the file of package sizing that holds no method.
const notMethods = "working.go"

// functions lists the exported functions of a package with their doc comments, by file
// and then in the order of the file.
func functions(b *bytes.Buffer, p *doc.Package, set *token.FileSet) {
	type entry struct {
		f  *doc.Func
		at token.Position
	}
	var list []entry
	add := func(fs []*doc.Func) {
		for _, f := range fs {
			list = append(list, entry{f, set.Position(f.Decl.Pos())})
		}
	}
	add(p.Funcs)
	for _, t := range p.Types {
		add(t.Funcs)
	}
	slices.SortFunc(list, func(x, y entry) int {
		if c := strings.Compare(x.at.Filename, y.at.Filename); c != 0 {
			return c
		}
		return x.at.Line - y.at.Line
	})
	for _, e := range list {
		if path.Base(e.at.Filename) == notMethods {
			continue
		}
		fmt.Fprintf(b, "\n### %s\n\n%s\n", e.f.Name, markdown(p, e.f.Doc, 4))
	}
}
