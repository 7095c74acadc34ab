package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// bore makes the bore, if one is asked for.
func (b *builder) bore() {
	switch s := b.spec; {
	case s.BoreHex > 0:
		b.hexagonBore(s.BoreHex)
	case s.Bore == 0:
	case (b.root - s.Bore/2) < leastPiece:
		b.refuse(profile.Finding{Rule: profile.RuleBoreIntoRoots, Param: profile.ParamBore, Value: profile.LengthOf(s.Bore), Bound: profile.LengthOf(2 * b.root).AtMost(),
			Text: "the bore {value} cuts into the roots at diameter {bound}", Hint: "keep the bore below {bound}"})
	case s.Keyway.Standard != KeyNone:
		b.keyedBore()
	case s.BoreFlat > 0:
		b.flatBore()
	default:
		b.addBore(profile.ParamBore, "bore", fullCircle(r2.Vec{}, s.Bore/2))
		b.opening("bore", s.Bore, r2.Vec{})
	}
}

// addBore adds the bore's loop.
func (b *builder) addBore(param profile.Param, name string, pieces []profile.Piece) {
	b.groups = append(b.groups, group{param, name, []Loop{{Kind: Bore, Name: name, Pieces: pieces}}})
}

// fullCircle is a round hole.
func fullCircle(center r2.Vec, radius float64) []profile.Piece {
	return []profile.Piece{{Curve: profile.CircleArc{Center: center, Radius: radius, From: math.Pi / 2, To: -3 * math.Pi / 2}, SmoothEnd: true}}
}

// keyedBore makes a round bore with a keyway.
func (b *builder) keyedBore() {
	k, choices, found := b.spec.keyFor()
	if found != nil {
		b.found = append(b.found, found...)
		return
	}
	radius := b.spec.Bore / 2
	if b.root-k.reach(radius) < leastPiece {
		b.refuse(b.keywayIntoRoots(k))
		return
	}
	b.body.Choices = append(b.body.Choices, choices...)
	b.addBore(ParamKeyway, "bore and keyway", k.loop(radius))
	b.opening("bore", b.spec.Bore, r2.Vec{})
	b.opening("keyway", k.width, r2.Vec{Y: k.bottom(radius)})
}

// loop is the bore of the radius R with the keyway, from the keyway's right edge around
// the bore and up its left side.
func (k keyway) loop(radius float64) []profile.Piece {
	half, r := k.width/2, k.corner
	low, high := mouth(radius, k.width), k.bottom(radius)
	edge := math.Atan2(low, half)
	pieces := []profile.Piece{
		{Curve: profile.CircleArc{Radius: radius, From: edge, To: -math.Pi - edge}},
		{Curve: profile.StraightLine{A: r2.Vec{X: -half, Y: low}, B: r2.Vec{X: -half, Y: high - r}}, SmoothEnd: r > 0},
	}
	corner := func(x, from float64) {
		if r > 0 {
			c := profile.CircleArc{Center: r2.Vec{X: x, Y: high - r}, Radius: r, From: from, To: from - math.Pi/2}
			pieces = append(pieces, profile.Piece{Curve: c, SmoothEnd: true})
		}
	}
	corner(r-half, math.Pi)
	pieces = append(pieces, profile.Piece{Curve: profile.StraightLine{A: r2.Vec{X: r - half, Y: high}, B: r2.Vec{X: half - r, Y: high}}, SmoothEnd: r > 0})
	corner(half-r, math.Pi/2)
	return append(pieces, profile.Piece{Curve: profile.StraightLine{A: r2.Vec{X: half, Y: high - r}, B: r2.Vec{X: half, Y: low}}})
}

