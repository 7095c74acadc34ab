// Package files writes a set of files so that it is there as a whole or not at
// all.
//
// Every file is first written beside its final name under a temporary one, and
// its Close checked. Only when all of them are complete are they renamed, the
// last one last: it vouches for the others, so its presence means the set is
// complete. Before the first rename the old last file is taken away, so that it
// never vouches for files it does not belong to. If anything fails on the way,
// what was there before is put back, as far as the file system can link.
//
// A process that is killed leaves at most temporary files, which are recognised
// by Temporary; never a partial file under a final name.
package files

import (
	"context"
	"errors"
	"os"
	"path/filepath"
	"strings"
)

// File is one file of a set.
type File struct {
	Name string // path of the file; its folder must exist
	Data []byte
}

// Options say how a set is written. The zero value leaves it to the operating
// system when data reach the disk.
type Options struct {
	// Sync flushes each file, and each folder after the renames, to the disk.
	Sync bool
	// Tag stands in the names of temporary files, to tell whose they are.
	Tag string
}

// Names of temporary files start and end in these; a random part is between.
const (
	tempPrefix = ".flankwright-"
	tempSuffix = ".tmp"
)

// Temporary reports whether a name, without its folder, is one that WriteSet
// gives to temporary files.
func Temporary(name string) bool {
	return strings.HasPrefix(name, tempPrefix) && strings.HasSuffix(name, tempSuffix)
}

// WriteSet writes the files, the last one last. It replaces files that exist,
// keeping their permissions, and writes through symbolic links.
//
// The error is a *Error, or that of the context if it ended first. Whatever the
// error, no temporary file of this call is left, and files that stood under the
// names before stand there again (on file systems without hard links they may
// be gone, but then nothing new stands there either).
func WriteSet(ctx context.Context, opt Options, set ...File) error {
	return write(ctx, osFS{}, opt, set)
}

// Check reports whether WriteSet could write to these names, as far as one can
// tell without writing: a *Error for a name that is empty, occurs twice (in
// whatever spelling), is a folder or something else that is not a regular file,
// is read-only, or lies in a folder that does not exist.
func Check(names ...string) error {
	_, err := targets(osFS{}, names)
	return err
}

// target is where a file of the set goes.
type target struct {
	path   string      // with links resolved
	exists bool        // there is a file to replace
	mode   os.FileMode // of that file
	temp   string      // the new file, until it is renamed
	backup string      // a link to the old file, until all is done
	done   bool        // renamed
}

func write(ctx context.Context, fs fileSystem, opt Options, set []File) error {
	names := make([]string, len(set))
	for i, f := range set {
		names[i] = f.Name
	}
	ts, err := targets(fs, names)
	if err != nil || len(ts) == 0 {
		return err
	}
	return writeTo(ctx, fs, opt, ts, set)
}

// writeTo writes the files to their targets.
func writeTo(ctx context.Context, fs fileSystem, opt Options, ts []target, set []File) (err error) {
	defer func() {
		if err != nil {
			undo(fs, ts)
		}
		for i := range ts {
			if ts[i].backup != "" {
				fs.Remove(ts[i].backup)
			}
		}
	}()
	for i := range ts {
		if err := ctx.Err(); err != nil {
			return err
		}
		if err := writeTemp(ctx, fs, opt, &ts[i], set[i].Data); err != nil {
			return err
		}
	}
	if err := ctx.Err(); err != nil {
		return err
	}
	return rename(fs, opt, ts)
}

// rename puts the new files under their names.
func rename(fs fileSystem, opt Options, ts []target) error {
	for i := range ts {
		if ts[i].exists {
			// Failing to link is no error: it only costs the way back.
			ts[i].backup = link(fs, opt, ts[i].path)
		}
	}
	last := &ts[len(ts)-1]
	if last.exists && len(ts) > 1 {
		if err := fs.Remove(last.path); err != nil {
			return ioError("remove", last.path, err)
		}
		last.exists = false
		if err := syncFolder(fs, opt, last.path); err != nil {
			return err
		}
	}
	for i := range ts {
		t := &ts[i]
		if i == len(ts)-1 && i > 0 {
			// The others must be on the disk before the one that vouches for them.
			if err := syncFolders(fs, opt, ts[:i]); err != nil {
				return err
			}
		}
		if err := fs.Rename(t.temp, t.path); err != nil {
			return ioError("rename", t.path, err)
		}
		t.temp, t.done = "", true
	}
	return syncFolder(fs, opt, last.path)
}

// undo removes what was written and puts back what was there. Its own errors
// are dropped: the one that led here is the one to report.
func undo(fs fileSystem, ts []target) {
	for i := range ts {
		t := &ts[i]
		if t.temp != "" {
			fs.Remove(t.temp)
		}
		switch {
		case t.backup != "" && (t.done || !t.exists):
			if fs.Rename(t.backup, t.path) == nil {
				t.backup = ""
			}
		case t.done:
			fs.Remove(t.path)
		}
	}
}

func syncFolders(fs fileSystem, opt Options, ts []target) error {
	seen := map[string]bool{}
	for _, t := range ts {
		if dir := filepath.Dir(t.path); !seen[dir] {
			seen[dir] = true
			if err := syncFolder(fs, opt, t.path); err != nil {
				return err
			}
		}
	}
	return nil
}

func syncFolder(fs fileSystem, opt Options, path string) error {
	if !opt.Sync {
		return nil
	}
	dir := filepath.Dir(path)
	if err := fs.SyncFolder(dir); err != nil && !errors.Is(err, errors.ErrUnsupported) {
		return ioError("sync", dir, err)
	}
	return nil
}
