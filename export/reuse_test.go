package export_test

import (
	"bytes"
	"errors"
	"testing"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/readertest"
	"flankwright/export/sheet"
	"flankwright/export/svg"
)

// TestReuse: drawings of all sizes written one after the other from one sheet and into
// one buffer each are those written alone, also after one that was refused.
func TestReuse(t *testing.T) {
	inch := readertest.Sample{Lobes: 3, Size: 20, Reference: true}
	inch.Unit = export.Inch
	var shared sheet.Sheet
	var dxfBuffer, svgBuffer []byte
	for i, sample := range []readertest.Sample{
		{Lobes: 40, Size: 100, Reference: true},
		{Lobes: 2, Size: 10, Style: readertest.Cubics},
		inch,
		{Lobes: 60, Size: 50, Open: true},
		{Lobes: 2, Size: 10},
	} {
		d := sample.Drawing()
		refused := export.Drawing{Items: append([]export.Item{d.Items[0]}, export.Item{Layer: "bad name"})}
		var failure *sheet.Error
		if err := shared.Set(refused); !errors.As(err, &failure) || failure.Rule != sheet.RuleLayer {
			t.Fatalf("a bad layer name: %v", err)
		}
		if err := shared.Set(d); err != nil {
			t.Fatal(err)
		}
		var err error
		if dxfBuffer, err = dxf.AppendSheet(dxfBuffer[:0], &shared, dxf.Options{}); err != nil {
			t.Fatal(err)
		}
		if svgBuffer, err = svg.AppendSheet(svgBuffer[:0], &shared, svg.Options{}); err != nil {
			t.Fatal(err)
		}
		alone, err := dxf.Marshal(d, dxf.Options{})
		if err != nil || !bytes.Equal(alone, dxfBuffer) {
			t.Errorf("drawing %d: the DXF differs, %v", i, err)
		}
		if alone, err = svg.Marshal(d, svg.Options{}); err != nil || !bytes.Equal(alone, svgBuffer) {
			t.Errorf("drawing %d: the SVG differs, %v", i, err)
		}
		const before = "kept"
		after, err := svg.AppendSheet([]byte(before), &shared, svg.Options{StrokeWidth: -1})
		if err == nil || string(after) != before {
			t.Errorf("drawing %d: a negative stroke gives %d bytes, %v", i, len(after), err)
		}
		if after, err = svg.AppendSheet([]byte(before), &shared, svg.Options{}); err != nil || string(after) != before+string(svgBuffer) {
			t.Errorf("drawing %d: appended to what is there the SVG differs, %v", i, err)
		}
	}
}
