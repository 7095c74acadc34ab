package gauge

import (
	"math"

	"flankwright/profile"
)

// System is the system of units a workshop keeps its pins in.
type System uint8

// The systems.
const (
	Metric System = iota
	Inch
)

// millimetresPerInch is exact by definition.
const millimetresPerInch = 25.4

// StockPin is the diameter in mm of a pin that is kept in stock and does: in inches the
// gear wire of the pitch,
//
//	1.728/P or 1.92/P; for a ring 1.44/P or 1.68/P
//
// (Van Keuren wire sizes, from memory; P = 25.4/m), whichever does and is nearer to the
// ideal pin. Where neither does, and in millimetres, it is the nearest out of sets graded
// by 0.001 in, or by 0.01 mm up to 1 mm, 0.1 mm up to 10 mm, 0.5 mm up to 20 mm and 1 mm
// above (common practice, no source; DIN 2269 grades measuring pins, but its sizes are not
// quoted here).
func (g Gear) StockPin(system System) (float64, error) {
	ideal, err := g.IdealPin()
	if err != nil {
		return 0, err
	}
	best := 0.0
	offer := func(d float64) {
		if (best == 0 || math.Abs(d-ideal) < math.Abs(best-ideal)) && g.does(d) {
			best = d
		}
	}
	if system == Inch {
		for _, wire := range g.wires() {
			offer(wire * g.spec.Module)
		}
	}
	if best == 0 {
		perUnit := pinsPerUnit(ideal, system)
		nearest := math.Round(ideal * perUnit)
		for _, n := range []float64{nearest, nearest - 1, nearest + 1} {
			offer(n / perUnit)
		}
	}
	if best == 0 {
		fits, found := g.pinRange()
		if found != nil {
			return 0, found
		}
		return 0, profile.Violations{{Rule: RuleNoPin, Param: ParamPinDiameter, Value: profile.LengthOf(fits.Smallest).AtLeast(), Bound: profile.LengthOf(fits.Largest).AtMost(),
			Text: "no pin of the stock sizes lies between {value} and {bound}, which do",
			Hint: "give one of those with --pin-diameter"}}
	}
	return best, nil
}

// wires are the wire sizes in modules.
func (g Gear) wires() []float64 {
	if g.spec.Kind == Ring {
		return []float64{1.44, 1.68}
	}
	return []float64{1.728, 1.92}
}

// pinsPerUnit is how many steps of the stock sizes about a diameter in mm make 1 mm.
func pinsPerUnit(diameter float64, system System) float64 {
	const thousandths = 1000 / millimetresPerInch
	switch {
	case system == Inch:
		return thousandths
	case diameter <= 1:
		return 100
	case diameter <= 10:
		return 10
	case diameter <= 20:
		return 2
	}
	return 1
}
