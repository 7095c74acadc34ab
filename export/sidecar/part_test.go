package sidecar_test

import (
	"bytes"
	"encoding/json"
	"errors"
	"math"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"gonum.org/v1/gonum/spatial/r2"

	"flankwright/export"
	"flankwright/export/sidecar"
	"flankwright/profile"
	"flankwright/profile/body"
	"flankwright/profile/fit"
)

// gear is a document of a gear with every optional part: bore, reference circles,
// warnings, files.
func gear(t *testing.T, unit export.Unit) []byte {
	t.Helper()
	rack, _ := profile.LookupRack("iso53-a", 2)
	tooth, err := profile.Solve(profile.Spec{Module: 2, Teeth: 12, Rack: rack.For(2, profile.RackChange{}), TipRadius: 0.2})
	if err != nil {
		t.Fatal(err)
	}
	drawn, err := fit.NewTooth(tooth.Outline, fit.Options{Curves: fit.Arc, Tolerance: 1e-3})
	if err != nil {
		t.Fatal(err)
	}
	g := export.Part{Tooth: tooth, Drawn: drawn, Holes: holes(t, tooth), Fit: fit.Options{Curves: fit.Arc, Tolerance: 1e-3}, Unit: unit, Reference: true}
	input := map[string]any{"command": "gear", "module": "2mm", "teeth": "12", "reference": true}
	d := sidecar.Of(sidecar.Made{Input: input, Rack: sidecar.Rack{Name: "iso53-a", Source: rack.Source}, Part: g, Drawing: g.Drawing(),
		Warnings: tooth.Warnings,
		Kerf: &sidecar.KerfReport{Width: 0.2, PartArea: 400, PartPerimeter: 150,
			Leftover: []sidecar.LeftoverAt{{Place: "root fillet", Leftover: profile.Leftover{At: r2.Vec{X: 1, Y: 9}, Depth: 0.01}}}},
		Choices: []sidecar.Chosen{{Flag: "label-height", Value: profile.LengthOf(3.5), Reason: "it fits"}}})
	d.Files = append(d.Files, sidecar.File{Name: "x.dxf", Format: "dxf", Bytes: 1, SHA256: strings.Repeat("0", 64)})
	data, err := d.Marshal()
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// holes are a bore with a keyway.
func holes(t *testing.T, tooth *profile.Tooth) []body.Loop {
	t.Helper()
	d := tooth.Dimensions
	b, err := body.Solve(body.Spec{Bore: 8, Keyway: body.Keyway{Standard: body.KeyISO}}, body.Around{RootDiameter: d.RootDiameter, WholeDepth: d.WholeDepth})
	if err != nil {
		t.Fatal(err)
	}
	return b.Loops
}

// validate judges a document by the schema of the package, with a validator of the
// JSON Schema standard (draft 2020-12).
func validate(t *testing.T, data []byte) error {
	t.Helper()
	schema, err := jsonschema.UnmarshalJSON(strings.NewReader(sidecar.Schema))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource("sidecar.json", schema); err != nil {
		t.Fatal(err)
	}
	compiled, err := c.Compile("sidecar.json")
	if err != nil {
		t.Fatal(err)
	}
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(data))
	if err != nil {
		t.Fatal(err)
	}
	return compiled.Validate(doc)
}

// TestSchema: documents in both units satisfy the schema, and broken ones do not.
func TestSchema(t *testing.T) {
	for _, unit := range []export.Unit{export.Millimetre, export.Inch} {
		if err := validate(t, gear(t, unit)); err != nil {
			t.Errorf("%s: %v", unit, err)
		}
	}
	good := string(gear(t, export.Millimetre))
	for name, change := range map[string][2]string{
		"other schema":     {sidecar.SchemaID, "flankwright/sidecar/v0"},
		"length as number": {`"unit": "mm",`, `"unit": "furlong",`},
		"missing key":      {`"tip_diameter"`, `"outside_diameter"`},
		"false switch":     {`"reference": true`, `"reference": false`},
	} {
		bad := strings.Replace(good, change[0], change[1], 1)
		if bad == good {
			t.Fatalf("%s: nothing to replace", name)
		}
		var invalid *jsonschema.ValidationError
		if err := validate(t, []byte(bad)); !errors.As(err, &invalid) {
			t.Errorf("%s: taken: %v", name, err)
		}
	}
}

// TestUnits: every length of the inch document is that of the metric one divided by
// 25.4, every area by its square.
func TestUnits(t *testing.T) {
	var mm, inch map[string]any
	if err := json.Unmarshal(gear(t, export.Millimetre), &mm); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(gear(t, export.Inch), &inch); err != nil {
		t.Fatal(err)
	}
	compared := 0
	var compare func(path string, a, b any)
	compare = func(path string, a, b any) {
		switch a := a.(type) {
		case map[string]any:
			other := b.(map[string]any)
			if unit, ok := a["unit"].(string); ok && a["symbol"] != nil {
				scale := map[string]float64{"mm": 25.4, "mm^2": 25.4 * 25.4, "deg": 1}[unit]
				const digits = 1e-9 // of either document
				if va, vb := a["value"].(float64), other["value"].(float64); math.Abs(va-vb*scale) > digits*(1+scale) {
					t.Errorf("%s: %v %s and %v %s", path, va, unit, vb, other["unit"])
				}
				compared++
				return
			}
			for k := range a {
				compare(path+"."+k, a[k], other[k])
			}
		case float64:
			if a != b {
				t.Errorf("%s: plain number %v and %v", path, a, b)
			}
		}
	}
	compare("", mm, inch)
	const atLeast = 30 // lengths, angles and areas of a document
	if compared < atLeast {
		t.Errorf("only %d quantities compared", compared)
	}
}

// TestDecimalRefusesWhatIsNoNumber: NaN does not reach a file silently.
func TestDecimalRefusesWhatIsNoNumber(t *testing.T) {
	for _, v := range []float64{math.NaN(), math.Inf(1)} {
		if data, err := json.Marshal(sidecar.Decimal(v)); err == nil {
			t.Errorf("%v is written as %s", v, data)
		}
	}
	for v, want := range map[float64]string{0: "0", math.Copysign(0, -1): "0", -1e-12: "0", 1e-9: "0.000000001", 123456.7890123456: "123456.789012346", 1e15: "1000000000000000"} {
		if data, err := json.Marshal(sidecar.Decimal(v)); err != nil || string(data) != want {
			t.Errorf("%g is written as %s, %v, want %s", v, data, err, want)
		}
	}
}

// TestAsTheStandardLibraryWrites: the bytes are those of encoding/json, and reading them
// back loses nothing.
func TestAsTheStandardLibraryWrites(t *testing.T) {
	data := gear(t, export.Inch)
	doc, err := sidecar.Read(data)
	if err != nil {
		t.Fatal(err)
	}
	doc.Warnings = append(doc.Warnings, sidecar.Warning{Code: "odd", Message: "a < b & \"c\" \u2028 \x01 ü"})
	want, err := json.MarshalIndent(doc, "", "  ")
	if err != nil {
		t.Fatal(err)
	}
	got, err := doc.Append([]byte("before"))
	if err != nil || string(got) != "before"+string(want)+"\n" {
		t.Errorf("written is\n%s\nnot\n%s\n%v", got, want, err)
	}
	again, err := sidecar.Read(got[len("before"):])
	if err != nil {
		t.Fatal(err)
	}
	if twice, err := again.Marshal(); err != nil || !bytes.Equal(twice, got[len("before"):]) {
		t.Errorf("read back and written it is\n%s\n%v", twice, err)
	}
}
