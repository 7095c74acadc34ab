package main

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"

	"flankwright/export/files"
	"flankwright/export/sidecar"
)

// writeTable puts a table into a folder of its own.
func writeTable(t testing.TB, text string) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "table.csv")
	if err := os.WriteFile(path, []byte(text), 0o666); err != nil {
		t.Fatal(err)
	}
	return path
}

// compareTrees tells how two folders differ.
func compareTrees(t *testing.T, what string, got, want map[string][]byte) {
	t.Helper()
	for name, data := range want {
		if other, ok := got[name]; !ok {
			t.Errorf("%s: %s is missing", what, name)
		} else if !bytes.Equal(data, other) {
			t.Errorf("%s: %s differs", what, name)
		}
	}
	for name := range got {
		if _, ok := want[name]; !ok {
			t.Errorf("%s: %s is too many", what, name)
		}
	}
}

// TestFamilySameAtAnyWorkerCount compares whole trees and messages; some rows fail.
func TestFamilySameAtAnyWorkerCount(t *testing.T) {
	table := writeTable(t, strings.Replace(mixedTable(60), "part-000006,", "part-000006,-", 1)+"odd,2,,7,-0.3,\n")
	var want map[string][]byte
	var wantErr string
	for _, workers := range []string{"1", "2", "8"} {
		dir := t.TempDir()
		code, _, stderr := call(t, "family", table, "-o", dir, "--format", "dxf,svg", "--workers", workers)
		if code != exitRows {
			t.Fatalf("exits %d: %s", code, stderr)
		}
		got := tree(t, dir)
		if want == nil {
			want, wantErr = got, stderr
			const files = 3*60 + 2 // the bad row has none
			if len(got) != files || !strings.Contains(stderr, "warning: table.csv:62: ") || !strings.Contains(stderr, "error: table.csv:8:13: column module, cell \"-") {
				t.Fatalf("%d files; %s", len(got), stderr)
			}
			continue
		}
		compareTrees(t, workers+" workers", got, want)
		if stderr != wantErr {
			t.Errorf("%s workers say\n%s\nand one\n%s", workers, stderr, wantErr)
		}
	}
}

// TestFamilyRowIsTheGear: the sidecar of a row, given back to the gear command, draws
// the same bytes.
func TestFamilyRowIsTheGear(t *testing.T) {
	dir := t.TempDir()
	makeFamily(t, writeTable(t, mixedTable(4)), dir)
	for name, data := range tree(t, dir) {
		if base, ok := strings.CutSuffix(name, ".dxf"); ok {
			again := filepath.Join(t.TempDir(), name)
			if code, _, stderr := call(t, "gear", "--from", filepath.Join(dir, base+".json"), "-o", again); code != exitDone {
				t.Fatal(stderr)
			}
			if other, err := os.ReadFile(again); err != nil || !bytes.Equal(other, data) {
				t.Errorf("%s differs: %v", name, err)
			}
		}
	}
}

// TestFamilyShards: all shards together are the whole table, each with a list of its own.
func TestFamilyShards(t *testing.T) {
	table := writeTable(t, mixedTable(11))
	whole, parts := t.TempDir(), t.TempDir()
	makeFamily(t, table, whole)
	for _, s := range []string{"1/3", "2/3", "3/3"} {
		makeFamily(t, table, parts, "--shard", s)
	}
	got, want := tree(t, parts), tree(t, whole)
	rows := 0
	for _, list := range []string{"family-1-of-3", "family-2-of-3", "family-3-of-3"} {
		rows += len(readList(t, got[list+".json"]).Rows)
		delete(got, list+".json")
		delete(got, list+".csv")
	}
	if all := len(readList(t, want["family.json"]).Rows); rows != all || all != 11 {
		t.Errorf("the shards list %d rows, the whole %d", rows, all)
	}
	delete(want, "family.json")
	delete(want, "family.csv")
	compareTrees(t, "shards", got, want)
}

// readList reads a family's list and validates it by its schema.
func readList(t *testing.T, data []byte) (list struct {
	Rows []sidecar.FamilyRow
	Made int
}) {
	t.Helper()
	schema, err := jsonschema.UnmarshalJSON(strings.NewReader(sidecar.FamilySchema))
	if err != nil {
		t.Fatal(err)
	}
	c := jsonschema.NewCompiler()
	if err := c.AddResource("family.json", schema); err != nil {
		t.Fatal(err)
	}
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(data))
	if err != nil {
		t.Fatal(err)
	}
	if err := c.MustCompile("family.json").Validate(doc); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(data, &list); err != nil {
		t.Fatal(err)
	}
	return list
}

