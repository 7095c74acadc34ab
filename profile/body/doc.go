// Package body solves what is inside the teeth of a gear: the bore with its keyway,
// flat or hexagon, circles of holes, and lightening windows between arms. Everything
// is made of exact circular arcs and straight lines.
//
// Lengths are millimetres and angles radians, everywhere in this package. The gear axis
// is the origin. Whatever has a direction is centered on +Y: the keyway, the flat of a
// D bore, one flat of a hexagon, the first hole of every circle, and an arm between two
// windows; further holes and windows follow counter-clockwise.
//
// Loops are travelled clockwise, so that the material is on the left as along the
// toothed edge, and the side a beam runs on is on the right.
//
// Symbols, used only as locals beside the formula they come from:
//
//	symbol  meaning                                              unit
//	d, R    diameter and radius of the bore                      mm
//	b, W    width of the key, and of the keyway                  mm
//	t2      depth of the hub keyway from the bore's crown        mm    ISO 773, DIN 6885-1
//	r2      corner radius of the hub keyway                      mm    ISO 773, DIN 6885-1
//	H       height of the key                                    mm    ANSI B17.1
//	Y       height of the chord of width W below the crown       mm    ANSI B17.1
//	T       from the keyway's bottom across the bore             mm    ANSI B17.1
//	Q       radius of the root circle                            mm
//	n       number of windows
//	a       width of an arm between windows                      mm
//	rho     corner radius of a window                            mm
//
// The tables come from ISO 773 (DIN 6885-1) and ANSI B17.1; the geometry is elementary
// (lines and circles that touch or cross) and derived where it stands.
package body
