package export

import (
	"errors"

	"flankwright/profile"
	"flankwright/profile/gauge"
	"flankwright/profile/mesh"
)

// Inspection are the dimensions a part is inspected by. Lengths are mm.
type Inspection struct {
	Spans       []Checked[gauge.Span] // the best first; none for rings and racks
	Pins        *Checked[gauge.Pins]  // nil where no pin does
	IdealPin    float64               // diameter of the pin that touches where a mate would roll
	Chord       *Checked[gauge.Chord] // nil where the reference circle is off the flank
	Missing     []profile.Finding     // what cannot be measured, and why
	Readings    []Reading             // what was measured
	Class       *gauge.Tolerances     // flank tolerances, if a class was asked for
	ClassNumber int
}

// Checked is a dimension with its limits, if a thickness allowance was given.
type Checked[T any] struct {
	Nominal T
	Limits  *gauge.Limits
}

// Reading is a measured value and what it means.
type Reading struct {
	Name              string  // as "span over 4 teeth"
	Measured, Nominal float64 // mm
	gauge.Reading
	Backlash *mesh.Play // nil without a mate
}

// Inspect works the dimensions out. A pin diameter of 0 takes the nearest one kept in
// stock in the system of units; a given one that does not do is refused with
// profile.Violations. What cannot be measured otherwise is noted in Missing.
func Inspect(t *profile.Tooth, back float64, system gauge.System, pin float64, allowance *gauge.Allowance) (gauge.Gear, Inspection, error) {
	var i Inspection
	g, err := gauge.New(gauge.OfTooth(t, back))
	if err != nil {
		return g, i, i.miss(err)
	}
	var spans []gauge.Span
	if t.Form == profile.FormGear { // the others have no flanks that parallel jaws could take
		if spans, err = g.Spans(); err != nil {
			if err := i.miss(err); err != nil {
				return g, i, err
			}
		}
	}
	for _, s := range spans {
		limits, err := limited(allowance, func(a gauge.Allowance) (gauge.Limits, error) { return g.SpanLimits(s.TeethSpanned, a) })
		if err := i.miss(err); err != nil {
			return g, i, err
		}
		i.Spans = append(i.Spans, Checked[gauge.Span]{s, limits})
	}
	if err := i.overPins(g, system, pin, allowance); err != nil {
		return g, i, err
	}
	chord, err := g.Chord()
	if err != nil {
		return g, i, i.miss(err)
	}
	limits, err := limited(allowance, func(a gauge.Allowance) (gauge.Limits, error) { return g.ChordLimits(chord.Height, a) })
	i.Chord = &Checked[gauge.Chord]{chord, limits}
	return g, i, i.miss(err)
}

// overPins adds the dimension over or between pins.
func (i *Inspection) overPins(g gauge.Gear, system gauge.System, pin float64, allowance *gauge.Allowance) error {
	ideal, err := g.IdealPin()
	if err != nil {
		return i.miss(err)
	}
	i.IdealPin = ideal
	given := pin != 0
	if !given {
		if pin, err = g.StockPin(system); err != nil {
			return i.miss(err)
		}
	}
	pins, err := g.Pin(pin)
	if err != nil {
		if given {
			return err
		}
		return i.miss(err)
	}
	limits, err := limited(allowance, func(a gauge.Allowance) (gauge.Limits, error) { return g.PinLimits(pin, a) })
	i.Pins = &Checked[gauge.Pins]{pins, limits}
	return i.miss(err)
}

// miss notes why something cannot be measured; errors of another kind are returned.
func (i *Inspection) miss(err error) error {
	var found profile.Violations
	if err == nil || !errors.As(err, &found) {
		return err
	}
	i.Missing = append(i.Missing, found...)
	return nil
}

// limited are the limits by an allowance, nil without one.
func limited(a *gauge.Allowance, of func(gauge.Allowance) (gauge.Limits, error)) (*gauge.Limits, error) {
	if a == nil {
		return nil, nil
	}
	limits, err := of(*a)
	if err != nil {
		return nil, err
	}
	return &limits, nil
}
