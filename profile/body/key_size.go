package body

// inch is one inch in mm, exact by definition.
const inch = 25.4

// isoKeys is the table of parallel keys of ISO 773, the same as DIN 6885-1 form A: width
// b, depth t2 of the hub keyway from the bore's crown, so that d + t2 is measured across,
// and corner radius r2. Tolerances of t2 (0 to +0.1, +0.2 or +0.3 by size) are left to
// the drawing.
//
// The standard gives r2 as a range. Ours is its upper end, which every key clears, as it
// is the least chamfer of the key; it weakens the hub least and a wide beam follows it.
//
// Bores over 38 up to 230 mm agree with a printed table; the others and r2 are recalled.
func isoKeys() []keySize {
	row := func(over, to, width, t2, r2 float64) keySize {
		return keySize{over, to, keyway{width: width, depth: t2, corner: r2}}
	}
	return []keySize{
		row(6, 8, 2, 1.0, 0.16),
		row(8, 10, 3, 1.4, 0.16),
		row(10, 12, 4, 1.8, 0.16),
		row(12, 17, 5, 2.3, 0.25),
		row(17, 22, 6, 2.8, 0.25),
		row(22, 30, 8, 3.3, 0.25),
		row(30, 38, 10, 3.3, 0.40),
		row(38, 44, 12, 3.3, 0.40),
		row(44, 50, 14, 3.8, 0.40),
		row(50, 58, 16, 4.3, 0.40),
		row(58, 65, 18, 4.4, 0.40),
		row(65, 75, 20, 4.9, 0.60),
		row(75, 85, 22, 5.4, 0.60),
		row(85, 95, 25, 5.4, 0.60),
		row(95, 110, 28, 6.4, 0.60),
		row(110, 130, 32, 7.4, 0.60),
		row(130, 150, 36, 8.4, 1.00),
		row(150, 170, 40, 9.4, 1.00),
		row(170, 200, 45, 10.4, 1.00),
		row(200, 230, 50, 11.4, 1.00),
		row(230, 260, 56, 12.4, 1.60),
		row(260, 290, 63, 12.4, 1.60),
		row(290, 330, 70, 14.4, 1.60),
		row(330, 380, 80, 15.4, 2.50),
		row(380, 440, 90, 17.4, 2.50),
		row(440, 500, 100, 19.5, 2.50),
	}
}

// ansiKeys is the table of parallel keys of ANSI B17.1-1967 (R1998), in inches there:
// width W and height H by the bore. Up to 6 1/2 in keys are square, over that
// rectangular, as the standard prefers. The bottom of the hub keyway is
//
//	T = D - Y + H/2 + 0.005 in,   Y = (D - sqrt(D^2 - W^2))/2
//
// from the other side of the bore, so H/2 + 0.005 in from the chord between the keyway's
// edges; 0.005 in is the clearance over the key. Corners are sharp: by the standard's
// appendix keys are not chamfered and keyways not rounded in general practice.
//
// Bores up to 6 1/2 in agree with a printed table; the others are recalled.
func ansiKeys() []keySize {
	const clearance = 0.005
	row := func(over, to, width, height float64) keySize {
		return keySize{over * inch, to * inch, keyway{width: width * inch, depth: (height/2 + clearance) * inch, fromChord: true}}
	}
	square := func(over, to, width float64) keySize { return row(over, to, width, width) }
	return []keySize{
		square(5.0/16, 7.0/16, 3.0/32),
		square(7.0/16, 9.0/16, 1.0/8),
		square(9.0/16, 7.0/8, 3.0/16),
		square(7.0/8, 1.25, 1.0/4),
		square(1.25, 1.375, 5.0/16),
		square(1.375, 1.75, 3.0/8),
		square(1.75, 2.25, 1.0/2),
		square(2.25, 2.75, 5.0/8),
		square(2.75, 3.25, 3.0/4),
		square(3.25, 3.75, 7.0/8),
		square(3.75, 4.5, 1),
		square(4.5, 5.5, 1.25),
		square(5.5, 6.5, 1.5),
		row(6.5, 7.5, 1.75, 1.5),
		row(7.5, 9, 2, 1.5),
		row(9, 11, 2.5, 1.75),
	}
}
