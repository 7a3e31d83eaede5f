package main

import (
	"bytes"
	"encoding/json"
	"os"
	"regexp"
	"strings"
	"testing"

	"gloamwright/internal/finding"
	"gloamwright/internal/network"
	networked "gloamwright/internal/network/published"
	"gloamwright/internal/release"
	"gloamwright/internal/sizing/published"
	"gloamwright/internal/stage"
)

// atRoot moves to the repository's root, where paths of documents start.
func atRoot(t *testing.T) {
	t.Helper()
	t.Chdir("../..")
}

// The documents in the repository are those that the program writes. If this fails,
// run go run ./docs/refresh.
func TestDocumentsAreCurrent(t *testing.T) {
	atRoot(t)
	stale, err := refresh(true)
	if err != nil {
		t.Fatal(err)
	}
	for _, name := range stale {
		t.Errorf("%s is not current: run go run ./docs/refresh", name)
	}
}

// Checking notices a changed, a missing and a left-over file.
func TestCheckNoticesEveryDifference(t *testing.T) {
	dir := t.TempDir()
	t.Chdir(dir)
	if err := os.MkdirAll(sampleFolder, 0o755); err != nil {
		t.Fatal(err)
	}
	for name, text := range map[string]string{"docs/a.md": "old", sampleFolder + "/gone.svg": ""} {
		if err := os.WriteFile(name, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	files := []release.File{{Name: "docs/a.md", Data: []byte("new")}, {Name: sampleFolder + "/b.svg", Data: []byte("b")}}
	stale, err := settle(files, true)
	if err != nil {
		t.Fatal(err)
	}
	if got, want := strings.Join(stale, " "), "docs/a.md "+sampleFolder+"/b.svg "+sampleFolder+"/gone.svg"; got != want {
		t.Errorf("stale: %s, want %s", got, want)
	}
	if stale, err = settle(files, false); err != nil || len(stale) > 0 {
		t.Fatalf("writing: %v, %v", stale, err)
	}
	if stale, err = settle(files, true); err != nil || len(stale) > 0 {
		t.Errorf("after writing: %v, %v", stale, err)
	}
}

func page(t *testing.T, make func() ([]byte, error)) string {
	t.Helper()
	b, err := make()
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

// Nothing that the program knows is missing from the pages.
func TestPagesAreComplete(t *testing.T) {
	atRoot(t)
	text := string(description())
	for _, k := range stage.Kinds() {
		if !strings.Contains(text, "### "+k.Name+"\n") {
			t.Errorf("description.md lacks %s", k.Name)
		}
	}
	text = string(findings())
	for _, c := range finding.All() {
		if !strings.Contains(text, "## "+c.Name+":") {
			t.Errorf("findings.md lacks %s", c.Name)
		}
	}
	text = string(models())
	for _, m := range network.Models() {
		if !strings.Contains(text, "## "+m.Name+"\n") {
			t.Errorf("models.md lacks %s", m.Name)
		}
	}
	text = page(t, checks)
	if rows, want := strings.Count(text, "\n| "), len(published.All()); rows < want+len(networked.All()) {
		t.Errorf("checks.md has %d rows for %d figures and %d circuits", rows, want, len(networked.All()))
	}
	text = page(t, func() ([]byte, error) { return methods(nil) })
	for _, name := range []string{"Sectional", "Discriminate", "OpeningTime", "Ventilation", "Ampacity"} {
		if !strings.Contains(text, "### "+name+"\n") {
			t.Errorf("methods.md lacks %s", name)
		}
	}
	text = page(t, tables)
	for _, s := range []string{"IEC 60228", "IEC 60364-5-52", "ISO 8820-3", "IEC 60063", "IEEE 485"} {
		if !strings.Contains(text, s) {
			t.Errorf("catalogue.md lacks %s", s)
		}
	}
}

// Every key of the schema stands in results.md.
func TestContractHasEveryKey(t *testing.T) {
	atRoot(t)
	text := page(t, contract)
	schema, err := os.ReadFile(schemaFile)
	if err != nil {
		t.Fatal(err)
	}
	var top any
	if err := json.Unmarshal(schema, &top); err != nil {
		t.Fatal(err)
	}
	keys := 0
	var walk func(v any)
	walk = func(v any) {
		switch x := v.(type) {
		case map[string]any:
			if p, ok := x["properties"].(map[string]any); ok {
				for name := range p {
					keys++
					if !regexp.MustCompile("[`.{}\\[\\]]" + regexp.QuoteMeta(name) + "`").MatchString(text) {
						t.Errorf("results.md lacks the key %s", name)
					}
				}
			}
			for _, y := range x {
				walk(y)
			}
		case []any:
			for _, y := range x {
				walk(y)
			}
		}
	}
	walk(top)
	if keys < 150 {
		t.Errorf("only %d keys found in the schema", keys)
	}
}

// Links between the pages lead somewhere.
func TestLinksLeadSomewhere(t *testing.T) {
	atRoot(t)
	link := regexp.MustCompile(`\]\(([a-zA-Z0-9_./-]+)\)`)
	for _, dir := range []string{"", "docs/"} {
		for _, name := range []string{"README.md", "DEVELOPERS.md", "docs/guide.md", "docs/README.md", "docs/methods.md", "docs/models.md", "docs/results.md"} {
			if (dir == "docs/") != strings.HasPrefix(name, "docs/") {
				continue
			}
			text, err := os.ReadFile(name)
			if err != nil {
				t.Error(err)
				continue
			}
			for _, m := range link.FindAllSubmatch(text, -1) {
				if _, err := os.Stat(dir + string(m[1])); err != nil {
					t.Errorf("%s: %s leads nowhere", name, m[1])
				}
			}
		}
	}
}

// The pages hold no path of this machine and end as files do.
func TestPagesAreClean(t *testing.T) {
	atRoot(t)
	here, err := os.Getwd()
	if err != nil {
		t.Fatal(err)
	}
	for name, data := range map[string][]byte{
		"description": description(), "findings": findings(), "models": models(),
		"checks": []byte(page(t, checks)), "catalogue": []byte(page(t, tables)), "results": []byte(page(t, contract)),
	} {
		if bytes.Contains(data, []byte(here)) || !bytes.HasSuffix(data, []byte("\n")) || bytes.HasSuffix(data, []byte("\n\n")) {
			t.Errorf("%s.md has a path of a machine, or does not end with one line end", name)
		}
	}
}
