package job

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"slices"
	"testing"

	"gloamwright/internal/sitegen"
)

// Every document is the same, whatever the order of keys in the file, but for what names
// places in it: findings stand in its order and bear line and column, in results.json
// and on the packet's page of findings.
func TestDocumentsOfAShuffledFile(t *testing.T) {
	names, err := filepath.Glob("../../examples/*.yaml")
	if err != nil || len(names) == 0 {
		t.Fatalf("no examples: %v", err)
	}
	for _, name := range names {
		src, err := os.ReadFile(name)
		if err != nil {
			t.Fatal(err)
		}
		made := func(src []byte) map[string][]byte {
			file := filepath.Join(t.TempDir(), "site.yaml")
			if err := os.WriteFile(file, src, 0o644); err != nil {
				t.Fatal(err)
			}
			d, err := Load(file, nil)
			if err != nil {
				t.Fatal(err)
			}
			docs, err := Documents(d)
			if err != nil {
				t.Fatal(err)
			}
			out := map[string][]byte{}
			for _, f := range docs {
				switch f.Name {
				case "packet.pdf":
				case "results.json":
					out[f.Name] = withoutPlaces(t, f.Data)
				default:
					out[f.Name] = f.Data
				}
			}
			return out
		}
		want := made(sitegen.Shuffled(src, 0))
		for seed := uint64(1); seed <= 2; seed++ {
			got := made(sitegen.Shuffled(src, seed))
			for file, data := range want {
				if !bytes.Equal(got[file], data) {
					t.Errorf("%s shuffled by %d: %s differs", filepath.Base(name), seed, file)
				}
			}
		}
	}
}

// withoutPlaces is a results.json without the places in the description, its findings in
// the order of their words.
func withoutPlaces(t *testing.T, js []byte) []byte {
	t.Helper()
	var doc map[string]any
	if err := json.Unmarshal(js, &doc); err != nil {
		t.Fatal(err)
	}
	var strip func(v any)
	strip = func(v any) {
		switch v := v.(type) {
		case map[string]any:
			delete(v, "at")
			for _, e := range v {
				strip(e)
			}
		case []any:
			for _, e := range v {
				strip(e)
			}
		}
	}
	strip(doc)
	var list []string
	for _, f := range doc["findings"].([]any) {
		text, err := json.Marshal(f)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, string(text))
	}
	slices.Sort(list)
	doc["findings"] = list
	out, err := json.Marshal(doc)
	if err != nil {
		t.Fatal(err)
	}
	return out
}
