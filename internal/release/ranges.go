package release

import (
	"slices"
	"strconv"
	"strings"
)

// together writes labels for a person: sorted, neighbours put together, such as
// "-E1…-E5, -E9".
func together(labels []string) string {
	list := slices.Clone(labels)
	slices.SortFunc(list, compareLabels)
	list = slices.Compact(list)
	var out []string
	for i := 0; i < len(list); {
		j := i
		for j+1 < len(list) && follows(list[j], list[j+1]) {
			j++
		}
		switch {
		case j > i+1:
			out = append(out, list[i]+"…"+list[j])
		case j == i+1:
			out = append(out, list[i], list[j])
		default:
			out = append(out, list[i])
		}
		i = j + 1
	}
	return strings.Join(out, ", ")
}

// follows reports whether b is a with its last number one higher.
func follows(a, b string) bool {
	stemA, nA, tailA := lastNumber(a)
	stemB, nB, tailB := lastNumber(b)
	return stemA == stemB && tailA == tailB && nA >= 0 && nB == nA+1
}

// lastNumber splits a label at its last number; n is -1 if there is none.
func lastNumber(s string) (stem string, n int, tail string) {
	tail = s[strings.LastIndexAny(s, "0123456789")+1:]
	rest := s[:len(s)-len(tail)]
	stem = strings.TrimRight(rest, "0123456789")
	n, err := strconv.Atoi(rest[len(stem):])
	if err != nil {
		return s, -1, ""
	}
	return stem, n, tail
}
