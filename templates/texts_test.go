package templates

import (
	"os"
	"path/filepath"
	"strings"
	"testing"
)

func TestOwnTextsAreSound(t *testing.T) {
	texts, list, sources := Load("")
	if len(list) > 0 {
		t.Fatal(list.Render(sources))
	}
	if len(texts.Cautions) < 10 || len(texts.Checklist) != 8 || len(texts.Legend) == 0 || len(texts.Remedies) == 0 || len(texts.Competence) == 0 {
		t.Errorf("texts are missing: %d cautions, %d blocks, %d legend groups, %d remedies", len(texts.Cautions), len(texts.Checklist), len(texts.Legend), len(texts.Remedies))
	}
	// One action a line, at most 20 words a sentence; words that say nothing are banned.
	for _, b := range texts.Checklist {
		for _, l := range b.Lines {
			for _, s := range strings.FieldsFunc(l.Do, func(r rune) bool { return r == '.' || r == ':' }) {
				if n := len(strings.Fields(s)); n > 20 {
					t.Errorf("%s: %d words in %q", b.Letter, n, s)
				}
			}
			for _, w := range []string{"about", "approx", "etc", "should"} {
				if strings.Contains(strings.ToLower(l.Do+" "+l.Expect), w) {
					t.Errorf("%s: %q says %q", b.Letter, l.Do, w)
				}
			}
		}
	}
}

func TestMistakesOfAFirmAreReported(t *testing.T) {
	dir := t.TempDir()
	text := "cautions:\n  - signal: shout\n    hed: x\n    head: A {nonsense} head\n    when: [batery]\n    text: \"**open\"\n"
	if err := os.WriteFile(filepath.Join(dir, cautionsFile), []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	_, list, sources := Load(dir)
	out := list.Render(sources)
	for _, want := range []string{
		`cautions.yaml:2:13: error: unknown word "shout"`,
		`cautions.yaml:3:5: error: unknown key "hed"`,
		`cautions.yaml:4:11: error: unknown value {nonsense}`,
		`cautions.yaml:5:12: error: unknown condition "batery"`,
		`cautions.yaml:6:11: error: bold text is not closed`,
	} {
		if !strings.Contains(out, want) {
			t.Errorf("not reported: %s\n%s", want, out)
		}
	}
	if len(list) != 5 {
		t.Errorf("%d diagnostics, want 5:\n%s", len(list), out)
	}
}

func TestAFirmReplacesAFile(t *testing.T) {
	dir := t.TempDir()
	if err := os.WriteFile(filepath.Join(dir, faultsFile), []byte("remedies:\n  - {fault: dead, do: \"call the firm: {part}\"}\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	texts, list, sources := Load(dir)
	if len(list) > 0 {
		t.Fatal(list.Render(sources))
	}
	if len(texts.Remedies) != 1 || texts.Remedies[0].Do != "call the firm: {part}" {
		t.Errorf("remedies: %+v", texts.Remedies)
	}
	if len(texts.Cautions) == 0 {
		t.Error("the other files are lost")
	}
	if _, list, _ := Load(filepath.Join(dir, "none")); len(list) != 1 {
		t.Errorf("a folder that is not there: %v", list)
	}
}
