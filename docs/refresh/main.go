// Command refresh writes the generated documents of docs/ and the rendered sample:
//
//	go run ./docs/refresh
//
// With --check it writes nothing and fails if a file is not the one that it would
// write.
package main

import (
	"bytes"
	"flag"
	"fmt"
	"os"
	"path/filepath"

	"gloamwright/internal/design"
	"gloamwright/internal/job"
	"gloamwright/internal/release"
)

// sample is the description whose documents are shown, and sampleFolder where.
const (
	sample       = "examples/bracken-reach.yaml"
	sampleFolder = "docs/sample"
)

func main() {
	check := flag.Bool("check", false, "fail if a file is not current")
	flag.Parse()
	stale, err := refresh(*check)
	if err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
	if len(stale) > 0 {
		fmt.Fprintf(os.Stderr, "not current, run 'go run ./docs/refresh': %v\n", stale)
		os.Exit(1)
	}
}

// refresh writes or checks every generated file; paths are relative to the
// repository's root.
func refresh(check bool) (stale []string, err error) {
	files, err := pages()
	if err != nil {
		return nil, err
	}
	shown, err := sampleFiles()
	if err != nil {
		return nil, err
	}
	return settle(append(files, shown...), check)
}

// settle writes files and removes what is left over in the sample's folder; with check
// it only lists what it would have done.
func settle(files []release.File, check bool) (stale []string, err error) {
	for _, f := range files {
		old, err := os.ReadFile(f.Name)
		if err == nil && bytes.Equal(old, f.Data) {
			continue
		}
		if check {
			stale = append(stale, f.Name)
			continue
		}
		if err := os.MkdirAll(filepath.Dir(f.Name), 0o755); err != nil {
			return nil, err
		}
		if err := release.WriteFile(f.Name, f.Data); err != nil {
			return nil, err
		}
	}
	left, err := leftOver(files)
	if err != nil {
		return nil, err
	}
	for _, name := range left {
		if check {
			stale = append(stale, name)
		} else if err := os.Remove(name); err != nil {
			return nil, err
		}
	}
	return stale, nil
}

// pages makes the generated pages.
func pages() ([]release.File, error) {
	designs, err := examples()
	if err != nil {
		return nil, err
	}
	files := []release.File{
		{Name: "docs/description.md", Data: description()},
		{Name: "docs/findings.md", Data: findings()},
		{Name: "docs/models.md", Data: models()},
		{Name: "docs/letters.md", Data: letters()},
	}
	for _, p := range []struct {
		name string
		make func() ([]byte, error)
	}{
		{"methods", func() ([]byte, error) { return methods(designs) }}, {"catalogue", tables}, {"checks", checks}, {"results", contract}, {"schematic", drawings},
	} {
		data, err := p.make()
		if err != nil {
			return nil, fmt.Errorf("docs/%s.md: %w", p.name, err)
		}
		files = append(files, release.File{Name: "docs/" + p.name + ".md", Data: data})
	}
	return files, nil
}

// examples designs every example, in the order of their names.
func examples() ([]*design.Design, error) {
	names, err := filepath.Glob("examples/*.yaml")
	if err != nil {
		return nil, err
	}
	var out []*design.Design
	for _, n := range names {
		d, err := job.Load(n, nil)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", n, err)
		}
		out = append(out, d)
	}
	return out, nil
}

// sampleFiles makes the documents of the sample.
func sampleFiles() ([]release.File, error) {
	d, err := job.Load(sample, nil)
	if err != nil {
		return nil, err
	}
	docs, err := job.Documents(d)
	if err != nil {
		return nil, err
	}
	for i := range docs {
		docs[i].Name = filepath.Join(sampleFolder, docs[i].Name)
	}
	return docs, nil
}

// leftOver lists files in the sample's folder that belong to no document any more.
func leftOver(shown []release.File) ([]string, error) {
	entries, err := os.ReadDir(sampleFolder)
	if os.IsNotExist(err) {
		return nil, nil
	}
	if err != nil {
		return nil, err
	}
	wanted := map[string]bool{}
	for _, f := range shown {
		wanted[f.Name] = true
	}
	var out []string
	for _, e := range entries {
		if name := filepath.Join(sampleFolder, e.Name()); !wanted[name] {
			out = append(out, name)
		}
	}
	return out, nil
}
