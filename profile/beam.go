package profile

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"
)

// Leftover is a place a beam cannot reach: material it leaves on the part.
type Leftover struct {
	At    r2.Vec  // where it stands out most, on the part's exact edge
	Depth float64 // mm, thickness over the part's edge there
}

// Beam is the path of a beam's middle along the toothed edge, the exact parallel at
// half the beam's width on the scrap side.
type Beam struct {
	Outline
	Width float64 // mm
	// Leftovers are the places of one space the beam cannot reach: beside both
	// fillets, or one in the middle.
	Leftovers []Leftover
}

// Beam finds the path of a beam of that width in mm.
//
// Every curve has an exact parallel: flanks are turned about the same base circle, the
// fillet keeps the path of the rounding's center and has half the width taken off its
// radius, circles about the axis grow. About convex corners the path is an arc. Where
// half the width is above the fillet's least radius of curvature the parallel folds; it
// is cut where it meets the root circle's parallel, or the other fillet's, and what stays
// in the corner is reported. A beam that cannot follow the flank down to its form circle
// is refused with the largest that can.
func (t *Tooth) Beam(width float64) (*Beam, error) {
	l := limit{param: ParamKerf, value: width, low: 0, high: 2 * MaxModule, dimension: Length, open: true}
	if f, bad := l.check(); bad {
		return nil, Violations{f}
	}
	b, ok := t.beam(width)
	if ok {
		return b, nil
	}
	largest := largestBelow(func(w float64) float64 {
		if w == 0 {
			return 1
		}
		if _, ok := t.beam(w); ok {
			return 1
		}
		return -1
	}, width)
	return nil, Violations{{Rule: RuleKerfTooWide, Param: ParamKerf, Value: LengthOf(width), Bound: LengthOf(largest).AtMost(),
		Text: "a beam {value} wide cannot cut the flanks down to their form circle",
		Hint: "it can be at most {bound} wide"}}
}

// beam is Beam without the words; false where the beam does not reach the form circle.
func (t *Tooth) beam(width float64) (*Beam, bool) {
	if t.Form != FormGear {
		return t.beamAlong(width)
	}
	d := width / 2
	b := &Beam{Width: width, Outline: Outline{Form: t.Form, Teeth: t.Teeth, Advance: t.Advance, LandSmooth: true,
		Land: t.Land.Parallel(d)}}
	_, landEnd := t.Land.Domain()
	heading := t.Land.Heading(landEnd)
	corner := !t.LandSmooth
	at := End(t.Land)
	for i, p := range t.Side {
		from, to := p.Curve.Domain()
		if corner {
			arc, convex := aroundCorner(at, heading, p.Curve.Heading(from), d)
			if !convex || !t.clearOfNextTooth(arc) {
				return nil, false
			}
			b.Side = append(b.Side, Piece{Part: p.Part, Curve: arc, SmoothEnd: true})
		}
		if fillet, ok := p.Curve.(Fillet); ok {
			return b, t.beamRoot(b, fillet, d)
		}
		// The next piece, or the arc about the corner before it, goes on smoothly.
		b.Side = append(b.Side, Piece{Part: p.Part, Curve: p.Curve.Parallel(d), SmoothEnd: i < len(t.Side)-1})
		heading, at, corner = p.Curve.Heading(to), End(p.Curve), !p.SmoothEnd
	}
	return nil, false // no fillet: an inner corner at the very end of the flank
}

// aroundCorner is the arc of radius d about a corner of the part from one heading to
// the next; false where the path turns right, into a hollow.
func aroundCorner(at r2.Vec, before, after, d float64) (CircleArc, bool) {
	turn := math.Remainder(after-before, 2*math.Pi)
	from := before - math.Pi/2
	return CircleArc{Center: at, Radius: d, From: from, To: from + turn}, turn > 0
}

// clearOfNextTooth says whether an arc about a corner stays on its side of the middle
// of the space. Seen from the axis it reaches asin(d/R) beyond its center, which lies at
// the radius R, or to its ends.
func (t *Tooth) clearOfNextTooth(arc CircleArc) bool {
	radius := r2.Norm(arc.Center)
	if arc.Radius >= radius {
		return false
	}
	center := math.Atan2(-arc.Center.X, arc.Center.Y)
	reach := math.Asin(arc.Radius / radius)
	// The touching point lies at the angle center + reach + pi/2 about the arc's middle,
	// counted from +Y, which is pi/2 more from +X.
	touch := math.Pi/2 + center + reach + math.Pi/2
	beyond := math.Remainder(touch-arc.From, 2*math.Pi)
	far := math.Max(polarAngle(Start(arc)), polarAngle(End(arc)))
	if beyond >= 0 && beyond <= arc.To-arc.From {
		far = center + reach
	}
	return far < t.Pitch()/2
}

