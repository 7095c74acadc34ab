//go:build unix

package files

import (
	"context"
	"errors"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"sync"
	"syscall"
	"testing"
)

// tree returns the files of a folder with their contents, "name=content".
func tree(t *testing.T, dir string) string {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var out []string
	for _, e := range entries {
		content := "/"
		if !e.IsDir() {
			data, err := os.ReadFile(filepath.Join(dir, e.Name()))
			if err != nil {
				t.Fatal(err)
			}
			content = "=" + string(data)
		}
		out = append(out, e.Name()+content)
	}
	return strings.Join(out, " ")
}

func set(dir, version string) []File {
	return []File{
		{filepath.Join(dir, "a.dxf"), []byte(version + "a")},
		{filepath.Join(dir, "b.svg"), []byte(version + "b")},
		{filepath.Join(dir, "c.json"), []byte(version + "c")},
	}
}

const (
	oldTree = "a.dxf=1a b.svg=1b c.json=1c"
	newTree = "a.dxf=2a b.svg=2b c.json=2c"
)

func TestWriteSet(t *testing.T) {
	dir := t.TempDir()
	for _, v := range []string{"1", "2"} {
		if err := WriteSet(t.Context(), Options{Sync: v == "2"}, set(dir, v)...); err != nil {
			t.Fatal(err)
		}
	}
	if got := tree(t, dir); got != newTree {
		t.Errorf("tree %q", got)
	}
	if err := WriteSet(t.Context(), Options{}); err != nil {
		t.Errorf("an empty set: %v", err)
	}
}