// keywayIntoRoots says what would keep the keyway out of the roots: less depth of a
// keyway of one's own, else a smaller bore.
func (b *builder) keywayIntoRoots(k keyway) profile.Finding {
	radius := b.spec.Bore / 2
	f := profile.Finding{Rule: RuleKeywayIntoRoots, Param: ParamKeyway,
		Also: []profile.Quantity{profile.LengthOf(2 * b.root), profile.LengthOf(2 * k.reach(radius))},
		Text: "the keyway reaches diameter {1} and cuts into the roots at {0}"}
	if b.spec.Keyway.Standard == KeyCustom {
		deepest := math.Sqrt((b.root-k.width/2)*(b.root+k.width/2)) - radius
		if deepest > 2*leastPiece {
			f.Value, f.Bound = profile.LengthOf(k.depth), profile.LengthOf(deepest).AtMost()
			f.Hint = "make it less deep than {bound}"
			return f
		}
		f.Param, f.Value = profile.ParamBore, profile.LengthOf(b.spec.Bore)
		f.Hint = "take a smaller keyway, or none"
		if largest := 2 * k.radiusReaching(b.root); largest > k.width+2*leastPiece {
			f.Bound = profile.LengthOf(largest).AtMost()
			f.Hint = "keep the bore below {bound}, or make the keyway smaller"
		}
		return f
	}
	f.Param, f.Value = profile.ParamBore, profile.LengthOf(b.spec.Bore)
	f.Hint = "give --keyway as width x depth, or none"
	_, rows := b.spec.Keyway.Standard.keyName()
	for _, row := range rows {
		if largest := math.Min(2*row.radiusReaching(b.root), row.to); largest > row.over+2*leastPiece {
			f.Bound = profile.LengthOf(largest).AtMost()
			f.Hint = "keep the bore below {bound}, or give --keyway as width x depth"
		}
	}
	return f
}

// flatBore makes a D bore: the flat is F - R above the axis, so that F is what is left
// across the bore.
func (b *builder) flatBore() {
	radius, across := b.spec.Bore/2, b.spec.BoreFlat
	f := profile.Finding{Rule: RuleFlatMissesBore, Param: ParamBoreFlat, Value: profile.LengthOf(across),
		Also: []profile.Quantity{profile.LengthOf(b.spec.Bore)}}
	switch {
	case across > b.spec.Bore-leastPiece:
		f.Bound = profile.LengthOf(b.spec.Bore).AtMost()
		f.Text, f.Hint = "a flat {value} across the bore {0} cuts nothing off", "make it below {bound}"
		b.refuse(f)
		return
	case across < radius+leastPiece:
		f.Bound = profile.LengthOf(radius).AtLeast()
		f.Text, f.Hint = "a flat {value} across the bore {0} is past the axis", "make it above {bound}"
		b.refuse(f)
		return
	}
	height := across - radius
	half := mouth(radius, 2*height)
	edge := math.Atan2(height, half)
	b.addBore(ParamBoreFlat, "D bore", []profile.Piece{
		{Curve: profile.CircleArc{Radius: radius, From: edge, To: -math.Pi - edge}},
		{Curve: profile.StraightLine{A: r2.Vec{X: -half, Y: height}, B: r2.Vec{X: half, Y: height}}},
	})
	b.opening("D bore", across, r2.Vec{})
	b.choose(ParamBoreFlat, 0, "corner radius where the flat meets the bore: none was given, so the corners are sharp")
}

// hexagonBore makes a hexagon with a flat on +Y; its corners are on a circle 2/sqrt 3
// times as large as across flats.
func (b *builder) hexagonBore(across float64) {
	corners := across / math.Sqrt(3)
	if b.root-corners < leastPiece {
		b.refuse(profile.Finding{Rule: profile.RuleBoreIntoRoots, Param: ParamBoreHex, Value: profile.LengthOf(across), Bound: profile.LengthOf(b.root * math.Sqrt(3)).AtMost(),
			Also: []profile.Quantity{profile.LengthOf(2 * corners), profile.LengthOf(2 * b.root)},
			Text: "the corners of the hexagon bore, on diameter {0}, cut into the roots at {1}", Hint: "keep it below {bound} across flats"})
		return
	}
	if corners < leastPiece {
		f, _ := limit{param: ParamBoreHex, value: across, low: leastPiece * math.Sqrt(3), high: maxLength}.check()
		b.refuse(f)
		return
	}
	corner := func(i int) r2.Vec {
		sin, cos := math.Sincos(math.Pi * (2 - float64(i)) / 3)
		return r2.Vec{X: corners * cos, Y: corners * sin}
	}
	var pieces []profile.Piece
	for i := range 6 {
		pieces = append(pieces, profile.Piece{Curve: profile.StraightLine{A: corner(i), B: corner((i + 1) % 6)}})
	}
	b.addBore(ParamBoreHex, "hexagon bore", pieces)
	b.opening("hexagon bore", across, r2.Vec{})
	b.choose(ParamBoreHex, 0, "corner radius of the hexagon: none was given, so its corners are sharp")
}