// TestFamilyList: the list describes the files that are there.
func TestFamilyList(t *testing.T) {
	dir := t.TempDir()
	table := writeTable(t, "name,module,teeth\n=1+2,2,20\n+a,2,21\n-b,2,22\n@c,2,23\nplain,2,\n\"d,\"\"e\",2,24\n")
	if code, _, stderr := call(t, "family", table, "-o", dir); code != exitRows {
		t.Fatalf("exits %d: %s", code, stderr)
	}
	made := tree(t, dir)
	listed := 0
	for _, row := range readList(t, made["family.json"]).Rows {
		for _, f := range row.Files {
			listed++
			if got := described(file(f.Name, made[f.Name])); got != f {
				t.Errorf("listed is %v, there is %v", f, got)
			}
		}
	}
	if want := 2 * 4; listed != want || len(made) != want+2 {
		// Two names hold characters that file names may not.
		t.Errorf("%d files listed, %d there", listed, len(made))
	}
	records, err := csv.NewReader(bytes.NewReader(made["family.csv"])).ReadAll()
	if err != nil || len(records) != 7 {
		t.Fatalf("%d records, %v", len(records), err)
	}
	for _, record := range records {
		for _, cell := range record {
			if cell != "" && strings.ContainsRune("=+-@\t\r", rune(cell[0])) {
				t.Errorf("a spreadsheet would take %q for a formula", cell)
			}
		}
	}
	if records[1][1] != "'=1+2" || records[1][3] != "made" || records[5][3] != "failed" {
		t.Errorf("records %q", records)
	}
}

// TestFamilyHostileNames: nothing is written outside the folder, whatever a name says.
func TestFamilyHostileNames(t *testing.T) {
	parent := t.TempDir()
	dir := filepath.Join(parent, "out")
	names := []string{"../up", "/tmp/abs", `..\up`, "a/b", "CON", "nul", "com1", "x\x01y", "x\u202ey", strings.Repeat("n", 300), ".hidden", "c:drive", "family", "Family-1-of-2"}
	var b strings.Builder
	w := csv.NewWriter(&b)
	w.Write([]string{"name", "module", "teeth"})
	for _, n := range names {
		w.Write([]string{n, "2", "20"})
	}
	w.Write([]string{"good", "2", "20"})
	w.Flush()
	code, _, stderr := call(t, "family", writeTable(t, b.String()), "-o", dir)
	if code != exitRows || strings.Count(stderr, "error: ") != len(names) {
		t.Errorf("exits %d: %s", code, stderr)
	}
	got := tree(t, dir)
	if len(got) != 4 || got["good.dxf"] == nil {
		t.Errorf("%d files", len(got))
	}
	entries, err := os.ReadDir(parent)
	if err != nil || len(entries) != 1 {
		t.Errorf("beside the folder: %v, %v", entries, err)
	}
}

// TestFamilyResumeMends: files that are gone, changed or of another request are made
// again, the others kept.
func TestFamilyResumeMends(t *testing.T) {
	text := mixedTable(6)
	table, dir := writeTable(t, text), t.TempDir()
	makeFamily(t, table, dir)
	want := tree(t, dir)
	in := func(name string) string { return filepath.Join(dir, name) }
	os.Remove(in("part-000000.json"))
	os.Remove(in("part-000001.svg"))
	os.WriteFile(in("part-000002.dxf"), append(want["part-000002.dxf"], ' '), 0o666)
	os.WriteFile(in("part-000003.json"), []byte("{}"), 0o666)
	os.WriteFile(in(".flankwright-family-0123456789abcdef.tmp"), nil, 0o666)
	if out := resumed(t, table, dir); !strings.Contains(out, "4 written, 2 skipped, 0 failed") {
		t.Error(out)
	}
	compareTrees(t, "mended", tree(t, dir), want)
	if out := resumed(t, table, dir); !strings.Contains(out, "0 written, 6 skipped") {
		t.Error(out)
	}
	compareTrees(t, "kept", tree(t, dir), want)
	changed := writeTable(t, strings.Replace(text, "part-000000,1,,12,,", "part-000000,1,,13,,", 1))
	if out := resumed(t, changed, dir); !strings.Contains(out, "1 written, 5 skipped") {
		t.Error(out)
	}
}

// resumed resumes a family and returns its final line.
func resumed(t *testing.T, table, dir string) string {
	t.Helper()
	code, out, stderr := call(t, "family", table, "-o", dir, "--format", "dxf,svg", "--resume")
	if code != exitDone {
		t.Fatalf("exits %d: %s", code, stderr)
	}
	return out
}

// file is a file of a set.
func file(name string, data []byte) files.File { return files.File{Name: name, Data: data} }
