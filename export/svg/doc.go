// Package svg writes a drawing as SVG that cutters and sketchers take at true
// size: one user unit is one unit of the drawing, the numbers carry everything
// and no transform, style sheet or reference is needed to read them.
//
// The part is one path: outer loop first, holes in the same path data, wound
// the other way, so that both fill rules leave them open. Markers (reference
// circles and the like) are elements of their own in a group named after their
// layer.
//
// The shell comes from github.com/ajstarks/svgo/float; path data are written
// here, since that module rounds to a fixed number of digits, allocates for
// each coordinate and cannot build a path of several pieces.
package svg
