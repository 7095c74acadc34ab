package mesh

import (
	"math"

	"flankwright/profile"
	"flankwright/profile/internal/bisect"
)

// Balance says how a sum of shifts is parted.
type Balance uint8

// The ways to part a sum of shifts.
const (
	// BalanceSliding makes the largest specific sliding of both members equal.
	BalanceSliding Balance = iota
	// BalanceEqual gives each member half.
	BalanceEqual
	// BalanceFirst gives all to member 1, but no more than its least tip thickness
	// allows, and no less than keeps it free of undercut.
	BalanceFirst
)

// LeastTip is the least tip thickness in modules that parting a sum of shifts leaves:
// common practice for soft teeth, no source.
const LeastTip = 0.2

// limits are the shifts that keep a member free of undercut and above LeastTip; rings
// and racks are not limited.
func (r Request) limits(i int, shortening float64) (low, high float64) {
	if i == 1 && r.Members().Second != profile.FormGear {
		return -profile.MaxProfileShift, profile.MaxProfileShift
	}
	s := r.Specs[i]
	low = math.Max(-profile.MaxProfileShift, s.Rack.ShiftWithoutUndercut(s.Module, s.Teeth))
	thick := func(x float64) float64 {
		radius := s.Module*(float64(s.Teeth)/2+x) + s.Rack.Addendum - shortening
		if s.TipDiameter != 0 {
			radius = s.TipDiameter / 2
		}
		rb := s.Module * float64(s.Teeth) / 2 * math.Cos(s.Rack.PressureAngle)
		if radius <= rb {
			return 1
		}
		half := (math.Pi/2+2*x*math.Tan(s.Rack.PressureAngle))/float64(s.Teeth) + profile.Inv(s.Rack.PressureAngle) - profile.Inv(math.Acos(rb/radius))
		return 2*radius*half/s.Module - math.Max(LeastTip, s.MinTipThickness/s.Module)
	}
	high = profile.MaxProfileShift
	switch {
	case thick(high) >= 0:
	case thick(low) >= 0:
		high = bisect.Root(thick, low, high)
	case thick(-profile.MaxProfileShift) >= 0:
		high = bisect.Root(thick, -profile.MaxProfileShift, low) // below low: no shift does
	default:
		high = -profile.MaxProfileShift
	}
	return low, high
}

// part parts a sum of shifts at a center distance, and says so where a limit decided.
func (r Request) part(sum, a float64) (shift [2]float64, note string) {
	m := r.Members()
	shortening := r.standardShortening(sum, a)
	low1, high1 := r.limits(0, shortening)
	low2, high2 := r.limits(1, shortening)
	// x2 = S - x1 must keep its own limits.
	low, high := math.Max(low1, sum-high2), math.Min(high1, sum-low2)
	if low > high {
		note = "no parting keeps both members free of undercut and above the least tip thickness"
		// Both lack alike.
		low = math.Min(math.Max((low+high)/2, sum-profile.MaxProfileShift), profile.MaxProfileShift)
		high = low
	}
	x1 := 0.0
	switch r.Balance {
	case BalanceEqual:
		x1 = sum / 2
	case BalanceFirst:
		x1 = math.Min(math.Max(sum, low), high)
	default:
		c := m.action(a)
		uneven := func(x1 float64) float64 {
			one, two := r.tips([2]float64{x1, sum - x1}, a)
			start, end := c.onFirst(two), length(one, c.rb1)
			// At a base circle sliding is without bound: the tip of the other is too long.
			behind := math.Inf(1)
			if m.Second == profile.FormGear {
				behind = c.offset - end
			}
			switch {
			case start <= 0 && behind <= 0:
				return behind - start
			case start <= 0:
				return math.MaxFloat64
			case behind <= 0:
				return -math.MaxFloat64
			}
			first, _ := c.sliding(start)
			_, second := c.sliding(end)
			return math.Abs(first) - math.Abs(second)
		}
		switch {
		case uneven(low) <= 0:
			x1 = low
			if note == "" && uneven(low) < 0 {
				note = "equal sliding lies beyond the limits of undercut and tip thickness; the nearest end is taken"
			}
		case uneven(high) >= 0:
			x1 = high
			if note == "" {
				note = "equal sliding lies beyond the limits of undercut and tip thickness; the nearest end is taken"
			}
		default:
			x1 = bisect.Root(uneven, low, high)
		}
	}
	return [2]float64{x1, sum - x1}, note
}

// tips are the tip radii, of a rack its height, with shifts at a center distance.
func (r Request) tips(shift [2]float64, a float64) (first, second float64) {
	m := r.Members()
	k := r.standardShortening(shift[0]+shift[1], a)
	one, two := r.Specs[0], r.Specs[1]
	first = m.Module*(float64(m.Teeth[0])/2+shift[0]) + one.Rack.Addendum - k
	if one.TipDiameter != 0 {
		first = one.TipDiameter / 2
	}
	switch m.Second {
	case profile.FormRack:
		second = two.Rack.Addendum + shift[1]*m.Module - two.TipShortening
	case profile.FormRing:
		second = m.Module*(float64(m.Teeth[1])/2-shift[1]) - two.Rack.Addendum + two.TipShortening
	default:
		second = m.Module*(float64(m.Teeth[1])/2+shift[1]) + two.Rack.Addendum - k
	}
	if two.TipDiameter != 0 {
		second = two.TipDiameter / 2
	}
	return first, second
}

// standardShortening is what keeps the standard clearance between external teeth,
// k m = S m - (a - a0); 0 for rings and racks.
func (r Request) standardShortening(sum, a float64) float64 {
	m := r.Members()
	if m.Second != profile.FormGear {
		return 0
	}
	return math.Max(0, sum*m.Module-(a-m.Reference()))
}
