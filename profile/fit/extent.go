package fit

// Extent says how much of an outline is drawn.
type Extent struct {
	Kind  ExtentKind
	Teeth int // of ExtentTeeth
	// HalfTeeth has a whole rack end in the middle of teeth in place of spaces.
	HalfTeeth bool
}

// ExtentKind names the extents.
type ExtentKind uint8

// The extents: the whole closed outline, or an open chain to be patterned.
const (
	ExtentAll   ExtentKind = iota
	ExtentTeeth            // some teeth from tooth 1 on, from root middle to root middle
	ExtentSpace            // the space between tooth 1 and the next, from tip middle to tip middle
)

// Partial says whether the outline stays open.
func (e Extent) Partial() bool { return e.Kind != ExtentAll }

// Limits are the angles in rad, counter-clockwise from +Y, between which a partial
// extent lies on a gear of the given angular pitch.
func (e Extent) Limits(pitch float64) (from, to float64) {
	if e.Kind == ExtentSpace {
		return 0, pitch
	}
	return -pitch / 2, (float64(e.Teeth) - 0.5) * pitch
}
