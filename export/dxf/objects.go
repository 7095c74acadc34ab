package dxf

import (
	"github.com/yofu/dxf/object"
)

// objects is the OBJECTS section: the root dictionary, an empty dictionary of
// groups, and the plot style that layers must name. The dictionaries of
// yofu/dxf write no owner.
type objects struct {
	root, groups, plotStyles node
	plotStyle                *object.AcDbPlaceHolder
	placeholder              node
}

func newObjects() *objects {
	o := &objects{plotStyle: object.NewAcDbPlaceHolder()}
	o.groups.owner = &o.root
	o.plotStyles.owner = &o.root
	o.placeholder.owner = &o.plotStyles
	return o
}

// SetHandle takes handles for all objects.
func (o *objects) SetHandle(next *int) {
	o.root.SetHandle(next)
	o.groups.SetHandle(next)
	o.plotStyles.SetHandle(next)
	o.plotStyle.SetHandle(next)
	o.placeholder.handle = o.plotStyle.Handle()
}

// Format writes the section.
func (o *objects) Format(e *encoder) {
	const keepRecords = 1 // of clones, when dictionaries are merged
	e.section("OBJECTS", func() {
		e.WriteString(0, "DICTIONARY")
		o.root.Format(e)
		e.WriteString(100, "AcDbDictionary")
		e.WriteInt(281, keepRecords)
		e.WriteString(3, "ACAD_GROUP")
		e.WriteHex(350, o.groups.handle)
		e.WriteString(3, "ACAD_PLOTSTYLENAME")
		e.WriteHex(350, o.plotStyles.handle)

		e.WriteString(0, "DICTIONARY")
		o.groups.Format(e)
		e.WriteString(100, "AcDbDictionary")
		e.WriteInt(281, keepRecords)

		e.WriteString(0, "ACDBDICTIONARYWDFLT")
		o.plotStyles.Format(e)
		e.WriteString(100, "AcDbDictionary")
		e.WriteInt(281, keepRecords)
		e.WriteString(3, "Normal")
		e.WriteHex(350, o.placeholder.handle)
		e.WriteString(100, "AcDbDictionaryWithDefault")
		e.WriteHex(340, o.placeholder.handle)

		e.WriteString(0, "ACDBPLACEHOLDER")
		o.placeholder.Format(e)
	})
}
