package quantity

import (
	"fmt"
	"strings"
)

// Problem says in what way a text is not the wanted quantity.
type Problem uint8

// The problems. Zero is invalid.
const (
	Malformed   Problem = iota + 1 // no number with a unit at all
	NoUnit                         // a number alone
	WrongUnit                      // a unit, but of another quantity
	UnknownUnit                    // letters that are no unit
	Comma                          // a comma in the number
	TooLarge                       // not a finite number
	Trailing                       // more text after the quantity
	Reversed                       // a range whose low end is above its high end
	BadValue                       // a size, tolerance or rating that cannot be
)

// ParseError says why a text is not the wanted quantity and what to write.
type ParseError struct {
	Text     string // as written
	Problem  Problem
	Want     string // "a length"
	Examples string // "9 m or 30 ft"
	Unit     string // the unit found, for WrongUnit and UnknownUnit
	Is       string // what the unit found measures, for WrongUnit: "a current"
	Write    string // what was probably meant: "9 m or 9 ft"; may be empty
	Why      string // for BadValue and Trailing: the reason, in words
}

// Error returns one sentence for the person who wrote the text.
func (e *ParseError) Error() string {
	text := clip(e.Text)
	switch e.Problem {
	case NoUnit:
		return fmt.Sprintf("%q needs a unit: write %s", text, e.write())
	case WrongUnit:
		return fmt.Sprintf("%q is %s; %s belongs here, such as %s", text, e.Is, e.Want, e.Examples)
	case UnknownUnit:
		return fmt.Sprintf("%q is no unit of %s: write %s", clip(e.Unit), bare(e.Want), e.write())
	case Comma:
		return fmt.Sprintf("%q has a comma in a number; use a decimal point and no separator for thousands: write %s", text, e.write())
	case TooLarge:
		return fmt.Sprintf("%q is too large a number", text)
	case Trailing:
		return fmt.Sprintf("%q has %q after the quantity: write %s", text, clip(e.Why), e.write())
	case Reversed:
		return fmt.Sprintf("%q runs downwards: write %s", text, e.write())
	case BadValue:
		return fmt.Sprintf("%q %s", text, e.Why)
	default:
		if strings.TrimSpace(e.Text) == "" {
			return fmt.Sprintf("nothing is written here; %s belongs here, such as %s", e.Want, e.Examples)
		}
		return fmt.Sprintf("%q is not %s: write a number and a unit, such as %s", text, e.Want, e.Examples)
	}
}

func (e *ParseError) write() string {
	if e.Write != "" {
		return e.Write
	}
	return e.Examples
}

// maxQuoted is how many characters of a text a message repeats.
const maxQuoted = 60

// clip shortens s for a message.
func clip(s string) string {
	r := []rune(s)
	if len(r) <= maxQuoted {
		return s
	}
	return string(r[:maxQuoted-1]) + "…"
}

// bare drops the article of a noun.
func bare(noun string) string {
	_, rest, _ := strings.Cut(noun, " ")
	return rest
}
