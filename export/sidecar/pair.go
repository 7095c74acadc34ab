package sidecar

import (
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/profile/mesh"
)

// Member is what the sidecar of a pair tells of either member.
type Member struct {
	Form       string              `json:"form"`
	Shift      Decimal             `json:"profile_shift"`
	Thinning   Value               `json:"thinning"`
	BasicRack  map[string]any      `json:"basic_rack"`
	Dimensions map[string]any      `json:"dimensions"`
	Inspection *Inspection         `json:"inspection"`
	Outline    map[string]*Outline `json:"outline"`
	Kerf       *Kerf               `json:"kerf,omitempty"`
	Features   []Feature           `json:"features"`
}

// Mesh is how two members run together. Pairs of values are of member 1 and 2; what a
// rack does not have is null.
type Mesh struct {
	CenterDistance          Value      `json:"center_distance"`
	ReferenceCenterDistance Value      `json:"reference_center_distance"`
	OperatingPressureAngle  Value      `json:"operating_pressure_angle"`
	ShiftSum                Decimal    `json:"shift_sum"`
	ProfileShift            [2]Decimal `json:"profile_shift"`
	OperatingPitchDiameter  [2]*Value  `json:"operating_pitch_diameter"`
	ContactRatio            Decimal    `json:"contact_ratio"`
	BacklashCircumferential Value      `json:"backlash_circumferential"`
	BacklashNormal          Value      `json:"backlash_normal"`
	BacklashAngle           [2]*Value  `json:"backlash_angle"`
	BacklashRange           *[2]Value  `json:"backlash_range,omitempty"` // least and largest within the center distance's tolerance
	TipClearance            [2]Value   `json:"tip_clearance"`
	ActiveTipDiameter       [2]*Value  `json:"active_tip_diameter"`
	ActiveRootDiameter      [2]*Value  `json:"active_root_diameter"`
	SpecificSliding         [2]Decimal `json:"specific_sliding"`
	TipShortening           [2]Value   `json:"tip_shortening"`
	DrawnMesh               DrawnMesh  `json:"drawn_mesh"`
	Placement               Placement  `json:"placement"`
}

// DrawnMesh is what rolling the drawn curves has found.
type DrawnMesh struct {
	TransmissionError Value   `json:"transmission_error"` // peak to peak, on the operating pitch circle
	Bound             Value   `json:"bound"`              // that the drawings' tolerance allows
	Backlash          Value   `json:"backlash"`
	SmallestGap       Value   `json:"smallest_gap"` // from a tip to the other's root
	Overlap           Value   `json:"overlap"`
	Positions         int     `json:"positions"`
	Left              []Value `json:"left"` // play before either flank of member 1 touches, by position over a pitch
	Right             []Value `json:"right"`
	Edge              string  `json:"edge"` // part, or what the beam leaves of it
}

// Placement is where the assembly drawing has member 2: member 1 is at the origin.
type Placement struct {
	X     Value    `json:"x"`
	Y     Value    `json:"y"`
	Turn  [2]Value `json:"turn"` // of each about its own origin, counter-clockwise
	Drive string   `json:"drive"`
}

