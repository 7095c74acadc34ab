package body

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// holes makes the circles of holes and judges each against the roots, its own holes, the
// bore, the windows and the circles before it.
func (b *builder) holes() {
	var earlier []HoleCircle
	others := b.groups
	for i, h := range b.spec.HoleCircles {
		name := "hole"
		if len(b.spec.HoleCircles) > 1 {
			name = fmt.Sprintf("hole of circle %d", i+1)
		}
		g := group{param: ParamHoleCircle, name: name}
		for k := range h.N {
			g.loops = append(g.loops, Loop{Kind: Hole, Name: name, Pieces: fullCircle(h.center(k), h.Diameter/2)})
		}
		b.holesClear(h)
		for _, o := range others {
			b.holesMiss(h, o)
		}
		for _, e := range earlier {
			b.circlesMiss(h, e)
		}
		earlier = append(earlier, h)
		b.groups = append(b.groups, g)
		b.opening(name, h.Diameter, h.center(0))
	}
	b.groups = windowsLast(b.groups)
}

// windowsLast puts the windows behind the holes.
func windowsLast(groups []group) []group {
	var out, last []group
	for _, g := range groups {
		if g.param == ParamWindows {
			last = append(last, g)
		} else {
			out = append(out, g)
		}
	}
	return append(out, last...)
}

// center is where the hole k is, counted counter-clockwise from +Y.
func (h HoleCircle) center(k int) r2.Vec {
	sin, cos := math.Sincos(2 * math.Pi * float64(k) / float64(h.N))
	return r2.Vec{X: -h.Circle / 2 * sin, Y: h.Circle / 2 * cos}
}

// violation is a finding on the holes' diameter, with the circle they are on as {0}.
func (h HoleCircle) violation(rule profile.Rule, largest float64, text, hint string, also ...float64) profile.Finding {
	f := profile.Finding{Rule: rule, Param: ParamHoleCircle, Value: profile.LengthOf(h.Diameter), Bound: profile.LengthOf(largest).AtMost(),
		Also: []profile.Quantity{profile.LengthOf(h.Circle)}, Text: text, Hint: hint}
	for _, v := range also {
		f.Also = append(f.Also, profile.LengthOf(v))
	}
	return f
}

// holesClear checks the holes against the roots and each other: centers are at Circle/2
// from the axis and Circle sin(pi/N) from the next.
func (b *builder) holesClear(h HoleCircle) {
	if b.around.Form == profile.FormRing {
		b.holesInRim(h)
	} else if largest := 2*b.root - h.Circle; (largest-h.Diameter)/2 < leastPiece {
		f := h.violation(RuleHoleIntoRoots, largest, "holes {value} on circle {0} cut into the roots at diameter {1}",
			"make the holes smaller than {bound}, or their circle smaller than {2}", 2*b.root, 2*b.root-h.Diameter)
		if largest <= 2*leastPiece {
			f.Value, f.Bound = profile.LengthOf(h.Circle), profile.LengthOf(2*b.root-h.Diameter).AtMost()
			f.Text, f.Hint = "a hole circle {value} lies in the teeth, whose roots are at diameter {1}", "make it smaller than {bound}"
			if f.Bound.Value <= 0 {
				f.Bound, f.Hint = profile.LengthOf(2*b.root).AtMost(), "make it smaller than {bound}, and the holes smaller too"
			}
		}
		b.refuse(f)
	}
	if h.N < 2 {
		return
	}
	sin := math.Sin(math.Pi / float64(h.N))
	if largest := h.Circle * sin; largest-h.Diameter < leastPiece {
		b.refuse(h.violation(RuleHolesTouch, largest, fmt.Sprintf("%d holes {value} on circle {0} touch each other", h.N),
			"make the holes smaller than {bound}, their circle larger than {1}, or take fewer", h.Diameter/sin))
	}
}

// holesMiss checks the holes against the bore or the windows. A hole may be as large as
// twice the clearance of its center; a center with none wants another circle.
func (b *builder) holesMiss(h HoleCircle, other group) {
	clear := math.Inf(1)
	for k := range h.N {
		center := h.center(k)
		clear = math.Min(clear, other.facing(center).Clearance(center))
	}
	if clear-h.Diameter/2 >= leastPiece {
		return
	}
	reach, inner := other.loops[0].reach(), r2.Norm(nearestTo(other.loops[0], r2.Vec{}))
	rule := RuleHoleIntoBore
	if other.param == ParamWindows {
		rule = RuleHoleIntoWindow
	}
	outside, inside := 2*reach+h.Diameter, 2*inner-h.Diameter
	text, hint := "holes {value} on circle {0} cut into the "+other.name, "make the holes smaller than {bound}, or their circle larger than {1}"
	if rule == RuleHoleIntoWindow && inside > leastPiece {
		hint = "make the holes smaller than {bound}, or their circle larger than {1} or smaller than {2}"
	}
	f := h.violation(rule, 2*clear, text, hint, outside, inside)
	if 2*clear <= 2*leastPiece {
		f.Value, f.Bound = profile.LengthOf(h.Circle), profile.LengthOf(outside).AtLeast()
		f.Text, f.Hint = "a hole circle {value} has holes in the "+other.name, "make it larger than {bound}"
		if rule == RuleHoleIntoWindow && inside > leastPiece {
			f.Hint = "make it larger than {bound}, or smaller than {2}"
		}
	}
	b.refuse(f)
}

// circlesMiss checks two circles of holes against each other. Both have a hole on +Y,
// and no two are nearer to each other than these: with the radii of the circles given,
// the distance of centers grows with the angle between them.
func (b *builder) circlesMiss(h, earlier HoleCircle) {
	apart := math.Abs(h.Circle-earlier.Circle) / 2
	if apart-(h.Diameter+earlier.Diameter)/2 >= leastPiece {
		return
	}
	both := h.Diameter + earlier.Diameter
	f := h.violation(RuleHolesTouch, 2*apart-earlier.Diameter, "holes {value} on circle {0} touch holes on circle {1}",
		"make the holes smaller than {bound}, or their circle larger than {2}", earlier.Circle, earlier.Circle+both)
	if f.Bound.Value <= 2*leastPiece {
		f.Value, f.Bound = profile.LengthOf(h.Circle), profile.LengthOf(earlier.Circle+both).AtLeast()
		f.Text, f.Hint = "holes on circle {value} touch holes on circle {1}", "make the circle larger than {bound}"
	}
	b.refuse(f)
}

// nearestTo is the point of a loop nearest to p.
func nearestTo(l Loop, p r2.Vec) r2.Vec {
	best := span{length: math.Inf(1)}
	for _, piece := range l.Pieces {
		best = best.shorter(spanOf(p, nearestOn(piece.Curve, p)))
	}
	return best.to
}
