package mesh

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
	"flankwright/profile/fit"
)

// Drawn is what rolling the drawn curves of both members through a pitch of contact on
// either flank finds. Lengths are mm on the operating pitch circle.
type Drawn struct {
	Left, Right Flank // the flanks on the left and right of member 1's tooth
	Backlash    float64
	// Error is the larger of the two flanks' peak to peak transmission errors.
	Error float64
	// Overlap is by how much the members overlap where they are placed in the middle of
	// their play; 0 unless the backlash found is negative.
	Overlap float64
	// Gap is the smallest distance from a drawn tip to the other's drawn root.
	Gap float64
}

// Flank is one flank's contact, position by position over a pitch.
type Flank struct {
	// Play is how far member 2 may turn, counted on the pitch circle, before it touches.
	Play []float64
	// Error is how much that changes, peak to peak.
	Error float64
}

// Positions is how many positions over a pitch are looked at.
const Positions = 24

// Side is one side of a member's tooth (of a ring's space) as drawn: from the land on.
// Right sides are given as their mirror images.
type Side []fit.Segment

// Curves are the drawn sides of a member and the heights of its tip and root.
type Curves struct {
	Left, Right Side
	Tip, Root   float64 // radii, or a rack's heights
}

// CurvesOf takes the curves from a drawn tooth.
func CurvesOf(outline profile.Outline, f *fit.Tooth) Curves {
	c := Curves{Left: f.Side, Right: f.Side, Tip: outline.Height(f.Side[0].Start), Root: outline.Height(f.Side[len(f.Side)-1].End)}
	if outline.Form == profile.FormRing {
		c.Tip, c.Root = c.Root, c.Tip
	}
	return c
}

// rolling is two members' drawn curves in mesh at a center distance.
type rolling struct {
	Members
	distance      float64
	first, second Curves
	sizes         [2]float64 // angular pitches, of a rack its pitch in mm
	reach         float64    // what turns or moves of member 2 count on the pitch circle
}

// Roll rolls member 2 on member 1. At each position of member 1 it is turned until the
// sides touch: every point of member 1's side, at the height H from member 2's axis, leaves
// it the angle to its own side at H, and the least of these is how far it turns. No
// formula of flank or path of contact is used.
func (m Members) Roll(a float64, first, second Curves) Drawn {
	r := rolling{Members: m, distance: a, first: first, second: second, reach: 1}
	z1, z2 := m.z()
	r.sizes[0] = 2 * math.Pi / z1
	if m.Second == profile.FormRack {
		r.sizes[1] = math.Pi * m.Module
	} else {
		r.sizes[1] = 2 * math.Pi / z2
		r.reach = m.PitchRadii(a)[1]
	}
	d := Drawn{Left: r.flank(first.Left, second.Left), Right: r.flank(first.Right, second.Right)}
	d.Error = math.Max(d.Left.Error, d.Right.Error)
	n := len(d.Left.Play)
	d.Backlash = math.Inf(1)
	for i := range n {
		// What is ahead for one flank is behind for the other.
		d.Backlash = math.Min(d.Backlash, d.Left.Play[i]+d.Right.Play[n-1-i])
	}
	d.Overlap = math.Max(0, -d.Backlash)
	gaps := m.clearances(a, edges{tip: first.Tip, root: first.Root}, edges{tip: second.Tip, root: second.Root})
	d.Gap = math.Min(gaps[0], gaps[1])
	return d
}

// flank follows one flank over a pitch, half of it on either side of the line of centers.
func (r rolling) flank(first, second Side) Flank {
	mate := newLookup(second, r.Second == profile.FormRack)
	mine := first.pieces()
	var f Flank
	least, most := math.Inf(1), math.Inf(-1)
	for i := range Positions {
		turn := r.sizes[0] * (float64(i)/(Positions-1) - 0.5)
		play := r.play(mine, mate, turn)
		f.Play = append(f.Play, play)
		least, most = math.Min(least, play), math.Max(most, play)
	}
	f.Error = most - least
	return f
}

