package gauge

import (
	"math"
	"slices"

	"flankwright/profile"
)

// size is a module in mm and how it is named.
type size struct {
	module    float64 // mm
	pitch     float64 // 1/inch, 0 for one of the modules
	preferred bool
}

// candidate is a basic rack an unknown gear may have been cut with.
type candidate struct {
	size
	angle    float64 // rad
	addendum float64 // modules
}

// sizes are the sizes an unknown gear may have: the preferred ones, then modules of
// the third choice (JIS B 1701:1973, from memory) and whole and half pitches up to 20
// P and whole ones up to 64 P (cutters of all these are sold; common practice, no
// source).
func sizes() []size {
	var all []size
	modules, pitches := profile.PreferredModules(), profile.PreferredPitches()
	for _, m := range modules {
		all = append(all, size{module: m, preferred: true})
	}
	for _, p := range pitches {
		all = append(all, size{module: millimetresPerInch / p, pitch: p, preferred: true})
	}
	for _, m := range []float64{0.15, 0.35, 0.45, 0.55, 0.65, 0.75, 3.25, 3.75, 6.5} {
		all = append(all, size{module: m})
	}
	const halvesTo, wholeTo = 20, 64
	for half := 2; half <= 2*wholeTo; half++ {
		p := float64(half) / 2
		if (half%2 == 1 && p > halvesTo) || slices.Contains(pitches, p) {
			continue
		}
		all = append(all, size{module: millimetresPerInch / p, pitch: p})
	}
	return all
}

// pressureAngles are those an unknown gear may have, in rad.
func pressureAngles() []float64 {
	angles := []float64{14.5, 15, 17.5, 20, 22.5, 25, 30}
	for i := range angles {
		angles[i] *= math.Pi / 180
	}
	return angles
}

// addenda are those of the standard racks of a pressure angle, in modules, or 1 where
// there is none.
func addenda(angle float64) []float64 {
	var all []float64
	for _, s := range profile.StandardRacks() {
		if s.PressureAngle == angle && !slices.Contains(all, s.Addendum) {
			all = append(all, s.Addendum)
		}
	}
	if all == nil {
		return []float64{1}
	}
	return all
}

// racks names the standard racks of the candidate.
func (c candidate) racks() []string {
	var names []string
	for _, s := range profile.StandardRacks() {
		holds, ok := profile.LookupRack(s.Name, c.module)
		if ok && holds.PressureAngle == c.angle && holds.Addendum == c.addendum && !slices.Contains(names, s.Name) {
			names = append(names, s.Name)
		}
	}
	return names
}

// gear is the candidate as a gear of so many teeth, with its thickness beyond pi m/2.
// It has no circles: nothing is asked of it that needs them.
func (c candidate) gear(teeth int, delta float64) Gear {
	g := Gear{spec: Spec{Module: c.module, Teeth: teeth, PressureAngle: c.angle}, tan: math.Tan(c.angle), inv: profile.Inv(c.angle)}
	g.sin, g.cos = math.Sincos(c.angle)
	g.r = c.module * float64(teeth) / 2
	g.rb = g.r * g.cos
	g.thickness = g.pitch()/2 + delta
	return g
}
