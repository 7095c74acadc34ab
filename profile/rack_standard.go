package profile

import (
	"math"
	"slices"
)

// millimetresPerInch is exact by definition.
const millimetresPerInch = 25.4

// finePitch is the diametral pitch in 1/inch from which the fine-pitch system
// holds (ANSI B6.7-1977).
const finePitch = 20

// pitchSlack is the relative amount by which a module may miss the fine-pitch
// border and still count as on it: 25.4/20 and 1.27 differ in the last bit, and
// a module is never written with twelve digits.
const pitchSlack = 1e-12

// StandardRack is a basic rack by name, in units of the module.
type StandardRack struct {
	Name   string
	Pitch  string // which sizes it is for, "" for all
	Source string
	Note   string // what is ours and not the standard's

	PressureAngle float64 // rad
	Addendum      float64 // modules
	Dedendum      float64 // modules
	RootRadius    float64 // modules; NaN where the standard names none

	dedendumAllowance float64 // mm, added to the dedendum
	fine, coarse      bool    // holds only from, only below, finePitch
}

const roundingNote = "the standard names no rounding: ours is the largest that keeps the rack flank straight down to the addendum depth, c/(1 - sin alpha), at most the full radius"

// DedendumText is the dedendum in modules, with the fixed part of the fine-pitch
// system beside it.
func (s StandardRack) DedendumText() string {
	text := NumberOf(s.Dedendum).String()
	if s.dedendumAllowance != 0 {
		text += " + " + NumberOf(s.dedendumAllowance/millimetresPerInch).String() + " in"
	}
	return text
}

// StandardRacks lists the basic racks known by name.
func StandardRacks() []StandardRack {
	const deg = math.Pi / 180
	none := math.NaN()
	iso := func(name string, dedendum, radius float64, kind string) StandardRack {
		return StandardRack{Name: name, Source: "ISO 53:1998, type " + kind,
			PressureAngle: 20 * deg, Addendum: 1, Dedendum: dedendum, RootRadius: radius}
	}
	return []StandardRack{
		iso("iso53-a", 1.25, 0.38, "A"),
		iso("iso53-b", 1.25, 0.30, "B"),
		iso("iso53-c", 1.25, 0.25, "C"),
		iso("iso53-d", 1.40, 0.39, "D"),
		{Name: "full-depth-20", Pitch: "below 20 P", Source: "AGMA 201.02, coarse pitch",
			PressureAngle: 20 * deg, Addendum: 1, Dedendum: 1.25, RootRadius: 0.30, coarse: true},
		{Name: "full-depth-20", Pitch: "20 P and finer", Source: "ANSI B6.7-1977, fine pitch", Note: roundingNote,
			PressureAngle: 20 * deg, Addendum: 1, Dedendum: 1.2, RootRadius: none,
			dedendumAllowance: 0.002 * millimetresPerInch, fine: true},
		{Name: "full-depth-14.5", Source: "ANSI B6.1-1968, 14.5 degree full depth",
			PressureAngle: 14.5 * deg, Addendum: 1, Dedendum: 1.157, RootRadius: 0.209},
		{Name: "full-depth-25", Source: "AGMA 201.02, 25 degree",
			PressureAngle: 25 * deg, Addendum: 1, Dedendum: 1.25, RootRadius: 0.30},
		{Name: "stub-20", Source: "ANSI B6.1-1968, 20 degree stub", Note: roundingNote,
			PressureAngle: 20 * deg, Addendum: 0.8, Dedendum: 1, RootRadius: none},
	}
}

// LookupRack finds the standard rack of that name for a module in mm; false when
// there is none.
func LookupRack(name string, module float64) (StandardRack, bool) {
	fine := module <= millimetresPerInch/finePitch*(1+pitchSlack)
	racks := StandardRacks()
	i := slices.IndexFunc(racks, func(s StandardRack) bool {
		return s.Name == name && (!s.fine || fine) && (!s.coarse || !fine)
	})
	if i < 0 {
		return StandardRack{}, false
	}
	return racks[i], true
}

// RackChange overrides single values of a standard rack; nil keeps the
// standard's. PressureAngle is in rad, the others in mm.
type RackChange struct {
	PressureAngle, Addendum, Dedendum, RootRadius *float64
}

// For is the rack in mm for a module in mm, with the changes applied.
func (s StandardRack) For(module float64, change RackChange) BasicRack {
	value := func(own *float64, standard float64) float64 {
		if own != nil {
			return *own
		}
		return standard
	}
	b := BasicRack{
		PressureAngle: value(change.PressureAngle, s.PressureAngle),
		Addendum:      value(change.Addendum, s.Addendum*module),
		Dedendum:      value(change.Dedendum, s.Dedendum*module+s.dedendumAllowance),
	}
	b.RootRadius = value(change.RootRadius, s.rounding(module, b))
	return b
}

// rounding is the standard's root radius in mm or, where it names none, ours:
// the largest that leaves the flank of the rack straight down to its addendum
// depth, c/(1 - sin alpha) (the limit ISO 53:1998 sets), within the full radius.
func (s StandardRack) rounding(module float64, b BasicRack) float64 {
	if !math.IsNaN(s.RootRadius) {
		return s.RootRadius * module
	}
	clearance := b.Dedendum - b.Addendum
	largest := clearance / (1 - math.Sin(b.PressureAngle))
	return math.Max(0, math.Min(largest, b.FullRadius(module, 0)))
}
