// Package racksweep is the independent check of package profile: it rolls the
// generating rack, as a shape that knows only how far away a point is, over the
// reference circle, and says how close any position of it comes to a point. It
// knows no involute and no fillet; it is for tests.
//
// Lengths are mm, angles rad. The frame is profile's: the gear axis is the
// origin and a tooth is centered on +Y.
package racksweep

import (
	"math"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/profile"
)

// Tool is a generating rack and the gear it is rolled on. A rack tooth is a wedge
// with flanks at the pressure angle, as wide as its space on the datum line but
// for Widening, cut off at Dedendum below the datum line and rounded there. The
// datum line lies Shift outside the reference circle.
type Tool struct {
	Module        float64 // mm
	Teeth         int     // of the gear
	PressureAngle float64 // rad
	Dedendum      float64 // mm, below the datum line
	Rounding      float64 // mm, of the rack's tip
	Shift         float64 // mm, positive away from the gear axis
	Widening      float64 // mm, by which a rack tooth is wider than its space
}

// For is the tool a spec asks for. Thinning by flank widens the rack's teeth;
// by infeed it moves the rack in until its flanks, moved along the reference
// circle, take that much. The rounding is the spec's, so give it the Spec of a
// solved Tooth where it may have been lowered or is the full radius.
func For(s profile.Spec) Tool {
	t := Tool{Module: s.Module, Teeth: s.Teeth, PressureAngle: s.Rack.PressureAngle,
		Dedendum: s.Rack.Dedendum, Rounding: s.Rack.RootRadius, Shift: s.ProfileShift * s.Module}
	if s.ThinningBy == profile.ThinByInfeed {
		// Each flank gives way by tan(alpha) for every mm the rack moves in.
		t.Shift -= s.Thinning / 2 / math.Tan(s.Rack.PressureAngle)
	} else {
		t.Widening = s.Thinning
	}
	return t
}

// Sweep is a tool ready to be rolled. It is not changed by use, so goroutines may
// share it.
type Sweep struct {
	r        float64 // reference radius
	pitch    float64 // angle between teeth
	sin, cos float64 // of the pressure angle
	tan      float64
	tip      float64 // height of the rack's tip over the pitch line
	width    float64 // half width of the rack tooth on the pitch line, flanks extended
	cx, cy   float64 // center of the rounding, from the rack tooth's middle and the pitch line
	rho      float64
	slack    float64
}

// slackModules is how far above the true minimum Clearance may stop, in modules:
// far above the rounding of a double at 2000 teeth (2e-13), far below the
// nanometre per module that the outline is held to.
const slackModules = 1e-11

// New prepares a tool.
func New(t Tool) Sweep {
	s := Sweep{r: t.Module * float64(t.Teeth) / 2, pitch: 2 * math.Pi / float64(t.Teeth),
		tan: math.Tan(t.PressureAngle), rho: t.Rounding, slack: slackModules * t.Module}
	s.sin, s.cos = math.Sincos(t.PressureAngle)
	s.tip = t.Shift - t.Dedendum
	s.width = math.Pi*t.Module/4 + t.Widening/2 - t.Shift*s.tan
	// The center lies a radius inside the flat and a radius inside the flank.
	s.cy = s.tip + t.Rounding
	s.cx = math.Max(s.width+s.cy*s.tan-t.Rounding/s.cos, 0)
	return s
}

// distance is the signed distance from a rack tooth to the point (a, b), a from
// its middle and b over the pitch line, negative inside, and a gradient of it.
// The tooth is what a disk of the rounding's radius covers when its center runs
// over a sharp wedge, so the distance is the wedge's less that radius.
func (s Sweep) distance(a, b float64) (d, da, db float64) {
	side := 1.0
	if a < 0 {
		a, side = -a, -1
	}
	x, y := a-s.cx, b-s.cy
	if along := x*s.sin + y*s.cos; x > 0 && along < 0 {
		d = math.Hypot(x, y)
		return d - s.rho, side * x / d, y / d
	}
	if flank := x*s.cos - y*s.sin; flank > -y {
		return flank - s.rho, side * s.cos, -s.sin
	}
	return -y - s.rho, 0, -1
}

// path is a point of the gear as the rack sees it.
type path struct {
	Sweep
	radius float64 // distance from the gear axis
	angle  float64 // clockwise from the middle of the space the rack tooth cuts
}

