package design_test

import (
	"os"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

// load decodes an example.
func load(tb testing.TB, name string) *describe.Site {
	tb.Helper()
	file := name + ".yaml"
	src, err := os.ReadFile("../../examples/" + file)
	if err != nil {
		tb.Fatal(err)
	}
	site, list := describe.Parse(file, src, stage.Schema())
	for _, d := range list {
		tb.Error(d)
	}
	if tb.Failed() {
		tb.FailNow()
	}
	return site
}
