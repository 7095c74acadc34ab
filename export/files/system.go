package files

import (
	"io/fs"
	"os"
	"path/filepath"
	"syscall"
)

// fileSystem is what the package asks of the operating system; tests put one in
// its place that fails at will.
type fileSystem interface {
	Create(name string) (file, error) // new file, mode 0666 less the umask
	Rename(from, to string) error
	Remove(name string) error
	Link(from, to string) error
	Lstat(name string) (fs.FileInfo, error)
	EvalSymlinks(name string) (string, error)
	SameFile(a, b fs.FileInfo) bool
	SyncFolder(name string) error
}

// file is what is asked of an open file.
type file interface {
	Write([]byte) (int, error)
	Chmod(fs.FileMode) error
	Sync() error
	Close() error
}

// errNotDirectory is what a path through a file gives.
const errNotDirectory = syscall.ENOTDIR

// osFS is the operating system.
type osFS struct{}

func (osFS) Create(name string) (file, error) {
	f, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o666)
	if err != nil {
		return nil, err // not f: a nil *os.File is not a nil file
	}
	return f, nil
}

func (osFS) Rename(from, to string) error             { return os.Rename(from, to) }
func (osFS) Remove(name string) error                 { return os.Remove(name) }
func (osFS) Link(from, to string) error               { return os.Link(from, to) }
func (osFS) Lstat(name string) (fs.FileInfo, error)   { return os.Lstat(name) }
func (osFS) EvalSymlinks(name string) (string, error) { return filepath.EvalSymlinks(name) }
func (osFS) SameFile(a, b fs.FileInfo) bool           { return os.SameFile(a, b) }

func (osFS) SyncFolder(name string) error {
	d, err := os.Open(name)
	if err != nil {
		return err
	}
	err = d.Sync()
	if closeErr := d.Close(); err == nil {
		err = closeErr
	}
	return err
}
