package files

import (
	"context"
	"errors"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

func openFolder(t *testing.T, path, tag string) *Folder {
	t.Helper()
	f, err := OpenFolder(path, tag)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { f.Close() })
	return f
}

func TestFolderWritesSets(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "new", "folder")
	f := openFolder(t, dir, "a")
	for _, text := range []string{"one", "two"} { // the second time over the first
		set := []File{{"x.dxf", []byte(text)}, {"x.json", []byte("side " + text)}}
		if err := f.WriteSet(context.Background(), set...); err != nil {
			t.Fatal(err)
		}
		if got := read(t, dir, "x.dxf") + "," + read(t, dir, "x.json"); got != text+",side "+text {
			t.Errorf("read %q", got)
		}
	}
	if names := listing(t, dir); !slices.Equal(names, []string{"x.dxf", "x.json"}) {
		t.Errorf("the folder holds %v", names)
	}
}

// TestFolderKeepsInside tries names that lead elsewhere.
func TestFolderKeepsInside(t *testing.T) {
	dir := t.TempDir()
	inner := filepath.Join(dir, "inner")
	f := openFolder(t, inner, "")
	if err := os.Symlink(filepath.Join(dir, "stolen"), filepath.Join(inner, "link.dxf")); err != nil {
		t.Fatal(err)
	}
	for _, name := range []string{"../x.dxf", "/tmp/x.dxf", "a/b.dxf", "..", ".", "", "link.dxf", `c:\x.dxf`, "con.dxf"} {
		if err := f.WriteSet(context.Background(), File{name, []byte("x")}); err == nil {
			t.Errorf("%q was written", name)
		}
		if _, err := f.Open(name); err == nil {
			t.Errorf("%q was opened", name)
		}
	}
	if names := listing(t, dir); !slices.Equal(names, []string{"inner"}) {
		t.Errorf("beside the folder stand %v", names)
	}
}

func TestCheckName(t *testing.T) {
	for name, good := range map[string]bool{
		"gear-m2-z24.dxf": true, "zähnräder 3.svg": true, "=1+2.dxf": true, "com.dxf": true, "com10.dxf": true, "contact.dxf": true,
		strings.Repeat("n", 255): true, strings.Repeat("n", 256): false,
		"": false, ".": false, "..": false, ".hidden": false, " a": false, "a.": false, "a ": false,
		"a/b": false, `a\b`: false, "a:b": false, "a*": false, "a?": false, `a"`: false, "a<b": false, "a|b": false,
		"a\nb": false, "a\x00b": false, "a\x7fb": false, "a\u202eb": false, "a\xffb": false,
		"CON": false, "con.dxf": false, "Nul.json": false, "com1.dxf": false, "LPT9": false, "com¹": false, "aux .dxf": false,
	} {
		err := CheckName(name)
		if (err == nil) != good {
			t.Errorf("%q: %v", name, err)
		}
		var failure *Error
		if err != nil && (!errors.As(err, &failure) || failure.Rule != RulePortable) {
			t.Errorf("%q: %v", name, err)
		}
	}
}

// TestSweep leaves other runs' temporary files alone.
func TestSweep(t *testing.T) {
	dir := t.TempDir()
	for _, name := range []string{
		".flankwright-a-0123456789abcdef.tmp", ".flankwright-0123456789abcdef.tmp", ".flankwright-a-b-0123456789abcdef.tmp",
		".flankwright-ab-0123456789abcdef.tmp", ".flankwright-a-part.txt", "x.dxf",
	} {
		write1(t, dir, name)
	}
	if err := openFolder(t, dir, "a").Sweep(); err != nil {
		t.Fatal(err)
	}
	want := []string{".flankwright-0123456789abcdef.tmp", ".flankwright-a-b-0123456789abcdef.tmp", ".flankwright-a-part.txt",
		".flankwright-ab-0123456789abcdef.tmp", "x.dxf"}
	if names := listing(t, dir); !slices.Equal(names, want) {
		t.Errorf("left are %v", names)
	}
}

func TestPending(t *testing.T) {
	dir := t.TempDir()
	f := openFolder(t, dir, "a")
	p, err := f.Create("list.json")
	if err != nil {
		t.Fatal(err)
	}
	io.WriteString(p, "all ")
	if names := listing(t, dir); slices.Contains(names, "list.json") {
		t.Error("the file stands there before it is complete")
	}
	io.WriteString(p, "of it")
	if err := p.Commit(); err != nil {
		t.Fatal(err)
	}
	p.Abandon()
	if got := read(t, dir, "list.json"); got != "all of it" {
		t.Errorf("read %q", got)
	}
	p, err = f.Create("other.json")
	if err != nil {
		t.Fatal(err)
	}
	io.WriteString(p, "some")
	p.Abandon()
	if names := listing(t, dir); !slices.Equal(names, []string{"list.json"}) {
		t.Errorf("the folder holds %v", names)
	}
}

func read(t *testing.T, dir, name string) string {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(dir, name))
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

func write1(t *testing.T, dir, name string) {
	t.Helper()
	if err := os.WriteFile(filepath.Join(dir, name), []byte("x"), 0o666); err != nil {
		t.Fatal(err)
	}
}

func listing(t *testing.T, dir string) []string {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, e := range entries {
		names = append(names, e.Name())
	}
	return names
}
