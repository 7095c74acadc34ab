package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Feature is the finest of its kind on the body.
type Feature struct {
	Name  string  // "inner radius", "web" or "gap"
	Place string  // what it belongs to, such as "between bore and keyway and window"
	Value float64 // mm
	At    r2.Vec  // where it is
}

// opening notes how narrow a loop is.
func (b *builder) opening(place string, width float64, at r2.Vec) {
	b.openings = append(b.openings, Feature{Name: "gap", Place: place, Value: width, At: at})
}

// features finds the smallest inner radius, web and gap, and warns of those finer than
// the spec's least feature.
func (b *builder) features() {
	for _, of := range [][]Feature{b.innerRadii(), b.webs(), b.openings} {
		if len(of) == 0 {
			continue
		}
		finest := of[0]
		for _, f := range of[1:] {
			if f.Value < finest.Value {
				finest = f
			}
		}
		b.body.Features = append(b.body.Features, finest)
		if finest.Value >= b.spec.MinFeature {
			continue
		}
		b.body.Warnings = append(b.body.Warnings, profile.Finding{Rule: RuleSmallFeature, Param: ParamMinFeature,
			Value: profile.LengthOf(finest.Value), Bound: profile.LengthOf(b.spec.MinFeature),
			Also: []profile.Quantity{profile.LengthOf(finest.At.X), profile.LengthOf(finest.At.Y)},
			Text: "the smallest " + finest.Name + ", " + finest.Place + " near ({0}, {1}), is {value}, below the least feature {bound}",
			Hint: "see that it can be made, or give other sizes"})
	}
}

// innerRadii are the radii of the hollows of the material in the first loop of each
// group: arcs that turn right, and corners that do, with the radius 0.
func (b *builder) innerRadii() []Feature {
	var out []Feature
	for _, g := range b.groups {
		pieces := g.loops[0].Pieces
		for i, p := range pieces {
			from, to := p.Curve.Domain()
			if arc, ok := p.Curve.(profile.CircleArc); ok && to < from {
				out = append(out, Feature{"inner radius", "of the " + g.name, arc.Radius, arc.At((from + to) / 2)})
			}
			next := pieces[(i+1)%len(pieces)].Curve
			start, _ := next.Domain()
			if !p.SmoothEnd && math.Remainder(next.Heading(start)-p.Curve.Heading(to), 2*math.Pi) < 0 {
				out = append(out, Feature{"inner radius", "sharp corner of the " + g.name, 0, p.Curve.At(to)})
			}
		}
	}
	return out
}

// webs are the walls between the loops of each group, between the groups, and to the
// root circle.
func (b *builder) webs() []Feature {
	var out []Feature
	add := func(place string, s span) {
		if !math.IsInf(s.length, 1) {
			out = append(out, Feature{"web", place, s.length, s.middle()})
		}
	}
	for i, g := range b.groups {
		far := g.loops[0].farthest(r2.Vec{})
		if b.around.Form == profile.FormRing {
			near := nearestTo(g.loops[0], r2.Vec{})
			add("between root circle and "+g.name, spanOf(near, r2.Scale(b.root/r2.Norm(near), near)))
			add("between "+g.name+" and outer edge", spanOf(far, r2.Scale(b.around.RimDiameter/2/r2.Norm(far), far)))
		} else {
			add("between root circle and "+g.name, spanOf(far, r2.Scale(b.root/r2.Norm(far), far)))
		}
		if n := len(g.loops); n > 1 {
			// The next is the nearest of the others, turned by the least angle.
			add("between one "+g.name+" and the next", distance(g.loops[0], g.loops[1]))
		}
		for _, o := range b.groups[:i] {
			add("between "+o.name+" and "+g.name, nearestPair(o, g))
		}
	}
	return out
}

// nearestPair is the least distance between the loops of two groups. Holes are compared
// with the window they face; two circles of holes are nearest to each other on +Y, where
// both have one.
func nearestPair(a, b group) span {
	if a.param == ParamHoleCircle && b.param == ParamHoleCircle {
		return distance(a.loops[0], b.loops[0])
	}
	best := span{length: math.Inf(1)}
	for _, l := range a.loops {
		if center, _, ok := l.Circle(); ok && b.param == ParamWindows && l.Kind == Hole {
			best = best.shorter(distance(l, b.facing(center)))
			continue
		}
		for _, m := range b.loops {
			best = best.shorter(distance(l, m))
		}
	}
	return best
}

// rims warns where the rim between roots and a loop is thinner than the backup ratio
// asks. The windows' own rim is asked for or chosen, and judged as such.
func (b *builder) rims() {
	least := backupRatio * b.depth
	if b.around.Form == profile.FormRing {
		return // judged by rim
	}
	for _, g := range b.groups {
		rim, param := b.root-g.loops[0].reach(), g.param
		if g.param == ParamWindows {
			if rim, param = b.spec.Windows.RimWidth, ParamRimWidth; rim == 0 {
				continue
			}
		}
		if rim < least {
			b.body.Warnings = append(b.body.Warnings, profile.Finding{Rule: profile.RuleThinRim, Param: param,
				Value: profile.LengthOf(rim), Bound: profile.LengthOf(least).AtLeast(),
				Text: "the rim between roots and " + g.name + " is only {value} thick; AGMA 2001-D04 reduces the load below {bound} (1.2 whole depths)"})
		}
	}
}
