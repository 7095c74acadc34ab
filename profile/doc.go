// Package profile solves the exact transverse profile of involute gear teeth:
// the flank and root that the generating basic rack would leave, as exact
// curves, with every diameter and thickness that follows from them. Rings are the
// spaces of the opposite gear, with the material on the other side; racks are gears
// of infinitely many teeth.
//
// Lengths are millimetres, angles radians, curvatures 1/mm, and shift and tooth
// numbers are plain numbers, everywhere in this package. The gear axis is the
// origin and tooth 1 is centered on +Y; of a rack the datum line is the x axis.
//
// Symbols, as in ISO 21771:2007 and ISO 53:1998, used only as locals beside the
// formula they come from:
//
//	symbol  meaning                                            unit
//	m       module                                             mm
//	z       number of teeth
//	alpha   pressure angle of the basic rack                   rad
//	x       profile shift coefficient
//	E       thinning of the tooth on the reference circle      mm
//	r, rb   radii of the reference and the base circle         mm
//	ra, rf  radii of the tip and the root circle               mm
//	rF      radius of the root form circle                     mm
//	s       tooth thickness on the reference circle            mm
//	psi     half angle of the tooth at a radius                rad
//	t       roll angle of the involute, tan of its pressure angle
//	h       depth of the rack's tip below its datum line       mm
//	rho     tip rounding of the generating rack                mm
//	p       contact normal angle on the rack's tip rounding    rad
//	w       half width of the flat of the rack's tip           mm
//	vc      height of the rounding's center over the pitch line, outwards  mm
//
// The generation by a rack follows Litvin and Fuentes, Gear Geometry and Applied
// Theory (2nd ed., 2004), and Colbourne, The Geometry of Involute Gears (1987).
package profile
