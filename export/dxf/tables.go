package dxf

import (
	"strings"

	"github.com/yofu/dxf/color"
	"github.com/yofu/dxf/format"
	"github.com/yofu/dxf/table"

	"flankwright/export"
	"flankwright/export/sheet"
)

// Names that several records refer to.
const (
	layerZero  = "0"
	standard   = "Standard"
	continuous = "Continuous"
)

// layerColor is the colour of a layer, an AutoCAD colour index. The number of a
// member ("OUTLINE-2") does not change it. Black-or-white stands for edges that
// are cut, so that a layer seen in colour is never the part itself.
func layerColor(l export.Layer) color.ColorNumber {
	name, _, _ := strings.Cut(string(l), "-")
	switch export.Layer(name) {
	case export.LayerBore:
		return color.Blue
	case export.LayerHoles:
		return color.Cyan
	case export.LayerReference:
		return color.Green
	case export.LayerLead:
		return color.Red
	case export.LayerLabel:
		return color.Magenta
	}
	return color.White
}

// symbolTable is a TABLE. The type of yofu/dxf writes no owner.
type symbolTable struct {
	node
	name    string
	records []table.SymbolTable
}

func (t *symbolTable) add(r table.SymbolTable) {
	r.SetOwner(t)
	t.records = append(t.records, r)
}

// SetHandle takes handles for the table and its records.
func (t *symbolTable) SetHandle(next *int) {
	t.node.SetHandle(next)
	for _, r := range t.records {
		r.SetHandle(next)
	}
}

// Format writes the table.
func (t *symbolTable) Format(f format.Formatter) {
	f.WriteString(0, "TABLE")
	f.WriteString(2, t.name)
	t.node.Format(f)
	f.WriteString(100, "AcDbSymbolTable")
	f.WriteInt(70, len(t.records))
	if t.name == "DIMSTYLE" {
		f.WriteString(100, "AcDbDimStyleTable")
		f.WriteInt(71, len(t.records))
		for _, r := range t.records {
			f.WriteHex(340, r.Handle())
		}
	}
	for _, r := range t.records {
		r.Format(f)
	}
	f.WriteString(0, "ENDTAB")
}

// tables is the TABLES section.
type tables struct {
	tables                 []*symbolTable
	layers                 map[export.Layer]*table.Layer
	modelSpace, paperSpace *blockRecord
}

// newTables makes the tables: all nine for R2000, the three that mean anything
// here for R12. Every record is fresh, as writing sets its handle. Layers are
// "0" and those in use, in the order of their first item.
func newTables(s *sheet.Sheet, v Version) *tables {
	t := &tables{layers: map[export.Layer]*table.Layer{}}
	add := func(name string, records ...table.SymbolTable) {
		st := &symbolTable{name: name}
		for _, r := range records {
			st.add(r)
		}
		t.tables = append(t.tables, st)
	}
	solid := table.NewLineType(continuous, "Solid line")
	var layers []table.SymbolTable
	addLayer := func(name export.Layer) {
		if t.layers[name] == nil {
			l := table.NewLayer(string(name), layerColor(name), solid)
			t.layers[name] = l
			layers = append(layers, l)
		}
	}
	addLayer(layerZero)
	for _, it := range s.Items {
		addLayer(it.Layer)
	}
	text := table.NewStyle(standard)
	text.FontName = "txt"
	text.LastHeightUsed = 2.5

	if v == R12 {
		add("LTYPE", solid)
		add("LAYER", layers...)
		add("STYLE", text)
		return t
	}
	t.modelSpace, t.paperSpace = &blockRecord{name: modelSpace}, &blockRecord{name: paperSpace}
	add("VPORT", activeView(s))
	add("LTYPE", table.NewLineType("ByBlock", ""), table.NewLineType("ByLayer", ""), solid)
	add("LAYER", layers...)
	add("STYLE", text)
	add("VIEW")
	add("UCS")
	add("APPID", table.NewAppID("ACAD"))
	add("DIMSTYLE", table.NewDimStyle(standard))
	add("BLOCK_RECORD", t.modelSpace, t.paperSpace)
	return t
}

// activeView is the view a program opens the file with.
func activeView(s *sheet.Sheet) *table.Viewport {
	const aspect = 4.0 / 3 // of no particular window; programs adapt it to theirs
	center, height := view(s.Bounds, aspect)
	v := table.NewViewport("*Active")
	v.UpperRight = []float64{1, 1}
	v.ViewCenter = []float64{center.X, center.Y}
	v.SnapSpacing = []float64{1, 1}
	v.GridSpacing = []float64{1, 1}
	v.ViewDirection = []float64{0, 0, 1}
	v.Height = height
	v.AspectRatio = aspect
	return v
}

// SetHandle takes handles for all tables.
func (t *tables) SetHandle(next *int) {
	for _, st := range t.tables {
		st.SetHandle(next)
	}
}

// Format writes the section.
func (t *tables) Format(e *encoder) {
	e.section("TABLES", func() {
		for _, st := range t.tables {
			st.Format(e)
		}
	})
}
