package dxftest_test

import (
	"strings"
	"testing"

	"flankwright/export/dxf"
	"flankwright/export/dxf/dxftest"
	"flankwright/export/readertest"
)

func sample(t testing.TB, s readertest.Sample, opt dxf.Options) string {
	t.Helper()
	data, err := dxf.Marshal(s.Drawing(), opt)
	if err != nil {
		t.Fatal(err)
	}
	if err := dxftest.Check(data); err != nil {
		t.Fatal(err)
	}
	return string(data)
}

// A check that nothing can fail is none: each of these changes to a good file
// must be found.
func TestCheckFinds(t *testing.T) {
	good := sample(t, readertest.Sample{Lobes: 6, Size: 20, Reference: true}, dxf.Options{})
	cubic := sample(t, readertest.Sample{Lobes: 6, Size: 20, Style: readertest.Cubics}, dxf.Options{})
	loose := sample(t, readertest.Sample{Lobes: 6, Size: 20}, dxf.Options{Loose: true})
	old := sample(t, readertest.Sample{Lobes: 6, Size: 20}, dxf.Options{Version: dxf.R12})
	// line is the text and the line it stops in.
	line := func(text string) string {
		_, rest, _ := strings.Cut(good, text)
		value, _, _ := strings.Cut(rest, "\n")
		return text + value + "\n"
	}
	_, owner, _ := strings.Cut(line("0\nCIRCLE\n5\n"), "5\n") // the handle
	owner = strings.TrimPrefix(line("0\nCIRCLE\n5\n"+owner+"330\n"), "0\nCIRCLE\n5\n"+owner)
	for _, tc := range []struct{ name, file, from, to string }{
		{"no newline at the end", good, "EOF\n", "EOF"},
		{"junk after EOF", good, "EOF\n", "EOF\n\n"},
		{"mixed line ends", good, "EOF\n", "EOF\r\n"},
		{"no EOF", good, "0\nEOF\n", ""},
		{"not ASCII", good, "txt", "t\xe4t"},
		{"exponent", good, "\n40\n5.0\n", "\n40\n5.0e0\n"},
		{"integer for a real", good, "\n40\n5.0\n", "\n40\n5\n"},
		{"ten decimals", good, "\n40\n5.0\n", "\n40\n5.0000000001\n"},
		{"zeros at the end", good, "\n40\n5.0\n", "\n40\n5.00\n"},
		{"negative zero", good, "\n30\n0.0\n", "\n30\n-0.0\n"},
		{"not a number", good, "\n40\n5.0\n", "\n40\nNaN\n"},
		{"no radius", good, "\n40\n5.0\n", "\n40\n0.0\n"},
		{"version", good, "AC1015", "AC1018"},
		{"code page", good, "ANSI_1252", "ANSI_1250"},
		{"inch and metric", good, "$INSUNITS\n70\n4", "$INSUNITS\n70\n1"},
		{"no unit", good, "9\n$INSUNITS\n70\n4\n", ""},
		{"low seed", good, line("$HANDSEED\n5\n"), "$HANDSEED\n5\n1\n"},
		{"wrong extent", good, line("$EXTMAX\n10\n"), "$EXTMAX\n10\n22.0\n"},
		{"table count", good, "AcDbSymbolTable\n70\n3", "AcDbSymbolTable\n70\n2"},
		{"no line type", good, "Continuous", "Dashed"},
		{"no application", good, "2\nACAD\n", "2\nOTHER\n"},
		{"no active view", good, "*Active", "*Other"},
		{"unknown layer", good, "8\nBORE\n", "8\nHOLES\n"},
		{"layer 0", good, "8\nBORE\n", "8\n0\n"},
		{"owner of an entity", good, owner + "100\nAcDbEntity\n8\nBORE", "330\n1\n100\nAcDbEntity\n8\nBORE"},
		{"no owner", good, owner + "100\nAcDbEntity\n8\nBORE", "100\nAcDbEntity\n8\nBORE"},
		{"handle used twice", good, line("0\nENDBLK\n5\n"), "0\nENDBLK\n5\n1\n"},
		{"handle 0", good, line("0\nENDBLK\n5\n"), "0\nENDBLK\n5\n0\n"},
		{"no handle", good, line("0\nENDBLK\n5\n"), "0\nENDBLK\n"},
		{"marker", good, "AcDbCircle", "AcDbDisc"},
		{"vertex count", good, "AcDbPolyline\n90\n30", "AcDbPolyline\n90\n29"},
		{"flag", good, "AcDbPolyline\n90\n30\n70\n1", "AcDbPolyline\n90\n30\n70\n129"},
		{"open", good, "AcDbPolyline\n90\n30\n70\n1", "AcDbPolyline\n90\n30\n70\n0"},
		{"text entity", good, "0\nCIRCLE\n", "0\nTEXT\n"},
		{"unnamed object", good, line("3\nNormal\n350\n"), "3\nNormal\n350\n1\n"},
		{"no root", good, "2\nOBJECTS\n0\nDICTIONARY", "2\nOBJECTS\n0\nGROUP"},
		{"section missing", good, "2\nCLASSES\n", "2\nTHUMBS\n"},
		{"pointer to nothing", good, line("390\n"), "390\nFFF\n"},
		{"spline flag", cubic, "AcDbSpline\n210\n0.0\n220\n0.0\n230\n1.0\n70\n8", "AcDbSpline\n210\n0.0\n220\n0.0\n230\n1.0\n70\n9"},
		{"spline knots", cubic, "\n40\n1.0\n40\n1.0\n40\n1.0\n40\n1.0", "\n40\n1.0\n40\n1.0\n40\n1.0\n40\n2.0"},
		{"knot count", cubic, "\n72\n8\n", "\n72\n9\n"},
		{"angle in exponent form", loose, "\n50\n", "\n50\n1e"},
		{"negative angle", loose, "\n50\n", "\n50\n-"},
		{"marker in R12", old, "0\nPOLYLINE\n", "0\nPOLYLINE\n100\nAcDb2dPolyline\n"},
		{"new entity in R12", old, "0\nPOLYLINE\n", "0\nLWPOLYLINE\n"},
		{"new variable in R12", old, "9\n$LUNITS\n", "9\n$INSUNITS\n70\n4\n9\n$LUNITS\n"},
		{"no end of sequence", old, "0\nSEQEND\n8\nOUTLINE\n", ""},
	} {
		bad := strings.Replace(tc.file, tc.from, tc.to, 1)
		if bad == tc.file {
			t.Errorf("%s: nothing to change", tc.name)
			continue
		}
		if dxftest.Check([]byte(bad)) == nil {
			t.Errorf("%s: not found", tc.name)
		}
	}
}

