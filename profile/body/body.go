package body

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Body is what was solved inside the teeth.
type Body struct {
	Around   Around
	Loops    []Loop // the bore first, then holes, then windows
	Warnings []profile.Finding
	Choices  []Choice  // what nobody gave
	Features []Feature // the finest ones; none without loops
}

// Choice is a value nobody gave and that was chosen here, and the reason.
type Choice struct {
	Param profile.Param
	Value profile.Quantity
	Why   string
}

// The rules a body can break.
const (
	RuleNoKeySize         profile.Rule = "no-key-size"
	RuleKeywayTooWide     profile.Rule = "keyway-too-wide"
	RuleKeywayIntoRoots   profile.Rule = "keyway-into-roots"
	RuleFlatMissesBore    profile.Rule = "flat-misses-bore"
	RuleHolesTouch        profile.Rule = "holes-touch"
	RuleHoleIntoRoots     profile.Rule = "hole-into-roots"
	RuleHoleIntoBore      profile.Rule = "hole-into-bore"
	RuleHoleIntoWindow    profile.Rule = "hole-into-window"
	RuleRimTooThin        profile.Rule = "rim-too-thin"
	RuleHoleThroughRim    profile.Rule = "hole-through-rim"
	RuleNoRoomForWindows  profile.Rule = "no-room-for-windows"
	RuleHubIntoBore       profile.Rule = "hub-into-bore"
	RuleArmsMeet          profile.Rule = "arms-meet"
	RuleWindowRadiusLarge profile.Rule = "window-radius-too-large"
	// RuleSmallFeature is a warning.
	RuleSmallFeature profile.Rule = "small-feature"
)

// builder collects what becomes of a spec.
type builder struct {
	spec     Spec
	around   Around
	root     float64 // mm, radius of the root circle
	depth    float64 // mm, whole depth of the teeth
	body     *Body
	found    profile.Violations
	groups   []group
	openings []Feature
}

// group are loops that belong together: the bore, one circle of holes, or the windows.
// With equal spacing, its loops are rotations of the first.
type group struct {
	param profile.Param
	name  string // of one of its loops
	loops []Loop
}

// facing is the loop of a bore or of windows that is nearest to p or has it inside. Of
// windows that is the one between the same two arms, since the middle of an arm is a
// plane of symmetry: of two mirror images the one on one's own side is nearer.
func (g group) facing(p r2.Vec) Loop {
	turn := math.Atan2(-p.X, p.Y) / (2 * math.Pi) // from +Y, counter-clockwise
	n := len(g.loops)
	return g.loops[int(math.Floor((turn-math.Floor(turn))*float64(n)))%n]
}

// Solve makes the body a Spec asks for, or says why it cannot be made: the error is of
// type profile.Violations and holds all that was found.
//
// Loops keep clear of each other and of the root circle. What is made but too thin or
// too fine for what the standards or the spec ask is warned of.
//
// Properties of a solution, each with its test:
//
//	1  Every loop is closed, clockwise, and simple; smooth joints are smooth.
//	2  Loops are outside each other and inside the root circle.
//	3  A body of k times the lengths is k times as large (with custom keyways).
//	4  Holes and windows are rotations of the first; each body is its own mirror image
//	   in the y axis, as all that is centered on +Y is.
//	5  What is refused with a bound on a value is made, or refused for another reason,
//	   within the bound.
//	6  Widths, depths and walls measured on the loops are those asked for.
func Solve(s Spec, around Around) (*Body, error) {
	if found := s.checkLimits(around); found != nil {
		return nil, found
	}
	b := &builder{spec: s, around: around, root: around.RootDiameter / 2, depth: around.WholeDepth, body: &Body{Around: around}}
	b.rim()
	b.bore()
	b.windows()
	b.holes()
	if b.found != nil {
		return nil, b.found
	}
	for _, g := range b.groups {
		b.body.Loops = append(b.body.Loops, g.loops...)
	}
	b.rims()
	b.features()
	return b.body, nil
}

// refuse notes a violation.
func (b *builder) refuse(f profile.Finding) { b.found = append(b.found, f) }

// choose notes a choice.
func (b *builder) choose(param profile.Param, value float64, why string) {
	b.body.Choices = append(b.body.Choices, Choice{Param: param, Value: profile.LengthOf(value), Why: why})
}

// bored is the bore; false if there is none.
func (b *builder) bored() (group, bool) {
	if len(b.groups) > 0 && b.groups[0].loops[0].Kind == Bore {
		return b.groups[0], true
	}
	return group{}, false
}

// HoleArea is the area of all the loops in mm^2.
func (b *Body) HoleArea() float64 {
	sum := 0.0
	for _, l := range b.Loops {
		sum += l.Area()
	}
	return sum
}

// Clearance is the distance in mm from p to the nearest edge of the web, which is that
// of what the teeth leave or a loop: positive on the web, negative off it. It changes by
// no more than p moves.
func (b *Body) Clearance(p r2.Vec) float64 {
	least := b.Around.clearance(p)
	for _, l := range b.Loops {
		if least < 0 {
			return least
		}
		least = math.Min(least, l.Clearance(p))
	}
	return least
}
