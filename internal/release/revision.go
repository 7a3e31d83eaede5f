package release

import "strings"

// revisionLetters leaves out I and O, which are taken for digits.
const revisionLetters = "ABCDEFGHJKLMNPQRSTUVWXYZ"

// NextRevision returns the revision that follows r: A first, B after A, AA after Z,
// AB after AA; "" after ZZ.
func NextRevision(r string) string {
	if r == "" {
		return revisionLetters[:1]
	}
	n := 0
	for i := range len(r) {
		at := strings.IndexByte(revisionLetters, r[i])
		if at < 0 {
			return ""
		}
		n = n*len(revisionLetters) + at + 1
	}
	s := ""
	for n++; n > 0; n = (n - 1) / len(revisionLetters) {
		s = string(revisionLetters[(n-1)%len(revisionLetters)]) + s
	}
	if len(s) > 2 {
		return ""
	}
	return s
}