func TestCoincident(t *testing.T) {
	s := readertest.Sample{Lobes: 6, Size: 20}
	d := s.Drawing()
	again := d.Items[1].Path.Reversed()
	it := d.Items[1]
	it.Path = &again
	d.Items = append(d.Items, it)
	data, err := dxf.Marshal(d, dxf.Options{})
	if err != nil {
		t.Fatal(err)
	}
	f, err := dxftest.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	twice, err := dxftest.Coincident(f.Entities)
	if err != nil || len(twice) != 30 {
		t.Errorf("%d pieces drawn twice, want 30 (%v)", len(twice), err)
	}
}

// The reader takes any bytes without a panic.
func FuzzCheck(f *testing.F) {
	f.Add([]byte(sample(f, readertest.Sample{Lobes: 2, Size: 20, Reference: true}, dxf.Options{})))
	f.Add([]byte(sample(f, readertest.Sample{Lobes: 2, Size: 20, Style: readertest.Cubics}, dxf.Options{Loose: true})))
	f.Add([]byte(sample(f, readertest.Sample{Lobes: 2, Size: 20}, dxf.Options{Version: dxf.R12})))
	f.Add([]byte("0\nSECTION\n2\nENTITIES\n0\nLINE\n8\nA\n0\nENDSEC\n0\nEOF\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		_ = dxftest.Check(data)
		if file, err := dxftest.Read(data); err == nil {
			_, _ = dxftest.Measure(file.Entities, dxftest.MaxGap)
			_, _ = dxftest.Coincident(file.Entities)
		}
	})
}
