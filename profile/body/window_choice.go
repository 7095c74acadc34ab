package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// The shape of windows nobody gave. All are ours but the first.
const (
	// backupRatio is the rim thickness under the teeth in whole depths, below which the
	// rim bends noticeably with its teeth: AGMA 2001-D04 reduces the rated load below
	// m_B = 1.2.
	backupRatio = 1.2
	// hubRatio is the hub's diameter in bores; cast and steel hubs are usually made 1.6
	// to 2 bores.
	hubRatio = 1.8
	// hubWall is the least wall of the hub over a keyway, in bores: the wall of a plain
	// bore in a hub of 1.5 bores.
	hubWall = 0.25
	// solidHub is the hub's diameter without a bore, as a share of the windows' outer
	// diameter.
	solidHub = 1.0 / 3
	// armShare is what the arms take of the hub's circumference.
	armShare = 1.0 / 3
	// cornerShare is the corner radius as a share of the windows' depth, and of the
	// largest that fits if that is less.
	cornerShare, cornerOfLargest = 1.0 / 4, 1.0 / 2
)

// windows makes the windows, if any are asked for, with what was not given chosen.
func (b *builder) windows() {
	s := b.spec.Windows
	if s.N == 0 {
		return
	}
	w := window{n: s.N, arm: s.ArmWidth, corner: s.CornerRadius}
	w.outer = b.root - b.rimWidth(s)
	w.hub = b.hubDiameter(s, w.outer) / 2
	if w.hub < leastPiece || w.outer-w.hub < 4*leastPiece {
		b.refuse(b.noRoom(s, w))
		return
	}
	if w.arm == 0 {
		w.arm = armShare * 2 * math.Pi * w.hub / float64(w.n)
		b.choose(ParamArmWidth, w.arm, "the arms take a third of the hub's circumference; ours")
	}
	if widest := w.widestArm(); widest-w.arm < 4*leastPiece {
		b.refuse(profile.Finding{Rule: RuleArmsMeet, Param: ParamArmWidth, Value: profile.LengthOf(w.arm), Bound: profile.LengthOf(widest).AtMost(),
			Also: []profile.Quantity{profile.LengthOf(2 * w.hub), profile.LengthOf(w.arm / w.sin())},
			Text: "arms {value} wide meet each other outside the hub of diameter {0}",
			Hint: "make them narrower than {bound}, or the hub larger than {1}, or take fewer windows"})
		return
	}
	largest := w.largestCorner()
	if w.corner == 0 {
		w.corner = math.Min(cornerShare*(w.outer-w.hub), cornerOfLargest*largest)
		b.choose(ParamWindowRadius, w.corner, "a quarter of the windows' depth, at most half of what fits; ours")
	}
	if w.corner >= largest {
		b.refuse(profile.Finding{Rule: RuleWindowRadiusLarge, Param: ParamWindowRadius, Value: profile.LengthOf(w.corner), Bound: profile.LengthOf(largest).AtMost(),
			Text: "corners of radius {value} do not fit into the windows", Hint: "make them smaller than {bound}"})
		return
	}
	if (Loop{Pieces: w.loop(0)}).shortest() < leastPiece {
		b.refuse(profile.Finding{Rule: RuleNoRoomForWindows, Param: ParamWindows, Value: profile.NumberOf(float64(w.n)),
			Text: "{value} windows are too fine to draw", Hint: "take fewer windows, narrower arms or a larger hub"})
		return
	}
	g := group{param: ParamWindows, name: "window"}
	for k := range w.n {
		g.loops = append(g.loops, Loop{Kind: Hole, Name: g.name, Pieces: w.loop(k)})
	}
	if bore, ok := b.bored(); ok && !hubHolds(g.loops, bore.loops[0]) {
		b.refuse(profile.Finding{Rule: RuleHubIntoBore, Param: ParamHubDiameter, Value: profile.LengthOf(2 * w.hub), Bound: profile.LengthOf(2 * bore.loops[0].reach()).AtLeast(),
			Text: "the " + bore.name + " cuts through the hub of diameter {value}", Hint: "make the hub larger than {bound}"})
		return
	}
	b.groups = append(b.groups, g)
	b.opening("window", w.narrowest(), r2.Vec{})
}

// hubHolds says whether the bore keeps clear of all windows.
func hubHolds(windows []Loop, bore Loop) bool {
	for _, l := range windows {
		start := profile.Start(l.Pieces[4].Curve) // on the hub
		if distance(l, bore).length < leastPiece || bore.Contains(start) {
			return false
		}
	}
	return true
}

// rimWidth is the width of the rim, given or chosen.
func (b *builder) rimWidth(s Windows) float64 {
	if s.RimWidth > 0 {
		return s.RimWidth
	}
	rim := backupRatio * b.depth
	b.choose(ParamRimWidth, rim, "1.2 whole depths, below which AGMA 2001-D04 reduces the load")
	return rim
}

// hubDiameter is the diameter of the hub, given or chosen.
func (b *builder) hubDiameter(s Windows, outer float64) float64 {
	if s.HubDiameter > 0 {
		return s.HubDiameter
	}
	bore, ok := b.bored()
	if !ok {
		hub := solidHub * 2 * outer
		b.choose(ParamHubDiameter, hub, "a third of the windows' outer diameter, as there is no bore; ours")
		return hub
	}
	reach := bore.loops[0].reach()
	across := b.spec.Bore
	if across == 0 {
		across = 2 * reach // of a hexagon
	}
	hub := math.Max(hubRatio*across, 2*(reach+hubWall*across))
	b.choose(ParamHubDiameter, hub, "1.8 bores, and a quarter bore of wall everywhere; usual are 1.6 to 2 bores")
	return hub
}

// noRoom says which of rim and hub to change for the windows to have any depth.
func (b *builder) noRoom(s Windows, w window) profile.Finding {
	f := profile.Finding{Rule: RuleNoRoomForWindows, Param: ParamWindows, Value: profile.NumberOf(float64(s.N)),
		Also: []profile.Quantity{profile.LengthOf(2 * w.outer), profile.LengthOf(2 * w.hub)},
		Text: "there is no room for windows between the rim, inside diameter {0}, and the hub, diameter {1}"}
	switch {
	case s.RimWidth > 0 && b.root-w.hub > 2*leastPiece && w.hub >= leastPiece:
		f.Param, f.Value, f.Bound = ParamRimWidth, profile.LengthOf(s.RimWidth), profile.LengthOf(b.root-w.hub).AtMost()
		f.Hint = "make the rim narrower than {bound}"
	case s.HubDiameter > 0 && w.outer > 4*leastPiece:
		f.Param, f.Value, f.Bound = ParamHubDiameter, profile.LengthOf(s.HubDiameter), profile.LengthOf(2*w.outer).AtMost()
		f.Hint = "make the hub smaller than {bound}"
	case s.RimWidth > 0:
		f.Param, f.Value, f.Bound = ParamRimWidth, profile.LengthOf(s.RimWidth), profile.LengthOf(b.root).AtMost()
		f.Hint = "make the rim narrower than {bound}, and the hub smaller"
	default:
		f.Bound = profile.NumberOf(0)
		f.Hint = "leave --windows out, or give a narrower --rim-width or a smaller --hub-diameter"
	}
	return f
}
