package export

import (
	"strconv"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile/fit"
)

// Assembly lays the sheets of several members out on one, each moved from where it is
// drawn. The member's number follows the name of each layer.
func Assembly(unit Unit, members []Drawing, moves []r2.Vec) Drawing {
	d := Drawing{Unit: unit}
	for i, m := range members {
		for _, it := range m.Items {
			it.Layer += Layer("-" + strconv.Itoa(i+1))
			d.Items = append(d.Items, it.moved(moves[i]))
		}
	}
	return d
}

// moved is the item at another place.
func (it Item) moved(by r2.Vec) Item {
	if by == (r2.Vec{}) {
		return it
	}
	if c := it.Circle; c != nil {
		it.Circle = &Circle{Center: r2.Add(c.Center, by), Radius: c.Radius}
		return it
	}
	shift := func(p r2.Vec) r2.Vec { return r2.Add(p, by) }
	path := fit.Path{Closed: it.Path.Closed, Segments: make([]fit.Segment, len(it.Path.Segments))}
	for i, s := range it.Path.Segments {
		path.Segments[i] = s.Mapped(shift, false)
	}
	it.Path = &path
	return it
}
