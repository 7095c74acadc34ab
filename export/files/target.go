package files

import (
	"errors"
	"io/fs"
	"path/filepath"
)

// targets resolves the names and refuses those that cannot be written.
func targets(sys fileSystem, names []string) ([]target, error) {
	ts := make([]target, 0, len(names))
	seen := map[string]string{} // resolved path to the name it was given by
	for _, name := range names {
		t, err := resolve(sys, name)
		if err != nil {
			return nil, err
		}
		if before, twice := seen[t.path]; twice {
			return nil, &Error{Rule: RuleDuplicate, Path: name, Other: before}
		}
		seen[t.path] = name
		ts = append(ts, t)
	}
	return ts, sameFiles(sys, ts, names)
}

// resolve finds the file that a name stands for: absolute, links followed. A
// link to nothing is refused, as there is no telling what it was meant for.
func resolve(sys fileSystem, name string) (target, error) {
	if name == "" {
		return target{}, &Error{Rule: RuleName, Path: name}
	}
	if last := name[len(name)-1]; last == '/' || last == filepath.Separator {
		return target{}, &Error{Rule: RuleDirectory, Path: name}
	}
	path, err := filepath.Abs(name)
	if err != nil {
		return target{}, ioError("resolve", name, err)
	}
	dir, err := sys.EvalSymlinks(filepath.Dir(path))
	if err != nil {
		return target{}, folderError(name, err)
	}
	path = filepath.Join(dir, filepath.Base(path))
	info, err := sys.Lstat(path)
	if err == nil && info.Mode()&fs.ModeSymlink != 0 {
		if path, err = sys.EvalSymlinks(path); err != nil {
			return target{}, &Error{Rule: RuleIrregular, Path: name, Err: err}
		}
		info, err = sys.Lstat(path)
	}
	switch {
	case errors.Is(err, fs.ErrNotExist):
		if info, err := sys.Lstat(dir); err == nil && !info.IsDir() {
			return target{}, &Error{Rule: RuleFolder, Path: name}
		}
		return target{path: path}, nil
	case err != nil:
		return target{}, folderError(name, err)
	}
	return existing(name, path, info)
}

// existing is the target of a name under which something stands at path.
func existing(name, path string, info fs.FileInfo) (target, error) {
	switch {
	case info.IsDir():
		return target{}, &Error{Rule: RuleDirectory, Path: name}
	case !info.Mode().IsRegular():
		return target{}, &Error{Rule: RuleIrregular, Path: name}
	case info.Mode().Perm()&0o222 == 0:
		// A rename would replace it all the same; whoever took the permission away
		// did not mean that.
		return target{}, &Error{Rule: RuleReadOnly, Path: name}
	}
	return target{path: path, exists: true, mode: info.Mode()}, nil
}

// folderError tells a missing folder from other errors.
func folderError(name string, err error) error {
	if errors.Is(err, fs.ErrNotExist) || errors.Is(err, errNotDirectory) {
		return &Error{Rule: RuleFolder, Path: name, Err: err}
	}
	return ioError("resolve", name, err)
}

// sameFiles refuses two names of one existing file, which differ in case on
// some systems and are hard links on others.
func sameFiles(sys fileSystem, ts []target, names []string) error {
	infos := make([]fs.FileInfo, len(ts))
	for i, t := range ts {
		if !t.exists {
			continue
		}
		info, err := sys.Lstat(t.path)
		if err != nil {
			return ioError("resolve", names[i], err)
		}
		for j, other := range infos[:i] {
			if other != nil && sys.SameFile(info, other) {
				return &Error{Rule: RuleDuplicate, Path: names[i], Other: names[j]}
			}
		}
		infos[i] = info
	}
	return nil
}
