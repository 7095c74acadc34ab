package main

import "flankwright/export/sheet"

// pages is memory for the bytes of a part, a worker's own. Another part may be rendered
// into it once the files of the one before are written.
type pages struct {
	sheet    sheet.Sheet
	drawings [][]byte
	sidecar  []byte
}

// drawing is the memory for the i-th drawing.
func (p *pages) drawing(i int) *[]byte {
	for len(p.drawings) <= i {
		p.drawings = append(p.drawings, nil)
	}
	return &p.drawings[i]
}