// play is how far member 2 is from touching with any of the teeth near the line of
// centers, on the pitch circle.
func (r rolling) play(first []piece, mate lookup, turn float64) float64 {
	least := math.Inf(1)
	either := 3 // teeth that a contact ratio below 4 needs
	if r.Second == profile.FormRing {
		either = r.Members.Teeth[0] / 2 // tips may cross far from the line of centers
	}
	for k := -either; k <= either; k++ {
		gap := r.gap(first, mate, turn+float64(k)*r.sizes[0])
		least = math.Min(least, gap)
	}
	return least * r.reach
}

// gap is the least angle (a rack's way) between a tooth of member 1 that stands at an
// angle from the line of centers and the side it faces, where member 2 stands as it would
// without error and backlash. Points of the side that reach past member 2's ends face
// nothing.
func (r rolling) gap(first []piece, mate lookup, angle float64) float64 {
	sin, cos := math.Sincos(angle)
	place := func(p r2.Vec) r2.Vec { return r2.Vec{X: p.X*cos - p.Y*sin, Y: p.X*sin + p.Y*cos} }
	ideal := angle / r.sizes[0] * r.sizes[1] // how far member 2 has gone on
	value := func(s *piece, u float64) float64 {
		p := place(s.at(u))
		h, lateral := r.seen(p)
		half, ok := mate.half(h)
		if !ok {
			return math.Inf(1)
		}
		if r.Second == profile.FormRing {
			return half + ideal - lateral
		}
		return lateral + r.sizes[1]/2 - half + ideal
	}
	// Where the least may lie is seen from a few values on every segment: between two of
	// them the gap changes by no more than it does elsewhere on these short segments.
	best := math.Inf(1)
	valleys := make([]valley, len(first))
	for i := range first {
		s := &first[i]
		valleys[i] = look(func(u float64) float64 { return value(s, u) })
		best = math.Min(best, valleys[i].least)
	}
	for i := range first {
		if v := valleys[i]; v.least-v.spread <= best {
			s := &first[i]
			best = math.Min(best, v.bottom(func(u float64) float64 { return value(s, u) }))
		}
	}
	return best
}

// seen is a point as member 2 sees it: its height, and its angle (a rack's way) to the
// left of the line from its axis to member 1's.
func (r rolling) seen(p r2.Vec) (height, lateral float64) {
	switch r.Second {
	case profile.FormRing:
		q := r2.Vec{X: p.X, Y: p.Y + r.distance}
		return math.Sqrt(q.X*q.X + q.Y*q.Y), math.Atan2(-q.X, q.Y)
	case profile.FormRack:
		q := r2.Vec{X: -p.X, Y: r.distance - p.Y}
		return q.Y, -q.X
	}
	q := r2.Vec{X: -p.X, Y: r.distance - p.Y}
	return math.Sqrt(q.X*q.X + q.Y*q.Y), math.Atan2(-q.X, q.Y)
}

// valley is what a few values of a function over 0 to 1 tell.
type valley struct {
	least  float64 // of the values
	at     float64 // where
	spread float64 // between neighbours, at most
}

// coarse is how many steps look takes.
const coarse = 4

// look samples a function, which is infinite where there is nothing to touch.
func look(f func(float64) float64) valley {
	v := valley{least: math.Inf(1)}
	before := math.Inf(1)
	for i := range coarse + 1 {
		u := float64(i) / coarse
		y := f(u)
		if y < v.least {
			v.least, v.at = y, u
		}
		if d := math.Abs(y - before); !math.IsNaN(d) && !math.IsInf(d, 1) {
			v.spread = math.Max(v.spread, d)
		}
		before = y
	}
	return v
}

// bottom closes in on the least value by golden sections: a valley's depth is known to
// rounding when its place is to the root of that.
func (v valley) bottom(f func(float64) float64) float64 {
	const golden, enough = 0.6180339887498949, 1e-7
	low, high := math.Max(0, v.at-1.0/coarse), math.Min(1, v.at+1.0/coarse)
	c, d := high-golden*(high-low), low+golden*(high-low)
	fc, fd := f(c), f(d)
	least := math.Min(v.least, math.Min(fc, fd))
	for high-low > enough {
		if fc < fd || math.IsInf(fd, 1) {
			high, d, fd = d, c, fc
			c = high - golden*(high-low)
			fc = f(c)
			least = math.Min(least, fc)
		} else {
			low, c, fc = c, d, fd
			d = low + golden*(high-low)
			fd = f(d)
			least = math.Min(least, fd)
		}
	}
	return least
}