// polarAngle is the angle of a point about the axis from +Y, counter-clockwise.
func polarAngle(p r2.Vec) float64 { return math.Atan2(-p.X, p.Y) }

// beamRoot adds the fillet's and the root's path to b; false where the beam does not
// get below the flank.
func (t *Tooth) beamRoot(b *Beam, exact Fillet, d float64) bool {
	f := exact.Parallel(d).(Fillet)
	middle := t.Pitch() / 2
	bottom := exact.radius(exact.To) + d
	speed := func(p float64) float64 {
		_, g, _, _ := f.rates(p)
		return g
	}
	if speed(f.From) <= 0 || f.halfAngle(f.From) >= middle {
		return false
	}
	if speed(f.To) < 0 {
		// The parallel's radius falls until it folds and comes back to the root
		// circle's parallel at the end: it has met it once before.
		fold := bracketedRoot(speed, f.From, f.To)
		if f.radius(f.From) <= bottom {
			return false
		}
		f.To = bracketedRoot(func(p float64) float64 { return f.radius(p) - bottom }, f.From, fold)
	}
	cut := f.To < exact.To
	if f.halfAngle(f.To) >= middle && (cut || t.Root != nil) {
		// Both fillets' paths meet before they come to the root.
		f.To = bracketedRoot(func(p float64) float64 { return f.halfAngle(p) - middle }, f.From, f.To)
		cut = true
		b.Side = append(b.Side, Piece{Part: PartFillet, Curve: f})
		b.Leftovers = t.left(exact, f, true)
		return true
	}
	b.Side = append(b.Side, Piece{Part: PartFillet, Curve: f, SmoothEnd: !cut})
	if t.Root != nil || cut {
		from := math.Pi/2 + f.halfAngle(f.To)
		b.Root = CircleArc{Radius: bottom, From: from, To: math.Pi + 2*middle - from}
	}
	if cut {
		b.Leftovers = t.left(exact, f, false)
	}
	return true
}

// left finds what the beam leaves where its path turns sharply at the end of f: the
// point of the part's fillet (or of its root) farthest from the beam's disc there. In
// the middle of the space there is one such place, else one beside either fillet.
func (t *Tooth) left(exact, f Fillet, inMiddle bool) []Leftover {
	disc := End(f)
	half := exact.Rounding - f.Rounding // half the beam's width
	worst := Leftover{Depth: 0}
	judge := func(p r2.Vec) float64 {
		depth := r2.Norm(r2.Sub(p, disc)) - half
		if depth > worst.Depth {
			worst = Leftover{At: p, Depth: depth}
		}
		return depth
	}
	search(func(u float64) float64 { return judge(exact.At(f.To + u*(exact.To-f.To))) })
	// The disc touches the root circle below its center.
	if t.Root != nil {
		from, _ := t.Root.Domain()
		if touch := math.Pi/2 + polarAngle(disc); touch > from {
			search(func(u float64) float64 { return judge(t.Root.At(from + u*(touch-from))) })
		}
	}
	if inMiddle {
		return []Leftover{worst}
	}
	// The mirror image beside the next tooth's fillet, seen in the same space.
	m := r2.Rotate(r2.Vec{X: -worst.At.X, Y: worst.At.Y}, t.Pitch(), r2.Vec{})
	return []Leftover{worst, {At: m, Depth: worst.Depth}}
}

// search calls value, a function with one peak, at places that close in on the peak.
func search(value func(u float64) float64) {
	const coarse = 16
	best, at := math.Inf(-1), 0.0
	for i := range coarse + 1 {
		u := float64(i) / coarse
		if v := value(u); v > best {
			best, at = v, u
		}
	}
	for step := 0.5 / coarse; step > peakResolution; step /= 2 {
		for _, u := range [2]float64{math.Max(0, at-step), math.Min(1, at+step)} {
			if v := value(u); v > best {
				best, at = v, u
			}
		}
	}
}

// peakResolution is the share of a curve to which a peak is found: its height, flat
// there, is then known to rounding.
const peakResolution = 1e-8
