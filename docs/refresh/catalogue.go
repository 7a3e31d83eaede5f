package main

import (
	"bytes"
	"fmt"
	"go/ast"
	"go/doc"
	"go/token"
	"path"
	"slices"
	"strconv"
	"strings"
)

// tables writes where the figures of the catalogue come from, read from its source:
// every Evidence, by the file and the variable that it stands in.
func tables() ([]byte, error) {
	var b bytes.Buffer
	b.WriteString("# Tables\n\nThe published tables that the program computes with, and where each figure comes from. **Seen**: read in the publication, or on a page that\nreproduces it. **From memory**: not read; of two remembered figures the more cautious is held, and the local code prevails. The figures themselves stand in\n`internal/catalogue`, one file a table.\n")
	p, set, err := readPackage("internal/catalogue", doc.AllDecls|doc.PreserveAST)
	if err != nil {
		return nil, err
	}
	type row struct {
		file string
		line int
		text string
	}
	var rows []row
	seen := map[string]bool{}
	collect := func(name string, n ast.Node) {
		ast.Inspect(n, func(n ast.Node) bool {
			lit, ok := n.(*ast.CompositeLit)
			if !ok || !isEvidence(lit.Type) {
				return true
			}
			e := evidence(lit)
			if e.source == "" {
				return true
			}
			word := "from memory"
			switch {
			case e.seen:
				word = "seen"
			case strings.HasPrefix(e.source, "common practice"):
				word = "–"
			}
			at := set.Position(lit.Pos())
			text := fmt.Sprintf("| `%s` | %s | %s | %s |\n", name, inCell(e.source), word, inCell(e.note))
			if key := at.Filename + text; !seen[key] {
				seen[key] = true
				rows = append(rows, row{path.Base(at.Filename), at.Line, text})
			}
			return true
		})
	}
	for _, v := range p.Vars {
		for _, s := range v.Decl.Specs {
			vs := s.(*ast.ValueSpec)
			collect(vs.Names[0].Name, vs)
		}
	}
	for _, t := range p.Types {
		for _, v := range t.Vars {
			for _, s := range v.Decl.Specs {
				vs := s.(*ast.ValueSpec)
				collect(vs.Names[0].Name, vs)
			}
		}
		for _, f := range t.Funcs {
			collect(f.Name, f.Decl)
		}
	}
	for _, f := range p.Funcs {
		collect(f.Name, f.Decl)
	}
	slices.SortStableFunc(rows, func(x, y row) int {
		if c := strings.Compare(x.file, y.file); c != 0 {
			return c
		}
		return x.line - y.line
	})
	last := ""
	for _, r := range rows {
		if r.file != last {
			last = r.file
			fmt.Fprintf(&b, "\n## %s\n\n| table | source | | remark |\n|---|---|---|---|\n", strings.ReplaceAll(strings.TrimSuffix(r.file, ".go"), "_", " "))
		}
		b.WriteString(r.text)
	}
	return b.Bytes(), nil
}

func isEvidence(t ast.Expr) bool {
	id, ok := t.(*ast.Ident)
	return ok && id.Name == "Evidence"
}

// read is an Evidence as its source states it.
type read struct {
	source, note string
	seen         bool
}

func evidence(lit *ast.CompositeLit) (e read) {
	for _, el := range lit.Elts {
		kv, ok := el.(*ast.KeyValueExpr)
		if !ok {
			continue
		}
		key, _ := kv.Key.(*ast.Ident)
		switch v := kv.Value.(type) {
		case *ast.BasicLit:
			if v.Kind != token.STRING {
				continue
			}
			s, err := strconv.Unquote(v.Value)
			if err != nil {
				continue
			}
			if key.Name == "Source" {
				e.source = s
			} else {
				e.note = s
			}
		case *ast.Ident:
			e.seen = e.seen || key.Name == "Seen" && v.Name == "true"
		}
	}
	return e
}
