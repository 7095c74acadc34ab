package sheet

import (
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/fixed"
)

// bounds is the least box around the items, rounded.
func bounds(items []export.Item) r2.Box {
	box := export.Drawing{Items: items}.Bounds()
	return r2.Box{
		Min: r2.Vec{X: fixed.Round(box.Min.X), Y: fixed.Round(box.Min.Y)},
		Max: r2.Vec{X: fixed.Round(box.Max.X), Y: fixed.Round(box.Max.Y)},
	}
}
