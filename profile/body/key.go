package body

import (
	"fmt"
	"math"

	"flankwright/profile"
)

// keyway is a keyway in a round bore, centered on +Y. Lengths are mm.
type keyway struct {
	width  float64
	corner float64 // radius of the bottom's corners, 0 for sharp ones
	depth  float64 // from the crown of the bore, or from the chord between its edges
	// fromChord says that the depth counts from the straight line between the keyway's
	// edges, sqrt(R^2 - W^2/4) from the axis, as ANSI B17.1 adds it up.
	fromChord bool
}

// bottom is how far from the axis the keyway's bottom is, in a bore of the radius R:
//
//	R + t2                      from the crown
//	sqrt(R^2 - W^2/4) + depth   from the chord
func (k keyway) bottom(radius float64) float64 {
	if k.fromChord {
		return mouth(radius, k.width) + k.depth
	}
	return radius + k.depth
}

// mouth is how far from the axis the chord between the edges of a keyway is.
func mouth(radius, width float64) float64 {
	return math.Sqrt((radius - width/2) * (radius + width/2))
}

// reach is how far from the axis the keyway's corners reach: the center of a corner's
// rounding and the radius beyond.
func (k keyway) reach(radius float64) float64 {
	return math.Hypot(k.width/2-k.corner, k.bottom(radius)-k.corner) + k.corner
}

// radiusReaching is the bore's radius with which the keyway reaches a distance, the
// inverse of reach; it is NaN where there is none.
func (k keyway) radiusReaching(distance float64) float64 {
	arm := distance - k.corner
	across := k.width/2 - k.corner
	bottom := math.Sqrt(arm*arm-across*across) + k.corner
	if k.fromChord {
		return math.Hypot(bottom-k.depth, k.width/2)
	}
	return bottom - k.depth
}

// keySize is a row of a standard: the keyway of bores over one diameter up to and
// including another.
type keySize struct {
	over, to float64 // mm
	keyway
}

// conversionSlack is the relative rounding of a bore converted from inches, within which
// it counts as being on the end of a row.
const conversionSlack = 1e-14

// sized is the row for a bore; false where the table has none.
func sized(rows []keySize, bore float64) (keySize, bool) {
	for _, r := range rows {
		if bore > r.over*(1+conversionSlack) && bore <= r.to*(1+conversionSlack) {
			return r, true
		}
	}
	return keySize{}, false
}

// keyName names a standard and the table it has.
func (k KeyStandard) keyName() (name string, rows []keySize) {
	if k == KeyANSI {
		return "ANSI B17.1", ansiKeys()
	}
	return "ISO 773 (DIN 6885-1)", isoKeys()
}

// keyFor is the keyway a spec asks for, with what was chosen, or what is wrong with it.
func (s Spec) keyFor() (keyway, []Choice, profile.Violations) {
	if s.Keyway.Standard == KeyCustom {
		k := keyway{width: s.Keyway.Width, depth: s.Keyway.Depth}
		if k.width > s.Bore-leastPiece {
			return k, nil, profile.Violations{{Rule: RuleKeywayTooWide, Param: ParamKeyway, Value: profile.LengthOf(k.width),
				Bound: profile.LengthOf(s.Bore).AtMost(),
				Text:  "a keyway {value} wide is wider than the bore", Hint: "make it narrower than {bound}"}}
		}
		return k, []Choice{{Param: ParamKeyway, Value: profile.LengthOf(0), Why: "corner radius of the keyway: none was given, so its corners are sharp"}}, nil
	}
	name, rows := s.Keyway.Standard.keyName()
	row, ok := sized(rows, s.Bore)
	if !ok {
		f := profile.Finding{Rule: RuleNoKeySize, Param: ParamKeyway, Value: profile.LengthOf(s.Bore)}
		first, last := rows[0], rows[len(rows)-1]
		f.Also = []profile.Quantity{profile.LengthOf(first.over), profile.LengthOf(first.to)}
		f.Bound = profile.LengthOf(first.over).AtLeast()
		f.Text = fmt.Sprintf("%s has no key for a bore of {value}: the nearest are for bores over {0} to {1}", name)
		f.Hint = "take a bore over {bound}, or give --keyway as width x depth"
		if s.Bore > last.to {
			f.Also = []profile.Quantity{profile.LengthOf(last.over), profile.LengthOf(last.to)}
			f.Bound = profile.LengthOf(last.to).AtMost()
			f.Hint = "take a bore of at most {bound}, or give --keyway as width x depth"
		}
		return keyway{}, nil, profile.Violations{f}
	}
	return row.keyway, row.choices(s.Keyway.Standard, s.Bore/2), nil
}

// choices tells the size of a standard's keyway.
func (k keyway) choices(standard KeyStandard, radius float64) []Choice {
	name, _ := standard.keyName()
	tell := func(v float64, what string) Choice {
		return Choice{Param: ParamKeyway, Value: profile.LengthOf(v), Why: what + " by " + name + " for the bore"}
	}
	out := []Choice{tell(k.width, "width of the keyway")}
	if standard == KeyANSI {
		corners := Choice{Param: ParamKeyway, Value: profile.LengthOf(0), Why: "corner radius of the keyway: sharp, the general practice by ANSI B17.1"}
		return append(out, tell(radius+k.bottom(radius), "distance T from the keyway's bottom across the bore"), corners)
	}
	return append(out, tell(k.depth, "depth t2 of the keyway from the bore's crown"),
		tell(k.corner, "corner radius r2 of the keyway, the largest allowed"))
}
