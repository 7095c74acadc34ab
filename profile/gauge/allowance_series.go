package gauge

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"flankwright/profile"
)

// AllowanceSeries is the thickness allowance of a name such as "cd25" for a reference
// diameter in mm: the letters give the upper deviation A_sne, the number the tolerance
// T_sn, and the lower deviation is A_sne - T_sn (DIN 3967:1978, tables 1 and 2, from
// memory; the standard itself was not at hand). It holds up to 1600 mm; other names
// and diameters are refused.
func AllowanceSeries(name string, referenceDiameter float64) (Allowance, error) {
	found := positive(ParamReferenceDiameter, referenceDiameter)
	letters := strings.TrimRight(name, "0123456789")
	number, err := strconv.Atoi(name[len(letters):])
	column, row := slices.Index(allowanceLetters(), letters), number-leastSeries
	table := allowanceTable()
	if err != nil || column < 0 || row < 0 || row >= len(table[0].tolerance) {
		found = append(found, profile.Finding{Rule: RuleUnknownSeries, Param: ParamAllowance, Value: profile.NumberOf(float64(number)),
			Text: fmt.Sprintf("%q is not a series of DIN 3967", name), Hint: "letters are " + strings.Join(allowanceLetters(), ", ") + ", numbers 21 to 30, as in cd25"})
	}
	if found != nil {
		return Allowance{}, found
	}
	for _, band := range table {
		if referenceDiameter <= band.upTo {
			upper := band.upper[column] * millimetresPerMicrometre
			return Allowance{Upper: 0 - upper, Lower: 0 - upper - band.tolerance[row]*millimetresPerMicrometre}, nil
		}
	}
	last := table[len(table)-1].upTo
	return Allowance{}, profile.Violations{{Rule: profile.RuleOutOfRange, Param: ParamReferenceDiameter, Value: profile.LengthOf(referenceDiameter), Bound: profile.LengthOf(last),
		Text: "the reference diameter {value} is beyond the series of DIN 3967 known here", Hint: "give the two deviations in place of a name; series hold up to {bound}"}}
}

// leastSeries is the first number of the tolerance series.
const leastSeries = 21

// allowanceLetters are the series of upper deviations, in the order of the table.
func allowanceLetters() []string {
	return []string{"a", "ab", "b", "bc", "c", "cd", "d", "e", "f", "g", "h"}
}

// allowanceRow are the deviations for diameters up to a limit, in micrometres.
type allowanceRow struct {
	upTo      float64     // mm
	upper     [11]float64 // below nominal, by letter
	tolerance [10]float64 // by number
}

// allowanceTable is DIN 3967:1978, tables 1 and 2, from memory.
func allowanceTable() []allowanceRow {
	return []allowanceRow{
		{10, [11]float64{100, 85, 70, 58, 48, 40, 33, 22, 10, 5, 0}, [10]float64{3, 5, 8, 12, 20, 30, 50, 80, 130, 200}},
		{50, [11]float64{135, 110, 95, 75, 65, 54, 44, 30, 14, 7, 0}, [10]float64{5, 8, 12, 20, 30, 50, 80, 130, 200, 300}},
		{125, [11]float64{180, 150, 125, 105, 85, 70, 60, 40, 19, 9, 0}, [10]float64{6, 10, 16, 25, 40, 60, 100, 160, 250, 400}},
		{280, [11]float64{250, 200, 170, 140, 115, 95, 80, 56, 26, 12, 0}, [10]float64{8, 12, 20, 30, 50, 80, 130, 200, 300, 500}},
		{560, [11]float64{330, 280, 230, 190, 155, 130, 110, 75, 35, 17, 0}, [10]float64{10, 16, 25, 40, 60, 100, 160, 250, 400, 600}},
		{1000, [11]float64{450, 370, 310, 260, 210, 175, 145, 100, 48, 22, 0}, [10]float64{12, 20, 30, 50, 80, 130, 200, 300, 500, 800}},
		{1600, [11]float64{600, 500, 420, 340, 290, 240, 200, 135, 64, 30, 0}, [10]float64{16, 25, 40, 60, 100, 160, 250, 400, 600, 1000}},
	}
}
