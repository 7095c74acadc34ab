package main

// nearest finds the candidate most like a mistyped word; false if none is within
// a third of its length.
func nearest(word string, candidates []string) (string, bool) {
	const longest = 64 // longer words are no typing errors, and cost time
	if len(word) > longest {
		return "", false
	}
	best, found := len(word)/3+1, ""
	for _, c := range candidates {
		if d := editDistance(word, c); d <= best && (found == "" || d < best) {
			best, found = d, c
		}
	}
	return found, found != ""
}

// editDistance counts insertions, deletions, replacements and swaps of neighbours
// that turn a into b (optimal string alignment).
func editDistance(a, b string) int {
	before := make([]int, len(b)+1) // two rows up
	last := make([]int, len(b)+1)
	row := make([]int, len(b)+1)
	for j := range last {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		for j := 1; j <= len(b); j++ {
			change := 1
			if a[i-1] == b[j-1] {
				change = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+change)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last, row = last, row, before
	}
	return last[len(b)]
}
