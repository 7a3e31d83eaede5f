package job

import (
	"fmt"
	"strings"

	"gloamwright/internal/describe"
)

// BadSet is returned when a --set cannot be followed.
type BadSet struct{ Text string }

// Error says what is wrong with it.
func (b *BadSet) Error() string { return b.Text }

// override makes one change, written as PATH=VALUE, to the text of a description.
func override(src []byte, set string) ([]byte, error) {
	path, value, ok := strings.Cut(set, "=")
	if !ok || path == "" || value == "" {
		return nil, &BadSet{fmt.Sprintf("--set %s: write it as path=value, such as duty.outage=6h", set)}
	}
	out, err := describe.Override(src, strings.TrimSpace(path), strings.Trim(strings.TrimSpace(value), `"`))
	if err != nil {
		return nil, &BadSet{fmt.Sprintf("--set %s: %v", set, err)}
	}
	return out, nil
}
