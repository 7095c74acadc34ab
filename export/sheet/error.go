package sheet

import (
	"fmt"

	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
)

// Rule names what a drawing must satisfy to be written.
type Rule string

// The rules of a sheet.
const (
	RuleEmpty     Rule = "the drawing holds no items"
	RuleUnit      Rule = "the unit must be millimetre or inch"
	RuleLayer     Rule = "a layer name is 1 to 31 of A-Z 0-9 _ -"
	RuleRole      Rule = "the role must be outer, hole or marker"
	RuleShape     Rule = "an item is either a path or a circle"
	RuleFinite    Rule = "numbers must be finite and below a million units"
	RuleRadius    Rule = "a radius must be at least 1e-6 mm"
	RuleSegments  Rule = "a path needs segments, a closed one two of them"
	RuleKind      Rule = "segments are lines, arcs or cubics"
	RuleShort     Rule = "no segment is shorter than 1e-6 mm"
	RuleTurn      Rule = "an arc turns through less than 180 degrees"
	RuleGap       Rule = "a segment starts where the one before ends"
	RuleFlat      Rule = "a loop must not run back over itself"
	RuleOptions   Rule = "an option is out of its range"
	RuleVersion   Rule = "the file version cannot hold this"
	RulePrecision Rule = "an arc is too flat for the digits of its angles"
)

// Error says which rule a drawing breaks, and where.
type Error struct {
	Rule    Rule
	Layer   export.Layer // of the item, "" if the drawing as a whole is wrong
	Item    int          // index into Drawing.Items, -1 for the whole drawing
	Segment int          // index into the item's path, -1 for the whole item
	At      r2.Vec       // near this point, mm; zero where there is none
	Detail  string       // the offending value, or ""
}

// Error is one line: the place, the rule, the value.
func (e *Error) Error() string {
	place := "drawing"
	if e.Item >= 0 {
		place = fmt.Sprintf("item %d on layer %q", e.Item, string(e.Layer))
	}
	if e.Segment >= 0 {
		place += fmt.Sprintf(", segment %d near (%.6g, %.6g) mm", e.Segment, e.At.X, e.At.Y)
	}
	s := place + ": " + string(e.Rule)
	if e.Detail != "" {
		s += ": " + e.Detail
	}
	return s
}