// New files have the mode the umask leaves, old ones keep theirs.
func TestModes(t *testing.T) {
	dir := t.TempDir()
	plain := filepath.Join(dir, "plain")
	if err := os.WriteFile(plain, nil, 0o666); err != nil {
		t.Fatal(err)
	}
	info, err := os.Stat(plain)
	if err != nil {
		t.Fatal(err)
	}
	kept := filepath.Join(dir, "kept")
	if err := os.WriteFile(kept, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	fresh := filepath.Join(dir, "fresh")
	if err := WriteSet(t.Context(), Options{}, File{kept, []byte("x")}, File{fresh, []byte("y")}); err != nil {
		t.Fatal(err)
	}
	for name, want := range map[string]os.FileMode{fresh: info.Mode(), kept: 0o600} {
		if got, err := os.Stat(name); err != nil || got.Mode() != want {
			t.Errorf("%s: mode %v, want %v (%v)", name, got.Mode(), want, err)
		}
	}
}

// A link is written through and stays a link.
func TestSymlink(t *testing.T) {
	dir := t.TempDir()
	real, link := filepath.Join(dir, "real"), filepath.Join(dir, "link")
	if err := os.WriteFile(real, []byte("old"), 0o666); err != nil {
		t.Fatal(err)
	}
	if err := os.Symlink("real", link); err != nil {
		t.Skip(err)
	}
	if err := WriteSet(t.Context(), Options{}, File{link, []byte("new")}); err != nil {
		t.Fatal(err)
	}
	if info, err := os.Lstat(link); err != nil || info.Mode()&os.ModeSymlink == 0 {
		t.Errorf("the link is gone (%v)", err)
	}
	if data, _ := os.ReadFile(real); string(data) != "new" {
		t.Errorf("real holds %q", data)
	}
}

func TestRefused(t *testing.T) {
	dir := t.TempDir()
	in := func(name string) string { return filepath.Join(dir, name) }
	for _, err := range []error{
		os.Mkdir(in("folder"), 0o777),
		os.WriteFile(in("file"), []byte("old"), 0o666),
		os.WriteFile(in("readonly"), []byte("old"), 0o444),
		os.Symlink("nowhere", in("dangling")),
		os.Symlink("file", in("alias")),
		os.Symlink("folder", in("folder2")),
		os.Link(in("file"), in("hardlink")),
		syscall.Mkfifo(in("pipe"), 0o666),
	} {
		if err != nil {
			t.Fatal(err)
		}
	}
	before := ""
	for _, name := range []string{"file", "readonly"} {
		data, _ := os.ReadFile(in(name))
		before += string(data)
	}
	for _, tc := range []struct {
		rule  Rule
		names []string
	}{
		{RuleName, []string{""}},
		{RuleDirectory, []string{in("folder")}},
		{RuleDirectory, []string{in("new") + "/"}},
		{RuleDirectory, []string{in("folder2")}},
		{RuleReadOnly, []string{in("readonly")}},
		{RuleIrregular, []string{in("pipe")}},
		{RuleIrregular, []string{in("dangling")}},
		{RuleFolder, []string{in("missing/x")}},
		{RuleFolder, []string{in("file/x")}},
		{RuleDuplicate, []string{in("new"), in("new")}},
		{RuleDuplicate, []string{in("new"), dir + "/./folder/../new"}},
		{RuleDuplicate, []string{in("folder/x"), in("folder2/x")}},
		{RuleDuplicate, []string{in("file"), in("alias")}},
		{RuleDuplicate, []string{in("file"), in("other"), in("hardlink")}},
	} {
		var files []File
		for _, n := range tc.names {
			files = append(files, File{n, []byte("new")})
		}
		for what, err := range map[string]error{
			"Check": Check(tc.names...), "WriteSet": WriteSet(t.Context(), Options{}, files...),
		} {
			var e *Error
			if !errors.As(err, &e) || e.Rule != tc.rule || strings.Contains(e.Error(), "\n") {
				t.Errorf("%s of %q: %v, want %q", what, tc.names, err, tc.rule)
			}
		}
	}
	after := ""
	for _, name := range []string{"file", "readonly"} {
		data, _ := os.ReadFile(in(name))
		after += string(data)
	}
	if after != before {
		t.Error("a refused set changed files")
	}
}

func TestTemporary(t *testing.T) {
	if name := filepath.Base(tempName(Options{}, "/x/y.dxf")); !Temporary(name) || Temporary("y.dxf") {
		t.Errorf("%s is not recognised", name)
	}
}

// Sets written at once into one folder do not disturb each other.
func TestConcurrent(t *testing.T) {
	dir := t.TempDir()
	var wg sync.WaitGroup
	for i := range 16 {
		wg.Go(func() {
			name := filepath.Join(dir, string(rune('a'+i)))
			for range 20 {
				if err := WriteSet(context.Background(), Options{}, File{name + ".dxf", []byte("x")}, File{name + ".json", []byte("y")}); err != nil {
					t.Error(err)
				}
			}
		})
	}
	wg.Wait()
	if n := len(strings.Fields(tree(t, dir))); n != 32 {
		t.Errorf("%d files, want 32", n)
	}
}

// Readers of a set that is being replaced again and again never see part of a
// file. (That the last one vouches for the others is TestLastVouches.)
func TestNeverPartial(t *testing.T) {
	dir := t.TempDir()
	ctx, cancel := context.WithCancel(t.Context())
	var wg sync.WaitGroup
	wg.Go(func() {
		defer cancel()
		for i := range 300 {
			if err := WriteSet(context.Background(), Options{}, set(dir, string(rune('0'+i%10)))...); err != nil {
				t.Error(err)
				return
			}
		}
	})
	for ctx.Err() == nil {
		for _, name := range []string{"a.dxf", "b.svg", "c.json"} {
			data, err := os.ReadFile(filepath.Join(dir, name))
			if err == nil && len(data) != 2 {
				t.Fatalf("partial file %s: %q", name, data)
			}
		}
	}
	wg.Wait()
	if got := strings.Fields(tree(t, dir)); !slices.Equal(got, strings.Fields("a.dxf=9a b.svg=9b c.json=9c")) {
		t.Errorf("tree %v", got)
	}
}
