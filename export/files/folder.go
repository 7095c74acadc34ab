package files

import (
	"context"
	"errors"
	"io"
	"io/fs"
	"os"
	"strings"
)

// Folder is a folder that a whole run writes into. Names in it have no folder of
// their own; nothing, a symbolic link neither, leads out of it.
type Folder struct {
	root *os.Root
	opt  Options
}

// OpenFolder opens a folder, and makes it where it does not exist. The tag marks
// the run's temporary files: letters, digits and dashes.
func OpenFolder(path, tag string) (*Folder, error) {
	if err := os.MkdirAll(path, 0o777); err != nil {
		return nil, ioError("make folder", path, cause(err))
	}
	root, err := os.OpenRoot(path)
	if err != nil {
		return nil, ioError("open folder", path, cause(err))
	}
	return &Folder{root: root, opt: Options{Tag: tag}}, nil
}

// Close ends the use of the folder.
func (f *Folder) Close() error { return f.root.Close() }

// WriteSet is as the function of that name, in the folder.
func (f *Folder) WriteSet(ctx context.Context, set ...File) error {
	sys := rootFS{root: f.root}
	ts := make([]target, len(set))
	for i, file := range set {
		t, err := settle(sys, file.Name)
		if err != nil {
			return err
		}
		ts[i] = t
		for _, other := range ts[:i] {
			if other.path == t.path {
				return &Error{Rule: RuleDuplicate, Path: t.path, Other: other.path}
			}
		}
	}
	return writeTo(ctx, sys, f.opt, ts, set)
}

// settle finds out what stands under a name of the folder.
func settle(sys fileSystem, name string) (target, error) {
	if err := CheckName(name); err != nil {
		return target{}, err
	}
	info, err := sys.Lstat(name)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return target{path: name}, nil
	case err != nil:
		return target{}, ioError("look at", name, cause(err))
	}
	return existing(name, name, info)
}

// Open opens a file of the folder for reading.
func (f *Folder) Open(name string) (io.ReadCloser, error) {
	if err := CheckName(name); err != nil {
		return nil, err
	}
	file, err := f.root.Open(name)
	if err != nil {
		return nil, ioError("open", name, cause(err))
	}
	return file, nil
}

// Remove takes a file away if it is there.
func (f *Folder) Remove(name string) error {
	if err := f.root.Remove(name); err != nil && !errors.Is(err, fs.ErrNotExist) {
		return ioError("remove", name, cause(err))
	}
	return nil
}

// Sweep removes temporary files of the folder's tag, which a killed run has left.
func (f *Folder) Sweep() error {
	d, err := f.root.Open(".")
	if err != nil {
		return ioError("read folder", ".", cause(err))
	}
	defer d.Close()
	const some = 1024 // entries at a time
	for {
		entries, err := d.ReadDir(some)
		for _, e := range entries {
			rest, own := strings.CutPrefix(e.Name(), tagged(f.opt.Tag))
			if own && !strings.Contains(rest, "-") && Temporary(e.Name()) {
				if err := f.Remove(e.Name()); err != nil {
					return err
				}
			}
		}
		if errors.Is(err, io.EOF) {
			return nil
		}
		if err != nil {
			return ioError("read folder", ".", cause(err))
		}
	}
}

// cause is the bare cause of a system's error, without its operation and path.
func cause(err error) error {
	var pathErr *fs.PathError
	if errors.As(err, &pathErr) {
		return pathErr.Err
	}
	var linkErr *os.LinkError
	if errors.As(err, &linkErr) {
		return linkErr.Err
	}
	return err
}

// rootFS is the operating system below one folder.
type rootFS struct{ root *os.Root }

func (r rootFS) Create(name string) (file, error) {
	f, err := r.root.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if err != nil {
		return nil, err
	}
	return f, nil
}

func (r rootFS) Rename(from, to string) error             { return r.root.Rename(from, to) }
func (r rootFS) Remove(name string) error                 { return r.root.Remove(name) }
func (r rootFS) Link(from, to string) error               { return r.root.Link(from, to) }
func (r rootFS) Lstat(name string) (fs.FileInfo, error)   { return r.root.Lstat(name) }
func (r rootFS) EvalSymlinks(name string) (string, error) { return name, nil }
func (r rootFS) SameFile(a, b fs.FileInfo) bool           { return os.SameFile(a, b) }
func (r rootFS) SyncFolder(string) error                  { return errors.ErrUnsupported }