// MeshOf gives the mesh of a pair in the unit of the drawing.
func MeshOf(p *mesh.Pair, d mesh.Drawn, bound float64, unit export.Unit) *Mesh {
	both := func(v [2]float64, symbol string) [2]Value {
		return [2]Value{length(v[0], symbol, unit), length(v[1], symbol, unit)}
	}
	some := func(v [2]float64, symbol string, of func(float64, string) Value) (out [2]*Value) {
		for i := range v {
			if v[i] != 0 {
				value := of(v[i], symbol)
				out[i] = &value
			}
		}
		return out
	}
	lengthOf := func(v float64, symbol string) Value { return length(v, symbol, unit) }
	angleOf := func(v float64, symbol string) Value { return degrees(v, symbol) }
	rw := p.PitchRadii(p.CenterDistance)
	active := [2][2]float64{p.ActiveTip, p.ActiveRoot}
	if rw[1] == 0 { // a rack's are no diameters
		active[0][1], active[1][1] = 0, 0
	}
	m := &Mesh{
		CenterDistance: length(p.CenterDistance, "a", unit), ReferenceCenterDistance: length(p.Reference(), "a_0", unit),
		OperatingPressureAngle: degrees(p.OperatingAngle(p.CenterDistance), "alpha_w"),
		ShiftSum:               Decimal(p.ShiftSum), ProfileShift: [2]Decimal{Decimal(p.Shift[0]), Decimal(p.Shift[1])},
		OperatingPitchDiameter: some([2]float64{2 * rw[0], 2 * rw[1]}, "d_w", lengthOf),
		ContactRatio:           Decimal(p.Ratio), BacklashCircumferential: length(p.Backlash.Circumferential, "j_t", unit),
		BacklashNormal: length(p.Backlash.Normal, "j_n", unit), BacklashAngle: some(p.Backlash.Angle, "phi_j", angleOf),
		TipClearance: both(p.TipClearance, "c"), ActiveTipDiameter: some(active[0], "d_Na", lengthOf), ActiveRootDiameter: some(active[1], "d_Nf", lengthOf),
		SpecificSliding: [2]Decimal{Decimal(p.Sliding[0]), Decimal(p.Sliding[1])}, TipShortening: both(p.Shortened, "k"),
		DrawnMesh: DrawnMesh{TransmissionError: length(d.Error, "f", unit), Bound: length(bound, "f", unit), Backlash: length(d.Backlash, "j_t", unit),
			SmallestGap: length(d.Gap, "c", unit), Overlap: length(d.Overlap, "o", unit), Positions: len(d.Left.Play)},
	}
	if p.Least != p.Most {
		m.BacklashRange = &[2]Value{length(min(p.Least.Circumferential, p.Most.Circumferential), "j_t", unit), length(max(p.Least.Circumferential, p.Most.Circumferential), "j_t", unit)}
	}
	for _, v := range d.Left.Play {
		m.DrawnMesh.Left = append(m.DrawnMesh.Left, length(v, "j_t", unit))
	}
	for _, v := range d.Right.Play {
		m.DrawnMesh.Right = append(m.DrawnMesh.Right, length(v, "j_t", unit))
	}
	return m
}

// OfPair builds the document of a pair from those of its members and the assembly.
func OfPair(program string, input map[string]any, members [2]*Document, m *Mesh, shifts [2]Decimal, thinning [2]float64, assembly export.Drawing, warnings []Warning) *Document {
	unit := assembly.Unit
	doc := &Document{Schema: SchemaID, Program: program, Input: input, Unit: unit.String(), BasicRack: members[0].BasicRack,
		Mesh: m, Outline: map[string]*Outline{}, Features: []Feature{}, Choices: []Choice{}, Files: []File{}, Warnings: warnings, Cautions: export.Cautions()}
	for i, d := range members {
		form, _ := d.Input["command"].(string)
		doc.Members = append(doc.Members, Member{Form: form, Shift: shifts[i], Thinning: length(thinning[i], "E", unit), BasicRack: d.BasicRack, Dimensions: d.Dimensions,
			Inspection: d.Inspection, Outline: d.Outline, Kerf: d.Kerf, Features: d.Features})
		doc.Choices = append(doc.Choices, d.Choices...)
	}
	for _, r := range assembly.Report() {
		o := outline(r, unit)
		if r.Tolerance > 0 {
			tolerance, deviation := length(r.Tolerance, "e", unit), length(r.Deviation, "e_max", unit)
			o.Tolerance, o.Deviation = &tolerance, &deviation
		}
		doc.Outline[string(r.Layer)] = o
	}
	return doc
}

// PlacementOf gives the place of member 2 in the unit of the drawing.
func PlacementOf(at r2.Vec, turns [2]float64, drive string, unit export.Unit) Placement {
	return Placement{X: length(at.X, "x", unit), Y: length(at.Y, "y", unit), Turn: [2]Value{degrees(turns[0], "phi"), degrees(turns[1], "phi")}, Drive: drive}
}
