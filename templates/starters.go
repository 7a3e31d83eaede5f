// Package templates holds the files that the program ships: starter descriptions
// and the packet's standing texts.
package templates

import (
	"embed"
	"fmt"
	"io/fs"
	"strings"
)

//go:embed starters/*.yaml
var starters embed.FS

// Starters returns the names of the starter descriptions, in order.
func Starters() []string {
	entries, err := fs.ReadDir(starters, "starters")
	if err != nil {
		panic("templates: " + err.Error()) // embedded: cannot be missing
	}
	var out []string
	for _, e := range entries {
		out = append(out, strings.TrimSuffix(e.Name(), ".yaml"))
	}
	return out
}

// Starter returns the text of a starter description.
func Starter(name string) ([]byte, error) {
	b, err := starters.ReadFile("starters/" + name + ".yaml")
	if err != nil {
		return nil, fmt.Errorf("there is no starter %q; there are: %s", name, strings.Join(Starters(), ", "))
	}
	return b, nil
}

// StarterTitle returns the first comment line of a starter.
func StarterTitle(name string) string {
	b, err := Starter(name)
	if err != nil {
		return ""
	}
	line, _, _ := strings.Cut(string(b), "\n")
	return strings.TrimPrefix(line, "# ")
}
