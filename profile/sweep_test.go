package profile_test

import (
	"fmt"
	"slices"
	"testing"

	"flankwright/profile"
)

// TestGridAgainstSweep makes every gear of a grid and holds it against the rolling
// rack: what can be made is what the rack leaves, what cannot is refused for the
// right reason. See verdict.
func TestGridAgainstSweep(t *testing.T) {
	t.Parallel()
	var racks []string
	for _, r := range profile.StandardRacks() {
		if !slices.Contains(racks, r.Name) {
			racks = append(racks, r.Name)
		}
	}
	for _, z := range []int{5, 8, 12, 17, 18, 24, 43, 120, 400} {
		for _, angle := range []float64{14.5, 20, 25, 30} {
			t.Run(fmt.Sprintf("z%d,%v", z, angle), func(t *testing.T) {
				t.Parallel()
				n := z // so that a short run meets every value with every other
				for _, rack := range racks {
					for _, x := range []float64{-0.5, 0, 0.3, 0.8} {
						for _, thinning := range []profile.Spec{{}, {Thinning: 0.15}, {Thinning: 0.15, ThinningBy: profile.ThinByInfeed}} {
							for _, m := range []float64{0.1, 2, 50} {
								n++
								if testing.Short() && n%5 != 0 {
									continue
								}
								s := angled(rack, m, z, x, angle)
								s.Thinning, s.ThinningBy = thinning.Thinning*m, thinning.ThinningBy
								const points = 8
								if err := compare(s, points); err != nil {
									t.Error(err)
								}
							}
						}
					}
				}
			})
		}
	}
}
