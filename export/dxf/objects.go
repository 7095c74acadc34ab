package dxf

import (
	"github.com/yofu/dxf/format"
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
func (o *objects) Format(f format.Formatter) {
	const keepRecords = 1 // of clones, when dictionaries are merged
	section(f, "OBJECTS", func() {
		f.WriteString(0, "DICTIONARY")
		o.root.Format(f)
		f.WriteString(100, "AcDbDictionary")
		f.WriteInt(281, keepRecords)
		f.WriteString(3, "ACAD_GROUP")
		f.WriteHex(350, o.groups.handle)
		f.WriteString(3, "ACAD_PLOTSTYLENAME")
		f.WriteHex(350, o.plotStyles.handle)

		f.WriteString(0, "DICTIONARY")
		o.groups.Format(f)
		f.WriteString(100, "AcDbDictionary")
		f.WriteInt(281, keepRecords)

		f.WriteString(0, "ACDBDICTIONARYWDFLT")
		o.plotStyles.Format(f)
		f.WriteString(100, "AcDbDictionary")
		f.WriteInt(281, keepRecords)
		f.WriteString(3, "Normal")
		f.WriteHex(350, o.placeholder.handle)
		f.WriteString(100, "AcDbDictionaryWithDefault")
		f.WriteHex(340, o.placeholder.handle)

		f.WriteString(0, "ACDBPLACEHOLDER")
		o.placeholder.Format(f)
	})
}
