package describe

import (
	"strings"
	"unicode"
)

// nearest returns the candidate that word was probably meant to be, or "". How far
// it may be away grows with the length of the word. Among equally near ones the
// first counts. Capitals and the choice between "-", "_" and space cost nothing.
func nearest(word string, candidates []string) string {
	w := plain(word)
	best, bestDistance := "", allowance(len(w))+1
	for _, c := range candidates {
		if d := distance(w, plain(c), bestDistance-1); d < bestDistance {
			best, bestDistance = c, d
		}
	}
	return best
}

// allowance is the greatest number of slips in a word of n characters for which a
// proposal is still more help than noise.
func allowance(n int) int {
	switch {
	case n <= 1:
		return 0
	case n <= 5:
		return 1
	case n <= 9:
		return 2
	}
	return 3
}

func plain(s string) []rune {
	return []rune(strings.Map(func(r rune) rune {
		if r == '-' || r == ' ' {
			return '_'
		}
		return unicode.ToLower(r)
	}, s))
}

// distance counts the insertions, deletions, substitutions and swaps of neighbours
// that turn a into b. It stops counting above limit and returns limit+1.
func distance(a, b []rune, limit int) int {
	if len(a)-len(b) > limit || len(b)-len(a) > limit {
		return limit + 1
	}
	before, last, row := make([]int, len(b)+1), make([]int, len(b)+1), make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		least := i
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
			least = min(least, row[j])
		}
		if least > limit {
			return limit + 1
		}
		before, last, row = last, row, before
	}
	return min(last[len(b)], limit+1)
}

// DidYouMean returns a sentence with the name among candidates that word was probably
// meant to be, else one that lists them, else "". What names them: "Names here".
func DidYouMean(word, what string, candidates []string) string {
	return didYouMean(word, what, candidates)
}

// didYouMean returns a sentence with the nearest candidate, else one that lists
// them, else "". what names them: "keys here".
func didYouMean(word, what string, candidates []string) string {
	if near := nearest(word, candidates); near != "" {
		return "Did you mean " + near + "?"
	}
	if len(candidates) == 0 {
		return ""
	}
	return what + ": " + listed(candidates) + "."
}

// maxListed is how many names a message lists.
const maxListed = 24

func listed(names []string) string {
	if len(names) > maxListed {
		return strings.Join(names[:maxListed], ", ") + " and more"
	}
	return strings.Join(names, ", ")
}
