package describe

import (
	"errors"
	"strings"
	"testing"

	"github.com/google/go-cmp/cmp"
)

// TestWrite compares whole printed diagnostics with text written by hand.
func TestWrite(t *testing.T) {
	long := strings.Repeat("abcdefghi ", 30) // 300 characters
	sources := Sources{"a.yaml": []byte("stages:\n  store: {}\n\tstore: {}\n" + long + "\nläng 小屋 x\n\n")}
	for _, c := range []struct {
		why  string
		d    Diagnostic
		want string
	}{
		{"with a related place", Diagnostic{Severity: Error, Code: "D012", Summary: "key given twice", Detail: "Remove one.", At: Span{"a.yaml", 3, 2, 5},
			Related: []Related{{Span{"a.yaml", 2, 3, 5}, "first given here"}}},
			"a.yaml:3:2: error: key given twice [D012]\n  3 | \tstore: {}\n    | \t^^^^^\n  Remove one.\n" +
				"  a.yaml:2:3: first given here:\n  2 |   store: {}\n    |   ^^^^^\n"},
		{"in the middle of a long line", Diagnostic{Severity: Error, Code: "D011", Summary: "unknown key", At: Span{"a.yaml", 4, 151, 9}},
			"a.yaml:4:151: error: unknown key [D011]\n  4 | …" + long[95:205] + "…\n    | " + strings.Repeat(" ", 56) + "^^^^^^^^^\n"},
		{"at the end of a long line", Diagnostic{Severity: Error, Code: "D011", Summary: "unknown key", At: Span{"a.yaml", 4, 291, 9}},
			"a.yaml:4:291: error: unknown key [D011]\n  4 | …" + long[190:] + "\n    | " + strings.Repeat(" ", 101) + "^^^^^^^^^\n"},
		{"a mark as wide as wide characters", Diagnostic{Severity: Warning, Code: "D047", Summary: "unused", At: Span{"a.yaml", 5, 6, 2}},
			"a.yaml:5:6: warning: unused [D047]\n  5 | läng 小屋 x\n    |      ^^^^\n"},
		{"an empty line", Diagnostic{Severity: Error, Code: "D014", Summary: "missing value", At: Span{"a.yaml", 6, 1, 0}},
			"a.yaml:6:1: error: missing value [D014]\n  6 | \n    | ^\n"},
		{"no such line", Diagnostic{Severity: Error, Code: "D014", Summary: "missing value", Detail: "Write one.", At: Span{"a.yaml", 60, 1, 1}},
			"a.yaml:60:1: error: missing value [D014]\n  Write one.\n"},
		{"no such source", Diagnostic{Severity: Error, Code: "D014", Summary: "missing value", At: Span{"b.yaml", 1, 1, 1}},
			"b.yaml:1:1: error: missing value [D014]\n"},
		{"no place", Diagnostic{Severity: Error, Code: "D014", Summary: "missing value"}, "error: missing value [D014]\n"},
	} {
		if diff := cmp.Diff(c.want, List{c.d}.Render(sources)); diff != "" {
			t.Errorf("%s (-want +got):\n%s", c.why, diff)
		}
	}
}

// full is a writer that takes nothing.
type full struct{}

func (full) Write([]byte) (int, error) { return 0, errors.New("disk full") }

func TestWriteError(t *testing.T) {
	if err := (List{{Severity: Error, Summary: "x"}}).Write(full{}, nil); err == nil || err.Error() != "disk full" {
		t.Errorf("got %v, want the writer's error", err)
	}
}

// TestSort gives one order whatever the order before.
func TestSort(t *testing.T) {
	at := func(file string, line, col int) Span { return Span{file, line, col, 1} }
	want := List{
		{Severity: Error, Code: "D020", At: at("a", 1, 2)},
		{Severity: Error, Code: "D011", At: at("a", 2, 1)},
		{Severity: Error, Code: "D012", At: at("a", 2, 1)},
		{Severity: Warning, Code: "D012", Summary: "z", At: at("a", 2, 1)},
		{Severity: Error, Code: "D001", At: at("b", 1, 1)},
	}
	for _, order := range [][]int{{4, 3, 2, 1, 0}, {2, 0, 4, 1, 3}, {1, 2, 3, 4, 0}} {
		var got List
		for _, i := range order {
			got = append(got, want[i])
		}
		got.Sort()
		if diff := cmp.Diff(want, got); diff != "" {
			t.Errorf("from %v (-want +got):\n%s", order, diff)
		}
	}
	if want[3:4].HasErrors() || !want.HasErrors() || (List)(nil).HasErrors() {
		t.Error("HasErrors counts warnings, or misses errors")
	}
}
