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

	"gloamwright/internal/job"
	"gloamwright/internal/release"
)

// sample is the description whose documents are shown.
const sample = "examples/bracken-reach.yaml"

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
	files := []release.File{
		{Name: "docs/description.md", Data: description()},
		{Name: "docs/findings.md", Data: findings()},
		{Name: "docs/models.md", Data: models()},
	}
	d, err := job.Load(sample, nil)
	if err != nil {
		return nil, err
	}
	docs, err := job.Documents(d)
	if err != nil {
		return nil, err
	}
	for _, f := range docs {
		files = append(files, release.File{Name: filepath.Join("docs/sample", f.Name), Data: f.Data})
	}
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
	return stale, nil
}
