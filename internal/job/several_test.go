package job

import (
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
)

func TestFind(t *testing.T) {
	dir := t.TempDir()
	write := func(name, text string) string {
		t.Helper()
		name = filepath.Join(dir, name)
		if err := os.MkdirAll(filepath.Dir(name), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(name, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
		return name
	}
	b := write("b.yaml", "# a remark\ngloamwright: 1\n")
	a := write("a.yml", "gloamwright: 1\n")
	write("house.yaml", "lamp_drop: 5 %\n")
	reg := write("a.register.yaml", "register: 1\n")
	write("notes.txt", "gloamwright: 1\n")
	deep := write("sub/c.yaml", "gloamwright: 1\n")
	empty := filepath.Join(dir, "empty")
	if err := os.Mkdir(empty, 0o755); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct{ args, want []string }{
		{[]string{dir}, []string{a, b}},
		{[]string{deep, dir, b}, []string{deep, a, b}},
		{[]string{reg, b}, []string{b}},
		{[]string{reg}, []string{reg}}, // named alone it is built, and the mistake told
	} {
		got, err := Find(c.args)
		if err != nil || !reflect.DeepEqual(got, c.want) {
			t.Errorf("Find(%v) = %v, %v; want %v", c.args, got, err, c.want)
		}
	}
	for _, arg := range []string{empty, filepath.Join(dir, "none.yaml")} {
		if got, err := Find([]string{arg}); err == nil {
			t.Errorf("Find(%s) = %v, want an error", arg, got)
		}
	}
}

// Many built side by side give the bytes that each gives alone, in the order asked.
func TestSeveralEqualsOneByOne(t *testing.T) {
	dir := t.TempDir()
	src := string(example(t, "juniper-flat"))
	var paths []string
	for i := range 6 {
		path := filepath.Join(dir, fmt.Sprintf("s%d.yaml", i))
		text := strings.Replace(src, "JF-118", fmt.Sprintf("JF-%d", 200+i), 1)
		text = strings.Replace(text, "outage: 3 h", fmt.Sprintf("outage: %d h", 1+i), 1)
		if i == 3 {
			text = strings.Replace(text, "nominal: 12 V", "nominal: 12", 1)
		}
		if err := os.WriteFile(path, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
		paths = append(paths, path)
	}
	var got []Outcome
	Several(paths, filepath.Join(dir, "out"), func(i int, o Outcome) {
		if i != len(got) {
			t.Errorf("outcome %d comes after %d others", i, len(got))
		}
		got = append(got, o)
	})
	for i, o := range got {
		if o.Path != paths[i] {
			t.Errorf("outcome %d is that of %s", i, o.Path)
		}
		if (o.Err != nil) != (i == 3) {
			t.Errorf("%s: %v", o.Path, o.Err)
			continue
		}
		if o.Err != nil {
			continue
		}
		alone, err := NewDraft(paths[i], filepath.Join(dir, "alone"))
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range alone.Files {
			data, err := os.ReadFile(filepath.Join(o.Draft.Folder, f.Name))
			if err != nil || !bytes.Equal(data, f.Data) {
				t.Errorf("%s: %s differs from that of a build alone: %v", o.Path, f.Name, err)
			}
		}
	}
	var b strings.Builder
	if err := Table(&b, got); err != nil {
		t.Fatal(err)
	}
	if lines := strings.Split(strings.TrimSpace(b.String()), "\n"); len(lines) != 1+len(paths) || !strings.Contains(lines[4], "none: ") {
		t.Errorf("the table:\n%s", b.String())
	}
}
