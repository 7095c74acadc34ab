package dxf

import (
	"github.com/yofu/dxf/format"
	"github.com/yofu/dxf/handle"
)

// Names of the two blocks every drawing has.
const (
	modelSpace = "*Model_Space"
	paperSpace = "*Paper_Space"
)

// blockRecord is a BLOCK_RECORD. The type of yofu/dxf writes groups (70, 280,
// 281) that came after AC1015, and no layout.
type blockRecord struct {
	node
	name string
}

// IsSymbolTable marks the record for table.SymbolTable.
func (b *blockRecord) IsSymbolTable() bool { return true }

// Name returns the name of the block.
func (b *blockRecord) Name() string { return b.name }

// SetOwner sets the table the record stands in.
func (b *blockRecord) SetOwner(h handle.Handler) { b.owner = h }

// Format writes the record, without a layout of its own.
func (b *blockRecord) Format(f format.Formatter) {
	f.WriteString(0, "BLOCK_RECORD")
	b.node.Format(f)
	f.WriteString(100, "AcDbSymbolTableRecord")
	f.WriteString(100, "AcDbBlockTableRecord")
	f.WriteString(2, b.name)
	f.WriteHex(340, 0)
}

// block is an empty BLOCK with its ENDBLK. The type of yofu/dxf writes no
// owners.
type block struct {
	begin, end node
	record     *blockRecord
	paper      bool
}

// blocks is the BLOCKS section.
type blocks [2]block

func newBlocks(model, paper *blockRecord) *blocks {
	return &blocks{
		{begin: node{owner: model}, end: node{owner: model}, record: model},
		{begin: node{owner: paper}, end: node{owner: paper}, record: paper, paper: true},
	}
}

// SetHandle takes handles for the blocks and their ends.
func (bs *blocks) SetHandle(next *int) {
	for i := range bs {
		bs[i].begin.SetHandle(next)
		bs[i].end.SetHandle(next)
	}
}

// Format writes the section.
func (bs *blocks) Format(e *encoder) {
	e.section("BLOCKS", func() {
		for i := range bs {
			bs[i].Format(e)
		}
	})
}

// Format writes BLOCK and ENDBLK.
func (b *block) Format(f format.Formatter) {
	f.WriteString(0, "BLOCK")
	b.common(f, &b.begin)
	f.WriteString(100, "AcDbBlockBegin")
	f.WriteString(2, b.record.name)
	f.WriteInt(70, 0)
	f.WriteFloat(10, 0)
	f.WriteFloat(20, 0)
	f.WriteFloat(30, 0)
	f.WriteString(3, b.record.name)
	f.WriteString(1, "")
	f.WriteString(0, "ENDBLK")
	b.common(f, &b.end)
	f.WriteString(100, "AcDbBlockEnd")
}

func (b *block) common(f format.Formatter, n *node) {
	n.Format(f)
	f.WriteString(100, "AcDbEntity")
	if b.paper {
		f.WriteInt(67, 1) // in paper space
	}
	f.WriteString(8, layerZero)
}
