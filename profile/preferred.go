package profile

import "math"

// PreferredModules are the modules in mm of ISO 54:1996, series I and II, and
// below 1 mm of DIN 780-1:1977, series 1, in rising order. 6.5 is left out: ISO
// 54 asks to avoid it.
func PreferredModules() []float64 {
	return []float64{
		0.05, 0.06, 0.08, 0.1, 0.12, 0.16, 0.2, 0.25, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9,
		1, 1.125, 1.25, 1.375, 1.5, 1.75, 2, 2.25, 2.5, 2.75, 3, 3.5, 4, 4.5, 5, 5.5, 6, 7, 8, 9,
		10, 11, 12, 14, 16, 18, 20, 22, 25, 28, 32, 36, 40, 45, 50,
	}
}

// PreferredPitches are the diametral pitches in 1/inch in general use (Shigley,
// Mechanical Engineering Design, table 13-2, after AGMA), in rising order.
func PreferredPitches() []float64 {
	return []float64{2, 2.25, 2.5, 3, 4, 6, 8, 10, 12, 16, 20, 24, 32, 40, 48, 64, 80, 96, 120, 150, 200}
}

// sizeSlack is the relative difference below which a size counts as a preferred
// one: more than conversion between inch and mm leaves, less than any drawing
// states.
const sizeSlack = 1e-9

// NearestPreferred finds the entry of sizes nearest to v by ratio, and whether v
// is that size. sizes must be positive and not empty, v positive.
func NearestPreferred(v float64, sizes []float64) (nearest float64, same bool) {
	best := math.Inf(1)
	for _, s := range sizes {
		if off := math.Abs(math.Log(v / s)); off < best {
			best, nearest = off, s
		}
	}
	return nearest, best <= sizeSlack
}
