package export

import "flankwright/profile"

// Row is one line of a dimension table: the key it has in a sidecar, its name and
// symbol as the trade writes them, and its value.
type Row struct {
	Key, Name, Symbol string
	Value             profile.Quantity
}

// DimensionRows lists the dimensions of a part with the names and symbols of
// ISO 21771:2007, sizes first, then thicknesses, then depths. A rack has no circles.
func DimensionRows(t *profile.Tooth) []Row {
	d, length := t.Dimensions, profile.LengthOf
	rows := []Row{
		{"module", "module", "m", length(d.Module)},
		{"diametral_pitch", "diametral pitch", "P", profile.NumberOf(d.DiametralPitch())},
		{"teeth", "number of teeth", "z", profile.NumberOf(float64(d.Teeth))},
	}
	thickness := "tooth thickness on d"
	space := "space width on d"
	if t.Form == profile.FormRack {
		thickness, space = "tooth thickness on the datum line", "space width on the datum line"
		rows = append(rows,
			Row{"length", "length of the toothed edge", "l", length(d.CircularPitch * float64(d.Teeth))},
			Row{"form_height", "root form height over the datum line", "h_Ff", length(d.FormHeight)},
			Row{"tip_form_height", "tip form height over the datum line", "h_Fa", length(d.TipFormHeight)})
	} else {
		tip := "tip (outside) diameter"
		if t.Form == profile.FormRing {
			tip = "tip (inside) diameter"
		}
		rows = append(rows,
			Row{"reference_diameter", "reference diameter", "d", length(d.ReferenceDiameter)},
			Row{"base_diameter", "base diameter", "d_b", length(d.BaseDiameter)},
			Row{"tip_diameter", tip, "d_a", length(d.TipDiameter)},
			Row{"root_diameter", "root diameter", "d_f", length(d.RootDiameter)},
			Row{"form_diameter", "root form diameter", "d_Ff", length(d.FormDiameter)},
			Row{"tip_form_diameter", "tip form diameter", "d_Fa", length(d.TipFormDiameter)})
	}
	return append(rows,
		Row{"circular_pitch", "circular pitch", "p", length(d.CircularPitch)},
		Row{"base_pitch", "base pitch", "p_b", length(d.BasePitch)},
		Row{"tooth_thickness", thickness, "s", length(d.ToothThickness)},
		Row{"space_width", space, "e", length(d.SpaceWidth)},
		Row{"tip_thickness", "tip thickness", "s_a", length(d.TipThickness)},
		Row{"tip_land", "tip land", "s_aK", length(d.TipLand)},
		Row{"addendum", "addendum", "h_a", length(d.Addendum)},
		Row{"dedendum", "dedendum", "h_f", length(d.Dedendum)},
		Row{"whole_depth", "whole depth", "h", length(d.WholeDepth)},
		Row{"working_depth", "working depth", "h_w", length(d.WorkingDepth)},
		Row{"clearance", "clearance", "c", length(d.Clearance)},
		Row{"min_fillet_radius", "least fillet radius", "rho_f", length(d.MinFilletRadius)})
}

// RackRows lists the basic rack as used, its rounding included.
func RackRows(b profile.BasicRack) []Row {
	return []Row{
		{"pressure_angle", "pressure angle", "alpha", profile.AngleOf(b.PressureAngle)},
		{"addendum", "rack addendum", "h_aP", profile.LengthOf(b.Addendum)},
		{"dedendum", "rack dedendum", "h_fP", profile.LengthOf(b.Dedendum)},
		{"root_radius", "rack root radius", "rho_fP", profile.LengthOf(b.RootRadius)},
	}
}
