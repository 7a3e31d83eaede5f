package describe

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
)

// Lengths of names and texts, in characters.
const (
	MaxName = 60
	maxText = 200
)

// checkLabel refuses a job number or circuit name that could not stand in a file
// name or on a label: letters of any script, digits, space, "-", "_" and ".", in the
// middle also the characters of extra.
func checkLabel(s, extra string) error {
	bad := func(why string) error {
		return &valueError{codeName, "bad name", fmt.Sprintf("%q %s. Letters, digits, space, - _ .%s may stand in it.", clip(s), why, spaced(extra))}
	}
	r := []rune(s)
	switch {
	case len(r) == 0:
		return bad("is empty")
	case len(r) > MaxName:
		return &valueError{codeName, "bad name", fmt.Sprintf("%q is too long: %d characters, at most %d.", clip(s), len(r), MaxName)}
	}
	for _, c := range r {
		if !unicode.IsLetter(c) && !unicode.IsMark(c) && !unicode.IsDigit(c) && !strings.ContainsRune(" -_."+extra, c) {
			return bad(fmt.Sprintf("has %s in it", show(c)))
		}
	}
	if first := r[0]; !unicode.IsLetter(first) && !unicode.IsDigit(first) {
		return bad("does not start with a letter or a digit")
	}
	if last := r[len(r)-1]; last == '.' || last == ' ' {
		return bad("ends with a point or a space")
	}
	if strings.Contains(s, "..") || strings.Contains(s, "  ") {
		return bad("has two points or two spaces together")
	}
	return nil
}

func spaced(extra string) string {
	var b strings.Builder
	for _, c := range extra {
		b.WriteString(" " + string(c))
	}
	return b.String()
}

// show names one character for a message.
func show(c rune) string {
	if c == ' ' {
		return "a space"
	}
	if unicode.IsPrint(c) {
		return `"` + string(c) + `"`
	}
	return fmt.Sprintf("the character %U", c)
}

// deviceNames cannot be folders on every system.
var deviceNames = []string{"con", "prn", "aux", "nul", "com1", "com2", "com3", "com4", "com5", "com6", "com7", "com8", "com9",
	"lpt1", "lpt2", "lpt3", "lpt4", "lpt5", "lpt6", "lpt7", "lpt8", "lpt9"}

// checkJobNumber refuses a number that cannot name the job's folder.
func checkJobNumber(s string) error {
	if err := checkLabel(s, ""); err != nil {
		return err
	}
	stem, _, _ := strings.Cut(strings.ToLower(s), ".")
	if slices.Contains(deviceNames, strings.TrimSpace(stem)) {
		return &valueError{codeName, "bad name", fmt.Sprintf("%q cannot name a folder on every system. Choose another.", s)}
	}
	return nil
}

// circuitExtra are characters that may stand in the name of a circuit besides those
// of every label.
const circuitExtra = "&(),+'’"

// checkIdentifier refuses a name of a stage or luminaire that could not be used in a
// reference: one word of letters, digits, "-" and "_" that starts with a letter.
func checkIdentifier(s string) error {
	r := []rune(s)
	if len(r) == 0 {
		return &valueError{codeName, "bad name", "The name is empty."}
	}
	if len(r) > MaxName {
		return &valueError{codeName, "bad name", fmt.Sprintf("%q is too long: %d characters, at most %d.", clip(s), len(r), MaxName)}
	}
	for i, c := range r {
		if unicode.IsLetter(c) || i > 0 && (unicode.IsMark(c) || unicode.IsDigit(c) || c == '-' || c == '_') {
			continue
		}
		why := fmt.Sprintf("has %s in it", show(c))
		if i == 0 {
			why = "does not start with a letter"
		}
		return &valueError{codeName, "bad name", fmt.Sprintf("%q %s. Such a name is one word: a letter first, then letters, digits, - and _.", clip(s), why)}
	}
	return nil
}

// checkText refuses a text that cannot be printed, or one longer than most.
func checkText(s string, most int) error {
	r := []rune(s)
	if strings.TrimSpace(s) == "" {
		return &valueError{codeText, "empty text", "Write a text here, or remove the key."}
	}
	if len(r) > most {
		return &valueError{codeText, "text too long", fmt.Sprintf("%q has %d characters; at most %d fit.", clip(s), len(r), most)}
	}
	for _, c := range r {
		if unprintable(c) {
			return &valueError{codeText, "bad text", fmt.Sprintf("%q has a line end or %s in it. Write it on one line.", clip(strings.Map(visible, s)), show(c))}
		}
	}
	return nil
}

func visible(c rune) rune {
	if unprintable(c) {
		return ' '
	}
	return c
}
