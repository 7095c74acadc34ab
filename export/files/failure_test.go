//go:build unix

package files

import (
	"context"
	"errors"
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"syscall"
	"testing"
)

// broken is a file system on which one operation fails, the one after `left`
// others, and which can call a function before any of them. What comes after the
// failure works, as removing does when a disk is full.
type broken struct {
	osFS
	left   int // operations before the one that fails; negative: none does
	noLink bool
	before func(op, name string)
	ops    []string
}

func (b *broken) step(op, name string) error {
	b.ops = append(b.ops, op)
	if b.before != nil {
		b.before(op, name)
	}
	b.left--
	if b.left == -1 {
		return &os.PathError{Op: op, Path: name, Err: syscall.ENOSPC}
	}
	return nil
}

func (b *broken) Create(name string) (file, error) {
	if err := b.step("create", name); err != nil {
		return nil, err
	}
	f, err := b.osFS.Create(name)
	return &brokenFile{f, b, name}, err
}

func (b *broken) Rename(from, to string) error {
	if !strings.Contains(from, tempPrefix) {
		return fmt.Errorf("rename of %s", from)
	}
	if err := b.step("rename", to); err != nil {
		return err
	}
	return b.osFS.Rename(from, to)
}

func (b *broken) Remove(name string) error {
	if !strings.Contains(name, tempPrefix) {
		if err := b.step("remove", name); err != nil {
			return err
		}
	}
	return b.osFS.Remove(name)
}

func (b *broken) Link(from, to string) error {
	if b.noLink {
		return syscall.EPERM
	}
	return b.osFS.Link(from, to)
}

func (b *broken) SyncFolder(name string) error {
	if err := b.step("sync", name); err != nil {
		return err
	}
	return b.osFS.SyncFolder(name)
}

type brokenFile struct {
	file
	b    *broken
	name string
}

func (f *brokenFile) Write(p []byte) (int, error) {
	if err := f.b.step("write", f.name); err != nil {
		n, _ := f.file.Write(p[:len(p)/2]) // half of it fits
		return n, err
	}
	return f.file.Write(p)
}

func (f *brokenFile) Sync() error {
	if err := f.b.step("sync", f.name); err != nil {
		return err
	}
	return f.file.Sync()
}

func (f *brokenFile) Close() error {
	err := f.b.step("close", f.name)
	if closeErr := f.file.Close(); err == nil {
		err = closeErr
	}
	return err
}

// Wherever a run fails, the old set is there again, whole, and no temporary
// file is left.
func TestEveryFailure(t *testing.T) {
	for _, old := range []bool{false, true} {
		for _, noLink := range []bool{false, true} {
			for n := 0; ; n++ {
				dir := t.TempDir()
				want := ""
				if old {
					if err := WriteSet(t.Context(), Options{}, set(dir, "1")...); err != nil {
						t.Fatal(err)
					}
					want = oldTree
				}
				sys := &broken{left: n, noLink: noLink}
				err := write(t.Context(), sys, Options{Sync: true}, set(dir, "2"))
				got := tree(t, dir)
				if err == nil {
					if got != newTree {
						t.Errorf("after success: %q", got)
					}
					if n < 12 {
						t.Errorf("only %d operations: %v", n, sys.ops)
					}
					break
				}
				var e *Error
				if !errors.As(err, &e) || e.Rule != RuleIO || !errors.Is(err, syscall.ENOSPC) {
					t.Errorf("failure %d: %v", n, err)
				}
				if strings.Contains(got, tempPrefix) {
					t.Errorf("failure %d at %v leaves %q", n, sys.ops, got)
				}
				if noLink && old {
					// There was no way back: old files may be gone, new ones never stay.
					for _, f := range strings.Fields(got) {
						if !slices.Contains(strings.Fields(oldTree), f) {
							t.Errorf("failure %d at %v leaves %q", n, sys.ops, got)
						}
					}
				} else if got != want {
					t.Errorf("old %v, failure %d at %v leaves %q, want %q", old, n, sys.ops, got, want)
				}
			}
		}
	}
}

// While a set is replaced, the last file is never there with a file of another
// version, at no step.
func TestLastVouches(t *testing.T) {
	dir := t.TempDir()
	if err := WriteSet(t.Context(), Options{}, set(dir, "1")...); err != nil {
		t.Fatal(err)
	}
	sys := &broken{left: -1, before: func(op, _ string) {
		state := map[string]string{}
		for _, f := range strings.Fields(tree(t, dir)) {
			name, content, _ := strings.Cut(f, "=")
			state[name] = content
		}
		if c, ok := state["c.json"]; ok && (state["a.dxf"][0] != c[0] || state["b.svg"][0] != c[0]) {
			t.Errorf("before %s: %v", op, state)
		}
	}}
	if err := write(t.Context(), sys, Options{}, set(dir, "2")); err != nil {
		t.Fatal(err)
	}
	if got := tree(t, dir); got != newTree {
		t.Errorf("tree %q", got)
	}
}

// A context that ends before the renames leaves everything as it was.
func TestCancelled(t *testing.T) {
	for _, at := range []string{"", "create", "write", "close"} {
		dir := t.TempDir()
		if err := WriteSet(t.Context(), Options{}, set(dir, "1")...); err != nil {
			t.Fatal(err)
		}
		ctx, cancel := context.WithCancel(t.Context())
		sys := &broken{left: -1, before: func(op, _ string) {
			if op == at {
				cancel()
			}
		}}
		if at == "" {
			cancel()
		}
		err := write(ctx, sys, Options{}, set(dir, "2"))
		cancel()
		if !errors.Is(err, context.Canceled) {
			t.Errorf("cancelled at %q: %v", at, err)
		}
		if got := tree(t, dir); got != oldTree {
			t.Errorf("cancelled at %q: tree %q", at, got)
		}
	}
}

// A folder without write permission gives one typed error.
func TestNoPermission(t *testing.T) {
	if os.Getuid() == 0 {
		t.Skip("root may write everywhere")
	}
	dir := t.TempDir()
	if err := os.Chmod(dir, 0o555); err != nil {
		t.Fatal(err)
	}
	err := WriteSet(t.Context(), Options{}, File{filepath.Join(dir, "x"), nil})
	var e *Error
	if !errors.As(err, &e) || e.Rule != RuleIO || e.Op != "create" {
		t.Errorf("%v", err)
	}
}

// TestPendingOnFullDisk fails each operation in turn.
func TestPendingOnFullDisk(t *testing.T) {
	for left := range 20 {
		dir := t.TempDir()
		sys := &broken{left: left}
		p, err := create(sys, Options{}, target{path: filepath.Join(dir, "x")})
		if err == nil {
			_, err = p.Write([]byte("some"))
			if err == nil {
				err = p.Commit()
			} else {
				p.Abandon()
			}
		}
		if err == nil {
			if left < 3 {
				t.Errorf("only %d operations before success", left)
			}
			return
		}
		if names := listing(t, dir); names != nil {
			t.Errorf("after %v the folder holds %v", err, names)
		}
	}
	t.Error("it never succeeded")
}
