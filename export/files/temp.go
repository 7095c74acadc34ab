package files

import (
	"context"
	"errors"
	"fmt"
	"io/fs"
	"math/rand/v2"
	"path/filepath"
)

// attempts bounds the search for a free name; with 64 random bits a second one
// is already a sign of something else.
const attempts = 10

// tempName is a random name beside path.
func tempName(opt Options, path string) string {
	return filepath.Join(filepath.Dir(path), fmt.Sprintf("%s%016x%s", tagged(opt.Tag), rand.Uint64(), tempSuffix))
}

// tagged is what temporary names of that tag start with.
func tagged(tag string) string {
	if tag == "" {
		return tempPrefix
	}
	return tempPrefix + tag + "-"
}

// chunk is how much is written between two looks at the context.
const chunk = 1 << 20

// writeTemp writes the data into a new file beside the target.
func writeTemp(ctx context.Context, sys fileSystem, opt Options, t *target, data []byte) error {
	f, err := openTemp(sys, opt, t)
	if err != nil {
		return err
	}
	err = fill(ctx, opt, f, t, data)
	if closeErr := f.Close(); err == nil && closeErr != nil {
		err = ioError("close", t.path, closeErr)
	}
	return err
}

// openTemp makes the new file. The name is in t.temp as soon as the file exists, so
// that it is removed on every other path.
func openTemp(sys fileSystem, opt Options, t *target) (file, error) {
	for i := 0; ; i++ {
		name := tempName(opt, t.path)
		// Mode 0666 less the umask, which os.CreateTemp does not give: its 0600
		// would follow the file to its final name.
		f, err := sys.Create(name)
		if err == nil {
			t.temp = name
			return f, nil
		}
		if !errors.Is(err, fs.ErrExist) || i == attempts {
			return nil, ioError("create", t.path, err)
		}
	}
}

func fill(ctx context.Context, opt Options, f file, t *target, data []byte) error {
	for len(data) > 0 {
		if err := ctx.Err(); err != nil {
			return err
		}
		n, err := f.Write(data[:min(chunk, len(data))])
		if err != nil {
			return ioError("write", t.path, err)
		}
		data = data[n:]
	}
	if t.exists {
		if err := f.Chmod(t.mode.Perm()); err != nil {
			return ioError("chmod", t.path, err)
		}
	}
	if opt.Sync {
		if err := f.Sync(); err != nil {
			return ioError("sync", t.path, err)
		}
	}
	return nil
}

// link gives the file a second, temporary name, or returns "" if the file
// system cannot.
func link(sys fileSystem, opt Options, path string) string {
	for range attempts {
		name := tempName(opt, path)
		err := sys.Link(path, name)
		if err == nil {
			return name
		}
		if !errors.Is(err, fs.ErrExist) {
			return ""
		}
	}
	return ""
}
