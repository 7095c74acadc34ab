// Package label draws a short text in single-stroke characters, for an engraver, a
// plotter or a marking laser, and finds a place for it on the web of a part.
//
// The characters are this project's own: upright, proportional, each made of as few
// and as long open strokes of lines and arcs as its shape allows, no piece of which
// is drawn twice. Strokes returns them in units of the cap height, Place in
// millimetres in the part's frame.
package label

import (
	"strings"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// The proportions of the characters, in cap heights. Spacing and the height of small
// letters follow the lettering of technical drawings (ISO 3098-1, type B, with lines 1/10
// wide: characters 2/10 and words 6/10 apart from edge to edge of the lines, small letters
// 7/10 high); the widths are our own. Distances here are between middles of lines, taken
// for lines half as wide, as an engraver leaves them.
const (
	smallHeight = 0.7  // of a letter such as x
	descent     = 0.25 // of a letter such as g, below the baseline
	gap         = 0.25 // between the boxes of neighbouring characters
	blankWidth  = 0.15 // of a space, with a gap on either side
)

// Strokes draws text on the baseline y = 0, from x = 0 to the returned width, in units
// of the cap height: letters reach up to 1 and down to -0.25. Every path is one stroke
// and open, even where it comes back to its start. Letters are drawn as given, capital
// or small, since a unit such as mm has no capitals; spaces at either end are dropped.
//
// A text that is blank, longer than MaxLength, or has characters other than
// Characters is refused with profile.Violations.
func Strokes(text string) (paths []fit.Path, width float64, err error) {
	text = strings.Trim(text, " ")
	if found := check(text); len(found) > 0 {
		return nil, 0, found
	}
	x := 0.0
	for _, c := range text {
		g, _ := glyphOf(c)
		for _, s := range g.strokes {
			paths = append(paths, s.path(r2.Vec{X: x}))
		}
		width = x + g.width
		x = width + gap
	}
	return paths, width, nil
}

// Characters are all that a label may hold, in the order the refusal names them.
func Characters() string {
	return "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789.-+/ "
}

// glyphOf is the drawing of one character; ok is false for characters that have none.
func glyphOf(c rune) (g glyph, ok bool) {
	switch {
	case c >= 'A' && c <= 'M':
		g = firstCapital(c)
	case c >= 'N' && c <= 'Z':
		g = secondCapital(c)
	case c >= 'a' && c <= 'm':
		g = firstSmall(c)
	case c >= 'n' && c <= 'z':
		g = secondSmall(c)
	case c >= '0' && c <= '9':
		g = digit(c)
	default:
		g = sign(c)
	}
	return g, g.width > 0
}
