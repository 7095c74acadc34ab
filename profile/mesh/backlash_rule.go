package mesh

// Rule is a recommendation of the least backlash.
type Rule uint8

// The rules.
const (
	NoRule Rule = iota
	// RuleAGMA is 0.06 + 0.0005 a + 0.03 m, circumferential (ANSI/AGMA 2002-B88, appendix;
	// its tables are reproduced by it).
	RuleAGMA
	// RuleISO is two thirds of that, normal to the flanks (ISO/TR 10064-2:1996, annex).
	RuleISO
)

// LeastBacklash is what a rule recommends for a center distance and a module in mm: in mm,
// circumferential, or normal for RuleISO. Divide that by cos aw for the circumferential.
func LeastBacklash(rule Rule, a, module float64) float64 {
	j := 0.06 + 0.0005*a + 0.03*module
	switch rule {
	case RuleAGMA:
		return j
	case RuleISO:
		return j * 2 / 3
	}
	return 0
}
