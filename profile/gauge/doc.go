// Package gauge says how the teeth of an external gear, a ring or a rack are
// measured, and what a measured value means: span over teeth, dimension over or
// between pins, chordal thickness, their limits from a thickness allowance, flank
// tolerances by class, the thickness and backlash that follow from readings, and
// which gear a set of readings can have come from.
//
// It works on plain numbers (Spec), whatever made the teeth. Lengths are
// millimetres, angles radians, profile shift is in modules and counts positive
// where it thickens the member's own tooth (ISO 21771:2007), in a ring too.
//
// Symbols, used only as locals beside the formula they come from:
//
//	symbol  meaning                                            unit
//	m       module                                             mm
//	z       number of teeth
//	alpha   pressure angle on the reference circle             rad
//	x       profile shift coefficient
//	E       thinning of the tooth on the reference circle      mm
//	s, e    tooth thickness and space width there              mm
//	d, r    reference diameter and radius                      mm
//	db, rb  base diameter and radius                           mm
//	k       teeth spanned
//	W       span                                               mm
//	D, M    pin diameter, dimension over or between pins       mm
//	aM      pressure angle at the pin's center                 rad
//	t       roll angle of the involute, tan of its pressure angle
//
// Two flanks and a pin: the normal at a contact touches the base circle, so the
// pin's center lies at the roll angle t + D/db in an external space and t - D/db in
// a ring's, t being that of the contact. The formulas follow ISO 21771:2007, clause
// 8, and DIN 3960:1987, both cited from memory.
package gauge
