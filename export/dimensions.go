package export

import "flankwright/profile"

// Row is one line of a dimension table: the key it has in a sidecar, its name and
// symbol as the trade writes them, and its value.
type Row struct {
	Key, Name, Symbol string
	Value             profile.Quantity
}

// DimensionRows lists the dimensions of a gear with the names and symbols of
// ISO 21771:2007, sizes first, then thicknesses, then depths.
func DimensionRows(d profile.Dimensions) []Row {
	length := profile.LengthOf
	return []Row{
		{"module", "module", "m", length(d.Module)},
		{"diametral_pitch", "diametral pitch", "P", profile.NumberOf(d.DiametralPitch())},
		{"teeth", "number of teeth", "z", profile.NumberOf(float64(d.Teeth))},
		{"reference_diameter", "reference diameter", "d", length(d.ReferenceDiameter)},
		{"base_diameter", "base diameter", "d_b", length(d.BaseDiameter)},
		{"tip_diameter", "tip (outside) diameter", "d_a", length(d.TipDiameter)},
		{"root_diameter", "root diameter", "d_f", length(d.RootDiameter)},
		{"form_diameter", "root form diameter", "d_Ff", length(d.FormDiameter)},
		{"tip_form_diameter", "tip form diameter", "d_Fa", length(d.TipFormDiameter)},
		{"circular_pitch", "circular pitch", "p", length(d.CircularPitch)},
		{"base_pitch", "base pitch", "p_b", length(d.BasePitch)},
		{"tooth_thickness", "tooth thickness on d", "s", length(d.ToothThickness)},
		{"space_width", "space width on d", "e", length(d.SpaceWidth)},
		{"tip_thickness", "tip thickness", "s_a", length(d.TipThickness)},
		{"tip_land", "tip land", "s_aK", length(d.TipLand)},
		{"addendum", "addendum", "h_a", length(d.Addendum)},
		{"dedendum", "dedendum", "h_f", length(d.Dedendum)},
		{"whole_depth", "whole depth", "h", length(d.WholeDepth)},
		{"working_depth", "working depth", "h_w", length(d.WorkingDepth)},
		{"clearance", "clearance", "c", length(d.Clearance)},
		{"min_fillet_radius", "least fillet radius", "rho_f", length(d.MinFilletRadius)},
	}
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
