package gauge

import (
	"math"

	"flankwright/profile"
)

// interval is what the readings, each off by at most u in mm, leave for delta, the
// thickness beyond pi m/2 in mm; low > high where they leave nothing.
func (m Measurements) interval(c candidate, u float64) (low, high float64) {
	g := c.gear(m.Teeth, 0)
	low, high = math.Inf(-1), math.Inf(1)
	keep := func(a, b float64) {
		if !(a <= b) { // or NaN: no tooth gives this reading
			a, b = math.Inf(1), math.Inf(-1)
		}
		low, high = math.Max(low, a), math.Min(high, b)
	}
	for _, s := range m.Spans {
		at := g.span(float64(s.TeethSpanned))
		keep((s.Value-u-at)/g.cos, (s.Value+u-at)/g.cos)
	}
	for _, p := range m.Pins {
		keep(g.deltaOverPins(p.PinDiameter, p.Value-u), g.deltaOverPins(p.PinDiameter, p.Value+u))
	}
	least, most := m.shifts(c, u)
	if least > most {
		return math.Inf(1), math.Inf(-1)
	}
	keep(2*g.tan*least-MaxUnknownThinning*c.module, 2*g.tan*most)
	if m.TipDiameter != 0 {
		keep(g.flankReachesTip(m, u))
	}
	return low, high
}

// shifts are the least and the largest shift x m in mm that the tip circle and the
// range of shifts leave.
func (m Measurements) shifts(c candidate, u float64) (least, most float64) {
	least, most = -profile.MaxProfileShift*c.module, profile.MaxProfileShift*c.module
	if m.TipDiameter != 0 {
		raised := m.raised(c)
		least = math.Max(least, raised-u/2)
		most = math.Min(most, raised+u/2+MaxUnknownShortening*c.module)
	}
	return least, most
}

// raised is x m - K in mm, the shift less the shortening, by the tip as measured.
func (m Measurements) raised(c candidate) float64 {
	return m.TipDiameter/2 - c.module*(float64(m.Teeth)/2+c.addendum)
}

// deltaOverPins is delta by a reading over pins; -Inf where the pin would have its
// center inside the base circle, which any thinner tooth has too.
func (g Gear) deltaOverPins(diameter, value float64) float64 {
	if (value-diameter)/(2*g.opposite()) < g.rb {
		return math.Inf(-1)
	}
	return g.thicknessOverPins(diameter, value) - g.pitch()/2
}

// flankReachesTip bounds delta by what a flank up to the measured tip circle means: it
// lies above the base circle, the tooth is not pointed below it, and the spans' contacts
// lie within it.
func (g Gear) flankReachesTip(m Measurements, u float64) (low, high float64) {
	smallest, largest := (m.TipDiameter-u)/2, (m.TipDiameter+u)/2
	if largest <= g.rb {
		return math.Inf(1), math.Inf(-1)
	}
	longest := 2 * g.rb * g.roll(largest)
	for _, s := range m.Spans {
		if s.Value-u > longest {
			return math.Inf(1), math.Inf(-1)
		}
	}
	pointed := rollInv(g.roll(math.Max(smallest, g.rb)))
	return 2*g.r*(pointed-g.inv) - g.pitch()/2, math.Inf(1)
}

// explain fits a size and a pressure angle, with the addendum that fits best.
func (m Measurements) explain(s size, angle float64) (best Result, ok bool) {
	for _, addendum := range addenda(angle) {
		c := candidate{s, angle, addendum}
		low, high := m.interval(c, m.Uncertainty)
		if low > high {
			continue
		}
		if r := m.fit(c, low, high); !ok || r.Misfit < best.Misfit {
			racks := r.Racks
			if ok {
				racks = append(racks, best.Racks...)
			}
			best, ok = r, true
			best.Racks = racks
		} else {
			best.Racks = append(best.Racks, r.Racks...)
		}
	}
	return best, ok
}

// fit places delta within its interval by least squares of spans and pins, then shift,
// thinning and shortening by the tip.
func (m Measurements) fit(c candidate, low, high float64) Result {
	delta := math.Min(math.Max(m.leastSquares(c), low), high)
	g := c.gear(m.Teeth, delta)
	r := Result{Module: c.module, DiametralPitch: c.pitch, Preferred: c.preferred, PressureAngle: c.angle,
		Addendum: c.addendum, Racks: c.racks(), teeth: m.Teeth, thickness: g.thickness}
	least, most := m.shifts(c, m.Uncertainty)
	plain := delta / (2 * g.tan) // x m without thinning
	shift := math.Max(plain, least)
	if m.TipDiameter != 0 {
		raised := m.raised(c)
		furthest := math.Min(plain+MaxUnknownThinning*c.module/(2*g.tan), most)
		shift = math.Max(shift, math.Min(raised, furthest))
		r.Shortening = math.Min(math.Max(shift-raised, 0), MaxUnknownShortening*c.module)
	}
	r.Thinning = 2 * g.tan * (shift - plain)
	r.Shift = shift / c.module
	r.ShiftMin = math.Max(least, low/(2*g.tan)) / c.module
	r.ShiftMax = math.Min(most, (high+MaxUnknownThinning*c.module)/(2*g.tan)) / c.module
	r.tip = g.r + c.addendum*c.module + shift - r.Shortening
	m.misfit(g, &r)
	return r
}

// misfit measures what is left and how plausible the fit is.
func (m Measurements) misfit(g Gear, r *Result) {
	for _, s := range m.Spans {
		r.Residuals = append(r.Residuals, s.Value-g.span(float64(s.TeethSpanned)))
	}
	for _, p := range m.Pins {
		r.Residuals = append(r.Residuals, p.Value-g.pins(p.PinDiameter).Value)
	}
	if m.TipDiameter != 0 {
		r.Residuals = append(r.Residuals, m.TipDiameter-2*r.tip)
	}
	for _, e := range r.Residuals {
		r.Misfit = math.Hypot(r.Misfit, e/m.Uncertainty)
	}
	r.Misfit = math.Hypot(r.Misfit, r.Thinning/(MaxUnknownThinning*r.Module))
	r.Misfit = math.Hypot(r.Misfit, r.Shortening/(MaxUnknownShortening*r.Module))
	if !r.Preferred {
		r.Misfit = math.Hypot(r.Misfit, 1)
	}
	if len(r.Racks) == 0 {
		r.Misfit = math.Hypot(r.Misfit, 1)
	}
}

// leastSquares is the delta that fits spans and pins best: the mean of what each says,
// weighted by the square of how much the reading moves with it, cos alpha for a span and
// cos alpha/sin aM over pins. Without any it is that of an unshifted gear.
func (m Measurements) leastSquares(c candidate) float64 {
	g := c.gear(m.Teeth, 0)
	var sum, weights float64
	add := func(delta, slope float64) {
		if !math.IsInf(delta, 0) {
			sum += delta * slope * slope
			weights += slope * slope
		}
	}
	for _, s := range m.Spans {
		add((s.Value-g.span(float64(s.TeethSpanned)))/g.cos, g.cos)
	}
	for _, p := range m.Pins {
		delta := g.deltaOverPins(p.PinDiameter, p.Value)
		center := math.Max((p.Value-p.PinDiameter)/(2*g.opposite()), g.rb)
		roll := math.Max(g.roll(center), flattest)
		add(delta, g.opposite()*g.cos*math.Hypot(1, roll)/roll)
	}
	if weights == 0 {
		return 0
	}
	return sum / weights
}

// flattest is the roll angle below which the weight of a pin is not raised any further:
// a pin that touches there is off any usable flank.
const flattest = 0.05