// at is the signed distance when the rack has moved by u from where its tooth
// stands in the middle of the space, and its rate by u.
func (p path) at(u float64) (d, rate float64) {
	sin, cos := math.Sincos(p.angle + u/p.r)
	d, da, db := p.distance(p.radius*sin-u, p.radius*cos-p.r)
	k := p.radius / p.r
	return d, da*(k*cos-1) - db*k*sin
}

// Clearance is the least signed distance from the point to any tooth of the rack
// in any position: positive for a point the rack leaves alone, negative for one
// it removes, zero on the outline. Tip circle and tip corner are not the rack's
// work. Where two rack teeth cover a point it is the depth in one of them.
//
// It is exact to 1e-11 modules, and never below the true least distance: see
// least.
func (s Sweep) Clearance(p r2.Vec) float64 {
	radius := math.Hypot(p.X, p.Y)
	// The middle of a space lies half a pitch beside the tooth on +Y.
	angle := math.Remainder(math.Atan2(p.X, p.Y)+s.pitch/2, s.pitch)
	best, _ := path{s, radius, angle}.at(-angle * s.r)
	best = s.least(radius, angle, best)
	reach := s.reach(radius, best)
	for k := 1; ; k++ {
		turn := float64(k) * s.pitch
		left, right := math.Abs(angle-turn) <= reach, math.Abs(angle+turn) <= reach
		if !left && !right || turn > 2*math.Pi {
			return best
		}
		if left {
			best = s.least(radius, angle-turn, best)
		}
		if right {
			best = s.least(radius, angle+turn, best)
		}
	}
}

// window is what a position must satisfy to bring the tooth closer than best.
// The tooth lies above its tip's line, so the point must rise over tip - best:
// its angle from the pitch point is at most swing. And it lies between its
// flanks' lines, so the point must come within side of its middle.
func (s Sweep) window(radius, best float64) (swing, side float64) {
	lowest := (s.r + s.tip - best) / radius
	switch {
	case lowest >= 1:
		swing = 0
	case lowest <= -1:
		swing = math.Pi
	default:
		swing = math.Acos(lowest)
	}
	side = s.width + (radius-s.r)*s.tan + best/s.cos
	return swing, math.Max(side, 0)
}

// reach is the largest angle from the middle of a space at which the tooth that
// cuts it can come closer than best. At the angle b from the pitch point the
// tooth's middle is u = R sin b - a away, so the point's angle is
// b - u/r = b - R/r sin b + a/r with |a| <= side.
func (s Sweep) reach(radius, best float64) float64 {
	swing, side := s.window(radius, best)
	k := radius / s.r
	most := math.Abs(swing - k*math.Sin(swing))
	if k > 1 {
		if turning := math.Acos(1 / k); turning < swing {
			most = math.Max(most, math.Abs(turning-k*math.Sin(turning)))
		}
	}
	return most + side/s.r
}

// least lowers best to the least distance from the tooth that cuts the space at
// the given angle from the point.
//
// The rack tooth is convex, so the distance is a convex function of where the
// point is; the point's path has the acceleration R/r^2. The distance d(u) hence
// bends downwards by no more than K = R/r^2, and around any u
//
//	d(u + e) >= d(u) + d'(u) e - K e^2/2
//
// even where d has a kink. Intervals in which this stays above best are dropped,
// the others halved, so no position is missed.
func (s Sweep) least(radius, angle, best float64) float64 {
	p := path{s, radius, angle}
	swing, side := s.window(radius, best)
	along := radius*math.Sin(math.Min(swing, math.Pi/2)) + side
	from := math.Max((-swing-angle)*s.r, -along)
	to := math.Min((swing-angle)*s.r, along)
	if !(from < to) {
		return best
	}
	bend := radius / (s.r * s.r) / 2
	type interval struct{ mid, half, bound float64 }
	judge := func(mid, half float64) interval {
		d, rate := p.at(mid)
		best = math.Min(best, d)
		return interval{mid, half, d - (math.Abs(rate)+bend*half)*half}
	}
	// Depth first: the stack holds one interval for each halving.
	var room [128]interval
	stack := append(room[:0], judge((from+to)/2, (to-from)/2))
	for len(stack) > 0 {
		i := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		if i.bound >= best-s.slack {
			continue
		}
		half := i.half / 2
		near, far := judge(i.mid-half, half), judge(i.mid+half, half)
		if far.bound < near.bound {
			near, far = far, near
		}
		stack = append(stack, far, near)
	}
	return best
}
