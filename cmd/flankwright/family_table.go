package main

import (
	"crypto/sha256"
	"errors"
	"hash"
	"io"
	"os"
	"path/filepath"

	"flankwright/cmd/flankwright/internal/table"
)

// tableSource is a table that can be read twice: once to judge it, once to make it.
type tableSource struct {
	name string // for messages
	file *os.File
	sum  hash.Hash // of what was read last
	gone bool      // the file is a copy that goes with the program
}

// openTable opens a table; standard input is copied to the disk, since it cannot be
// read twice.
func openTable(in io.Reader, o familyOptions) (*tableSource, error) {
	fail := func(err error) (*tableSource, error) {
		return nil, problems{{message: "the table " + o.table + " cannot be read: " + reason(err), exit: exitFailed,
			hint: "give the path of a table, or - for standard input"}}
	}
	if o.table != "-" {
		for _, ending := range []string{".json", ".csv"} {
			if list := filepath.Join(o.dir, o.shard.tag()+ending); sameFile(list, o.table) {
				return nil, problems{{flag: "output", value: o.dir, message: "the family's list " + list + " would overwrite the table",
					hint: "choose another folder, or another name for the table", exit: exitMalformed}}
			}
		}
		file, err := os.Open(o.table)
		if err != nil {
			return fail(err)
		}
		if info, err := file.Stat(); err == nil && !info.Mode().IsRegular() {
			file.Close()
			return fail(errors.New("it is not a regular file"))
		}
		return &tableSource{name: filepath.Base(o.table), file: file}, nil
	}
	file, err := os.CreateTemp("", "flankwright-table-")
	if err != nil {
		return fail(err)
	}
	s := &tableSource{name: "-", file: file, gone: true}
	// Where the system lets it, the copy has no name from now on, so that a killed
	// program leaves nothing.
	if os.Remove(file.Name()) == nil {
		s.gone = false
	}
	if _, err := io.Copy(file, in); err != nil {
		s.Close()
		return fail(err)
	}
	return s, nil
}

// Close gives the table back.
func (s *tableSource) Close() {
	s.file.Close()
	if s.gone {
		os.Remove(s.file.Name())
	}
}

// start begins to read the table, from its header.
func (s *tableSource) start() (*table.Reader, error) {
	if _, err := s.file.Seek(0, io.SeekStart); err != nil {
		return nil, s.failed(err)
	}
	s.sum = sha256.New()
	r, err := table.NewReader(io.TeeReader(s.file, s.sum))
	return r, s.failed(err)
}

// failed puts an error of the table into a problem.
func (s *tableSource) failed(err error) error {
	var fault *table.Fault
	switch {
	case err == nil:
		return nil
	case errors.As(err, &fault):
		return problems{s.fault(fault)}
	}
	return problems{{message: "the table " + s.name + " cannot be read: " + reason(err), exit: exitFailed}}
}

// fault puts a fault of the table into a problem.
func (s *tableSource) fault(f *table.Fault) problem {
	return problem{message: s.at(f.Line, f.Column) + ": " + f.Text, hint: f.Hint, exit: exitMalformed}
}

// at is a place of the table, as editors understand it.
func (s *tableSource) at(line, column int) string {
	at := s.name + ":" + plain(float64(line))
	if column > 0 {
		at += ":" + plain(float64(column))
	}
	return at
}
