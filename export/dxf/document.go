package dxf

import (
	"github.com/yofu/dxf/format"
	"github.com/yofu/dxf/handle"

	"flankwright/export/sheet"
)

// document is one file: sections in file order, each with its handles.
type document struct {
	sections []section
}

// newDocument lays the file out and hands out handles in file order, so that
// the header, which comes first, knows the last one.
func newDocument(s *sheet.Sheet, opt Options) *document {
	next := 1
	ents := &entities{sheet: s, opt: opt}
	objs := newObjects()
	t := newTables(s, opt.Version)
	for _, l := range t.layers {
		l.SetPlotStyle(objs.plotStyle) // asked for its handle even where none is written
	}
	ents.layers = t.layers
	if opt.Version == R12 {
		return &document{sections: []section{
			&header{sheet: s, version: R12}, t, emptySection("BLOCKS"), ents,
		}}
	}
	blks := newBlocks(t.modelSpace, t.paperSpace)
	ents.owner = t.modelSpace
	t.SetHandle(&next)
	blks.SetHandle(&next)
	ents.SetHandle(&next)
	objs.SetHandle(&next)
	return &document{sections: []section{
		&header{sheet: s, version: R2000, handseed: next}, classes{}, t, blks, ents, objs,
	}}
}

// Format writes the whole file.
func (d *document) Format(e *encoder) {
	for _, s := range d.sections {
		s.Format(e)
	}
	e.WriteString(0, "EOF")
}

// section is a section of a file.
type section interface {
	Format(*encoder)
}

// section writes a section around body.
func (e *encoder) section(name string, body func()) {
	e.WriteString(0, "SECTION")
	e.WriteString(2, name)
	body()
	e.WriteString(0, "ENDSEC")
}

// emptySection is a section that must be there but holds nothing.
type emptySection string

// Format writes the section.
func (s emptySection) Format(e *encoder) { e.section(string(s), func() {}) }

// node is the handle of a record, and its owner's.
type node struct {
	handle int
	owner  handle.Handler
}

// Handle returns the handle.
func (n *node) Handle() int { return n.handle }

// SetHandle takes the next handle.
func (n *node) SetHandle(next *int) {
	n.handle = *next
	*next++
}

// Format writes the handle and the owner's; 0 if nothing owns the record.
func (n *node) Format(f format.Formatter) {
	f.WriteHex(5, n.handle)
	owner := 0
	if n.owner != nil {
		owner = n.owner.Handle()
	}
	f.WriteHex(330, owner)
}
