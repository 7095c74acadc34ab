package profile_test

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// joint is the gap allowed between one curve's end and the next one's start, in
// modules: the rounding of the angles, 1e-15, at a radius of 1000 modules.
const joint = 1e-12

// tangent is the turn allowed at a smooth joint, in rad.
const tangent = 1e-9

// sound says what is wrong with a solved tooth by itself: numbers that are not
// finite, joints that gape or bend, a side that does not fall steadily from tip to
// root, a land or flank of no length. Nil if nothing is.
func sound(tooth *profile.Tooth) error {
	d := tooth.Dimensions
	for i, v := range []float64{d.Module, d.ReferenceDiameter, d.BaseDiameter, d.TipDiameter, d.RootDiameter, d.FormDiameter,
		d.TipFormDiameter, d.CircularPitch, d.BasePitch, d.TipThickness, d.TipLand, d.WholeDepth, d.MinFilletRadius} {
		// A sharp rack corner on the pitch line leaves a sharp root.
		sharp := i == 12 && v == 0 && tooth.Spec.Rack.RootRadius == 0
		if !(v > 0) && !sharp || math.IsInf(v, 0) {
			return fmt.Errorf("dimension %d of %+v is not positive", i, d)
		}
	}
	for _, v := range []float64{d.ToothThickness, d.SpaceWidth, d.Addendum, d.Dedendum, d.WorkingDepth, d.Clearance} {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return fmt.Errorf("%+v has a number that is not finite", d)
		}
	}
	if !(d.RootDiameter <= d.FormDiameter*(1+rounding) && d.FormDiameter < d.TipFormDiameter && d.TipFormDiameter <= d.TipDiameter*(1+rounding)) {
		return fmt.Errorf("diameters of root, form, tip form and tip do not rise: %+v", d)
	}
	for _, f := range tooth.Warnings {
		if f.Text == "" || f.Rule == "" || math.IsNaN(f.Value.Value) || math.IsNaN(f.Bound.Value) {
			return fmt.Errorf("warning %+v", f)
		}
	}
	chain := append([]profile.Piece{{Part: profile.PartLand, Curve: tooth.Land, SmoothEnd: tooth.LandSmooth}}, tooth.Side...)
	if tooth.Root != nil {
		chain = append(chain, profile.Piece{Part: profile.PartRoot, Curve: tooth.Root, SmoothEnd: true})
	}
	for i, p := range chain {
		if err := soundCurve(p.Curve, p.Part, d.Module); err != nil {
			return fmt.Errorf("part %d: %w", p.Part, err)
		}
		if i+1 == len(chain) {
			break
		}
		next := chain[i+1].Curve
		if gap := norm(r2.Sub(profile.Start(next), profile.End(p.Curve))); !(gap <= joint*d.Module) {
			return fmt.Errorf("gap of %.3g modules after part %d", gap/d.Module, p.Part)
		}
		_, to := p.Curve.Domain()
		from, _ := next.Domain()
		bend := math.Remainder(next.Heading(from)-p.Curve.Heading(to), 2*math.Pi)
		if p.SmoothEnd && !(math.Abs(bend) <= tangent) {
			return fmt.Errorf("bend of %.3g rad after part %d", bend, p.Part)
		}
	}
	return soundEnds(tooth, chain)
}

// soundCurve checks one curve at many points: finite, and falling steadily from
// tip to root, but for the circles about the axis.
func soundCurve(c profile.Curve, part profile.Part, module float64) error {
	const points = 24
	last := math.Inf(1)
	for _, u := range along(c, points) {
		p := c.At(u)
		if r := norm(p); part == profile.PartLand || part == profile.PartRoot {
			last = r
		} else if !(r <= last+joint*module) {
			return fmt.Errorf("rises at parameter %v from radius %v to %v", u, last, r)
		} else {
			last = r
		}
		for i, v := range []float64{p.X, p.Y, c.Heading(u), c.Speed(u), c.Curvature(u), c.CurvatureRate(u)} {
			// An involute that starts on the base circle has a cusp there.
			cusp := part == profile.PartFlank && u == 0 && i >= 4
			if (math.IsNaN(v) || math.IsInf(v, 0)) && !cusp {
				return fmt.Errorf("value %d at parameter %v is %v", i, u, v)
			}
		}
	}
	// A chamfer of some length has some, but a flank may end a hair below its tip.
	if from, to := c.Domain(); from == to {
		return fmt.Errorf("no length, from %v to %v", from, to)
	}
	return nil
}

// soundEnds checks that the chain spans half a pitch: the land is centered on +Y,
// and the other end lies in the middle of the space or at the far side of the root
// arc, which is the mirror image of its near side.
func soundEnds(tooth *profile.Tooth, chain []profile.Piece) error {
	slack := joint * tooth.Spec.Module
	mirror := profile.Start(tooth.Land)
	if end := profile.End(tooth.Land); !(math.Abs(mirror.X+end.X) <= slack && math.Abs(mirror.Y-end.Y) <= slack) {
		return fmt.Errorf("land from %v to %v is not centered", mirror, end)
	}
	half := math.Pi / float64(tooth.Spec.Teeth)
	sin, cos := math.Sincos(half)
	across := func(p r2.Vec) float64 { return p.X*cos + p.Y*sin } // from the space's middle line
	end := profile.End(tooth.Side[len(tooth.Side)-1].Curve)
	if tooth.Root == nil {
		if !(math.Abs(across(end)) <= slack) {
			return fmt.Errorf("the fillet ends %v from the middle of the space", across(end))
		}
		return nil
	}
	far := profile.End(tooth.Root)
	if !(math.Abs(across(end)+across(far)) <= 2*slack) {
		return fmt.Errorf("root arc from %v to %v is not centered in the space", end, far)
	}
	if last := chain[len(chain)-1].Curve; last != profile.Curve(tooth.Root) {
		return fmt.Errorf("the root is not last")
	}
	if !(across(end) > 0) {
		return fmt.Errorf("the fillet passes the middle of the space by %v", -across(end))
	}
	return nil
}
