package sidecar

import (
	"flankwright/export"
	"flankwright/profile/gauge"
)

// Inspection are the dimensions a part is inspected by.
type Inspection struct {
	Span     []Span    `json:"span"` // the best first
	OverPins *OverPins `json:"over_pins,omitempty"`
	Chordal  *Chordal  `json:"chordal,omitempty"`
	Missing  []Warning `json:"missing,omitempty"` // what cannot be measured, and why

	FlankTolerances *FlankTolerances `json:"flank_tolerances,omitempty"`
	Measured        []Measured       `json:"measured,omitempty"`
}

// Limits are the smallest and largest value by a thickness allowance.
type Limits struct {
	Smallest *Value `json:"smallest,omitempty"`
	Largest  *Value `json:"largest,omitempty"`
}

// Span is a measurement over teeth between parallel jaws.
type Span struct {
	TeethSpanned    int   `json:"teeth_spanned"`
	Value           Value `json:"value"`
	ContactDiameter Value `json:"contact_diameter"`
	Limits
}

// OverPins is the dimension over two pins; between two in a ring, over one in a rack.
type OverPins struct {
	PinDiameter      Value  `json:"pin_diameter"`
	IdealPinDiameter Value  `json:"ideal_pin_diameter"`
	Value            Value  `json:"value"`
	ContactDiameter  *Value `json:"contact_diameter,omitempty"`
	ContactHeight    *Value `json:"contact_height,omitempty"` // over a rack's datum line
	Limits
}

// Chordal is a tooth's thickness along a straight line, at a height below the tip.
type Chordal struct {
	Thickness Value `json:"thickness"`
	Height    Value `json:"height"`
	Limits
}

// FlankTolerances are those of a class of ISO 1328-1.
type FlankTolerances struct {
	Class           int    `json:"class"`
	Source          string `json:"source"`
	SinglePitch     Value  `json:"single_pitch"`
	CumulativePitch Value  `json:"cumulative_pitch"`
	ProfileTotal    Value  `json:"profile_total"`
	ProfileForm     Value  `json:"profile_form"`
	ProfileSlope    Value  `json:"profile_slope"`
	Runout          Value  `json:"runout"`
}

// Measured is a reading and what it means.
type Measured struct {
	Name      string  `json:"name"`
	Value     Value   `json:"value"`
	Nominal   Value   `json:"nominal"`
	Thickness Value   `json:"tooth_thickness"`
	Deviation Value   `json:"thickness_deviation"`
	Shift     Decimal `json:"equivalent_profile_shift"`
	Thinning  Value   `json:"equivalent_thinning"`
	Backlash  *Value  `json:"backlash_circumferential,omitempty"`
	Normal    *Value  `json:"backlash_normal,omitempty"`
}

// inspection gives the dimensions in the unit of the drawing.
func inspection(i export.Inspection, unit export.Unit, rack bool) *Inspection {
	doc := &Inspection{Span: []Span{}}
	for _, s := range i.Spans {
		doc.Span = append(doc.Span, Span{TeethSpanned: s.Nominal.TeethSpanned, Value: length(s.Nominal.Value, "W_k", unit),
			ContactDiameter: length(s.Nominal.ContactDiameter, "d_k", unit), Limits: limits(s.Limits, "W_k", unit)})
	}
	if p := i.Pins; p != nil {
		contact := length(p.Nominal.Contact, "d_M", unit)
		over := &OverPins{PinDiameter: length(p.Nominal.PinDiameter, "D_M", unit), IdealPinDiameter: length(i.IdealPin, "D_M", unit),
			Value: length(p.Nominal.Value, "M_d", unit), Limits: limits(p.Limits, "M_d", unit)}
		if rack {
			over.ContactHeight = &contact
		} else {
			over.ContactDiameter = &contact
		}
		doc.OverPins = over
	}
	if c := i.Chord; c != nil {
		doc.Chordal = &Chordal{Thickness: length(c.Nominal.Thickness, "s_c", unit), Height: length(c.Nominal.Height, "h_c", unit), Limits: limits(c.Limits, "s_c", unit)}
	}
	for _, f := range i.Missing {
		message, _ := f.Describe(Show(unit))
		doc.Missing = append(doc.Missing, Warning{Code: string(f.Rule), Message: message})
	}
	if t := i.Class; t != nil {
		doc.FlankTolerances = &FlankTolerances{Class: i.ClassNumber, Source: "ISO 1328-1:2013, formulas of clause 5 from memory, rounded as it says",
			SinglePitch: length(t.SinglePitch, "f_pT", unit), CumulativePitch: length(t.CumulativePitch, "F_pT", unit),
			ProfileTotal: length(t.ProfileTotal, "F_alphaT", unit), ProfileForm: length(t.ProfileForm, "f_falphaT", unit),
			ProfileSlope: length(t.ProfileSlope, "f_HalphaT", unit), Runout: length(t.Runout, "F_rT", unit)}
	}
	for _, r := range i.Readings {
		m := Measured{Name: r.Name, Value: length(r.Measured, "M", unit), Nominal: length(r.Nominal, "M", unit),
			Thickness: length(r.Thickness, "s", unit), Deviation: length(r.Deviation, "E_s", unit), Shift: Decimal(r.Shift), Thinning: length(r.Thinning, "E", unit)}
		if b := r.Backlash; b != nil {
			j, n := length(b.Circumferential, "j_t", unit), length(b.Normal, "j_n", unit)
			m.Backlash, m.Normal = &j, &n
		}
		doc.Measured = append(doc.Measured, m)
	}
	return doc
}

// limits gives limits in the unit of the drawing; nothing for none.
func limits(l *gauge.Limits, symbol string, unit export.Unit) Limits {
	if l == nil {
		return Limits{}
	}
	smallest, largest := length(l.Smallest, symbol, unit), length(l.Largest, symbol, unit)
	return Limits{&smallest, &largest}
}
